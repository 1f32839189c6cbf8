using TrimFit.Core.Rigging;

namespace TrimFit.Import;

/// <summary>One kind of log file. Adding a kind is adding one class and its line in <see cref="LogFormats"/>.</summary>
public interface ILogFormat
{
    /// <summary>Short name for people, such as <c>IGC</c>.</summary>
    string Name { get; }

    /// <summary>Whether a file is of this kind, judged by its first bytes (never by its name alone).</summary>
    /// <param name="head">Up to the first 64 KiB of the file.</param>
    /// <param name="fileName">File name without folder; a hint only.</param>
    bool Recognises(ReadOnlySpan<byte> head, string fileName);

    /// <summary>Reads one file.</summary>
    /// <exception cref="LogFormatException">The file is no log of this kind, or no row of it can be used.</exception>
    LogTable Read(LogSource source, ImportOptions options);
}

/// <summary>The kinds of file the import knows, asked in this order; CSV, which recognises any text, stands last.</summary>
public static partial class LogFormats
{
}

/// <summary>A file to read: its name for messages and its bytes, which can be opened more than once.</summary>
/// <param name="Name">File name without folder, as messages show it.</param>
/// <param name="Open">Opens the bytes from the start.</param>
/// <param name="Length">Length in bytes; null when unknown.</param>
public sealed record LogSource(string Name, Func<Stream> Open, long? Length = null)
{
    /// <summary>The folder or zip this file came out of: its files are one recording with one clock. Null for a file named by itself.</summary>
    public string? Recording { get; init; }

    /// <summary>A file on disk.</summary>
    public static LogSource FromFile(string path) => new(Path.GetFileName(path), () => File.OpenRead(path), new FileInfo(path).Length);

    /// <summary>Bytes in memory.</summary>
    public static LogSource FromBytes(string name, byte[] bytes) => new(name, () => new MemoryStream(bytes, writable: false), bytes.LongLength);
}

/// <summary>Choices of the import.</summary>
public sealed record ImportOptions
{
    /// <summary>The person's word on columns (<c>--column</c> first, then the rig file's); overrules every inference.</summary>
    public IReadOnlyList<ColumnRule> Columns { get; init; } = [];

    /// <summary>With several files, a column of <see cref="Columns"/> that this file lacks stands in another.</summary>
    internal bool ColumnsMayBeElsewhere { get; init; }

    /// <summary>Any row left out is an error.</summary>
    public bool Strict { get; init; }

    /// <summary>Called now and then with the fraction of bytes read, for progress; null for none.</summary>
    public Action<double>? Progress { get; init; }
}
