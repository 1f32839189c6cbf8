using TrimFit.Reporting.Documents;

namespace TrimFit.Reporting;

/// <summary>Results as one self-contained HTML page with its figures. The same input gives the same text.</summary>
public static class ReportPage
{
    /// <summary>The result of <c>fit</c>.</summary>
    public static string Fit(FitReport report, ReportStyle style) => HtmlRenderer.Render(Reports.Fit(report, style, figures: true));

    /// <summary>The result of <c>inspect</c>.</summary>
    public static string Inspect(InspectReport report, ReportStyle style) => HtmlRenderer.Render(Reports.Inspect(report, style));

    /// <summary>The result of <c>rig</c>.</summary>
    public static string Rig(RigSheetReport report, ReportStyle style) => HtmlRenderer.Render(Reports.Rig(report, style, figures: true));
}
