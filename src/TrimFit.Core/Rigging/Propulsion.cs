using TrimFit.Core.Analysis;
using TrimFit.Core.Units;

namespace TrimFit.Core.Rigging;

/// <summary>Full thrust and torque arm of a rig, and where they come from.</summary>
public sealed record Propulsion
{
    /// <summary>Tip speed above which the numbers are not a propeller's, m/s (common practice, no source).</summary>
    public const double LargestTipSpeed = 260;
    /// <summary>Smallest static figure of merit that is believed (model page, section 1).</summary>
    public const double SmallestFigureOfMerit = 0.35;
    /// <summary>Largest static figure of merit that is believed (model page, section 1).</summary>
    public const double LargestFigureOfMerit = 0.8;
    /// <summary>Tip speed that stands in for a missing speed of rotation, m/s, with its relative sd (common practice, no source).</summary>
    private const double UsualTipSpeed = 165, UsualTipSpeedRelativeSd = 0.12;
    /// <summary>Full thrust over suspended weight that stands in when nothing is given (common practice, no source).</summary>
    private const double UsualThrustToWeight = 0.5, UsualThrustRelativeSd = 0.2;
    /// <summary>Propeller diameter that stands in when none is given, m (common practice, no source).</summary>
    private const double UsualDiameter = 1.25;
    /// <summary>Relative sd of a static thrust without a stated spread.</summary>
    private const double DerivedThrustRelativeSd = 0.12;

    /// <summary>Full static thrust at <see cref="AirDensity"/>, N.</summary>
    public required double FullThrustN { get; init; }
    /// <summary>Its relative standard deviation.</summary>
    public required double FullThrustRelativeSd { get; init; }
    /// <summary>Whether the rig gives the full thrust, or enough to compute it.</summary>
    public required bool ThrustKnown { get; init; }
    /// <summary>q = Q/T, m; not negative.</summary>
    public required double TorqueArmM { get; init; }
    /// <summary>Its relative standard deviation.</summary>
    public required double TorqueArmRelativeSd { get; init; }
    /// <summary>Whether the torque rests on a given power and speed of rotation (else on assumptions).</summary>
    public required bool TorqueGiven { get; init; }
    /// <summary>Air density of these numbers, kg/m³.</summary>
    public required double AirDensity { get; init; }
    /// <summary>Static figure of merit that thrust and power imply; null when one is missing.</summary>
    public double? ImpliedFigureOfMerit { get; init; }
    /// <summary>Tip speed at full power, m/s; null without diameter or speed.</summary>
    public double? TipSpeed { get; init; }
    /// <summary>Full torque, N·m.</summary>
    public double FullTorqueNm => TorqueArmM * FullThrustN;
    /// <summary>Whether the numbers are a propeller's; when not, the torque is not used.</summary>
    public bool Plausible => !(ImpliedFigureOfMerit is < SmallestFigureOfMerit or > LargestFigureOfMerit) && !(TipSpeed > LargestTipSpeed);

    /// <summary>Finds full thrust and torque from what the rig gives.</summary>
    /// <remarks>T from the file, or from power, diameter and figure of merit, P FM = T^1.5/sqrt(2 rho A) (momentum theory of a static
    /// actuator disc); else assumed. Q = P/(2 pi n); without P the same formula gives P from T; without n a usual tip speed.</remarks>
    public static Propulsion Of(Rig rig)
    {
        ArgumentNullException.ThrowIfNull(rig);
        RigPropeller propeller = rig.Propeller;
        double density = propeller.StaticThrustAirDensity ?? PhysicalConstants.SeaLevelDensity;
        double diameter = propeller.DiameterM ?? UsualDiameter;
        double area = Math.PI * diameter * diameter / 4;
        double figureOfMerit = propeller.FigureOfMerit.Value;
        double figureOfMeritRelativeSd = propeller.FigureOfMerit.StandardDeviation / figureOfMerit;
        double weight = RigSpread.SuspendedKg(rig) * PhysicalConstants.StandardGravity;

        double thrust, thrustRelativeSd;
        bool thrustKnown = true;
        if (propeller.StaticThrustN is Reading given)
        {
            thrust = given.Value;
            thrustRelativeSd = given.StandardDeviation / given.Value;
        }
        else if (propeller.ShaftPowerW is double p && propeller.DiameterM is not null)
        {
            thrust = Math.Pow(p * figureOfMerit * Math.Sqrt(2 * density * area), 2.0 / 3);
            thrustRelativeSd = DerivedThrustRelativeSd;
        }
        else
        {
            thrust = UsualThrustToWeight * weight;
            thrustRelativeSd = UsualThrustRelativeSd;
            thrustKnown = false;
        }

        double? propellerRevPerSec = propeller.FullPowerRevPerSec * propeller.PropellerTurnsPerLoggedTurn;
        double idealPower = Math.Pow(thrust, 1.5) / Math.Sqrt(2 * density * area);
        double power = propeller.ShaftPowerW ?? (idealPower / figureOfMerit);
        double angularSpeed = 2 * Math.PI * propellerRevPerSec ?? (UsualTipSpeed / (diameter / 2));
        double powerSd = propeller.ShaftPowerW is null ? figureOfMeritRelativeSd : propeller.PowerRelativeSd;
        double speedSd = propellerRevPerSec is null ? UsualTipSpeedRelativeSd : 0;
        bool torqueGiven = propeller.ShaftPowerW is not null && propellerRevPerSec is not null;
        // With the power given, Q is known better than q = Q/T; T's own spread enters where T enters. A thrust-scale error cancels for
        // given power (model page), so the arm's spread here is the torque's.
        return new Propulsion
        {
            FullThrustN = thrust,
            FullThrustRelativeSd = thrustRelativeSd,
            ThrustKnown = thrustKnown,
            TorqueArmM = power / angularSpeed / thrust,
            TorqueArmRelativeSd = Math.Sqrt((powerSd * powerSd) + (speedSd * speedSd)),
            TorqueGiven = torqueGiven,
            AirDensity = density,
            ImpliedFigureOfMerit = propeller.ShaftPowerW is double shaft && propeller.DiameterM is not null && propeller.StaticThrustN is not null
                ? idealPower / shaft : null,
            TipSpeed = propellerRevPerSec is double n && propeller.DiameterM is double d ? Math.PI * d * n : null,
        };
    }

    /// <summary>What of this a reader should know.</summary>
    public IEnumerable<Finding> Findings(Rig rig)
    {
        ArgumentNullException.ThrowIfNull(rig);
        if (rig.Propeller.RotationSign == 0)
            yield return Finding.Of(FindingCode.ContraRotating);
        if (ImpliedFigureOfMerit is double fm and (< SmallestFigureOfMerit or > LargestFigureOfMerit))
            yield return Finding.Of(FindingCode.FigureOfMeritImplausible, fm);
        if (TipSpeed is double tip and > LargestTipSpeed)
            yield return Finding.Of(FindingCode.TipSpeedImplausible, tip);
    }

    /// <summary>Assumptions about the engine that a rig leaves open.</summary>
    public IEnumerable<Assumption> Assumptions(Rig rig)
    {
        ArgumentNullException.ThrowIfNull(rig);
        static Assumption Of(string name, double value, double relativeSd, string unit) =>
            new(name, value, unit, value * Math.Exp(-1.96 * relativeSd), value * Math.Exp(1.96 * relativeSd));
        if (rig.Propeller.StaticThrustN is null)
            yield return Of("static_thrust_n", FullThrustN, FullThrustRelativeSd, "N");
        if (rig.Propeller.DiameterM is null && rig.Propeller.RotationSign != 0)
            yield return Of("diameter_m", UsualDiameter, 0.06, "m");
        if (!TorqueGiven && rig.Propeller.RotationSign != 0)
            yield return Of("torque_at_full_power_nm", FullTorqueNm, TorqueArmRelativeSd, "N m");
    }
}
