using Microsoft.AspNetCore.Html;
using TrimFit.Reporting.Documents;

namespace TrimFit.Pages;

/// <summary>What the page layout needs.</summary>
/// <param name="Document">What to show.</param>
/// <param name="Options">Paper and density.</param>
public sealed record PageModel(ReportDocument Document, PageOptions Options)
{
    /// <summary>Style sheet with its fonts inside.</summary>
    internal HtmlString Style => new(PageStyle.For(Options));
}
