using System.Buffers;
using System.Text;
using System.Text.Json;
using TrimFit.Import;

namespace TrimFit.Cli.Batch;

/// <summary>What a batch has done so far: one line of JSON for each flight, appended and flushed as it ends, so that a killed run goes on where it was.</summary>
/// <remarks>A line holds the flight's key (a hash of all that its result depends on) and its cells. A last line that a kill cut short does not count.
/// Only the place of each line is kept in memory.</remarks>
internal sealed class BatchJournal : IDisposable
{
    private readonly FileStream _file;
    private readonly Dictionary<string, (long Offset, int Length)> _places = new(StringComparer.Ordinal);
    private readonly Lock _lock = new();

    private BatchJournal(FileStream file) => _file = file;

    /// <summary>Opens the journal, or begins one.</summary>
    /// <exception cref="CommandLineException">It cannot be opened or another program writes it.</exception>
    public static BatchJournal Open(string path)
    {
        FileStream file;
        try
        {
            file = new FileStream(path, FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.Read);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            throw new CommandLineException($"--out: \"{path}\" cannot be written. Check the folder's rights and whether another run uses it.");
        }
        var journal = new BatchJournal(file);
        journal.FindLines();
        return journal;
    }

    public bool Has(string key)
    {
        lock (_lock)
            return _places.ContainsKey(key);
    }

    /// <summary>Appends a flight; it is on disk when this returns.</summary>
    public void Append(string key, IEnumerable<KeyValuePair<string, JsonElement>> cells)
    {
        var buffer = new ArrayBufferWriter<byte>();
        using (var json = new Utf8JsonWriter(buffer))
        {
            json.WriteStartObject();
            json.WriteString("key", key);
            json.WriteStartObject("cells");
            foreach ((string name, JsonElement value) in cells)
            {
                json.WritePropertyName(name);
                value.WriteTo(json);
            }
            json.WriteEndObject();
            json.WriteEndObject();
        }
        lock (_lock)
        {
            long offset = _file.Seek(0, SeekOrigin.End);
            _file.Write(buffer.WrittenSpan);
            _file.WriteByte((byte)'\n');
            _file.Flush();
            _places[key] = (offset, buffer.WrittenCount);
        }
    }

    /// <summary>The cells of a flight, in their order.</summary>
    public IReadOnlyList<KeyValuePair<string, JsonElement>> Read(string key)
    {
        (long offset, int length) = _places[key];
        byte[] line = new byte[length];
        _file.Seek(offset, SeekOrigin.Begin);
        _file.ReadExactly(line);
        using JsonDocument document = JsonDocument.Parse(line);
        return [.. document.RootElement.GetProperty("cells").EnumerateObject().Select(p => KeyValuePair.Create(p.Name, p.Value.Clone()))];
    }

    public void Dispose() => _file.Dispose();

    private void FindLines()
    {
        long offset = 0;
        var line = new ArrayBufferWriter<byte>();
        byte[] block = new byte[1 << 16];
        int read;
        while ((read = _file.Read(block)) > 0)
        {
            ReadOnlySpan<byte> rest = block.AsSpan(0, read);
            int end;
            while ((end = rest.IndexOf((byte)'\n')) >= 0)
            {
                line.Write(rest[..end]);
                Keep(line.WrittenMemory, offset);
                offset += line.WrittenCount + 1;
                line.ResetWrittenCount();
                rest = rest[(end + 1)..];
            }
            line.Write(rest);
        }
        _file.SetLength(offset); // what a kill cut short
    }

    private void Keep(ReadOnlyMemory<byte> line, long offset)
    {
        try
        {
            using JsonDocument document = JsonDocument.Parse(line);
            if (document.RootElement.TryGetProperty("key", out JsonElement key) && document.RootElement.TryGetProperty("cells", out _))
                _places[key.GetString()!] = (offset, line.Length);
        }
        catch (JsonException)
        {
            throw LogFormatException.At(_file.Name, null, null, Encoding.UTF8.GetString(line.Span[..Math.Min(40, line.Length)]), "a line of an earlier batch",
                "Delete the file to begin anew, or name another folder with --out.");
        }
    }
}
