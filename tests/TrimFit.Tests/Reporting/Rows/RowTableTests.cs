using System.Globalization;
using System.Text.Json;
using DuckDB.NET.Data;
using TrimFit.Reporting.Rows;

namespace TrimFit.Tests.Reporting.Rows;

public class RowTableTests
{
    private const string Result = """
        {
          "schema": "trimfit-fit/1",
          "inputs": { "files": [ { "name": "a.csv", "sha256": "00", "columns": [ { "name": "t" } ] }, { "name": "b.csv", "sha256": "01", "columns": [] } ] },
          "wind": null,
          "pull": { "at": [ { "setting": "idle", "rate_deg_s": 0.25, "low95": null }, { "setting": "full", "rate_deg_s": -4.5, "low95": -5 } ] },
          "turn_model": { "coefficients": [ { "name": "constant", "unit": "deg/s", "value": 0.5 } ], "covariance": [ [ 1, 2 ], [ 2, 3 ] ] },
          "adjustments": [ { "kind": "carabiner_pair", "travel": -15, "within_limits": true, "notes": [] } ],
          "spans_left_out": [ { "start_s": 1, "end_s": 2 }, { "start_s": 5, "end_s": 6 } ],
          "warnings": [ { "code": "strong_pull", "message": "x" }, { "code": "cruise_assumed", "message": "y" } ]
        }
        """;

    [Fact]
    public void A_result_is_flattened_by_the_names_of_its_json()
    {
        (string, string)[] cells = [.. ResultRow.Of(Result).Cells.Select(c => (c.Key, c.Value.ToString()))];
        Assert.Equal(
            [
                ("inputs_files", "a.csv;b.csv"), ("wind", ""), ("pull_at_idle_rate_deg_s", "0.25"), ("pull_at_idle_low95", ""), ("pull_at_full_rate_deg_s", "-4.5"),
                ("pull_at_full_low95", "-5"), ("turn_model_coefficients_constant_unit", "deg/s"), ("turn_model_coefficients_constant_value", "0.5"),
                ("adjustments_carabiner_pair_travel", "-15"), ("adjustments_carabiner_pair_within_limits", "True"), ("adjustments_carabiner_pair_notes", ""),
                ("spans_left_out", "2"), ("warnings", "strong_pull;cruise_assumed"),
            ],
            cells);
    }

    [Fact]
    public void A_column_that_a_later_row_brings_comes_after_the_one_it_follows_there()
    {
        var columns = new TableColumns();
        columns.Add(Cells("""{"a":1,"d":true}"""));
        columns.Add(Cells("""{"a":null,"b":"x","c":2,"d":null,"e":null}"""));
        columns.Add(Cells("""{"a":"now text","c":3}"""));
        Assert.Equal(["a", "b", "c", "d", "e"], columns.Names);
        Assert.Equal([CellType.Text, CellType.Text, CellType.Number, CellType.Boolean, CellType.Text], columns.Names.Select(columns.TypeOf));
    }

    [Fact]
    public void Csv_quotes_what_needs_it_and_leaves_unknown_cells_empty()
    {
        var columns = new TableColumns();
        columns.Add(Cells("""{"file":"a, \"b\".csv","n":1.5e-3,"ok":false,"none":null}"""));
        using var text = new StringWriter(CultureInfo.InvariantCulture);
        var csv = new CsvTable(text, columns);
        csv.WriteHead();
        csv.Write(new Dictionary<string, JsonElement>(Cells("""{"n":1.5e-3,"file":"a, \"b\".csv","ok":false,"none":null}""")));
        csv.Write(new Dictionary<string, JsonElement>(Cells("""{"file":"two\nlines"}""")));
        Assert.Equal("file,n,ok,none\r\n\"a, \"\"b\"\".csv\",1.5e-3,false,\r\n\"two\nlines\",,,\r\n", text.ToString());
    }

    [Fact] // reference reader: DuckDB, which shares no code with the writer
    public void Parquet_is_read_back_by_duckdb_value_by_value()
    {
        const int rows = 300; // three groups, runs of nulls of several lengths, text longer than one length byte
        var columns = new TableColumns();
        IReadOnlyList<KeyValuePair<string, JsonElement>>[] table = [.. Enumerable.Range(0, rows).Select(Row)];
        foreach (IReadOnlyList<KeyValuePair<string, JsonElement>> row in table)
            columns.Add(row);
        string path = Path.Join(Path.GetTempPath(), $"trimfit-{Guid.NewGuid():N}.parquet");
        try
        {
            using (FileStream stream = File.Create(path))
            {
                var parquet = new ParquetTable(stream, columns);
                foreach (IReadOnlyList<KeyValuePair<string, JsonElement>>[] group in table.Chunk(130))
                    parquet.WriteGroup([.. group.Select(r => new Dictionary<string, JsonElement>(r))]);
                parquet.Finish();
            }
            using var connection = new DuckDBConnection("DataSource=:memory:");
            connection.Open();
            using DuckDBCommand command = connection.CreateCommand();
            command.CommandText = $"select * from read_parquet('{path}')";
            using DuckDBDataReader reader = command.ExecuteReader();
            Assert.Equal(["name", "number", "flag", "never"], Enumerable.Range(0, reader.FieldCount).Select(reader.GetName));
            Assert.Equal([typeof(string), typeof(double), typeof(bool), typeof(string)], Enumerable.Range(0, reader.FieldCount).Select(reader.GetFieldType));
            for (int i = 0; i < rows; i++)
            {
                Assert.True(reader.Read());
                Dictionary<string, JsonElement> expected = new(table[i]);
                Assert.Equal(expected["name"].GetString(), reader.GetString(0));
                Assert.Equal(expected["number"].ValueKind == JsonValueKind.Null ? default(double?) : expected["number"].GetDouble(), reader.IsDBNull(1) ? default(double?) : reader.GetDouble(1));
                Assert.Equal(expected["flag"].ValueKind == JsonValueKind.Null ? default(bool?) : expected["flag"].GetBoolean(), reader.IsDBNull(2) ? default(bool?) : reader.GetBoolean(2));
                Assert.True(reader.IsDBNull(3));
            }
            Assert.False(reader.Read());
        }
        finally
        {
            File.Delete(path);
        }
    }

    private static IReadOnlyList<KeyValuePair<string, JsonElement>> Row(int i)
    {
        string number = i % 7 < 3 ? "null" : (i * 1.1 - 100).ToString("R", CultureInfo.InvariantCulture), flag = i is > 20 and < 200 ? "null" : i % 3 == 0 ? "true" : "false";
        return Cells($$"""{"name":"flügel {{new string('x', i)}}","number":{{number}},"flag":{{flag}},"never":null}""");
    }

    private static IReadOnlyList<KeyValuePair<string, JsonElement>> Cells(string json)
    {
        using JsonDocument document = JsonDocument.Parse(json);
        return [.. document.RootElement.EnumerateObject().Select(p => KeyValuePair.Create(p.Name, p.Value.Clone()))];
    }
}
