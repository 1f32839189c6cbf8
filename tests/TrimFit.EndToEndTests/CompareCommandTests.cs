using System.Security.Cryptography;
using System.Text.Json;

namespace TrimFit.EndToEndTests;

public class CompareCommandTests
{
    private static string[] Pair(params string[] more) =>
    [
        "compare", "--before", BuiltProgram.Sample("uncorrected.csv"), "--before-rig", BuiltProgram.Sample("uncorrected-rig.toml"),
        "--after", BuiltProgram.Sample("balanced.csv"), "--after-rig", BuiltProgram.Sample("balanced-rig.toml"), .. more,
    ];

    [Fact]
    public void With_a_known_scatter_the_bundled_pair_is_better_and_the_truth_lies_inside_its_intervals()
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = BuiltProgram.Run(null, Pair("--flight-scatter", "0.2", "--changed", "geometry", "--json", folder["c.json"], "--report", folder["c.html"], "--report", folder["c.md"]));
        Assert.Equal("", run.Error);
        Assert.Equal(0, run.ExitCode);
        Assert.StartsWith("Better: in level flight it turned left at ", run.Output, StringComparison.Ordinal);
        using JsonDocument result = Json(folder["c.json"]), before = Json(BuiltProgram.Sample("uncorrected-truth.json")), after = Json(BuiltProgram.Sample("balanced-truth.json"));
        JsonElement root = result.RootElement;
        Assert.Equal("trimfit-compare/1", root.GetProperty("schema").GetString());
        foreach (string setting in (ReadOnlySpan<string>)["off", "idle", "cruise", "full"])
        {
            double change = Truth(after, setting) - Truth(before, setting);
            JsonElement found = root.GetProperty("change").GetProperty("at").EnumerateArray().Single(x => x.GetProperty("setting").GetString() == setting);
            Assert.InRange(change, found.GetProperty("low95").GetDouble(), found.GetProperty("high95").GetDouble());
        }
        double sensitivity = before.RootElement.GetProperty("sensitivity_deg_s_per_mm").GetDouble();
        Assert.InRange(sensitivity, root.GetProperty("sensitivity").GetProperty("low95").GetDouble(), root.GetProperty("sensitivity").GetProperty("high95").GetDouble());
        Assert.True(root.GetProperty("pair_used").GetBoolean());
        Assert.Contains("<svg", File.ReadAllText(folder["c.html"]), StringComparison.Ordinal);
        Assert.Contains("**Better:", File.ReadAllText(folder["c.md"]), StringComparison.Ordinal);

        static double Truth(JsonDocument truth, string setting) =>
            truth.RootElement.GetProperty("pull").EnumerateArray().Single(x => x.GetProperty("setting").GetString() == setting).GetProperty("rate_deg_s").GetDouble();
    }

    [Fact]
    public void With_the_usual_scatter_two_flights_cannot_tell_and_say_what_would()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, Pair());
        Assert.Equal(4, run.ExitCode);
        Assert.Contains("(A-B-A)", run.Output, StringComparison.Ordinal);
        Assert.Equal("trimfit: the data cannot answer the whole question (exit 4); what could be found is in the result.\n", run.Error);
    }

    [Fact]
    public void A_list_of_flights_with_a_sealed_order_is_opened()
    {
        using var folder = new TemporaryFolder();
        string Copy(string name) => folder.Write(name, File.ReadAllText(BuiltProgram.Sample(name)));
        Copy("uncorrected-rig.toml");
        Copy("balanced-rig.toml");
        Copy("uncorrected.csv");
        Copy("balanced.csv");
        // Sealed here, apart from the program: the order covered by SHA-256 of salt and block number, and SHA-256 of salt and order.
        byte[] salt = [.. Enumerable.Range(0, 16).Select(i => (byte)(7 * i))], plain = "A,B,B,A"u8.ToArray();
        byte[] closed = [.. plain.Zip(SHA256.HashData([.. salt, 0]), (x, key) => (byte)(x ^ key))];
        string commitment = Convert.ToHexStringLower(SHA256.HashData([.. salt, .. plain]));
        folder.Write("order.toml", $"salt = \"{Convert.ToHexStringLower(salt)}\"\nclosed = \"{Convert.ToHexStringLower(closed)}\"\ncommitment = \"{commitment}\"\n");
        string list = folder.Write("trial.toml", """
            schema = "trimfit-flights/1"
            changed = "geometry"
            sealed_order = "order.toml"
            [setups]
            A = "uncorrected-rig.toml"
            B = "balanced-rig.toml"
            [[flight]]
            logs = "uncorrected.csv"
            [[flight]]
            logs = "balanced.csv"
            [[flight]]
            logs = ["balanced.csv"]
            [[flight]]
            logs = "uncorrected.csv"
            """);
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "compare", list, "--json", folder["c.json"]);
        Assert.Equal("", run.Error);
        Assert.Equal(0, run.ExitCode);
        using JsonDocument result = Json(folder["c.json"]);
        Assert.Equal(["A", "B", "B", "A"], result.RootElement.GetProperty("sealed_order").GetProperty("setups").EnumerateArray().Select(x => x.GetString()));
        Assert.Equal(commitment[..12], result.RootElement.GetProperty("sealed_order").GetProperty("commitment").GetString());
        Assert.Contains(commitment[..12], run.Output, StringComparison.Ordinal);
        Assert.Equal("better", result.RootElement.GetProperty("verdict").GetProperty("code").GetString());
        Assert.True(Assert.Single(result.RootElement.GetProperty("swap_backs").EnumerateArray()).GetProperty("agrees").GetBoolean());
    }

    [Fact]
    public void A_blind_card_seals_the_order_that_compare_opens_and_keeps_it_from_the_pilot()
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome card = BuiltProgram.Run(null, "card", "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--minutes", "4", "--blind", folder["order.toml"], "--json", folder["card.json"]);
        Assert.Equal((0, ""), (card.ExitCode, card.Error));
        string commitment = Json(folder["card.json"]).RootElement.GetProperty("sealed_order").GetString()!;
        string slip = File.ReadAllText(folder["order-helper.txt"]);
        string[] order = [.. slip.Split('\n').Where(l => l.StartsWith("Before flight", StringComparison.Ordinal)).Select(l => l[^1..])];
        Assert.True(order is ["A", "B", "B", "A"] or ["B", "A", "A", "B"]);
        Assert.Contains(commitment, slip, StringComparison.Ordinal);
        Assert.Contains(commitment, card.Output, StringComparison.Ordinal);
        Assert.DoesNotContain("setting A", card.Output, StringComparison.Ordinal); // the slip's words for a flight
        foreach (string name in new[] { "uncorrected-rig.toml", "balanced-rig.toml", "uncorrected.csv", "balanced.csv" })
            folder.Write(name, File.ReadAllText(BuiltProgram.Sample(name)));
        string list = folder.Write("trial.toml", $"""
            changed = "geometry"
            sealed_order = "order.toml"
            [setups]
            A = "uncorrected-rig.toml"
            B = "balanced-rig.toml"
            {string.Join('\n', order.Select(o => $"[[flight]]\nlogs = \"{(o == "A" ? "uncorrected" : "balanced")}.csv\""))}
            """);
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "compare", list, "--json", folder["c.json"]);
        Assert.Equal("", run.Error);
        JsonElement opened = Json(folder["c.json"]).RootElement.GetProperty("sealed_order");
        Assert.Equal(commitment, opened.GetProperty("commitment").GetString());
        Assert.Equal(order, opened.GetProperty("setups").EnumerateArray().Select(x => x.GetString()));
    }

    [Theory]
    [InlineData("trimfit: compare needs a list of flights, or --before LOG --before-rig RIG --after LOG --after-rig RIG. Try: trimfit compare --help\n", "compare")]
    [InlineData("trimfit: --changed: found \"wings\", expected geometry, wing, brake_lines, trimmers, harness, propeller, ballast.\n", "compare", "x.toml", "--changed", "wings")]
    [InlineData("trimfit: --flight-scatter: found \"-1\", expected a turn rate of 0 or more in deg/s, such as 0.3.\n", "compare", "x.toml", "--flight-scatter=-1")]
    [InlineData("trimfit: found \"x.toml\" beside --before or --after, expected one of the two. Put the flights into the list, or leave it out.\n", "compare", "x.toml", "--before", "a.csv")]
    public void A_command_line_that_cannot_be_carried_out_says_what_was_expected(string message, params string[] args)
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, args);
        Assert.Equal((2, message), (run.ExitCode, run.Error));
    }

    [Fact]
    public void A_missing_list_is_an_input_error()
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "compare", "nowhere.toml");
        Assert.Equal((3, "nowhere.toml: found no such file, expected a file. Check the name and the folder.\n"), (run.ExitCode, run.Error));
    }

    private static JsonDocument Json(string path) => JsonDocument.Parse(File.ReadAllText(path));
}
