using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;

namespace TrimFit.Reporting.Wording;

/// <summary>The cautions. Their codes in JSON are the words joined by hyphens, such as <c>causes-first</c>.</summary>
internal enum CautionCode
{
    Estimate,
    Limits,
    CausesFirst,
    OneChange,
    HangCheck,
    CalmAir,
    Twist,
    Spacing,
    Ballast,
    HandsOff,
    EngineOff,
    EyesOut,
    StrongPull,
    FrameRunning,
    ThrustTest,
    Sudden,
}

/// <summary>What people have in hand when they need a caution.</summary>
[Flags]
internal enum CautionPlaces
{
    None = 0,
    Everywhere = 1,
    Card = 2,
    HangCheckSheet = 4,
    ThrustSheet = 8,
    AnyAdjustment = 16,
    SpacingChange = 32,
    Ballast = 64,
    ComplaintSheet = 128,
}

/// <summary>Which caution stands where: one table.</summary>
internal static class Cautions
{
    private static readonly (CautionCode Code, CautionPlaces Where)[] _table =
    [
        (CautionCode.Estimate, CautionPlaces.Everywhere),
        (CautionCode.Limits, CautionPlaces.Everywhere),
        (CautionCode.CausesFirst, CautionPlaces.Everywhere),
        (CautionCode.OneChange, CautionPlaces.AnyAdjustment),
        (CautionCode.HangCheck, CautionPlaces.AnyAdjustment | CautionPlaces.HangCheckSheet),
        (CautionCode.CalmAir, CautionPlaces.AnyAdjustment | CautionPlaces.Card),
        (CautionCode.Twist, CautionPlaces.AnyAdjustment | CautionPlaces.Card),
        (CautionCode.Spacing, CautionPlaces.SpacingChange),
        (CautionCode.Ballast, CautionPlaces.Ballast),
        (CautionCode.HandsOff, CautionPlaces.Card),
        (CautionCode.EngineOff, CautionPlaces.Card),
        (CautionCode.EyesOut, CautionPlaces.Card),
        (CautionCode.StrongPull, CautionPlaces.Card),
        (CautionCode.FrameRunning, CautionPlaces.HangCheckSheet | CautionPlaces.ThrustSheet),
        (CautionCode.ThrustTest, CautionPlaces.ThrustSheet),
        (CautionCode.Sudden, CautionPlaces.ComplaintSheet),
    ];

    /// <summary>The cautions that apply at any of the places, in the table's order; those for everywhere always do.</summary>
    public static IEnumerable<CautionCode> For(CautionPlaces places) =>
        _table.Where(row => (row.Where & (places | CautionPlaces.Everywhere)) != 0).Select(row => row.Code);

    /// <summary>Places that a set of adjustments brings with it.</summary>
    public static CautionPlaces PlacesOf(IEnumerable<AdjustmentKind> kinds)
    {
        CautionPlaces places = CautionPlaces.None;
        foreach (AdjustmentKind kind in kinds)
        {
            places |= CautionPlaces.AnyAdjustment | kind switch
            {
                AdjustmentKind.CarabinerOneSide => CautionPlaces.SpacingChange,
                AdjustmentKind.Ballast => CautionPlaces.Ballast,
                _ => CautionPlaces.None,
            };
        }
        return places;
    }

    /// <summary>The cautions of a flight's result. A strong pull brings its caution with it although no card is in hand.</summary>
    public static IEnumerable<CautionCode> Of(TrimAnalysis analysis)
    {
        CautionPlaces places = PlacesOf(analysis.Adjustments.Select(a => a.Kind));
        if (analysis.Verdict.Code == VerdictCode.Insufficient)
            places |= CautionPlaces.Card; // it says which legs to fly again
        bool strong = analysis.Warnings.Any(w => w.Code == FindingCode.StrongPull);
        IEnumerable<CautionCode> codes = For(places);
        return strong ? codes.Append(CautionCode.StrongPull) : codes;
    }

    /// <summary>The code as JSON writes it.</summary>
    public static string CodeOf(CautionCode code) => Snake.Of(code.ToString()).Replace('_', '-');
}
