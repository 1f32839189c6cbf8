using TrimFit.Core.Logs;

namespace TrimFit.Import.Csv;

/// <summary>A header cell taken apart into the name and the unit it carries.</summary>
/// <param name="Name">Name without unit.</param>
/// <param name="Unit">The unit; null when there is none or it is not known.</param>
/// <param name="UnknownUnit">Text in brackets that is no known unit; null when there is none.</param>
internal sealed record HeaderName(string Name, LogUnit? Unit, string? UnknownUnit)
{
    /// <summary>Takes a header cell apart: <c>Speed [km/h]</c>, <c>Brake L (mm)</c>, <c>gyro_z_dps</c>, <c>altitudeM</c>, <c>Throttle %</c>.</summary>
    public static HeaderName Split(string header)
    {
        string text = header.Trim();
        if (text.Length > 2 && text[^1] is ')' or ']' or '}' or '>')
        {
            char open = text[^1] switch { ')' => '(', ']' => '[', '}' => '{', _ => '<' };
            int at = text.LastIndexOf(open);
            if (at > 0)
            {
                string inside = text[(at + 1)..^1].Trim();
                string before = text[..at].Trim(' ', '_', '-', ':', ',');
                if (LogUnits.TryParse(inside, out LogUnit unit))
                    return new(before, unit, null);
                if (LogUnits.IsRemark(inside))
                    return new(ColumnNames.TryFind(text, out _, out _) ? text : before, null, null);
                // "Alt (left)" is a name; what is no name either is kept as a unit nobody knows.
                return ColumnNames.TryFind(text, out _, out _) ? new(text, null, null) : new(before, null, inside.Length > 0 ? inside : null);
            }
        }
        if (text.Length > 1 && text[^1] is '%' or '°')
            return new(text[..^1].Trim(' ', '_', '-', ':', ',', '/'), LogUnits.TryParse(text[^1..], out LogUnit mark) ? mark : null, null);
        if (ColumnNames.TryFind(text, out _, out int rank) && rank < ColumnNames.BehindPrefix)
            return new(text, null, null);
        return SplitAtWords(text) ?? new(text, null, null);
    }

    // The last one to three words as unit, when what is left is a known name and the unit fits its role.
    private static HeaderName? SplitAtWords(string text)
    {
        int end = text.Length;
        for (int words = 0; words < 3; words++)
        {
            int start = LastWord(text, end);
            if (start <= 0)
                return null;
            string name = text[..start].TrimEnd(' ', '_', '-', ':', ',', '/', '.');
            if (name.EndsWith(" in", StringComparison.OrdinalIgnoreCase))
                name = name[..^3];
            string unitText = UnitWords(text[start..].TrimStart(' ', '_', '-', ':', ','));
            if (LogUnits.TryParse(unitText, out LogUnit unit) && (ColumnNames.TryFind(name, out ColumnName found, out _)
                ? LogUnits.Fits(found.Role, unit) || OtherRole(found.Role, unit) is not null
                : unit.Quantity == Quantity.Time && ColumnNames.IsWeekTime(name)))
            {
                return new(name, unit, null);
            }
            end = start;
        }
        return null;
    }

    // "m s", "rad_s", "RadS": the words of a unit are its quotient.
    private static string UnitWords(string text)
    {
        var unit = new System.Text.StringBuilder(text.Length + 2);
        for (int i = 0; i < text.Length; i++)
        {
            if (i > 0 && char.IsUpper(text[i]) && char.IsLower(text[i - 1]))
                unit.Append('/');
            unit.Append(text[i] is ' ' or '_' ? '/' : text[i]);
        }
        return unit.ToString();
    }

    /// <summary>The role a name has when its unit is of another kind: a "yaw" in deg/s is a yaw rate.</summary>
    public static ChannelRole? OtherRole(ChannelRole role, LogUnit unit) => (role, unit.Quantity) switch
    {
        (ChannelRole.Heading, Quantity.AngularRate) => ChannelRole.YawRate,
        (ChannelRole.Roll, Quantity.AngularRate) => ChannelRole.RollRate,
        (ChannelRole.Rpm, Quantity.Fraction) => ChannelRole.Throttle,
        _ => null,
    };

    private static int LastWord(string text, int end)
    {
        for (int i = end - 1; i > 0; i--)
        {
            if (text[i] is '_' or ' ' or ',' or ':')
                return i;
            if (char.IsUpper(text[i]) && char.IsLower(text[i - 1]))
                return i;
        }
        return 0;
    }
}
