using System.Text.Json;
using TrimFit.Simulation;

namespace TrimFit.Tests.Simulation;

public class ScenarioTests
{
    private const string Top = "schema = \"trimfit-scenario/1\"\n";

    private static readonly string[] _values =
        ["0.37", "25", "false", "true", "\"counter-clockwise\"", "\"second_order\"", "\"igc\"", "\"tab\"", "\"2001-02-03T04:05:06Z\"", "\"full\"", "\"hold\""];

    [Fact]
    public void An_empty_scenario_has_the_defaults() => Assert.Equal(new Scenario() with { Legs = [] }, Scenario.Read("x.toml", Top) with { Legs = [] });

    [Fact]
    public void Values_are_read_in_the_units_of_their_names()
    {
        Scenario s = Scenario.Read("x.toml", Top + """
            name = "two words"
            seed = 12
            [mass]
            pilot_kg = 91.5
            posture_mm = -4
            [propeller]
            rotation = "counter-clockwise"
            full_rpm = 2400
            hang_back_deg = 9
            clutch = true
            [wing]
            sensitivity_deg_s_per_mm = 0.06
            response = "second_order"
            [start]
            time = "2025-06-01T10:00:00Z"
            [sensors]
            gyro_hz = 25
            mounting_yaw_deg = 90
            [output]
            logs = "engine_csv_and_igc"
            dialect = "semicolon"
            [[leg]]
            duration_s = 20
            power = "full"
            control = "brakes"
            brake_left_mm = 70
            [[leg]]
            throttle_percent = 45
            heading_deg = 180
            """);
        Assert.Equal("two words", s.Name);
        Assert.Equal(12UL, s.Seed);
        Assert.Equal(91.5, s.Mass.PilotKg);
        Assert.Equal(-0.004, s.Mass.PostureM);
        Assert.Equal(-1, s.Propeller.Rotation);
        Accuracy.AgreesTo(14, 40, s.Propeller.FullRevPerSec);
        Accuracy.AgreesTo(14, Math.PI / 20, s.Propeller.HangBackRad);
        Assert.True(s.Propeller.Clutch);
        Accuracy.AgreesTo(14, 60 * Math.PI / 180, s.Wing.SensitivityRadPerSecPerM);
        Assert.Equal(TurnResponse.SecondOrder, s.Wing.Response);
        Assert.Equal(new DateTimeOffset(2025, 6, 1, 10, 0, 0, TimeSpan.Zero), s.Start.TimeUtc);
        Assert.Equal(25, s.Sensors.GyroHz);
        Accuracy.AgreesTo(14, Math.PI / 2, s.Sensors.Mounting.YawRad);
        Assert.Equal(LogSet.EngineCsvAndIgc, s.Output.Logs);
        Assert.Equal(CsvDialects.All["semicolon"], s.Output.Dialect);
        Assert.Equal(2, s.Legs.Length);
        Assert.Equal(new FlightLeg { DurationSec = 20, Power = LegPower.Full, Control = LegControl.Brakes, BrakeLeftM = 0.07 }, s.Legs[0]);
        Assert.Equal(0.45, s.Legs[1].ThrottleFraction);
        Accuracy.AgreesTo(14, Math.PI, s.Legs[1].HeadingRad!.Value);
    }

    [Fact]
    public void Every_key_changes_a_setting_of_its_own()
    {
        var seen = new Dictionary<string, string>();
        Scenario defaults = new() { Legs = [new()] };
        foreach ((string table, Dictionary<string, ScenarioKey<Scenario>> keys) in ScenarioKeys.Tables)
        {
            foreach (string key in keys.Keys)
            {
                string written = (table.Length == 0 ? "" : $"[{table}]\n") + key + " = ";
                Changed(key, table, _values.Select(value => Top + written + value + "\n[[leg]]\n"));
            }
        }
        foreach (string key in ScenarioKeys.Leg.Keys)
            Changed(key, "leg", _values.Select(value => $"{Top}[[leg]]\n{key} = {value}\n"));

        void Changed(string key, string table, IEnumerable<string> texts)
        {
            foreach (string text in texts)
            {
                Scenario s;
                try
                {
                    s = Scenario.Read("x.toml", text);
                }
                catch (ScenarioFormatException)
                {
                    continue; // not this key's kind of value
                }
                string shown = s with { Legs = [] } + string.Join(' ', s.Legs);
                if (shown == defaults with { Legs = [] } + string.Join(' ', defaults.Legs))
                    continue; // the default itself
                Assert.True(seen.TryAdd(shown, table + "." + key), $"{table}.{key} sets what {seen.GetValueOrDefault(shown)} sets");
                return;
            }
            Assert.Fail($"{table}.{key} cannot be set");
        }
    }

    [Fact]
    public void Every_fault_is_named_with_its_line()
    {
        ScenarioFormatException fault = Assert.Throws<ScenarioFormatException>(() => Scenario.Read("made-up.toml", """
            schema = "trimfit-scenario/1"
            nmae = "x"
            [mass]
            pilot_kg = -3
            pilot = "a"
            [wing]
            response = "third"
            [legs]
            [[leg]]
            duration_s = 0
            power = 3
            [sensors]
            gyro_hz = 3
            gps_hz = 2.5
            gyro_levelled = 1
            [start]
            time = "noon"
            """));
        Assert.Equal(
            """
            made-up.toml(2): unknown key "nmae". Did you mean "name"?
            made-up.toml(4): pilot_kg = -3: must be above 0.
            made-up.toml(5): unknown key "pilot" in [mass]. Did you mean "pilot_kg"?
            made-up.toml(7): response = "third": expected one of "first_order", "second_order".
            made-up.toml(8): unknown table [legs]. Did you mean "leg"?
            made-up.toml(10): duration_s = 0: must be above 0.
            made-up.toml(11): power = 3: expected one of "off", "idle", "level", "full".
            made-up.toml(13): gyro_hz = 3: must be 0 or divide 50.
            made-up.toml(14): gps_hz = 2.5: expected a whole number.
            made-up.toml(15): gyro_levelled = 1: expected true or false.
            made-up.toml(17): time = "noon": expected a time such as "2025-05-17T08:00:00Z".
            """.ReplaceLineEndings("\n"),
            fault.Message);
    }

    [Theory]
    [InlineData("", "x.toml(1): found no schema, expected schema = \"trimfit-scenario/1\" at the top.")]
    [InlineData("schema = \"trimfit-rig/1\"\n", "x.toml(1): found schema \"trimfit-rig/1\", expected schema = \"trimfit-scenario/1\" at the top.")]
    [InlineData(Top + "[leg]\nduration_s = 3\n", "x.toml(2): unknown table [leg]. Write [[leg]], once for each leg.")]
    public void A_file_that_is_no_scenario_says_so(string text, string message) =>
        Assert.Equal(message, Assert.Throws<ScenarioFormatException>(() => Scenario.Read("x.toml", text)).Message);

    [Fact]
    public void A_file_that_is_no_TOML_says_so() =>
        Assert.StartsWith("x.toml(2): this is not TOML: ", Assert.Throws<ScenarioFormatException>(() => Scenario.Read("x.toml", Top + "[mass\n")).Message, StringComparison.Ordinal);

    [Fact]
    public void The_rig_file_is_what_the_pilot_knows()
    {
        Scenario s = new()
        {
            Name = "a \"machine\"",
            Propeller = new() { Rotation = -1, Clutch = true, FullRevPerSec = 40, FullTorqueNm = 50 / Math.Tau, ThrustLineM = 0.004 },
            Sensors = new() { RpmFactor = 2.5 },
        };
        Assert.Equal(
            """
            schema = "trimfit-rig/1"
            name = "a \"machine\""

            [machine]
            kind = "foot_launch"

            [mass]
            pilot_kg = 88
            power_unit_kg = 30
            power_unit_lateral_mm = 0
            cg_depth_mm = 400

            [propeller]
            rotation = "clockwise"
            diameter_m = 1.25
            shaft_power_kw = 2.2
            static_thrust_n = 570
            full_power_rpm = 6000
            rpm_is = "engine"
            reduction_ratio = 2.5
            drive = "clutch"
            clutch_engage_rpm = 2070
            hang_back_deg = 5.5
            thrust_line_mm = 1
            thrust_line_depth_mm = 360

            [carabiners]
            left_mm = -218
            right_mm = 222

            [hang_points]
            front_share = 0.8
            front_offset_mm = -1
            rear_offset_mm = -1

            [brakes]
            full_travel_mm = 600

            [wing]
            mass_kg = 6
            trim_speed_m_s = 11
            glide_sink_m_s = 2.2
            line_length_m = 7
            line_spread_m = 1.4
            sensitivity_deg_s_per_mm = 0.09

            """.ReplaceLineEndings("\n"),
            RigText.Write(s, new()
            {
                ThrustLine = true,
                Lines = true,
                PowerError = 0.1,
                ThrustError = -0.05,
                ThrustLineErrorM = -0.003,
                HangBackErrorRad = Math.PI / 180,
                CarabinerErrorM = 0.002,
                HangPointErrorM = -0.001,
                RotationWrong = true,
                SensitivityRadPerSecPerM = s.Wing.SensitivityRadPerSecPerM,
            }));
        string little = RigText.Write(s, new() { Power = false, WingSpeeds = false, Offsets = false });
        Assert.DoesNotContain("shaft_power_kw", little, StringComparison.Ordinal);
        Assert.DoesNotContain("hang_points", little, StringComparison.Ordinal);
        Assert.DoesNotContain("trim_speed_m_s", little, StringComparison.Ordinal);
        Assert.Contains("rotation = \"counter-clockwise\"", little, StringComparison.Ordinal);
    }

    [Fact]
    public void The_sheet_tells_the_legs()
    {
        Scenario s = new()
        {
            Legs =
            [
                new() { DurationSec = 10, Power = LegPower.Off },
                new() { DurationSec = 12, ThrottleFraction = 0.45, Control = LegControl.Brakes, BrakeRightM = 0.07 },
                new() { DurationSec = 8, Power = LegPower.Full, Control = LegControl.HoldHeading },
                new() { DurationSec = 9, Control = LegControl.Ballast, BallastKg = 2, BallastArmM = -0.4 },
            ],
        };
        Assert.Equal(
            """
            schema = "trimfit-flight/1"
            date = "2025-05-17"
            ground_altitude_m = 250

            [[leg]]
            start = 0.0
            end = 10.0
            kind = "hands_off"
            power = "off"

            [[leg]]
            start = 10.0
            end = 22.0
            kind = "brake_step"
            throttle_percent = 45
            brake_left = 0
            brake_right = 70

            [[leg]]
            start = 22.0
            end = 30.0
            kind = "held"
            power = "full"

            [[leg]]
            start = 30.0
            end = 39.0
            kind = "ballast"
            power = "level"
            ballast_kg = 2
            ballast_arm_mm = -400

            """.ReplaceLineEndings("\n"),
            SheetText.Write(FlightSimulator.Fly(s)));
    }

    [Fact]
    public void A_sloppy_sheet_is_off_by_less_than_twice_its_sloppiness()
    {
        Scenario s = new() { Legs = [.. Enumerable.Range(0, 12).Select(_ => new FlightLeg { DurationSec = 20 })] };
        string exact = SheetText.Write(FlightSimulator.Fly(s));
        string sloppy = SheetText.Write(FlightSimulator.Fly(s with { Output = new() { SheetSloppinessSec = 2 } }));
        double[] off = [.. Times(exact).Zip(Times(sloppy), (a, b) => Math.Abs(a - b))];
        Assert.Equal(24, off.Length);
        Assert.All(off, o => Assert.InRange(o, 0, 4.06));
        Assert.True(off.Average() > 0.5);

        static IEnumerable<double> Times(string text) => text.Split('\n').Where(l => l.StartsWith("start", StringComparison.Ordinal) || l.StartsWith("end", StringComparison.Ordinal))
            .Select(l => double.Parse(l.Split(" = ")[1], System.Globalization.CultureInfo.InvariantCulture));
    }

    [Fact]
    public void The_truth_is_valid_JSON_with_null_for_what_cannot_be()
    {
        Scenario s = new() { Legs = [new() { DurationSec = 2 }], Wing = new() { ConstantPullRadPerSec = 1 }, Sensors = new() { GyroHz = 0 } };
        using JsonDocument json = JsonDocument.Parse(TruthJson.Write(FlightSimulator.Fly(s)));
        JsonElement root = json.RootElement;
        Assert.Equal("trimfit-truth/1", root.GetProperty("schema").GetString());
        Assert.Equal(JsonValueKind.Null, root.GetProperty("null_shift_mm").ValueKind);
        Assert.Equal(JsonValueKind.Null, root.GetProperty("gyro_bias_deg_s").ValueKind);
        Accuracy.AgreesTo(8, 180 / Math.PI, root.GetProperty("constant_deg_s").GetDouble());
        Accuracy.AgreesTo(8, 0.09, root.GetProperty("sensitivity_deg_s_per_mm").GetDouble());
        Assert.Equal("hands_off", root.GetProperty("legs")[0].GetProperty("control").GetString());
    }
}
