using System.Collections.Immutable;
using System.Text;
using TrimFit.Import.Csv;

namespace TrimFit.Import;

/// <summary>The beginning of a log as a person would see it in an editor, to say what its columns are even when it cannot be read yet.</summary>
public sealed record LogPreview
{
    private const int MostCell = 40, MostColumns = 200;

    /// <summary>Names of the columns; empty when the file is no table of text.</summary>
    public required ImmutableArray<string> Columns { get; init; }

    /// <summary>The first data rows, as many cells as there are columns at most.</summary>
    public required ImmutableArray<ImmutableArray<string>> Rows { get; init; }

    /// <summary>Looks at a file; never throws for what is in it.</summary>
    /// <param name="source">The file.</param>
    /// <param name="rows">Rows wanted.</param>
    public static LogPreview Of(LogSource source, int rows = 4)
    {
        ArgumentNullException.ThrowIfNull(source);
        try
        {
            if (FlightReader.Recognise(source) is CsvLogFormat)
            {
                CsvHead head = CsvHead.Read(source);
                return new()
                {
                    Columns = [.. head.Names.Take(MostColumns)],
                    Rows = [.. head.Sample.Take(rows).Select(r => (ImmutableArray<string>)[.. r.Cells.Take(Math.Min(MostColumns, head.Names.Length)).Select(Cell)])],
                };
            }
        }
        catch (Exception e) when (e is LogFormatException or IOException)
        {
            return new() { Columns = [], Rows = [] }; // the reading itself says what is wrong
        }
        return new() { Columns = [], Rows = [] };
    }

    private static string Cell(byte[] bytes)
    {
        string text = Encoding.UTF8.GetString(bytes.AsSpan(0, Math.Min(bytes.Length, 4 * MostCell)));
        return text.Length <= MostCell ? text : text[..MostCell] + "…";
    }
}
