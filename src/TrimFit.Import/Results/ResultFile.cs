using System.Text.Json;
using static System.FormattableString;

namespace TrimFit.Import.Results;

/// <summary>One of the program's own JSON results, read back: keys are looked up by path, and a fault names file and key.</summary>
internal sealed class ResultFile : IDisposable
{
    private readonly string _fileName;
    private readonly JsonDocument _document;

    private ResultFile(string fileName, JsonDocument document)
    {
        _fileName = fileName;
        _document = document;
    }

    /// <summary>Reads the text of a result of a schema.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="json">The whole file.</param>
    /// <param name="schema">The schema it must have.</param>
    /// <param name="remedy">How such a file is made.</param>
    /// <exception cref="LogFormatException">The text is no JSON or of another schema.</exception>
    public static ResultFile Read(string fileName, string json, string schema, string remedy)
    {
        ArgumentNullException.ThrowIfNull(fileName);
        ArgumentNullException.ThrowIfNull(json);
        string name = Path.GetFileName(fileName);
        JsonDocument document;
        try
        {
            document = JsonDocument.Parse(json.TrimStart('\uFEFF'));
        }
        catch (JsonException e)
        {
            int? line = e.LineNumber is long l ? (int)l + 1 : null;
            string? column = e.BytePositionInLine is long c ? Invariant($"{c + 1}") : null;
            throw LogFormatException.At(name, line, column, "text that is no JSON", Invariant($"a result with schema \"{schema}\""), remedy);
        }
        JsonElement root = document.RootElement;
        string? found = root.ValueKind == JsonValueKind.Object && root.TryGetProperty("schema", out JsonElement s) && s.ValueKind == JsonValueKind.String ? s.GetString() : null;
        if (found == schema)
            return new(name, document);
        document.Dispose();
        throw LogFormatException.At(name, 1, null, found is null ? "no schema" : Invariant($"schema \"{found}\""), Invariant($"schema \"{schema}\""), remedy);
    }

    /// <summary>The element at a path of keys; null when a key is missing or the value is null.</summary>
    public JsonElement? At(params ReadOnlySpan<string> path)
    {
        JsonElement at = _document.RootElement;
        foreach (string key in path)
        {
            if (at.ValueKind != JsonValueKind.Object || !at.TryGetProperty(key, out at))
                return null;
        }
        return at.ValueKind == JsonValueKind.Null ? null : at;
    }

    /// <summary>The number at a path; null when missing or null.</summary>
    /// <exception cref="LogFormatException">Something else stands there.</exception>
    public double? Number(params ReadOnlySpan<string> path) => At(path) is JsonElement e ? Number(e, string.Join('.', path.ToArray())) : null;

    /// <summary>The text at a path; null when missing or no text.</summary>
    public string? Text(params ReadOnlySpan<string> path) => At(path) is JsonElement { ValueKind: JsonValueKind.String } e ? e.GetString() : null;

    /// <summary>The objects of a list at a path; none when missing.</summary>
    public IEnumerable<JsonElement> List(params ReadOnlySpan<string> path) =>
        At(path) is JsonElement { ValueKind: JsonValueKind.Array } e ? e.EnumerateArray().Where(i => i.ValueKind == JsonValueKind.Object) : [];

    /// <summary>A number of an object; null when missing or null.</summary>
    /// <exception cref="LogFormatException">Something else stands there.</exception>
    public double? NumberOf(JsonElement parent, string key) =>
        parent.TryGetProperty(key, out JsonElement e) && e.ValueKind != JsonValueKind.Null ? Number(e, key) : null;

    /// <summary>A text of an object; null when missing or no text.</summary>
    public static string? TextOf(JsonElement parent, string key) =>
        parent.TryGetProperty(key, out JsonElement e) && e.ValueKind == JsonValueKind.String ? e.GetString() : null;

    /// <inheritdoc/>
    public void Dispose() => _document.Dispose();

    /// <summary>A fault at a key.</summary>
    public LogFormatException Fault(string key, string found, string expected, string remedy) => LogFormatException.At(_fileName, null, key, found, expected, remedy);

    private double Number(JsonElement e, string key) => e.ValueKind == JsonValueKind.Number && e.TryGetDouble(out double value) && double.IsFinite(value)
        ? value
        : throw Fault(key, e.GetRawText().Length > 40 ? "something that is no number" : e.GetRawText(), "a number", "Use the file as the program wrote it.");
}
