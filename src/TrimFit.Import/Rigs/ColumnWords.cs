using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Import.Rigs;

/// <summary>Splits <c>NAME[:UNIT]</c>.</summary>
internal static class ColumnWords
{
    /// <summary>After the last colon stands a unit only if it is one: column names may hold colons.</summary>
    public static ColumnRule Parse(ChannelRole role, string words)
    {
        int colon = words.LastIndexOf(':');
        return colon > 0 && IsUnit(words[(colon + 1)..]) ? new(role, words[..colon].Trim(), words[(colon + 1)..].Trim()) : new(role, words.Trim(), null);
    }

    private static bool IsUnit(string word) => word.Trim().Length is > 0 and <= 12 && !word.Contains(' ', StringComparison.Ordinal);
}
