using System.IO.Compression;
using static System.FormattableString;

namespace TrimFit.Import.Joining;

/// <summary>Turns the paths a person gives into files to read: a file, a folder or zip of one recording.</summary>
public static class LogSources
{
    // Far above any recording of one flight, far below what would trouble a small machine.
    private const int MostFiles = 500;
    private const long MostBytes = 4L << 30;
    private const long RatioFreeBytes = 8L << 20;
    private const int MostRatio = 200; // text of a logger packs 5 to 30 times

    private static readonly string[] _otherKinds = [".jpg", ".jpeg", ".png", ".heic", ".gif", ".mp4", ".mov", ".m4a", ".wav", ".mp3", ".pdf", ".html", ".json", ".toml", ".md", ".sqlite", ".db"];

    /// <summary>Files to read, in the order of the paths; those of a folder or zip in the order of their names.</summary>
    /// <exception cref="LogFormatException">A path does not exist, a folder or zip holds no log, or a zip is damaged or hostile.</exception>
    public static IReadOnlyList<LogSource> From(IEnumerable<string> paths)
    {
        ArgumentNullException.ThrowIfNull(paths);
        var sources = new List<LogSource>();
        foreach (string path in paths)
        {
            string name = Path.GetFileName(Path.TrimEndingDirectorySeparator(Path.GetFullPath(path)));
            try
            {
                if (Directory.Exists(path))
                    sources.AddRange(Folder(path, name));
                else if (!File.Exists(path))
                    throw LogFormatException.At(name, null, null, "no such file or folder", "a log, a folder or a zip of logs", "Check the name and the folder.");
                else if (IsZip(path))
                    sources.AddRange(Zip(name, () => File.OpenRead(path)));
                else
                    sources.Add(LogSource.FromFile(path));
            }
            catch (Exception e) when (e is IOException or UnauthorizedAccessException)
            {
                throw LogFormatException.At(name, null, null, "a file that cannot be opened", "a readable file", "Check its rights and whether another program holds it.");
            }
        }
        return sources;
    }

    /// <summary>The logs of a zip in memory or elsewhere. Nothing is unpacked to disk.</summary>
    /// <param name="name">Name for messages.</param>
    /// <param name="open">Opens the bytes of the zip from the start; the stream must be able to seek.</param>
    /// <exception cref="LogFormatException">The zip holds no log, or is damaged or hostile.</exception>
    public static IReadOnlyList<LogSource> Zip(string name, Func<Stream> open)
    {
        ArgumentNullException.ThrowIfNull(name);
        ArgumentNullException.ThrowIfNull(open);
        var sources = new List<LogSource>();
        try
        {
            using var archive = new ZipArchive(open(), ZipArchiveMode.Read);
            if (archive.Entries.Count > MostFiles)
                throw LogFormatException.At(name, null, null, Invariant($"a zip of {archive.Entries.Count} files"), Invariant($"at most {MostFiles}"), "Unpack it and give the files of one flight.");
            long total = 0;
            for (int i = 0; i < archive.Entries.Count; i++)
            {
                ZipArchiveEntry entry = archive.Entries[i];
                string file = SafeName(entry.FullName);
                if (file.Length == 0 || !IsPerhapsLog(entry.FullName))
                    continue;
                if (entry.IsEncrypted)
                    throw LogFormatException.At(name, null, null, "a zip with a password", "an open one", "Unpack it and give the files.");
                total += entry.Length;
                if (total > MostBytes || (entry.Length > RatioFreeBytes && entry.Length / MostRatio > entry.CompressedLength))
                    throw TooLarge(name);
                int index = i;
                sources.Add(new(file, () => OpenEntry(name, open, index), entry.Length) { Recording = name });
            }
        }
        catch (InvalidDataException)
        {
            throw Damaged(name);
        }
        sources.Sort((a, b) => string.CompareOrdinal(a.Name, b.Name));
        return sources.Count > 0 ? sources : throw LogFormatException.At(name, null, null, "a zip without a log", "the files of a recording (CSV, IGC, GPX, NMEA)", "Export the recording again.");
    }

    private static List<LogSource> Folder(string path, string name)
    {
        var options = new EnumerationOptions { RecurseSubdirectories = true, MaxRecursionDepth = 3, AttributesToSkip = FileAttributes.Hidden | FileAttributes.System | FileAttributes.ReparsePoint };
        string[] files = [.. Directory.EnumerateFiles(path, "*", options).Where(file => IsPerhapsLog(Path.GetRelativePath(path, file))).Take(MostFiles + 1)];
        if (files.Length > MostFiles)
            throw LogFormatException.At(name, null, null, Invariant($"a folder of more than {MostFiles} files"), "the files of one recording", "Give the folder of one flight.");
        Array.Sort(files, string.CompareOrdinal);
        return files.Length > 0
            ? [.. files.Select(file => LogSource.FromFile(file) with { Recording = name })]
            : throw LogFormatException.At(name, null, null, "a folder without a log", "the files of a recording (CSV, IGC, GPX, NMEA)", "Check the folder.");
    }

    private static bool IsPerhapsLog(string path)
    {
        string[] parts = path.Split('/', '\\');
        return !Array.Exists(parts, part => (part.StartsWith('.') && part is not ("." or "..")) || part == "__MACOSX") // what file managers leave behind
            && !_otherKinds.Contains(Path.GetExtension(path).ToLowerInvariant());
    }

    /// <summary>The last part of a name inside a zip, without anything a terminal or a file system could trip over; empty for a folder.</summary>
    private static string SafeName(string fullName)
    {
        string last = fullName[(fullName.AsSpan().LastIndexOfAny('/', '\\') + 1)..];
        return new([.. last.Where(c => !char.IsControl(c)).Take(120)]);
    }

    private static bool IsZip(string path)
    {
        using FileStream stream = File.OpenRead(path);
        Span<byte> head = stackalloc byte[4];
        return stream.ReadAtLeast(head, 4, throwOnEndOfStream: false) == 4 && (head.SequenceEqual("PK\u0003\u0004"u8) || head.SequenceEqual("PK\u0005\u0006"u8));
    }

    private static CheckedEntryStream OpenEntry(string name, Func<Stream> open, int index)
    {
        ZipArchive? archive = null;
        try
        {
            archive = new ZipArchive(open(), ZipArchiveMode.Read);
            ZipArchiveEntry entry = archive.Entries[index];
            return new CheckedEntryStream(name, archive, entry.Open(), entry.Length, entry.Crc32);
        }
        catch (InvalidDataException)
        {
            archive?.Dispose();
            throw Damaged(name);
        }
    }

    private static LogFormatException Damaged(string name) => LogFormatException.At(name, null, null, "a damaged zip", "a zip that opens", "Copy it again or unpack it and give the files.");

    private static LogFormatException TooLarge(string name) =>
        LogFormatException.At(name, null, null, "a zip that unpacks to far more than a flight", Invariant($"at most {MostBytes >> 30} GB and {MostRatio} times its size"), "Unpack it yourself if it is yours, and give the files.");

    /// <summary>One file of a zip: ends the reading when the entry gives more than it declared, and names a damaged zip as such.</summary>
    /// <remarks>The library does not compare the checksum and cuts an entry at its declared length, so both are looked at here.</remarks>
    private sealed class CheckedEntryStream(string name, ZipArchive archive, Stream inner, long declared, uint checksum) : Stream
    {
        private static readonly uint[] _crcTable = [.. Enumerable.Range(0, 256).Select(CrcOfByte)];

        private long _read;
        private uint _crc = uint.MaxValue;

        public override bool CanRead => true;

        public override bool CanSeek => false;

        public override bool CanWrite => false;

        public override long Length => throw new NotSupportedException();

        public override long Position
        {
            get => _read;
            set => throw new NotSupportedException();
        }

        public override int Read(byte[] buffer, int offset, int count) => Read(buffer.AsSpan(offset, count));

        public override int Read(Span<byte> buffer)
        {
            int n;
            try
            {
                n = inner.Read(buffer);
            }
            catch (InvalidDataException)
            {
                throw Damaged(name);
            }
            _read += n;
            if (_read > declared)
                throw TooLarge(name);
            foreach (byte b in buffer[..n])
                _crc = _crcTable[(byte)(_crc ^ b)] ^ (_crc >> 8);
            return n > 0 || buffer.IsEmpty || ~_crc == checksum ? n : throw Damaged(name);
        }

        /// <summary>CRC-32 of one byte with the reflected polynomial of ISO 3309, as zip files use it.</summary>
        private static uint CrcOfByte(int value)
        {
            uint crc = (uint)value;
            for (int bit = 0; bit < 8; bit++)
                crc = (crc >> 1) ^ ((crc & 1) * 0xEDB88320u);
            return crc;
        }

        public override void Flush()
        {
        }

        public override long Seek(long offset, SeekOrigin origin) => throw new NotSupportedException();

        public override void SetLength(long value) => throw new NotSupportedException();

        public override void Write(byte[] buffer, int offset, int count) => throw new NotSupportedException();

        protected override void Dispose(bool disposing)
        {
            if (disposing)
            {
                inner.Dispose();
                archive.Dispose();
            }
            base.Dispose(disposing);
        }
    }
}
