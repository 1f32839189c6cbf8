using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Reporting;
using TrimFit.Reporting.Rows;

namespace TrimFit.Cli.Batch;

/// <summary><c>trimfit batch</c>: many flights, in parallel, one result row each.</summary>
internal static class BatchCommand
{
    private const string Journal = "flights.jsonl", Csv = "flights.csv", Parquet = "flights.parquet";

    /// <summary>Rows held at once while the tables are written, and the size of a row group.</summary>
    private const int RowsAtOnce = 2000;

    /// <summary>Runs a batch.</summary>
    /// <param name="flights">What to run; the order does not matter.</param>
    /// <param name="folder">Where journal and tables go.</param>
    /// <param name="threads">Flights worked on at once.</param>
    /// <param name="choices">Common options.</param>
    /// <param name="output">Gets the summary.</param>
    /// <param name="error">Gets the progress.</param>
    public static int Run(IReadOnlyList<BatchFlight> flights, string folder, int threads, CommonChoices choices, TextWriter output, TextWriter error)
    {
        OutputFiles.MakeFolder("--out", folder);
        Dictionary<string, (Rig Rig, SourceFile File)> rigs = flights.Select(f => f.RigPath).Distinct().ToDictionary(path => path, InputFiles.Rig);
        using BatchJournal journal = BatchJournal.Open(Path.Join(folder, Journal));
        (BatchFlight Flight, string Key)[] keyed = [.. flights.Select(f => (f, KeyOf(f, rigs[f.RigPath].File, choices))).OrderBy(f => f.f.Name, StringComparer.Ordinal).ThenBy(f => f.Item2, StringComparer.Ordinal)];
        (BatchFlight Flight, string Key)[] open = [.. keyed.Where(f => !journal.Has(f.Key)).DistinctBy(f => f.Key)];
        var progress = new BatchProgress(keyed.Length, keyed.Length - open.Length, error, !Console.IsErrorRedirected);
        Parallel.ForEach(open, new ParallelOptions { MaxDegreeOfParallelism = threads }, next =>
        {
            (int code, IEnumerable<KeyValuePair<string, JsonElement>> cells) = RowOf(next.Flight, rigs[next.Flight.RigPath], choices);
            journal.Append(next.Key, cells);
            if (!choices.Quiet)
                progress.Add(code);
        });
        BatchSummary summary = WriteTables(journal, [.. keyed.Select(f => f.Key)], folder);
        output.Write(ReportText.Batch(summary, choices.Style));
        return ExitCode.Done;
    }

    private static (int Code, IEnumerable<KeyValuePair<string, JsonElement>> Cells) RowOf(BatchFlight flight, (Rig Rig, SourceFile File) rig, CommonChoices choices)
    {
        (int code, string? message, ResultRow? row) = Result(flight, rig, choices);
        KeyValuePair<string, JsonElement>[] head =
        [
            new("file", Text(flight.Name)), new("machine", Text(rig.Rig.Name)), new("setup", Text(flight.Setup)), new("sheet", Text(flight.SheetPath)),
            new("exit_code", Number(code)), new("message", Text(message)),
        ];
        return (code, head.Concat(row?.Cells ?? []));
    }

    private static (int Code, string? Message, ResultRow? Row) Result(BatchFlight flight, (Rig Rig, SourceFile File) rig, CommonChoices choices)
    {
        try
        {
            FitReport report = FitCommand.Fit(flight.Logs, rig, flight.SheetPath, choices with { Quiet = true });
            return (FitCommand.CodeOf(report.Analysis), null, ResultRow.Of(ReportJson.Fit(report)));
        }
        catch (LogFormatException e)
        {
            return (ExitCode.Input, e.Message, null);
        }
#pragma warning disable CA1031 // one bad file never stops the rest; its row says that this is a fault of the program
        catch (Exception e)
        {
            return (ExitCode.Fault, $"this is a fault of the program, please report it: {e.GetType().Name}: {e.Message}", null);
        }
#pragma warning restore CA1031
    }

    /// <summary>A hash of all that a row depends on.</summary>
    private static string KeyOf(BatchFlight flight, SourceFile rig, CommonChoices choices)
    {
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        void Add(string text)
        {
            hash.AppendData(Encoding.UTF8.GetBytes(text));
            hash.AppendData([0]);
        }
        Add(ProgramVersion.Provenance.ProgramVersion);
        Add(FormattableString.Invariant($"{choices.Balance} {choices.Tolerance.RadPerSec:R} {choices.Seed ?? 1} {choices.Strict}"));
        foreach (ColumnRule rule in choices.Columns)
            Add(rule.ToString());
        Add(rig.Sha256);
        Add(flight.Setup ?? "");
        Add(flight.Name);
        foreach (string path in flight.Logs.Concat(flight.SheetPath is string sheet ? [sheet] : []))
        {
            string[] files = Directory.Exists(path) ? [.. Directory.EnumerateFiles(path).Order(StringComparer.Ordinal)] : [path];
            foreach (string file in files)
                Add(file + " " + HashOf(file));
        }
        return Convert.ToHexStringLower(hash.GetHashAndReset());
    }

    private static string HashOf(string path)
    {
        try
        {
            using FileStream stream = File.OpenRead(path);
            return Convert.ToHexStringLower(SHA256.HashData(stream));
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            return e.GetType().Name; // its row will say what is wrong
        }
    }

    private static BatchSummary WriteTables(BatchJournal journal, IReadOnlyList<string> keys, string folder)
    {
        var columns = new TableColumns();
        var summary = new BatchSummary.Builder();
        foreach (string key in keys)
        {
            IReadOnlyList<KeyValuePair<string, JsonElement>> cells = journal.Read(key);
            columns.Add(cells);
            summary.Add(cells);
        }
        OutputFiles.Write("--out", Path.Join(folder, Csv), stream =>
        {
            using var text = new StreamWriter(stream, new UTF8Encoding(false), leaveOpen: true);
            var csv = new CsvTable(text, columns);
            csv.WriteHead();
            foreach (string key in keys)
                csv.Write(new Dictionary<string, JsonElement>(journal.Read(key)));
        });
        OutputFiles.Write("--out", Path.Join(folder, Parquet), stream =>
        {
            var parquet = new ParquetTable(stream, columns);
            foreach (string[] group in keys.Chunk(RowsAtOnce))
                parquet.WriteGroup([.. group.Select(key => new Dictionary<string, JsonElement>(journal.Read(key)))]);
            parquet.Finish();
        });
        return summary.Build();
    }

    private static JsonElement Text(string? text) => JsonSerializer.SerializeToElement(text, BatchJsonContext.Default.String!);

    private static JsonElement Number(int value) => JsonSerializer.SerializeToElement(value, BatchJsonContext.Default.Int32);
}

[System.Text.Json.Serialization.JsonSerializable(typeof(string))]
[System.Text.Json.Serialization.JsonSerializable(typeof(int))]
internal sealed partial class BatchJsonContext : System.Text.Json.Serialization.JsonSerializerContext;
