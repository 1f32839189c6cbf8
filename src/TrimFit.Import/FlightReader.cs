using TrimFit.Core.Logs;

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
        List<LogTable> tables = [.. sources.Select(source => Recognise(source).Read(source, options))];
        return FlightJoiner.Join(tables, options);
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
