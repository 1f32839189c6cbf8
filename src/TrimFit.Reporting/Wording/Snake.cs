using System.Text;

namespace TrimFit.Reporting.Wording;

/// <summary>Names of enum members as scripts read them.</summary>
internal static class Snake
{
    /// <summary><c>PowerPull</c> becomes <c>power_pull</c>.</summary>
    public static string Of(string pascal)
    {
        var text = new StringBuilder();
        foreach (char c in pascal)
        {
            if (char.IsAsciiLetterUpper(c) && text.Length > 0)
                text.Append('_');
            text.Append(char.ToLowerInvariant(c));
        }
        return text.ToString();
    }
}
