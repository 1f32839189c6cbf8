using System.Globalization;
using System.Text.RegularExpressions;
using Tomlyn;
using Tomlyn.Parsing;
using Tomlyn.Syntax;

namespace TrimFit.Import.Toml;

/// <summary>A TOML file as plain values that remember their lines, so that every message can name one.</summary>
/// <remarks>Built from the syntax tree: mapping to objects would lose the lines and would need reflection.</remarks>
internal static partial class TomlDocument
{
    /// <summary>Reads the text; faults of syntax go to <paramref name="faults"/> and stop the reading, since what follows them is guesswork.</summary>
    public static TomlTable Read(string text, FaultList faults)
    {
        var root = new TomlTable("", 1, []);
        if (text.StartsWith('\uFEFF'))
            text = text[1..];
        DocumentSyntax document;
        try
        {
            document = SyntaxParser.Parse(text, faults.File, validate: true);
        }
        catch (TomlException)
        {
            faults.Add(null, "the file nests too deeply to be a settings file. Write it again from the example.");
            return root;
        }
        if (document.HasErrors)
        {
            string[] lines = text.ReplaceLineEndings("\n").Split('\n');
            foreach (DiagnosticMessage message in document.Diagnostics.DistinctBy(d => d.Span.Start.Line).Take(1))
                faults.Add(message.Span.Start.Line + 1, Explain(message.Message, lines.ElementAtOrDefault(message.Span.Start.Line) ?? ""));
            return root;
        }
        foreach (KeyValueSyntax item in document.KeyValues)
            Put(root, item, faults);
        foreach (TableSyntaxBase table in document.Tables)
        {
            if (Open(root, Names(table.Name!), table.Span.Start.Line + 1, table is TableArraySyntax, faults) is not TomlTable target)
                continue;
            foreach (KeyValueSyntax item in table.Items)
                Put(target, item, faults);
        }
        return root;
    }

    private static void Put(TomlTable table, KeyValueSyntax item, FaultList faults)
    {
        string[] names = Names(item.Key!);
        int line = item.Key!.Span.Start.Line + 1;
        TomlTable? target = names.Length == 1 ? table : Open(table, names[..^1], line, array: false, faults);
        target?.Items.Add(new(names[^1], line, Value(item.Value!, names[^1], line, faults)));
    }

    private static TomlTable? Open(TomlTable root, string[] names, int line, bool array, FaultList faults)
    {
        TomlTable table = root;
        for (int i = 0; i < names.Length; i++)
        {
            string name = names[i];
            bool append = array && i == names.Length - 1;
            object? existing = table.Items.Find(item => item.Key == name)?.Value;
            if (existing is null)
            {
                var next = new TomlTable(table.Path.Length == 0 ? name : table.Path + "." + name, line, []);
                table.Items.Add(new(name, line, append ? new TomlList([next]) : next));
                table = next;
            }
            else if (existing is TomlList list && list.Items is [.., TomlTable last])
            {
                if (append)
                    list.Items.Add(last = new TomlTable(last.Path, line, []));
                table = last;
            }
            else if (existing is TomlTable found && !append)
            {
                table = found;
            }
            else
            {
                faults.Add(line, $"\"{name}\" is used both as a value and as a table. Keep one of the two.");
                return null;
            }
        }
        return table;
    }

    private static string[] Names(KeySyntax key) => [Name(key.Key!), .. key.DotKeys.Select(dot => Name(dot.Key!))];

    private static string Name(BareKeyOrStringValueSyntax part) =>
        part is StringValueSyntax quoted ? quoted.Value ?? "" : ((BareKeySyntax)part).Key?.Text?.Trim() ?? "";

    private static object Value(ValueSyntax value, string name, int line, FaultList faults)
    {
        switch (value)
        {
            case StringValueSyntax text:
                return text.Value ?? "";
            case IntegerValueSyntax integer:
                return (double)integer.Value;
            case FloatValueSyntax number:
                return number.Value;
            case BooleanValueSyntax boolean:
                return boolean.Value;
            case ArraySyntax array:
                return new TomlList([.. array.Items.Select(item => Value(item.Value!, name, line, faults))]);
            case InlineTableSyntax inline:
                var table = new TomlTable(name, line, []);
                foreach (InlineTableItemSyntax item in inline.Items)
                    Put(table, item.KeyValue!, faults);
                return table;
            default: // dates and times stay as written; the reader of the key knows what it wants
                return new TomlMoment(value.ToString().Trim());
        }
    }

    private static string Explain(string parserMessage, string line)
    {
        string shown = Shown(line);
        if (AlreadyDefined().Match(parserMessage) is { Success: true } twice)
            return $"\"{twice.Groups[1].Value}\" is given a second time, first on line {twice.Groups[2].Value}. Keep one of the two.";
        if (DecimalComma().Match(line) is { Success: true } comma)
            return $"found {comma.Groups[1].Value}, expected a number with a decimal point. Write {comma.Groups[1].Value.Replace(',', '.')}.";
        if (BareWord().Match(line) is { Success: true } word)
            return $"found the word {word.Groups[2].Value} without quotes, expected a value. Write {word.Groups[1].Value} = \"{word.Groups[2].Value}\".";
        return $"found \"{shown}\", which is not TOML, expected a line such as key = 12.5 or [table]. Correct the line; text stands in straight quotes.";
    }

    private static string Shown(string line)
    {
        string clean = new([.. line.Trim().Select(c => char.IsControl(c) ? '?' : c)]);
        return clean.Length > 60 ? clean[..60] + "…" : clean;
    }

    [GeneratedRegex(@"^The key `(.+)` is already defined at \(([0-9]+),", RegexOptions.CultureInvariant)]
    private static partial Regex AlreadyDefined();

    [GeneratedRegex(@"^\s*[A-Za-z0-9_.\-]+\s*=\s*([-+]?[0-9]+,[0-9]+)\s*(#.*)?$", RegexOptions.CultureInvariant)]
    private static partial Regex DecimalComma();

    [GeneratedRegex(@"^\s*([A-Za-z0-9_.\-]+)\s*=\s*([A-Za-z][A-Za-z0-9_\-]*)\s*(#.*)?$", RegexOptions.CultureInvariant)]
    private static partial Regex BareWord();
}

/// <summary>A table: its dotted path (empty for the file itself), the line of its header, and its keys in the file's order.</summary>
internal sealed record TomlTable(string Path, int Line, List<TomlItem> Items)
{
    /// <summary>The table in messages, such as <c>[mass]</c>.</summary>
    public string Label => Path.Length == 0 ? "the top of the file" : $"[{Path}]";
}

/// <summary>One key with its line. The value is a double, string, bool, <see cref="TomlMoment"/>, <see cref="TomlList"/> or <see cref="TomlTable"/>.</summary>
internal sealed record TomlItem(string Key, int Line, object Value)
{
    /// <summary>The value as messages show it.</summary>
    public string Found => Describe(Value);

    public static string Describe(object value) => value switch
    {
        double number => number.ToString("R", CultureInfo.InvariantCulture),
        string text => $"\"{text}\"",
        bool flag => flag ? "true" : "false",
        TomlMoment moment => moment.Text,
        TomlList { Items.Count: 0 } => "an empty list",
        TomlList => "a list",
        _ => "a table",
    };
}

/// <summary>A date, a time, or both, as written.</summary>
internal sealed record TomlMoment(string Text);

/// <summary>A list of values or of tables.</summary>
internal sealed record TomlList(List<object> Items);
