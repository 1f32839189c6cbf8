using System.Text.Json;

namespace TrimFit.EndToEndTests;

public class ReportFileTests
{
    [Fact]
    public void A_report_runs_again_from_itself_and_agrees_to_the_byte()
    {
        using var folder = new TemporaryFolder();
        Assert.Equal(0, Fit(folder, "first", "--balance-thrust", "300", "--tolerance", "0.8", "--seed", "5").ExitCode);
        BuiltProgram.Outcome again = BuiltProgram.Run(null, "fit", folder["first.html"], "--report", folder["again.html"], "--json", folder["again.json"]);
        Assert.Equal(0, again.ExitCode);
        Assert.Equal("trimfit: run again from the report; this version agrees with it (every number within 0.01 %).\n", again.Error);
        Assert.Equal(File.ReadAllText(folder["first.json"]), File.ReadAllText(folder["again.json"]));
        Assert.Equal(File.ReadAllBytes(folder["first.html"]), File.ReadAllBytes(folder["again.html"])); // and the same input gives the same bytes
    }

    [Fact]
    public void A_choice_beside_a_report_overrules_it_and_nothing_is_compared()
    {
        using var folder = new TemporaryFolder();
        Fit(folder, "first");
        BuiltProgram.Outcome again = BuiltProgram.Run(null, "fit", folder["first.html"], "--tolerance", "2");
        Assert.Contains("is balanced within 2.0", again.Output.Replace('\n', ' '), StringComparison.Ordinal);
        Assert.Equal("trimfit: run again from the report with something overruled, so its result is not compared.\n", again.Error);
    }

    [Fact]
    public void With_the_place_forgotten_no_position_is_left_and_it_still_runs_again()
    {
        using var folder = new TemporaryFolder();
        Fit(folder, "whole");
        Assert.Equal(0, Fit(folder, "first", "--forget-place").ExitCode);
        using JsonDocument whole = JsonDocument.Parse(File.ReadAllText(folder["whole.json"])), first = JsonDocument.Parse(File.ReadAllText(folder["first.json"]));
        string[] roles = [.. first.RootElement.GetProperty("inputs").GetProperty("files")[0].GetProperty("columns").EnumerateArray().Select(c => c.GetProperty("role").GetString()!)];
        Assert.Contains("gyro_z", roles);
        Assert.Contains("ground_speed", roles);
        Assert.DoesNotContain("latitude", roles);
        Assert.DoesNotContain("longitude", roles);
        // Positions are not what the turn is measured from, so the answer stays.
        Assert.Equal(Rate(whole), Rate(first), 3);
        Assert.Contains("Ground track", File.ReadAllText(folder["whole.html"]), StringComparison.Ordinal);
        Assert.DoesNotContain("Ground track", File.ReadAllText(folder["first.html"]), StringComparison.Ordinal);
        BuiltProgram.Outcome again = BuiltProgram.Run(null, "fit", folder["first.html"], "--json", folder["again.json"]);
        Assert.StartsWith("trimfit: run again from the report; this version agrees with it", again.Error, StringComparison.Ordinal);
        Assert.Equal(File.ReadAllText(folder["first.json"]), File.ReadAllText(folder["again.json"]));
    }

    [Fact]
    public void A_page_that_carries_no_flight_or_a_damaged_one_ends_with_3_and_says_so()
    {
        using var folder = new TemporaryFolder();
        string page = folder.Write("page.html", "<!DOCTYPE html><title>x</title>");
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", page);
        Assert.Equal(3, run.ExitCode);
        Assert.Equal("page.html: found a page that carries no flight, expected a report written by trimfit fit --report. Give the log itself.\n", run.Error);
        page = folder.Write("page.html", "<template id=\"trimfit-input\" data-schema=\"trimfit-input/1\">AAAA</template>");
        run = BuiltProgram.Run(null, "fit", page);
        Assert.Equal(3, run.ExitCode);
        Assert.StartsWith("page.html: found a report whose carried flight cannot be unpacked", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void A_log_without_a_rig_file_ends_with_2()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", BuiltProgram.Sample("uncorrected.csv"));
        Assert.Equal(2, run.ExitCode);
        Assert.Equal("trimfit: Option '--rig' is required, unless the log is a report page that carries its rig file.\n", run.Error);
    }

    [Fact]
    public void A_flight_of_a_hundred_thousand_samples_makes_a_page_below_three_megabytes()
    {
        // The uncorrected flight four times over at 50 Hz.
        string scenario = File.ReadAllText(BuiltProgram.Sample(Path.Combine("scenarios", "uncorrected.toml")));
        int legs = scenario.IndexOf("[[leg]]", StringComparison.Ordinal);
        string head = scenario[..legs];
        foreach (string sensor in new[] { "gyro", "rpm", "brakes", "throttle" })
            head = head.Replace(sensor + "_hz = 10", sensor + "_hz = 50", StringComparison.Ordinal);
        using var folder = new TemporaryFolder();
        string path = folder.Write("long.toml", head + string.Concat(Enumerable.Repeat(scenario[legs..].TrimEnd() + "\n\n", 4)));
        Assert.Equal(0, BuiltProgram.Run(null, "synth", path, "--out", folder["."]).ExitCode);
        int rows = File.ReadLines(folder["long.csv"]).Count() - 1;
        Assert.True(rows >= 100_000, rows.ToString(System.Globalization.CultureInfo.InvariantCulture));
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", folder["long.csv"], "--rig", folder["long-rig.toml"], "--sheet", folder["long-sheet.toml"], "--quiet", "--report", folder["long.html"]);
        Assert.Equal(0, run.ExitCode);
        Assert.InRange(new FileInfo(folder["long.html"]).Length, 500_000, 3_000_000); // with its log: 1.8 MB when this was written
    }

    private static BuiltProgram.Outcome Fit(TemporaryFolder folder, string name, params string[] options) => BuiltProgram.Run(null,
        ["fit", BuiltProgram.Sample("uncorrected.csv"), "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--sheet", BuiltProgram.Sample("uncorrected-sheet.toml"),
            "--quiet", "--report", folder[name + ".html"], "--json", folder[name + ".json"], .. options]);

    private static double Rate(JsonDocument result) => result.RootElement.GetProperty("pull").GetProperty("at").EnumerateArray().Single(p => p.GetProperty("setting").GetString() == "cruise").GetProperty("rate_deg_s").GetDouble();
}
