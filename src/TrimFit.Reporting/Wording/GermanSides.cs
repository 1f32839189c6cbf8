namespace TrimFit.Reporting.Wording;

/// <summary>Left and right in German, always from the seated pilot's place.</summary>
internal static class GermanSides
{
    /// <summary>As an adverb: links, rechts.</summary>
    public static string Side(double rightPositive) => rightPositive < 0 ? "links" : "rechts";

    /// <summary>As an adjective after an article in an oblique case: linken, rechten.</summary>
    public static string Oblique(double rightPositive) => rightPositive < 0 ? "linken" : "rechten";

    /// <summary>As an adjective after a definite article in the nominative, or the feminine accusative: linke, rechte.</summary>
    public static string Plain(double rightPositive) => rightPositive < 0 ? "linke" : "rechte";

    /// <summary>The way something is to be moved.</summary>
    public static string ToYourSide(double rightPositive) => $"zu Ihrer {Oblique(rightPositive)} Seite hin";

    /// <summary>Items joined by commas and the last by "und".</summary>
    public static string Join(IReadOnlyList<string> items) => items.Count switch
    {
        0 => "",
        1 => items[0],
        _ => string.Join(", ", items.Take(items.Count - 1)) + " und " + items[^1],
    };
}
