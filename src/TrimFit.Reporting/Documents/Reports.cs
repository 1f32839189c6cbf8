using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>One way from a report to its document for every form.</summary>
internal static class Reports
{
    public static ReportDocument Fit(FitReport report, ReportStyle style, bool figures)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return FitDocument.Build(report, Words.English, new Numbers(style), figures);
    }

    public static ReportDocument Inspect(InspectReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return InspectDocument.Build(report, Words.English, new Numbers(style));
    }

    public static ReportDocument Rig(RigSheetReport report, ReportStyle style, bool figures)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return RigDocument.Build(report, Words.English, new Numbers(style), figures);
    }
}
