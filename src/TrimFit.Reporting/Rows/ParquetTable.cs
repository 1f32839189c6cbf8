using System.Buffers.Binary;
using System.Text;
using System.Text.Json;

namespace TrimFit.Reporting.Rows;

/// <summary>Writes rows as Apache Parquet: optional columns, plain encoding, uncompressed, one data page for each column of a row group.</summary>
/// <remarks>Apache Parquet format 2.x (parquet.thrift, Encodings.md), the part of it that every reader must know. Reflection-free, which packages for it are not.</remarks>
public sealed class ParquetTable
{
    private const int Plain = 0, RunLength = 3; // Encoding in parquet.thrift
    private static readonly byte[] _magic = "PAR1"u8.ToArray();

    private readonly Stream _output;
    private readonly TableColumns _columns;
    private readonly List<Group> _groups = [];
    private long _position;

    /// <summary>Begins a file.</summary>
    /// <param name="output">Written to from where it stands; not closed.</param>
    /// <param name="columns">All columns of all rows to come.</param>
    public ParquetTable(Stream output, TableColumns columns)
    {
        ArgumentNullException.ThrowIfNull(output);
        ArgumentNullException.ThrowIfNull(columns);
        (_output, _columns) = (output, columns);
        Write(_magic);
    }

    /// <summary>Writes a row group; a reader takes a group into memory at once.</summary>
    public void WriteGroup(IReadOnlyList<IReadOnlyDictionary<string, JsonElement>> rows)
    {
        ArgumentNullException.ThrowIfNull(rows);
        if (rows.Count == 0)
            return;
        var chunks = new List<Chunk>();
        foreach (string name in _columns.Names)
        {
            byte[] page = Page(name, rows);
            var head = new ThriftCompact();
            head.I32(1, 0); // type: data page
            head.I32(2, page.Length);
            head.I32(3, page.Length);
            head.Struct(5, data =>
            {
                data.I32(1, rows.Count);
                data.I32(2, Plain);
                data.I32(3, RunLength);
                data.I32(4, RunLength);
            });
            head.Stop();
            long offset = _position;
            Write(head.Bytes);
            Write(page);
            chunks.Add(new(name, offset, _position - offset));
        }
        _groups.Add(new(rows.Count, chunks));
    }

    /// <summary>Writes the footer; the file is whole after it.</summary>
    public void Finish()
    {
        var footer = new ThriftCompact();
        footer.I32(1, 1); // version
        footer.StructList(2, [Root, .. _columns.Names.Select(name => (Action<ThriftCompact>)(s => SchemaOf(s, name)))]);
        footer.I64(3, _groups.Sum(g => (long)g.Rows));
        footer.StructList(4, [.. _groups.Select(g => (Action<ThriftCompact>)(s => Describe(s, g)))]);
        footer.Text(6, "TrimFit");
        footer.Stop();
        Write(footer.Bytes);
        Span<byte> length = stackalloc byte[4];
        BinaryPrimitives.WriteInt32LittleEndian(length, footer.Bytes.Length);
        Write(length);
        Write(_magic);
        _output.Flush();
    }

    private void Root(ThriftCompact element)
    {
        element.Text(4, "flights");
        element.I32(5, _columns.Names.Count);
    }

    private void SchemaOf(ThriftCompact element, string name)
    {
        element.I32(1, TypeCode(name));
        element.I32(3, 1); // repetition: optional
        element.Text(4, name);
        if (_columns.TypeOf(name) == CellType.Text)
            element.I32(6, 0); // converted type: UTF-8
    }

    private void Describe(ThriftCompact group, Group g)
    {
        group.StructList(1, [.. g.Chunks.Select(chunk => (Action<ThriftCompact>)(column =>
        {
            column.I64(2, chunk.Offset);
            column.Struct(3, meta =>
            {
                meta.I32(1, TypeCode(chunk.Name));
                meta.I32List(2, [Plain, RunLength]);
                meta.TextList(3, [chunk.Name]);
                meta.I32(4, 0); // uncompressed
                meta.I64(5, g.Rows);
                meta.I64(6, chunk.Bytes);
                meta.I64(7, chunk.Bytes);
                meta.I64(9, chunk.Offset);
            });
        }))]);
        group.I64(2, g.Chunks.Sum(c => c.Bytes));
        group.I64(3, g.Rows);
    }

    private int TypeCode(string name) => _columns.TypeOf(name) switch { CellType.Number => 5, CellType.Boolean => 0, _ => 6 };

    /// <summary>Definition levels (1 where there is a value) and the values.</summary>
    private byte[] Page(string name, IReadOnlyList<IReadOnlyDictionary<string, JsonElement>> rows)
    {
        CellType type = _columns.TypeOf(name);
        using var levels = new MemoryStream();
        using var values = new MemoryStream();
        int run = 0, bits = 0, bitCount = 0;
        bool? level = null;
        Span<byte> number = stackalloc byte[8];
        foreach (IReadOnlyDictionary<string, JsonElement> row in rows)
        {
            bool present = row.TryGetValue(name, out JsonElement value) && value.ValueKind is not (JsonValueKind.Null or JsonValueKind.Undefined);
            if (present != level)
            {
                EndRun();
                (level, run) = (present, 0);
            }
            run++;
            if (!present)
                continue;
            switch (type)
            {
                case CellType.Number:
                    BinaryPrimitives.WriteDoubleLittleEndian(number, value.GetDouble());
                    values.Write(number);
                    break;
                case CellType.Boolean:
                    bits |= value.GetBoolean() ? 1 << bitCount : 0;
                    if (++bitCount == 8)
                    {
                        values.WriteByte((byte)bits);
                        bits = bitCount = 0;
                    }
                    break;
                default:
                    byte[] text = Encoding.UTF8.GetBytes(value.ValueKind == JsonValueKind.String ? value.GetString()! : value.GetRawText());
                    BinaryPrimitives.WriteInt32LittleEndian(number, text.Length);
                    values.Write(number[..4]);
                    values.Write(text);
                    break;
            }
        }
        EndRun();
        if (bitCount > 0)
            values.WriteByte((byte)bits);
        byte[] page = new byte[4 + levels.Length + values.Length];
        BinaryPrimitives.WriteInt32LittleEndian(page, (int)levels.Length);
        levels.ToArray().CopyTo(page, 4);
        values.ToArray().CopyTo(page, 4 + (int)levels.Length);
        return page;

        void EndRun()
        {
            if (run == 0)
                return;
            uint head = (uint)run << 1; // a run-length run: the count, then the value in one byte
            for (; head >= 0x80; head >>= 7)
                levels.WriteByte((byte)(head | 0x80));
            levels.WriteByte((byte)head);
            levels.WriteByte(level == true ? (byte)1 : (byte)0);
        }
    }

    private void Write(ReadOnlySpan<byte> bytes)
    {
        _output.Write(bytes);
        _position += bytes.Length;
    }

    private sealed record Chunk(string Name, long Offset, long Bytes);

    private sealed record Group(int Rows, List<Chunk> Chunks);
}
