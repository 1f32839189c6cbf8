using TrimFit.Core.Units;

namespace TrimFit.Core.Rigging;

/// <summary>One set of plain numbers for a rig: the nominal values, or one draw from their spreads. SI, right positive.</summary>
/// <remarks>Symbols as in DEVELOPERS.md, "Rig statics".</remarks>
public readonly record struct RigValues
{
    /// <summary>m_p: all that hangs from the harness, kg.</summary>
    public double PilotKg { get; init; }
    /// <summary>m_m: power unit with fuel and wheels, kg.</summary>
    public double PowerUnitKg { get; init; }
    /// <summary>m_w: wing without its air, kg.</summary>
    public double WingKg { get; init; }
    /// <summary>y_p0: the pilot's sideways seat against the harness hang points, m.</summary>
    public double PostureM { get; init; }
    /// <summary>y_m: lateral CG of the power unit, m.</summary>
    public double PowerUnitLateralM { get; init; }
    /// <summary>f: share of the pilot's weight on the front harness hang points.</summary>
    public double FrontShare { get; init; }
    /// <summary>y_f, m.</summary>
    public double FrontOffsetM { get; init; }
    /// <summary>y_r, m.</summary>
    public double RearOffsetM { get; init; }
    /// <summary>y_L, m.</summary>
    public double LeftM { get; init; }
    /// <summary>y_R, m.</summary>
    public double RightM { get; init; }
    /// <summary>h, m.</summary>
    public double CgDepthM { get; init; }
    /// <summary>h_T, m.</summary>
    public double ThrustDepthM { get; init; }
    /// <summary>th0, rad.</summary>
    public double HangBackRad { get; init; }
    /// <summary>y_T, m.</summary>
    public double ThrustLineM { get; init; }
    /// <summary>Thrust axis turned in plan, rad; positive pushes to the right.</summary>
    public double CantRad { get; init; }
    /// <summary>H, m.</summary>
    public double LineLengthM { get; init; }
    /// <summary>b/H, or 0 when <see cref="StiffnessNmPerRad"/> is given.</summary>
    public double LineSpreadRatio { get; init; }
    /// <summary>Factor on the bifilar stiffness; 1 nominally.</summary>
    public double StiffnessFactor { get; init; }
    /// <summary>Measured k_chi, N·m/rad; NaN: bifilar.</summary>
    public double StiffnessNmPerRad { get; init; }
    /// <summary>rot: +1 clockwise, -1 counter-clockwise, 0 contra-rotating.</summary>
    public int RotationSign { get; init; }
    /// <summary>T_full, N.</summary>
    public double FullThrustN { get; init; }
    /// <summary>q = Q/T, m; not negative; 0 when the torque cannot be told.</summary>
    public double TorqueArmM { get; init; }
    /// <summary>Added mass on one side, kg (ballast).</summary>
    public double BallastKg { get; init; }
    /// <summary>Lateral place of the ballast, m.</summary>
    public double BallastLateralM { get; init; }

    /// <summary>m, kg.</summary>
    public double SuspendedKg => PilotKg + PowerUnitKg + BallastKg;
    /// <summary>W, N.</summary>
    public double WeightN => SuspendedKg * PhysicalConstants.StandardGravity;
    /// <summary>y_p, m.</summary>
    public double PilotLateralM => PostureM + (FrontShare * FrontOffsetM) + ((1 - FrontShare) * RearOffsetM);
    /// <summary>y_g: lateral CG of the suspended masses, m.</summary>
    public double CgLateralM => ((PilotKg * PilotLateralM) + (PowerUnitKg * PowerUnitLateralM) + (BallastKg * BallastLateralM)) / SuspendedKg;
    /// <summary>y_c: mid-point of the riser carabiners, m.</summary>
    public double CarabinerMidM => (LeftM + RightM) / 2;
    /// <summary>s: distance of the riser carabiners, m.</summary>
    public double CarabinerSpacingM => RightM - LeftM;
    /// <summary>e = y_g - y_c: CG offset, m.</summary>
    public double CgOffsetM => CgLateralM - CarabinerMidM;
    /// <summary>t = y_T - y_c: thrust-line offset, m.</summary>
    public double ThrustLineOffsetM => ThrustLineM - CarabinerMidM;
    /// <summary>v = h - h_T, m.</summary>
    public double ThrustAboveCgM => CgDepthM - ThrustDepthM;
    /// <summary>z_g = (m h - m_w H)/(m + m_w): depth of the CG of the whole below the carabiners, m (negative: above them).</summary>
    public double WholeCgDepthM => ((SuspendedKg * CgDepthM) - (WingKg * LineLengthM)) / (SuspendedKg + WingKg);
    /// <summary>k_chi, N·m/rad: measured, or W a b/H of a bifilar suspension with a = s/2 (DEVELOPERS.md, "Riser twist").</summary>
    public double TwistStiffness => double.IsNaN(StiffnessNmPerRad)
        ? WeightN * (CarabinerSpacingM / 2) * LineSpreadRatio * StiffnessFactor
        : StiffnessNmPerRad * StiffnessFactor;
}
