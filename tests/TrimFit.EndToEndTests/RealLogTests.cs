using System.Text.Json;

namespace TrimFit.EndToEndTests;

/// <summary>Logs that other people recorded with ordinary loggers, read where they lie beside the repository; their README says what they hold.</summary>
public class RealLogTests
{
    private static string Log(string name)
    {
        string path = Path.GetFullPath(Path.Combine(BuiltProgram.Root, "..", "shared", "real-logs", name));
        if (!File.Exists(path))
            Assert.Skip("The folder of real logs is not beside the repository.");
        return path;
    }

    [Theory]
    // Facts of the logs' README, counted apart from this program: rows, seconds, and the pauses.
    [InlineData("CRSF-2021-08-29.csv", 3686, 2123, 4)]
    [InlineData("kite-v3-20191008_0019.csv", 1308, 130.7, 0)]
    [InlineData("napret.igc", 5380, 5379, 0)]
    public void Inspect_reads_every_row_of_a_real_log(string name, int rows, double seconds, int gaps)
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "inspect", Log(name), "--json", "-");
        Assert.Equal(0, run.ExitCode);
        using JsonDocument result = JsonDocument.Parse(run.Output);
        JsonElement file = result.RootElement.GetProperty("inputs").GetProperty("files")[0], sampling = result.RootElement.GetProperty("sampling");
        Assert.Equal(rows, file.GetProperty("rows_read").GetInt32());
        Assert.InRange(sampling.GetProperty("duration_s").GetDouble(), seconds - 0.5, seconds + 0.5);
        Assert.Equal(gaps, sampling.GetProperty("gaps").GetArrayLength());
    }

    [Theory]
    // No one logged what the propeller did or how the pilot steered: each ends without a travel, saying what is missing.
    [InlineData("CRSF-2021-08-29.csv", "thrust_range_too_small")]
    [InlineData("kite-v3-20191008_0019.csv", "no_thrust", "--column", "brake_difference=kite_actual_steering:%", "--column", "yaw_rate=kite_1_yaw_rate:rad/s")]
    [InlineData("napret.igc", "no_steering_no_hands_off")]
    public void Fit_runs_through_on_a_real_log_and_says_what_is_missing(string name, string missing, params string[] options)
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, ["fit", Log(name), "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--json", "-", .. options]);
        Assert.Equal(4, run.ExitCode);
        using JsonDocument result = JsonDocument.Parse(run.Output);
        JsonElement verdict = result.RootElement.GetProperty("verdict");
        Assert.Equal("insufficient", verdict.GetProperty("code").GetString());
        Assert.Equal("none", verdict.GetProperty("strength").GetString());
        Assert.Contains(missing, verdict.GetProperty("reasons").EnumerateArray().Select(r => r.GetProperty("code").GetString()));
        Assert.Empty(result.RootElement.GetProperty("adjustments").EnumerateArray());
    }

    [Fact]
    public void A_real_soft_wing_turns_by_its_steering_as_least_squares_says_and_is_asked_about_its_sign()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", Log("kite-v3-20191008_0019.csv"), "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--json", "-",
            "--column", "brake_difference=kite_actual_steering:%", "--column", "yaw_rate=kite_1_yaw_rate:rad/s");
        using JsonDocument result = JsonDocument.Parse(run.Output);
        JsonElement steering = result.RootElement.GetProperty("turn_model").GetProperty("coefficients").EnumerateArray().Single(c => c.GetProperty("name").GetString() == "brake_difference");
        Assert.Equal("deg/s per %", steering.GetProperty("unit").GetString());
        Assert.InRange(steering.GetProperty("value").GetDouble(), -2.2 * 1.1, -2.2 * 0.9); // README of the log; Scripts/kite_least_squares.py: -2.174
        Assert.Equal(4, run.ExitCode);
        string?[] reasons = [.. result.RootElement.GetProperty("verdict").GetProperty("reasons").EnumerateArray().Select(r => r.GetProperty("code").GetString())];
        Assert.Contains("brake_sign_reversed", reasons);
        Assert.Contains("no_thrust", reasons);
    }
}
