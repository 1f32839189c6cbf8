using System.Text;
using System.Text.RegularExpressions;
using Microsoft.Playwright;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;

namespace TrimFit.BrowserTests;

/// <summary>A card on paper: one side to fly by, with the cautions, the other with every leg; the legs of a long card take a side more.</summary>
public partial class CardPaperTests(Browser browser)
{
    [Theory]
    [InlineData(6, 0, 2)]
    [InlineData(8, 5, 3)]
    [InlineData(12, 0, 3)]
    public async Task A_card_prints_on_the_two_sides_of_one_sheet_and_a_long_one_on_a_side_more(double minutes, double ballastKg, int mostSides)
    {
        Rig rig = new()
        {
            Name = "Demo machine",
            Mass = new() { PilotKg = Reading.Measured(88), PowerUnitKg = Reading.Measured(30) },
            Propeller = new() { Rotation = PropellerRotation.Clockwise, StaticThrustN = Reading.Measured(600), ShaftPowerW = 14000, DiameterM = 1.25 },
            Carabiners = new() { LeftM = Reading.Measured(-0.215), RightM = Reading.Measured(0.215) },
            Wing = new() { TrimSpeedMPerSec = 11, GlideSinkMPerSec = 2.2 },
        };
        CardPlan plan = CardPlanner.Plan(rig, new CardOptions { Minutes = minutes, BallastKg = ballastKg, Draws = 3, ShiftHalfWidthM = 0.02 });
        var report = new CardReport { Plan = plan, Rig = rig, RigFile = new("demo.toml", "00"), Provenance = new("1.0.0-test") };
        IBrowserContext context = await browser.Context();
        IPage page = await context.NewPageAsync();
        await page.SetContentAsync(Page.Render(ReportDocuments.Card(report, new()), new() { Compact = true }));
        byte[] pdf = await page.PdfAsync(new() { PreferCSSPageSize = true });
        Assert.InRange(SheetSide().Count(Encoding.Latin1.GetString(pdf)), 2, mostSides);
        await page.SetViewportSizeAsync(390, 800);
        Assert.True(await page.EvaluateAsync<bool>("document.documentElement.scrollWidth <= 390")); // tables scroll inside, the page does not
        await context.CloseAsync();
    }

    [GeneratedRegex(@"/Type\s*/Page\b(?!s)")]
    private static partial Regex SheetSide();
}
