using RazorSlices;
using TrimFit.Pages.Slices;
using TrimFit.Reporting.Documents;

namespace TrimFit.Pages;

/// <summary>Any document as one self-contained HTML page: no script, no link, no outside file; reads well on paper and on a phone.</summary>
public static class Page
{
    /// <summary>Draws the page. The same document and options give the same text.</summary>
    /// <param name="document">What to show.</param>
    /// <param name="options">Paper and density.</param>
    public static string Render(ReportDocument document, PageOptions options)
    {
        ArgumentNullException.ThrowIfNull(document);
        ArgumentNullException.ThrowIfNull(options);
        using RazorSlice<PageModel> slice = PageSlice.Create(new(document, options));
        using var text = new StringWriter { NewLine = "\n" };
        // Nothing in the templates waits, so this is done when it returns.
        slice.RenderAsync(text, PageEncoder.Instance).AsTask().GetAwaiter().GetResult();
        return text.ToString();
    }
}
