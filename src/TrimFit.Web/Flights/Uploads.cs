using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using Microsoft.AspNetCore.Http;
using TrimFit.Import;
using TrimFit.Import.Joining;
using TrimFit.Web.Sessions;

namespace TrimFit.Web.Flights;

/// <summary>What came with one upload.</summary>
/// <param name="Logs">Files that may be logs.</param>
/// <param name="Rig">A rig file among them.</param>
/// <param name="Sheet">A flight sheet among them.</param>
internal sealed record Upload(ImmutableArray<StoredFile> Logs, RigDraft? Rig, (string Name, byte[] Bytes)? Sheet);

/// <summary>Takes uploads in: names are made harmless, bytes go under numbers into the session's folder.</summary>
internal static class Uploads
{
    private const int MostFiles = 20, MostName = 100;

    /// <summary>Far above any rig file or sheet.</summary>
    private const long MostSettingsBytes = 1 << 20;

    private const string SheetSchema = "trimfit-flight/1";

    private static readonly UTF8Encoding _utf8 = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>Stores the files of a form.</summary>
    /// <exception cref="LogFormatException">Too many files, a settings file that is none, or no room.</exception>
    public static async Task<Upload> TakeAsync(IEnumerable<IFormFile> files, Session session, SessionStore sessions, WebOptions options, CancellationToken cancel)
    {
        IFormFile[] given = [.. files.Where(f => f.FileName.Length > 0)];
        if (given.Length > MostFiles)
            throw LogFormatException.At("upload", null, null, given.Length.ToString(CultureInfo.InvariantCulture) + " files", $"at most {MostFiles.ToString(CultureInfo.InvariantCulture)}", "Drop the files of one flight, or a zip of them.");
        if (sessions.StoredBytes + given.Sum(f => f.Length) > options.MostStoredBytes)
            throw LogFormatException.At("upload", null, null, "no room for it", "less work at once", "Wait until other flights are worked out, then drop it again.");
        var logs = ImmutableArray.CreateBuilder<StoredFile>();
        RigDraft? rig = null;
        (string, byte[])? sheet = null;
        foreach (IFormFile file in given)
        {
            string name = SafeName(file.FileName);
            if (name.EndsWith(".toml", StringComparison.OrdinalIgnoreCase))
            {
                byte[] bytes = await SettingsAsync(file, name, cancel);
                if (Utf8(name, bytes).Contains(SheetSchema, StringComparison.Ordinal))
                    sheet = (name, bytes);
                else
                    rig = RigDraft.FromBytes(name, bytes);
                continue;
            }
            string path = session.NewFile();
            await using FileStream to = new(path, new FileStreamOptions { Mode = FileMode.CreateNew, Access = FileAccess.Write, Options = FileOptions.Asynchronous });
            await file.CopyToAsync(to, cancel);
            logs.Add(new(name, path, file.Length));
        }
        return new(logs.ToImmutable(), rig, sheet);
    }

    /// <summary>The last part of a name, without control or direction characters, and short.</summary>
    public static string SafeName(string name)
    {
        string last = name[(name.AsSpan().LastIndexOfAny('/', '\\') + 1)..];
        var clean = new StringBuilder();
        foreach (Rune rune in last.EnumerateRunes())
        {
            if (clean.Length < MostName && Rune.GetUnicodeCategory(rune) is not (UnicodeCategory.Control or UnicodeCategory.Format or UnicodeCategory.PrivateUse or UnicodeCategory.OtherNotAssigned or UnicodeCategory.LineSeparator or UnicodeCategory.ParagraphSeparator))
                clean.Append(rune.ToString());
        }
        string text = clean.ToString().Trim();
        return text.Trim('.').Length == 0 ? "log" : text;
    }

    /// <summary>Files as the import reads them: a zip is looked into, nothing is unpacked to the disk.</summary>
    public static IReadOnlyList<LogSource> Sources(IEnumerable<StoredFile> files) => [.. files.SelectMany(file => IsZip(file.Path)
        ? LogSources.Zip(file.Name, () => File.OpenRead(file.Path))
        : [new LogSource(file.Name, () => File.OpenRead(file.Path), file.Bytes)])];

    /// <summary>Text of a settings file.</summary>
    /// <exception cref="LogFormatException">The bytes are no UTF-8.</exception>
    public static string Utf8(string name, byte[] bytes)
    {
        try
        {
            return _utf8.GetString(bytes);
        }
        catch (DecoderFallbackException)
        {
            throw LogFormatException.At(name, null, null, "bytes that are not UTF-8", "text in UTF-8", "Save the file as UTF-8 in the editor.");
        }
    }

    private static async Task<byte[]> SettingsAsync(IFormFile file, string name, CancellationToken cancel)
    {
        if (file.Length > MostSettingsBytes)
            throw LogFormatException.At(name, null, null, "a file above 1 MB", "a settings file of a few lines", "Check whether a log was given in its place.");
        using var bytes = new MemoryStream();
        await file.CopyToAsync(bytes, cancel);
        return bytes.ToArray();
    }

    private static bool IsZip(string path)
    {
        using FileStream stream = File.OpenRead(path);
        Span<byte> head = stackalloc byte[4];
        return stream.ReadAtLeast(head, 4, throwOnEndOfStream: false) == 4 && (head.SequenceEqual("PK\u0003\u0004"u8) || head.SequenceEqual("PK\u0005\u0006"u8));
    }
}
