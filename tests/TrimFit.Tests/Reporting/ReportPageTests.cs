using System.Text.RegularExpressions;
using System.Xml.Linq;
using TrimFit.Core.Analysis;
using TrimFit.Core.Turns;
using TrimFit.Pages;
using TrimFit.Reporting;

namespace TrimFit.Tests.Reporting;

public partial class ReportPageTests
{
    private const string Hostile = "<script>alert(1)</script>\"'&\u0007";

    [Fact]
    public void Names_from_files_never_become_markup()
    {
        FitReport report = ReportFixture.Report(ReportFixture.Result(rig: ReportFixture.Rig(name: Hostile)), ReportFixture.Import(Hostile, Hostile, Hostile), Hostile);
        foreach (string page in new[]
        {
            ReportPage.Fit(report, new()), ReportPage.Inspect(ReportFixture.Inspection(report.Import), new()),
            ReportPage.Rig(ReportFixture.Sheet() with { Rig = ReportFixture.Rig(name: Hostile) }, new()),
        })
        {
            Assert.DoesNotContain("<script", page, StringComparison.OrdinalIgnoreCase);
            Assert.DoesNotContain('\u0007', page);
            Assert.Contains("&lt;script&gt;alert(1)&lt;/script&gt;&quot;&#39;&amp;", page, StringComparison.Ordinal);
        }
    }

    [Fact]
    public void The_page_stands_alone()
    {
        string page = Page();
        string withoutNamespaces = page.Replace("xmlns=\"http://www.w3.org/2000/svg\"", "", StringComparison.Ordinal)
            .Replace("xmlns:xlink=\"http://www.w3.org/1999/xlink\"", "", StringComparison.Ordinal);
        Assert.DoesNotContain("http", withoutNamespaces.Replace("http-equiv", "", StringComparison.Ordinal), StringComparison.Ordinal);
        Assert.DoesNotContain("src=", page, StringComparison.Ordinal);
        Assert.DoesNotContain("<?xml", page, StringComparison.Ordinal);
        Assert.StartsWith("<!DOCTYPE html>\n<html lang=\"en\">", page, StringComparison.Ordinal);
    }

    [Fact]
    public void The_same_result_gives_the_same_bytes() => Assert.Equal(Page(), Page());

    [Fact]
    public void Identifiers_are_unique_over_all_figures_and_every_reference_has_its_target()
    {
        string page = Page();
        string[] ids = [.. Identifier().Matches(page).Select(m => m.Groups[1].Value)];
        Assert.NotEmpty(ids);
        Assert.Equal(ids.Length, ids.Distinct().Count());
        Assert.All(Reference().Matches(page).Select(m => m.Groups[1].Value), r => Assert.Contains(r, ids));
    }

    [Fact]
    public void Each_figure_is_well_formed_scales_and_is_named_for_those_who_cannot_see_it()
    {
        XElement[] figures = Figures(Page());
        Assert.Equal(["What to move, seen from behind", "Turn rate against thrust", "The flight over time", "Measured turn less fitted turn", "Turn left over at each power", "The rig from above", "Loads from behind, at full thrust"], figures.Select(f => Child(f, "title")));
        Assert.All(figures, f =>
        {
            Assert.Equal("img", f.Attribute("role")?.Value);
            Assert.NotNull(f.Attribute("viewBox"));
            Assert.NotEmpty(Child(f, "desc"));
        });
    }

    [Fact]
    public void The_plots_have_text_with_units_without_any_font_of_the_machine()
    {
        XElement[] figures = Figures(Page());
        string turn = string.Concat(figures[1].Descendants().Where(e => e.Name.LocalName == "text").Select(e => e.Value));
        Assert.Contains("thrust [N]", turn, StringComparison.Ordinal);
        Assert.Contains("turn rate [°/s], right +", turn, StringComparison.Ordinal);
        Assert.Contains("95 % band", turn, StringComparison.Ordinal);
        string flight = string.Concat(figures[2].Descendants().Where(e => e.Name.LocalName == "text").Select(e => e.Value));
        Assert.Contains("time [min]", flight, StringComparison.Ordinal);
        Assert.Contains("brakes [%]", flight, StringComparison.Ordinal);
    }

    [Fact]
    public void The_drawing_shows_now_and_after_in_millimetres()
    {
        XElement drawing = Figures(Page())[5];
        string[] texts = [.. drawing.Descendants().Where(e => e.Name.LocalName == "text").Select(e => e.Value)];
        Assert.Contains("front harness hang points: 3 mm right → 11 mm left", texts); // 3 - 14
        Assert.Contains("rear harness hang points: 0 mm → 14 mm left", texts);
        Assert.Contains("CG: 2 mm right → 9 mm left", texts); // 1.8 - 0.7458 · 14 = -8.6
        Assert.Contains("thrust line: 2 mm right", texts);
        // Carabiners to scale: circles at ±215 units.
        double[] rings = [.. drawing.Descendants().Where(e => e.Name.LocalName == "circle" && e.Attribute("r")?.Value == "9").Select(e => double.Parse(e.Attribute("cx")!.Value, System.Globalization.CultureInfo.InvariantCulture))];
        Assert.Contains(-215, rings);
        Assert.Contains(215, rings);
    }

    [Fact]
    public void A_flight_with_nothing_to_draw_still_gives_a_page()
    {
        TurnFit empty = ReportFixture.Fit() with { Coefficients = [new("constant", null, "nothing flown")], Covariance = [0], Points = [], DegreesOfFreedom = 0 };
        TrimAnalysis analysis = ReportFixture.Result(VerdictCode.Insufficient, VerdictStrength.None, null, adjustments: [], reasons: [Finding.Of(FindingCode.NoThrust)]) with
        {
            Fit = empty,
            Signals = new()
            {
                TimeSec = [],
                Thrust = [],
                ThrustBasis = ThrustBasis.Relative,
                FullThrust = 1,
                HasThrust = false,
                BrakeDifference = [],
                HasBrakes = false,
                RotationRatioSquared = [],
                Use = [],
                HandsOff = [],
            },
        };
        string page = ReportPage.Fit(ReportFixture.Report(analysis), new());
        Assert.Equal(["The machine from behind", "The rig from above", "Loads from behind, at full thrust"], Figures(page).Select(f => Child(f, "title")));
        Assert.Contains("This flight cannot tell how hard the machine turns.", page, StringComparison.Ordinal);
    }

    [Fact]
    public void Every_caution_of_the_result_is_on_the_page() => Assert.Equal(
        ["estimate", "limits", "causes-first", "one-change", "hang-check", "calm-air", "twist"],
        CautionMark().Matches(Page()).Select(m => m.Groups[1].Value));

    private static string Page() => ReportPage.Fit(ReportFixture.Report(), new());

    private static XElement[] Figures(string page) => [.. FigureMark().Matches(page).Select(m => XElement.Parse(m.Groups[1].Value))];

    private static string Child(XElement element, string name) => element.Elements().First(e => e.Name.LocalName == name).Value;

    [GeneratedRegex("\\bid=\"([^\"]*)\"")]
    private static partial Regex Identifier();

    [GeneratedRegex("url\\(#([^)]*)\\)")]
    private static partial Regex Reference();

    [GeneratedRegex("data-caution=\"([^\"]*)\"")]
    private static partial Regex CautionMark();

    [GeneratedRegex("<figure[^>]*>(<svg.*?</svg>)<figcaption>", RegexOptions.Singleline)]
    private static partial Regex FigureMark();
}
