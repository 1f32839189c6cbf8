using TrimFit.Core.Rigging;
using TrimFit.Reporting;

namespace TrimFit.Pages;

/// <summary>The ground work as self-contained HTML pages. The same input gives the same text.</summary>
public static class GroundPage
{
    /// <summary>The checks of a complaint.</summary>
    /// <param name="report">Complaint and checks.</param>
    /// <param name="style">Units and culture.</param>
    public static string Checks(ChecksReport report, ReportStyle style) => Page.Render(GroundReports.Document(report, style), new());

    /// <summary>The proof of a change by the hang check.</summary>
    /// <param name="report">The verdict.</param>
    /// <param name="style">Units and culture.</param>
    public static string Change(HangChangeReport report, ReportStyle style) => Page.Render(GroundReports.Document(report, style), new());

    /// <summary>A sheet to print and fill in.</summary>
    /// <param name="kind">Which.</param>
    /// <param name="rig">The machine.</param>
    /// <param name="style">Units and culture.</param>
    public static string Sheet(SheetKind kind, Rig rig, ReportStyle style) => Page.Render(GroundReports.Sheet(kind, rig, style), new() { Compact = true });
}
