using System.Collections.Immutable;
using System.IO.Compression;
using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Core.Workshop;
using TrimFit.Import;
using TrimFit.Import.Joining;
using TrimFit.Import.Sheets;
using TrimFit.Jobs;

namespace TrimFit.Cli;

/// <summary>A flight read from bytes that the book keeps or is about to keep: what is analysed is what is kept.</summary>
internal static class KeptFlight
{
    // The zip of a folder is the same whenever it is made: one fixed time, the first that a zip can hold.
    private static readonly DateTimeOffset _entryTime = new(1980, 1, 1, 0, 0, 0, TimeSpan.Zero);

    /// <summary>The bytes of logs; a folder, which is one recording, becomes one zip.</summary>
    public static ImmutableArray<KeptFile> Logs(IEnumerable<string> paths) =>
    [
        .. paths.Select(path =>
        {
            IReadOnlyList<LogSource> sources = LogSources.From([path]); // finds what is missing or hostile before anything is kept
            string name = Path.GetFileName(Path.TrimEndingDirectorySeparator(Path.GetFullPath(path)));
            return Directory.Exists(path)
                ? new KeptFile(InputRecord.Log, name + ".zip", Zipped(sources))
                : new KeptFile(InputRecord.Log, name, InputFiles.Bytes(path));
        }),
    ];

    /// <summary>Reads a flight.</summary>
    /// <param name="logs">Its logs.</param>
    /// <param name="sheet">Its sheet; null without one.</param>
    /// <param name="options">Columns, strictness, progress.</param>
    public static FlightImport Read(IEnumerable<KeptFile> logs, KeptFile? sheet, ImportOptions options)
    {
        FlightImport import = FlightReader.Read([.. logs.SelectMany(Sources)], options);
        if (sheet is null)
            return import;
        SheetedFlight sheeted = SheetLegs.Apply(import.Flight, ReadSheet(sheet));
        return import with
        {
            Flight = sheeted.Flight,
            Legs = sheeted.Legs,
            Diagnostics = import.Diagnostics with { Warnings = [.. import.Diagnostics.Warnings, .. sheeted.Warnings] },
        };
    }

    /// <summary>The sheet in a kept file.</summary>
    public static FlightSheet ReadSheet(KeptFile sheet) => FlightSheetReader.Read(sheet.Name, Encoding.UTF8.GetString(sheet.Bytes.Span));

    private static IReadOnlyList<LogSource> Sources(KeptFile log)
    {
        byte[] bytes = log.Bytes.ToArray();
        return bytes.AsSpan().StartsWith("PK\u0003\u0004"u8) || bytes.AsSpan().StartsWith("PK\u0005\u0006"u8)
            ? LogSources.Zip(log.Name, () => new MemoryStream(bytes, writable: false))
            : [LogSource.FromBytes(log.Name, bytes)];
    }

    private static byte[] Zipped(IEnumerable<LogSource> sources)
    {
        using var stream = new MemoryStream();
        using (var zip = new ZipArchive(stream, ZipArchiveMode.Create, leaveOpen: true))
        {
            foreach (LogSource source in sources)
            {
                ZipArchiveEntry entry = zip.CreateEntry(source.Name, CompressionLevel.Optimal);
                entry.LastWriteTime = _entryTime;
                using Stream to = entry.Open(), from = source.Open();
                from.CopyTo(to);
            }
        }
        return stream.ToArray();
    }
}
