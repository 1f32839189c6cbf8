using System.Globalization;
using System.Text.Json;
using TrimFit.Core.Comparing;
using TrimFit.Core.Logs;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Wording;
using static TrimFit.Tests.Comparing.MadeUpPair;

namespace TrimFit.Tests.Comparing;

public class CompareReportTests
{
    internal static CompareReport Report(ComparisonOptions options, params ReadOnlySpan<ComparedFlight> flights)
    {
        FlightComparison c = FlightComparison.Run([.. flights], options with { WithNext = true, Trim = options.Trim with { Draws = 500 } });
        return new()
        {
            Comparison = c,
            Flights = [.. c.Flights.Select((f, i) => new FitReport
            {
                Analysis = f.Analysis,
                Import = new(new Analysis.MadeUpFlight { Powers = [0, 1] }.Fly(), new ImportDiagnostics
                {
                    Files = [new() { Name = $"flight-{i}.csv", Sha256 = "00", Format = "CSV", RowsRead = 3 }],
                    Sampling = new() { DurationSec = 600, RateHz = 5 },
                }),
                RigFile = new("rig.toml", "00"),
                Provenance = new("0"),
            })],
            Provenance = new("0"),
        };
    }

    private static CompareReport Better => Report(Known(0, ChangedPart.Geometry), Flight("as delivered", -3, 0.1, -2, 0.05, name: "one.csv", curveError: 0.3), Flight("moved", -1.0, 0.1, -2, 0.05, Moved(-0.02), "two.csv", curveError: 0.3));

    [Fact]
    public void The_first_sentence_says_what_became_of_the_pull()
    {
        // Level flight is near 0.6 of full thrust: -3 - 1.2 and -1 - 1.2.
        Assert.StartsWith("Better: in level flight it turned left at 4.2 deg/s before and turns left at 2.2 deg/s now (change\n1.6 to 2.4; right is positive).\n"
            + "The pull became smaller, but it was not shown to lie within 1.0 deg/s at idle, in level flight and\nat full power.\n", ReportText.Compare(Better, new()), StringComparison.Ordinal);
        string straight = ReportText.Compare(Report(Known(0), Flight("a", 3, 0.1), Flight("b", 0, 0.1, rig: Moved(0.03))), new());
        Assert.StartsWith("Fixed: at idle, in level flight and at full power the turn left lies within 1.0 deg/s; in level\nflight it turned right at 3.0 deg/s before and hardly turns now", straight, StringComparison.Ordinal);
        Assert.DoesNotContain("> First step", straight, StringComparison.Ordinal); // what is fixed is left alone
        // Before -3.5 without power, -1.1 in level flight, 0.5 at full power; after it -2, 0.4 and 2.
        string elsewhere = ReportText.Compare(Report(Known(0), Flight("a", -3.5, 0.05, 4), Flight("b", -2, 0.05, 4, rig: Moved(-0.015))), new()).Replace('\n', ' ');
        Assert.Contains("At full power it became larger: a fixed shift cannot null every power.", elsewhere, StringComparison.Ordinal);
        string open = ReportText.Compare(Report(Known(0), Flight("a", 1.5, 0.9), Flight("b", 1.2, 0.9, rig: Moved(0.03))), new());
        Assert.StartsWith("These flights cannot tell whether anything changed:", open, StringComparison.Ordinal);
        string one = ReportText.Compare(Report(Known(0), Flight("a", 1.5, 0.1), Flight("a", 1.5, 0.1)), new());
        Assert.StartsWith("All flights have the same setting: in level flight it turns right at 1.5 deg/s", one, StringComparison.Ordinal);
    }

    [Fact]
    public void Every_notice_has_a_sentence_of_its_own_that_names_parts_in_full()
    {
        var seen = new HashSet<string>();
        foreach (CompareNoticeCode code in Enum.GetValues<CompareNoticeCode>())
        {
            string text = Words.English.Comparing.Notice(CompareNotice.About(code, ["one.csv", "two.csv"], 0.3, 0.5, 0.01), Numbers.Invariant);
            Assert.EndsWith(".", text, StringComparison.Ordinal);
            Assert.True(seen.Add(text), $"{code} says what another notice says");
            Assert.DoesNotMatch("(?<!harness )hang point|(?<!suspension )bars?\\b|\\bpod\\b", text);
            Assert.EndsWith(".", Words.English.Comparing.Notice(CompareNotice.Of(code), Numbers.Invariant), StringComparison.Ordinal); // too few numbers still give a sentence
        }
    }

    [Fact]
    public void The_page_shows_both_figures_and_the_cautions()
    {
        string page = ReportPage.Compare(Better, new());
        Assert.Contains("Pull over power, before and after", page, StringComparison.Ordinal);
        Assert.Contains("The flights in their order", page, StringComparison.Ordinal);
        Assert.Equal(2, page.Split("<svg xmlns").Length - 1);
        foreach (string caution in (ReadOnlySpan<string>)["estimate", "limits", "causes-first", "one-change", "hang-check", "calm-air", "twist"])
            Assert.Contains($"data-caution=\"{caution}\"", page, StringComparison.Ordinal);
        Assert.Equal(page, ReportPage.Compare(Better, new())); // the same bytes each time
        foreach (string caution in (ReadOnlySpan<string>)["approves nothing", "maker's range", "brake lines, trimmers, straps"])
            Assert.Contains(caution, ReportMarkdown.Compare(Better, new()).Replace('\n', ' '), StringComparison.Ordinal);
    }

    [Fact]
    public void Numbers_follow_culture_and_units_and_JSON_does_not()
    {
        var german = new ReportStyle { Culture = CultureInfo.GetCultureInfo("de-DE"), Units = UnitSystem.Imperial };
        Assert.Contains("4,2 deg/s", ReportText.Compare(Better, german), StringComparison.Ordinal);
        using JsonDocument json = JsonDocument.Parse(ReportJson.Compare(Better));
        JsonElement root = json.RootElement;
        Assert.Equal("trimfit-compare/1", root.GetProperty("schema").GetString());
        Assert.Equal("better", root.GetProperty("verdict").GetProperty("code").GetString());
        Assert.Equal("geometry", root.GetProperty("changed").GetString());
        Assert.Equal(2.0, root.GetProperty("change").GetProperty("at_balance").GetProperty("rate_deg_s").GetDouble(), 1e-4);
        Assert.Equal("trimfit-fit/1", root.GetProperty("before").GetProperty("flights")[0].GetProperty("result").GetProperty("schema").GetString());
        Assert.Equal(["off", "idle", "cruise", "full"], root.GetProperty("after").GetProperty("at").EnumerateArray().Select(x => x.GetProperty("setting").GetString()));
        Assert.Equal(100 * 2 / 4.2, root.GetProperty("removed_percent").GetDouble(), 1.0);
        Assert.DoesNotContain("NaN", ReportJson.Compare(Better), StringComparison.Ordinal);
    }

    [Fact]
    public void A_name_from_a_file_cannot_become_markup()
    {
        string page = ReportPage.Compare(Report(Known(0), Flight("<script>a", 3, 0.1, name: "<b>x.csv"), Flight("b", 1, 0.1, rig: Moved(0.03))), new());
        Assert.DoesNotContain("<script>a", page, StringComparison.Ordinal);
        Assert.DoesNotContain("<b>x", page, StringComparison.Ordinal);
    }
}
