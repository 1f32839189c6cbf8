using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Jobs;

/// <summary>A job as one self-contained HTML page.</summary>
public static class JobReportPage
{
    /// <summary>A job.</summary>
    public static string Job(JobReport report, ReportStyle style) => HtmlRenderer.Render(JobDocuments.Job(report, Words.English, new Numbers(style)));
}
