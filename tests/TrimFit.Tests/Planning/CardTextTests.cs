using System.Text.Json;
using System.Text.RegularExpressions;
using TrimFit.Core.Planning;
using TrimFit.Import;
using TrimFit.Import.Results;
using TrimFit.Import.Sheets;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;
using TrimFit.Simulation;

namespace TrimFit.Tests.Planning;

public partial class CardTextTests
{
    private static readonly string[] _always =
        ["estimate", "limits", "causes-first", "calm-air", "twist", "hands-off", "engine-off", "eyes-out", "strong-pull"];

    [Fact]
    public void A_card_carries_its_cautions_in_every_form()
    {
        CardReport report = CardFixture.Report();
        string page = Page.Render(ReportDocuments.Card(report, new()), new() { Compact = true });
        foreach (string code in _always)
            Assert.Contains($"data-caution=\"{code}\"", page);
        Assert.DoesNotContain("data-caution=\"ballast\"", page);
        Assert.Contains("data-caution=\"ballast\"", Page.Render(ReportDocuments.Card(CardFixture.Report(CardFixture.Ballast), new()), new()));
        using JsonDocument json = JsonDocument.Parse(ReportJson.Card(report));
        Assert.Equal(_always.Order(), json.RootElement.GetProperty("cautions").EnumerateArray().Select(c => c.GetProperty("code").GetString()!).Order());
        string speaking = SpeakingCard.Page(report, new());
        string text = ReportText.Card(report, new()).ReplaceLineEndings(" "), markdown = ReportMarkdown.Card(report, new());
        foreach (CautionCode code in CardDocument.CautionsOf(report.Plan))
        {
            string caution = Words.English.Caution(code, Numbers.Invariant);
            Assert.Contains(JsonEncodedText.Encode(caution).ToString(), speaking);
            Assert.Contains(caution, Regex.Replace(text, " +", " "));
            Assert.Contains(caution.Split('.')[0], markdown);
        }
    }

    [Fact]
    public void The_card_begins_with_where_to_start_and_what_to_expect()
    {
        CardPlan plan = CardFixture.Plan;
        Assert.Matches(@"^Start \d+ m above ground and fly \d min \d+ s: expect the pull in level flight to about \d\.\d deg/s either way, the shift of the CG to about \d+ mm either way\.$",
            Words.English.Card.Answer(plan, Numbers.Invariant));
        Assert.Matches(@"^Start \d+0 ft above ground", Words.English.Card.Answer(plan, new Numbers(new ReportStyle { Units = UnitSystem.Imperial })));
    }

    [Fact]
    public void A_refusal_says_the_number_and_what_to_do()
    {
        CardPlan strong = CardPlanner.Plan(CardFixture.Rig, new CardOptions(), CardFixture.Prior(pullDegPerSec: -6.4) with { HeldBrake = null });
        Assert.Equal("No card: the last flight pulled 6.4 deg/s to the left, above 6 deg/s. Do not fly another card; adjust on the ground first.",
            Words.English.Card.Refused(strong, Numbers.Invariant));
        CardReport report = CardFixture.Report(strong);
        Assert.StartsWith("No card: ", ReportText.Card(report, new()));
        using JsonDocument json = JsonDocument.Parse(ReportJson.Card(report));
        Assert.Equal("strong_pull", json.RootElement.GetProperty("refusal").GetProperty("code").GetString());
        Assert.Empty(json.RootElement.GetProperty("legs").EnumerateArray());
        Assert.Equal("card.json(refusal): found a card that was refused, expected a card with legs. Plan another one.",
            Assert.Throws<LogFormatException>(() => CardFileReader.Read("a/card.json", ReportJson.Card(report))).Message);
        Assert.Throws<ArgumentException>(() => SpeakingCard.Page(report, new()));
    }

    [Fact]
    public void Every_text_of_a_card_keeps_to_the_words_of_the_trade()
    {
        foreach (CardPlan plan in new[] { CardFixture.Plan, CardFixture.Phone, CardFixture.Ballast })
        {
            string text = ReportText.Card(CardFixture.Report(plan), new());
            Assert.DoesNotMatch(HangPointAlone(), text);
            Assert.DoesNotMatch(BarAlone(), text);
            Assert.DoesNotContain("NaN", text);
            Assert.DoesNotContain("cruise", text);
        }
    }

    [Fact]
    public void The_card_reads_back_and_the_simulator_flies_its_legs()
    {
        CardPlan plan = CardFixture.Ballast;
        string json = ReportJson.Card(CardFixture.Report(plan));
        CardPromise promise = CardFileReader.Read("card.json", json);
        Accuracy.AgreesTo(8, plan.Prediction!.PullHalfWidthRadPerSec, promise.PullHalfWidthRadPerSec);
        Accuracy.AgreesTo(8, plan.Prediction.ShiftHalfWidthM!.Value, promise.ShiftHalfWidthM!.Value);
        Scenario scenario = Scenario.Read("s.toml", """
            schema = "trimfit-scenario/1"
            [flight]
            card = "card.json"
            """, name => name == "card.json" ? json : null);
        Assert.Equal(plan.Legs.Select(l => l.Seconds), scenario.Legs.Select(l => l.DurationSec));
        Assert.Equal(plan.Legs.Count(l => l.Kind == CardLegKind.HandsOff), scenario.Legs.Count(l => l.Control == LegControl.HandsOff));
        Assert.Equal(plan.Legs.Where(l => l.Kind == CardLegKind.Ballast).Select(l => l.BallastArmM), scenario.Legs.Where(l => l.Control == LegControl.Ballast).Select(l => l.BallastArmM));
        Assert.Equal(plan.Legs.Where(l => l.Kind == CardLegKind.Turn).Select(l => Math.Round(l.TurnRad, 6)), scenario.Legs.Where(l => l.Control == LegControl.Turn).Select(l => Math.Round(l.TurnRad, 6)));
    }

    [Theory]
    [InlineData("[flight]\ncard = \"other.json\"", "s.toml(3): the test card \"other.json\" cannot be read. Name it as it lies beside the scenario.")]
    [InlineData("[flight]\ncart = \"card.json\"", "s.toml(3): unknown key \"cart\" in [flight]. Did you mean \"card\"?")]
    [InlineData("[flight]\ncard = \"card.json\"\n[[leg]]\nduration_s = 20", "s.toml(3): a card beside [[leg]]; expected one of the two.")]
    [InlineData("[flight]\ncard = \"text\"", "text(1): this is not JSON. Write the card with: trimfit card --rig RIG --json FILE.")]
    [InlineData("[flight]\ncard = \"empty\"", "empty: the card has no legs; was it refused? Plan another one.")]
    public void A_scenario_that_names_no_good_card_is_refused_with_the_place(string toml, string message)
    {
        string? File(string name) => name switch { "card.json" => ReportJson.Card(CardFixture.Report()), "text" => "legs", "empty" => "{\"schema\":\"trimfit-card/1\",\"legs\":[]}", _ => null };
        string found = Assert.Throws<ScenarioFormatException>(() => Scenario.Read("s.toml", "schema = \"trimfit-scenario/1\"\n" + toml, File)).Message;
        Assert.Equal(message, found);
    }

    [Fact]
    public void The_empty_sheet_asks_for_its_times_and_reads_once_they_are_filled_in()
    {
        string empty = CardSheetText.Empty(CardFixture.Report(CardFixture.Ballast));
        LogFormatException fault = Assert.Throws<LogFormatException>(() => FlightSheetReader.Read("sheet.toml", empty));
        Assert.Contains("found a leg without start, expected both start and end, or a marker.", fault.Message);
        int at = 0;
        string filled = TimeLines().Replace(empty, m => $"{m.Groups[1].Value} = {10 * at++ / 2 * 2}");
        var legs = FlightSheetReader.Read("sheet.toml", filled.Replace("# fuel_start_kg = \n", "", StringComparison.Ordinal)).Legs;
        Assert.Equal(CardFixture.Ballast.Legs.Length, legs.Length);
        Assert.Equal(CardFixture.Ballast.Legs.Where(l => l.Kind == CardLegKind.BrakeStep).Select(l => Math.Round(0.6 * l.BrakeRight, 3)),
            legs.Where(l => l.Kind == Core.Logs.SheetLegKind.BrakeStep).Select(l => l.BrakeRightM!.Value));
    }

    [Fact]
    public void The_speaking_card_asks_the_network_for_nothing_and_a_name_cannot_become_markup()
    {
        string page = SpeakingCard.Page(CardFixture.Report(), new());
        Assert.Contains("default-src 'none'; style-src 'unsafe-inline'; script-src 'unsafe-inline'", page);
        Assert.DoesNotMatch(Outside(), page);
        Assert.DoesNotContain("<machine>", page);
        Assert.Equal(1, Regex.Count(page, "</script>"));
        Assert.DoesNotContain("/*DATA*/", page);
    }

    [GeneratedRegex(@"(?<!harness )hang points?\b", RegexOptions.IgnoreCase)]
    private static partial Regex HangPointAlone();

    [GeneratedRegex(@"(?<!suspension )\bbars?\b", RegexOptions.IgnoreCase)]
    private static partial Regex BarAlone();

    [GeneratedRegex(@"^# (start|end) = $", RegexOptions.Multiline)]
    private static partial Regex TimeLines();

    [GeneratedRegex(@"https?:|src=|<link|@import|fetch\(|XMLHttpRequest|WebSocket|sendBeacon|import\(")]
    private static partial Regex Outside();
}
