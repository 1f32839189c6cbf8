using TrimFit.Core.Ground;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Rigging;

/// <summary>Turns a <see cref="Rig"/> into plain numbers: the nominal ones, or draws from what was not measured.</summary>
public sealed class RigSpread
{
    /// <summary>b/H when nothing is given: 0.2, with a stiffness good to a factor 1.7 at 95 % (model page, "Twist stiffness").</summary>
    private const double UsualLineSpreadRatio = 0.2, UsualStiffnessFactor95 = 1.7;

    private readonly Rig _rig;
    private readonly Propulsion _propulsion;
    private readonly HangCheckResult? _hang;

    /// <summary>Prepares a rig.</summary>
    public RigSpread(Rig rig)
    {
        ArgumentNullException.ThrowIfNull(rig);
        _rig = rig;
        _propulsion = Propulsion.Of(rig);
        _hang = RigHang.Of(rig);
        Nominal = Build(static reading => reading.Value, _propulsion.FullThrustN, _propulsion.TorqueArmM, stiffnessFactor: 1, hangCheckError: 0);
    }

    /// <summary>The rig's thrust and torque.</summary>
    public Propulsion Propulsion => _propulsion;

    /// <summary>Every reading at its value.</summary>
    public RigValues Nominal { get; }

    /// <summary>One draw: every reading from its normal spread (kept to what is physical), thrust, torque and stiffness log-normal.</summary>
    public RigValues Draw(SeededRandom random)
    {
        ArgumentNullException.ThrowIfNull(random);
        double thrust = _propulsion.FullThrustN * Math.Exp(_propulsion.FullThrustRelativeSd * random.NextNormal());
        // Q = P/(2 pi n) does not depend on the thrust scale: drawn thrust times drawn arm must give the drawn torque.
        double torque = _propulsion.FullTorqueNm * Math.Exp(_propulsion.TorqueArmRelativeSd * random.NextNormal());
        double stiffnessFactor = Math.Exp(StiffnessLogSd * random.NextNormal());
        double hangCheckError = random.NextNormal();
        return Build(reading => reading.Value + (reading.StandardDeviation * random.NextNormal()), thrust, torque / thrust, stiffnessFactor, hangCheckError);
    }

    /// <summary>Everything suspended, kg.</summary>
    internal static double SuspendedKg(Rig rig) => rig.Mass.PilotKg.Value + rig.Mass.PassengerKg.Value + rig.Mass.PowerUnitKg.Value
        + rig.Mass.FuelKg.Value + rig.Mass.WheelsKg.Value;

    private double StiffnessLogSd => _rig.Wing.YawStiffnessNmPerRad is Reading k
        ? Math.Max(k.StandardDeviation / k.Value, 0.05)
        : _rig.Wing.LineSpreadM is null ? Math.Log(UsualStiffnessFactor95) / 1.96 : 0.15;

    private RigValues Build(Func<Reading, double> take, double thrust, double torqueArm, double stiffnessFactor, double hangCheckError)
    {
        RigMasses mass = _rig.Mass;
        double unit = mass.PowerUnitKg.Value, fuel = mass.FuelKg.Value, wheels = mass.WheelsKg.Value;
        double powerUnitKg = unit + fuel + wheels;
        double lineLength = Math.Max(1, take(_rig.Wing.LineLengthM));
        var values = new RigValues
        {
            PilotKg = mass.PilotKg.Value + mass.PassengerKg.Value,
            PowerUnitKg = powerUnitKg,
            WingKg = Math.Max(0.5, take(_rig.Wing.MassKg)),
            PostureM = take(mass.PostureM),
            PowerUnitLateralM = ((unit * take(mass.PowerUnitLateralM)) + (fuel * take(mass.FuelLateralM))) / powerUnitKg,
            FrontShare = Math.Clamp(take(_rig.HangPoints.FrontShare), 0, 1),
            FrontOffsetM = take(_rig.HangPoints.FrontOffsetM),
            RearOffsetM = take(_rig.HangPoints.RearOffsetM),
            LeftM = take(_rig.Carabiners.LeftM),
            RightM = take(_rig.Carabiners.RightM),
            CgDepthM = Math.Max(0.15, take(mass.CgDepthM)),
            ThrustDepthM = Math.Clamp(take(_rig.Propeller.ThrustLineDepthM), -0.2, 0.6),
            HangBackRad = Math.Clamp(take(_rig.Propeller.HangBackRad), double.DegreesToRadians(-5), double.DegreesToRadians(20)),
            ThrustLineM = take(_rig.Propeller.ThrustLineM),
            CantRad = take(_rig.Propeller.CantRad),
            LineLengthM = lineLength,
            LineSpreadRatio = _rig.Wing.LineSpreadM is Reading b ? b.Value / lineLength : UsualLineSpreadRatio,
            StiffnessFactor = stiffnessFactor,
            StiffnessNmPerRad = _rig.Wing.YawStiffnessNmPerRad?.Value ?? double.NaN,
            RotationSign = _rig.Propeller.RotationSign,
            FullThrustN = thrust,
            TorqueArmM = torqueArm,
        };
        return _hang is null ? values : WithHangCheck(values, hangCheckError);
    }

    /// <summary>The hang check gives the CG offset in place of tape and seat: the pilot's seat, which nobody measured, takes up the difference.</summary>
    /// <remarks>Not averaged with the geometry: a straight seat is an assumption, and averaging would pull every check towards it (DEVELOPERS.md, "Ground checks").
    /// A draw is one more seating, so it scatters by the check's own error and by one seating.</remarks>
    private RigValues WithHangCheck(RigValues values, double standardNormal)
    {
        double wanted = _hang!.OffsetM + (_hang.NextFlightSdM * standardNormal);
        double postureShift = (wanted - values.CgOffsetM) * values.SuspendedKg / values.PilotKg;
        return values with { PostureM = values.PostureM + postureShift };
    }
}
