using TrimFit.Reporting;
using TrimFit.Reporting.Documents;

namespace TrimFit.Pages;

/// <summary>Results as one self-contained HTML page with its figures. The same input gives the same text.</summary>
public static class ReportPage
{
    /// <summary>The result of <c>fit</c>.</summary>
    /// <param name="report">The result.</param>
    /// <param name="style">Units and culture.</param>
    /// <param name="input">What the page carries of its own input, packed; null for nothing.</param>
    public static string Fit(FitReport report, ReportStyle style, string? input = null) => Page.Render(ReportDocuments.Fit(report, style, figures: true), new() { Input = input });

    /// <summary>The result of <c>inspect</c>.</summary>
    /// <param name="report">The result.</param>
    /// <param name="style">Units and culture.</param>
    public static string Inspect(InspectReport report, ReportStyle style) => Page.Render(ReportDocuments.Inspect(report, style), new());

    /// <summary>The result of <c>rig</c>.</summary>
    /// <param name="report">The result.</param>
    /// <param name="style">Units and culture.</param>
    public static string Rig(RigSheetReport report, ReportStyle style) => Page.Render(ReportDocuments.Rig(report, style, figures: true), new());

    /// <summary>The result of <c>compare</c>.</summary>
    /// <param name="report">The result.</param>
    /// <param name="style">Units and culture.</param>
    public static string Compare(CompareReport report, ReportStyle style) => Page.Render(ReportDocuments.Compare(report, style, figures: true), new());
}
