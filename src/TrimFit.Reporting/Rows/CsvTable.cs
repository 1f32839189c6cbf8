using System.Text.Json;

namespace TrimFit.Reporting.Rows;

/// <summary>Writes rows as CSV: RFC 4180, UTF-8, decimal points, an empty cell where nothing is known.</summary>
public sealed class CsvTable(TextWriter output, TableColumns columns)
{
    /// <summary>Writes the names.</summary>
    public void WriteHead()
    {
        output.Write(string.Join(',', columns.Names.Select(Quoted)));
        output.Write("\r\n");
    }

    /// <summary>Writes one row; the order of its cells does not matter.</summary>
    public void Write(IReadOnlyDictionary<string, JsonElement> cells)
    {
        ArgumentNullException.ThrowIfNull(cells);
        for (int i = 0; i < columns.Names.Count; i++)
        {
            if (i > 0)
                output.Write(',');
            if (cells.TryGetValue(columns.Names[i], out JsonElement value))
                output.Write(TextOf(value));
        }
        output.Write("\r\n");
    }

    private static string TextOf(JsonElement value) => value.ValueKind switch
    {
        JsonValueKind.String => Quoted(value.GetString()!),
        JsonValueKind.Null => "",
        _ => value.GetRawText(),
    };

    private static string Quoted(string text) =>
        text.AsSpan().IndexOfAny(",\"\r\n") < 0 ? text : "\"" + text.Replace("\"", "\"\"", StringComparison.Ordinal) + "\"";
}
