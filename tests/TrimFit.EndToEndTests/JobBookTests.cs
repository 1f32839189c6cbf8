using System.Diagnostics;
using System.IO.Compression;
using System.Text;
using System.Text.Json;
using System.Text.RegularExpressions;

namespace TrimFit.EndToEndTests;

public partial class JobBookTests
{
    private const string Begin = "<!-- job book -->\n```\n", End = "\n```\n";

    [Fact]
    public void The_walk_through_of_the_README_runs_as_it_stands()
    {
        string readme = File.ReadAllText(Path.Combine(BuiltProgram.Root, "README.md"));
        int from = readme.IndexOf(Begin, StringComparison.Ordinal) + Begin.Length;
        string[] commands = readme[from..readme.IndexOf(End, from, StringComparison.Ordinal)].Split('\n');
        using var folder = new TemporaryFolder();
        Directory.CreateSymbolicLink(folder["sample-logs"], Path.Combine(BuiltProgram.Root, "sample-logs"));
        var said = new Dictionary<string, string>();
        foreach (string command in commands)
        {
            string[] words = [.. Word().Matches(command).Select(m => m.Value.Trim('"'))];
            Assert.Equal("trimfit", words[0]);
            BuiltProgram.Outcome run = RunIn(folder[""], words[1..]);
            Assert.True(run.ExitCode == 0 || (run.ExitCode == 4 && words[2] == "compare"), $"{command}\nexit {run.ExitCode}\n{run.Error}");
            said[string.Join(' ', words[1..3]) + (said.ContainsKey(string.Join(' ', words[1..3])) ? " again" : "")] = run.Output;
        }
        // Whether the chain holds together: what one step says is what the next one does.
        Assert.Contains("> First step: move both riser carabiners 7 mm to your left.", said["job add"], StringComparison.Ordinal);
        Assert.StartsWith("Job 1, setup 3: both riser carabiners 7 mm left by the readings, recommended 7 mm left.\nConfirmed: ", said["job adjust"], StringComparison.Ordinal);
        Assert.StartsWith("Job 1, flight 2 is kept with its result (setup 3).\nIn level flight it turns left", said["job add again"], StringComparison.Ordinal);
        Assert.Contains("signed by T. Echnician", said["job sign"], StringComparison.Ordinal);

        using JsonDocument job = JsonDocument.Parse(RunIn(folder[""], "job", "show", "1", "--json", "-", "--book", "demo.trimfit-book").Output);
        JsonElement root = job.RootElement;
        Assert.Equal("trimfit-job/1", root.GetProperty("schema").GetString());
        Assert.Equal(3, root.GetProperty("checks").GetArrayLength());
        Assert.Equal([2, 3], root.GetProperty("flights").EnumerateArray().Select(f => f.GetProperty("setup").GetInt32()));
        Assert.Equal(["fit", "fit", "compare"], root.GetProperty("results").EnumerateArray().Select(r => r.GetProperty("kind").GetString()));
        JsonElement compare = root.GetProperty("results")[2];
        Assert.Equal(["before_log", "before_sheet", "before_rig", "log", "sheet", "rig"], compare.GetProperty("inputs").EnumerateArray().Select(i => i.GetProperty("role").GetString()));
        Assert.Empty(compare.GetProperty("sensitivities").EnumerateArray()); // 7 mm against the usual scatter: not certain of its sign, so it tells the memory nothing
        Assert.Equal(-7, root.GetProperty("adjustments")[0].GetProperty("travel").GetDouble(), 1e-9);
        Assert.False(root.GetProperty("adjustments")[0].GetProperty("readings_confirmed").GetBoolean());
        JsonElement signature = root.GetProperty("signatures")[0];
        Assert.Equal(("T. Echnician", 3), (signature.GetProperty("name").GetString(), signature.GetProperty("setup").GetInt32()));
        Assert.Contains(signature.GetProperty("readings").EnumerateArray(), r => r.GetProperty("key").GetString() == "carabiners.left_mm" && r.GetProperty("value").GetDouble() == -227);

        string page = File.ReadAllText(folder["demo-job.html"]);
        foreach (string wanted in new[] { "T. Echnician", "A. Pilot", "pulls left at full power", "It approves nothing", "Before every flight after a change do the hang check", "A pull that grew suddenly is a fault" })
            Assert.Contains(wanted, page, StringComparison.Ordinal);
        string customer = System.Net.WebUtility.HtmlDecode(File.ReadAllText(folder["demo-customer.html"]));
        foreach (string wanted in new[] { "T. Echnician, 2", "A. Pilot", "pulls left at full power", "brake lines, left against right: in order, 3 mm", "it turned left at 1.4 deg/s", "it turned left at 0.9 deg/s",
            "both riser carabiners 7 mm left", "220 mm left", "227 mm left", "It approves nothing", "First flight after a change", "A pull that grew suddenly is a fault" })
            Assert.Contains(wanted, customer, StringComparison.Ordinal);
    }

    [Fact]
    public void What_the_book_keeps_makes_the_same_result_again_to_the_byte()
    {
        using var folder = new TemporaryFolder();
        string book = Opened(folder);
        BuiltProgram.Outcome added = BuiltProgram.Run(null, "job", "add", "1", BuiltProgram.Sample("ordinary.csv"), "--json", folder["added.json"], "--book", book);
        Assert.Equal((0, ""), (added.ExitCode, added.Error));
        Assert.Equal(0, BuiltProgram.Run(null, "job", "export", "1", "--out", folder["j.zip"], "--book", book).ExitCode);
        using ZipArchive zip = ZipFile.OpenRead(folder["j.zip"]);
        using var text = new StreamReader(zip.GetEntry("job.json")!.Open());
        using JsonDocument job = JsonDocument.Parse(text.ReadToEnd());
        JsonElement result = job.RootElement.GetProperty("results")[0];
        foreach (JsonElement input in result.GetProperty("inputs").EnumerateArray())
            zip.GetEntry("content/" + input.GetProperty("sha256").GetString())!.ExtractToFile(folder[input.GetProperty("name").GetString()!]);
        BuiltProgram.Outcome fit = BuiltProgram.Run(null, "fit", folder["ordinary.csv"], "--rig", folder["uncorrected-rig.toml"], "--json", folder["fit.json"]);
        Assert.Equal(0, fit.ExitCode);
        Assert.Equal(File.ReadAllBytes(folder["added.json"]), File.ReadAllBytes(folder["fit.json"]));
        Assert.Equal(result.GetProperty("sha256").GetString(), Sha256(folder["fit.json"]));
        Assert.Equal("0.1.0", result.GetProperty("program_version").GetString());
        Assert.Equal("--balance-thrust cruise\n--tolerance 1\n--seed 1", result.GetProperty("options").GetString());
    }

    [Fact]
    public void A_flight_whose_place_is_forgotten_turns_as_before_and_has_no_coordinates()
    {
        using var folder = new TemporaryFolder();
        string book = Opened(folder);
        Assert.Equal(0, BuiltProgram.Run(null, "job", "add", "1", BuiltProgram.Sample("uncorrected.csv"), "--sheet", BuiltProgram.Sample("uncorrected-sheet.toml"), "--json", folder["with.json"], "--book", book).ExitCode);
        Assert.Equal(0, BuiltProgram.Run(null, "job", "add", "1", BuiltProgram.Sample("uncorrected.csv"), "--sheet", BuiltProgram.Sample("uncorrected-sheet.toml"), "--forget-place", "--json", folder["without.json"], "--book", book).ExitCode);
        using JsonDocument with = JsonDocument.Parse(File.ReadAllText(folder["with.json"])), without = JsonDocument.Parse(File.ReadAllText(folder["without.json"]));
        double Rate(JsonDocument d) => d.RootElement.GetProperty("pull").GetProperty("at_balance").GetProperty("rate_deg_s").GetDouble();
        Assert.Equal(Rate(with), Rate(without), 1e-6);
        string[] roles = [.. without.RootElement.GetProperty("inputs").GetProperty("files")[0].GetProperty("columns").EnumerateArray().Select(c => c.GetProperty("role").GetString() ?? "")];
        Assert.DoesNotContain("latitude", roles);
        Assert.DoesNotContain("longitude", roles);
        Assert.Contains("ground_speed", roles);
        using JsonDocument job = JsonDocument.Parse(BuiltProgram.Run(null, "job", "show", "1", "--json", "-", "--book", book).Output);
        Assert.Equal("log_without_place", job.RootElement.GetProperty("flights")[1].GetProperty("inputs")[0].GetProperty("role").GetString());
    }

    [Theory]
    [InlineData(-213, 227, "went 7 mm right; recommended was 7 mm left")] // to the wrong side
    [InlineData(-235, 205, "went 15 mm left; recommended was 7 mm left")] // the whole way at once
    [InlineData(-227, 227, "do not fit one travel")]                      // a sign was lost
    public void Readings_that_are_not_what_was_recommended_are_asked_for_again(double left, double right, string why)
    {
        using var folder = new TemporaryFolder();
        string book = Opened(folder);
        BuiltProgram.Run(null, "job", "add", "1", BuiltProgram.Sample("uncorrected.csv"), "--quiet", "--book", book);
        string[] adjust = ["job", "adjust", "1", "--part", "carabiner_pair", "--reading", FormattableString.Invariant($"carabiners.left_mm={left}"), "--reading", FormattableString.Invariant($"carabiners.right_mm={right}"), "--book", book];
        BuiltProgram.Outcome asked = BuiltProgram.Run(null, adjust);
        Assert.Equal((2, ""), (asked.ExitCode, asked.Output));
        Assert.Contains(why, asked.Error, StringComparison.Ordinal);
        Assert.EndsWith("trimfit: nothing was written down. When the readings stand, say so with --confirm.\n", asked.Error, StringComparison.Ordinal);
        Assert.Contains("; 1 setup, 1 flight.", BuiltProgram.Run(null, "job", "show", "1", "--book", book).Output, StringComparison.Ordinal);
        BuiltProgram.Outcome stood = BuiltProgram.Run(null, [.. adjust, "--confirm"]);
        Assert.Equal(0, stood.ExitCode);
        Assert.StartsWith("Job 1, setup 2: ", stood.Output, StringComparison.Ordinal);
        Assert.Contains("do one before every flight after a change", stood.Output, StringComparison.Ordinal);
        using JsonDocument job = JsonDocument.Parse(BuiltProgram.Run(null, "job", "show", "1", "--json", "-", "--book", book).Output);
        Assert.True(job.RootElement.GetProperty("adjustments")[0].GetProperty("readings_confirmed").GetBoolean());
    }

    [Fact]
    public void The_hang_check_of_before_is_not_carried_into_the_setup_after()
    {
        using var folder = new TemporaryFolder();
        string book = Opened(folder);
        string[] readings = ["--reading", "hang_check.left_kg=58.4", "--reading", "hang_check.right_kg=59.6"];
        Assert.Equal(0, BuiltProgram.Run(null, ["job", "measure", "1", .. readings, "--book", book]).ExitCode);
        BuiltProgram.Run(null, "job", "adjust", "1", "--part", "carabiner_pair", "--reading", "carabiners.left_mm=-227", "--reading", "carabiners.right_mm=213", "--confirm", "--book", book);
        BuiltProgram.Run(null, "job", "export", "1", "--out", folder["j.zip"], "--book", book);
        using ZipArchive zip = ZipFile.OpenRead(folder["j.zip"]);
        using var text = new StreamReader(zip.GetEntry("job.json")!.Open());
        using JsonDocument job = JsonDocument.Parse(text.ReadToEnd());
        string[] rigs = [.. job.RootElement.GetProperty("setups").EnumerateArray().Select(s => Read(zip, s.GetProperty("rig_sha256").GetString()!))];
        Assert.Equal(3, rigs.Length);
        Assert.Contains("\nleft_kg = 58.4", rigs[1], StringComparison.Ordinal);
        Assert.DoesNotContain("\nleft_kg", rigs[2], StringComparison.Ordinal); // it stays as a comment: where the weight sat before
        Assert.Contains("\n# before: left_kg = 58.4", rigs[2], StringComparison.Ordinal);
        Assert.Contains("\nleft_mm = -227", rigs[2], StringComparison.Ordinal);

        static string Read(ZipArchive zip, string sha256)
        {
            using var reader = new StreamReader(zip.GetEntry("content/" + sha256)!.Open());
            return reader.ReadToEnd();
        }
    }

    [Fact]
    public void A_job_goes_to_another_book_and_out_of_this_one()
    {
        using var folder = new TemporaryFolder();
        string book = Opened(folder), other = folder["other.trimfit-book"];
        BuiltProgram.Run(null, "job", "add", "1", BuiltProgram.Sample("uncorrected.csv"), "--quiet", "--book", book);
        string before = BuiltProgram.Run(null, "job", "show", "1", "--json", "-", "--book", book).Output;
        Assert.Equal(0, BuiltProgram.Run(null, "job", "export", "1", "--out", folder["j.zip"], "--book", book).ExitCode);
        BuiltProgram.Outcome import = BuiltProgram.Run(null, "job", "import", folder["j.zip"], "--book", other);
        Assert.Equal((0, "Imported as job 1 (it was job 1 where it came from).\n"), (import.ExitCode, import.Output));
        Assert.Equal(before, BuiltProgram.Run(null, "job", "show", "1", "--json", "-", "--book", other).Output);
        BuiltProgram.Outcome asked = BuiltProgram.Run(null, "job", "delete", "1", "--book", book);
        Assert.Equal(2, asked.ExitCode);
        Assert.Contains("Say so with --yes", asked.Error, StringComparison.Ordinal);
        Assert.StartsWith("Job 1 is deleted with 1 flight", BuiltProgram.Run(null, "job", "delete", "1", "--yes", "--book", book).Output, StringComparison.Ordinal);
        BuiltProgram.Outcome gone = BuiltProgram.Run(null, "job", "show", "1", "--book", book);
        Assert.Equal((3, "jobs.trimfit-book: there is no job 1. \"trimfit job list\" shows those there are.\n"), (gone.ExitCode, gone.Error));
        Assert.StartsWith("No job here.", BuiltProgram.Run(null, "job", "list", "--book", book).Output, StringComparison.Ordinal);
    }

    [Fact]
    public void Nobody_told_it_where_so_it_says_where_the_book_is()
    {
        Assert.SkipWhen(OperatingSystem.IsWindows() || OperatingSystem.IsMacOS(), "XDG_DATA_HOME is not looked at there");
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = RunIn(folder[""], ["job", "open", "--complaint", "x", "--machine", "y"], ("XDG_DATA_HOME", folder["data"]));
        Assert.Equal((0, $"trimfit: job book {folder["data"]}/trimfit/jobs.trimfit-book\n"), (run.ExitCode, run.Error));
        Assert.True(File.Exists(folder["data/trimfit/jobs.trimfit-book"]));
    }

    [Fact]
    public void Three_measured_wings_are_a_memory_for_the_next_customer()
    {
        using var folder = new TemporaryFolder();
        string book = Opened(folder);
        // The same made-up job, measured with three wings: enough to see that the memory arrives and is kept with the result.
        foreach (int job in new[] { 1, 2, 3, 4 })
        {
            string n = job.ToString(System.Globalization.CultureInfo.InvariantCulture);
            if (job > 1)
                Open(book, "W" + n);
            if (job == 4)
                break;
            BuiltProgram.Run(null, "job", "add", n, BuiltProgram.Sample("uncorrected.csv"), "--without-memory", "--quiet", "--book", book);
            BuiltProgram.Run(null, "job", "adjust", n, "--part", "carabiner_pair", "--rig", BuiltProgram.Sample("balanced-rig.toml"), "--confirm", "--book", book);
            BuiltProgram.Run(null, "job", "add", n, BuiltProgram.Sample("balanced.csv"), "--without-memory", "--quiet", "--book", book);
            Assert.NotEqual(3, BuiltProgram.Run(null, "job", "compare", n, "--flight-scatter", "0.1", "--quiet", "--book", book).ExitCode);
        }
        Assert.StartsWith("3 wings of this workshop say", BuiltProgram.Run(null, "job", "history", "--memory", "--book", book).Output, StringComparison.Ordinal);
        BuiltProgram.Run(null, "job", "add", "4", BuiltProgram.Sample("uncorrected.csv"), "--quiet", "--json", folder["with.json"], "--book", book);
        BuiltProgram.Run(null, "job", "add", "4", BuiltProgram.Sample("uncorrected.csv"), "--quiet", "--without-memory", "--json", folder["alone.json"], "--book", book);
        using JsonDocument with = JsonDocument.Parse(File.ReadAllText(folder["with.json"])), alone = JsonDocument.Parse(File.ReadAllText(folder["alone.json"]));
        JsonElement memory = with.RootElement.GetProperty("sensitivity").GetProperty("sources").EnumerateArray().Single(s => s.GetProperty("kind").GetString() == "shop_memory");
        Assert.True(memory.GetProperty("used").GetBoolean());
        Assert.InRange(0.09, memory.GetProperty("low95").GetDouble(), memory.GetProperty("high95").GetDouble()); // the made-up wing's own
        Assert.True(Width(with) < Width(alone));
        using JsonDocument job4 = JsonDocument.Parse(BuiltProgram.Run(null, "job", "show", "4", "--json", "-", "--book", book).Output);
        Assert.Contains("shop_memory: 3 wings", job4.RootElement.GetProperty("results")[0].GetProperty("options").GetString(), StringComparison.Ordinal);
        Assert.DoesNotContain("shop_memory", job4.RootElement.GetProperty("results")[1].GetProperty("options").GetString(), StringComparison.Ordinal);

        static double Width(JsonDocument d) => d.RootElement.GetProperty("shift").GetProperty("cg_mm") is JsonElement s ? s.GetProperty("high95").GetDouble() - s.GetProperty("low95").GetDouble() : 0;
    }

    [Theory]
    [InlineData("job add 1 nothing.csv", "nothing.csv")]
    [InlineData("job adjust 1 --part wheel --reading travel=1", "--part: found \"wheel\"")]
    [InlineData("job adjust 1 --part carabiner_pair --reading travel=1", "its travel follows from the readings")]
    [InlineData("job adjust 1 --part brake_line --reading carabiners.left_mm=-220", "Say how far it went: --reading travel=7")]
    [InlineData("job measure 1", "nothing was measured")]
    [InlineData("job measure 1 --reading left=3", "is no reading; those are")]
    [InlineData("job checks 1 --done brakes=pass", "expected brake_lines or")]
    [InlineData("job checks --done brake_lines=pass", "name the job")]
    [InlineData("job sign 1 --name T --date 17.5.2026", "expected a date such as 2026-05-17")]
    [InlineData("job compare 1", "have one setup")]
    [InlineData("job show x", "JOB: found \"x\", expected a whole number above 0")]
    [InlineData("job history", "give one of")]
    public void A_wrong_command_says_what_was_found_and_what_to_do(string command, string expected)
    {
        using var folder = new TemporaryFolder();
        string book = Opened(folder);
        BuiltProgram.Outcome run = BuiltProgram.Run(null, [.. command.Split(' '), "--book", book]);
        Assert.InRange(run.ExitCode, 2, 3);
        Assert.Equal("", run.Output);
        Assert.Contains(expected, run.Error, StringComparison.Ordinal);
        Assert.DoesNotContain("   at ", run.Error, StringComparison.Ordinal);
    }

    [GeneratedRegex("\"[^\"]*\"|\\S+")]
    private static partial Regex Word();

    private static string Opened(TemporaryFolder folder)
    {
        string book = folder["jobs.trimfit-book"];
        Open(book, "W1");
        return book;
    }

    private static void Open(string book, string wingId)
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "job", "open", "--complaint", "pulls left", "--machine", "Demo machine", "--wing-id", wingId, "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--book", book);
        Assert.Equal((0, ""), (run.ExitCode, run.Error));
    }

    private static string Sha256(string path) => Convert.ToHexStringLower(System.Security.Cryptography.SHA256.HashData(File.ReadAllBytes(path)));

    private static BuiltProgram.Outcome RunIn(string folder, params string[] args) => RunIn(folder, args, ("TRIMFIT_NONE", ""));

    private static BuiltProgram.Outcome RunIn(string folder, string[] args, (string Name, string Value) variable)
    {
        var start = new ProcessStartInfo(BuiltProgram.Executable, args) { RedirectStandardOutput = true, RedirectStandardError = true, StandardOutputEncoding = Encoding.UTF8, WorkingDirectory = folder };
        start.Environment[variable.Name] = variable.Value;
        using Process process = Process.Start(start)!;
        Task<string> output = process.StandardOutput.ReadToEndAsync(), error = process.StandardError.ReadToEndAsync();
        process.WaitForExit();
        return new(process.ExitCode, output.GetAwaiter().GetResult(), error.GetAwaiter().GetResult());
    }
}
