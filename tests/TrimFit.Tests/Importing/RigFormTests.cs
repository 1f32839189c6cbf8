using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Import.Rigs;

namespace TrimFit.Tests.Importing;

public class RigFormTests
{
    private const string File = "rig.toml";

    private static readonly Dictionary<string, string> _least = new()
    {
        ["mass.pilot_kg"] = "88",
        ["mass.power_unit_kg"] = "30",
        ["propeller.rotation"] = "clockwise",
        ["carabiners.left_mm"] = "-220",
        ["carabiners.right_mm"] = "220",
    };

    [Fact]
    public void An_empty_form_names_every_field_that_is_needed()
    {
        ImmutableArray<RigFault> faults = RigForm.Check(File, RigForm.Empty, out Rig? rig);
        Assert.Null(rig);
        Assert.Equal(RigField.All.Where(f => f.Needed).Select(f => f.Name).Order(), faults.Select(f => f.Field!).Order());
    }

    [Fact]
    public void The_needed_fields_make_a_rig()
    {
        string text = RigForm.Write(File, RigForm.Empty, _least, out ImmutableArray<RigFault> typed);
        Assert.Empty(typed);
        Assert.Empty(RigForm.Check(File, text, out Rig? rig));
        Assert.Equal(88, rig!.Mass.PilotKg.Value);
        Assert.Equal(-0.220, rig.Carabiners.LeftM.Value, 12);
        Assert.Equal(PropellerRotation.Clockwise, rig.Propeller.Rotation);
    }

    [Fact]
    public void What_is_written_is_read_back_and_writing_it_again_changes_nothing()
    {
        var values = new Dictionary<string, string>(_least) { ["name"] = "He said \"left\" \\ right", ["hang_check.left_kg"] = "59 59.2; 58.9", ["propeller.thrust_line_mm"] = "2 ± 1.5" };
        string text = RigForm.Write(File, RigForm.Empty, values, out _);
        IReadOnlyDictionary<string, string> read = RigForm.Values(File, text);
        Assert.Equal("He said \"left\" \\ right", read["name"]);
        Assert.Equal("59; 59.2; 58.9", read["hang_check.left_kg"]);
        Assert.Equal("2 ± 1.5", read["propeller.thrust_line_mm"]);
        Assert.Equal(text, RigForm.Write(File, text, read, out _));
    }

    [Fact]
    public void What_the_form_does_not_know_stays_in_the_file()
    {
        string text = RigForm.Write(File, RigForm.Empty, _least, out _) + "\n[limits] # from the maker\ncarabiner_pair = { min = -20, max = 20, step = 5 }\n\n[log]\nyaw_rate = \"gz:deg/s\"\n";
        string changed = RigForm.Write(File, text, new Dictionary<string, string> { ["mass.pilot_kg"] = "90", ["wing.name"] = "A wing" }, out _);
        Assert.Contains("[limits] # from the maker\ncarabiner_pair = { min = -20, max = 20, step = 5 }", changed, StringComparison.Ordinal);
        Assert.Contains("yaw_rate = \"gz:deg/s\"", changed, StringComparison.Ordinal);
        Assert.DoesNotContain("88", changed, StringComparison.Ordinal);
        Assert.Empty(RigForm.Check(File, changed, out Rig? rig));
        Assert.Equal(90, rig!.Mass.PilotKg.Value);
        Assert.Equal("A wing", rig.Wing.Name);
    }

    [Fact]
    public void A_field_that_is_emptied_is_taken_out()
    {
        string text = RigForm.Write(File, RigForm.Empty, new Dictionary<string, string>(_least) { ["mass.fuel_kg"] = "4" }, out _);
        string without = RigForm.Write(File, text, new Dictionary<string, string> { ["mass.fuel_kg"] = "" }, out _);
        Assert.DoesNotContain("fuel_kg", without, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("12,5", "Write 12.5")] // as a list it would be 12 and 5
    [InlineData("twelve", "found \"twelve\", expected a number such as 12.5.")]
    [InlineData("1e400", "expected a number")]
    [InlineData("NaN", "expected a number")]
    [InlineData("10 ± 2 ± 1", "expected a number")]
    [InlineData("10 11 ± 2", "10 ± 2")]
    public void A_text_that_is_no_number_is_refused_and_the_field_stays(string typed, string expected)
    {
        string text = RigForm.Write(File, RigForm.Empty, _least, out _);
        string same = RigForm.Write(File, text, new Dictionary<string, string> { ["mass.pilot_kg"] = typed }, out ImmutableArray<RigFault> faults);
        Assert.Equal(text, same);
        RigFault fault = Assert.Single(faults);
        Assert.Equal("mass.pilot_kg", fault.Field);
        Assert.Contains(expected, fault.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("carabiners.left_mm", "220")]
    [InlineData("mass.pilot_kg", "900")]
    [InlineData("propeller.hang_back_deg", "80")]
    public void A_number_outside_its_range_is_a_fault_of_its_field(string field, string typed)
    {
        string text = RigForm.Write(File, RigForm.Empty, new Dictionary<string, string>(_least) { [field] = typed }, out _);
        RigFault fault = Assert.Single(RigForm.Check(File, text, out Rig? rig));
        Assert.Null(rig);
        Assert.Equal(field, fault.Field);
    }

    [Fact]
    public void A_name_cannot_break_out_of_its_line()
    {
        string text = RigForm.Write(File, RigForm.Empty, new Dictionary<string, string>(_least) { ["name"] = "x\"\n[mass]\npilot_kg = 1 #" }, out _);
        Assert.Empty(RigForm.Check(File, text, out Rig? rig));
        Assert.Equal(88, rig!.Mass.PilotKg.Value);
    }

    [Fact]
    public void Ranges_of_the_form_are_those_of_the_reader()
    {
        foreach (RigField field in RigField.All.Where(f => f.IsNumber && f.Name is not ("machine.seats" or "mass.passenger_kg" or "mass.wheels_kg")))
        {
            foreach ((double number, bool fits) in new[] { (field.Min!.Value, true), (field.Max!.Value, true), (field.Max!.Value + 1 + Math.Abs(field.Max.Value), false) })
            {
                string text = RigForm.Write(File, RigForm.Empty, new Dictionary<string, string>(_least) { [field.Name] = number.ToString("R", System.Globalization.CultureInfo.InvariantCulture) }, out _);
                // Beyond the range a field may have a fault of its own, such as a left carabiner on the right; at its ends it has none for the range.
                bool own = RigForm.Check(File, text, out _).Any(f => f.Field == field.Name && (!fits || f.Message.Contains("expected a number from", StringComparison.Ordinal)));
                Assert.True(own != fits, $"{field.Name} = {number}");
            }
        }
    }
}
