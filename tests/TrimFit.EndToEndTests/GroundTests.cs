using System.Diagnostics;
using System.Text.Json;

namespace TrimFit.EndToEndTests;

public class GroundTests
{
    private const string Left = "hang_check.left_kg=56.3,57.4,55.6", Right = "hang_check.right_kg=61.8,60.7,62.4";

    [Fact]
    public void Every_command_of_the_READMEs_section_on_the_ground_runs_as_it_stands()
    {
        string readme = File.ReadAllText(Path.Combine(BuiltProgram.Root, "README.md"));
        string section = readme[readme.IndexOf("## Before the flight", StringComparison.Ordinal)..];
        section = section[..section.IndexOf("\n## ", StringComparison.Ordinal)];
        using var folder = new TemporaryFolder();
        File.Copy(BuiltProgram.Sample("uncorrected-rig.toml"), folder["rig.toml"]); // the section's first line
        string[] commands = [.. section.Split('\n').Where(l => l.StartsWith("    trimfit ", StringComparison.Ordinal))];
        Assert.True(commands.Length >= 4);
        foreach (string command in commands)
        {
            string[] args = [.. command.Trim().Split(' ')[1..].Select(arg => InFolder(arg, folder))];
            BuiltProgram.Outcome run = BuiltProgram.Run(null, args);
            Assert.True(run.ExitCode == 0, command + "\n" + run.Error);
        }
        Assert.Contains("checks.html", folder.Names);
        Assert.Contains("hang-check.html", folder.Names);
        Assert.Contains("left_kg = [56.3, 57.4, 55.6]", File.ReadAllText(folder["rig.toml"]), StringComparison.Ordinal);
    }

    [Fact]
    public void Readings_go_into_the_rig_file_once_and_the_hang_check_shows_in_the_result()
    {
        using var folder = Machine();
        BuiltProgram.Outcome run = Rig(folder, "--measure", "--reading", Left, "--reading", Right, "--reading", "carabiners.left_mm=-218,-220,-219");
        Assert.Equal((0, "3 readings written into rig.toml; earlier values stay there as comments.\n", ""), (run.ExitCode, run.Output, run.Error));
        string written = File.ReadAllText(folder["rig.toml"]);
        Assert.Contains("# before: left_mm = -220\nleft_mm = [-218, -220, -219]\n", written, StringComparison.Ordinal);
        using JsonDocument result = JsonDocument.Parse(Rig(folder, "--json", "-").Output);
        JsonElement measured = result.RootElement.GetProperty("hang_check_measured");
        // By hand: spacing 220 + 219 mm; 439 × mean of (5.5/118.1, 3.3/118.1, 6.8/118.0)/2 = 9.66 mm.
        Assert.InRange(measured.GetProperty("e_mm").GetDouble(), 9.6, 9.75);
        Assert.Equal(measured.GetProperty("e_mm").GetDouble(), result.RootElement.GetProperty("e_mm").GetDouble(), 6);
        Assert.Equal(3, measured.GetProperty("hangs").GetInt32());
    }

    [Theory]
    [InlineData("hang_check.left_kg=56.3,5.74,55.6", Right, "rig.toml: Reading 2 of hang_check.left_kg is 5.740, about ten times or a tenth of the others: a digit or the decimal point is wrong. Was it 57.40?")]
    [InlineData("carabiners.left_mm=-2180,-220,-219", "carabiners.right_mm=220", "rig.toml: Reading 1 of carabiners.left_mm is -2180, about ten times or a tenth of the others: a digit or the decimal point is wrong. Was it -218.0?")]
    [InlineData("carabiners.left_mm=240", "carabiners.right_mm=-200", "rig.toml(25): found 240 for left_mm, expected a negative number. Positive is to the seated pilot's right; swap the two carabiners or the sign.")]
    public void A_wrong_entry_is_named_and_nothing_is_written(string first, string second, string message)
    {
        using var folder = Machine();
        string before = File.ReadAllText(folder["rig.toml"]);
        BuiltProgram.Outcome run = Rig(folder, "--measure", "--reading", first, "--reading", second);
        Assert.Equal(3, run.ExitCode);
        Assert.Equal(message, run.Error.Split('\n')[0]);
        Assert.Equal(before, File.ReadAllText(folder["rig.toml"]));
        Assert.Equal(["rig.toml"], folder.Names);
    }

    [Fact]
    public void Swapped_scales_are_named_by_the_lean()
    {
        using var folder = Machine();
        BuiltProgram.Outcome run = Rig(folder, "--measure", "--reading", Left, "--reading", Right, "--reading", "hang_check.lean_right_left_kg=66", "--reading", "hang_check.lean_right_right_kg=52");
        Assert.Equal(3, run.ExitCode);
        Assert.StartsWith("rig.toml: When the pilot leaned to the right, the right scale became lighter: the two scales, or their entries, are exchanged.", run.Error, StringComparison.Ordinal);
        Assert.Equal(0, Rig(folder, "--measure", "--even-so", "--reading", Left, "--reading", Right, "--reading", "hang_check.lean_right_left_kg=66", "--reading", "hang_check.lean_right_right_kg=52").ExitCode);
    }

    [Fact]
    public void A_rotation_against_the_belt_is_named()
    {
        using var folder = Machine();
        BuiltProgram.Outcome run = Rig(folder, "--measure", "--reading", "drive=belt", "--reading", "crank_rotation=counter-clockwise");
        Assert.Equal(3, run.ExitCode);
        Assert.StartsWith("rig.toml: The crank turns counter-clockwise seen from behind and the drive (belt) keeps it, so the propeller cannot turn as propeller.rotation says.", run.Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("52.1,53.0,51.4", "66,65.1,66.7", "confirmed", 0)]
    [InlineData("60.1,60.0,59.4", "58,58.1,58.7", "wrong_way", 4)]
    public void A_change_is_proved_or_named_the_wrong_way(string left, string right, string verdict, int exitCode)
    {
        using var folder = Machine();
        Assert.Equal(0, Rig(folder, "--measure", "--reading", Left, "--reading", Right).ExitCode);
        string before = File.ReadAllText(folder["rig.toml"]);
        BuiltProgram.Outcome run = Rig(folder, "--moved", "harness_front_rear=20", "--reading", "left_kg=" + left, "--reading", "right_kg=" + right, "--json", "-");
        Assert.Equal(exitCode, run.ExitCode);
        using JsonDocument result = JsonDocument.Parse(run.Output);
        Assert.Equal(verdict, result.RootElement.GetProperty("verdict").GetString());
        Assert.Equal(20 * 88.0 / 118, result.RootElement.GetProperty("expected_mm").GetDouble(), 6); // by hand: travel × m_p/m
        Assert.Equal(before, File.ReadAllText(folder["rig.toml"]));
    }

    [Theory]
    [InlineData(new[] { "--moved", "carabiner_pair=-7", "--reading", "left_kg=60", "--reading", "right_kg=58" }, 3, "rig.toml: found no [hang_check], expected the hang check before the change. Hang before anything is moved and write it with trimfit rig rig.toml --measure.")]
    [InlineData(new[] { "--moved", "carabiner=-7" }, 2, "trimfit: --moved: found \"carabiner=-7\", expected KIND=TRAVEL such as carabiner_pair=-7;")]
    [InlineData(new[] { "--measure", "--reading", "hang_check.left=5" }, 2, "trimfit: --reading: \"hang_check.left\" is no reading;")]
    [InlineData(new[] { "--measure", "--reading", "left_kg=5,x" }, 2, "trimfit: --reading: found \"x\" for hang_check.left_kg, expected numbers with a decimal point and a comma between repeats")]
    [InlineData(new[] { "--reading", "left_kg=5" }, 2, "trimfit: readings without --measure (to write them) or --moved (to compare them).")]
    [InlineData(new[] { "--sheet", "paper=x.html" }, 2, "trimfit: --sheet: found \"paper=x.html\", expected KIND=FILE.html; the kinds are measuring, hang-check, weighing, rotation, thrust, templates.")]
    [InlineData(new[] { "--measure", "--readings", "none.toml" }, 3, "none.toml: found no such file")]
    public void A_wrong_command_line_says_what_was_expected(string[] args, int exitCode, string message)
    {
        using var folder = Machine();
        BuiltProgram.Outcome run = Rig(folder, args);
        Assert.Equal(exitCode, run.ExitCode);
        Assert.StartsWith(message, run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void The_printed_templates_ruler_is_150_millimetres()
    {
        string? browser = Tool("chromium"), raster = Tool("pdftoppm");
        Assert.SkipWhen(browser is null || raster is null, "skipped: the tool chromium or pdftoppm is missing");
        using var folder = Machine();
        Assert.Equal(0, Rig(folder, "--sheet", "templates=" + folder["t.html"]).ExitCode);
        Start(browser!, "--headless", "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync",
            "--user-data-dir=" + folder["profile"], "--no-pdf-header-footer", "--print-to-pdf=" + folder["t.pdf"], folder["t.html"]);
        const int Dpi = 400;
        Start(raster!, "-r", Dpi.ToString(System.Globalization.CultureInfo.InvariantCulture), "-gray", "-f", "1", "-l", "1", folder["t.pdf"], folder["page"]);
        string picture = Directory.GetFiles(Path.GetDirectoryName(folder["t.pdf"])!, "page*.pgm").Single();
        double[] runs = [.. DarkRuns(File.ReadAllBytes(picture)).Select(pixels => pixels * 25.4 / Dpi).Where(mm => mm is > 140 and < 160)];
        Assert.NotEmpty(runs); // the only line of that length on the page
        Assert.All(runs, mm => Assert.InRange(mm, 150 * 0.995, 150 * 1.005));
    }

    /// <summary>Longest dark run of each row of a binary PGM, pixels.</summary>
    private static IEnumerable<int> DarkRuns(byte[] pgm)
    {
        int at = 0;
        int[] head = new int[3];
        for (int i = -1; i < 3; i++) // "P5", width, height, largest grey
        {
            int start = at;
            while (!char.IsWhiteSpace((char)pgm[at]))
                at++;
            if (i >= 0)
                head[i] = int.Parse(System.Text.Encoding.ASCII.GetString(pgm, start, at - start), System.Globalization.CultureInfo.InvariantCulture);
            at++;
        }
        for (int row = 0; row < head[1]; row++)
        {
            int longest = 0, run = 0;
            for (int x = 0; x < head[0]; x++)
            {
                run = pgm[at + (row * head[0]) + x] < 128 ? run + 1 : 0;
                longest = Math.Max(longest, run);
            }
            yield return longest;
        }
    }

    private static string? Tool(string name) =>
        (Environment.GetEnvironmentVariable("PATH") ?? "").Split(Path.PathSeparator).Select(folder => Path.Combine(folder, name)).FirstOrDefault(File.Exists);

    private static void Start(string program, params string[] args)
    {
        using Process process = Process.Start(new ProcessStartInfo(program, args) { RedirectStandardError = true, RedirectStandardOutput = true })!;
        Task<string> output = process.StandardOutput.ReadToEndAsync(), error = process.StandardError.ReadToEndAsync();
        if (!process.WaitForExit(TimeSpan.FromMinutes(2)))
        {
            process.Kill(entireProcessTree: true);
            throw new TimeoutException(program);
        }
        _ = output.GetAwaiter().GetResult() + error.GetAwaiter().GetResult();
        Assert.Equal(0, process.ExitCode);
    }

    private static TemporaryFolder Machine()
    {
        var folder = new TemporaryFolder();
        File.Copy(BuiltProgram.Sample("uncorrected-rig.toml"), folder["rig.toml"]);
        return folder;
    }

    private static BuiltProgram.Outcome Rig(TemporaryFolder folder, params string[] args) => BuiltProgram.Run(null, ["rig", folder["rig.toml"], .. args]);

    /// <summary>A file name of the README's command in the test's own folder.</summary>
    private static string InFolder(string arg, TemporaryFolder folder)
    {
        int equals = arg.IndexOf('=', StringComparison.Ordinal);
        string name = arg[(equals + 1)..];
        return Path.GetExtension(name) is ".toml" or ".html" ? arg[..(equals + 1)] + folder[name] : arg;
    }
}
