using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Statistics;

// CS8524 (an unnamed enum value) cannot happen here; without it CS8509 still makes a missing member an error, which `_ =>` would hide.
#pragma warning disable CS8524

namespace TrimFit.Reporting.Wording.Comparing;

/// <summary>Before and after in English.</summary>
internal sealed record EnglishCompareWords : CompareWords
{
    private static readonly CompareHeads _heads = new()
    {
        BeforeAfter = "Before and after",
        Before = "before",
        After = "after",
        Change = "change",
        Inside = "inside the tolerance",
        Next = "What comes next",
        Noticed = "What else was noticed",
        Flights = "The flights",
        Flight = "flight",
        Setting = "setting",
        Day = "day",
        PullInLevelFlight = "pull in level flight deg/s",
        Coefficients = "Turn model before and after",
        PowerPlot = "Pull over power, before and after",
        History = "The flights in their order",
        Tolerance = "tolerance",
        FlightNumber = "flight number",
        Settings = "Settings",
        HowPooled = "put together by",
    };

    public override string Title => "Before and after";

    public override CompareHeads Heads => _heads;

    public override string Answer(FlightComparison c, Numbers numbers)
    {
        if (c.Setups.IsEmpty)
            return "None of these flights can tell its pull over power, so there is nothing to compare.";
        string power = Words.English.AtPower(c.Options.Trim.BalanceThrust, numbers);
        if (c.AtBalance is not SettingChange change || c.Verdict is not ComparisonVerdict verdict)
        {
            SetupPull only = c.Setups[0].AtBalance;
            return $"All flights have the same setting: {power} it {Turn("turns", only.Rate.Mean, numbers)} ({Range(only.Interval95, numbers)}; right is positive).";
        }
        string both = $"{power} it {Turn("turned", change.Before.Rate.Mean, numbers)} before and {Turn("turns", change.After.Rate.Mean, numbers)} now";
        string range = $"change {Range(change.Interval95, numbers)}; right is positive";
        return verdict.Code switch
        {
            ComparisonVerdictCode.Fixed => $"Fixed: at idle, in level flight and at full power the turn left lies within {numbers.Rate(c.Options.Trim.Tolerance.RadPerSec)}; {both} ({range}).",
            ComparisonVerdictCode.Better => $"Better: {both} ({range}).",
            ComparisonVerdictCode.Worse => $"Worse: {both} ({range}).",
            ComparisonVerdictCode.NoClearChange => verdict.ShownEqual
                ? $"No change: {both}, and the change was shown to be within {numbers.Rate(c.Options.Trim.Tolerance.RadPerSec)} at idle, in level flight and at full power ({range})."
                : change.Interval95.ExcludesZero
                    ? $"The turn changed, but whether the pull became smaller these flights cannot tell: {both} ({range})."
                    : $"These flights cannot tell whether anything changed: {both} ({range}).",
        };
    }

    public override string Verdict(FlightComparison c, Numbers numbers)
    {
        if (c.Verdict is not ComparisonVerdict verdict)
            return "";
        string tolerance = numbers.Rate(c.Options.Trim.Tolerance.RadPerSec);
        return verdict.Code switch
        {
            ComparisonVerdictCode.Fixed => "Two one-sided tests at each of the three powers, each at 5 %, with the scatter from flight to flight counted.",
            ComparisonVerdictCode.Better => "The pull became smaller, but " + NotInside(c, verdict, tolerance) + Larger(c),
            ComparisonVerdictCode.Worse => "The pull became larger: put it back as it was, or go the other way.",
            ComparisonVerdictCode.NoClearChange when verdict.ShownEqual => "What was changed does not matter to the pull, or something else moved with it.",
            ComparisonVerdictCode.NoClearChange => "Not a sign that it did not work. What is missing: a second flight of each setting, in turn (A-B-A), longer flights or calmer air.",
        };
    }

    /// <summary>Where the pull became larger although it is smaller where it was to be nulled.</summary>
    private static string Larger(FlightComparison c)
    {
        string[] larger = [.. c.Changes.Where(x => x.SizeChange95.Lower > 0).Select(x => At(x.Setting))];
        return larger.Length == 0 ? "" : $" {Capital(Join(larger))} it became larger: a fixed shift cannot null every power.";
    }

    private static string NotInside(FlightComparison c, ComparisonVerdict verdict, string tolerance)
    {
        if (verdict.WithheldFixed)
            return "whether it is fixed cannot be said without the brakes or hands-off spans in the log.";
        string[] not = [.. c.Changes.Where(x => x.Setting != PowerSetting.Off && !Inside(x.After.Rate, c.Options.Trim.Tolerance.RadPerSec)).Select(x => At(x.Setting))];
        return $"it was not shown to lie within {tolerance} {Join(not)}.";
    }

    private static string At(PowerSetting setting) => setting switch
    {
        PowerSetting.Off => "with the engine off",
        PowerSetting.Idle => "at idle",
        PowerSetting.Cruise => "in level flight",
        PowerSetting.Full => "at full power",
    };

    private static bool Inside(PullDistribution pull, double tolerance) => pull.Interval(0.90) is var i && i.Lower >= -tolerance && i.Upper <= tolerance;

    public override string Inside(SetupPull pull, double toleranceRadPerSec) => Inside(pull.Rate, toleranceRadPerSec) ? "yes"
        : pull.Interval95.Lower > toleranceRadPerSec || pull.Interval95.Upper < -toleranceRadPerSec ? "no"
        : "not shown";

    public override string Removed(FlightComparison c, Numbers numbers)
    {
        if (c.AtBalance is null)
            return "";
        if (c.Removed is not FiellerSet { Ratio: double share, Interval: ConfidenceInterval i })
            return "The share of the pull that is gone cannot be given: the pull before does not differ from zero.";
        return $"Of the pull before, {numbers.Percent(share)} is gone (95 % range {numbers.PercentNumber(i.Lower)} to {numbers.Percent(i.Upper)}; above 100 % it pulls the other way now).";
    }

    public override string Attribution(ChangeAttribution? a, Numbers numbers)
    {
        if (a is null)
            return "";
        string what = a.Of switch
        {
            AttributedPull.Constant => "the constant pull",
            AttributedPull.Power => "the pull of power in level flight",
            AttributedPull.AtBalance => "the pull where it is to be nulled",
        };
        string change = $"{Capital(what)} changed by {numbers.RateNumber(a.ChangeRadPerSec)} deg/s ({Range(a.ChangeInterval95, numbers)}) with {PartOf(a.Part)}";
        return a.Share switch
        {
            { Kind: FiellerKind.Interval, Ratio: double share, Interval: ConfidenceInterval i } =>
                $"{change}: {numbers.Percent(share)} of it went with {PartOf(a.Part)} (95 % range {numbers.PercentNumber(i.Lower)} to {numbers.Percent(i.Upper)}).",
            _ => $"{change}. As a share of it this cannot be given: {what} before, {numbers.RateNumber(a.BeforeRadPerSec)} deg/s, does not differ from zero.",
        };
    }

    private static string PartOf(ChangedPart part) => part switch
    {
        ChangedPart.Geometry => "the rig's places",
        ChangedPart.Wing => "the wing",
        ChangedPart.BrakeLines => "the brake lines",
        ChangedPart.Trimmers => "the trimmers",
        ChangedPart.Harness => "the harness",
        ChangedPart.Propeller => "the propeller",
        ChangedPart.Ballast => "the ballast",
    };

    public override string Trend(FlightComparison c, Numbers numbers)
    {
        if (c.Trend is not SetupTrend t)
            return "";
        string seen = $"Smallest pull seen: {c.Setups[t.BestSeen].Name}, it {Turn("turns", c.Setups[t.BestSeen].AtBalance.Rate.Mean, numbers)}.";
        string line = $"Over the settings the turn changes by {numbers.SensitivityNumber(t.SlopeRadPerSecPerM)} {numbers.SensitivityUnit} of CG offset "
            + $"({numbers.SensitivityNumber(t.SlopeInterval95.Lower)} to {numbers.SensitivityNumber(t.SlopeInterval95.Upper)}).";
        string best = t.BestOffset is { Kind: FiellerKind.Interval, Ratio: double zero, Interval: ConfidenceInterval i }
            ? $"The line meets zero at a CG offset of {Words.English.Lateral(zero, numbers)} (95 % range {Words.English.Lateral(i.Lower, numbers)} to {Words.English.Lateral(i.Upper, numbers)})."
            : "Where the line meets zero cannot be bounded: the settings do not differ enough in their turn.";
        return $"{line} {best} {seen}";
    }

    public override string Scatter(ScatterReport s, Numbers numbers) => s.Prior.IsKnown
        ? s.Prior.RadPerSec == 0
            ? "No scatter from flight to flight is counted: the ranges hold for these flights only."
            : $"The pull of an unchanged machine is taken to scatter by {numbers.Plain(double.RadiansToDegrees(s.Prior.RadPerSec), 2)} deg/s from flight to flight."
        : s.Learned
            ? $"The pull of an unchanged machine scatters from flight to flight by about {numbers.Plain(double.RadiansToDegrees(s.MedianRadPerSec), 2)} deg/s "
                + $"({numbers.Plain(double.RadiansToDegrees(s.Interval95.Lower), 2)} to {numbers.Plain(double.RadiansToDegrees(s.Interval95.Upper), 2)}), by these flights and what is usual."
            : "How far the pull of an unchanged machine scatters from flight to flight these flights do not show; what is usual is counted in every range.";

    public override string Method(PoolingMethod method) => method switch
    {
        PoolingMethod.AssumedScatter => "one likelihood, scatter integrated out",
        PoolingMethod.RandomEffects => "random effects, Hartung and Knapp",
    };

    public override string Notice(CompareNotice notice, Numbers numbers)
    {
        ImmutableArray<double> v = notice.Values.IsDefault ? [] : notice.Values;
        ImmutableArray<string> n = notice.Names.IsDefault ? [] : notice.Names;
        string Value(int i, Func<double, string> show) => i < v.Length && double.IsFinite(v[i]) ? show(v[i]) : "an unknown value";
        string Name(int i) => i < n.Length ? n[i] : "one flight";
        string Pair(Func<double, string> show) => $"{Value(0, show)} ({Name(0)}) and {Value(1, show)} ({Name(1)})";
        return notice.Code switch
        {
            CompareNoticeCode.RegressionToTheMean => "One flight before, and it may have been picked because it was bad: part of any improvement is then chance. Put it back, fly once more, change again (A-B-A): that tells.",
            CompareNoticeCode.ScatterAssumed => $"The scatter from flight to flight (straps, way of sitting, fuel, air) is assumed: a half-normal prior with scale {Value(0, numbers.Rate)}, integrated out. Three flights of each setting measure it.",
            CompareNoticeCode.FlightNotUsed => $"{Name(0)} cannot tell its pull over power and was left out of the comparison.",
            CompareNoticeCode.NothingChanged => "The rig files are the same and nothing was declared as changed. Give the rig file of each setting, or say what was changed with --changed.",
            CompareNoticeCode.DeclaredButSame => "What was declared as changed is the same in the rig files. Check that each flight has its own rig file.",
            CompareNoticeCode.GeometryDiffers => $"The rig files also differ in the places of riser carabiners, harness hang points, power unit or thrust line, by up to {Value(0, numbers.Length)}: the change cannot be put down to one thing.",
            CompareNoticeCode.WingDiffers => $"The rig files name different wings ({Join([.. n])}), which was not declared: the change cannot be put down to one thing. Say --changed wing if that is what was changed.",
            CompareNoticeCode.PropellerDiffers => "The rig files differ in propeller, power or thrust, which was not declared: the change cannot be put down to one thing.",
            CompareNoticeCode.MassDiffers => $"The loads differ: {Pair(numbers.Mass)}. A heavier machine flies faster, needs more power and turns otherwise. Fly both settings with the same load.",
            CompareNoticeCode.HangHeightDiffers => $"The CG hangs {Value(0, numbers.Length)} below the riser carabiners in one rig file and {Value(1, numbers.Length)} in another: another hang height turns otherwise.",
            CompareNoticeCode.DensityDiffers => $"The air was of different density: {Pair(d => numbers.Plain(d, 3) + " kg/m³")} by height. Thrust and torque go with it.",
            CompareNoticeCode.HeightDiffers => $"The flights were at different heights: {Pair(h => numbers.Plain(h, 0) + " m")}.",
            CompareNoticeCode.WindDiffers => $"The wind differed: {Pair(numbers.Speed)}. Stronger wind brings rougher air.",
            CompareNoticeCode.AirspeedDiffers => $"The airspeeds differ by more than load and air explain: {Pair(numbers.Speed)}. Check trimmers, accelerator and the load in the rig files.",
            CompareNoticeCode.PowerRangesApart => $"{Name(0)} and {Name(1)} were flown at different powers: they share {Value(0, numbers.Percent)} of the range. Fly both settings by the same card.",
            CompareNoticeCode.BrakeResponseChanged => $"The brakes answer otherwise than before ({Value(1, b => numbers.Percent((b / v[0]) - 1))} more turn for the same pull; p = {Value(2, p => numbers.Plain(p, 3))}), although nothing of them was declared as changed. A tightened or stretched brake line does that, and pulls by itself: measure both lines.",
            CompareNoticeCode.TrimmersDiffer => $"The sheets of {Name(0)} and {Name(1)} name different trimmer settings.",
            CompareNoticeCode.AcceleratorDiffers => $"The accelerator was used differently: {Pair(numbers.Percent)}.",
            CompareNoticeCode.SensorRemounted => $"The logger hung at different angles: {Pair(numbers.Angle)}. Its zero may have changed with it.",
            CompareNoticeCode.TurnDirectionsDiffer => $"One flight turned mostly left, the other mostly right: right turns were {Pair(numbers.Percent)}.",
            CompareNoticeCode.PairNotUsed => "The change was not used to measure the sensitivity, because more than the rig's places differ between the settings.",
            CompareNoticeCode.SwapLimits => "What a swap of wings cannot tell: harness, pilot and machine stay the same and keep their part of the pull, and the other wing brings a pull of its own. Only the difference between the two wings is measured. A swap back (A-B-A) tells whether anything else moved.",
            CompareNoticeCode.SwapBackDiffers => $"The same setting flown again does not give the same pull: {Name(1)} less {Name(0)} is {Value(0, numbers.Rate)}, beyond errors and scatter. Something else moved: straps, way of sitting, trimmers, lines, load.",
            CompareNoticeCode.SwapBackAgrees => $"The same setting flown again agrees: {Name(1)} less {Name(0)} is {Value(0, numbers.Rate)}, within errors and scatter. Nothing else seems to have moved.",
            CompareNoticeCode.BeforeAlreadyInside => "Before the change the pull already lay inside the tolerance.",
            CompareNoticeCode.NoSteering => $"Without brakes or hands-off spans in the log nothing can be called fixed: {Join([.. n])}.",
            CompareNoticeCode.ThrustBasesDiffer => "Some rig files know the thrust in newtons, others do not: all flights are compared at shares of full thrust. Give static_thrust_n in every rig file.",
        };
    }

    public override string Order(OpenedOrder order, bool fits) => $"Blind trial. Order sealed before the flights: {Join([.. order.Setups])}. Number on the card: {order.Commitment}."
        + (fits ? "" : " There are fewer or more flights than the order has.");

    public override string PowerPlotDescription(FlightComparison c) =>
        $"Turn rate over thrust with the settings \"{c.Setups[0].Name}\" and \"{c.Setups[^1].Name}\", each with its 95 % band, and the tolerance either side of zero.";

    public override string HistoryDescription(FlightComparison c) =>
        $"Pull in level flight of each of {c.Flights.Length} flights in their order, with 95 % bars of the flight alone; a marker for each setting, and the tolerance either side of zero.";

    public override string Strength(VerdictStrength strength) => strength switch
    {
        VerdictStrength.None => "Strength: none. A direction at most, never millimetres.",
        VerdictStrength.Weak => "Strength: weak. The direction is certain, the size is not: go in steps, and fly after each.",
        VerdictStrength.Fair => "Strength: fair. The size is known within a half; go in steps.",
        VerdictStrength.Firm => "Strength: firm. Direction and size are known within one step.",
    };

    public override string NextNote(bool pairUsed) => pairUsed
        ? "This rests on all flights together: what the change between the settings did measures how much a shift turns this machine."
        : "The change between the settings does not measure how much a shift turns this machine; the size of the next step rests on the last setting's flights.";

    private static string Turn(string verb, double radPerSec, Numbers numbers) => numbers.RateNumber(Math.Abs(radPerSec)) == numbers.RateNumber(0)
        ? $"hardly {verb}"
        : $"{verb} {(radPerSec < 0 ? "left" : "right")} at {numbers.Rate(Math.Abs(radPerSec))}";

    private static string Range(ConfidenceInterval interval, Numbers numbers) => numbers.RateRange(interval, " to ");

    private static string Join(params string[] items) => items.Length switch
    {
        0 => "",
        1 => items[0],
        _ => string.Join(", ", items[..^1]) + " and " + items[^1],
    };

    private static string Capital(string text) => char.ToUpperInvariant(text[0]) + text[1..];
}
