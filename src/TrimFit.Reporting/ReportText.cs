using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting;

/// <summary>Results as plain text for the terminal: the answer first, cautions last, lines ending with a line feed.</summary>
public static class ReportText
{
    /// <summary>The result of <c>fit</c>.</summary>
    public static string Fit(FitReport report, ReportStyle style) => TextRenderer.Render(ReportDocuments.Fit(report, style, figures: false));

    /// <summary>The first sentence of <c>fit</c> with the caution that stands everywhere, for scripts and quiet people.</summary>
    public static string FitBrief(FitReport report, ReportStyle style) => Brief(ReportDocuments.Fit(report, style, figures: false), style);

    /// <summary>The result of <c>compare</c>.</summary>
    public static string Compare(CompareReport report, ReportStyle style) => TextRenderer.Render(ReportDocuments.Compare(report, style, figures: false));

    /// <summary>The first sentence of <c>compare</c> with the caution that stands everywhere.</summary>
    public static string CompareBrief(CompareReport report, ReportStyle style) => Brief(ReportDocuments.Compare(report, style, figures: false), style);

    /// <summary>The result of <c>inspect</c>.</summary>
    public static string Inspect(InspectReport report, ReportStyle style) => TextRenderer.Render(ReportDocuments.Inspect(report, style));

    /// <summary>The first sentence of <c>inspect</c> with the caution that stands everywhere.</summary>
    public static string InspectBrief(InspectReport report, ReportStyle style) => Brief(ReportDocuments.Inspect(report, style), style);

    /// <summary>The result of <c>rig</c>.</summary>
    public static string Rig(RigSheetReport report, ReportStyle style) => TextRenderer.Render(ReportDocuments.Rig(report, style, figures: false));

    /// <summary>The first sentence of <c>rig</c> with the caution that stands everywhere.</summary>
    public static string RigBrief(RigSheetReport report, ReportStyle style) => Brief(ReportDocuments.Rig(report, style, figures: false), style);

    /// <summary>A test card.</summary>
    public static string Card(CardReport report, ReportStyle style) => TextRenderer.Render(ReportDocuments.Card(report, style));

    /// <summary>The first sentence of a card with the caution that stands everywhere.</summary>
    public static string CardBrief(CardReport report, ReportStyle style) => Brief(ReportDocuments.Card(report, style), style);

    /// <summary>The slip of a blind trial for who sets the machine.</summary>
    /// <param name="setups">Settings in the order of the flights.</param>
    /// <param name="commitment">Number of the sealed order.</param>
    /// <param name="style">Language; English when null.</param>
    public static string HelperSlip(IEnumerable<string> setups, string commitment, ReportStyle? style = null) => string.Join('\n', (style?.Words ?? Words.English).Card.HelperSlip(setups, commitment)) + "\n";

    /// <summary>The summary of <c>batch</c>.</summary>
    public static string Batch(BatchSummary summary, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(summary);
        return TextRenderer.Render(BatchDocument.Build(summary, style.Words, new Numbers(style)));
    }

    private static string Brief(ReportDocument document, ReportStyle style) =>
        TextRenderer.Safe(document.Blocks.OfType<AnswerBlock>().First().Text) + "\n" + style.Words.Caution(CautionCode.Estimate, new Numbers(style)) + "\n";
}
