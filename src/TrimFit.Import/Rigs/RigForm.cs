using System.Collections.Immutable;
using System.Globalization;
using TrimFit.Core.Rigging;
using TrimFit.Import.Toml;

namespace TrimFit.Import.Rigs;

/// <summary>A rig file as a form: texts out of it, texts back into it, and each fault with the field it belongs to.</summary>
/// <remarks>A number is written with a decimal point. Repeats stand behind one another with a space or semicolon between them, never a comma: <c>12,5</c>
/// would be two readings. <c>10 ± 2</c> gives half of the 95 % range.</remarks>
public static class RigForm
{
    /// <summary>An empty rig file.</summary>
    public const string Empty = $"schema = \"{RigFileReader.Schema}\"\n";

    /// <summary>What each field of <see cref="RigField.All"/> says now; a field the file lacks is missing.</summary>
    /// <param name="fileName">Name for messages.</param>
    /// <param name="text">The rig file.</param>
    /// <exception cref="LogFormatException">The text is no TOML.</exception>
    public static IReadOnlyDictionary<string, string> Values(string fileName, string text)
    {
        TomlTable root = Parse(fileName, text);
        var values = new Dictionary<string, string>();
        foreach (RigField field in RigField.All)
        {
            TomlTable? table = field.Table.Length == 0 ? root : root.Items.Find(i => i.Key == field.Table)?.Value as TomlTable;
            if (table?.Items.Find(i => i.Key == field.Key) is TomlItem item && Shown(item.Value) is string shown)
                values[field.Name] = shown;
        }
        return values;
    }

    /// <summary>The file with the fields in it; an empty field is taken out, everything else stays as it is.</summary>
    /// <param name="fileName">Name for messages.</param>
    /// <param name="text">The rig file.</param>
    /// <param name="values">Texts by <see cref="RigField.Name"/>; a field that is missing stays as it is.</param>
    /// <param name="faults">Texts that are no value of their field; their fields stay as they were.</param>
    /// <exception cref="LogFormatException">The text is no TOML, or is written in a form that cannot be edited line by line.</exception>
    public static string Write(string fileName, string text, IReadOnlyDictionary<string, string> values, out ImmutableArray<RigFault> faults)
    {
        ArgumentNullException.ThrowIfNull(values);
        IReadOnlyDictionary<string, string> before = Values(fileName, text);
        var wrong = ImmutableArray.CreateBuilder<RigFault>();
        foreach (RigField field in RigField.All)
        {
            if (!values.TryGetValue(field.Name, out string? told) || told.Trim() == before.GetValueOrDefault(field.Name, ""))
                continue;
            string? toml = null;
            if (told.Trim().Length > 0 && !TryToml(field, told.Trim(), out toml, out string problem))
                wrong.Add(new(field.Name, problem));
            else
                text = RigFileEditor.Set(fileName, text, field.Table, field.Key, toml);
        }
        faults = wrong.ToImmutable();
        return text;
    }

    /// <summary>Reads the file and says which field each fault belongs to.</summary>
    /// <param name="fileName">Name for messages.</param>
    /// <param name="text">The rig file.</param>
    /// <param name="rig">The rig; null beside a fault.</param>
    public static ImmutableArray<RigFault> Check(string fileName, string text, out Rig? rig)
    {
        rig = null;
        var faults = new FaultList(Path.GetFileName(fileName));
        TomlTable root = TomlDocument.Read(text, faults);
        if (!faults.Any)
            SchemaLine.Check(root, RigFileReader.Schema, faults);
        if (!faults.Any)
            rig = new RigTables(root, faults).Read();
        if (faults.Any)
            rig = null;
        return [.. faults.All.Select(f => new RigFault(FieldOf(root, f.Line, f.Message), f.Message))];
    }

    private static TomlTable Parse(string fileName, string text)
    {
        var faults = new FaultList(Path.GetFileName(fileName));
        TomlTable root = TomlDocument.Read(text, faults);
        faults.ThrowIfAny();
        return root;
    }

    /// <summary>The key on the fault's line; a missing key is named in the message of its table.</summary>
    private static string? FieldOf(TomlTable root, int? line, string message)
    {
        foreach (RigField field in RigField.All)
        {
            TomlTable? table = field.Table.Length == 0 ? root : root.Items.Find(i => i.Key == field.Table)?.Value as TomlTable;
            if (table?.Items.Find(i => i.Key == field.Key)?.Line is int own && own == line)
                return field.Name;
        }
        return RigField.All.FirstOrDefault(f => message.Contains($"[{f.Table}] without {f.Key}", StringComparison.Ordinal)
            || message.Contains($"no [{f.Table}] and so no {f.Key}", StringComparison.Ordinal))?.Name;
    }

    private static string? Shown(object value) => value switch
    {
        double number => number.ToString("R", CultureInfo.InvariantCulture),
        string text => text,
        TomlList list when list.Items.Count > 0 && list.Items.TrueForAll(v => v is double) => string.Join("; ", list.Items.Select(v => ((double)v).ToString("R", CultureInfo.InvariantCulture))),
        TomlTable pair when pair.Items.Find(i => i.Key == "value")?.Value is double middle && pair.Items.Find(i => i.Key == "plus_minus")?.Value is double half
            => FormattableString.Invariant($"{middle:R} ± {half:R}"),
        _ => null,
    };

    private static bool TryToml(RigField field, string text, out string? toml, out string problem)
    {
        toml = null;
        problem = "";
        if (!field.IsNumber)
        {
            if (!field.Words.IsEmpty && !field.Words.Contains(text))
                problem = $"found \"{Cut(text)}\", expected {string.Join(" or ", field.Words)}.";
            else
                toml = Quoted(text);
            return toml is not null;
        }
        string[] ends = text.Split('±', 2, StringSplitOptions.TrimEntries);
        string[] parts = ends[0].Split([' ', ';', '\t'], StringSplitOptions.TrimEntries | StringSplitOptions.RemoveEmptyEntries);
        var numbers = new List<double>();
        foreach (string part in ends.Length == 2 ? [.. parts, ends[1]] : parts)
        {
            if (!double.TryParse(part.Replace('−', '-'), NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double number) || !double.IsFinite(number))
            {
                problem = part.Contains(',', StringComparison.Ordinal)
                    ? $"found \"{Cut(part)}\", expected a number with a decimal point. Write {Cut(part.Replace(',', '.'))}; put a space between repeats."
                    : $"found \"{Cut(part)}\", expected a number such as 12.5.";
                return false;
            }
            numbers.Add(number);
        }
        bool spread = ends.Length == 2;
        if (numbers.Count == 0 || (spread && numbers.Count != 2))
        {
            problem = $"found \"{Cut(text)}\", expected a number, repeats such as 56.3 56.1, or 10 ± 2.";
            return false;
        }
        string[] written = [.. numbers.Select(n => n.ToString("R", CultureInfo.InvariantCulture))];
        toml = spread ? $"{{ value = {written[0]}, plus_minus = {written[1]} }}" : written.Length == 1 ? written[0] : "[" + string.Join(", ", written) + "]";
        return true;
    }

    /// <summary>A basic string of TOML 1.0.</summary>
    private static string Quoted(string text)
    {
        string clean = new([.. text.Where(c => !char.IsControl(c)).Take(200)]);
        return "\"" + clean.Replace("\\", "\\\\", StringComparison.Ordinal).Replace("\"", "\\\"", StringComparison.Ordinal) + "\"";
    }

    private static string Cut(string text) => text.Length <= 30 ? text : text[..30] + "…";
}
