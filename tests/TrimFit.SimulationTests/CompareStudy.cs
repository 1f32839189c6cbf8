using System.Collections.Immutable;
using System.Diagnostics;
using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>Before and after over many pairs: how often `fixed` is said where it is wrong and where it is right, whether the sensitivity's interval
/// holds the truth, how much narrower two flights are than one, and what else is noticed.</summary>
internal static class CompareStudy
{
    private static readonly double _tolerance = ComparePair.Options.Tolerance.RadPerSec;

    /// <summary>Largest change of the pull from idle to full power of machines drawn at the tolerance, and within a quarter of it, rad/s.</summary>
    private static readonly double _wideRange = 1.5 * _tolerance, _smallRange = 0.45 * _tolerance;

    private const double TravelM = 0.025, ModelErrorLogSd = 0.25;

    internal sealed record PairOutcome
    {
        public required bool FixedAtTolerance { get; init; }
        public required bool FixedAtToleranceOfTwo { get; init; }
        public required bool FixedWithin { get; init; }
        public required bool FixedWithinOfTwo { get; init; }
        public required bool PairUsed { get; init; }
        public required bool? SensitivityCovers { get; init; }
        public required bool ShiftCovers { get; init; }
        public required double Together { get; init; }
        public required double BeforeAlone { get; init; }
        public required double AfterAlone { get; init; }
        public required double StdError { get; init; }
        public required double Minutes { get; init; }
        public required bool ChangeCovers { get; init; }
        public required ComparisonVerdictCode Verdict { get; init; }
        public required ImmutableArray<CompareNoticeCode> Notices { get; init; }
    }

    internal sealed record SwapOutcome(bool? ShareCovers, bool MassNoticed, bool LineNoticed, bool LineFalselyNoticed);

    /// <summary>One machine: a flight before, and flights after with the pull left at the tolerance and within a quarter of it.</summary>
    public static PairOutcome? Pair(ulong seed, KeptFits kept)
    {
        var random = SeededRandom.ForStream(seed, 503);
        bool right = random.NextDouble() < 0.5;
        // The travel does what the statics say times a model error, as the posterior's prior has it.
        double travel = (random.NextDouble() < 0.5 ? 1 : -1) * TravelM, effective = travel * Math.Exp(ModelErrorLogSd * random.NextNormal());
        ComparePair wide = ComparePair.Draw(seed, _wideRange, kept), small = ComparePair.Draw(seed + 500_000, _smallRange, kept);
        Scenario at = ComparePair.WithLargestPull(wide.Machine, _tolerance, right), within = ComparePair.Centred(small.Machine);
        double sd = ComparePair.FlightScatterRadPerSec;
        if (wide.TryFly("before", at.WithCarabinerPair(effective), at.WithCarabinerPair(travel), 1, sd) is not ComparedFlight before
            || wide.TryFly("after", at, at, 2, sd) is not ComparedFlight first || wide.TryFly("after", at, at, 3, sd) is not ComparedFlight second
            || small.TryFly("after", within, within, 4, sd) is not ComparedFlight third || small.TryFly("after", within, within, 5, sd) is not ComparedFlight fourth)
            return null;
        FlightComparison pair = Compare(before, first);
        FlightComparison alone = Compare(before), afterAlone = Compare(first);
        if (pair.NextFit is null || alone.NextFit is null || afterAlone.NextFit is null)
            return null;
        (ShiftReport shift, SensitivityReport sensitivity) = ShiftOf(pair, first);
        (ShiftReport beforeShift, _) = ShiftOf(alone, before);
        (ShiftReport afterShift, _) = ShiftOf(afterAlone, first);
        double level = at.LevelThrustN;
        return new()
        {
            FixedAtTolerance = IsFixed(pair),
            FixedAtToleranceOfTwo = IsFixed(Compare(before, first, second)),
            FixedWithin = IsFixed(Compare(Renamed(third, "before"), third)),
            FixedWithinOfTwo = IsFixed(Compare(Renamed(third, "before"), third, fourth)),
            PairUsed = pair.PairUsed,
            SensitivityCovers = sensitivity.Interval95?.Contains(at.Wing.SensitivityRadPerSecPerM),
            ShiftCovers = shift.Interval95.Contains(-SteadyTurn.Rate(at, level) / at.Wing.SensitivityRadPerSecPerM),
            Together = shift.Interval95.HalfWidth,
            BeforeAlone = beforeShift.Interval95.HalfWidth,
            AfterAlone = afterShift.Interval95.HalfWidth,
            StdError = ComparePair.Error(first) ?? double.NaN,
            Minutes = first.Analysis.Signals.TimeSec[^1] / 60,
            ChangeCovers = pair.AtBalance!.Interval95.Contains(SteadyTurn.Rate(at, level) - SteadyTurn.Rate(at.WithCarabinerPair(effective), level)),
            Verdict = pair.Verdict!.Code,
            Notices = [.. pair.Notices.Select(n => n.Code)],
        };
    }

    /// <summary>The same card flown twice, no scatter flown or assumed: half-widths of the pull's 95 % interval at level flight.</summary>
    public static Halves? Repeat(ulong seed, KeptFits kept)
    {
        ComparePair machine = ComparePair.Draw(seed, _wideRange, kept);
        if (machine.TryFly("same", machine.Machine, machine.Machine, 6) is not ComparedFlight first || machine.TryFly("same", machine.Machine, machine.Machine, 7) is not ComparedFlight second)
            return null;
        double Half(params ImmutableArray<ComparedFlight> flights) =>
            FlightComparison.Run(flights, new() { Trim = ComparePair.Options, Scatter = FlightScatter.None, WithNext = false }).Setups[0].At[2].Interval95.HalfWidth;
        return new(Half(first), Half(second), Half(first, second));
    }

    /// <summary>Another wing; a load of 5 kg that was not declared; a brake line tightened by 30 mm that was not declared.</summary>
    public static SwapOutcome? Swap(ulong seed, KeptFits kept)
    {
        var random = SeededRandom.ForStream(seed, 504);
        ComparePair machine = ComparePair.Draw(seed, _wideRange, kept);
        double deg = double.DegreesToRadians(1), sd = ComparePair.FlightScatterRadPerSec;
        Scenario before = ComparePair.Pulled(machine.Machine, (random.NextDouble() < 0.5 ? 1 : -1) * (2 + (2 * random.NextDouble())) * deg);
        Scenario other = ComparePair.Pulled(before, 2 * random.NextNormal() * deg);
        Scenario slack = before with { Brakes = before.Brakes with { SoftStartM = 0.04 } };
        Scenario tight = slack with { Brakes = slack.Brakes with { RightLineShorterM = 0.03 } };
        Scenario heavy = before with { Mass = before.Mass with { PilotKg = before.Mass.PilotKg + 5 } };
        if (machine.TryFly("before", before, before, 8, sd) is not ComparedFlight first || machine.TryFly("after", other, other, 9, sd) is not ComparedFlight second
            || machine.TryFly("after", heavy, heavy, 10, sd) is not ComparedFlight third || machine.TryFly("before", slack, slack, 11, sd, 4) is not ComparedFlight fourth
            || machine.TryFly("after", slack, slack, 12, sd, 4) is not ComparedFlight fifth || machine.TryFly("after", tight, tight, 13, sd, 4) is not ComparedFlight sixth)
            return null;
        double was = SteadyTurn.Rate(before, 0), became = SteadyTurn.Rate(other, 0);
        FlightComparison swapped = FlightComparison.Run([first, second], new() { Trim = ComparePair.Options, Changed = ChangedPart.Wing, WithNext = false });
        bool Says(CompareNoticeCode code, params ImmutableArray<ComparedFlight> flights) => Compare(flights).Notices.Any(n => n.Code == code);
        return new(swapped.Attribution?.Share?.Contains((was - became) / was),
            Says(CompareNoticeCode.MassDiffers, first, third),
            Says(CompareNoticeCode.BrakeResponseChanged, fourth, sixth),
            Says(CompareNoticeCode.BrakeResponseChanged, fourth, fifth));
    }

    public static int Run(string[] args)
    {
        int pairs = Number("--pairs", 1000), repeats = Number("--repeats", 100), swaps = Number("--swaps", 200), threads = Number("--threads", 1), minutes = Number("--minutes", 24 * 60);
        ulong seed = (ulong)Number("--seed", 1);
        var kept = new KeptFits(Text("--fits") is { Length: > 0 } path ? path : null);
        var clock = Stopwatch.StartNew();
        Line($"{PrintRepeats(Many(repeats, i => Repeat(seed + 1_000_000 + i, kept)))}");
        Line($"{PrintSwaps(Many(swaps, i => Swap(seed + 2_000_000 + i, kept)))}");
        Line($"{Print(Many(pairs, i => Pair(seed + i, kept)))}");
        return 0;

        T[] Many<T>(int count, Func<ulong, T?> one)
            where T : class
        {
            var outcomes = new T?[count];
            int done = 0;
            Parallel.For(0, count, new ParallelOptions { MaxDegreeOfParallelism = threads }, (i, loop) =>
            {
                if (clock.Elapsed.TotalMinutes > minutes)
                {
                    loop.Stop();
                    return;
                }
                outcomes[i] = one((ulong)i);
                if (Interlocked.Increment(ref done) % 10 == 0)
                    Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\r{done}/{count}, {clock.Elapsed.TotalSeconds:F0} s "));
            });
            Console.Error.WriteLine();
            return [.. outcomes.OfType<T>()];
        }

        int Number(string option, int otherwise) => Text(option) is { Length: > 0 } text ? int.Parse(text, CultureInfo.InvariantCulture) : otherwise;

        string Text(string option)
        {
            int at = Array.IndexOf(args, option);
            return at >= 0 && at + 1 < args.Length ? args[at + 1] : "";
        }
    }

    /// <summary>Half-widths of the pull's interval at level flight: of either flight and of both, rad/s.</summary>
    internal sealed record Halves(double One, double Other, double Both);

    private static string Print(PairOutcome[] all)
    {
        int n = all.Length;
        if (n == 0)
            return "";
        PairOutcome[] known = [.. all.Where(o => o.SensitivityCovers is not null)];
        (int low, int high) = BinomialBand.Counts(known.Length, 0.95, 0.99);
        return string.Join('\n',
            "| question | pairs | count | band or wish |",
            "|---|--:|--:|---|",
            Text($"| `fixed`, pull left at the tolerance, one flight after | {n} | {all.Count(o => o.FixedAtTolerance)} | at most {BinomialBand.Counts(n, 0.05, 0.99).Highest} |"),
            Text($"| the same, two flights after | {n} | {all.Count(o => o.FixedAtToleranceOfTwo)} | at most {BinomialBand.Counts(n, 0.05, 0.99).Highest} |"),
            Text($"| `fixed`, pull left within a quarter, two flights after | {n} | {all.Count(o => o.FixedWithinOfTwo)} | more than {n / 2} |"),
            Text($"| the same, one flight after | {n} | {all.Count(o => o.FixedWithin)} | reported |"),
            Text($"| change at level flight inside its 95 % interval | {n} | {all.Count(o => o.ChangeCovers)} | {BinomialBand.Counts(n, 0.95, 0.99)} |"),
            Text($"| sensitivity inside its 95 % interval | {known.Length} | {known.Count(o => o.SensitivityCovers == true)} | {(low, high)} |"),
            Text($"| shift inside its 95 % interval | {n} | {all.Count(o => o.ShiftCovers)} | {BinomialBand.Counts(n, 0.95, 0.99)} |"),
            Text($"| shift narrower than by either flight alone, where the pair was used | {all.Count(o => o.PairUsed)} | {all.Count(o => o.PairUsed && o.Together < Math.Min(o.BeforeAlone, o.AfterAlone))} | |"),
            "",
            Text($"Median half-width of the shift, mm: before alone {Median(all, o => 1000 * o.BeforeAlone):F1}, after alone {Median(all, o => 1000 * o.AfterAlone):F1}, together {Median(all, o => 1000 * o.Together):F1}."),
            Text($"Standard error of the pull at level flight: median {Median(all, o => double.RadiansToDegrees(o.StdError)):F3} deg/s, below a sixth of the tolerance in {all.Count(o => o.StdError <= ComparePair.WantedStdError)}; flights of {Median(all, o => o.Minutes):F0} min. Pair used in {all.Count(o => o.PairUsed)}."),
            Text($"Said beside it: {string.Join(", ", all.SelectMany(o => o.Notices).GroupBy(c => c).OrderBy(g => g.Key).Select(g => Text($"{g.Key} {g.Count()}")))}."),
            Text($"Verdicts with the pull left at the tolerance: {string.Join(", ", all.GroupBy(o => o.Verdict).OrderBy(g => g.Key).Select(g => Text($"{g.Key} {g.Count()}")))}."),
            "");
    }

    private static string PrintRepeats(Halves[] all) => all.Length == 0 ? "" : Text(
        $"Same card twice, {all.Length} machines: median half-width {Median(all.SelectMany(o => new[] { o.One, o.Other }), double.RadiansToDegrees):F3} deg/s of one, {Median(all, o => double.RadiansToDegrees(o.Both)):F3} of both: {100 * (1 - (Median(all, o => o.Both) / Median(all.SelectMany(o => new[] { o.One, o.Other }), h => h))):F1} % narrower (wanted 25 to 33 %).\n");

    private static string PrintSwaps(SwapOutcome[] all)
    {
        if (all.Length == 0)
            return "";
        SwapOutcome[] known = [.. all.Where(o => o.ShareCovers is not null)];
        return string.Join('\n',
            Text($"Wing swap: share inside its interval {known.Count(o => o.ShareCovers == true)} of {known.Length}, band {BinomialBand.Counts(known.Length, 0.95, 0.99)}."),
            Text($"Undeclared 5 kg noticed: {all.Count(o => o.MassNoticed)} of {all.Length}. Tightened line noticed: {all.Count(o => o.LineNoticed)}; said where nothing was tightened: {all.Count(o => o.LineFalselyNoticed)}."));
    }

    private static FlightComparison Compare(params ImmutableArray<ComparedFlight> flights) =>
        FlightComparison.Run(flights, new() { Trim = ComparePair.Options, WithNext = false });

    private static ComparedFlight Renamed(ComparedFlight flight, string setup) => flight with { Setup = setup };

    private static bool IsFixed(FlightComparison comparison) => comparison.Verdict?.Code == ComparisonVerdictCode.Fixed;

    private static (ShiftReport Shift, SensitivityReport Sensitivity) ShiftOf(FlightComparison comparison, ComparedFlight last)
    {
        Rig rig = last.Analysis.Rig;
        TurnSignals signals = last.Analysis.Signals;
        TurnFit fit = comparison.NextFit!;
        TrimPosterior posterior = TrimPosterior.Draw(rig, new RigSpread(rig), fit, signals, comparison.NextOptions!);
        return (ShiftSolver.Shift(posterior, PowerLevels.Of(signals, fit, BalanceThrust.Cruise), signals, fit), posterior.Report);
    }

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);

    private static void Line(FormattableString text) => Console.WriteLine(Text(text));

    private static double Median<T>(IEnumerable<T> all, Func<T, double> of) => QuantileType7.Of([.. all.Select(of)], 0.5);
}
