using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Simulation;

namespace TrimFit.Tests.Rigging;

/// <summary>The statics against the simulator's rigid frame on two straight risers, eight equations solved by vectors and written apart from them.</summary>
public class StaticsAgainstVectorsTests
{
    internal static RigValues ValuesOf(Scenario s) => new()
    {
        PilotKg = s.Mass.PilotKg,
        PowerUnitKg = s.Mass.PowerUnitKg,
        WingKg = s.Mass.WingKg,
        PostureM = s.Mass.PostureM,
        PowerUnitLateralM = s.Mass.PowerUnitLateralM,
        FrontShare = s.Geometry.FrontShare,
        FrontOffsetM = s.Geometry.FrontHangPointsM,
        RearOffsetM = s.Geometry.RearHangPointsM,
        LeftM = s.Geometry.LeftCarabinerM,
        RightM = s.Geometry.RightCarabinerM,
        CgDepthM = s.Mass.CgDepthM,
        ThrustDepthM = s.Propeller.ThrustLineDepthM,
        HangBackRad = s.Propeller.HangBackRad,
        ThrustLineM = s.Propeller.ThrustLineM,
        CantRad = s.Propeller.CantRad,
        LineLengthM = s.Wing.LineLengthM,
        LineSpreadRatio = s.Wing.LineSpreadM / s.Wing.LineLengthM,
        StiffnessFactor = 1,
        StiffnessNmPerRad = double.NaN,
        RotationSign = s.Propeller.Rotation,
        FullThrustN = s.Propeller.FullThrustN,
        TorqueArmM = s.Propeller.FullTorqueNm / s.Propeller.FullThrustN,
    };

    /// <summary>Turning offset of the statics less that of the vectors, m.</summary>
    private static double Difference(Scenario s, double thrust) =>
        RigStatics.TurningOffset(ValuesOf(s), thrust, s.Wing.YawRatio)
        - ((SteadyTurn.Rate(s, thrust) - s.Wing.ConstantPullRadPerSec) / s.Wing.SensitivityRadPerSecPerM);

    [Theory]
    [InlineData(0)]
    [InlineData(2)] // thrust axis turned 2 degrees to the right in plan
    public void Over_200_machines_the_statics_agree_with_the_vectors_to_a_millimetre_of_CG_offset_at_level_flight(double cantDeg)
    {
        double[] off = new double[200];
        for (ulong seed = 1; seed <= 200; seed++)
        {
            Scenario s = RandomScenarios.Draw(seed);
            s = s with { Propeller = s.Propeller with { CantRad = double.DegreesToRadians(cantDeg) } };
            off[seed - 1] = Math.Abs(Difference(s, s.LevelThrustN));
            Assert.Equal(0, Difference(s, 0), 3e-4); // engine off: the risers' own lean only
        }
        Assert.InRange(QuantileType7.Of(off, 0.5), 0, 0.0005);
        Assert.InRange(QuantileType7.Of(off, 0.95), 0, 0.003); // strongly twisting machines: the page's angles are first order
    }
}
