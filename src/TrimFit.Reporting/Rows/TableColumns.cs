using System.Text.Json;

namespace TrimFit.Reporting.Rows;

/// <summary>Columns of a table whose rows need not all have the same cells. The order depends on the rows' order alone.</summary>
public sealed class TableColumns
{
    private readonly List<string> _names = [];
    private readonly Dictionary<string, CellType?> _types = new(StringComparer.Ordinal);

    /// <summary>Names in order: a column that a later row brings comes after the one it follows there.</summary>
    public IReadOnlyList<string> Names => _names;

    /// <summary>Type of a column: of all values seen, text when they differ or none was seen.</summary>
    public CellType TypeOf(string name) => _types[name] ?? CellType.Text;

    /// <summary>Takes a row's columns in.</summary>
    public void Add(IEnumerable<KeyValuePair<string, JsonElement>> cells)
    {
        ArgumentNullException.ThrowIfNull(cells);
        int after = -1;
        string previous = "";
        foreach ((string name, JsonElement value) in cells)
        {
            CellType? type = value.ValueKind switch
            {
                JsonValueKind.Number => CellType.Number,
                JsonValueKind.String => CellType.Text,
                JsonValueKind.True or JsonValueKind.False => CellType.Boolean,
                _ => null,
            };
            if (_types.TryGetValue(name, out CellType? known))
            {
                if (type is not null && known != type)
                    _types[name] = known is null ? type : CellType.Text;
                after = -1;
            }
            else
            {
                _types[name] = type;
                after = after >= 0 ? after + 1 : previous.Length == 0 ? 0 : _names.IndexOf(previous) + 1;
                _names.Insert(after, name);
            }
            previous = name;
        }
    }
}
