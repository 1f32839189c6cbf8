using System.Buffers.Binary;
using System.Collections.Immutable;
using System.IO.Compression;
using System.Text;
using System.Text.Json;

namespace TrimFit.Reporting.Carrying;

/// <summary>Everything that made a result, so that a report page can be run again years later: logs, rig file, sheet, choices, and the result itself.</summary>
/// <remarks>Packed as <c>Brotli(length of the manifest, manifest as JSON, contents)</c> in base64. A log whose lines all have the same number of cells
/// lies column by column, which packs a third better; unpacking gives its bytes back.</remarks>
public sealed record ReportInput
{
    /// <summary>Name of the packing in the page.</summary>
    public const string Schema = "trimfit-input/1";

    /// <summary>Logs longer than this together are not carried: the page would be too long to open.</summary>
    public const long MostLogBytes = 32L << 20;

    private const int LineLength = 160;
    private const int MostUnpackedBytes = 256 << 20; // what a page may unpack to, far above what Pack lets in
    private const string Begin = "<template id=\"trimfit-input\" data-schema=\"" + Schema + "\">", End = "</template>";

    /// <summary>The logs in the order they were given.</summary>
    public required ImmutableArray<CarriedFile> Logs { get; init; }

    /// <summary>The rig file.</summary>
    public required CarriedFile Rig { get; init; }

    /// <summary>The flight sheet; null without one.</summary>
    public CarriedFile? Sheet { get; init; }

    /// <summary>What was said about columns, as <c>ROLE=NAME[:UNIT]</c>.</summary>
    public ImmutableArray<string> Columns { get; init; } = [];

    /// <summary>The balance thrust as on the command line: <c>cruise</c>, <c>full</c>, <c>even</c> or newtons.</summary>
    public required string Balance { get; init; }

    /// <summary>The tolerance, deg/s.</summary>
    public required double ToleranceDegPerSec { get; init; }

    /// <summary>Seed of the random draws.</summary>
    public required ulong Seed { get; init; }

    /// <summary>Whether the flight was stripped of its positions.</summary>
    public bool WithoutPlace { get; init; }

    /// <summary>The result as JSON (<c>trimfit-fit/1</c>).</summary>
    public required string Result { get; init; }

    /// <summary>The input as text of letters, digits, <c>+</c>, <c>/</c>, <c>=</c> and line feeds.</summary>
    public string Pack()
    {
        var entries = new List<FileEntry>();
        using var contents = new MemoryStream();
        void Add(string role, CarriedFile file)
        {
            bool columns = ColumnLayout.TryPack(file.Content.Span, out byte[] packed);
            ReadOnlySpan<byte> stored = columns ? packed : file.Content.Span;
            contents.Write(stored);
            entries.Add(new() { Role = role, Name = file.Name, Recording = file.Recording, Length = stored.Length, ByColumns = columns });
        }
        foreach (CarriedFile log in Logs)
            Add("log", log);
        Add("rig", Rig);
        if (Sheet is not null)
            Add("sheet", Sheet);
        Add("result", new("result.json", Encoding.UTF8.GetBytes(Result)));
        byte[] manifest = JsonSerializer.SerializeToUtf8Bytes(new InputManifest
        {
            Files = [.. entries],
            Columns = [.. Columns],
            Balance = Balance,
            ToleranceDegS = ToleranceDegPerSec,
            Seed = Seed,
            WithoutPlace = WithoutPlace,
        }, InputManifestContext.Default.InputManifest);
        using var packedStream = new MemoryStream();
        using (var brotli = new BrotliStream(packedStream, new BrotliCompressionOptions { Quality = 9 }, leaveOpen: true))
        {
            Span<byte> length = stackalloc byte[4];
            BinaryPrimitives.WriteInt32LittleEndian(length, manifest.Length);
            brotli.Write(length);
            brotli.Write(manifest);
            contents.Position = 0;
            contents.CopyTo(brotli);
        }
        string base64 = Convert.ToBase64String(packedStream.GetBuffer(), 0, (int)packedStream.Length);
        var lines = new StringBuilder(base64.Length + (base64.Length / LineLength) + 2);
        for (int i = 0; i < base64.Length; i += LineLength)
            lines.Append('\n').Append(base64, i, Math.Min(LineLength, base64.Length - i));
        return lines.Append('\n').ToString();
    }

    /// <summary>Finds and unpacks the input in a page.</summary>
    /// <param name="page">The page's text.</param>
    /// <returns>Null when the page carries none.</returns>
    /// <exception cref="InvalidDataException">What the page carries is damaged.</exception>
    public static ReportInput? FindIn(string page)
    {
        ArgumentNullException.ThrowIfNull(page);
        int from = page.IndexOf(Begin, StringComparison.Ordinal);
        if (from < 0)
            return null;
        from += Begin.Length;
        int to = page.IndexOf(End, from, StringComparison.Ordinal);
        if (to < 0)
            throw new InvalidDataException("the carried input has no end");
        try
        {
            return Unpack(Convert.FromBase64String(page[from..to]));
        }
        catch (Exception e) when (e is FormatException or JsonException or InvalidOperationException or ArgumentException or OverflowException)
        {
            throw new InvalidDataException("the carried input is damaged", e);
        }
    }

    private static ReportInput Unpack(byte[] packed)
    {
        using var brotli = new BrotliStream(new MemoryStream(packed, writable: false), CompressionMode.Decompress);
        using var all = new MemoryStream();
        byte[] buffer = new byte[1 << 16];
        for (int n; (n = brotli.Read(buffer)) > 0;)
        {
            if (all.Length + n > MostUnpackedBytes)
                throw new InvalidDataException("the carried input unpacks to far more than a flight");
            all.Write(buffer, 0, n);
        }
        ReadOnlyMemory<byte> bytes = all.GetBuffer().AsMemory(0, (int)all.Length);
        int length = BinaryPrimitives.ReadInt32LittleEndian(bytes.Span);
        InputManifest manifest = JsonSerializer.Deserialize(bytes.Slice(4, length).Span, InputManifestContext.Default.InputManifest)
            ?? throw new InvalidDataException("the carried input has no list of its files");
        bytes = bytes[(4 + length)..];
        var logs = ImmutableArray.CreateBuilder<CarriedFile>();
        CarriedFile? rig = null, sheet = null, result = null;
        foreach (FileEntry entry in manifest.Files)
        {
            if (entry?.Name is null)
                throw new InvalidDataException("the carried input has a file without a name");
            ReadOnlyMemory<byte> stored = bytes[..entry.Length];
            bytes = bytes[entry.Length..];
            var file = new CarriedFile(entry.Name, entry.ByColumns ? ColumnLayout.Unpack(stored.Span) : stored) { Recording = entry.Recording };
            _ = entry.Role switch
            {
                "rig" => rig = file,
                "sheet" => sheet = file,
                "result" => result = file,
                "log" => AddTo(logs, file),
                _ => throw new InvalidDataException($"the carried input holds a file of unknown role \"{entry.Role}\""),
            };
        }
        if (rig is null || result is null || logs.Count == 0)
            throw new InvalidDataException("the carried input lacks a log, the rig file or the result");
        return new()
        {
            Logs = logs.ToImmutable(),
            Rig = rig,
            Sheet = sheet,
            Columns = [.. manifest.Columns],
            Balance = manifest.Balance,
            ToleranceDegPerSec = manifest.ToleranceDegS,
            Seed = manifest.Seed,
            WithoutPlace = manifest.WithoutPlace,
            Result = Encoding.UTF8.GetString(result.Content.Span),
        };
    }

    private static CarriedFile AddTo(ImmutableArray<CarriedFile>.Builder logs, CarriedFile file)
    {
        logs.Add(file);
        return file;
    }
}
