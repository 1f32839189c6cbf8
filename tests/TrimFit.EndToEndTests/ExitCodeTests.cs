namespace TrimFit.EndToEndTests;

public class ExitCodeTests
{
    [Theory]
    [InlineData("trimfit: --units: found \"furlongs\", expected metric or imperial.\n", "--units", "furlongs")]
    [InlineData("trimfit: --tolerance: found \"-1\", expected a turn rate above 0 in deg/s, such as 1.5.\n", "--tolerance=-1")]
    [InlineData("trimfit: --tolerance: found \"1,5\", expected a turn rate above 0 in deg/s, such as 1.5.\n", "--tolerance", "1,5")]
    [InlineData("trimfit: --balance-thrust: found \"NaN\", expected a thrust in newtons, cruise, full or even.\n", "--balance-thrust", "NaN")]
    [InlineData("trimfit: --seed: found \"1.5\", expected a whole number of 0 or more.\n", "--seed", "1.5")]
    [InlineData("trimfit: --culture: found \"nowhere\", expected a culture this machine knows, such as de-DE.\n", "--culture", "nowhere")]
    [InlineData("trimfit: --column: found \"gyro_z\", expected ROLE=NAME or ROLE=NAME:UNIT.\n", "--column", "gyro_z")]
    [InlineData("trimfit: --report: found \"r.docx\", expected a name that ends in .html or .md.\n", "--report", "r.docx")]
    public void A_wrong_value_ends_with_2_and_one_line(string message, params string[] options)
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, ["fit", BuiltProgram.Sample("uncorrected.csv"), "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), .. options]);
        Assert.Equal(2, run.ExitCode);
        Assert.Equal(message, run.Error);
        Assert.Equal("", run.Output);
    }

    [Fact]
    public void An_unknown_role_is_answered_with_all_roles()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "inspect", BuiltProgram.Sample("uncorrected.csv"), "--column", "yaw=gz");
        Assert.Equal(2, run.ExitCode);
        Assert.StartsWith("trimfit: --column: \"yaw\" is no role; the roles are time, date, throttle, rpm, power, voltage, current, engine_noise, yaw_rate, ", run.Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("fit")]
    [InlineData("inspect")]
    [InlineData("rig")]
    [InlineData("synth")]
    [InlineData("no-such-command")]
    [InlineData("rig", "a.toml", "--no-such-option")]
    public void A_wrong_command_line_ends_with_2_and_says_where_help_is(params string[] args)
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, args);
        Assert.Equal(2, run.ExitCode);
        Assert.Equal("", run.Output);
        Assert.Matches(@"^(trimfit: .*\n)+trimfit: try: trimfit( [a-z]+)? --help\n$", run.Error);
    }

    [Fact]
    public void Help_ends_with_0_and_lists_the_commands()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "--help");
        Assert.Equal(0, run.ExitCode);
        foreach (string command in new[] { "inspect", "fit", "rig", "synth" })
            Assert.Contains($"  {command} ", run.Output, StringComparison.Ordinal);
    }

    [Fact]
    public void A_missing_log_ends_with_3_and_names_it()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "inspect", "no-such.csv");
        Assert.Equal(3, run.ExitCode);
        Assert.Equal("no-such.csv: found no such file, expected a file. Check the name and the folder.\n", run.Error);
        Assert.Equal("", run.Output);
    }

    [Fact]
    public void A_missing_rig_file_ends_with_3_and_names_it()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", BuiltProgram.Sample("uncorrected.csv"), "--rig", "no-such.toml");
        Assert.Equal(3, run.ExitCode);
        Assert.Equal("no-such.toml: found no such file, expected a file. Check the name and the folder.\n", run.Error);
    }

    [Fact]
    public void A_folder_without_a_log_ends_with_3()
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "inspect", folder["."]);
        Assert.Equal(3, run.ExitCode);
        Assert.Equal($"{Path.GetFileName(Path.TrimEndingDirectorySeparator(Path.GetFullPath(folder["."])))}: found a folder without a log, expected the files of a recording (CSV, IGC, GPX, NMEA). Check the folder.\n", run.Error);
    }

    [Fact]
    public void A_file_that_is_no_log_ends_with_3_naming_file_and_line_without_a_stack_trace()
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "inspect", folder.Write("letter.csv", "Dear club,\nthe meadow is wet.\n"));
        Assert.Equal(3, run.ExitCode);
        Assert.Matches(@"^letter\.csv\(\d+", run.Error);
        Assert.DoesNotContain("   at ", run.Error, StringComparison.Ordinal);
        Assert.Equal("", run.Output);
    }

    [Fact]
    public void An_unknown_key_of_a_rig_file_ends_with_3_and_the_nearest_key()
    {
        using var folder = new TemporaryFolder();
        string rig = folder.Write("rig.toml", File.ReadAllText(BuiltProgram.Sample("uncorrected-rig.toml")).Replace("left_mm", "left_m", StringComparison.Ordinal));
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "rig", rig);
        Assert.Equal(3, run.ExitCode);
        Assert.Contains("did you mean \"left_mm\"?", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Under_strict_a_row_left_out_ends_with_3()
    {
        using var folder = new TemporaryFolder();
        string log = folder.Write("torn.csv", "time_s,gyro_z_dps\n0,0.1\n1,0.2\n2,0,3\n3,0.4\n4,0.5\n");
        Assert.Equal(0, BuiltProgram.Run(null, "inspect", log).ExitCode);
        BuiltProgram.Outcome strict = BuiltProgram.Run(null, "inspect", log, "--strict");
        Assert.Equal(3, strict.ExitCode);
        Assert.StartsWith("torn.csv(4", strict.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void A_result_that_cannot_be_written_ends_with_2_and_names_the_file()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--json", Path.Combine("no-such-folder", "r.json"));
        Assert.Equal(2, run.ExitCode);
        Assert.Equal($"trimfit: --json: \"{Path.Combine("no-such-folder", "r.json")}\" cannot be written. Check the folder and its rights.\n", run.Error);
        Assert.Equal("", run.Output);
    }
}
