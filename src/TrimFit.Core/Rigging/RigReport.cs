using System.Collections.Immutable;
using TrimFit.Core.Analysis;

namespace TrimFit.Core.Rigging;

/// <summary>Statics of a rig without a flight.</summary>
public sealed record RigReport
{
    /// <summary>Suspended mass, kg.</summary>
    public required double SuspendedKg { get; init; }
    /// <summary>Suspended weight, N.</summary>
    public required double SuspendedWeightN { get; init; }
    /// <summary>Pilot with passenger, kg.</summary>
    public required double PilotKg { get; init; }
    /// <summary>Power unit with fuel and wheels, kg.</summary>
    public required double PowerUnitKg { get; init; }
    /// <summary>CG of the suspended masses, lateral from the frame's centre line, m.</summary>
    public required double CgLateralM { get; init; }
    /// <summary>Mid-point of the riser carabiners, lateral, m.</summary>
    public required double CarabinerMidM { get; init; }
    /// <summary>Distance between the riser carabiners, m.</summary>
    public required double CarabinerSpacingM { get; init; }
    /// <summary>CG offset e, m.</summary>
    public required double CgOffsetM { get; init; }
    /// <summary>Thrust-line offset t, m.</summary>
    public required double ThrustLineOffsetM { get; init; }
    /// <summary>Full thrust, N; null when the rig does not give it.</summary>
    public double? FullThrustN { get; init; }
    /// <summary>Torque at full thrust, N·m, not negative; null when it cannot be told.</summary>
    public double? FullTorqueNm { get; init; }
    /// <summary>Static figure of merit that thrust and power imply; null when one is missing.</summary>
    public double? FigureOfMerit { get; init; }
    /// <summary>Twist stiffness, N·m/rad.</summary>
    public required double TwistStiffnessNmPerRad { get; init; }
    /// <summary>Statics at off, idle, cruise (60 % of full) and full; only off without a full thrust.</summary>
    public required ImmutableArray<RigAtSetting> At { get; init; }
    /// <summary>Adjustments with their efficiency.</summary>
    public required ImmutableArray<RigAdjustment> Adjustments { get; init; }
    /// <summary>Readings of two hanging scales to expect now, kg: left.</summary>
    public required double HangCheckLeftKg { get; init; }
    /// <summary>Readings of two hanging scales to expect now, kg: right.</summary>
    public required double HangCheckRightKg { get; init; }
    /// <summary>The hang check; null without one.</summary>
    public Ground.HangCheckResult? HangCheck { get; init; }
    /// <summary>CG offset that tape and weighing give without the hang check; null when not asked for.</summary>
    public Ground.LateralGeometry? Tape { get; init; }
    /// <summary>What the hang check contradicts.</summary>
    public ImmutableArray<Ground.GroundFault> GroundFaults { get; init; } = [];
    /// <summary>CG offset that would balance the torque at cruise thrust, m; null without torque.</summary>
    public double? TorqueBalancingOffsetM { get; init; }
    /// <summary>Things to say about the rig.</summary>
    public ImmutableArray<Finding> Findings { get; init; } = [];
}

/// <summary>Statics at one power.</summary>
public sealed record RigAtSetting
{
    /// <summary>Which power.</summary>
    public required PowerSetting Setting { get; init; }
    /// <summary>Thrust, N.</summary>
    public required double ThrustN { get; init; }
    /// <summary>Torque, N·m, not negative.</summary>
    public required double TorqueNm { get; init; }
    /// <summary>Hang-back of the thrust axis from square to the risers, rad.</summary>
    public required double HangBackRad { get; init; }
    /// <summary>Moment N about the riser axis, N·m, nose right positive.</summary>
    public required double YawMomentNm { get; init; }
    /// <summary>Roll moment M about the CG of the whole, N·m, right positive.</summary>
    public required double RollMomentNm { get; init; }
    /// <summary>Load of the left risers, N.</summary>
    public required double RiserLoadLeftN { get; init; }
    /// <summary>Load of the right risers, N.</summary>
    public required double RiserLoadRightN { get; init; }
    /// <summary>Riser twist chi, rad, nose right positive; null where there is no equilibrium.</summary>
    public double? TwistRad { get; init; }
    /// <summary>|N|/k_chi.</summary>
    public required double TwistRatio { get; init; }
    /// <summary>Upper 95 % of |N|/k_chi over what was not measured.</summary>
    public required double TwistRatioHigh95 { get; init; }
}

/// <summary>One adjustment of the rig's table.</summary>
/// <param name="Kind">Which.</param>
/// <param name="Efficiency">CG offset gained per travel, without sign.</param>
/// <param name="CgOffsetPerTravel">Change of e per travel, with sign.</param>
/// <param name="ThrustOffsetPerTravel">Change of t per travel, with sign.</param>
/// <param name="Limit">Limit; null when not given.</param>
public sealed record RigAdjustment(AdjustmentKind Kind, double Efficiency, double CgOffsetPerTravel, double ThrustOffsetPerTravel, AdjustmentLimit? Limit);
