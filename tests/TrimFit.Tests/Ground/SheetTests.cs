using System.Globalization;
using System.Text.RegularExpressions;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Figures;
using TrimFit.Reporting.Wording;
using TrimFit.Tests.Reporting;

namespace TrimFit.Tests.Ground;

public partial class SheetTests
{
    private static readonly Provenance _program = new("0.0.0");

    public static TheoryData<SheetKind> Kinds => [.. Enum.GetValues<SheetKind>()];

    [Theory]
    [InlineData(SheetKind.Measuring, "hang-check", "frame-running")]
    [InlineData(SheetKind.HangCheck, "hang-check", "frame-running")]
    [InlineData(SheetKind.Weighing, "hang-check", "frame-running")]
    [InlineData(SheetKind.Rotation, "frame-running", "thrust-test")]
    [InlineData(SheetKind.Thrust, "frame-running", "thrust-test")]
    [InlineData(SheetKind.Templates, "one-change", "hang-check")]
    public void Every_sheet_carries_its_cautions(SheetKind kind, params string[] own)
    {
        string page = GroundPage.Sheet(kind, ReportFixture.Rig(), new());
        foreach (string code in (string[])["estimate", "limits", "causes-first", .. own])
            Assert.Contains($"data-caution=\"{code}\"", page, StringComparison.Ordinal);
    }

    [Fact]
    public void The_complaint_carries_the_caution_for_a_sudden_pull_and_a_proof_of_change_those_of_the_hang_check()
    {
        var report = new ChecksReport { Complaint = new(), Checks = CheckOrder.Of(new()), Provenance = _program };
        Assert.Contains("data-caution=\"sudden\"", GroundPage.Checks(report, new()), StringComparison.Ordinal);
        Assert.Contains("\"sudden\"", GroundReports.ChecksJson(report), StringComparison.Ordinal);
        foreach (string code in new[] { "hang-check", "frame-running", "one-change" })
            Assert.Contains($"data-caution=\"{code}\"", GroundPage.Change(Change(0.015), new()), StringComparison.Ordinal);
    }

    [Theory]
    [MemberData(nameof(Kinds))]
    public void Sheets_have_one_drawing_a_reading_and_three_places_to_write_where_three_are_wanted(SheetKind kind)
    {
        string page = GroundPage.Sheet(kind, ReportFixture.Rig(name: "<b>&"), new());
        Assert.DoesNotContain("<b>&", page, StringComparison.Ordinal);
        int drawings = page.Split("<div class=\"art\"><svg").Length - 1;
        Assert.Equal(kind switch { SheetKind.Measuring => 6, SheetKind.Weighing => 2, SheetKind.Templates => 0, _ => 1 }, drawings);
        if (kind == SheetKind.Measuring)
            Assert.Equal(3 * 9, page.Split("<td class=\"blank\">").Length - 1);
        Assert.DoesNotContain("NaN", page, StringComparison.Ordinal);
    }

    [Fact]
    public void Every_key_of_a_sheet_is_one_that_measure_takes()
    {
        foreach (SheetKind kind in Enum.GetValues<SheetKind>())
        {
            foreach (Match key in Key().Matches(GroundPage.Sheet(kind, ReportFixture.Rig(), new())))
                Assert.NotNull(TrimFit.Import.Rigs.MeasuredKey.Find(key.Groups[1].Value));
        }
        // And every reading has its words.
        Assert.All(TrimFit.Import.Rigs.MeasuredKey.All, k => Assert.NotEqual(k.Name, GroundReports.Reading(k.Name)));
    }

    [Fact]
    public void The_check_ruler_is_150_millimetres_of_paper_in_the_drawing()
    {
        string svg = PaperTemplates.CheckRuler(Words.English.Ground);
        Match size = Size().Match(svg), line = Ruler().Match(svg);
        double perUnit = Number(size, 1) / Number(size, 2); // mm of paper for one unit of the drawing
        Assert.InRange(Number(line, 1) * perUnit, 150 * 0.995, 150 * 1.005);
        // Outside: ISO 216 has A4 210 mm wide; with margins of 12 mm and more every template must fit.
        Assert.All(new[] { svg, PaperTemplates.Strip(Words.English.Ground), PaperTemplates.Spacers(Words.English.Ground), PaperTemplates.Protractor(Words.English.Ground) },
            s => Assert.InRange(Number(Size().Match(s), 1), 100, 180));
    }

    [Fact]
    public void A_verdict_says_what_to_do_and_no_text_says_bar_or_hang_point_alone()
    {
        GroundWords words = Words.English.Ground;
        Assert.StartsWith("Wrong way: moving both riser carabiners should carry the CG 15 mm to your right, but the scales show 15 mm to your left", words.Change(Change(-0.015).Change, "both riser carabiners", Numbers.Invariant), StringComparison.Ordinal);
        Assert.Contains("Do not fly.", words.Change(Change(-0.015).Change, "x", Numbers.Invariant), StringComparison.Ordinal);
        Assert.StartsWith("Confirmed:", words.Change(Change(0.015).Change, "x", Numbers.Invariant), StringComparison.Ordinal);
        Assert.Matches("^Cannot tell: .* Repeat: ", words.Change(Change(0.002, 0.008).Change, "x", Numbers.Invariant));

        var texts = new List<string>(words.HangSteps);
        foreach (GroundFaultCode code in Enum.GetValues<GroundFaultCode>())
        {
            foreach (GroundFault fault in new[] { new GroundFault(code, "hang_check.left_kg", 1, 0.02, 0.03), new GroundFault(code, ""), new GroundFault(code, "", double.NaN) })
            {
                string sentence = words.Fault(fault, Numbers.Invariant);
                Assert.Matches(@"^[A-Z].*[.?]$", sentence);
                Assert.DoesNotContain("NaN", sentence, StringComparison.Ordinal);
                texts.Add(sentence);
            }
        }
        foreach (SheetKind kind in Enum.GetValues<SheetKind>())
            texts.AddRange([words.SheetIntroduction(kind), Tags().Replace(GroundPage.Sheet(kind, ReportFixture.Rig(), new()).Split("<main>")[1], " ")]);
        foreach (SimpleCause cause in Enum.GetValues<SimpleCause>())
            texts.AddRange([words.Cause(cause), words.LookFor(cause), words.IfItStays(cause)]);
        Assert.All(texts, WordsTests.UsesTheTradesWords);
    }

    [Fact]
    public void Checks_come_in_every_form_with_a_number_to_write()
    {
        var complaint = new Complaint { Side = PullSide.Left, When = PullWhen.EngineOff, Since = PullSince.Suddenly, Changed = [ChangedPart.BrakeLines] };
        var report = new ChecksReport { Complaint = complaint, Checks = CheckOrder.Of(complaint), Provenance = _program };
        string text = GroundReports.ChecksText(report, new());
        Assert.StartsWith("A pull that came suddenly is a fault, not a trim matter: do not fly.", text, StringComparison.Ordinal);
        Assert.True(text.Split("________").Length > 11);
        using System.Text.Json.JsonDocument json = System.Text.Json.JsonDocument.Parse(GroundReports.ChecksJson(report));
        Assert.Equal("trimfit-checks/1", json.RootElement.GetProperty("schema").GetString());
        Assert.Equal("left", json.RootElement.GetProperty("complaint").GetProperty("side").GetString());
        Assert.Equal("engine_off", json.RootElement.GetProperty("complaint").GetProperty("when")[0].GetString());
        Assert.Equal(11, json.RootElement.GetProperty("checks").GetArrayLength());
        Assert.Contains("in,", GroundReports.ChecksText(report, new() { Units = UnitSystem.Imperial }).Replace("lb, in", "in,", StringComparison.Ordinal), StringComparison.Ordinal);
    }

    private static HangChangeReport Change(double measured, double expected = 0.015)
    {
        static HangCheckResult At(double e) => HangCheck.Measure([.. new[] { -0.0005, 0, 0.0005 }.Select(d => HangCheck.Expected(118, e + d, 0.430))], 0.430, 0.002, 0.75);
        return new()
        {
            Adjustment = Adjustment.All.Single(a => a.Kind == AdjustmentKind.CarabinerPair),
            Travel = -expected,
            Change = HangChange.Judge(At(0), At(measured), expected),
            Expected = HangCheck.Expected(118, expected, 0.430),
            ExpectedPlusMinusKg = 1.5,
            Provenance = _program,
        };
    }

    private static double Number(Match match, int group) => double.Parse(match.Groups[group].Value, CultureInfo.InvariantCulture);

    [GeneratedRegex("<span class=\"key\">([a-z_.]+)</span>")]
    private static partial Regex Key();

    [GeneratedRegex("width=\"([0-9.]+)mm\" height=\"[0-9.]+mm\" viewBox=\"0 0 ([0-9.]+) ")]
    private static partial Regex Size();

    [GeneratedRegex("<path d=\"M[0-9.]+ [0-9.]+ h([0-9.]+)\"")]
    private static partial Regex Ruler();

    [GeneratedRegex("<[^>]*>")]
    private static partial Regex Tags();
}
