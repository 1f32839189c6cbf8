using System.Globalization;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;

namespace TrimFit.Jobs;

/// <summary>Words and dates as book and export write them. They never change: old books hold them.</summary>
internal static class BookWords
{
    private static readonly (AdjustmentKind Kind, string Word)[] _kinds =
    [
        (AdjustmentKind.CarabinerPair, "carabiner_pair"),
        (AdjustmentKind.CarabinerOneSide, "carabiner_one_side"),
        (AdjustmentKind.BarSpacer, "bar_spacer"),
        (AdjustmentKind.HarnessFront, "harness_front"),
        (AdjustmentKind.HarnessFrontRear, "harness_front_rear"),
        (AdjustmentKind.PowerUnit, "power_unit"),
        (AdjustmentKind.EngineCant, "engine_cant"),
        (AdjustmentKind.Ballast, "ballast"),
        (AdjustmentKind.Trimmer, "trimmer"),
        (AdjustmentKind.BrakeLine, "brake_line"),
    ];

    private static readonly (CheckOutcome Outcome, string Word)[] _outcomes =
        [(CheckOutcome.Pass, "pass"), (CheckOutcome.Fail, "fail"), (CheckOutcome.NotDone, "not_done")];

    public static string Of(AdjustmentKind kind) => _kinds.Single(k => k.Kind == kind).Word;

    public static AdjustmentKind? Kind(string word) => _kinds.Any(k => k.Word == word) ? _kinds.Single(k => k.Word == word).Kind : null;

    public static string Of(CheckOutcome outcome) => _outcomes.Single(o => o.Outcome == outcome).Word;

    public static CheckOutcome? Outcome(string word) => _outcomes.Any(o => o.Word == word) ? _outcomes.Single(o => o.Word == word).Outcome : null;

    public static string Of(DateOnly date) => date.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture);

    public static DateOnly? Date(string word) =>
        DateOnly.TryParseExact(word, "yyyy-MM-dd", CultureInfo.InvariantCulture, DateTimeStyles.None, out DateOnly date) ? date : null;
}
