using System.Collections.Immutable;
using System.Globalization;
using TrimFit.Import.Toml;

namespace TrimFit.Import.Rigs;

/// <summary>Readings taken on the ground, on their way into a rig file.</summary>
public sealed class GroundReadings
{
    private readonly Dictionary<MeasuredKey, ImmutableArray<double>> _numbers = [];
    private readonly Dictionary<MeasuredKey, string> _words = [];

    /// <summary>Keys with a reading, in the order of <see cref="MeasuredKey.All"/>.</summary>
    public IEnumerable<MeasuredKey> Keys => MeasuredKey.All.Where(k => _numbers.ContainsKey(k) || _words.ContainsKey(k));

    /// <summary>Whether there is none.</summary>
    public bool IsEmpty => _numbers.Count == 0 && _words.Count == 0;

    /// <summary>The repeats by <c>table.key</c>, unit of the key.</summary>
    public IReadOnlyDictionary<string, ImmutableArray<double>> Repeats => _numbers.ToDictionary(n => n.Key.Name, n => n.Value);

    /// <summary>Adds repeats; a later call takes the place of an earlier one.</summary>
    public void Set(MeasuredKey key, ImmutableArray<double> repeats)
    {
        ArgumentNullException.ThrowIfNull(key);
        ArgumentOutOfRangeException.ThrowIfZero(repeats.Length);
        _numbers[key] = repeats;
    }

    /// <summary>Adds a word; a later call takes the place of an earlier one.</summary>
    public void Set(MeasuredKey key, string word)
    {
        ArgumentNullException.ThrowIfNull(key);
        _words[key] = word;
    }

    /// <summary>Adds all readings of another set; they take the place of earlier ones.</summary>
    public void Add(GroundReadings other)
    {
        ArgumentNullException.ThrowIfNull(other);
        foreach ((MeasuredKey key, ImmutableArray<double> values) in other._numbers)
            _numbers[key] = values;
        foreach ((MeasuredKey key, string word) in other._words)
            _words[key] = word;
    }

    /// <summary>The value as TOML.</summary>
    internal string Toml(MeasuredKey key)
    {
        if (_words.TryGetValue(key, out string? word))
            return $"\"{word}\"";
        string[] numbers = [.. _numbers[key].Select(v => v.ToString("R", CultureInfo.InvariantCulture))];
        return numbers.Length == 1 ? numbers[0] : "[" + string.Join(", ", numbers) + "]";
    }

    /// <summary>Reads one value as text: numbers with a comma between them, or one of the words.</summary>
    /// <returns>Null when it was taken; else what is wrong with it: found, expected.</returns>
    public string? TrySet(MeasuredKey key, string text)
    {
        ArgumentNullException.ThrowIfNull(key);
        ArgumentNullException.ThrowIfNull(text);
        if (!key.Words.IsEmpty)
        {
            string word = text.Trim();
            if (!key.Words.Contains(word))
                return $"found \"{word}\" for {key.Name}, expected {string.Join(" or ", key.Words)}.";
            Set(key, word);
            return null;
        }
        var values = ImmutableArray.CreateBuilder<double>();
        foreach (string part in text.Split(',', StringSplitOptions.TrimEntries))
        {
            if (!double.TryParse(part, NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double value))
                return $"found \"{part}\" for {key.Name}, expected numbers with a decimal point and a comma between repeats, such as 56.3,56.1,56.5.";
            values.Add(value);
        }
        Set(key, values.ToImmutable());
        return null;
    }

    /// <summary>Reads a readings file: TOML with the tables and keys of the rig file that are measured.</summary>
    /// <exception cref="LogFormatException">The text has faults; the message has a line for each.</exception>
    public void AddFile(string fileName, string tomlText)
    {
        ArgumentNullException.ThrowIfNull(fileName);
        ArgumentNullException.ThrowIfNull(tomlText);
        var faults = new FaultList(Path.GetFileName(fileName));
        TomlTable root = TomlDocument.Read(tomlText, faults);
        faults.ThrowIfAny();
        foreach (TomlItem item in root.Items.Where(i => i.Key != "schema"))
        {
            if (item.Value is not TomlTable table)
            {
                faults.Add(item.Line, $"{item.Found} for {item.Key}", "a table of the rig file, such as [hang_check]", "Write a line [hang_check] and the readings below it.");
                continue;
            }
            foreach (TomlItem reading in table.Items)
                Add(table, reading, faults);
        }
        faults.ThrowIfAny();
    }

    private void Add(TomlTable table, TomlItem item, FaultList faults)
    {
        string name = table.Path + "." + item.Key;
        if (MeasuredKey.All.FirstOrDefault(k => k.Name == name) is not MeasuredKey key)
        {
            string hint = NearestWord.Find(name, MeasuredKey.All.Select(k => k.Name)) is string near ? $" Did you mean {near}?" : "";
            faults.Add(item.Line, $"{name} is not a reading that is taken on the ground.{hint}");
            return;
        }
        switch (item.Value)
        {
            case double number:
                Set(key, [number]);
                break;
            case string word when key.Words.Contains(word):
                Set(key, word);
                break;
            case TomlList list when list.Items.Count > 0 && list.Items.All(v => v is double):
                Set(key, [.. list.Items.Cast<double>()]);
                break;
            default:
                string expected = key.Words.IsEmpty ? "a number or a list of repeats" : string.Join(" or ", key.Words);
                faults.Add(item.Line, $"{item.Found} for {name}", expected, key.Words.IsEmpty ? $"Write {item.Key} = [1.0, 1.1, 1.0]." : $"Write {item.Key} = \"{key.Words[0]}\" if that is what it is.");
                break;
        }
    }
}
