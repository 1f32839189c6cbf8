using System.Diagnostics;
using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Import.Rigs;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>A flight with GPS alone and the flight sheet that the speaking card saves: does the interval hold the pull when the marks are off?</summary>
internal static class SheetStudy
{
    /// <summary>Marks are off by up to this, evenly, s.</summary>
    public const double JitterSec = 5;

    /// <summary>How one flight came out.</summary>
    /// <param name="Covers">Whether the interval of the pull in level flight holds the truth.</param>
    /// <param name="HalfWidth">Its half-width, rad/s.</param>
    /// <param name="ErrorInStdErrors">Estimate less truth over the standard error.</param>
    /// <param name="Predicted">Half-width that the card predicted, rad/s.</param>
    internal sealed record Outcome(bool Covers, double HalfWidth, double ErrorInStdErrors, double Predicted);

    /// <summary>One flight; null when the fit has no pull.</summary>
    public static Outcome? One(ulong seed, double minutes)
    {
        Scenario machine = RandomScenarios.Draw(seed, seed % 2 == 0 ? TurnResponse.FirstOrder : TurnResponse.SecondOrder);
        Rig rig = RigFileReader.Read("machine.toml", RigText.Write(machine));
        CardPlan plan = CardPlanner.Plan(rig, new CardOptions { Minutes = minutes, Logger = CardLogger.Gps, Draws = 3 });
        SimulatedFlight flight = FlightSimulator.Fly(FlownCard.With(machine, plan.Legs) with
        {
            // Seed and machine as drawn; a logger of fixes once a second, with the height of its own barometer.
            Sensors = machine.Sensors with { GyroHz = 0, GpsHz = 1, BarometerHz = 1, RpmHz = 0, ThrottleHz = 0, BrakesHz = 0 },
        });
        var random = SeededRandom.ForStream(seed, 501);
        double[] marks = [.. flight.Legs.Select(l => Math.Max(0, l.StartSec + random.NextUniform(-JitterSec, JitterSec))), flight.Legs[^1].EndSec];
        var sheet = new FlightSheet
        {
            Legs =
            [
                .. flight.Legs.Select((l, i) => new SheetLeg
                {
                    Start = SheetTime.FromSeconds(marks[i]),
                    End = SheetTime.FromSeconds(Math.Max(marks[i] + 1, marks[i + 1])),
                    Kind = plan.Legs[i].Kind switch
                    {
                        CardLegKind.HandsOff => SheetLegKind.HandsOff,
                        CardLegKind.Hold => SheetLegKind.Held,
                        _ => SheetLegKind.Other,
                    },
                    Power = plan.Legs[i].Power,
                }),
            ],
        };
        SheetedFlight sheeted = SheetLegs.Apply(flight.Log, sheet);
        TurnSignals signals = TurnSignals.From(sheeted.Flight, rig, sheeted.Legs.AsSpan());
        TrimAnalysis analysis = TrimAnalysis.Run(signals, new FilterErrorEstimator().Estimate(signals), rig, new TrimOptions { Draws = 500 });
        if (analysis.Pull.AtBalance is not { Interval95: ConfidenceInterval interval, RateRadPerSec: double rate })
            return null;
        double truth = flight.Truth.Pull.Single(p => p.Setting == "cruise").RateRadPerSec;
        double factor = StudentT.TwoSidedFactor(0.95, analysis.Fit.DegreesOfFreedom);
        return new(interval.Contains(truth), interval.HalfWidth, (rate - truth) * factor / interval.HalfWidth, plan.Prediction!.PullHalfWidthRadPerSec);
    }

    /// <summary>The study and its table.</summary>
    public static int Run(Func<string, double, double> number)
    {
        int flights = (int)number("--flights", 200), threads = (int)number("--threads", 1);
        double minutes = number("--minutes", 8);
        ulong seed = (ulong)number("--seed", 1);
        if (flights < 1 || threads < 1 || !(minutes >= CardOptions.FewestMinutes))
        {
            Console.Error.WriteLine("sheet [--flights N] [--minutes M] [--threads N] [--seed N]: numbers above 0, at least 3 minutes");
            return 2;
        }
        var outcomes = new Outcome?[flights];
        var clock = Stopwatch.StartNew();
        int done = 0;
        Parallel.For(0, flights, new ParallelOptions { MaxDegreeOfParallelism = threads }, i =>
        {
            outcomes[i] = One((seed * 10_000) + (ulong)i, minutes);
            int now = Interlocked.Increment(ref done);
            if (now % 10 == 0)
                Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\rsheet: {now}/{flights}, {clock.Elapsed.TotalSeconds:F0} s "));
        });
        Console.Error.WriteLine();
        Outcome[] all = [.. outcomes.OfType<Outcome>()];
        (int lowest, int highest) = BinomialBand.Counts(all.Length, 0.95, 0.99);
        Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"""
            GPS once a second and the sheet, marks off by up to {JitterSec} s: {all.Count(o => o.Covers)} of {all.Length} intervals hold the pull in level flight
            ({flights - all.Length} flights without a pull); 99 % band {lowest} to {highest}; median half-width {double.RadiansToDegrees(CardStudy.Median(all.Select(o => o.HalfWidth))):F2} deg/s,
            bias {all.Average(o => o.ErrorInStdErrors):F2} standard errors, spread {Math.Sqrt(all.Average(o => o.ErrorInStdErrors * o.ErrorInStdErrors)):F2}
            """));
        return 0;
    }
}
