using System.Collections.Immutable;

namespace TrimFit.Core.Rigging;

/// <summary>One way to offset a machine: what it moves. Adding a way is adding one record to <see cref="All"/>.</summary>
public sealed record Adjustment
{
    private const double Millimeter = 0.001;

    /// <summary>Distance of the propeller hub behind the riser carabiners' station, m (0.35 to 0.55 seen; common practice, no source).</summary>
    internal const double HubBehindCarabinersM = 0.45;

    /// <summary>Its name.</summary>
    public required AdjustmentKind Kind { get; init; }

    /// <summary>What a travel is measured in.</summary>
    public TravelUnit Unit { get; init; } = TravelUnit.Meter;

    /// <summary>The rig after a travel, SI, right positive; null for an adjustment of the wing's controls.</summary>
    public Func<RigValues, double, RigValues>? Move { get; init; }

    /// <summary>Name of the turn coefficient a travel works through, for an adjustment of the wing's controls; null for one of the rig.</summary>
    public string? Coefficient { get; init; }

    /// <summary>Whether a rig has this part.</summary>
    public Func<Rig, bool> AppliesTo { get; init; } = static _ => true;

    /// <summary>Step to round to when the rig gives none, SI.</summary>
    public double DefaultStep { get; init; } = Millimeter;

    /// <summary>Every adjustment TrimFit can solve, in the order people read them.</summary>
    public static ImmutableArray<Adjustment> All { get; } =
    [
        new()
        {
            Kind = AdjustmentKind.CarabinerPair,
            Move = static (rig, d) => rig with { LeftM = rig.LeftM + d, RightM = rig.RightM + d },
        },
        new()
        {
            // A spacer carries one riser carabiner outwards: the right one for a travel to the right, the left one for a travel to the left.
            Kind = AdjustmentKind.CarabinerOneSide,
            Move = static (rig, d) => d > 0 ? rig with { RightM = rig.RightM + d } : rig with { LeftM = rig.LeftM + d },
        },
        new()
        {
            Kind = AdjustmentKind.BarSpacer, // the whole suspension bar with its front harness hang point
            Move = static (rig, d) => rig with { LeftM = rig.LeftM + d, RightM = rig.RightM + d, FrontOffsetM = rig.FrontOffsetM + d },
            AppliesTo = HasHarness,
        },
        new()
        {
            Kind = AdjustmentKind.HarnessFront,
            Move = static (rig, d) => rig with { FrontOffsetM = rig.FrontOffsetM + d },
            AppliesTo = HasHarness,
        },
        new()
        {
            Kind = AdjustmentKind.HarnessFrontRear,
            Move = static (rig, d) => rig with { FrontOffsetM = rig.FrontOffsetM + d, RearOffsetM = rig.RearOffsetM + d },
            AppliesTo = HasHarness,
        },
        new()
        {
            Kind = AdjustmentKind.PowerUnit, // the thrust line goes with it
            Move = static (rig, d) => rig with { PowerUnitLateralM = rig.PowerUnitLateralM + d, ThrustLineM = rig.ThrustLineM + d },
        },
        new()
        {
            // Turned about the hub: the line then passes the carabiners' station beside where it did, which yaws the frame the other way.
            Kind = AdjustmentKind.EngineCant,
            Unit = TravelUnit.Radian,
            Move = static (rig, d) => rig with { CantRad = rig.CantRad + d, ThrustLineM = rig.ThrustLineM + (HubBehindCarabinersM * d) },
            DefaultStep = 0.1 * Math.PI / 180,
        },
        new()
        {
            Kind = AdjustmentKind.Ballast, // at the riser carabiner of the side it goes to
            Unit = TravelUnit.Kilogram,
            Move = static (rig, d) => rig with
            {
                BallastLateralM = d >= 0 ? rig.RightM : rig.LeftM,
                BallastKg = Math.Abs(d),
            },
            DefaultStep = 0.1,
        },
        new()
        {
            Kind = AdjustmentKind.Trimmer,
            Coefficient = Turns.TurnCoefficient.TrimmerDifference,
        },
        new()
        {
            Kind = AdjustmentKind.BrakeLine,
            Coefficient = Turns.TurnCoefficient.BrakeDifference,
        },
    ];

    /// <summary>Change of CG offset e per travel, without thrust: the table of DEVELOPERS.md, "Adjustments"; 0 for the wing's controls.</summary>
    public double CgOffsetPerTravel(in RigValues rig) => Move is null ? 0 : (Move(rig, Millimeter).CgOffsetM - rig.CgOffsetM) / Millimeter;

    /// <summary>Change of thrust-line offset t per travel; 0 for the wing's controls.</summary>
    public double ThrustOffsetPerTravel(in RigValues rig) => Move is null ? 0 : (Move(rig, Millimeter).ThrustLineOffsetM - rig.ThrustLineOffsetM) / Millimeter;

    private static bool HasHarness(Rig rig) => rig.Kind == MachineKind.FootLaunch; // a seat fixed to wheels does not hang from the suspension bars
}

/// <summary>What a travel is measured in.</summary>
public enum TravelUnit
{
    /// <summary>m (people: mm).</summary>
    Meter,
    /// <summary>rad (people: deg).</summary>
    Radian,
    /// <summary>kg.</summary>
    Kilogram,
}
