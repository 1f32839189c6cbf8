using TrimFit.Core.Analysis;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Tests.Analysis;

namespace TrimFit.Tests.Ground;

/// <summary>What is measured on the ground reaches the travel: efficiency and uncertainty.</summary>
public class HangCheckTravelTests
{
    private static readonly MadeUpFlight _flight = new() { ConstantDegPerSec = 0.1, PowerDegPerSec = -4 };

    private static AdjustmentReport Travel(Rig rig, AdjustmentKind kind)
    {
        rig = rig with { Wing = new() { SensitivityRadPerSecPerM = Reading.Measured(double.DegreesToRadians(90), double.DegreesToRadians(2)) } };
        TurnSignals signals = TurnSignals.From(_flight.Fly(), rig);
        return TrimAnalysis.Run(signals, SensitivitySourcesTests.FitOf(signals, (0.1, 0.05), (-4, 0.2)), rig, new()).Adjustments.Single(a => a.Kind == kind);
    }

    /// <summary>A thrust line near the riser carabiners, where moved harness hang points hardly twist the risers and all parts are offered.</summary>
    private static Rig Machine(double frontShare, double sd, RigHangCheck? check = null)
    {
        Rig rig = MadeUpFlight.Rig();
        return rig with
        {
            Mass = rig.Mass with { CgDepthM = Reading.Measured(0.40, 0.005) },
            Propeller = rig.Propeller with { ThrustLineDepthM = Reading.Measured(0.03, 0.005), HangBackRad = Reading.Measured(double.DegreesToRadians(8), 0.005) },
            HangPoints = new() { FrontShare = Reading.Measured(frontShare, sd), FrontOffsetM = Reading.Measured(0), RearOffsetM = Reading.Measured(0) },
            HangCheck = check,
        };
    }

    [Fact]
    public void A_weighed_front_share_sets_the_efficiency_of_the_front_harness_hang_points_and_their_travel()
    {
        AdjustmentReport light = Travel(Machine(0.6, 0.005), AdjustmentKind.HarnessFront), heavy = Travel(Machine(0.9, 0.005), AdjustmentKind.HarnessFront);
        Accuracy.AgreesTo(9, 0.6 * 88 / 118, light.Efficiency); // by hand: f m_p/m
        Accuracy.AgreesTo(9, 0.9 * 88 / 118, heavy.Efficiency);
        Assert.InRange(light.Travel / heavy.Travel, 1.4, 1.6); // 0.9/0.6 = 1.5, less what the yaw moment changes
    }

    [Fact]
    public void An_uncertain_front_share_widens_the_travel_of_the_parts_it_works_through_and_of_no_other()
    {
        static double Width(AdjustmentReport a) => a.Interval95.HalfWidth / Math.Abs(a.Travel);
        Rig known = Machine(0.8, 0.005), vague = Machine(0.8, 0.10);
        Assert.True(Width(Travel(vague, AdjustmentKind.HarnessFront)) > 1.15 * Width(Travel(known, AdjustmentKind.HarnessFront)));
        Assert.InRange(Width(Travel(vague, AdjustmentKind.CarabinerPair)) / Width(Travel(known, AdjustmentKind.CarabinerPair)), 0.97, 1.03);
    }

    [Fact]
    public void A_hang_check_sets_e_and_its_uncertainty_reaches_the_twist_that_depends_on_it()
    {
        static RigHangCheck Check(params double[] offsets) => new()
        {
            LeftKg = Reading.Measured(59),
            RightKg = Reading.Measured(59),
            CarabinerSpacingM = Reading.Measured(0.44, 0.001),
            Hangs = [.. offsets.Select(e => HangCheck.Expected(118, e, 0.44))],
        };
        Rig tight = Machine(0.8, 0.005, Check(0.010, 0.0101, 0.0099, 0.010, 0.0101, 0.0099)), loose = Machine(0.8, 0.005, Check(-0.010, 0.030, 0.010));
        Accuracy.AgreesTo(9, 0.010, new RigSpread(tight).Nominal.CgOffsetM);
        Accuracy.AgreesTo(9, 0.010, new RigSpread(loose).Nominal.CgOffsetM);
        AdjustmentReport certain = Travel(tight, AdjustmentKind.CarabinerPair), doubtful = Travel(loose, AdjustmentKind.CarabinerPair);
        Assert.True(doubtful.TwistRatioHigh95 > 1.2 * certain.TwistRatioHigh95, $"{doubtful.TwistRatioHigh95} against {certain.TwistRatioHigh95}");
    }
}
