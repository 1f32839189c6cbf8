using TrimFit.Reporting;

namespace TrimFit.Pages;

/// <summary>The speaking card: one offline page for a telephone that calls the legs and saves its time marks as a flight sheet.</summary>
/// <remarks>The one page of this program with a script. Its content policy lets it run that script and load nothing; the legs stand in it as data and
/// reach the screen as text only.</remarks>
public static class SpeakingCard
{
    /// <summary>Draws the page. The same card gives the same text.</summary>
    /// <param name="report">The card; it must have legs.</param>
    /// <param name="style">Units and culture.</param>
    /// <exception cref="ArgumentException">The card was refused.</exception>
    public static string Page(CardReport report, ReportStyle style)
    {
        string data = SpeakingCardData.Json(report, style);
        using Stream stream = typeof(SpeakingCard).Assembly.GetManifestResourceStream("TrimFit.Pages.Speaking.speaking-card.html")!;
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd().ReplaceLineEndings("\n").Replace("/*DATA*/null", data, StringComparison.Ordinal);
    }
}
