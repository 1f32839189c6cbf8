using System.Net;
using System.Reflection;
using System.Text.RegularExpressions;

namespace TrimFit.Tests.Reporting;

/// <summary>Questions that tests ask of German text.</summary>
internal static partial class GermanText
{
    /// <summary>Fails for a part by half its name: carabiners, hang points and bars move the CG in different ways.</summary>
    public static void UsesTheTradesWords(string text)
    {
        Assert.DoesNotMatch(LoneCarabiner(), text);
        Assert.DoesNotMatch(LoneHangPoint(), text);
        Assert.DoesNotMatch(LoneBar(), text);
        Assert.DoesNotMatch(Pod(), text);
    }

    /// <summary>The text with left and right exchanged.</summary>
    public static string Mirrored(string text) => Sides().Replace(text, m =>
    {
        string right = m.Value.Replace("links", "rechts", StringComparison.Ordinal).Replace("linke", "rechte", StringComparison.Ordinal);
        return right != m.Value ? right : m.Value.Replace("rechts", "links", StringComparison.Ordinal).Replace("rechte", "linke", StringComparison.Ordinal);
    });

    /// <summary>All texts that a record of labels holds.</summary>
    public static IEnumerable<string> Strings(object labels) =>
        labels.GetType().GetProperties(BindingFlags.Public | BindingFlags.Instance).Where(p => p.PropertyType == typeof(string) && p.GetIndexParameters().Length == 0).Select(p => (string)p.GetValue(labels)!);

    /// <summary>What a reader of a page sees or hears, without the table of columns, whose roles and units are those of the command line.</summary>
    public static string OfPage(string html) => WebUtility.HtmlDecode(Tag().Replace(Unread().Replace(html, " "), " "));

    /// <summary>The words of a text, in lower case.</summary>
    public static IEnumerable<string> Words(string text) => Word().Matches(text).Select(m => m.Value.ToLowerInvariant());

    [GeneratedRegex(@"Karabiner\w*\b(?! der Tragegurte)")]
    private static partial Regex LoneCarabiner();

    [GeneratedRegex(@"Aufhängepunkt\w*\b(?! des Gurtzeugs)", RegexOptions.IgnoreCase)]
    private static partial Regex LoneHangPoint();

    [GeneratedRegex(@"\b(?:Arm|Arme|Armen|Arms|Stange\w*)\b")]
    private static partial Regex LoneBar();

    [GeneratedRegex(@"\bPods?\b", RegexOptions.IgnoreCase)]
    private static partial Regex Pod();

    [GeneratedRegex(@"\b(?:links|rechts|linken?|rechten?)\b")]
    private static partial Regex Sides();

    [GeneratedRegex("<style>.*?</style>|<script.*?</script>|<h2[^>]*>(?:Spalten|Columns)</h2>.*?</table>", RegexOptions.Singleline)]
    private static partial Regex Unread();

    [GeneratedRegex("<[^>]*>")]
    private static partial Regex Tag();

    [GeneratedRegex(@"\p{L}{2,}")]
    private static partial Regex Word();
}
