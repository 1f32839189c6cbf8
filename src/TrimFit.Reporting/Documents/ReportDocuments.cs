using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>One way from a result to its document for every form.</summary>
public static class ReportDocuments
{
    /// <summary>The report of <c>fit</c>.</summary>
    /// <param name="report">The result.</param>
    /// <param name="style">Units, culture and language.</param>
    /// <param name="figures">Whether figures are drawn; the terminal shows none.</param>
    public static ReportDocument Fit(FitReport report, ReportStyle style, bool figures)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return FitDocument.Build(report, style.Words, new Numbers(style), figures);
    }

    /// <summary>The report of <c>inspect</c>.</summary>
    /// <param name="report">The result.</param>
    /// <param name="style">Units, culture and language.</param>
    public static ReportDocument Inspect(InspectReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return InspectDocument.Build(report, style.Words, new Numbers(style));
    }

    /// <summary>The report of <c>rig</c>.</summary>
    /// <param name="report">The result.</param>
    /// <param name="style">Units, culture and language.</param>
    /// <param name="figures">Whether figures are drawn; the terminal shows none.</param>
    public static ReportDocument Rig(RigSheetReport report, ReportStyle style, bool figures)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return RigDocument.Build(report, style.Words, new Numbers(style), figures);
    }

    /// <summary>The report of <c>compare</c>.</summary>
    /// <param name="report">The result.</param>
    /// <param name="style">Units and culture.</param>
    /// <param name="figures">Whether figures are drawn; the terminal shows none.</param>
    public static ReportDocument Compare(CompareReport report, ReportStyle style, bool figures)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return CompareDocument.Build(report, style.Words, new Numbers(style), figures);
    }

    /// <summary>A test card.</summary>
    /// <param name="report">The card.</param>
    /// <param name="style">Units and culture.</param>
    public static ReportDocument Card(CardReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return CardDocument.Build(report, style.Words, new Numbers(style));
    }

    /// <summary>The page a workshop hands over.</summary>
    /// <param name="page">What goes into it; what is missing becomes a line to write on.</param>
    /// <param name="style">Units and culture.</param>
    public static ReportDocument Customer(CustomerPage page, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(page);
        ArgumentNullException.ThrowIfNull(style);
        return CustomerDocument.Build(page, style.Words, new Numbers(style));
    }

    /// <summary>What a flight's result can fill into the page a workshop hands over.</summary>
    /// <param name="report">The result.</param>
    /// <param name="style">Units and culture.</param>
    public static CustomerPage CustomerOf(FitReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return CustomerDocument.Of(report, style.Words, new Numbers(style));
    }
}
