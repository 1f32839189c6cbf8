using System.Text.Json;

namespace TrimFit.EndToEndTests;

public class CommandTests
{
    [Theory]
    [InlineData("uncorrected")]
    [InlineData("ordinary")]
    public void The_main_job_answers_on_the_bundled_flights_with_the_truth_inside_its_intervals(string flight)
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = Fit(flight, "--json", folder["r.json"]);
        Assert.Equal(0, run.ExitCode);
        Assert.Equal("", run.Error);
        Assert.Matches(@"^In level flight it turns left at \d+\.\d deg/s; moving .* to\s+your (left|right) \(\d+ to \d+\) would null it\.", run.Output.Replace('\n', ' '));
        using JsonDocument result = Json(folder["r.json"]), truth = Json(BuiltProgram.Sample(flight + "-truth.json"));
        JsonElement cruise = At(result.RootElement.GetProperty("pull").GetProperty("at"), "cruise");
        double trueRate = At(truth.RootElement.GetProperty("pull"), "cruise").GetProperty("rate_deg_s").GetDouble();
        Inside(trueRate, cruise);
        Inside(truth.RootElement.GetProperty("equivalent_shift_mm").GetDouble(), result.RootElement.GetProperty("shift").GetProperty("cg_mm"));
        foreach (JsonElement way in result.RootElement.GetProperty("adjustments").EnumerateArray())
        {
            if (truth.RootElement.GetProperty("travel_mm").TryGetProperty(way.GetProperty("kind").GetString()!, out JsonElement travel))
                Assert.Equal(Math.Sign(travel.GetDouble()), Math.Sign(way.GetProperty("travel").GetDouble()));
        }
    }

    [Fact]
    public void A_balanced_machine_is_called_balanced()
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = Fit("balanced", "--json", folder["r.json"]);
        Assert.Equal(0, run.ExitCode);
        using JsonDocument result = Json(folder["r.json"]);
        Assert.Equal("balanced", result.RootElement.GetProperty("verdict").GetProperty("code").GetString());
    }

    [Fact]
    public void A_flat_throttle_cannot_answer_and_still_writes_everything()
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = Fit("flat-throttle", "--json", folder["r.json"], "--report", folder["r.html"], "--report", folder["r.md"]);
        Assert.Equal(4, run.ExitCode);
        Assert.Equal("trimfit: the data cannot answer the whole question (exit 4); what could be found is in the result.\n", run.Error);
        Assert.Equal(["r.html", "r.json", "r.md"], folder.Names);
        using JsonDocument result = Json(folder["r.json"]);
        Assert.Equal("insufficient", result.RootElement.GetProperty("verdict").GetProperty("code").GetString());
        Assert.Equal("none", result.RootElement.GetProperty("verdict").GetProperty("strength").GetString());
        Assert.Empty(result.RootElement.GetProperty("adjustments").EnumerateArray());
        Assert.NotEmpty(result.RootElement.GetProperty("verdict").GetProperty("reasons").EnumerateArray());
        // It asks for legs to be flown again, so the cautions of a card apply.
        string[] cautions = [.. result.RootElement.GetProperty("cautions").EnumerateArray().Select(c => c.GetProperty("code").GetString()!)];
        Assert.Subset(cautions.ToHashSet(), new HashSet<string> { "hands-off", "engine-off", "eyes-out", "calm-air", "strong-pull", "twist", "estimate", "limits", "causes-first" });
    }

    [Fact]
    public void A_rotation_entered_the_wrong_way_round_is_asked_for()
    {
        using var folder = new TemporaryFolder();
        string rig = folder.Write("rig.toml", File.ReadAllText(BuiltProgram.Sample("uncorrected-rig.toml")).Replace("rotation = \"clockwise\"", "rotation = \"counter-clockwise\"", StringComparison.Ordinal));
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", BuiltProgram.Sample("uncorrected.csv"), "--rig", rig, "--json", "-");
        Assert.Equal(4, run.ExitCode);
        using JsonDocument result = JsonDocument.Parse(run.Output);
        Assert.Equal("rotation_conflict", result.RootElement.GetProperty("verdict").GetProperty("reasons")[0].GetProperty("code").GetString());
        Assert.Contains("Check first the propeller's rotation (stand behind, look the way it flies)", result.RootElement.GetProperty("verdict").GetProperty("sentence").GetString(), StringComparison.Ordinal);
        Assert.Empty(result.RootElement.GetProperty("adjustments").EnumerateArray());
    }

    [Fact]
    public void JSON_on_standard_output_is_alone_there()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--json", "-");
        Assert.Equal(0, run.ExitCode);
        using JsonDocument result = JsonDocument.Parse(run.Output);
        Assert.Equal("trimfit-rig-result/1", result.RootElement.GetProperty("schema").GetString());
        Assert.StartsWith("{\n  \"schema\"", run.Output, StringComparison.Ordinal);
    }

    [Fact]
    public void Inspect_names_roles_and_units()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "inspect", BuiltProgram.Sample("uncorrected.csv"), "--json", "-");
        Assert.Equal(0, run.ExitCode);
        using JsonDocument result = JsonDocument.Parse(run.Output);
        string[] columns = [.. result.RootElement.GetProperty("inputs").GetProperty("files")[0].GetProperty("columns").EnumerateArray()
            .Select(c => $"{c.GetProperty("name").GetString()} {c.GetProperty("role").GetString()} {c.GetProperty("unit").GetString()}")];
        Assert.Contains("gyro_z_dps gyro_z deg/s", columns);
        Assert.Contains("brake_left_mm brake_left mm", columns);
        Assert.Contains("speed_kmh ground_speed km/h", columns);
    }

    [Fact]
    public void A_locale_with_decimal_commas_changes_no_byte()
    {
        string[] args = ["fit", BuiltProgram.Sample("uncorrected.csv"), "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--json", "-"];
        Assert.Equal(BuiltProgram.Run("C.UTF-8", args).Output, BuiltProgram.Run("de_DE.UTF-8", args).Output);
    }

    [Fact]
    public void The_same_flight_gives_the_same_report_bytes()
    {
        using var folder = new TemporaryFolder();
        Assert.Equal("", Fit("uncorrected", "--report", folder["a.html"], "--quiet").Error); // nor does a library speak up
        Fit("uncorrected", "--report", folder["b.html"], "--quiet");
        Assert.Equal(File.ReadAllBytes(folder["a.html"]), File.ReadAllBytes(folder["b.html"]));
        Assert.Contains("<svg", File.ReadAllText(folder["a.html"]), StringComparison.Ordinal);
    }

    [Fact]
    public void Quiet_prints_the_answer_and_the_caution_only()
    {
        BuiltProgram.Outcome run = Fit("uncorrected", "--quiet");
        Assert.Equal(2, run.Output.TrimEnd('\n').Split('\n').Length);
        Assert.Equal("", run.Error);
    }

    [Fact]
    public void A_bundled_flight_is_made_again_byte_for_byte_by_its_command()
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "synth", BuiltProgram.Sample(Path.Combine("scenarios", "flat-throttle.toml")), "--out", folder["."]);
        Assert.Equal(0, run.ExitCode);
        Assert.Equal("", run.Output);
        Assert.Equal(["flat-throttle-rig.toml", "flat-throttle-sheet.toml", "flat-throttle-truth.json", "flat-throttle.csv"], folder.Names);
        foreach (string name in folder.Names)
            Assert.Equal(File.ReadAllBytes(BuiltProgram.Sample(name)), File.ReadAllBytes(folder[name]));
    }

    private static BuiltProgram.Outcome Fit(string flight, params string[] more) =>
        BuiltProgram.Run(null, ["fit", BuiltProgram.Sample(flight + ".csv"), "--rig", BuiltProgram.Sample(flight + "-rig.toml"), .. more]);

    private static JsonDocument Json(string path) => JsonDocument.Parse(File.ReadAllText(path));

    private static JsonElement At(JsonElement settings, string name) => settings.EnumerateArray().Single(s => s.GetProperty("setting").GetString() == name);

    private static void Inside(double truth, JsonElement interval) => Assert.InRange(truth, interval.GetProperty("low95").GetDouble(), interval.GetProperty("high95").GetDouble());
}
