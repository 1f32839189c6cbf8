using TrimFit.Core.Logs;
using TrimFit.Simulation;

namespace TrimFit.Tests.Simulation;

public class FlightSimulatorTests
{
    private static readonly AirSetup _stillAir = new()
    {
        WindNorthMPerSec = 0,
        WindEastMPerSec = 0,
        SlowWindMPerSec = 0,
        GustMPerSec = 0,
        DisturbanceRadPerSec = 0,
        DensityFollowsAltitude = false,
    };

    private static readonly SensorSuite _perfect = new()
    {
        GyroHz = 50,
        GyroBiasRadPerSec = 0,
        GyroNoiseRadPerSec = 0,
        GpsPositionNoiseM = 0,
        GpsVelocityNoiseMPerSec = 0,
        AltitudeNoiseM = 0,
        VerticalSpeedNoiseMPerSec = 0,
        RpmNoiseRevPerSec = 0,
        BrakeNoiseM = 0,
    };

    private static Scenario Calm(params FlightLeg[] legs) => new()
    {
        Air = _stillAir,
        Sensors = _perfect,
        Pilot = new() { HandNoiseM = 0 },
        Legs = [.. legs],
    };

    [Theory]
    [InlineData(TurnResponse.FirstOrder, LegPower.Off, 0)]
    [InlineData(TurnResponse.FirstOrder, LegPower.Level, 2)]
    [InlineData(TurnResponse.SecondOrder, LegPower.Full, 3)]
    [InlineData(TurnResponse.SecondOrder, LegPower.Idle, 1)]
    public void Let_alone_in_still_air_it_settles_in_the_true_pull(TurnResponse response, LegPower power, int setting)
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 60, Power = power });
        s = s.WithHarnessFront(0.01) with { Wing = s.Wing with { Response = response, ConstantPullRadPerSec = 0.01 } };
        SimulatedFlight flight = FlightSimulator.Fly(s);
        Assert.Equal(flight.Truth.Pull[setting].RateRadPerSec, flight.Log[ChannelRole.YawRate][^1], 1e-5); // 0.0006 deg/s
    }

    [Fact]
    public void A_clutch_machine_has_no_thrust_and_no_rotation_at_idle()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 30, Power = LegPower.Idle });
        s = s with { Propeller = s.Propeller with { Clutch = true } };
        SimulatedFlight flight = FlightSimulator.Fly(s);
        Assert.Equal(0, Last(flight.Log[ChannelRole.Rpm]));
        Assert.Equal(0, flight.Truth.Pull[1].ThrustN);
        Assert.Equal(flight.Truth.Pull[0].RateRadPerSec, flight.Truth.Pull[1].RateRadPerSec);
    }

    [Theory]
    [InlineData(LegPower.Level, 0)]
    [InlineData(LegPower.Off, -2.2)]
    [InlineData(LegPower.Full, 3.2275)] // by hand: (600 − 243.205)/(124 × 9.80665) × 11
    public void Climb_is_what_thrust_leaves_over(LegPower power, double climb)
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 60, Power = power });
        s = s with { Propeller = s.Propeller with { Rotation = 0 } }; // straight on: no drag of a turn
        double vertical = Last(FlightSimulator.Fly(s).Log[ChannelRole.VerticalSpeed]);
        Assert.Equal(climb, vertical, 0.002);
    }

    [Fact]
    public void A_second_order_wing_overshoots_a_step_as_its_damping_says()
    {
        Scenario s = Calm(
            new FlightLeg { DurationSec = 10, Power = LegPower.Off },
            new FlightLeg { DurationSec = 25, Power = LegPower.Off, Control = LegControl.Brakes, BrakeRightM = 0.1 });
        s = s with { Wing = s.Wing with { Response = TurnResponse.SecondOrder }, Pilot = s.Pilot with { HandLagSec = 0.02 } };
        ReadOnlySpan<double> rate = FlightSimulator.Fly(s).Log[ChannelRole.YawRate];
        double most = 0;
        foreach (double r in rate)
            most = Math.Max(most, r);
        double steady = 0.1 * double.DegreesToRadians(80);
        Accuracy.AgreesTo(3, steady, rate[^1]);
        // exp(−π ζ/√(1 − ζ²)) = 0.179 for ζ = 0.48 (any control textbook)
        Assert.Equal(Math.Exp(-Math.PI * 0.48 / Math.Sqrt(1 - (0.48 * 0.48))), (most / steady) - 1, 0.015);
    }

    [Fact]
    public void A_first_order_wing_has_gone_63_percent_after_its_lag()
    {
        Scenario s = Calm(
            new FlightLeg { DurationSec = 10, Power = LegPower.Off },
            new FlightLeg { DurationSec = 20, Power = LegPower.Off, Control = LegControl.Brakes, BrakeLeftM = 0.1 });
        s = s with { Pilot = s.Pilot with { HandLagSec = 0.001 } };
        ReadOnlySpan<double> rate = FlightSimulator.Fly(s).Log[ChannelRole.YawRate];
        double after = rate[(int)Math.Round((10 + 1.3) * 50)];
        Assert.Equal(1 - Math.Exp(-1), after / (-0.1 * double.DegreesToRadians(80)), 0.01);
    }

    [Fact]
    public void A_soft_start_takes_its_travel_from_the_brake()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 40, Power = LegPower.Off, Control = LegControl.Brakes, BrakeRightM = 0.15 });
        s = s with { Brakes = s.Brakes with { SoftStartM = 0.03 } };
        double rate = FlightSimulator.Fly(s).Log[ChannelRole.YawRate][^1];
        Accuracy.AgreesTo(3, (0.15 - (0.03 * Math.Tanh(5))) * double.DegreesToRadians(80), rate);
    }

    [Fact]
    public void A_pilot_who_holds_course_shows_the_pull_in_the_brakes()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 150, Power = LegPower.Full, Control = LegControl.HoldHeading, HeadingRad = 0 });
        SimulatedFlight flight = FlightSimulator.Fly(s);
        double held = Last(flight.Log[ChannelRole.BrakeRight]) - Last(flight.Log[ChannelRole.BrakeLeft]);
        Accuracy.AgreesTo(2, -flight.Truth.Pull[3].RateRadPerSec / flight.Truth.BrakeRadPerSecPerM, held);
        double course = Last(flight.Log[ChannelRole.GroundCourse]);
        Assert.True(Math.Abs(Math.IEEERemainder(course, Math.Tau)) < 0.01);
    }

    [Fact]
    public void A_turn_ends_at_its_heading()
    {
        Scenario s = Calm(
            new FlightLeg { DurationSec = 60, Power = LegPower.Level, Control = LegControl.Turn, TurnRad = -Math.PI / 2 },
            new FlightLeg { DurationSec = 40, Power = LegPower.Level, Control = LegControl.HoldHeading, HeadingRad = -Math.PI / 2 });
        SimulatedFlight flight = FlightSimulator.Fly(s);
        Assert.InRange(flight.Legs[0].EndSec, 5, 20);
        Assert.Equal(1.5 * Math.PI, Last(flight.Log[ChannelRole.GroundCourse]), 0.02);
    }

    [Fact]
    public void A_circle_keeps_its_turn_rate()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 60, Power = LegPower.Level, Control = LegControl.Circle, TurnRateRadPerSec = 0.2 });
        Accuracy.AgreesTo(2, 0.2, FlightSimulator.Fly(s).Log[ChannelRole.YawRate][^1]);
    }

    [Fact]
    public void Full_circles_drift_with_the_wind()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 300, Power = LegPower.Level, Control = LegControl.Circle, TurnRateRadPerSec = Math.Tau / 30 });
        s = s with { Air = s.Air with { WindNorthMPerSec = 3, WindEastMPerSec = -4 } };
        FlightLog log = FlightSimulator.Fly(s).Log;
        // between equal points of circles flown at a settled rate
        const double metersPerDegree = 111_030; // WGS-84 at 40 degrees, to 0.1 %
        int from = 60 * 50, to = 300 * 50;
        double north = double.RadiansToDegrees(log[ChannelRole.Latitude][to] - log[ChannelRole.Latitude][from]) * metersPerDegree;
        Assert.Equal(3, north / 240, 0.1);
    }

    [Fact]
    public void A_weight_shift_turns_towards_it_by_the_sensitivity()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 40, Power = LegPower.Off, Control = LegControl.WeightShift, WeightShiftM = 0.02 });
        // 0.09 deg/s per mm, 20 mm, engine off: 1.8 deg/s
        Accuracy.AgreesTo(2.5, double.DegreesToRadians(1.8), FlightSimulator.Fly(s).Log[ChannelRole.YawRate][^1]);
        Scenario ballast = Calm(new FlightLeg { DurationSec = 40, Power = LegPower.Off, Control = LegControl.Ballast, BallastKg = 5.9, BallastArmM = 0.4 });
        Accuracy.AgreesTo(2.5, double.DegreesToRadians(1.8), FlightSimulator.Fly(ballast).Log[ChannelRole.YawRate][^1]); // 5.9 × 0.4/118 = 20 mm
    }

    [Fact]
    public void The_gyro_feels_the_frame_twist_when_the_throttle_moves()
    {
        Scenario s = Calm(
            new FlightLeg { DurationSec = 30, Power = LegPower.Off },
            new FlightLeg { DurationSec = 40, Power = LegPower.Full });
        s = s with { Propeller = s.Propeller with { ThrustLineM = -0.02 } };
        SimulatedFlight flight = FlightSimulator.Fly(s with { Sensors = s.Sensors with { CompassHz = 50, CompassNoiseRad = 0 } });
        double turned = 0;
        foreach (double rate in flight.Log[ChannelRole.YawRate])
            turned += rate / 50;
        ReadOnlySpan<double> heading = flight.Log[ChannelRole.Heading];
        double wing = 0;
        for (int i = 1; i < heading.Length; i++)
            wing += Math.IEEERemainder(heading[i] - heading[i - 1], Math.Tau);
        // what the gyro's sum has over the wing's heading is the riser twist at full thrust
        double twist = SteadyTurn.RiserTwist(s, 600);
        Assert.True(Math.Abs(twist) > 0.05);
        Assert.Equal(twist, turned - wing, 0.01);
    }

    [Fact]
    public void Gyro_faults_are_as_ordered()
    {
        Scenario s = Calm(
            new FlightLeg { DurationSec = 20, Power = LegPower.Off },
            new FlightLeg { DurationSec = 40, Power = LegPower.Full, Control = LegControl.Brakes, BrakeRightM = 0.1 });
        ReadOnlySpan<double> right = FlightSimulator.Fly(s).Log[ChannelRole.YawRate];
        ReadOnlySpan<double> faulty = FlightSimulator.Fly(s with
        {
            Sensors = s.Sensors with { GyroScale = -0.5, GyroBiasRadPerSec = 0.03, GyroVibrationRadPerSec = 0.02, GyroDelaySec = 0.8 },
        }).Log[ChannelRole.YawRate];
        Assert.Equal((-0.5 * right[^41]) + 0.05, faulty[^1], 1e-6); // full power: the whole vibration offset
        Assert.Equal((-0.5 * right[900]) + 0.03, faulty[940], 1e-6); // engine off; 40 samples are 0.8 s
    }

    [Fact]
    public void Fixes_drop_out_and_freeze_as_ordered()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 1800, Power = LegPower.Level });
        s = s with { Sensors = s.Sensors with { GyroHz = 0, GpsHz = 1, BarometerHz = 1, RpmHz = 0, ThrottleHz = 0, BrakesHz = 0, GpsDropoutsPerHour = 20, GpsFreezesPerHour = 20 } };
        ReadOnlySpan<double> latitude = FlightSimulator.Fly(s).Log[ChannelRole.Latitude];
        int missing = 0, repeated = 0;
        for (int i = 1; i < latitude.Length; i++)
        {
            missing += double.IsNaN(latitude[i]) ? 1 : 0;
            repeated += latitude[i] == latitude[i - 1] ? 1 : 0;
        }
        Assert.InRange(missing, 24, 200);  // ten drop-outs of 8 s, give or take 3 standard deviations of a Poisson count
        Assert.InRange(repeated, 10, 120);
    }

    [Fact]
    public void A_phone_in_any_attitude_feels_the_turn_about_the_vertical()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 60, Power = LegPower.Level, Control = LegControl.Circle, TurnRateRadPerSec = 0.25 });
        s = s with
        {
            Sensors = s.Sensors with
            {
                InertialHz = 50,
                AccelerationNoiseMPerSec2 = 0,
                AccelerationVibrationMPerSec2 = 0,
                Mounting = new(0.7, -1.1, 2.3),
                SlipTimeSec = 50,
                MountingAfterSlip = new(-2, 0.4, 0.1),
            },
        };
        FlightLog log = FlightSimulator.Fly(s).Log;
        foreach (int i in new[] { log.Count - 1, log.Count - (12 * 50) }) // after and before the slip
        {
            double gx = log[ChannelRole.GyroX][i], gy = log[ChannelRole.GyroY][i], gz = log[ChannelRole.GyroZ][i];
            double ax = log[ChannelRole.AccelerationX][i], ay = log[ChannelRole.AccelerationY][i], az = log[ChannelRole.AccelerationZ][i];
            double felt = Math.Sqrt((ax * ax) + (ay * ay) + (az * az));
            double bank = Math.Atan(11 * 0.25 / 9.80665);
            Assert.Equal(9.80665 / Math.Cos(bank), felt, 0.1);
            // a steady turn is about the vertical: its rate along what is felt as down, that is against the felt force, is r cos(bank)
            double down = -((gx * ax) + (gy * ay) + (gz * az)) / felt;
            Assert.Equal(0.25 * Math.Cos(bank), down, 0.004);
            Assert.Equal(0.25, Math.Sqrt((gx * gx) + (gy * gy) + (gz * gz)), 0.004);
        }
    }

    [Fact]
    public void The_same_scenario_gives_the_same_bytes_and_another_seed_does_not()
    {
        Scenario s = new() { Legs = [new() { DurationSec = 40, Control = LegControl.HoldHeading }] };
        byte[] first = LogWriters.Csv(FlightSimulator.Fly(s).Log);
        Assert.Equal(first, LogWriters.Csv(FlightSimulator.Fly(s).Log));
        Assert.NotEqual(first, LogWriters.Csv(FlightSimulator.Fly(s with { Seed = 2 }).Log));
    }

    [Fact]
    public void A_sensor_more_leaves_the_others_as_they_were()
    {
        Scenario s = new() { Legs = [new() { DurationSec = 40 }] };
        FlightLog without = FlightSimulator.Fly(s).Log;
        FlightLog with = FlightSimulator.Fly(s with { Sensors = s.Sensors with { CompassHz = 10, AirspeedHz = 10, MarksHandsOff = true } }).Log;
        foreach (ChannelRole role in without.Roles)
            Assert.Equal(without[role].ToArray(), with[role].ToArray());
    }

    [Fact]
    public void A_flight_on_the_mirrored_machine_is_the_mirrored_flight()
    {
        Scenario s = Calm(
            new FlightLeg { DurationSec = 20, Power = LegPower.Full },
            new FlightLeg { DurationSec = 20, Power = LegPower.Level, Control = LegControl.Brakes, BrakeLeftM = 0.08 },
            new FlightLeg { DurationSec = 40, Power = LegPower.Level, Control = LegControl.HoldHeading, HeadingRad = 0.5 }).WithHarnessFront(0.02);
        FlightLog right = FlightSimulator.Fly(s).Log;
        FlightLog left = FlightSimulator.Fly(s.Mirrored()).Log;
        for (int i = 0; i < right.Count; i += 50)
        {
            Assert.Equal(right[ChannelRole.YawRate][i], -left[ChannelRole.YawRate][i], 1e-6);
            Assert.Equal(right[ChannelRole.BrakeLeft][i], left[ChannelRole.BrakeRight][i], 1e-6);
        }
    }

    [Fact]
    public void A_landing_ends_on_the_ground_standing_still()
    {
        Scenario s = Calm(
            new FlightLeg { DurationSec = 20, Power = LegPower.Idle, Control = LegControl.Ground },
            new FlightLeg { DurationSec = 7, Power = LegPower.Full, Control = LegControl.TakeOff },
            new FlightLeg { DurationSec = 20, Power = LegPower.Full, Control = LegControl.HoldHeading },
            new FlightLeg { DurationSec = 90, Power = LegPower.Off, Control = LegControl.Land });
        FlightLog log = FlightSimulator.Fly(s with { Start = s.Start with { AltitudeM = 5 } }).Log;
        Assert.Equal(0, log[ChannelRole.GroundSpeed][0]);
        Assert.Equal(0, Last(log[ChannelRole.GroundSpeed]));
        Assert.Equal(5, Last(log[ChannelRole.Altitude]));
        double highest = 0;
        foreach (double altitude in log[ChannelRole.Altitude])
            highest = double.IsNaN(altitude) ? highest : Math.Max(highest, altitude);
        Assert.InRange(highest, 40, 90);
    }

    [Fact]
    public void Thermals_lift_and_turn()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 600, Power = LegPower.Off });
        ReadOnlySpan<double> vertical = FlightSimulator.Fly(s with { Air = s.Air with { ThermalsPerHour = 60 } }).Log[ChannelRole.VerticalSpeed];
        double most = double.NegativeInfinity;
        foreach (double v in vertical)
            most = double.IsNaN(v) ? most : Math.Max(most, v);
        Assert.True(most > -1.2, "with ten thermals of 2 m/s met, one lifts by a metre per second"); // still air sinks at 2.2
    }

    [Fact]
    public void Wind_grows_with_height_when_sheared()
    {
        Scenario s = Calm(new FlightLeg { DurationSec = 100, Power = LegPower.Full, Control = LegControl.HoldHeading, HeadingRad = 0 });
        s = s with { Air = s.Air with { WindNorthMPerSec = 4, ShearPer100M = 0.25 } };
        FlightLog log = FlightSimulator.Fly(s).Log;
        double height = Last(log[ChannelRole.Altitude]) - log[ChannelRole.Altitude][0];
        double brakes = (Last(log[ChannelRole.BrakeLeft]) + Last(log[ChannelRole.BrakeRight])) / 1.2;
        double expected = (11 * (1 - (0.35 * brakes))) + (4 * (1 + (0.25 * height / 100)));
        Assert.Equal(expected, Last(log[ChannelRole.GroundSpeed]), 0.05);
    }

    [Fact]
    public void A_scenario_without_legs_or_sensors_or_with_endless_legs_is_refused_in_words()
    {
        Assert.Equal("The scenario has no legs: add at least one [[leg]] with duration_s and power.",
            Assert.Throws<SimulationException>(() => FlightSimulator.Fly(new Scenario())).Message);
        Assert.Equal("The legs last up to 50000 s; a flight may last 43200 s.",
            Assert.Throws<SimulationException>(() => FlightSimulator.Fly(Calm(new FlightLeg { DurationSec = 50_000 }))).Message);
        Scenario deaf = Calm(new FlightLeg()) with { Sensors = new() { GyroHz = 0, GpsHz = 0, BarometerHz = 0, RpmHz = 0, ThrottleHz = 0, BrakesHz = 0 } };
        Assert.Equal("The scenario's sensors log nothing: give at least one of them a rate.",
            Assert.Throws<SimulationException>(() => FlightSimulator.Fly(deaf)).Message);
    }

    /// <summary>The last value that was recorded.</summary>
    private static double Last(ReadOnlySpan<double> column)
    {
        int i = column.Length - 1;
        while (double.IsNaN(column[i]))
            i--;
        return column[i];
    }

    [Fact]
    public void The_simulator_uses_nothing_of_the_estimator_or_the_rig_model()
    {
        string folder = Path.Combine(RepositoryRoot.Path, "src", "TrimFit.Simulation");
        string[] sources = Directory.GetFiles(folder, "*.cs", SearchOption.AllDirectories);
        Assert.True(sources.Length > 20);
        foreach (string source in sources)
            Assert.DoesNotMatch(@"Core\.(Turns|Rigging|Analysis|Statistics)", File.ReadAllText(source));
    }
}
