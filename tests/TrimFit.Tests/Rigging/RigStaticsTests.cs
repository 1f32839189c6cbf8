using CsCheck;
using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Rigging;

/// <summary>The statics against a machine worked by hand: pilot 88 kg, power unit 30 kg, front share 0.8, carabiners 440 mm apart.</summary>
public class RigStaticsTests
{
    private const double G = 9.80665;

    /// <summary>The hand-worked machine: everything centred, thrust 600 N, torque 56.44 N·m, clockwise.</summary>
    private static RigValues HandRig(double thrustDepth = 0.40, double hangBack = 0) => new()
    {
        PilotKg = 88,
        PowerUnitKg = 30,
        WingKg = 6,
        FrontShare = 0.8,
        LeftM = -0.22,
        RightM = 0.22,
        CgDepthM = 0.40,
        ThrustDepthM = thrustDepth,
        HangBackRad = hangBack,
        LineLengthM = 7,
        LineSpreadRatio = 0.2,
        StiffnessFactor = 1,
        StiffnessNmPerRad = double.NaN,
        RotationSign = 1,
        FullThrustN = 600,
        TorqueArmM = 56.44 / 600,
    };

    private static Adjustment Of(AdjustmentKind kind) => Adjustment.All.Single(a => a.Kind == kind);

    [Theory]
    // By hand: m_p/m = 88/118 = 0.745763; f m_p/m = 0.8 × 0.745763 = 0.596610; 1 − 0.596610 = 0.403390. Signs: right carabiners move the CG left.
    [InlineData(AdjustmentKind.CarabinerPair, -1.0, -1.0)]
    [InlineData(AdjustmentKind.BarSpacer, -0.4033898305084746, -1.0)]
    [InlineData(AdjustmentKind.HarnessFront, 0.5966101694915255, 0.0)]
    [InlineData(AdjustmentKind.HarnessFrontRear, 0.7457627118644068, 0.0)]
    public void Each_adjustment_moves_the_CG_and_the_thrust_line_as_the_hand_calculation_says(AdjustmentKind kind, double ofCg, double ofThrustLine)
    {
        RigValues rig = HandRig();
        Accuracy.AgreesTo(9, ofCg, Of(kind).CgOffsetPerTravel(rig));
        Accuracy.AgreesTo(9, ofThrustLine, Of(kind).ThrustOffsetPerTravel(rig));
    }

    [Fact]
    public void A_torque_of_56_44_newton_metres_is_balanced_by_48_8_millimetres()
    {
        double offset = RigStatics.TorqueBalancingOffset(56.44, 118, 0);
        Accuracy.AgreesTo(9, 56.44 / (118 * G), offset); // by hand: 56.44/1157.18 = 0.048774 m
        Assert.Equal(48.8, offset * 1000, 1);
        // Under 600 N the risers lean and carry R = 989.4829 N: by hand 56.44/989.4829 = 57.040 mm balance it then.
        double underPower = 56.44 / 989.4829103699012;
        RigValues balanced = HandRig() with { PostureM = underPower * 118 / 88, ThrustLineM = underPower };
        Assert.Equal(0, RigStatics.Solve(balanced, 600).RollMomentNm, 9);
    }

    [Fact]
    public void Riser_loads_of_the_centred_machine_differ_by_the_torque_over_the_spacing()
    {
        StaticState state = RigStatics.Solve(HandRig(), 600);
        // By hand, thrust line at CG height and hang-back 0: R = √(W² − T²) = √(1157.1847² − 600²) = 989.4829 N, M_r = −56.44 N·m,
        // F = R/2 ± M_r/s: 494.7415 ∓ 56.44/0.44.
        Accuracy.AgreesTo(8, 989.4829103699012, state.RiserLoadN);
        Accuracy.AgreesTo(8, 494.7414551849506 - (56.44 / 0.44), state.RiserLoadRightN);
        Accuracy.AgreesTo(8, 494.7414551849506 + (56.44 / 0.44), state.RiserLoadLeftN); // clockwise: the reaction rolls the frame left
    }

    [Fact]
    public void Clockwise_torque_turns_left_and_a_CG_to_the_right_turns_right()
    {
        Assert.True(RigStatics.Solve(HandRig(), 600).RollMomentNm < 0);
        Assert.True(RigStatics.Solve(HandRig() with { RotationSign = -1 }, 600).RollMomentNm > 0);
        Assert.True(RigStatics.Solve(HandRig() with { RotationSign = 0, PostureM = 0.01 }, 0).RollMomentNm > 0);
    }

    [Theory]
    // Thrust line at CG height (v = 0, th = 0): N = −T (t − e). Carabiners +10 mm: e = t = −10 mm, N = 0.
    // Harness front and rear −10 mm: e = −7.457627 mm, t = 0: N = −600 × 0.007457627 = −4.474576 N·m.
    [InlineData(0.40, AdjustmentKind.CarabinerPair, 0.010, 0.0)]
    [InlineData(0.40, AdjustmentKind.HarnessFrontRear, -0.010, -4.474576271186441)]
    // Thrust line at carabiner height (v = h): th from th = −T/R, R = √(W² − T² cos² th) − T sin th, solved by bisection apart from
    // this program: th = −0.46380275 rad. N = −T cos th (t − e) + Q sin th.
    [InlineData(0.0, AdjustmentKind.CarabinerPair, 0.010, -25.24856676906274)]
    [InlineData(0.0, AdjustmentKind.HarnessFrontRear, -0.010, -29.25043895485969)]
    public void Moment_about_the_riser_axis_of_a_travel_is_that_of_the_hand_calculation(double thrustDepth, AdjustmentKind kind, double travel, double moment)
    {
        RigValues moved = Of(kind).Move!(HandRig(thrustDepth), travel);
        Assert.Equal(moment, RigStatics.Solve(moved, 600).YawMomentNm, 8);
    }

    [Fact]
    public void An_offset_thrust_line_twists_the_frame_and_the_twist_takes_part_in_the_roll()
    {
        // By hand: t = 20 mm: N = −12 N·m, k = R (s/2) 0.2 = 43.53725 N·m/rad, sin χ = −0.2756261,
        // z_g = (118 × 0.4 − 6 × 7)/124 = 0.0419355 m, z_p = 0.3580645 m, M = −56.44 − z_p × 600 × sin χ = 2.775146 N·m.
        StaticState state = RigStatics.Solve(HandRig() with { ThrustLineM = 0.020 }, 600);
        Accuracy.AgreesTo(9, -12, state.YawMomentNm);
        Accuracy.AgreesTo(9, -0.27562605666965817, state.TwistSine);
        Accuracy.AgreesTo(9, 2.7751463683846254, state.RollMomentNm);
    }

    [Fact]
    public void Two_scales_5_49_kilograms_apart_at_430_millimetres_show_10_millimetres()
    {
        // By hand: e = 430 × 5.49/(2 × 118) = 10.003 mm.
        var check = new RigHangCheck { LeftKg = Reading.Measured(56.255), RightKg = Reading.Measured(61.745), CarabinerSpacingM = Reading.Measured(0.430) };
        Accuracy.AgreesTo(4, 0.0100030, check.AllHangs.Single().OffsetM(check.CarabinerSpacingM!.Value.Value));
    }

    [Fact]
    public void Beyond_its_stiffness_the_twist_has_no_equilibrium_and_is_null()
    {
        StaticState state = RigStatics.Solve(HandRig() with { ThrustLineM = 0.100 }, 600); // N = −60 against k = 43.5
        Assert.True(Math.Abs(state.TwistSine) > 1);
        Assert.Null(state.TwistRad);
        Assert.True(double.IsFinite(state.RollMomentNm));
    }

    [Fact]
    public void Left_and_right_are_treated_alike_to_the_last_bit() =>
        Gen.Select(Gen.Double[-0.03, 0.03], Gen.Double[-0.03, 0.03], Gen.Double[0, 900], Gen.Double[0, 0.4], Gen.Double[0, 0.15])
            .Sample((posture, thrustLine, thrust, depth, hangBack) =>
            {
                RigValues rig = HandRig(depth, hangBack) with { PostureM = posture, ThrustLineM = thrustLine, LeftM = -0.21, RightM = 0.235 };
                RigValues mirrored = rig with { PostureM = -posture, ThrustLineM = -thrustLine, LeftM = -0.235, RightM = 0.21, RotationSign = -1 };
                StaticState state = RigStatics.Solve(rig, thrust), mirror = RigStatics.Solve(mirrored, thrust);
                return state.RollMomentNm == -mirror.RollMomentNm && state.YawMomentNm == -mirror.YawMomentNm
                    && state.RiserLoadLeftN == mirror.RiserLoadRightN && state.HangBackRad == mirror.HangBackRad;
            });

    [Fact]
    public void Without_thrust_the_riser_loads_carry_the_weight() =>
        Gen.Select(Gen.Double[-0.05, 0.05], Gen.Double[40, 150]).Sample((posture, pilot) =>
        {
            RigValues rig = HandRig() with { PostureM = posture, PilotKg = pilot };
            StaticState state = RigStatics.Solve(rig, 0);
            return Math.Abs(state.RiserLoadLeftN + state.RiserLoadRightN - rig.WeightN) < 1e-9;
        });

    [Fact]
    public void With_front_share_0_or_1_or_equal_masses_the_efficiencies_take_their_limits()
    {
        RigValues all = HandRig() with { FrontShare = 1 }, none = HandRig() with { FrontShare = 0 }, equal = HandRig() with { PilotKg = 30 };
        Accuracy.AgreesTo(9, 88.0 / 118, Of(AdjustmentKind.HarnessFront).CgOffsetPerTravel(all));
        Assert.Equal(0, Of(AdjustmentKind.HarnessFront).CgOffsetPerTravel(none), 12);
        Accuracy.AgreesTo(9, 0.5, Of(AdjustmentKind.HarnessFrontRear).CgOffsetPerTravel(equal));
    }
}
