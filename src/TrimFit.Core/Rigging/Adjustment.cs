using System.Collections.Immutable;

namespace TrimFit.Core.Rigging;

/// <summary>One way to offset a machine: what it moves. Adding a way is adding one record to <see cref="All"/>.</summary>
/// <param name="Kind">Its name.</param>
/// <param name="Move">The rig after a mechanical travel, m, right positive.</param>
/// <param name="AppliesTo">Whether a rig has this part.</param>
/// <param name="DefaultStepM">Step to round to when the rig gives none, m.</param>
public sealed record Adjustment(AdjustmentKind Kind, Func<RigValues, double, RigValues> Move, Func<Rig, bool> AppliesTo, double DefaultStepM)
{
    private const double Millimeter = 0.001;

    /// <summary>Every adjustment TrimFit can solve, in the order people read them.</summary>
    public static ImmutableArray<Adjustment> All { get; } =
    [
        new(AdjustmentKind.CarabinerPair,
            (rig, d) => rig with { LeftM = rig.LeftM + d, RightM = rig.RightM + d },
            _ => true, Millimeter),
        new(AdjustmentKind.BarSpacer, // the whole suspension bar with its front harness hang point
            (rig, d) => rig with { LeftM = rig.LeftM + d, RightM = rig.RightM + d, FrontOffsetM = rig.FrontOffsetM + d },
            HasHarness, Millimeter),
        new(AdjustmentKind.HarnessFront,
            (rig, d) => rig with { FrontOffsetM = rig.FrontOffsetM + d },
            HasHarness, Millimeter),
        new(AdjustmentKind.HarnessFrontRear,
            (rig, d) => rig with { FrontOffsetM = rig.FrontOffsetM + d, RearOffsetM = rig.RearOffsetM + d },
            HasHarness, Millimeter),
    ];

    /// <summary>Change of CG offset e per travel, without thrust: the table of DEVELOPERS.md, "Adjustments".</summary>
    public double CgOffsetPerTravel(in RigValues rig) => (Move(rig, Millimeter).CgOffsetM - rig.CgOffsetM) / Millimeter;

    /// <summary>Change of thrust-line offset t per travel.</summary>
    public double ThrustOffsetPerTravel(in RigValues rig) => (Move(rig, Millimeter).ThrustLineOffsetM - rig.ThrustLineOffsetM) / Millimeter;

    private static bool HasHarness(Rig rig) => rig.Kind == MachineKind.FootLaunch; // a seat fixed to wheels does not hang from the suspension bars
}
