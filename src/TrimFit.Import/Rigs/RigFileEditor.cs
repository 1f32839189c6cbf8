using Tomlyn.Parsing;
using Tomlyn.Syntax;

namespace TrimFit.Import.Rigs;

/// <summary>Writes readings into the text of a rig file: order, comments and line ends stay, an earlier value stays as a comment.</summary>
public static class RigFileEditor
{
    /// <summary>The text with the readings in it.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="text">A rig file that reads without faults.</param>
    /// <param name="readings">What was measured.</param>
    /// <exception cref="LogFormatException">A table is written in a form that cannot be edited line by line.</exception>
    public static string Write(string fileName, string text, GroundReadings readings)
    {
        ArgumentNullException.ThrowIfNull(fileName);
        ArgumentNullException.ThrowIfNull(text);
        ArgumentNullException.ThrowIfNull(readings);
        string name = Path.GetFileName(fileName);
        MeasuredKey[] keys = [.. readings.Keys];
        HashSet<string> written = [.. keys.Select(k => k.Name)];
        foreach (string old in keys.SelectMany(k => k.Supersedes).Where(s => !written.Contains(s)).Distinct())
        {
            int dot = old.IndexOf('.', StringComparison.Ordinal);
            text = Edit(name, text, old[..dot], old[(dot + 1)..], null);
        }
        foreach (MeasuredKey key in keys)
            text = Edit(name, text, key.Table, key.Key, readings.Toml(key));
        return text;
    }

    /// <summary>The text with its hang check as comments: after a change it says where the weight sat before.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="text">A rig file that reads without faults.</param>
    /// <exception cref="LogFormatException">The table is written in a form that cannot be edited line by line.</exception>
    public static string WithoutHangCheck(string fileName, string text)
    {
        ArgumentNullException.ThrowIfNull(fileName);
        ArgumentNullException.ThrowIfNull(text);
        if (text.StartsWith('\uFEFF'))
            return '\uFEFF' + WithoutHangCheck(fileName, text[1..]);
        DocumentSyntax document = SyntaxParser.Parse(text.ReplaceLineEndings("\n"), fileName, validate: true);
        string[] keys = [.. document.Tables.Where(t => t is TableSyntax && t.Name?.ToString().Trim() == "hang_check").SelectMany(t => t.Items).Select(i => i.Key!.ToString().Trim())];
        foreach (string key in keys)
            text = Edit(Path.GetFileName(fileName), text, "hang_check", key, null);
        // The table's own line goes too: an empty hang check is a fault. Earlier lines were replaced one by one, so its place is found anew.
        string newline = text.Contains("\r\n", StringComparison.Ordinal) ? "\r\n" : "\n";
        string[] lines = text.ReplaceLineEndings("\n").Split('\n');
        foreach (TableSyntaxBase table in SyntaxParser.Parse(string.Join('\n', lines), fileName, validate: true).Tables.Where(t => t is TableSyntax && t.Name?.ToString().Trim() == "hang_check"))
            lines[table.Name!.Span.Start.Line] = "# before: " + lines[table.Name!.Span.Start.Line].Trim();
        return string.Join(newline, lines);
    }

    /// <summary>Sets one key, or takes it out when the value is null; nothing stays of the earlier line.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="text">The rig file.</param>
    /// <param name="table">Table; empty for the top of the file.</param>
    /// <param name="key">Key in it.</param>
    /// <param name="toml">The value as TOML, or null.</param>
    /// <exception cref="LogFormatException">The table is written in a form that cannot be edited line by line.</exception>
    public static string Set(string fileName, string text, string table, string key, string? toml) => Edit(Path.GetFileName(fileName), text, table, key, toml, keepEarlier: false);

    /// <summary>Sets one key, or takes it out when the value is null; either way the earlier line stays as a comment.</summary>
    private static string Edit(string file, string text, string tableName, string key, string? value, bool keepEarlier = true)
    {
        string newline = text.Contains("\r\n", StringComparison.Ordinal) ? "\r\n" : "\n";
        bool mark = text.StartsWith('\uFEFF');
        string body = mark ? text[1..] : text;
        List<string> lines = [.. body.ReplaceLineEndings("\n").Split('\n')];
        DocumentSyntax document = SyntaxParser.Parse(string.Join('\n', lines), file, validate: true);
        TableSyntaxBase? table = document.Tables.FirstOrDefault(t => t is TableSyntax && t.Name?.ToString().Trim() == tableName);
        if (table is null && document.KeyValues.FirstOrDefault(k => FirstName(k) == tableName) is KeyValueSyntax inline)
        {
            throw LogFormatException.At(file, inline.Span.Start.Line + 1, null, $"{tableName} written in one line", $"a line [{tableName}] with its keys below it",
                "Write it so, then measure again.");
        }
        IEnumerable<KeyValueSyntax> items = tableName.Length == 0 ? document.KeyValues : table?.Items.AsEnumerable() ?? [];
        if (items.FirstOrDefault(k => k.Key!.ToString().Trim() == key) is KeyValueSyntax item)
        {
            int first = item.Key!.Span.Start.Line, last = item.Value!.Span.End.Line;
            string indent = lines[first][..(lines[first].Length - lines[first].TrimStart().Length)];
            string rest = lines[last][Math.Min(lines[last].Length, item.Value.Span.End.Column + 1)..].TrimEnd();
            string old = string.Concat(lines.GetRange(first, last - first + 1))[item.Value.Span.Start.Column..];
            if (value is not null && SameValue(old[..(old.Length - (lines[last].Length - Math.Min(lines[last].Length, item.Value.Span.End.Column + 1)))], value))
                return text;
            IEnumerable<string> kept = !keepEarlier ? [] : lines.GetRange(first, last - first + 1).Select((l, i) => i == 0 ? $"{indent}# before: {l.Trim()}" : $"{indent}#   {l.Trim()}");
            lines.RemoveRange(first, last - first + 1);
            lines.InsertRange(first, value is null ? kept : [.. kept, $"{indent}{key} = {value}{rest}"]);
        }
        else if (value is null)
        {
            return text;
        }
        else if (tableName.Length == 0)
        {
            lines.Insert(document.KeyValues.Any() ? document.KeyValues.Max(i => i.Value!.Span.End.Line) + 1 : 0, $"{key} = {value}");
        }
        else if (table is not null)
        {
            int after = table.Items.Any() ? table.Items.Max(i => i.Value!.Span.End.Line) : table.Span.Start.Line;
            lines.Insert(after + 1, $"{key} = {value}");
        }
        else
        {
            while (lines.Count > 0 && lines[^1].Trim().Length == 0)
                lines.RemoveAt(lines.Count - 1);
            lines.AddRange(["", $"[{tableName}]", $"{key} = {value}", ""]);
        }
        return (mark ? "\uFEFF" : "") + string.Join(newline, lines);
    }

    private static string FirstName(KeyValueSyntax item) => item.Key!.Key!.ToString().Trim();

    private static bool SameValue(string old, string value) =>
        string.Concat(old.Where(c => !char.IsWhiteSpace(c))) == string.Concat(value.Where(c => !char.IsWhiteSpace(c)));
}
