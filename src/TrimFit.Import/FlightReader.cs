using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import.Joining;

namespace TrimFit.Import;

/// <summary>Reads the log or logs of one flight.</summary>
public static class FlightReader
{
    /// <summary>Bytes shown to <see cref="ILogFormat.Recognises"/>.</summary>
    private const int HeadBytes = 64 * 1024;

    /// <summary>Reads files of one flight into one log, with the account of what was read and left out.</summary>
    /// <param name="sources">One or more loggers of the same flight.</param>
    /// <param name="options">Choices; null for the defaults.</param>
    /// <exception cref="LogFormatException">A file is no log, or under <see cref="ImportOptions.Strict"/> a row had to be left out.</exception>
    /// <exception cref="ArgumentException">No file was given.</exception>
    public static FlightImport Read(IReadOnlyList<LogSource> sources, ImportOptions? options = null)
    {
        ArgumentNullException.ThrowIfNull(sources);
        if (sources.Count == 0)
            throw new ArgumentException("needs at least one file", nameof(sources));
        options ??= new();
        var notices = new List<Notice>();
        var tables = new List<(LogTable Table, string? Recording)>();
        foreach (LogSource source in sources)
        {
            ImportOptions own = options with
            {
                Columns = [.. options.Columns, .. PhoneSensors.RulesFor(source, sources)],
                ColumnsMayBeElsewhere = sources.Count > 1,
            };
            if (TryRead(source, own, sources, notices) is LogTable table)
                tables.Add((table, source.Recording));
        }
        if (tables.Count == 0)
            throw LogFormatException.At(sources[0].Recording ?? sources[0].Name, null, null, "no file that is a log", "a recording with time and at least one known column", "Check that it is the recording of a flight.");
        CheckRules(options.Columns, tables);
        return FlightJoiner.Join(tables, notices);
    }

    /// <summary>Reads everything about one flight: files, folders or zips of its loggers, and the pilot's sheet, whose legs are found in the data.</summary>
    /// <param name="paths">One or more loggers of the same flight.</param>
    /// <param name="sheet">What the pilot did; null without a sheet.</param>
    /// <param name="log">What the rig file says about the logger's columns; null for nothing.</param>
    /// <param name="options">Choices; null for the defaults. Its columns come before the rig file's.</param>
    /// <exception cref="LogFormatException">A file is no log, or the clocks of two loggers cannot be brought together.</exception>
    public static FlightImport Read(IEnumerable<string> paths, FlightSheet? sheet, LogSettings? log = null, ImportOptions? options = null)
    {
        options ??= new();
        FlightImport import = Read(LogSources.From(paths), options with { Columns = [.. options.Columns, .. log?.Columns ?? []] });
        if (sheet is null)
            return import;
        SheetedFlight sheeted = SheetLegs.Apply(import.Flight, sheet);
        return import with
        {
            Flight = sheeted.Flight,
            Legs = sheeted.Legs,
            Diagnostics = import.Diagnostics with { Warnings = [.. import.Diagnostics.Warnings, .. sheeted.Warnings] },
        };
    }

    /// <summary>Reads one file. A file nobody named (from a folder or zip of several) that is no log is set aside with a sentence that holds none of its content.</summary>
    private static LogTable? TryRead(LogSource source, ImportOptions options, IReadOnlyList<LogSource> sources, List<Notice> notices)
    {
        bool named = source.Recording is null || sources.Count(s => s.Recording == source.Recording) == 1;
        try
        {
            return Recognise(source).Read(source, options);
        }
        catch (LogFormatException) when (!named && !options.Strict)
        {
            notices.Add(new("file_set_aside", $"{source.Recording}: {source.Name} holds nothing that is used and is set aside."));
            return null;
        }
    }

    /// <summary>With several files a told column may stand in any of them, but it must stand in one.</summary>
    private static void CheckRules(IReadOnlyList<ColumnRule> rules, List<(LogTable Table, string? Recording)> tables)
    {
        foreach (IGrouping<ChannelRole, ColumnRule> rule in rules.GroupBy(r => r.Role))
        {
            if (tables.Count > 1 && !tables.Exists(t => t.Table.File.Columns.Any(c => c.Role == rule.Key)))
            {
                throw LogFormatException.At(tables[0].Table.File.Name, null, null, $"no column \"{rule.First().Name}\" for {ChannelRoles.NameOf(rule.Key)} in any of the {tables.Count.ToString(System.Globalization.CultureInfo.InvariantCulture)} files",
                    "it in one of them", $"Name it as the header does: --column {ChannelRoles.NameOf(rule.Key)}=NAME.");
            }
        }
    }

    /// <summary>The first kind of file that knows the bytes.</summary>
    internal static ILogFormat Recognise(LogSource source)
    {
        using Stream stream = source.Open();
        byte[] head = new byte[HeadBytes];
        int length = stream.ReadAtLeast(head, head.Length, throwOnEndOfStream: false);
        if (length == 0)
            throw LogFormatException.At(source.Name, null, null, "an empty file", "a flight log", "Copy the log from the logger again.");
        foreach (ILogFormat format in LogFormats.All)
        {
            if (format.Recognises(head.AsSpan(0, length), source.Name))
                return format;
        }
        throw LogFormatException.At(source.Name, 1, null, "bytes that are no text", "a flight log as text (CSV)",
            "Export the log as CSV with the logger's own program.");
    }
}
