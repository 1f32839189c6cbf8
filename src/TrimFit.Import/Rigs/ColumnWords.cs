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
        return colon > 0 && LogUnits.TryParse(words[(colon + 1)..], out _) ? new(role, words[..colon].Trim(), words[(colon + 1)..].Trim()) : new(role, words.Trim(), null);
    }
}
