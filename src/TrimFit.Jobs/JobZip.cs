using System.Collections.Immutable;
using System.IO.Compression;
using System.Text;
using static System.FormattableString;

namespace TrimFit.Jobs;

/// <summary>A job as one zip: <c>job.json</c> and <c>content/SHA-256</c> for every file it names. Nothing of a zip is ever written under a name from it.</summary>
public static class JobZip
{
    private const string JobEntry = "job.json", ContentFolder = "content/";
    private const int MostEntries = 20_000;
    private const long MostJsonBytes = 16L << 20;

    /// <summary>What a whole zip may unpack to unless somebody says otherwise: far above any job, far below what would trouble a small machine.</summary>
    public const long UsualMostBytes = 2L << 30;

    // The zip of a job is the same whenever it is made: entries in order, one fixed time (the first that a zip can hold).
    private static readonly DateTimeOffset _entryTime = new(1980, 1, 1, 0, 0, 0, TimeSpan.Zero);

    /// <summary>Writes a job.</summary>
    public static void Write(JobBundle bundle, Stream zip)
    {
        ArgumentNullException.ThrowIfNull(bundle);
        using var archive = new ZipArchive(zip, ZipArchiveMode.Create, leaveOpen: true);
        Put(JobEntry, Encoding.UTF8.GetBytes(JobText.Write(bundle.Job)));
        foreach ((string sha256, ReadOnlyMemory<byte> bytes) in bundle.Contents)
            Put(ContentFolder + sha256, bytes.Span);

        void Put(string name, ReadOnlySpan<byte> bytes)
        {
            ZipArchiveEntry entry = archive.CreateEntry(name, CompressionLevel.Optimal);
            entry.LastWriteTime = _entryTime;
            using Stream stream = entry.Open();
            stream.Write(bytes);
        }
    }

    /// <summary>Reads a job from a zip that a stranger may have made.</summary>
    /// <param name="name">Name of the file for messages.</param>
    /// <param name="zip">The zip; must be able to seek.</param>
    /// <param name="mostBytes">What it may unpack to.</param>
    /// <exception cref="JobBookException">The zip is damaged, holds something else than a job, unpacks to too much, or its bytes are not those it names.</exception>
    public static JobBundle Read(string name, Stream zip, long mostBytes = UsualMostBytes)
    {
        ArgumentNullException.ThrowIfNull(zip);
        try
        {
            using var archive = new ZipArchive(zip, ZipArchiveMode.Read, leaveOpen: true);
            if (archive.Entries.Count > MostEntries)
                throw Refused(name, Invariant($"{archive.Entries.Count} files"), Invariant($"at most {MostEntries}"));
            long left = mostBytes;
            byte[]? json = null;
            var contents = ImmutableSortedDictionary.CreateBuilder<string, ReadOnlyMemory<byte>>(StringComparer.Ordinal);
            foreach (ZipArchiveEntry entry in archive.Entries)
            {
                string file = entry.FullName;
                if (file == JobEntry)
                {
                    if (json is not null)
                        throw Refused(name, "two files job.json", "one");
                    json = Unpack(name, entry, Math.Min(left, MostJsonBytes));
                    left -= json.Length;
                }
                else if (file.StartsWith(ContentFolder, StringComparison.Ordinal) && Packed.IsSha256(file[ContentFolder.Length..]))
                {
                    string sha256 = file[ContentFolder.Length..];
                    if (contents.ContainsKey(sha256))
                        throw Refused(name, $"two files {file}", "one");
                    byte[] bytes = Unpack(name, entry, left);
                    left -= bytes.Length;
                    if (Packed.Sha256(bytes) != sha256)
                        throw Refused(name, $"a file {file} whose bytes have another SHA-256", "the bytes that were exported");
                    contents.Add(sha256, bytes);
                }
                else
                {
                    throw Refused(name, $"a file \"{Shown(file)}\"", "job.json and content/SHA-256 only");
                }
            }
            if (json is null)
                throw Refused(name, "no job.json", "the zip of \"trimfit job export\"");
            Core.Workshop.JobRecord job = JobText.Read($"{name}/{JobEntry}", json);
            HashSet<string> named = [.. JobBundle.NamedBy(job)];
            if (named.FirstOrDefault(h => !contents.ContainsKey(h)) is string missing)
                throw Refused(name, $"no content/{missing}, which job.json names", "every file of the job");
            if (contents.Keys.FirstOrDefault(h => !named.Contains(h)) is string extra)
                throw Refused(name, $"content/{extra}, which job.json does not name", "the files of the job only");
            return new JobBundle(job, contents.ToImmutable());
        }
        catch (Exception e) when (e is InvalidDataException or EndOfStreamException or NotSupportedException)
        {
            throw new JobBookException($"{name}: found a damaged zip or none at all, expected the zip of \"trimfit job export\". Copy it again. Nothing was imported.", e);
        }
    }

    /// <summary>Reads an entry to its true end, whatever length it declares.</summary>
    private static byte[] Unpack(string name, ZipArchiveEntry entry, long most)
    {
        if (entry.IsEncrypted)
            throw Refused(name, "a zip with a password", "an open one");
        if (entry.Length > most)
            throw TooLarge(name);
        using Stream stream = entry.Open();
        var bytes = new MemoryStream();
        byte[] buffer = new byte[81920];
        for (int n = stream.Read(buffer); n > 0; n = stream.Read(buffer))
        {
            if (bytes.Length + n > most)
                throw TooLarge(name);
            bytes.Write(buffer, 0, n);
        }
        return bytes.ToArray();
    }

    private static JobBookException TooLarge(string name) => Refused(name, "a zip that unpacks to far more than a job", "less; --most-megabytes allows more");

    private static JobBookException Refused(string name, string found, string expected) => new($"{name}: found {found}, expected {expected}. Nothing was imported.");

    private static string Shown(string text) => new([.. text.Where(c => !char.IsControl(c)).Take(80)]);
}
