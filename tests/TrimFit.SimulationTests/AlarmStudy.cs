using System.Diagnostics;
using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>How a flight is made hard.</summary>
internal enum Condition
{
    /// <summary>The pilot holds course at powers that change; brakes are logged, two steps of the brakes against each other are flown.</summary>
    HeldCourse,
    /// <summary>The air moves at 8 m/s.</summary>
    StrongWind,
    /// <summary>Thirty thermals an hour and gusts of 0.8 m/s.</summary>
    Thermic,
    /// <summary>Nothing but left-hand circuits.</summary>
    LeftHandCircuits,
    /// <summary>The pilot holds course, and neither brakes nor hands-off spans are logged.</summary>
    HeldCourseUnlogged,
}

/// <summary>What one flight under a condition came to.</summary>
/// <param name="PullCovered">Whether the interval of the pull in level flight held the truth at the same thrust; null when no pull was given.</param>
/// <param name="Verdict">The verdict.</param>
/// <param name="TravelGiven">Whether any millimetres were stated.</param>
internal sealed record AlarmOutcome(bool? PullCovered, VerdictCode Verdict, bool TravelGiven);

/// <summary>Flights whose pull is hard to see: is it inside its interval, and is a balanced machine left alone? Machines, air and sensors are drawn
/// (RandomScenarios), flown by the simulator, written as a CSV file, imported and analysed as <c>trimfit fit</c> does.</summary>
internal static class AlarmStudy
{
    public static readonly Condition[] Conditions = Enum.GetValues<Condition>();

    /// <summary>Most false alarms that are accepted: at the 5 % an honest 95 % interval gives, more come once in 100 studies.</summary>
    public static int MostAlarms(int flights) => Enumerable.Range(0, flights + 1).First(k => BinomialBand.UpperTail(k + 1, flights, 0.05) <= 0.01);

    /// <summary>One flight.</summary>
    /// <param name="condition">What makes it hard.</param>
    /// <param name="seed">Seed of machine and flight.</param>
    /// <param name="balanced">Whether the machine's CG is moved so that it flies straight in level flight.</param>
    public static AlarmOutcome One(Condition condition, ulong seed, bool balanced)
    {
        Scenario s = ScenarioOf(condition, seed, balanced);
        SimulatedFlight flight = FlightSimulator.Fly(s);
        LogSource[] logs = [.. FlightFiles.Logs(flight, "flight").Select(f => LogSource.FromBytes(f.Name, f.Content.ToArray()))];
        Rig rig = RigFileReader.Read("rig.toml", RigText.Write(s));
        Core.Logs.FlightImport import = FlightReader.Read(logs);
        TrimAnalysis analysis = TrimAnalysis.Run(import.Flight, rig, new TrimOptions { Draws = 2000 });
        PullAtSetting at = analysis.Pull.AtBalance;
        bool? covered = at.Interval95 is ConfidenceInterval interval && at.ThrustN is double thrust ? interval.Contains(SteadyTurn.Rate(s, thrust)) : null;
        return new(covered, analysis.Verdict.Code, analysis.Verdict.TravelGiven || analysis.Shift is not null || analysis.Adjustments.Length > 0);
    }

    private static Scenario ScenarioOf(Condition condition, ulong seed, bool balanced)
    {
        // A machine whose turn no shift within 0.25 m stops cannot be balanced: the next one is drawn.
        Scenario s = Draw(seed);
        for (ulong again = 1; balanced; again++)
        {
            if (SteadyTurn.NullTravel(s, s.LevelThrustN, static (x, d) => x.WithCgShift(d)) is double shift)
            {
                s = s.WithCgShift(shift);
                break;
            }
            s = Draw(seed + (again * 1_000_000)) with { Seed = seed };
        }
        double direction = new Gauss(unchecked((int)seed)).Between(0, Math.Tau);
        return condition switch
        {
            Condition.HeldCourse => s with { Legs = TestCards.HeldThroughout(brakeSteps: true) },
            Condition.StrongWind => s with { Air = s.Air with { WindNorthMPerSec = 8 * Math.Cos(direction), WindEastMPerSec = 8 * Math.Sin(direction) } },
            Condition.Thermic => s with { Air = s.Air with { ThermalsPerHour = 30, GustMPerSec = 0.8 } },
            Condition.LeftHandCircuits => s with { Legs = TestCards.LeftHandCircuits() },
            _ => s with { Legs = TestCards.HeldThroughout(brakeSteps: false), Sensors = s.Sensors with { BrakesHz = 0 } },
        };

        static Scenario Draw(ulong seed) => RandomScenarios.Draw(seed, seed % 2 == 0 ? TurnResponse.FirstOrder : TurnResponse.SecondOrder);
    }

    /// <summary>Whether a verdict claims a pull.</summary>
    public static bool IsAlarm(AlarmOutcome o) => o.Verdict is not (VerdictCode.Balanced or VerdictCode.Insufficient);

    /// <summary>Whether a verdict or travel is stated that needs to know the steering.</summary>
    public static bool IsForbiddenUnlogged(AlarmOutcome o) => o.Verdict is VerdictCode.Balanced or VerdictCode.OverCompensated || o.TravelGiven;

    /// <summary>Runs the study and prints its tables.</summary>
    public static int Run(int flights, ulong seed, int threads, string only, string machine, double minutes)
    {
        (int lowest, int highest) = BinomialBand.Counts(flights, 0.95, 0.99);
        Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{flights} flights: 99 % band of a 95 % interval {lowest} to {highest}; at most {MostAlarms(flights)} false alarms"));
        Console.WriteLine("| flights | machine | n | pull inside its interval | pull claimed | balanced | insufficient | travel stated |\n|---|---|--:|--:|--:|--:|--:|--:|");
        foreach (Condition condition in Conditions)
        {
            foreach (bool balanced in (bool[])[false, true])
            {
                if (!condition.ToString().Contains(only, StringComparison.OrdinalIgnoreCase) || (machine.Length > 0 && machine != (balanced ? "balanced" : "drawn")))
                    continue;
                var clock = Stopwatch.StartNew();
                var found = new AlarmOutcome?[flights];
                int done = 0;
                Parallel.For(0, flights, new ParallelOptions { MaxDegreeOfParallelism = threads }, (i, loop) =>
                {
                    found[i] = One(condition, seed + (ulong)i, balanced);
                    if (Interlocked.Increment(ref done) % 20 == 0)
                        Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\r{condition}: {done}/{flights}, {clock.Elapsed.TotalSeconds:F0} s "));
                    if (clock.Elapsed.TotalMinutes > minutes)
                        loop.Stop();
                });
                Console.Error.WriteLine();
                AlarmOutcome[] o = [.. found.OfType<AlarmOutcome>()];
                int given = o.Count(x => x.PullCovered is not null), covered = o.Count(x => x.PullCovered == true);
                Console.WriteLine(string.Create(CultureInfo.InvariantCulture,
                    $"| {Words(condition)} | {(balanced ? "balanced" : "as drawn")} | {o.Length} | {covered} of {given} | {o.Count(IsAlarm)} | {o.Count(x => x.Verdict == VerdictCode.Balanced)} | {o.Count(x => x.Verdict == VerdictCode.Insufficient)} | {o.Count(x => x.TravelGiven)} |"));
            }
        }
        return 0;
    }

    private static string Words(Condition condition) => condition switch
    {
        Condition.HeldCourse => "course held, brakes logged",
        Condition.StrongWind => "wind of 8 m/s",
        Condition.Thermic => "thermic air",
        Condition.LeftHandCircuits => "left-hand circuits only",
        _ => "course held, nothing of it logged",
    };
}
