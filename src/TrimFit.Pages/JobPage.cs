using TrimFit.Reporting;
using TrimFit.Reporting.Jobs;

namespace TrimFit.Pages;

/// <summary>A job of the job book as one self-contained HTML page.</summary>
public static class JobPage
{
    /// <summary>Everything about the job.</summary>
    /// <param name="report">The job.</param>
    /// <param name="style">Units and culture.</param>
    public static string Job(JobReport report, ReportStyle style) => Page.Render(JobDocuments.Job(report, style), new());
}
