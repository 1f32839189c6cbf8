using System.Globalization;
using System.Net;
using System.Text.Json;
using System.Text.RegularExpressions;
using TrimFit.EndToEndTests;

namespace TrimFit.BrowserTests.Web;

/// <summary>The page computes nothing of its own: its results are those of the command line, byte for byte.</summary>
public sealed partial class SameResultTests(WebProgram program) : IClassFixture<WebProgram>
{
    [Theory]
    [InlineData("uncorrected")]
    [InlineData("ordinary")]
    public async Task The_result_as_JSON_is_that_of_fit(string flight)
    {
        using var folder = new TemporaryFolder();
        string expected = Cli(folder, flight);
        using WebSession session = program.Session();
        using HttpResponseMessage answer = await session.Fit($"{flight}.csv", $"{flight}-rig.toml");
        Assert.Equal("/answer", answer.RequestMessage!.RequestUri!.AbsolutePath);
        Assert.Equal(expected, await session.Page("/answer/result.json"));
    }

    [Fact]
    public async Task The_slider_gives_the_numbers_of_the_result()
    {
        using var folder = new TemporaryFolder();
        using JsonDocument result = JsonDocument.Parse(Cli(folder, "uncorrected"));
        using WebSession session = program.Session();
        (await session.Fit("uncorrected.csv", "uncorrected-rig.toml")).Dispose();
        JsonElement[] ways = [.. result.RootElement.GetProperty("adjustments").EnumerateArray()];
        Assert.True(ways.Length >= 5);
        foreach (JsonElement way in ways)
        {
            string kind = way.GetProperty("kind").GetString()!;
            string page = WebUtility.HtmlDecode(await session.Page("/answer/move?part=" + kind));
            string[] row = Row(page, "null");
            string[] turns = [.. way.GetProperty("turn_left_at").EnumerateArray().Select(t => string.Create(CultureInfo.InvariantCulture,
                $"{Fixed(t, "rate_deg_s")} ({Fixed(t, "low95")} to {Fixed(t, "high95")})"))];
            Assert.Equal(turns, row[1..5]);
            Assert.Equal(Fixed(way, "twist_ratio", 2), row[5]);
            Assert.Equal(Fixed(way, "twist_ratio_high95", 2), row[6]);
            Assert.Equal(Fixed(way, "riser_load_left_n", 0), row[7]);
            Assert.Equal(Fixed(way, "riser_load_right_n", 0), row[8]);
            if (way.GetProperty("first_step").GetDouble() != 0) // the result gives the hang check of the first step
            {
                string[] first = Row(page, "first");
                Assert.Equal([Fixed(way.GetProperty("hang_check"), "left_kg"), Fixed(way.GetProperty("hang_check"), "right_kg")], first[9..11]);
            }
        }
    }

    [Fact]
    public async Task Where_no_travel_is_given_there_is_nothing_to_try_out()
    {
        using WebSession session = program.Session();
        (await session.Fit("flat-throttle.csv", "flat-throttle-rig.toml")).Dispose();
        string page = await session.Page("/answer/move");
        Assert.Contains("gives no travel", page, StringComparison.Ordinal);
        Assert.DoesNotContain("type=\"range\"", page, StringComparison.Ordinal);
    }

    private static string Cli(TemporaryFolder folder, string flight)
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", BuiltProgram.Sample($"{flight}.csv"), "--rig", BuiltProgram.Sample($"{flight}-rig.toml"), "--json", folder["r.json"], "--quiet");
        Assert.True(run.ExitCode is 0 or 4, run.Error);
        return File.ReadAllText(folder["r.json"]);
    }

    private static string[] Row(string page, string mark)
    {
        Match row = Regex.Match(page, $"<tr class=\"{mark}\"[^>]*>(.*?)</tr>", RegexOptions.Singleline);
        Assert.True(row.Success, $"no row {mark}");
        return [.. Cell().Matches(row.Groups[1].Value).Select(m => m.Groups[1].Value)];
    }

    private static string Fixed(JsonElement e, string name, int decimals = 1)
    {
        double rounded = Math.Round(e.GetProperty(name).GetDouble(), decimals, MidpointRounding.AwayFromZero);
        return (rounded == 0 ? 0 : rounded).ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
    }

    [GeneratedRegex("<td class=\"n\">(.*?)</td>")]
    private static partial Regex Cell();
}
