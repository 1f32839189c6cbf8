using System.Diagnostics;
using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Import.Rigs;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>Does a flight of a card reach the interval that the card predicted? A machine drawn at random flies a first flight, a card is planned
/// from its fit, and the whole simulator, which the planner does not know, flies that card and an even spread of the same minutes.</summary>
internal static class CardStudy
{
    private const ulong SecondFlight = 1_000_000; // added to the seed: other air, other noise

    /// <summary>How one card did.</summary>
    /// <param name="PullRatio">Predicted over realised half-width of the pull.</param>
    /// <param name="ShiftRatio">The same of the shift; null when one of them has none.</param>
    /// <param name="Covers">Whether the realised interval of the pull holds the truth.</param>
    /// <param name="HalfWidth">Realised half-width of the pull, rad/s.</param>
    /// <param name="EvenHalfWidth">That of the even spread.</param>
    /// <param name="EvenShift">Half-widths of the shift, card and even spread, m.</param>
    /// <param name="Plan">The card.</param>
    internal sealed record Outcome(double PullRatio, double? ShiftRatio, bool Covers, double HalfWidth, double EvenHalfWidth, (double Card, double Even)? EvenShift, CardPlan Plan);

    /// <summary>One machine; null when its card is refused (a pull too strong for a card) or a fit has no pull.</summary>
    public static Outcome? One(ulong seed, double minutes = 6)
    {
        Scenario machine = RandomScenarios.Draw(seed, seed % 2 == 0 ? TurnResponse.FirstOrder : TurnResponse.SecondOrder);
        Rig rig = RigFileReader.Read("machine.toml", RigText.Write(machine));
        var trim = new TrimOptions { Draws = 2000 };
        TrimAnalysis first = Fly(machine with { Legs = TestCards.Alternating(headings: 2) }, rig, trim, out _);
        var options = new CardOptions { Minutes = minutes };
        PriorFlight prior = PriorFlight.Of(first);
        CardPlan plan = CardPlanner.Plan(rig, options, prior);
        if (plan.Prediction is null || plan.Legs.IsEmpty)
            return null;
        Scenario again = machine with { Seed = seed + SecondFlight };
        TrimAnalysis card = Fly(FlownCard.With(again, plan.Legs), rig, trim, out FlightTruth truth);
        var design = new CardDesign(plan.Machine, options);
        TrimAnalysis even = Fly(FlownCard.With(again, design.Even(plan.Seconds / 60).Legs()), rig, trim, out _);
        if (card.Pull.AtBalance.Interval95 is not ConfidenceInterval interval || even.Pull.AtBalance.Interval95 is not ConfidenceInterval other)
            return null;
        double level = truth.Pull.Single(p => p.Setting == "cruise").RateRadPerSec;
        double? shift = Width(card), evenShift = Width(even);
        return new(
            plan.Prediction.PullHalfWidthRadPerSec / interval.HalfWidth,
            plan.Prediction.ShiftHalfWidthM / shift,
            interval.Contains(level),
            interval.HalfWidth,
            other.HalfWidth,
            shift is double s && evenShift is double e ? (s, e) : null,
            plan);

        double? Width(TrimAnalysis analysis)
        {
            TrimPosterior posterior = TrimPosterior.Draw(rig, new RigSpread(rig), analysis.Fit, analysis.Signals, trim);
            PowerLevels levels = PowerLevels.Of(analysis.Signals, analysis.Fit, trim.BalanceThrust);
            return posterior.Report.RadPerSecPerM is null ? null : ShiftSolver.Shift(posterior, levels, analysis.Signals, analysis.Fit).Interval95.HalfWidth;
        }
    }

    private static TrimAnalysis Fly(Scenario scenario, Rig rig, TrimOptions trim, out FlightTruth truth)
    {
        SimulatedFlight flight = FlightSimulator.Fly(scenario);
        truth = flight.Truth;
        TurnSignals signals = TurnSignals.From(flight.Log, rig);
        return TrimAnalysis.Run(signals, new FilterErrorEstimator().Estimate(signals), rig, trim);
    }

    /// <summary>The study and its table.</summary>
    public static int Run(Func<string, double, double> number)
    {
        int flights = (int)number("--flights", 200), threads = (int)number("--threads", 1);
        double minutes = number("--minutes", 6);
        ulong seed = (ulong)number("--seed", 1);
        if (flights < 1 || threads < 1 || !(minutes >= CardOptions.FewestMinutes))
        {
            Console.Error.WriteLine("card [--flights N] [--minutes M] [--threads N] [--seed N]: numbers above 0, at least 3 minutes");
            return 2;
        }
        var outcomes = new Outcome?[flights];
        var clock = Stopwatch.StartNew();
        int done = 0;
        const int TableEvery = 50; // a study that is stopped has shown something
        Parallel.For(0, flights, new ParallelOptions { MaxDegreeOfParallelism = threads }, i =>
        {
            outcomes[i] = One((seed * 10_000) + (ulong)i, minutes);
            int now = Interlocked.Increment(ref done);
            if (now % 10 == 0)
                Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\rcard: {now}/{flights}, {clock.Elapsed.TotalSeconds:F0} s "));
            if (now % TableEvery == 0 && now < flights)
                Console.WriteLine(Table([.. outcomes.OfType<Outcome>()], now));
        });
        Console.Error.WriteLine();
        Console.WriteLine(Table([.. outcomes.OfType<Outcome>()], flights));
        return 0;
    }

    public static double Median(IEnumerable<double> values) => QuantileType7.Of([.. values], 0.5);

    private static string Table(Outcome[] all, int flights)
    {
        (double Card, double Even)[] shifts = [.. all.Select(o => o.EvenShift).OfType<(double, double)>()];
        double[] ratios = [.. all.Select(o => o.ShiftRatio).OfType<double>()];
        return string.Create(CultureInfo.InvariantCulture, $"""
            | | n | predicted/realised, median | 10 % to 90 % | card ±, median | even spread ±, median | even/card, median |
            |---|--:|--:|--:|--:|--:|--:|
            | pull, deg/s | {all.Length} of {flights} | {Median(all.Select(o => o.PullRatio)):F3} | {Range(all.Select(o => o.PullRatio))} | {Deg(Median(all.Select(o => o.HalfWidth))):F2} | {Deg(Median(all.Select(o => o.EvenHalfWidth))):F2} | {Median(all.Select(o => o.EvenHalfWidth / o.HalfWidth)):F2} |
            | shift, mm | {ratios.Length} | {Median(ratios):F3} | {Range(ratios)} | {1000 * Median(shifts.Select(s => s.Card)):F1} | {1000 * Median(shifts.Select(s => s.Even)):F1} | {Median(shifts.Select(s => s.Even / s.Card)):F2} |

            pull inside its interval: {all.Count(o => o.Covers)} of {all.Length}; median inflation {Median(all.Select(o => o.Plan.Prediction!.Inflation)):F2}, t factor {Median(all.Select(o => o.Plan.Prediction!.TFactor)):F2}; different cards: {all.Select(o => string.Join(' ', o.Plan.Legs.Select(l => $"{l.Kind}{l.Power}{l.Seconds}"))).Distinct().Count()}
            """);

        static string Range(IEnumerable<double> values)
        {
            double[] all = [.. values];
            return string.Create(CultureInfo.InvariantCulture, $"{QuantileType7.Of(all, 0.1):F2} to {QuantileType7.Of(all, 0.9):F2}");
        }

        static double Deg(double rad) => double.RadiansToDegrees(rad);
    }
}
