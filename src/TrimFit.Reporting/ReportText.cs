using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting;

/// <summary>Results as plain text for the terminal: the answer first, cautions last, lines ending with a line feed.</summary>
public static class ReportText
{
    /// <summary>The result of <c>fit</c>.</summary>
    public static string Fit(FitReport report, ReportStyle style) => TextRenderer.Render(Reports.Fit(report, style, figures: false));

    /// <summary>The first sentence of <c>fit</c> with the caution that goes everywhere, for scripts and quiet people.</summary>
    public static string FitBrief(FitReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        var numbers = new Numbers(style);
        return TextRenderer.Safe(Words.English.Answer(FitAnswer.Of(report.Analysis), numbers)) + "\n" + Words.English.Caution(CautionCode.Estimate, numbers) + "\n";
    }

    /// <summary>The result of <c>inspect</c>.</summary>
    public static string Inspect(InspectReport report, ReportStyle style) => TextRenderer.Render(Reports.Inspect(report, style));

    /// <summary>The result of <c>rig</c>.</summary>
    public static string Rig(RigSheetReport report, ReportStyle style) => TextRenderer.Render(Reports.Rig(report, style, figures: false));
}
