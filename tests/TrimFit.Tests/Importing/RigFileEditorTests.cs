using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Import.Rigs;

namespace TrimFit.Tests.Importing;

public class RigFileEditorTests
{
    private const string Before = """
        # my machine
        name = "Demo"   # the old one
        [mass]
        pilot_kg = 90
        power_unit_kg = 28
        power_unit_lateral_mm = 3
        [propeller]
        rotation = "clockwise"

        [carabiners]
          left_mm = -210      # from the centre line
          right_mm = [
            211, # first
            212,
          ]
        # end
        """;

    private static GroundReadings Given(params (string Name, string Value)[] readings)
    {
        var given = new GroundReadings();
        foreach ((string name, string value) in readings)
            Assert.Null(given.TrySet(MeasuredKey.Find(name)!, value));
        return given;
    }

    [Fact]
    public void A_reading_takes_the_place_of_the_earlier_one_which_stays_as_a_comment()
    {
        string after = RigFileEditor.Write("r.toml", Before, Given(("carabiners.left_mm", "-215,-214,-216"), ("carabiners.right_mm", "205")));
        Assert.Equal("""
            # my machine
            name = "Demo"   # the old one
            [mass]
            pilot_kg = 90
            power_unit_kg = 28
            power_unit_lateral_mm = 3
            [propeller]
            rotation = "clockwise"

            [carabiners]
              # before: left_mm = -210      # from the centre line
              left_mm = [-215, -214, -216]      # from the centre line
              # before: right_mm = [
              #   211, # first
              #   212,
              #   ]
              right_mm = 205
            # end
            """, after);
        Rig rig = RigFileReader.Read("r.toml", after);
        Accuracy.AgreesTo(12, -0.215, rig.Carabiners.LeftM.Value);
        Accuracy.AgreesTo(12, 0.205, rig.Carabiners.RightM.Value);
    }

    [Fact]
    public void Writing_the_same_twice_changes_nothing_more()
    {
        GroundReadings readings = Given(("carabiners.left_mm", "-215,-214,-216"), ("hang_check.left_kg", "56,56.2,56.1"), ("hang_check.right_kg", "61,61,61.2"));
        string once = RigFileEditor.Write("r.toml", Before, readings);
        Assert.Equal(once, RigFileEditor.Write("r.toml", once, readings));
    }

    [Fact]
    public void A_missing_key_goes_under_its_table_and_a_missing_table_to_the_end()
    {
        string after = RigFileEditor.Write("r.toml", Before, Given(("propeller.hang_back_deg", "4,5,6"), ("hang_check.left_kg", "56,56.2,56.1"), ("hang_check.right_kg", "61,61,61.2")));
        Assert.Contains("rotation = \"clockwise\"\nhang_back_deg = [4, 5, 6]\n", after, StringComparison.Ordinal);
        Assert.EndsWith("# end\n\n[hang_check]\nleft_kg = [56, 56.2, 56.1]\nright_kg = [61, 61, 61.2]\n", after, StringComparison.Ordinal);
        Assert.Equal(3, RigFileReader.Read("r.toml", after).HangCheck!.Hangs.Length);
    }

    [Fact]
    public void A_better_measurement_retires_the_value_it_replaces()
    {
        string after = RigFileEditor.Write("r.toml", Before, Given(("weighing.power_unit_left_kg", "14.2"), ("weighing.power_unit_right_kg", "13.8"), ("weighing.scale_spacing_mm", "500")));
        Assert.Contains("# before: power_unit_lateral_mm = 3\n", after, StringComparison.Ordinal);
        // By hand: 500 × (13.8 − 14.2)/(2 × 28) = −3.571 mm.
        Accuracy.AgreesTo(4, -0.0035714, RigFileReader.Read("r.toml", after).Mass.PowerUnitLateralM.Value);
    }

    [Fact]
    public void A_new_hang_check_is_one_session_and_retires_the_rest_of_the_old_one()
    {
        string first = RigFileEditor.Write("r.toml", Before, Given(("hang_check.left_kg", "56,57,58"), ("hang_check.right_kg", "61,61,61"), ("hang_check.exchanged_left_kg", "56"),
            ("hang_check.exchanged_right_kg", "61"), ("hang_check.carabiner_spacing_mm", "421")));
        Assert.Equal(4, RigFileReader.Read("r.toml", first).HangCheck!.Hangs.Length);
        string second = RigFileEditor.Write("r.toml", first, Given(("hang_check.left_kg", "58,59,60"), ("hang_check.right_kg", "59,59,59")));
        RigHangCheck check = RigFileReader.Read("r.toml", second).HangCheck!;
        Assert.Equal(3, check.Hangs.Length);
        Assert.Null(check.CarabinerSpacingM);
        Assert.Contains("# before: exchanged_left_kg = 56", second, StringComparison.Ordinal);
    }

    [Fact]
    public void Line_ends_of_the_file_stay()
    {
        string windows = Before.ReplaceLineEndings("\r\n");
        string after = RigFileEditor.Write("r.toml", windows, Given(("carabiners.left_mm", "-215")));
        Assert.Equal(after.Count(c => c == '\n'), after.Count(c => c == '\r'));
        Assert.Equal(-0.215, RigFileReader.Read("r.toml", after).Carabiners.LeftM.Value, 12);
    }

    [Fact]
    public void A_table_in_one_line_is_refused_by_name()
    {
        string inline = Before[..Before.IndexOf("[carabiners]", StringComparison.Ordinal)];
        inline = "carabiners = { left_mm = -210, right_mm = 211 }\n" + inline;
        LogFormatException refused = Assert.Throws<LogFormatException>(() => RigFileEditor.Write("r.toml", inline, Given(("carabiners.left_mm", "-215"))));
        Assert.Equal("r.toml(1): found carabiners written in one line, expected a line [carabiners] with its keys below it. Write it so, then measure again.", refused.Message);
    }

    [Fact]
    public void A_readings_file_names_what_it_cannot_use()
    {
        LogFormatException refused = Assert.Throws<LogFormatException>(() => new GroundReadings().AddFile("day.toml", "[hang_check]\nleft_kgs = 5\nright_kg = \"x\"\n[propeller]\nrotation = \"left\"\n"));
        Assert.Equal("""
            day.toml(2): hang_check.left_kgs is not a reading that is taken on the ground. Did you mean hang_check.left_kg?
            day.toml(3): found "x" for hang_check.right_kg, expected a number or a list of repeats. Write right_kg = [1.0, 1.1, 1.0].
            day.toml(5): found "left" for propeller.rotation, expected clockwise or counter-clockwise or contra-rotating. Write rotation = "clockwise" if that is what it is.
            """, refused.Message);
    }

    [Fact]
    public void Thrust_test_hang_points_and_counted_turns_arrive()
    {
        Rig rig = RigFileReader.Read("r.toml", Before + "\n[thrust_test]\npull_kg = [59, 60, 61]\ntemperature_c = 30\nheight_m = 1000\n[hang_points]\nfront_left_mm = -180\nfront_right_mm = 190\nrear_left_mm = [-150, -152, -151]\nrear_right_mm = 149\n"
            .Replace("[propeller]", "", StringComparison.Ordinal));
        Accuracy.AgreesTo(6, 588.399, rig.Propeller.StaticThrustN!.Value.Value); // by hand: 60 × 9.80665
        Accuracy.AgreesTo(5, 1.032831, rig.Propeller.StaticThrustAirDensity!.Value); // StaticThrustTests
        Accuracy.AgreesTo(9, 0.005, rig.HangPoints.FrontOffsetM.Value);
        Accuracy.AgreesTo(9, -0.001, rig.HangPoints.RearOffsetM.Value);
        Rig counted = RigFileReader.Read("r.toml", Before.Replace("rotation = \"clockwise\"", "rotation = \"clockwise\"\ncrank_turns = 16\npropeller_turns = 6\ncrank_rotation = \"clockwise\"\ngear_reverses = false", StringComparison.Ordinal));
        Accuracy.AgreesTo(9, 16.0 / 6, counted.Propeller.ReductionRatio);
        Assert.False(counted.Propeller.GearReverses);
    }

    [Theory]
    [InlineData("[thrust_test]\npull_kg = 60\n", "r.toml(17): found [thrust_test] without temperature_c and height_m, expected pull, air temperature and height above the sea. Add the missing reading or leave the table out.")]
    [InlineData("[hang_points]\nfront_left_mm = 180\nfront_right_mm = -190\n", "r.toml(18): found 180 for front_left_mm and -190 for front_right_mm, expected the left one left of the right one. Positive is to the seated pilot's right, so the left one is usually negative; swap the two or the sign.")]
    [InlineData("[hang_points]\nrear_left_mm = -180\n", "r.toml(17): found [hang_points] with only one of rear_left_mm and rear_right_mm, expected both harness hang points of the pair. Add the missing reading.")]
    [InlineData("[hang_check]\nleft_kg = 60\nright_kg = 58\nexchanged_left_kg = [60, 61]\nexchanged_right_kg = 58\n", "r.toml(20): found 2 readings for exchanged_left_kg and 1 for exchanged_right_kg, expected one of each for every hang. Add the missing reading.")]
    public void Incomplete_ground_readings_are_named(string table, string message) =>
        Assert.Equal(message, Assert.Throws<LogFormatException>(() => RigFileReader.Read("r.toml", Before + "\n" + table)).Message);
}
