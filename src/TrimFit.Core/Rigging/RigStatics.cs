namespace TrimFit.Core.Rigging;

/// <summary>Statics of the machine on its risers at one thrust. All moments N·m, loads N, angles rad; right positive.</summary>
public readonly record struct StaticState
{
    /// <summary>Thrust, N.</summary>
    public double ThrustN { get; init; }
    /// <summary>Torque magnitude Q, N·m.</summary>
    public double TorqueNm { get; init; }
    /// <summary>th: hang-back of the thrust axis from square to the risers.</summary>
    public double HangBackRad { get; init; }
    /// <summary>R: sum of the riser loads.</summary>
    public double RiserLoadN { get; init; }
    /// <summary>N: moment about the riser axis, nose right positive.</summary>
    public double YawMomentNm { get; init; }
    /// <summary>N over the stiffness k_chi R/W under the riser load R, the sine of the riser twist; beyond ±1 there is no equilibrium.</summary>
    public double TwistSine { get; init; }
    /// <summary>M: roll moment about the CG of the whole, right positive: what turns the wing.</summary>
    public double RollMomentNm { get; init; }
    /// <summary>M_r: roll moment at the carabiners.</summary>
    public double CarabinerRollMomentNm { get; init; }
    /// <summary>Load of the left risers.</summary>
    public double RiserLoadLeftN { get; init; }
    /// <summary>Load of the right risers.</summary>
    public double RiserLoadRightN { get; init; }

    /// <summary>Riser twist chi, or null where there is no equilibrium.</summary>
    public double? TwistRad => Math.Abs(TwistSine) <= 1 ? Math.Asin(TwistSine) : null;
}

/// <summary>How frame and risers hang at one thrust: all of the statics that a sideways move of a part leaves as it is.</summary>
internal readonly record struct RiserLean
{
    /// <summary>th: hang-back of the thrust axis from square to the risers.</summary>
    public double HangBackRad { get; init; }
    /// <summary>cos(th).</summary>
    public double Cos { get; init; }
    /// <summary>sin(th).</summary>
    public double Sin { get; init; }
    /// <summary>R: sum of the riser loads.</summary>
    public double RiserLoadN { get; init; }
    /// <summary>sin(th - th0): how far power has swung the CG back.</summary>
    public double SwingSine { get; init; }
}

/// <summary>Solves the statics of model page section 1; derived in DEVELOPERS.md, "Rig statics".</summary>
public static class RigStatics
{
    /// <summary>Most steps of the secant solve of hang-back and riser load; from a fixed-point step that shrinks by about (T/W)² v/h, 0.1 on
    /// real machines and 0.4 with a strong engine at carabiner height, five to eight reach rounding.</summary>
    private const int HangBackSteps = 60;
    private const double HangBackTolerance = 1e-14; // rad; below rounding of the angle

    /// <summary>Statics at one thrust.</summary>
    /// <param name="rig">The rig's numbers.</param>
    /// <param name="thrustN">Thrust, N, not negative.</param>
    /// <returns>The state; the twist's sine is clamped to ±1 inside the roll moments when there is no equilibrium.</returns>
    public static StaticState Solve(in RigValues rig, double thrustN) => Solve(rig, thrustN, Lean(rig, thrustN));

    /// <summary>Whether two rigs hang alike at any thrust, so that one's <see cref="RiserLean"/> serves the other.</summary>
    internal static bool HangAlike(in RigValues a, in RigValues b) =>
        a.PilotKg == b.PilotKg && a.PowerUnitKg == b.PowerUnitKg && a.BallastKg == b.BallastKg
        && a.HangBackRad == b.HangBackRad && a.CgDepthM == b.CgDepthM && a.ThrustDepthM == b.ThrustDepthM;

    /// <summary>Hang-back and riser load at one thrust, solved together.</summary>
    internal static RiserLean Lean(in RigValues rig, double thrustN)
    {
        double weight = rig.WeightN;
        double hangBack = rig.HangBackRad, riserLoad = weight;
        double previous = 0, previousMiss = 0;
        double cos = 1, sin = 0;
        for (int i = 0; i < HangBackSteps; i++)
        {
            (sin, cos) = Math.SinCos(hangBack);
            double sinLean = Math.Clamp(thrustN * cos / weight, -1, 1); // the risers lean until weight and thrust leave nothing square to them
            riserLoad = (weight * Math.Sqrt(1 - (sinLean * sinLean))) - (thrustN * sin);
            riserLoad = Math.Max(riserLoad, 0.05 * weight); // thrust beyond the weight has no level equilibrium; stay finite
            double miss = rig.HangBackRad - (thrustN * rig.ThrustAboveCgM / (riserLoad * rig.CgDepthM)) - hangBack;
            if (Math.Abs(miss) < HangBackTolerance)
                break;
            double slope = i == 0 ? -1 : (miss - previousMiss) / (hangBack - previous);
            if (!(slope < -0.2)) // the fixed point's own step wherever two points show no clear slope
                slope = -1;
            (previous, previousMiss) = (hangBack, miss);
            hangBack -= miss / slope;
        }
        return new RiserLean { HangBackRad = hangBack, Cos = cos, Sin = sin, RiserLoadN = riserLoad, SwingSine = Math.Sin(hangBack - rig.HangBackRad) };
    }

    /// <summary>Statics at one thrust, with the lean of a rig that hangs alike.</summary>
    internal static StaticState Solve(in RigValues rig, double thrustN, in RiserLean lean)
    {
        double weight = rig.WeightN, torque = rig.TorqueArmM * thrustN;
        double cos = lean.Cos, sin = lean.Sin, hangBack = lean.HangBackRad, riserLoad = lean.RiserLoadN;
        double cgOffset = rig.CgOffsetM, signedTorque = rig.RotationSign * torque;
        // y_T is where the thrust line passes the carabiners' station, so a canted axis needs no term of its own about the riser axis.
        double yawMoment = (-thrustN * cos * (rig.ThrustLineOffsetM - cgOffset)) + (signedTorque * sin);
        double twistSine = yawMoment / (rig.TwistStiffness * riserLoad / weight); // a bifilar's stiffness goes with the load it carries
        double sinTwist = Math.Clamp(twistSine, -1, 1);
        double sideways = sinTwist + Math.Sin(rig.CantRad); // the thrust points sideways by twist and cant alike
        // Square to the risers the weight counts with the riser load; swung back under power, its CG is carried sideways by the twist.
        double swing = rig.CgDepthM * lean.SwingSine;
        double roll = (riserLoad * (cgOffset + (swing * sinTwist))) - (signedTorque * cos);
        double rollAtCarabiners = roll + (rig.ThrustAboveCgM * thrustN * sideways);
        roll -= (rig.ThrustDepthM - rig.WholeCgDepthM) * thrustN * sideways;
        return new StaticState
        {
            ThrustN = thrustN,
            TorqueNm = torque,
            HangBackRad = hangBack,
            RiserLoadN = riserLoad,
            YawMomentNm = yawMoment,
            TwistSine = twistSine,
            RollMomentNm = roll,
            CarabinerRollMomentNm = rollAtCarabiners,
            RiserLoadLeftN = (riserLoad / 2) - (rollAtCarabiners / rig.CarabinerSpacingM),
            RiserLoadRightN = (riserLoad / 2) + (rollAtCarabiners / rig.CarabinerSpacingM),
        };
    }

    /// <summary>(M + rho_y N)/W, m: the CG offset that would turn the wing as much as roll and yaw moment do together.</summary>
    /// <param name="rig">The rig's numbers.</param>
    /// <param name="thrustN">Thrust, N.</param>
    /// <param name="yawRatio">rho_y, turn per yaw moment over turn per roll moment.</param>
    public static double TurningOffset(in RigValues rig, double thrustN, double yawRatio) => TurningOffset(rig, thrustN, yawRatio, Lean(rig, thrustN));

    /// <summary>The same with the lean of a rig that hangs alike.</summary>
    internal static double TurningOffset(in RigValues rig, double thrustN, double yawRatio, in RiserLean lean)
    {
        StaticState state = Solve(rig, thrustN, lean);
        return (state.RollMomentNm + (yawRatio * state.YawMomentNm)) / rig.WeightN;
    }

    /// <summary>The CG offset that balances a torque at hang-back <paramref name="hangBackRad"/>: e = Q cos(th)/W, the trade's rule of thumb.</summary>
    /// <remarks>Torque's roll and weight's roll about the carabiners' mid-point cancel. Yaw and the risers' lean under power are left out:
    /// <see cref="Solve(in RigValues, double)"/> has both (DEVELOPERS.md, "Torque is a CG offset").</remarks>
    /// <param name="signedTorqueNm">rot Q: positive for a propeller that turns clockwise seen from behind, N·m.</param>
    /// <param name="suspendedKg">Suspended mass, above 0 kg.</param>
    /// <param name="hangBackRad">Hang-back of the thrust axis, rad.</param>
    /// <returns>CG offset, m, right positive.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The mass is not above 0 kg, or an argument is not finite.</exception>
    public static double TorqueBalancingOffset(double signedTorqueNm, double suspendedKg, double hangBackRad) =>
        Guard.Finite(signedTorqueNm) * Math.Cos(Guard.Finite(hangBackRad)) / (Guard.Positive(suspendedKg) * Units.PhysicalConstants.StandardGravity);
}
