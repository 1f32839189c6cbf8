using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Import;

/// <summary>Reads the person's word on a column, <c>ROLE=NAME[:UNIT]</c>.</summary>
public static class ColumnRules
{
    /// <summary>Takes the text apart. What stands behind the last colon is a unit only if it is one of the role, since names may hold colons.</summary>
    /// <param name="text">Such as <c>yaw_rate=gz:deg/s</c>.</param>
    /// <param name="rule">The rule.</param>
    /// <param name="problem">What is wrong, a sentence; empty when nothing is.</param>
    public static bool TryParse(string text, out ColumnRule rule, out string problem)
    {
        ArgumentNullException.ThrowIfNull(text);
        rule = null!;
        int equals = text.IndexOf('=', StringComparison.Ordinal);
        if (equals <= 0 || equals == text.Length - 1)
        {
            problem = $"\"{text}\" is no column rule; write ROLE=NAME or ROLE=NAME:UNIT, such as yaw_rate=gz:deg/s.";
            return false;
        }
        string word = text[..equals].Trim();
        if (!ChannelRoles.TryParse(word, out ChannelRole role))
        {
            problem = $"\"{word}\" is no role of a column; the roles are {string.Join(", ", ChannelRoles.Names)}.";
            return false;
        }
        string name = text[(equals + 1)..];
        int colon = name.LastIndexOf(':');
        bool hasUnit = colon > 0 && colon < name.Length - 1 && LogUnits.TryParse(name[(colon + 1)..], out LogUnit unit) && LogUnits.Fits(role, unit);
        rule = hasUnit ? new(role, name[..colon], name[(colon + 1)..]) : new(role, name, null);
        problem = "";
        return true;
    }
}
