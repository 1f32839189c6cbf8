using CsCheck;
using TrimFit.Simulation;

namespace TrimFit.Tests.Simulation;

public class SteadyTurnTests
{
    private const double G = 9.80665; // m/s², exact: 3rd CGPM, 1901

    /// <summary>A torque without a thrust worth speaking of: then only the lever arms count.</summary>
    private static Scenario PureTorque(double torqueNm) => new()
    {
        Propeller = new() { FullThrustN = 1e-3, FullTorqueNm = torqueNm, HangBackRad = 0, ThrustLineDepthM = 0.4 },
        Wing = new() { YawRatio = 0 },
    };

    [Fact]
    public void A_torque_is_balanced_by_its_size_over_the_weight()
    {
        Scenario s = PureTorque(56.44);
        double shift = SteadyTurn.NullTravel(s, 1e-3, static (x, d) => x.WithCgShift(d))!.Value;
        Accuracy.AgreesTo(4, 56.44 / (118 * G), shift); // by hand: 48.8 mm
        Assert.True(shift > 0); // clockwise seen from behind: the frame rolls left, the weight must go right
    }

    [Theory]
    [InlineData("carabiner_pair", -1)]
    [InlineData("carabiner_one_side", -0.5)]
    [InlineData("bar_spacer", -0.4034)]   // 1 - 0.8 x 88/118
    [InlineData("harness_front", 0.5966)] // 0.8 x 88/118
    [InlineData("harness_front_rear", 0.7458)] // 88/118
    public void Each_part_moves_the_CG_by_its_lever(string kind, double efficiency)
    {
        Scenario s = PureTorque(20);
        Func<Scenario, double, Scenario> move = MoveOf(kind);
        double travel = SteadyTurn.NullTravel(s, 1e-3, move)!.Value;
        Accuracy.AgreesTo(3, 20 / (118 * G) / efficiency, travel); // efficiencies by hand, to four digits
        Assert.True(Math.Abs(SteadyTurn.Rate(move(s, travel), 1e-3)) < 1e-9);
    }

    [Fact]
    public void Riser_twist_follows_the_bifilar_suspension()
    {
        // k = W a b / h for strings of vertical height h (textbook bifilar suspension); a = 0.22, b = 1.4, h² = 7² − 1.18²
        var statics = new FrameStatics(new Scenario());
        double stiffness = 118 * G * 0.22 * 1.4 / Math.Sqrt(49 - (1.18 * 1.18));
        Accuracy.AgreesTo(4, 0.5 / stiffness, statics.Solve(0, 0.5)!.TwistRad);
    }

    [Theory]
    [InlineData(0.012, 0, 0.25)]
    [InlineData(-0.02, 0.015, 0.36)]
    [InlineData(0, -0.02, 0.30)]
    [InlineData(0.03, 0.01, 0.40)]
    public void Moments_follow_the_small_angle_formulas_at_low_thrust(double cgM, double thrustLineM, double depthM)
    {
        Scenario s = new Scenario
        {
            Propeller = new() { ThrustLineM = thrustLineM, ThrustLineDepthM = depthM },
        }.WithCgShift(cgM);
        const double thrust = 60; // the risers lean 3 degrees
        // written for small angles about the carabiners: T acts at t, the weight at e, th above square to the risers
        const double weight = 118 * G;
        double torque = 56 * thrust / 600;
        double angle = double.DegreesToRadians(4.5) - (thrust * (0.4 - depthM) / (weight * 0.4));
        double yaw = (-thrust * Math.Cos(angle) * (thrustLineM - cgM)) + (torque * Math.Sin(angle));
        double twist = yaw / (weight * 0.22 * 1.4 / 7);
        double wholeDepth = ((118 * 0.4) - (6 * 7)) / 124;
        double roll = (weight * cgM) - (torque * Math.Cos(angle)) - ((depthM - wholeDepth) * thrust * twist);

        FrameEquilibrium frame = new FrameStatics(s).Solve(thrust)!;
        Assert.InRange(frame.YawMomentNm, yaw - 0.04, yaw + 0.04); // 3 % of the moments that make the sums
        Assert.InRange(frame.TwistRad, twist - 0.0015, twist + 0.0015);
        Assert.InRange(frame.RollMomentNm, roll - (0.03 * (torque + (weight * Math.Abs(cgM)))), roll + (0.03 * (torque + (weight * Math.Abs(cgM)))));
        Assert.InRange(frame.ThrustAngleRad, angle - 0.002, angle + 0.002);
        Assert.InRange(frame.LeanRad, (thrust / weight) - 0.002, (thrust / weight) + 0.002);
    }

    [Fact]
    public void Moments_follow_the_closed_form_at_the_thrust_of_level_flight()
    {
        // Written apart from the solver. Beyond the small-angle formulas three things count: the weight acts at e with the risers' load R,
        // the stiffness against twist is R a b/h, and the CG, swung back by the frame's pitch under power, is carried sideways by the twist.
        for (ulong seed = 0; seed < 40; seed++)
        {
            Scenario s = RandomScenarios.Draw(seed);
            double thrust = s.LevelThrustN;
            double kg = s.Mass.PilotKg + s.Mass.PowerUnitKg;
            double weight = kg * G;
            double depth = s.Mass.CgDepthM;
            double pilot = s.Mass.PostureM + (s.Geometry.FrontShare * s.Geometry.FrontHangPointsM) + ((1 - s.Geometry.FrontShare) * s.Geometry.RearHangPointsM);
            double e = ((s.Mass.PilotKg * pilot) + (s.Mass.PowerUnitKg * s.Mass.PowerUnitLateralM)) / kg; // carabiners are drawn centred
            double angle = s.Propeller.HangBackRad;
            double risers = weight;
            for (int i = 0; i < 50; i++)
            {
                double square = thrust * Math.Cos(angle);
                risers = Math.Sqrt((weight * weight) - (square * square)) - (thrust * Math.Sin(angle));
                angle = s.Propeller.HangBackRad - (thrust * (depth - s.Propeller.ThrustLineDepthM) / (risers * depth));
            }
            double torque = s.Propeller.Rotation * s.Propeller.FullTorqueNm * thrust / s.Propeller.FullThrustN;
            double yaw = (-thrust * Math.Cos(angle) * (s.Propeller.ThrustLineM - e)) + (torque * Math.Sin(angle));
            double half = s.Geometry.RightCarabinerM;
            double height = Math.Sqrt((s.Wing.LineLengthM * s.Wing.LineLengthM) - ((s.Wing.LineSpreadM - half) * (s.Wing.LineSpreadM - half)));
            double twist = Math.Asin(yaw * height / (risers * half * s.Wing.LineSpreadM));
            double wholeDepth = ((kg * depth) - (s.Mass.WingKg * s.Wing.LineLengthM)) / (kg + s.Mass.WingKg);
            double roll = (risers * (e + (depth * Math.Sin(angle - s.Propeller.HangBackRad) * Math.Sin(twist))))
                - (torque * Math.Cos(angle)) - ((s.Propeller.ThrustLineDepthM - wholeDepth) * thrust * Math.Sin(twist));

            FrameEquilibrium frame = new FrameStatics(s).Solve(thrust)!;
            double size = Math.Abs(torque) + (risers * Math.Abs(e)) + 1; // N·m: what the sums are made of
            Assert.InRange(frame.YawMomentNm, yaw - (0.02 * size), yaw + (0.02 * size));
            Assert.InRange(frame.RollMomentNm, roll - (0.04 * size), roll + (0.04 * size));
            Assert.InRange(frame.TwistRad, twist - 0.01, twist + 0.01);
        }
    }

    [Fact]
    public void The_mirror_image_turns_the_other_way() => Gen.Select(
        Gen.Double[-0.03, 0.03], Gen.Double[-0.02, 0.02], Gen.Double[-0.02, 0.02], Gen.Double[0.1, 0.4], Gen.Double[0, 0.15], Gen.Double[0, 450])
        .Sample((shift, line, front, depth, hangBack, thrust) =>
        {
            Scenario s = new Scenario
            {
                Propeller = new() { ThrustLineM = line, ThrustLineDepthM = depth, HangBackRad = hangBack, CantRad = line },
                Wing = new() { LineSpreadM = 2, ConstantPullRadPerSec = front },
            }.WithCgShift(shift).WithHarnessFront(front).WithCarabinerPair(line).WithPowerUnit(front);
            double rate = SteadyTurn.Rate(s, thrust);
            double mirrored = SteadyTurn.Rate(s.Mirrored(), thrust);
            return Math.Abs(rate + mirrored) <= 1e-9;
        }, iter: 60);

    [Fact]
    public void The_mirror_image_has_the_mirrored_truth()
    {
        Scenario s = new Scenario { Wing = new() { ConstantPullRadPerSec = 0.01 }, Propeller = new() { ThrustLineM = 0.01 } }.WithHarnessFront(0.012);
        FlightTruth right = FlightTruth.Of(s);
        FlightTruth left = FlightTruth.Of(s.Mirrored());
        Assert.Equal(right.ConstantRadPerSec, -left.ConstantRadPerSec, 1e-12);
        Assert.Equal(right.ThrustRadPerSecPerN, -left.ThrustRadPerSecPerN, 1e-12);
        Assert.Equal(right.NullShiftM!.Value, -left.NullShiftM!.Value, 1e-8);
        Assert.Equal(right.BrakeRadPerSecPerM, left.BrakeRadPerSecPerM);
        Assert.Equal(right.Pull.Select(p => Math.Round(p.RateRadPerSec, 10)), left.Pull.Select(p => -Math.Round(p.RateRadPerSec, 10)));
        Assert.Equal(right.Travels.Select(t => Math.Round(t.TravelM!.Value, 7)), left.Travels.Select(t => -Math.Round(t.TravelM!.Value, 7)));
    }

    [Fact]
    public void Each_true_travel_stops_the_turn_in_level_flight()
    {
        Scenario s = new Scenario { Wing = new() { ConstantPullRadPerSec = 0.004 } }.WithHarnessFront(-0.01);
        FlightTruth truth = FlightTruth.Of(s);
        Assert.Equal(5, truth.Travels.Length);
        foreach (TravelTruth travel in truth.Travels)
        {
            Scenario moved = MoveOf(travel.Kind)(s, travel.TravelM!.Value);
            Assert.True(Math.Abs(SteadyTurn.Rate(moved, truth.LevelThrustN)) < 1e-9, travel.Kind);
        }
    }

    [Fact]
    public void The_parabola_of_the_truth_passes_through_the_pull_at_no_and_full_thrust()
    {
        FlightTruth t = FlightTruth.Of(new Scenario());
        double full = t.ConstantRadPerSec + (t.ThrustRadPerSecPerN * t.FullThrustN) + (t.ThrustSquaredRadPerSecPerN2 * t.FullThrustN * t.FullThrustN);
        Accuracy.AgreesTo(10, t.Pull[3].RateRadPerSec, full);
        Assert.Equal(["off", "idle", "cruise", "full"], t.Pull.Select(p => p.Setting));
    }

    [Fact]
    public void A_machine_whose_risers_twist_right_round_is_refused()
    {
        Scenario s = new() { Propeller = new() { ThrustLineM = 0.2 } };
        SimulationException fault = Assert.Throws<SimulationException>(() => SteadyTurn.Rate(s, 600));
        Assert.Equal(
            "The risers twist right round at a thrust of 600 N: such a machine does not fly. Lower the thrust or its line's offset, or widen line_spread_m.",
            fault.Message);
    }

    [Fact]
    public void A_travel_out_of_reach_is_not_invented()
    {
        Scenario s = new() { Wing = new() { ConstantPullRadPerSec = 1 } }; // 57 deg/s: 640 mm of shift
        Assert.Null(SteadyTurn.NullTravel(s, 100, static (x, d) => x.WithCgShift(d)));
        Assert.Null(FlightTruth.Of(s).NullShiftM);
    }

    [Fact]
    public void A_straight_flying_machine_needs_no_travel() =>
        Assert.Equal(0, SteadyTurn.NullTravel(new Scenario { Propeller = new() { Rotation = 0 } }, 200, static (x, d) => x.WithCarabinerPair(d))!.Value, 1e-12);

    private static Func<Scenario, double, Scenario> MoveOf(string kind) => kind switch
    {
        "carabiner_pair" => static (x, d) => x.WithCarabinerPair(d),
        "carabiner_one_side" => static (x, d) => x.WithCarabinerOneSide(d),
        "bar_spacer" => static (x, d) => x.WithBarSpacer(d),
        "harness_front" => static (x, d) => x.WithHarnessFront(d),
        _ => static (x, d) => x.WithHarnessFrontRear(d),
    };
}
