using System.Text;

namespace TrimFit.Cli;

/// <summary>Members of an enum as the command line writes them.</summary>
internal static class CommandWords
{
    /// <summary><c>CarabinerPair</c> becomes <c>carabiner_pair</c>.</summary>
    public static string Of(Enum value)
    {
        var text = new StringBuilder();
        foreach (char c in value.ToString())
        {
            if (char.IsAsciiLetterUpper(c) && text.Length > 0)
                text.Append('_');
            text.Append(char.ToLowerInvariant(c));
        }
        return text.ToString();
    }

    /// <summary>The member of a word.</summary>
    /// <exception cref="CommandLineException">It is none.</exception>
    public static T Parse<T>(string option, string word, params ReadOnlySpan<T> without)
        where T : struct, Enum
    {
        var words = new List<string>();
        foreach (T value in Enum.GetValues<T>())
        {
            if (without.Contains(value))
                continue;
            if (Of(value) == word)
                return value;
            words.Add(Of(value));
        }
        throw new CommandLineException($"{option}: found \"{word}\", expected {string.Join(" or ", words)}.");
    }
}
