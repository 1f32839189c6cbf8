using System.Collections.Immutable;
using System.Diagnostics;
using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>From pull to millimetres over many machines: does the shift's interval hold the true shift, does a travel null the turn, and is
/// what was entered the wrong way round noticed.</summary>
internal static class ShiftStudy
{
    /// <summary>Depths of the thrust line below the carabiners that count as near the carabiners and near the CG, m.</summary>
    private const double NearCarabinersM = 0.13, NearCgM = 0.30;

    /// <summary>The simulator looks for a null within this travel, m.</summary>
    private const double LargestTravelM = 0.25;

    /// <summary>Draws of a posterior: enough that the ends of an interval move by 3 % of its width.</summary>
    private static readonly TrimOptions _options = new() { Draws = 2000 };

    private static readonly (string Name, SensitivitySources Sources)[] _sources =
    [
        ("prior alone", SensitivitySources.Prior),
        ("torque", SensitivitySources.Torque),
        ("ballast legs", SensitivitySources.Ballast),
        ("pair: riser carabiners moved 20 mm", SensitivitySources.Pair),
        ("all together", SensitivitySources.All),
    ];

    public static readonly ImmutableArray<AdjustmentKind> Kinds =
        [AdjustmentKind.CarabinerPair, AdjustmentKind.CarabinerOneSide, AdjustmentKind.BarSpacer, AdjustmentKind.HarnessFront, AdjustmentKind.HarnessFrontRear];

    /// <summary>How one source did on one flight.</summary>
    internal sealed record ShiftOutcome(bool Covers, double HalfWidthM, double ErrorM, double Effective, bool Conflict, bool TorqueUsed);

    /// <summary>How one travel did on one flight; the first step is null when it is too small to set.</summary>
    internal sealed record TravelOutcome(AdjustmentKind Kind, bool Covers, double HalfWidthM, bool? FirstStepHelps, double ThrustDepthM, bool Stated, bool RoundedAgainst);

    internal sealed record FlightOutcome(ShiftOutcome[] Shifts, TravelOutcome[] Travels, VerdictCode Verdict, VerdictStrength Strength, bool PullCovers);

    /// <summary>One flight with each source, and its travels with torque and ballast.</summary>
    public static FlightOutcome? One(ulong seed, KeptFits kept)
    {
        ShiftFlight flight = ShiftFlight.Fly(seed, kept);
        if (flight.Fit[Core.Turns.TurnCoefficient.Thrust] is null)
            return null;
        TrimOptions options = _options with { KnownChanges = flight.Pair() is KnownChange known ? [known] : [] };
        PowerLevels levels = PowerLevels.Of(flight.Signals, flight.Fit, options.BalanceThrust);
        var spread = new RigSpread(flight.Rig);
        var shifts = new ShiftOutcome[_sources.Length];
        for (int i = 0; i < shifts.Length; i++)
        {
            TrimPosterior posterior = flight.Posterior(_sources[i].Sources, options);
            ShiftReport shift = ShiftSolver.Shift(posterior, levels, flight.Signals, flight.Fit);
            shifts[i] = new(shift.Interval95.Contains(flight.Truth.EquivalentShiftM), shift.Interval95.HalfWidth, shift.CgShiftM - flight.Truth.EquivalentShiftM,
                posterior.Report.EffectiveSamples, posterior.Report.Conflict, posterior.TorqueUsed);
        }
        TrimPosterior ordinary = flight.Posterior(SensitivitySources.Torque, _options);
        ImmutableArray<AdjustmentReport> adjustments = ShiftSolver.Adjustments(
            flight.Rig, spread, ordinary, levels, flight.Signals, flight.Fit, constantFirst: false, out _, Kinds);
        TrimAnalysis answer = TrimAnalysis.Run(flight.Signals, flight.Fit, flight.Rig, _options with { Draws = 500 });
        var travels = new List<TravelOutcome>();
        double before = SteadyTurn.Rate(flight.Scenario, flight.Truth.LevelThrustN);
        foreach (AdjustmentReport a in adjustments)
        {
            double? truth = flight.Truth.Travels.Single(t => t.Kind == Word(a.Kind)).TravelM;
            bool? helps = null;
            if (a.FirstStep != 0)
            {
                double after = TurnAfter(flight.Scenario, a.Kind, a.FirstStep, flight.Truth.LevelThrustN);
                helps = Math.Abs(after) < Math.Abs(before) && Math.Sign(after) == Math.Sign(before);
            }
            // Where no travel within 0.25 m nulls the turn, an honest interval reaches beyond.
            bool covers = truth is double t ? a.Interval95.Contains(t) : a.Interval95.Upper > LargestTravelM || a.Interval95.Lower < -LargestTravelM;
            travels.Add(new(a.Kind, covers, a.Interval95.HalfWidth, helps, flight.Scenario.Propeller.ThrustLineDepthM,
                answer.Verdict.TravelGiven, truth is double d && d * a.Rounded < 0));
        }
        return new(shifts, [.. travels], answer.Verdict.Code, answer.Verdict.Strength,
            answer.Pull.At[2].Interval95 is ConfidenceInterval pull && pull.Contains(before));
    }

    /// <summary>The same machine with something entered the wrong way round.</summary>
    /// <param name="Eligible">Slope differs from zero at 95 %, and the rig as it is predicts its sign in 95 % of draws.</param>
    /// <param name="Named">The result says what is wrong.</param>
    /// <param name="AddsToPull">A travel it gives would turn the machine further to the side it pulls to.</param>
    /// <param name="TravelGiven">It gives a travel at all.</param>
    internal sealed record WrongOutcome(bool Eligible, bool Named, bool AddsToPull, bool TravelGiven);

    public static WrongOutcome Wrong(ulong seed, EnteredWrong wrong, KeptFits kept)
    {
        ShiftFlight flight = ShiftFlight.Fly(seed, kept, wrong);
        TrimAnalysis answer = TrimAnalysis.Run(flight.Signals, flight.Fit, flight.Rig, _options with { Draws = 2000 });
        bool eligible = false;
        if (flight.Fit[Core.Turns.TurnCoefficient.Thrust] is Estimate slope)
        {
            ShiftFlight right = wrong == EnteredWrong.Rotation ? ShiftFlight.Fly(seed, kept) : flight;
            double share = right.Posterior(SensitivitySources.Prior, _options).PredictsRightShare;
            bool differs = Math.Abs(slope.Value) > StudentT.TwoSidedFactor(0.95, flight.Fit.DegreesOfFreedom) * slope.StandardError;
            eligible = differs && (slope.Value > 0 ? share : 1 - share) >= 0.95;
        }
        FindingCode[] names = wrong switch
        {
            EnteredWrong.Rotation => [FindingCode.RotationConflict],
            EnteredWrong.GyroSign => [FindingCode.GyroSignReversed],
            EnteredWrong.Brakes => [FindingCode.BrakeSignReversed, FindingCode.BrakesAgainstTurn],
            _ => [],
        };
        bool named = answer.Verdict.Reasons.Concat(answer.Warnings).Any(f => names.Contains(f.Code));
        double thrust = flight.Truth.LevelThrustN;
        double before = SteadyTurn.Rate(flight.Scenario, thrust);
        bool adds = answer.Adjustments.Where(a => Kinds.Contains(a.Kind)).Any(a =>
            Math.Abs(TurnAfter(flight.Scenario, a.Kind, Math.Sign(a.Travel) * 1e-4, thrust)) > Math.Abs(before));
        return new(eligible, named, adds, answer.Verdict.TravelGiven);
    }

    /// <summary>Acceptance of issue text, as a table for DEVELOPERS.md.</summary>
    public static int Run(string[] args)
    {
        int flights = Number("--flights", 2000), wrongs = Number("--wrong", 200), threads = Number("--threads", 1), minutes = Number("--minutes", 24 * 60);
        ulong seed = (ulong)Number("--seed", 1);
        var kept = new KeptFits(Text("--fits") is { Length: > 0 } path ? path : null);
        var clock = Stopwatch.StartNew();
        var outcomes = new FlightOutcome?[flights];
        int done = 0;
        bool GoOn() => clock.Elapsed.TotalMinutes < minutes;
        Parallel.For(0, flights, new ParallelOptions { MaxDegreeOfParallelism = threads }, (i, loop) =>
        {
            outcomes[i] = One(seed + (ulong)i, kept);
            if (Interlocked.Increment(ref done) % 100 == 0)
                Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\r{done}/{flights}, {clock.Elapsed.TotalSeconds:F0} s "));
            if (!GoOn())
                loop.Stop();
        });
        Console.Error.WriteLine();
        FlightOutcome[] all = [.. outcomes.OfType<FlightOutcome>()];
        Print(all);
        Console.WriteLine();
        Console.WriteLine("| entered wrong | flights | eligible | named among these | travel given | travel adds to the pull |");
        Console.WriteLine("|---|--:|--:|--:|--:|--:|");
        foreach (EnteredWrong wrong in (ReadOnlySpan<EnteredWrong>)[EnteredWrong.Rotation, EnteredWrong.GyroSign, EnteredWrong.Brakes])
        {
            var results = new WrongOutcome?[wrongs];
            Parallel.For(0, wrongs, new ParallelOptions { MaxDegreeOfParallelism = threads }, (i, loop) =>
            {
                results[i] = Wrong(seed + (ulong)i, wrong, kept);
                if (!GoOn())
                    loop.Stop();
            });
            WrongOutcome[] some = [.. results.OfType<WrongOutcome>()];
            WrongOutcome[] eligible = [.. some.Where(w => w.Eligible)];
            Line($"| {WordsOf(wrong)} | {some.Length} | {eligible.Length} | {Percent(eligible, w => w.Named)} | {some.Count(w => w.TravelGiven)} | {some.Count(w => w.AddsToPull)} |");
        }
        return 0;

        int Number(string option, int otherwise) => Text(option) is { Length: > 0 } text ? int.Parse(text, CultureInfo.InvariantCulture) : otherwise;

        string Text(string option)
        {
            int at = Array.IndexOf(args, option);
            return at >= 0 && at + 1 < args.Length ? args[at + 1] : "";
        }
    }

    private static void Print(FlightOutcome[] all)
    {
        Console.WriteLine("| sensitivity from | flights | shift: cover | median half-width mm | median error mm | effective draws (5 %) | conflict |");
        Console.WriteLine("|---|--:|--:|--:|--:|--:|--:|");
        for (int i = 0; i < _sources.Length; i++)
        {
            ShiftOutcome[] row = [.. all.Select(f => f.Shifts[i])];
            Row(_sources[i].Name, row);
            if (_sources[i].Sources == SensitivitySources.Torque)
                Row("torque, where it passes its gates", [.. row.Where(o => o.TorqueUsed)]);
        }
        Console.WriteLine();
        Console.WriteLine("| part moved, torque as source | thrust line | travels | cover | median half-width mm | first steps | smaller and same side |");
        Console.WriteLine("|---|---|--:|--:|--:|--:|--:|");
        TravelOutcome[] travels = [.. all.SelectMany(f => f.Travels)];
        foreach (AdjustmentKind kind in Kinds)
        {
            foreach ((string where, Func<TravelOutcome, bool> of) in (ReadOnlySpan<(string, Func<TravelOutcome, bool>)>)[
                ("any", static _ => true), ("near the carabiners", static t => t.ThrustDepthM < NearCarabinersM), ("near the CG", static t => t.ThrustDepthM > NearCgM)])
            {
                TravelOutcome[] some = [.. travels.Where(t => t.Kind == kind && of(t))];
                TravelOutcome[] steps = [.. some.Where(t => t.FirstStepHelps is not null && t.Stated)];
                Line($"| {Word(kind)} | {where} | {some.Length} | {Percent(some, t => t.Covers)} | {Median(some.Select(t => t.HalfWidthM * 1000)):F1} | {steps.Length} | {Percent(steps, t => t.FirstStepHelps == true)} |");
            }
        }
        Console.WriteLine();
        Line($"Verdicts: {string.Join(", ", all.GroupBy(f => f.Verdict).OrderBy(g => g.Key).Select(g => string.Create(CultureInfo.InvariantCulture, $"{g.Key} {g.Count()}")))}.");
        Line($"Pull at level flight inside its interval: {Percent(all, f => f.PullCovers)}.");
        Line($"Travels stated and against the true one: {travels.Count(t => t.Stated && t.RoundedAgainst)} of {travels.Count(t => t.Stated)}.");

        static void Row(string name, ShiftOutcome[] row) => Line(
            $"| {name} | {row.Length} | {Percent(row, o => o.Covers)} | {Median(row.Select(o => o.HalfWidthM * 1000)):F1} | {Median(row.Select(o => o.ErrorM * 1000)):F1} | {Low(row.Select(o => o.Effective)):F0} | {Percent(row, o => o.Conflict)} |");
    }

    /// <summary>Turn in the simulator after a travel; no flight at all counts as turning for ever.</summary>
    private static double TurnAfter(Scenario s, AdjustmentKind kind, double travel, double thrust)
    {
        Scenario moved = kind switch
        {
            AdjustmentKind.CarabinerPair => s.WithCarabinerPair(travel),
            AdjustmentKind.CarabinerOneSide => s.WithCarabinerOneSide(travel),
            AdjustmentKind.BarSpacer => s.WithBarSpacer(travel),
            AdjustmentKind.HarnessFront => s.WithHarnessFront(travel),
            _ => s.WithHarnessFrontRear(travel),
        };
        try
        {
            return SteadyTurn.Rate(moved, thrust);
        }
        catch (SimulationException)
        {
            return double.PositiveInfinity;
        }
    }

    private static string Word(AdjustmentKind kind) => kind switch
    {
        AdjustmentKind.CarabinerPair => "carabiner_pair",
        AdjustmentKind.CarabinerOneSide => "carabiner_one_side",
        AdjustmentKind.BarSpacer => "bar_spacer",
        AdjustmentKind.HarnessFront => "harness_front",
        _ => "harness_front_rear",
    };

    private static string WordsOf(EnteredWrong wrong) => wrong switch
    {
        EnteredWrong.Rotation => "rotation",
        EnteredWrong.GyroSign => "gyro sign",
        _ => "left and right brake",
    };

    private static void Line(FormattableString text) => Console.WriteLine(text.ToString(CultureInfo.InvariantCulture));

    private static string Percent<T>(T[] all, Func<T, bool> which) =>
        all.Length == 0 ? "–" : string.Create(CultureInfo.InvariantCulture, $"{100.0 * all.Count(which) / all.Length:F1} %");

    private static double Median(IEnumerable<double> values) => Quantile(values, 0.5);

    private static double Low(IEnumerable<double> values) => Quantile(values, 0.05);

    private static double Quantile(IEnumerable<double> values, double p)
    {
        double[] all = [.. values];
        return all.Length == 0 ? double.NaN : QuantileType7.Of(all, p);
    }
}
