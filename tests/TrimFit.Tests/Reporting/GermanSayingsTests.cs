using System.Text;
using System.Text.RegularExpressions;
using TrimFit.Reporting;
using TrimFit.Reporting.Wording;

namespace TrimFit.Tests.Reporting;

/// <summary>What readers and estimators say without a code is known to the German words: found in the sources, so that a new one cannot be forgotten.</summary>
public partial class GermanSayingsTests
{
    private static readonly Numbers _numbers = new(new ReportStyle { Language = ReportLanguage.German });

    /// <summary>Where a text for people is handed on: a notice, a row or a span left out, the ground for a missing coefficient, how a column was decided.</summary>
    private static readonly Regex[] _places =
    [
        Notice(), Said(), RowReason(), SpanReason(), TrackReason(), Basis(),
    ];

    public static TheoryData<string> Sources => [.. new[] { "TrimFit.Core", "TrimFit.Import" }
        .SelectMany(project => Directory.EnumerateFiles(Path.Combine(RepositoryRoot.Path, "src", project), "*.cs", SearchOption.AllDirectories))
        .Where(path => _places.Any(p => p.IsMatch(File.ReadAllText(path))))
        .Select(path => Path.GetRelativePath(RepositoryRoot.Path, path).Replace('\\', '/')).Order(StringComparer.Ordinal)];

    [Theory]
    [MemberData(nameof(Sources))]
    public void Every_text_handed_on_is_known(string source)
    {
        string code = File.ReadAllText(Path.Combine(RepositoryRoot.Path, source));
        string[] unknown = [.. _places.SelectMany(place => place.Matches(code)).SelectMany(m => Samples(code, m.Groups["quote"].Index).Select(text => m.Value.StartsWith("Say", StringComparison.Ordinal) ? "file: " + text : text)).Where(text => text.Contains(' ', StringComparison.Ordinal) && !Known(text))];
        Assert.True(unknown.Length == 0, "Without German in GermanSayings: " + string.Join(" | ", unknown));
    }

    [Fact]
    public void The_places_are_found() => Assert.True(Sources.Count >= 12, "The patterns no longer find the sources.");

    [Theory]
    [InlineData("name; unit from header", "Name; Einheit aus der Kopfzeile")]
    [InlineData("name; unit from header, 16-bit number put right", "Name; Einheit aus der Kopfzeile, 16-Bit-Zahl berichtigt")]
    [InlineData("CSV, semicolon, decimal comma, UTF-8, no header", "CSV, Semikolon, Dezimalkomma, UTF-8, ohne Kopfzeile")]
    [InlineData("cannot be told from the growth with thrust: thrust stayed between 395 and 412 N", "nicht vom Zuwachs mit dem Schub zu trennen: der Schub blieb zwischen 395 und 412 N")]
    [InlineData("a.csv(17, yaw): \"1;5\" is not a number. Row left out.", "a.csv(17, yaw): „1;5“ ist keine Zahl. Zeile ausgelassen.")]
    [InlineData("a.csv(17): time runs back from 91.40 s to 90.20 s. 4 rows left out for this, lines 17 to 20. Split the log there if this was a restart.",
        "a.csv(17): die Zeit läuft von 91,40 s auf 90,20 s zurück. Deswegen 4 Zeilen ausgelassen, Zeilen 17 bis 20. Teilen Sie die Aufzeichnung dort, falls neu gestartet wurde.")]
    [InlineData("The clock of b.csv was found from its engine and climb against a.csv: correlation 0.91, good to 0.3 s.",
        "Die Uhr von b.csv wurde gegen a.csv gefunden, nach dem Vergleich von: Motor und Steigen; Korrelation 0,91, auf 0,3 s genau.")]
    [InlineData("something nobody has said before", "something nobody has said before")]
    public void Parts_and_numbers_come_through(string english, string german) => Assert.Equal(german, GermanSayings.Translate(english, _numbers));

    private static bool Known(string text) => GermanSayings.Translate(text, _numbers) != text || text is "CSV" or "GPX trkpt";

    /// <summary>The string literal at a place with numbers for what stands in braces; for a choice between literals both.</summary>
    private static IEnumerable<string> Samples(string code, int quote)
    {
        var texts = new List<StringBuilder> { new() };
        for (int i = quote + 1; code[i] != '"'; i++)
        {
            if (code[i] == '\\')
            {
                texts.ForEach(t => t.Append(code[i + 1]));
                i++;
            }
            else if (code[i] == '{')
            {
                int end = End(code, i);
                string hole = code[i..end];
                string[] choices = hole.Contains('?', StringComparison.Ordinal) ? [.. Choice().Matches(hole).Select(m => m.Groups["text"].Value)] : [Hole(hole)];
                texts = [.. texts.SelectMany(t => choices.Select(c => new StringBuilder(t.ToString() + c)))];
                i = end - 1;
            }
            else
            {
                texts.ForEach(t => t.Append(code[i]));
            }
        }
        return texts.Select(t => t.ToString());
    }

    /// <summary>What may stand in a hole: a reason where one is put in, a number elsewhere.</summary>
    private static string Hole(string hole) => hole switch
    {
        _ when hole.Contains("because", StringComparison.Ordinal) => "nothing says otherwise",
        "{what}" => "a pause of the recorder",
        _ when hole.Contains("why", StringComparison.Ordinal) => "the data do not decide it",
        _ when hole.Contains("Signals", StringComparison.Ordinal) => "turn rate",
        _ when hole.Contains("UnitBasis", StringComparison.Ordinal) => "from header",
        _ when hole.Contains("mark}", StringComparison.Ordinal) => "a decimal point",
        _ when hole.Contains("has}", StringComparison.Ordinal) => "decimal points",
        _ when hole.Contains("OrderBy", StringComparison.Ordinal) => "\"7\", \"8\"",
        _ when hole is "{factor}" or "{agrees}" => "",
        _ => "7",
    };

    private static int End(string code, int open)
    {
        int depth = 0;
        for (int i = open; ; i++)
        {
            depth += code[i] switch { '{' => 1, '}' => -1, _ => 0 };
            if (depth == 0)
                return i + 1;
        }
    }

    [GeneratedRegex("(?:\\bnew|\\bWarn)\\(\"[a-z_]+\",\\s*(?:FormattableString\\.)?(?:Invariant\\(\\s*)?\\$?(?<quote>\")")]
    private static partial Regex Notice();

    [GeneratedRegex("\\bSay\\(\"[a-z_0-9]+\",\\s*(?:FormattableString\\.)?(?:Invariant\\(\\s*)?\\$?(?<quote>\")")]
    private static partial Regex Said();

    [GeneratedRegex("_?leftOut\\.Add\\(\"[a-z ]+\",[^=]*=> new\\(\\$?(?<quote>\")", RegexOptions.IgnoreCase)]
    private static partial Regex RowReason();

    [GeneratedRegex("(?:Reason\\s*=|Reason = [^;\"]*\\?|[lL]eaveOut\\([^\"\\n]*=> .*,) (?<quote>\")")]
    private static partial Regex SpanReason();

    [GeneratedRegex("\\.LeaveOut\\((?<quote>\")|return (?<quote>\")fix ")]
    private static partial Regex TrackReason();

    [GeneratedRegex("Basis = (?<quote>\")|\\bInferr?e?d?\\([^\"\\n]*(?:\"[^\"\\n]*\"[^\"\\n]*)?, (?<quote>\")")]
    private static partial Regex Basis();

    [GeneratedRegex("\"(?<text>[^\"]*)\"")]
    private static partial Regex Choice();
}
