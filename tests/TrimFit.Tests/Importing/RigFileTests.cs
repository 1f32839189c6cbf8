using System.Globalization;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Import.Rigs;

namespace TrimFit.Tests.Importing;

public class RigFileTests
{
    private const string Least = """
        [mass]
        pilot_kg = 90
        power_unit_kg = 28
        [propeller]
        rotation = "clockwise"
        [carabiners]
        left_mm = -210
        right_mm = 215
        """;

    private const string Whole = """
        schema = "trimfit-rig/1"
        name = "Demo machine"
        [machine]
        kind = "wheels"
        seats = 2
        [mass]
        pilot_kg = 90
        passenger_kg = { value = 70, plus_minus = 1.96 }
        power_unit_kg = [28.0, 29.0, 30.0]
        fuel_kg = 8
        wheels_kg = 20
        power_unit_lateral_mm = 4
        fuel_lateral_mm = -30
        cg_depth_mm = 420
        [propeller]
        rotation = "counter-clockwise"
        diameter_m = 1.25
        shaft_power_kw = 14
        power_uncertainty_percent = 9.8
        static_thrust_n = 600
        static_thrust_air_density = 1.18
        full_power_rpm = 9000
        hang_back_deg = 5
        cant_deg = { value = 2, plus_minus = 0.5 }
        thrust_line_mm = 6
        thrust_line_depth_mm = 260
        figure_of_merit = 0.65
        throttle_thrust_percent = [[0, 0], [50, 30], [100, 100]]
        drive = "clutch"
        clutch_engage_rpm = 3600
        reduction_ratio = 3
        rpm_is = "engine"
        [carabiners]
        left_mm = { value = -200, plus_minus = 1.96 }
        right_mm = 215
        [hang_points]
        front_share = 0.75
        front_offset_mm = 3
        rear_offset_mm = -2
        [hang_check]
        left_kg = [70.0, 70.4]
        right_kg = 69
        carabiner_spacing_mm = 420
        [brakes]
        full_travel_mm = 600
        [wing]
        name = "Demo wing"
        area_m2 = 25
        mass_kg = 6.2
        trim_speed_m_s = 10.5
        glide_sink_m_s = 1.3
        line_length_m = 7.2
        line_spread_m = 1.5
        yaw_stiffness_nm_per_rad = 45
        sensitivity_deg_s_per_mm = 0.09
        [limits]
        carabiner_pair = { min = -40, max = 40, step = 5 }
        engine_cant = { min = -3, max = 3 }
        [limits.ballast]
        max = 4
        [log]
        yaw_rate = "gz:deg/s"
        rpm = "engine: rpm raw"
        gyro_orientation = "x right, y back, z down"
        """;

    [Fact]
    public void Masses_rotation_and_carabiners_are_enough_and_the_rest_is_assumed()
    {
        Rig rig = RigFileReader.Read("least.toml", Least);
        Assert.Equal(90, rig.Mass.PilotKg.Value);
        Assert.Equal(28, rig.Mass.PowerUnitKg.Value);
        Assert.Equal(1, rig.Propeller.RotationSign);
        Assert.Equal(-0.210, rig.Carabiners.LeftM.Value, 12);
        Assert.Equal(0.215, rig.Carabiners.RightM.Value, 12);
        Assert.Equal(["power_unit_lateral_mm", "posture_mm", "cg_depth_mm", "hang_back_deg", "thrust_line_mm", "thrust_line_depth_mm", "figure_of_merit",
            "front_share", "front_offset_mm", "rear_offset_mm", "wing_mass_kg", "line_length_m"], rig.Assumptions().Select(a => a.Name));
        Assert.Null(rig.HangCheck);
        Assert.Empty(rig.Limits);
    }

    [Fact]
    public void Fuel_without_a_place_is_listed_as_assumed() =>
        Assert.Contains("fuel_lateral_mm", RigFileReader.Read("fuel.toml", Least.Replace("[propeller]", "fuel_kg = 8\n[propeller]", StringComparison.Ordinal)).Assumptions().Select(a => a.Name));

    [Fact]
    public void Every_key_arrives_in_SI_units()
    {
        Rig rig = RigFileReader.Read("folder/whole.toml", Whole);
        Assert.Equal("Demo machine", rig.Name);
        Assert.Equal(MachineKind.Wheels, rig.Kind);
        Assert.Equal(2, rig.Seats);
        Assert.Equal(8, rig.Mass.FuelKg.Value);
        Assert.Equal(20, rig.Mass.WheelsKg.Value);
        Accuracy.AgreesTo(12, 0.004, rig.Mass.PowerUnitLateralM.Value);
        Accuracy.AgreesTo(12, -0.030, rig.Mass.FuelLateralM.Value);
        Accuracy.AgreesTo(12, 0.42, rig.Mass.CgDepthM.Value);
        RigPropeller propeller = rig.Propeller;
        Assert.Equal(PropellerRotation.CounterClockwise, propeller.Rotation);
        Assert.Equal(1.25, propeller.DiameterM);
        Assert.Equal(14000, propeller.ShaftPowerW);
        Accuracy.AgreesTo(12, 0.05, propeller.PowerRelativeSd); // by hand: 9.8 % / 1.96
        Assert.Equal(600, propeller.StaticThrustN!.Value.Value);
        Assert.Equal(1.18, propeller.StaticThrustAirDensity);
        Assert.Equal(150, propeller.FullPowerRevPerSec);
        Accuracy.AgreesTo(12, 5 * Math.PI / 180, propeller.HangBackRad.Value);
        Accuracy.AgreesTo(12, 2 * Math.PI / 180, propeller.CantRad.Value);
        Accuracy.AgreesTo(12, 0.006, propeller.ThrustLineM.Value);
        Accuracy.AgreesTo(12, 0.26, propeller.ThrustLineDepthM.Value);
        Assert.Equal(0.65, propeller.FigureOfMerit.Value);
        Assert.Equal([(0, 0), (0.5, 0.3), (1, 1)], propeller.ThrottleThrust);
        Assert.Equal(PropellerDrive.Clutch, propeller.Drive);
        Assert.Equal(60, propeller.ClutchEngageRevPerSec);
        Assert.Equal(3, propeller.ReductionRatio);
        Assert.Equal(RpmMeaning.Engine, propeller.RpmIs);
        Assert.Equal(0.75, rig.HangPoints.FrontShare.Value);
        Accuracy.AgreesTo(12, 0.003, rig.HangPoints.FrontOffsetM.Value);
        Accuracy.AgreesTo(12, -0.002, rig.HangPoints.RearOffsetM.Value);
        Accuracy.AgreesTo(12, 70.2, rig.HangCheck!.LeftKg.Value);
        Assert.Equal(69, rig.HangCheck.RightKg.Value);
        Accuracy.AgreesTo(12, 0.42, rig.HangCheck.CarabinerSpacingM!.Value.Value);
        Accuracy.AgreesTo(12, 0.6, rig.BrakeFullTravelM!.Value);
        Assert.Equal("Demo wing", rig.Wing.Name);
        Assert.Equal(25, rig.Wing.AreaM2);
        Assert.Equal(6.2, rig.Wing.MassKg.Value);
        Assert.Equal(10.5, rig.Wing.TrimSpeedMPerSec);
        Assert.Equal(1.3, rig.Wing.GlideSinkMPerSec);
        Assert.Equal(7.2, rig.Wing.LineLengthM.Value);
        Assert.Equal(1.5, rig.Wing.LineSpreadM!.Value.Value);
        Assert.Equal(45, rig.Wing.YawStiffnessNmPerRad!.Value.Value);
        Accuracy.AgreesTo(12, Math.PI / 2, rig.Wing.SensitivityRadPerSecPerM!.Value.Value); // by hand: 0.09 deg/s per mm = 90 deg/s per m
        Assert.Equal(new AdjustmentLimit(-0.04, 0.04, 0.005), rig.Limits[AdjustmentKind.CarabinerPair]);
        Accuracy.AgreesTo(12, Math.PI / 60, rig.Limits[AdjustmentKind.EngineCant].Max!.Value);
        Assert.Equal(new AdjustmentLimit(null, 4, null), rig.Limits[AdjustmentKind.Ballast]);
        Assert.Equal([new ColumnRule(ChannelRole.Rpm, "engine: rpm raw", null), new ColumnRule(ChannelRole.YawRate, "gz", "deg/s")], rig.Log.Columns);
        Assert.Equal("x right, y back, z down", rig.Log.GyroOrientation);
        Assert.Equal(["posture_mm"], rig.Assumptions().Select(a => a.Name));
    }

    [Fact]
    public void A_plus_minus_is_half_of_the_95_percent_range()
    {
        Rig rig = RigFileReader.Read("whole.toml", Whole);
        Accuracy.AgreesTo(12, 1, rig.Mass.PassengerKg.StandardDeviation);      // by hand: 1.96 / 1.96
        Accuracy.AgreesTo(12, 0.001, rig.Carabiners.LeftM.StandardDeviation);
    }

    [Fact]
    public void Repeats_give_their_mean_and_its_standard_error()
    {
        Reading reading = RigFileReader.Read("whole.toml", Whole).Mass.PowerUnitKg;
        Assert.Equal(29, reading.Value);
        Accuracy.AgreesTo(12, 1 / Math.Sqrt(3), reading.StandardDeviation);     // by hand: s = 1, n = 3
    }

    [Fact]
    public void Repeats_that_agree_keep_half_of_one_readings_spread()
    {
        Reading reading = RigFileReader.Read("same.toml", Least.Replace("-210", "[-210, -210, -210]", StringComparison.Ordinal)).Carabiners.LeftM;
        Accuracy.AgreesTo(12, 0.001 / 1.96, reading.StandardDeviation);         // by hand: half of 2 mm at 95 %
    }

    [Fact]
    public void A_bare_number_has_the_customary_spread_of_its_kind()
    {
        Rig rig = RigFileReader.Read("whole.toml", Whole);
        Accuracy.AgreesTo(12, 0.002 / 1.96, rig.Carabiners.RightM.StandardDeviation);
        Accuracy.AgreesTo(12, 0.5 / 1.96, rig.Mass.PilotKg.StandardDeviation);
        Accuracy.AgreesTo(12, 30 / 1.96, rig.Propeller.StaticThrustN!.Value.StandardDeviation); // 5 % of 600 N
    }

    [Fact]
    public void A_spread_on_the_power_becomes_the_spread_of_the_torque() =>
        Accuracy.AgreesTo(12, 0.1, RigFileReader.Read("power.toml", Least.Replace("\"clockwise\"", "\"clockwise\"\nshaft_power_kw = { value = 10, plus_minus = 1.96 }", StringComparison.Ordinal)).Propeller.PowerRelativeSd);

    [Fact]
    public void Two_scales_give_the_power_units_place_with_its_spread()
    {
        Reading lateral = RigFileReader.Read("weighed.toml", Least + """

            [weighing]
            power_unit_left_kg = { value = 12, plus_minus = 0.196 }
            power_unit_right_kg = { value = 16, plus_minus = 0.196 }
            scale_spacing_mm = { value = 700, plus_minus = 0 }
            """).Mass.PowerUnitLateralM;
        Accuracy.AgreesTo(12, 0.050, lateral.Value);                 // by hand: 700 (16 - 12)/(2 28) = 50 mm
        // By hand: dy/dL = -700 16/784, dy/dR = 700 12/784 mm per kg; root of squares times 0.1 kg = 700/784 20 0.1 mm.
        Accuracy.AgreesTo(12, 0.7 / 784 * 20 * 0.1, lateral.StandardDeviation);
        Assert.Equal(ReadingSource.Measured, lateral.Source);
    }

    [Fact]
    public void The_rear_straps_scale_gives_the_front_share()
    {
        Reading share = RigFileReader.Read("strap.toml", Least + """

            [weighing]
            rear_strap_kg = { value = 18, plus_minus = 1.764 }
            """).HangPoints.FrontShare;
        Accuracy.AgreesTo(12, 0.8, share.Value);                     // by hand: 1 - 18/90
        // By hand: (0.9 kg and 0.2 times the pilot's 0.5/1.96 kg) over 90 kg.
        Accuracy.AgreesTo(12, Math.Sqrt(0.81 + Math.Pow(0.2 * 0.5 / 1.96, 2)) / 90, share.StandardDeviation);
    }

    [Theory]
    [InlineData("de-DE")]
    [InlineData("tr-TR")]
    [InlineData("ar-SA")]
    public void The_machines_culture_changes_nothing(string culture)
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo(culture);
            Assert.Equal(6.2, RigFileReader.Read("whole.toml", Whole).Wing.MassKg.Value);
            Assert.Equal("r.toml(7): found 210.5 for left_mm, expected a negative number. Positive is to the seated pilot's right; swap the two carabiners or the sign.",
                Message(Least.Replace("-210", "210.5", StringComparison.Ordinal)));
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    public static TheoryData<string, string, string> Faults() => new()
    {
        { "left_mm = -210", "carabiner_left_mm = -210", "r.toml(6): found [carabiners] without left_mm, expected the left riser carabiner from the frame's centre line, mm, negative. Measure it and write left_mm = -210.\nr.toml(7): unknown key \"carabiner_left_mm\" in [carabiners]; did you mean \"left_mm\"?" },
        { "left_mm = -210", "left_mm = 210", "r.toml(7): found 210 for left_mm, expected a negative number. Positive is to the seated pilot's right; swap the two carabiners or the sign." },
        { "right_mm = 215", "right_mm = -215", "r.toml(8): found -215 for right_mm, expected a positive number. Positive is to the seated pilot's right; swap the two carabiners or the sign." },
        { "right_mm = 215", "right_mm = 0.215", "r.toml(8): found 0.215 for right_mm, expected at least 50 mm from the centre line. Give millimetres." },
        { "right_mm = 215", "right_mm = nan", "r.toml(8): found NaN for right_mm, expected a number from -600 to 600 mm. Lengths of this key are in millimetres." },
        { "pilot_kg = 90", "pilot_kg = -90", "r.toml(2): found -90 for pilot_kg, expected a number from 30 to 250 kg. Masses are in kilograms and never negative." },
        { "pilot_kg = 90", "pilot_kg = \"90\"", "r.toml(2): found \"90\" for pilot_kg, expected a number from 30 to 250 kg. Masses are in kilograms and never negative." },
        { "pilot_kg = 90", "pilot_kg = []", "r.toml(2): found an empty list for pilot_kg, expected one reading or more. Leave pilot_kg out when nothing was measured." },
        { "pilot_kg = 90", "pilot_kg = { value = 90 }", "r.toml(2): found a table without plus_minus for pilot_kg, expected both value and plus_minus. Write pilot_kg = { value = 10, plus_minus = 2 }." },
        { "pilot_kg = 90", "pilot_kg = { value = 90, plus_minus = -1 }", "r.toml(2): found -1 for plus_minus, expected a number from 0 to 250 kg. plus_minus is half of the 95 % range, never negative." },
        { "pilot_kg = 90", "pilot_kg = { value = 90, plusminus = 1 }", "r.toml(2): unknown key \"plusminus\" in [mass.pilot_kg]; did you mean \"plus_minus\"?\nr.toml(2): found a table without plus_minus for pilot_kg, expected both value and plus_minus. Write pilot_kg = { value = 10, plus_minus = 2 }." },
        { "pilot_kg = 90\n", "", "r.toml(1): found [mass] without pilot_kg, expected the pilot with all that hangs from the harness, kg. Weigh it and write pilot_kg = 90." },
        { "[mass]\npilot_kg = 90\npower_unit_kg = 28\n", "", "r.toml: found no [mass] and so no pilot_kg, expected the pilot with all that hangs from the harness, kg. Weigh it and write pilot_kg = 90.\nr.toml: found no [mass] and so no power_unit_kg, expected the power unit without fuel and wheels, kg. Weigh it and write power_unit_kg = 28." },
        { "rotation = \"clockwise\"", "rotation = \"clock-wise\"", "r.toml(5): found \"clock-wise\" for rotation, expected \"clockwise\", \"counter-clockwise\" or \"contra-rotating\". Write rotation = \"clockwise\" if that is what it is." },
        { "rotation = \"clockwise\"", "", "r.toml(4): found [propeller] without rotation, expected which way the propeller turns. Stand behind the machine, look the way it flies, and write rotation = \"clockwise\" or \"counter-clockwise\"." },
        { "rotation = \"clockwise\"", "rotation = clockwise", "r.toml(5): found the word clockwise without quotes, expected a value. Write rotation = \"clockwise\"." },
        { "power_unit_kg = 28", "power_unit_kg = 28,5", "r.toml(3): found 28,5, expected a number with a decimal point. Write 28.5." },
        { "power_unit_kg = 28", "power_unit_kg = 28\npilot_kg = 80", "r.toml(4): \"mass.pilot_kg\" is given a second time, first on line 2. Keep one of the two." },
        { "[carabiners]", "[carabiners", "r.toml(6): found \"[carabiners\", which is not TOML, expected a line such as key = 12.5 or [table]. Correct the line; text stands in straight quotes." },
        { "[propeller]", "static_thrust_n = 600\n[propeller]", "r.toml(4): unknown key \"static_thrust_n\" in [mass]; it belongs in [propeller]." },
        { "[propeller]", "[hangpoints]\nfront_share = 1.2\n[propeller]", "r.toml(4): unknown table [hangpoints]; did you mean [hang_points]?" },
        { "[propeller]", "[hang_points]\nfront_share = 80\n[propeller]", "r.toml(5): found 80 for front_share, expected a number from 0 to 1. A share is a fraction; 80 % is 0.8." },
        { "[propeller]", "passenger_kg = 80\n[propeller]", "r.toml(4): found a passenger on a machine with one seat, expected seats = 2 in [machine]. Add seats = 2 or leave passenger_kg out." },
        { "[propeller]", "wheels_kg = 20\n[propeller]", "r.toml(4): found wheels on a foot-launched machine, expected kind = \"wheels\" in [machine]. Add kind = \"wheels\" or leave wheels_kg out." },
        { "[carabiners]", "power_uncertainty_percent = 10\n[carabiners]", "r.toml(6): found power_uncertainty_percent without shaft_power_kw, expected the power it belongs to. Add shaft_power_kw or leave power_uncertainty_percent out." },
        { "[carabiners]", "shaft_power_kw = [14, 15]\npower_uncertainty_percent = 10\n[carabiners]", "r.toml(7): found power_uncertainty_percent beside a shaft_power_kw with its own spread, expected one of the two. Leave power_uncertainty_percent out." },
        { "[carabiners]", "rpm_is = \"electrical\"\n[carabiners]", "r.toml(6): found rpm_is = \"electrical\" without pole_pairs, expected the motor's pole pairs. Add pole_pairs: the number of magnets divided by two." },
        { "[carabiners]", "rpm_is = \"engine\"\n[carabiners]", "r.toml(6): found rpm_is = \"engine\" without reduction_ratio, expected engine turns per propeller turn. Add reduction_ratio, or drive = \"direct\" when the propeller sits on the crankshaft." },
        { "[carabiners]", "pole_pairs = 7.5\n[carabiners]", "r.toml(6): found 7.5 for pole_pairs, expected a whole number. Count the magnets and divide by two." },
        { "[carabiners]", "throttle_thrust_percent = [[0, 0], [50, 30], [40, 60]]\n[carabiners]", "r.toml(6): found the pair [40, 60] after [50, 30] in throttle_thrust_percent, expected throttle that increases and thrust that does not fall. Put the pairs in order." },
        { "[carabiners]", "throttle_thrust_percent = [[0, 0]]\n[carabiners]", "r.toml(6): found a list for throttle_thrust_percent, expected at least two pairs of throttle % and thrust %. Write throttle_thrust_percent = [[0, 0], [50, 30], [100, 100]]." },
        { "[carabiners]", "throttle_thrust_percent = [[0, 0], [150, 100]]\n[carabiners]", "r.toml(6): found a list in throttle_thrust_percent, expected pairs of throttle % (0 to 100) and thrust % (0 to 120). Write throttle_thrust_percent = [[0, 0], [50, 30], [100, 100]]." },
        { "[mass]", "[machine]\nseats = 1.5\n[mass]", "r.toml(2): found 1.5 for seats, expected 1 or 2. Write seats = 1 or seats = 2." },
        { "[mass]", "wing = 5\n[mass]", "r.toml(1): found 5 for wing, expected a table. Write a line [wing] and its keys below it." },
        { "[mass]", "name = 5\n[mass]", "r.toml(1): found 5 for name, expected text in quotes. Write name = \"my machine\"." },
        { "[mass]", "colour = \"red\"\n[mass]", "r.toml(1): unknown key \"colour\" at the top of the file. Known here: brakes, carabiners, hang_check, hang_points, limits, log, machine, mass, name, propeller, schema, thrust_test, weighing, wing." },
        { "[mass]", "schema = \"trimfit-rig/2\"\n[mass]", "r.toml(1): found schema \"trimfit-rig/2\", expected \"trimfit-rig/1\". The file was written for a newer TrimFit; update the program." },
        { "[mass]", "schema = \"trimfit-flight/1\"\n[mass]", "r.toml(1): found \"trimfit-flight/1\" for schema, expected \"trimfit-rig/1\". Write schema = \"trimfit-rig/1\", or check that this is the right file." },
        { "[mass]", "[hang_check]\nleft_kg = 60\n[mass]", "r.toml(1): found [hang_check] without right_kg, expected the readings of both scales, kg. Add the missing reading or leave the table out." },
        { "[mass]", "[weighing]\npower_unit_left_kg = 14\n[mass]", "r.toml(1): found [weighing] without power_unit_right_kg and scale_spacing_mm, expected both scales and their spacing. Add the missing reading." },
        { "[mass]", "[weighing]\nrear_strap_kg = 95\n[mass]", "r.toml(2): found 95 kg in the rear straps, expected less than the 90 kg that hang from the harness. Weigh again, both rear straps together." },
        { "[mass]", "[weighing]\nrear_strap_kg = 20\n[hang_points]\nfront_share = 0.8\n[mass]", "r.toml(4): found front_share beside rear_strap_kg in [weighing], expected one of the two. Leave front_share out; the rear strap's scale gives it." },
        { "[mass]", "[weighing]\npower_unit_left_kg = 0\npower_unit_right_kg = 0\nscale_spacing_mm = 600\n[mass]", "r.toml(2): found two empty scales, expected the weight of the power unit on them. Weigh again." },
        { "[mass]", "[weighing]\npower_unit_left_kg = 14\npower_unit_right_kg = 15\nscale_spacing_mm = 600\n[mass]\npower_unit_lateral_mm = 3", "r.toml(6): found power_unit_lateral_mm beside [weighing], expected one of the two. Leave power_unit_lateral_mm out; the two scales give it." },
        { "[mass]", "[limits]\ncarabiner_pare = { min = -10, max = 10 }\n[mass]", "r.toml(2): unknown key \"carabiner_pare\" in [limits]; did you mean \"carabiner_pair\"?" },
        { "[mass]", "[limits]\ncarabiner_pair = 40\n[mass]", "r.toml(2): found 40 for carabiner_pair, expected a table with min, max and step. Write carabiner_pair = { min = -20, max = 20, step = 5 }, in mm." },
        { "[mass]", "[limits]\nballast = { min = 4, max = 1 }\n[mass]", "r.toml(2): found min = 4 above max = 1 for ballast, expected min below max. Swap the two; right is positive." },
        { "[mass]", "[limits]\nballast = { max = 4, step = 0 }\n[mass]", "r.toml(2): found 0 for step, expected a number from 0.01 to 1000 kg. Leave step out when the part moves freely." },
        { "[mass]", "[log]\nyaw = \"gz\"\n[mass]", "r.toml(2): unknown key \"yaw\" in [log]; did you mean \"yaw_rate\"?" },
        { "[mass]", "[log]\ngyro_orientation = \"x right, y forward, z down\"\n[mass]", "r.toml(2): found \"x right, y forward, z down\" for gyro_orientation, expected a direction for each of x, y and z, square to each other. Write gyro_orientation = \"x forward, y right, z down\" with forward, back, right, left, up or down." },
    };

    [Theory]
    [MemberData(nameof(Faults))]
    public void A_fault_is_named_with_its_line_and_what_to_do(string good, string bad, string message)
    {
        Assert.Contains(good, Least, StringComparison.Ordinal);
        Assert.Equal(message, Message(Least.Replace(good, bad, StringComparison.Ordinal)));
    }

    [Fact]
    public void All_faults_are_named_at_once_in_the_order_of_the_file() =>
        Assert.Equal("""
            r.toml(2): found 900 for pilot_kg, expected a number from 30 to 250 kg. Masses are in kilograms and never negative.
            r.toml(5): found "left" for rotation, expected "clockwise", "counter-clockwise" or "contra-rotating". Write rotation = "clockwise" if that is what it is.
            r.toml(9): unknown key "middle_mm" in [carabiners]. Known here: left_mm, right_mm.
            """, Message(Least.Replace("90", "900", StringComparison.Ordinal).Replace("\"clockwise\"", "\"left\"", StringComparison.Ordinal) + "\nmiddle_mm = 3"));

    [Fact]
    public void A_file_that_nests_without_end_is_refused() =>
        Assert.Equal("r.toml: the file nests too deeply to be a settings file. Write it again from the example.", Message("a = " + new string('[', 20_000)));

    [Fact]
    public void No_cut_and_no_changed_byte_of_a_good_file_gives_another_exception()
    {
        var random = new Random(20260131);
        int refused = 0;
        for (int i = 0; i < 2000; i++)
        {
            char[] text = Whole.ToCharArray();
            if (i % 2 == 0)
                text = text[..random.Next(text.Length)];
            for (int k = random.Next(4); k > 0 && text.Length > 0; k--)
                text[random.Next(text.Length)] = (char)random.Next(i % 3 == 0 ? 0x3000 : 128);
            try
            {
                RigFileReader.Read("r.toml", new string(text));
            }
            catch (LogFormatException e)
            {
                refused++;
                Assert.StartsWith("r.toml", e.Message, StringComparison.Ordinal);
            }
        }
        Assert.InRange(refused, 1000, 2000);
    }

    private static string Message(string text) => Assert.Throws<LogFormatException>(() => RigFileReader.Read("some/folder/r.toml", text)).Message;
}
