using TrimFit.Reporting.Documents;

namespace TrimFit.Reporting;

/// <summary>Results as Markdown. Figures are told in words.</summary>
public static class ReportMarkdown
{
    /// <summary>The result of <c>fit</c>.</summary>
    public static string Fit(FitReport report, ReportStyle style) => MarkdownRenderer.Render(ReportDocuments.Fit(report, style, figures: true));

    /// <summary>The result of <c>compare</c>.</summary>
    public static string Compare(CompareReport report, ReportStyle style) => MarkdownRenderer.Render(ReportDocuments.Compare(report, style, figures: true));

    /// <summary>The result of <c>inspect</c>.</summary>
    public static string Inspect(InspectReport report, ReportStyle style) => MarkdownRenderer.Render(ReportDocuments.Inspect(report, style));

    /// <summary>The result of <c>rig</c>.</summary>
    public static string Rig(RigSheetReport report, ReportStyle style) => MarkdownRenderer.Render(ReportDocuments.Rig(report, style, figures: true));

    /// <summary>A test card.</summary>
    public static string Card(CardReport report, ReportStyle style) => MarkdownRenderer.Render(ReportDocuments.Card(report, style));

    /// <summary>Any document.</summary>
    /// <param name="document">What to write.</param>
    public static string Of(ReportDocument document)
    {
        ArgumentNullException.ThrowIfNull(document);
        return MarkdownRenderer.Render(document);
    }
}
