using System.Globalization;
using System.Text;
using Tomlyn;
using Tomlyn.Parsing;
using Tomlyn.Syntax;
using static System.FormattableString;

namespace TrimFit.Simulation;

/// <summary>Reads a scenario file. Every fault is reported with its line; nothing is guessed.</summary>
internal static class ScenarioReader
{
    private const int MaxNearest = 3; // letters a misspelt key may be off by to be offered another

    public static Scenario Read(string fileName, string toml, Func<string, string?>? fileText)
    {
        ArgumentNullException.ThrowIfNull(fileName);
        ArgumentNullException.ThrowIfNull(toml);
        var faults = new List<string>();
        DocumentSyntax document;
        try
        {
            document = SyntaxParser.Parse(toml.TrimStart('\uFEFF'), fileName, validate: true);
        }
        catch (TomlException fault)
        {
            throw new ScenarioFormatException(Invariant($"{fileName}: this is not TOML: {fault.Message}"), fault);
        }
        foreach (DiagnosticMessage message in document.Diagnostics)
        {
            if (message.Kind == DiagnosticMessageKind.Error)
                faults.Add(Invariant($"{fileName}({message.Span.Start.Line + 1}): this is not TOML: {message.Message}"));
        }
        Stop(faults);

        Scenario s = new();
        string? schema = null;
        foreach (KeyValueSyntax item in document.KeyValues)
        {
            if (NameOf(item.Key!) == "schema" && item.Value is StringValueSyntax word)
                schema = word.Value;
            else
                s = Apply(ScenarioKeys.Tables[""], "", s, item, fileName, faults);
        }
        if (schema != Scenario.Schema)
        {
            string found = schema is null ? "no schema" : Invariant($"schema \"{schema}\"");
            faults.Add(Invariant($"{fileName}(1): found {found}, expected schema = \"{Scenario.Schema}\" at the top."));
        }
        var legs = new List<FlightLeg>();
        (string Name, int Line)? card = null;
        foreach (TableSyntaxBase table in document.Tables)
        {
            string name = NameOf(table.Name!);
            int line = table.Span.Start.Line + 1;
            if (name == "leg" && table is TableArraySyntax)
            {
                FlightLeg leg = new();
                foreach (KeyValueSyntax item in table.Items)
                    leg = Apply(ScenarioKeys.Leg, "leg", leg, item, fileName, faults);
                legs.Add(leg);
            }
            else if (name == "flight" && table is TableSyntax)
            {
                foreach (KeyValueSyntax item in table.Items)
                {
                    int at = item.Span.Start.Line + 1;
                    if (NameOf(item.Key!) != "card")
                        faults.Add(Invariant($"{fileName}({at}): unknown key \"{NameOf(item.Key!)}\" in [flight].{Nearest(NameOf(item.Key!), ["card"])}"));
                    else if (item.Value is StringValueSyntax { Value: { Length: > 0 } file })
                        card = (file, at);
                    else
                        faults.Add(Invariant($"{fileName}({at}): card = {item.Value!.ToString().Trim()}: expected the name of a test card's file."));
                }
            }
            else if (table is TableSyntax && name.Length > 0 && ScenarioKeys.Tables.TryGetValue(name, out Dictionary<string, ScenarioKey<Scenario>>? keys))
            {
                foreach (KeyValueSyntax item in table.Items)
                    s = Apply(keys, name, s, item, fileName, faults);
            }
            else
            {
                string near = name == "leg"
                    ? " Write [[leg]], once for each leg."
                    : Nearest(name, ScenarioKeys.Tables.Keys.Append("leg").Append("flight"));
                faults.Add(Invariant($"{fileName}({line}): unknown table [{name}].{near}"));
            }
        }
        if (card is { } both && legs.Count > 0)
            faults.Add(Invariant($"{fileName}({both.Line}): a card beside [[leg]]; expected one of the two."));
        string? text = card is { } wanted ? fileText?.Invoke(wanted.Name) : null;
        if (card is { } missing && text is null)
            faults.Add(Invariant($"{fileName}({missing.Line}): the test card \"{missing.Name}\" cannot be read. Name it as it lies beside the scenario."));
        Stop(faults);
        // The whole scenario is known now: heading and brake travel may stand below the card.
        return text is null ? s with { Legs = [.. legs] } : s with { Legs = CardFile.Legs(card!.Value.Name, text, s.Start.HeadingRad, s.Brakes.FullTravelM) };
    }

    private static T Apply<T>(Dictionary<string, ScenarioKey<T>> keys, string table, T target, KeyValueSyntax item, string fileName, List<string> faults)
    {
        string name = NameOf(item.Key!);
        int line = item.Span.Start.Line + 1;
        string where = table.Length == 0 ? "" : table == "leg" ? " in [[leg]]" : Invariant($" in [{table}]");
        if (!keys.TryGetValue(name, out ScenarioKey<T>? key))
        {
            faults.Add(Invariant($"{fileName}({line}): unknown key \"{name}\"{where}.{Nearest(name, keys.Keys)}"));
            return target;
        }
        object? value = item.Value switch
        {
            IntegerValueSyntax integer => (double)integer.Value,
            FloatValueSyntax real => real.Value,
            BooleanValueSyntax flag => flag.Value,
            StringValueSyntax text => text.Value,
            _ => null,
        };
        try
        {
            if (value is not null && key.TrySet(target, value, out T changed))
                return changed;
            faults.Add(Invariant($"{fileName}({line}): {name} = {item.Value!.ToString().Trim()}: expected {key.Expected}."));
        }
        catch (ArgumentOutOfRangeException fault)
        {
            string rule = fault.Message.Split(" (Parameter", 2)[0];
            faults.Add(Invariant($"{fileName}({line}): {name} = {item.Value!.ToString().Trim()}: {rule}."));
        }
        return target;
    }

    private static string NameOf(KeySyntax key)
    {
        var name = new StringBuilder(Part(key.Key!));
        foreach (DottedKeyItemSyntax dot in key.DotKeys)
            name.Append('.').Append(Part(dot.Key!));
        return name.ToString();

        static string Part(BareKeyOrStringValueSyntax part) =>
            part is StringValueSyntax quoted ? quoted.Value ?? "" : ((BareKeySyntax)part).Key?.Text?.Trim() ?? "";
    }

    private static string Nearest(string name, IEnumerable<string> known)
    {
        string? best = known.Where(k => k.Length > 0).MinBy(k => Distance(name, k));
        return best is not null && Distance(name, best) <= MaxNearest ? Invariant($" Did you mean \"{best}\"?") : "";
    }

    /// <summary>Edit distance (Levenshtein 1966).</summary>
    private static int Distance(string a, string b)
    {
        int[] row = [.. Enumerable.Range(0, b.Length + 1)];
        for (int i = 1; i <= a.Length; i++)
        {
            int diagonal = row[0];
            row[0] = i;
            for (int j = 1; j <= b.Length; j++)
            {
                int cost = Math.Min(Math.Min(row[j] + 1, row[j - 1] + 1), diagonal + (a[i - 1] == b[j - 1] ? 0 : 1));
                diagonal = row[j];
                row[j] = cost;
            }
        }
        return row[b.Length];
    }

    private static void Stop(List<string> faults)
    {
        if (faults.Count > 0)
            throw new ScenarioFormatException(string.Join('\n', faults));
    }
}

/// <summary>One key of a scenario file: what it expects and how it is set.</summary>
internal sealed record ScenarioKey<T>(string Expected, Func<T, object, (bool Ok, T Changed)> Set)
{
    public bool TrySet(T target, object value, out T changed)
    {
        (bool ok, changed) = Set(target, value);
        return ok;
    }

    public static ScenarioKey<T> Number(double unit, Func<T, double, T> set) =>
        new("a number", (target, value) => value is double number ? (true, set(target, number * unit)) : (false, target));

    public static ScenarioKey<T> Whole(Func<T, int, T> set) => new("a whole number", (target, value) =>
        value is double number && number == Math.Floor(number) && Math.Abs(number) < int.MaxValue ? (true, set(target, (int)number)) : (false, target));

    public static ScenarioKey<T> Flag(Func<T, bool, T> set) =>
        new("true or false", (target, value) => value is bool flag ? (true, set(target, flag)) : (false, target));

    public static ScenarioKey<T> Text(Func<T, string, T> set) =>
        new("text in quotes", (target, value) => value is string text ? (true, set(target, text)) : (false, target));

    public static ScenarioKey<T> Word<TWord>(Dictionary<string, TWord> words, Func<T, TWord, T> set)
    {
        string expected = "one of " + string.Join(", ", words.Keys.Select(k => $"\"{k}\""));
        return new(expected, (target, value) => value is string text && words.TryGetValue(text, out TWord? word) ? (true, set(target, word)) : (false, target));
    }

    public static ScenarioKey<T> Moment(Func<T, DateTimeOffset, T> set) => new("a time such as \"2025-05-17T08:00:00Z\"", (target, value) =>
        value is string text && DateTimeOffset.TryParse(text, CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out DateTimeOffset time)
            ? (true, set(target, time))
            : (false, target));
}
