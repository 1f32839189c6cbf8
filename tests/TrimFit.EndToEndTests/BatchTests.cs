using System.Diagnostics;

namespace TrimFit.EndToEndTests;

public class BatchTests
{
    private static readonly string[] _flights = ["uncorrected", "ordinary", "balanced", "flat-throttle"];

    [Fact]
    public void Any_order_any_number_of_threads_and_a_second_run_give_the_same_files_and_a_bad_file_has_its_row()
    {
        using var folder = new TemporaryFolder();
        string bad = folder.Write("bad.csv", "time,rpm\n1,x\n");
        string[] logs = [.. _flights.Select(f => BuiltProgram.Sample(f + ".csv")), bad, folder["missing.csv"]];
        BuiltProgram.Outcome run = Batch(folder["a"], "2", logs);
        Assert.Equal((0, ""), (run.ExitCode, run.Error));
        Assert.StartsWith("All 6 flights have their row in flights.csv and flights.parquet; 2 could not be read, their rows say why. ", run.Output.Replace('\n', ' '), StringComparison.Ordinal);
        Batch(folder["b"], "1", [.. logs.Reverse()]);
        string list = folder.Write("list.txt", "# flights\n\n" + string.Join("\r\n", logs));
        BuiltProgram.Run(null, "batch", "--list", list, "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--out", folder["c"], "--quiet");
        Batch(folder["a"], "2", logs); // nothing left to do
        foreach (string name in new[] { "flights.csv", "flights.parquet" })
        {
            byte[] first = File.ReadAllBytes(Path.Join(folder["a"], name));
            Assert.Equal(first, File.ReadAllBytes(Path.Join(folder["b"], name)));
            Assert.Equal(first, File.ReadAllBytes(Path.Join(folder["c"], name)));
        }
        string[] rows = File.ReadAllLines(Path.Join(folder["a"], "flights.csv"));
        Assert.Equal(7, rows.Length);
        string unreadable = rows.Single(r => r.StartsWith(bad, StringComparison.Ordinal));
        Assert.Contains(",3,", unreadable, StringComparison.Ordinal);
        Assert.Contains("bad.csv", unreadable[bad.Length..], StringComparison.Ordinal);
        Assert.Contains("no such file", rows.Single(r => r.StartsWith(folder["missing.csv"], StringComparison.Ordinal)), StringComparison.Ordinal);
    }

    [Fact]
    public void A_row_holds_what_fit_says_of_the_flight()
    {
        using var folder = new TemporaryFolder();
        Batch(folder["a"], "1", [BuiltProgram.Sample("uncorrected.csv")]);
        BuiltProgram.Run(null, "fit", BuiltProgram.Sample("uncorrected.csv"), "--rig", BuiltProgram.Sample("uncorrected-rig.toml"),
            "--sheet", BuiltProgram.Sample("uncorrected-sheet.toml"), "--json", folder["r.json"]);
        string[] lines = File.ReadAllLines(Path.Join(folder["a"], "flights.csv"));
        string[] names = lines[0].Split(',');
        // The cells this test looks at come before any quoted one or are counted from the end of the names.
        using var json = System.Text.Json.JsonDocument.Parse(File.ReadAllText(folder["r.json"]));
        string rate = json.RootElement.GetProperty("pull").GetProperty("at")[2].GetProperty("rate_deg_s").GetRawText();
        string travel = json.RootElement.GetProperty("adjustments")[0].GetProperty("travel").GetRawText();
        string kind = json.RootElement.GetProperty("adjustments")[0].GetProperty("kind").GetString()!;
        Assert.Equal(rate, Cell(lines[1], Array.IndexOf(names, "pull_at_cruise_rate_deg_s")));
        Assert.Equal(travel, Cell(lines[1], Array.IndexOf(names, $"adjustments_{kind}_travel")));
    }

    [Fact]
    public void A_killed_run_goes_on_and_ends_with_the_same_files()
    {
        using var folder = new TemporaryFolder();
        Directory.CreateDirectory(folder["logs"]);
        string text = File.ReadAllText(BuiltProgram.Sample("balanced.csv"));
        for (int i = 0; i < 12; i++) // the same flight, a little shorter each time
            File.WriteAllText(Path.Join(folder["logs"], $"f{i:D2}.csv"), text[..text.LastIndexOf('\n', text.Length - 2 - (i * 3000))] + "\n");
        string pattern = Path.Join(folder["logs"], "f*.csv");
        Batch(folder["whole"], "2", [pattern]);
        string journal = Path.Join(folder["killed"], "flights.jsonl");
        using (Process process = BuiltProgram.Start("batch", pattern, "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--out", folder["killed"], "--threads", "1", "--quiet"))
        {
            var wait = Stopwatch.StartNew();
            while (!(File.Exists(journal) && new FileInfo(journal).Length > 0) && wait.Elapsed < TimeSpan.FromMinutes(2))
                Thread.Sleep(5);
            process.Kill();
            process.WaitForExit();
        }
        long kept = new FileInfo(journal).Length;
        Assert.True(kept > 0);
        File.AppendAllText(journal, "{\"key\":\"cut sho"); // what a kill in the middle of a write leaves
        Assert.False(File.Exists(Path.Join(folder["killed"], "flights.csv")));
        BuiltProgram.Outcome run = Batch(folder["killed"], "2", [pattern]);
        Assert.Equal(0, run.ExitCode);
        foreach (string name in new[] { "flights.csv", "flights.parquet" })
            Assert.Equal(File.ReadAllBytes(Path.Join(folder["whole"], name)), File.ReadAllBytes(Path.Join(folder["killed"], name)));
    }

    [Theory]
    [InlineData(new[] { "batch", "--rig", "RIG", "--out", "OUT" }, "trimfit: batch: no log is named. Name logs, patterns such as \"logs/*.csv\", or a list with --list.\n")]
    [InlineData(new[] { "batch", "nowhere*.csv", "--rig", "RIG", "--out", "OUT" }, "trimfit: \"nowhere*.csv\" matches no file. Check the folder and the pattern.\n")]
    [InlineData(new[] { "batch", "a.csv", "--rig", "RIG", "--out", "OUT", "--threads", "0" }, "trimfit: --threads: found \"0\", expected a whole number above 0.\n")]
    public void A_wrong_command_line_says_what_to_do(string[] args, string message)
    {
        using var folder = new TemporaryFolder();
        string[] given = [.. args.Select(a => a switch { "RIG" => BuiltProgram.Sample("uncorrected-rig.toml"), "OUT" => folder["out"], _ => a })];
        BuiltProgram.Outcome run = BuiltProgram.Run(null, given);
        Assert.Equal((2, message), (run.ExitCode, run.Error));
    }

    private static BuiltProgram.Outcome Batch(string folder, string threads, string[] logs) =>
        BuiltProgram.Run(null, ["batch", .. logs, "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--out", folder, "--threads", threads, "--quiet"]);

    /// <summary>The n-th cell of a CSV line; quoted cells may hold commas.</summary>
    private static string Cell(string line, int n)
    {
        bool quoted = false;
        int cell = 0, start = 0;
        for (int i = 0; i <= line.Length; i++)
        {
            if (i < line.Length && line[i] == '"')
                quoted = !quoted;
            if (i == line.Length || (line[i] == ',' && !quoted))
            {
                if (cell == n)
                    return line[start..i];
                cell++;
                start = i + 1;
            }
        }
        throw new ArgumentOutOfRangeException(nameof(n), n, "no such cell");
    }
}
