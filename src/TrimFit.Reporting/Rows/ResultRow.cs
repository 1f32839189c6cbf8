using System.Text.Json;

namespace TrimFit.Reporting.Rows;

/// <summary>A result flattened to one row: the names of its JSON joined by underscores.</summary>
/// <remarks>Lists are told apart by what names their members: powers by <c>setting</c>, adjustments and sources by <c>kind</c>, coefficients and
/// assumptions by <c>name</c>. Messages become their codes, joined by semicolons. Lists that name nothing (gaps, spans, clocks) become their
/// length; the covariance and the columns of a log are left to the JSON.</remarks>
public sealed class ResultRow
{
    private static readonly string[] _leftToJson = ["covariance", "columns", "rows_left_out", "cautions", "schema"];
    private readonly List<KeyValuePair<string, JsonElement>> _cells = [];

    private ResultRow()
    {
    }

    /// <summary>Names and values in the order of the JSON; values are numbers, texts, true, false or null.</summary>
    public IReadOnlyList<KeyValuePair<string, JsonElement>> Cells => _cells;

    /// <summary>Flattens a result.</summary>
    /// <param name="result">The JSON of a result, an object.</param>
    /// <exception cref="JsonException">The text is no JSON.</exception>
    public static ResultRow Of(string result)
    {
        using JsonDocument document = JsonDocument.Parse(result);
        var row = new ResultRow();
        row.AddMembers("", document.RootElement.Clone());
        return row;
    }

    private void Add(string name, JsonElement value)
    {
        switch (value.ValueKind)
        {
            case JsonValueKind.Object:
                AddMembers(name + "_", value);
                break;
            case JsonValueKind.Array:
                AddList(name, value);
                break;
            default:
                _cells.Add(new(name, value));
                break;
        }
    }

    private void AddMembers(string prefix, JsonElement value)
    {
        foreach (JsonProperty member in value.EnumerateObject())
        {
            if (!_leftToJson.Contains(member.Name))
                Add(prefix + member.Name, member.Value);
        }
    }

    private void AddList(string name, JsonElement list)
    {
        if (KeyOf(list) is string key)
        {
            foreach (JsonElement member in list.EnumerateArray())
            {
                string prefix = $"{name}_{member.GetProperty(key).GetString()}_";
                foreach (JsonProperty part in member.EnumerateObject().Where(p => p.Name != key))
                    Add(prefix + part.Name, part.Value);
            }
            return;
        }
        string text = string.Join(';', list.EnumerateArray().Select(NameOf).OfType<string>());
        bool named = list.GetArrayLength() > 0 && NameOf(list[0]) is not null;
        _cells.Add(new(name, named || IsMessages(name) ? Text(text) : Number(list.GetArrayLength())));
    }

    private static string? KeyOf(JsonElement list)
    {
        if (list.GetArrayLength() == 0 || list[0].ValueKind != JsonValueKind.Object)
            return null;
        JsonElement first = list[0];
        return first.TryGetProperty("setting", out _) ? "setting"
            : first.TryGetProperty("kind", out _) ? "kind"
            : first.TryGetProperty("name", out _) && first.TryGetProperty("value", out _) ? "name"
            : null;
    }

    /// <summary>Code of a message, or name of a file.</summary>
    private static string? NameOf(JsonElement member) =>
        member.ValueKind != JsonValueKind.Object ? null
        : member.TryGetProperty("code", out JsonElement code) ? code.GetString()
        : member.TryGetProperty("sha256", out _) && member.TryGetProperty("name", out JsonElement name) ? name.GetString()
        : null;

    /// <summary>Lists of messages stay text when they are empty, so that a column has one type.</summary>
    private static bool IsMessages(string name) => name is "warnings" or "verdict_reasons" || name.EndsWith("_notes", StringComparison.Ordinal);

    private static JsonElement Text(string text) => JsonSerializer.SerializeToElement(text, RowJsonContext.Default.String);

    private static JsonElement Number(int value) => JsonSerializer.SerializeToElement(value, RowJsonContext.Default.Int32);
}

[System.Text.Json.Serialization.JsonSerializable(typeof(string))]
[System.Text.Json.Serialization.JsonSerializable(typeof(int))]
internal sealed partial class RowJsonContext : System.Text.Json.Serialization.JsonSerializerContext;
