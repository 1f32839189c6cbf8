using System.Collections.Immutable;

namespace TrimFit.Core.Comparing;

/// <summary>Something a comparison wants said; Reporting holds the words.</summary>
/// <param name="Code">What.</param>
/// <param name="Values">Numbers of the sentence, SI, in the order the code's comment gives.</param>
/// <param name="Names">Names of flights or settings in the sentence.</param>
public sealed record CompareNotice(CompareNoticeCode Code, ImmutableArray<double> Values, ImmutableArray<string> Names)
{
    /// <summary>Notice with numbers alone.</summary>
    public static CompareNotice Of(CompareNoticeCode code, params ReadOnlySpan<double> values) => new(code, [.. values], []);

    /// <summary>Notice about flights or settings.</summary>
    public static CompareNotice About(CompareNoticeCode code, ImmutableArray<string> names, params ReadOnlySpan<double> values) => new(code, [.. values], names);
}

/// <summary>What a <see cref="CompareNotice"/> says. The comment gives its numbers and names.</summary>
public enum CompareNoticeCode
{
    /// <summary>One flight before: it may have been picked for being bad, and part of the change is chance. A-B-A would tell.</summary>
    RegressionToTheMean,
    /// <summary>The scatter from flight to flight is assumed: scale, rad/s.</summary>
    ScatterAssumed,
    /// <summary>A flight's pull over power could not be told, so it does not count: its name.</summary>
    FlightNotUsed,
    /// <summary>Nothing was declared as changed and the rig files are the same.</summary>
    NothingChanged,
    /// <summary>What was declared as changed is the same in all rig files.</summary>
    DeclaredButSame,
    /// <summary>The rig files differ in a place that was not declared: riser carabiners, harness hang points, power unit or thrust line: largest difference, m.</summary>
    GeometryDiffers,
    /// <summary>The rig files name different wings: their names.</summary>
    WingDiffers,
    /// <summary>The rig files differ in propeller, rotation, power or thrust.</summary>
    PropellerDiffers,
    /// <summary>All-up masses differ: lowest, highest, kg; names of the two flights.</summary>
    MassDiffers,
    /// <summary>Depth of the CG below the riser carabiners differs: shallowest, deepest, m.</summary>
    HangHeightDiffers,
    /// <summary>Air density differs: thinnest, densest, kg/m³; names.</summary>
    DensityDiffers,
    /// <summary>Wind differs: weakest, strongest, m/s; names.</summary>
    WindDiffers,
    /// <summary>Heights differ: lowest, highest, m; names.</summary>
    HeightDiffers,
    /// <summary>Airspeed differs by more than its errors and the density explain: slowest, fastest, m/s at one density; names.</summary>
    AirspeedDiffers,
    /// <summary>Flown thrust ranges hardly overlap: share of their union that both flew; names.</summary>
    PowerRangesApart,
    /// <summary>The brakes answer differently although nothing of them was declared as changed: before, after (rad/s per unit of the brakes), p.</summary>
    BrakeResponseChanged,
    /// <summary>The sheets name different trimmer settings: names of the two flights.</summary>
    TrimmersDiffer,
    /// <summary>The sheets name different accelerator settings: lowest, highest share; names.</summary>
    AcceleratorDiffers,
    /// <summary>The sensor hung otherwise: angles from the vertical, rad; names.</summary>
    SensorRemounted,
    /// <summary>One flight turned mostly right, the other mostly left: shares of right turns; names.</summary>
    TurnDirectionsDiffer,
    /// <summary>The change was not used for the sensitivity, because more than the rig's places differ.</summary>
    PairNotUsed,
    /// <summary>A swap of wings cannot tell what harness and pilot bring, and the other wing has a pull of its own.</summary>
    SwapLimits,
    /// <summary>The same setting flown again differs: something else moved: change, rad/s; names of the two flights.</summary>
    SwapBackDiffers,
    /// <summary>The same setting flown again agrees: change, rad/s; names.</summary>
    SwapBackAgrees,
    /// <summary>The pull before already lay inside the tolerance.</summary>
    BeforeAlreadyInside,
    /// <summary>Not inside the tolerance can be claimed without steering logged or hands-off spans: names of the flights.</summary>
    NoSteering,
    /// <summary>Some flights know newtons, others only shares of full thrust; all are compared by shares.</summary>
    ThrustBasesDiffer,
}
