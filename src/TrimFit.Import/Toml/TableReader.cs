using System.Globalization;

namespace TrimFit.Import.Toml;

/// <summary>Takes known keys out of one table and names every fault; what is left at the end is unknown.</summary>
internal sealed class TableReader(TomlTable? table, string name, FaultList faults)
{
    private readonly HashSet<string> _asked = [];

    /// <summary>Whether the file has the table at all.</summary>
    public bool Exists => table is not null;

    /// <summary>Whether the table holds a key; one whose readings were all taken out again is as good as none.</summary>
    public bool HasItems => table?.Items.Count > 0;

    /// <summary>The table in messages, such as <c>[mass]</c>.</summary>
    public string Label => table?.Label ?? $"[{name}]";

    /// <summary>Line of the table's header; null when the table is missing.</summary>
    public int? Line => table?.Line;

    /// <summary>Keys the reader has asked for.</summary>
    public IEnumerable<string> Known => _asked;

    /// <summary>The item of a key, or null.</summary>
    public TomlItem? Item(string key)
    {
        _asked.Add(key);
        return table?.Items.Find(item => item.Key == key);
    }

    /// <summary>Line of a key, or of the table without it.</summary>
    public int? LineOf(string key) => Item(key)?.Line ?? Line;

    /// <summary>A text; null when missing.</summary>
    public string? Text(string key, string example)
    {
        TomlItem? item = Item(key);
        if (item is null)
            return null;
        if (item.Value is string text)
            return text;
        faults.Add(item.Line, $"{item.Found} for {key}", "text in quotes", $"Write {key} = \"{example}\".");
        return null;
    }

    /// <summary>One of several words; null when missing or wrong.</summary>
    public T? Word<T>(string key, params (string Word, T Value)[] words)
        where T : struct
    {
        TomlItem? item = Item(key);
        if (item is null)
            return null;
        foreach ((string word, T value) in words)
        {
            if (item.Value is string text && text == word)
                return value;
        }
        string near = item.Value is string wrong && NearestWord.Find(wrong, words.Select(w => w.Word)) is string nearest ? nearest : words[0].Word;
        faults.Add(item.Line, $"{item.Found} for {key}", OneOf(words.Select(w => w.Word)), $"Write {key} = \"{near}\" if that is what it is.");
        return null;
    }

    /// <summary>A plain number inside a range; null when missing or wrong.</summary>
    public double? Number(string key, NumberRange range)
    {
        TomlItem? item = Item(key);
        return item is null ? null : Checked(item, item.Value, key, range);
    }

    /// <summary>A value as a number inside a range, or a fault.</summary>
    public double? Checked(TomlItem item, object value, string key, NumberRange range)
    {
        if (value is double number && number >= range.Min && number <= range.Max)
            return number;
        faults.Add(item.Line, $"{TomlItem.Describe(value)} for {key}", range.Words, range.Remedy);
        return null;
    }

    /// <summary>Names keys nobody asked for, with the nearest known one of this table or the right table.</summary>
    public void ReportUnknown(Func<string, string?>? elsewhere = null)
    {
        if (table is null)
            return;
        foreach (TomlItem item in table.Items.Where(item => !_asked.Contains(item.Key)))
        {
            string what = item.Value is TomlTable or TomlList { Items: [TomlTable, ..] } && table.Path.Length == 0
                ? $"unknown table [{item.Key}]"
                : $"unknown key \"{item.Key}\" {(table.Path.Length == 0 ? "at" : "in")} {Label}";
            string hint = elsewhere?.Invoke(item.Key) is string other ? $"; it belongs in [{other}]."
                : NearestWord.Find(item.Key, _asked) is string near ? what.StartsWith("unknown table", StringComparison.Ordinal) ? $"; did you mean [{near}]?" : $"; did you mean \"{near}\"?"
                : $". Known here: {string.Join(", ", _asked.Order(StringComparer.Ordinal))}.";
            faults.Add(item.Line, what + hint);
        }
    }

    private static string OneOf(IEnumerable<string> words)
    {
        string[] quoted = [.. words.Select(w => $"\"{w}\"")];
        return quoted.Length == 1 ? quoted[0] : string.Join(", ", quoted[..^1]) + " or " + quoted[^1];
    }
}

/// <summary>What a key's number may be, both ends included.</summary>
/// <param name="Min">Smallest.</param>
/// <param name="Max">Largest.</param>
/// <param name="Unit">Unit in messages; empty for none.</param>
/// <param name="Remedy">What to do about a number outside.</param>
internal sealed record NumberRange(double Min, double Max, string Unit, string Remedy)
{
    public string Words => string.Create(CultureInfo.InvariantCulture, $"a number from {Min} to {Max}{(Unit.Length == 0 ? "" : " ")}{Unit}");
}
