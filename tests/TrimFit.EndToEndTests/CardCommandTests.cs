using System.Text.Json;

namespace TrimFit.EndToEndTests;

public class CardCommandTests
{
    [Fact]
    public void A_card_is_written_in_every_form_flown_by_synth_and_judged_by_fit()
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome card = BuiltProgram.Run(null, "card", "--rig", BuiltProgram.Sample("ordinary-rig.toml"), "--minutes", "6", "--logger", "gps",
            "--json", folder["card.json"], "--report", folder["card.html"], "--sheet", folder["empty.toml"], "--speaking", folder["speaks.html"]);
        Assert.Equal((0, ""), (card.ExitCode, card.Error));
        Assert.StartsWith("Start ", card.Output);
        File.WriteAllText(folder["scenario.toml"], """
            schema = "trimfit-scenario/1"
            seed = 4
            [sensors]
            gyro_hz = 0
            gps_hz = 1
            barometer_hz = 1
            rpm_hz = 0
            throttle_hz = 0
            brakes_hz = 0
            [output]
            logs = "igc"
            [flight]
            card = "card.json"
            """);
        BuiltProgram.Outcome flown = BuiltProgram.Run(null, "synth", folder["scenario.toml"], "--out", folder["out"], "--quiet");
        Assert.Equal((0, ""), (flown.ExitCode, flown.Error));
        string Out(string ending) => Directory.GetFiles(folder["out"], "*" + ending).Single();
        BuiltProgram.Outcome fit = BuiltProgram.Run(null, "fit", Out(".igc"), "--rig", Out("-rig.toml"), "--sheet", Out("-sheet.toml"), "--card", folder["card.json"], "--json", folder["fit.json"]);
        Assert.Contains("The card expected the pull to ", fit.Output);
        using JsonDocument result = JsonDocument.Parse(File.ReadAllText(folder["fit.json"]));
        Assert.Equal(JsonValueKind.True, result.RootElement.GetProperty("card").GetProperty("reached").ValueKind);
        Assert.NotEmpty(result.RootElement.GetProperty("card").GetProperty("next_legs").EnumerateArray());
        JsonElement cruise = result.RootElement.GetProperty("pull").GetProperty("at_balance");
        using JsonDocument truth = JsonDocument.Parse(File.ReadAllText(Out("-truth.json")));
        double pull = truth.RootElement.GetProperty("pull").EnumerateArray().Single(p => p.GetProperty("setting").GetString() == "cruise").GetProperty("rate_deg_s").GetDouble();
        Assert.InRange(pull, cruise.GetProperty("low95").GetDouble(), cruise.GetProperty("high95").GetDouble());
    }

    [Fact]
    public void A_strong_pull_gets_no_card_and_exit_code_four()
    {
        using var folder = new TemporaryFolder();
        File.WriteAllText(folder["fit.json"], """{ "schema": "trimfit-fit/1", "pull": { "at_balance": { "rate_deg_s": 6.5 } } }""");
        BuiltProgram.Outcome card = BuiltProgram.Run(null, "card", "--rig", BuiltProgram.Sample("ordinary-rig.toml"), "--from", folder["fit.json"], "--sheet", folder["sheet.toml"]);
        Assert.Equal((4, "trimfit: no card can be given (exit 4); the reason is in the result.\n"), (card.ExitCode, card.Error));
        Assert.StartsWith("No card: the last flight pulled 6.5 deg/s to the right, above 6 deg/s. Do not fly another card;", card.Output);
        Assert.Equal(["fit.json"], folder.Names);
    }

    [Theory]
    [InlineData("--width", "-3", "trimfit: --width: found \"-3\", expected a half-width of 0.1 to 500 mm.\n")]
    [InlineData("--minutes", "2", "trimfit: --minutes: found \"2\", expected 3 to 24 minutes.\n")]
    [InlineData("--floor", "100", "trimfit: --floor: found \"100\", expected a height of 300 to 3000 m.\n")]
    [InlineData("--ballast", "5kg", "trimfit: --ballast: found \"5kg\", expected kilograms and millimetres such as 5@450 (0.5 to 20 kg, 100 to 1500 mm).\n")]
    [InlineData("--logger", "camera", "trimfit: --logger: found \"camera\", expected full, phone or gps.\n")]
    [InlineData("--speaking", "card.txt", "trimfit: --speaking: found \"card.txt\", expected a name that ends in .html.\n")]
    public void A_wrong_option_is_named_with_what_is_expected(string option, string value, string message)
    {
        BuiltProgram.Outcome card = BuiltProgram.Run(null, "card", "--rig", BuiltProgram.Sample("ordinary-rig.toml"), option, value);
        Assert.Equal((2, message), (card.ExitCode, card.Error));
    }
}
