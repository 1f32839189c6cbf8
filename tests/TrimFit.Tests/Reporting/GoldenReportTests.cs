using System.Globalization;
using TrimFit.Core.Analysis;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;

namespace TrimFit.Tests.Reporting;

public class GoldenReportTests
{
    private static readonly ReportStyle _german = new() { Units = UnitSystem.Imperial, Culture = CultureInfo.GetCultureInfo("de-DE") };

    [Fact]
    public void The_report_as_Markdown() => Golden.Matches("fit.md", ReportMarkdown.Fit(ReportFixture.Report(), new()));

    [Fact]
    public void The_report_in_inches_and_with_decimal_commas() => Golden.Matches("fit-imperial-de.md", ReportMarkdown.Fit(ReportFixture.Report(), _german));

    [Fact]
    public void The_report_of_a_balanced_machine() => Golden.Matches("fit-balanced.md",
        ReportMarkdown.Fit(ReportFixture.Report(ReportFixture.Result(VerdictCode.Balanced, VerdictStrength.None, 0.2, adjustments: [])), new()));

    [Fact]
    public void The_report_of_a_flight_that_cannot_tell() => Golden.Matches("fit-insufficient.md", ReportMarkdown.Fit(ReportFixture.Report(ReportFixture.Result(
        VerdictCode.Insufficient, VerdictStrength.None, 2.1, 3, adjustments: [], reasons: [Finding.Of(FindingCode.ThrustRangeTooSmall, 0.38, 0.41)])), new()));

    [Fact]
    public void The_customers_page() => Golden.Matches("customer.md", ReportMarkdown.Of(Customer(ReportFixture.Report())));

    [Fact]
    public void The_same_input_gives_the_same_bytes()
    {
        string first = ReportPage.Fit(ReportFixture.Report(), new()), second = ReportPage.Fit(ReportFixture.Report(), new());
        Assert.Equal(first, second);
        Assert.Equal(Page.Render(Customer(ReportFixture.Report()), new() { Compact = true }), Page.Render(Customer(ReportFixture.Report()), new() { Compact = true }));
    }

    [Fact]
    public void A_culture_changes_words_and_figures_alike()
    {
        string page = ReportPage.Fit(ReportFixture.Report(), _german);
        Assert.Contains("0,55 in", page, StringComparison.Ordinal); // 14 mm
        Assert.DoesNotContain("0.55 in", page, StringComparison.Ordinal);
    }

    private static ReportDocument Customer(FitReport report) => ReportDocuments.Customer(ReportDocuments.CustomerOf(report, new()), new());
}
