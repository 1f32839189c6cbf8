using System.Text;

namespace TrimFit.Reporting.Rows;

/// <summary>Writes one struct in Thrift's compact protocol (Apache Thrift, thrift-compact-protocol.md), as far as Parquet's metadata needs it.</summary>
internal sealed class ThriftCompact
{
    private const int I32Type = 5, I64Type = 6, BinaryType = 8, ListType = 9, StructType = 12;
    private readonly List<byte> _bytes;
    private int _last;

    public ThriftCompact() : this([])
    {
    }

    private ThriftCompact(List<byte> bytes) => _bytes = bytes;

    public byte[] Bytes => [.. _bytes];

    public void I32(int field, int value)
    {
        Field(field, I32Type);
        ZigZag(value);
    }

    public void I64(int field, long value)
    {
        Field(field, I64Type);
        ZigZag(value);
    }

    public void Text(int field, string value)
    {
        Field(field, BinaryType);
        Binary(value);
    }

    public void Struct(int field, Action<ThriftCompact> members)
    {
        Field(field, StructType);
        Inner(members);
    }

    public void StructList(int field, IReadOnlyList<Action<ThriftCompact>> items)
    {
        ListHead(field, StructType, items.Count);
        foreach (Action<ThriftCompact> item in items)
            Inner(item);
    }

    public void I32List(int field, IReadOnlyList<int> items)
    {
        ListHead(field, I32Type, items.Count);
        foreach (int item in items)
            ZigZag(item);
    }

    public void TextList(int field, IReadOnlyList<string> items)
    {
        ListHead(field, BinaryType, items.Count);
        foreach (string item in items)
            Binary(item);
    }

    public void Stop() => _bytes.Add(0);

    private void Inner(Action<ThriftCompact> members)
    {
        var inner = new ThriftCompact(_bytes);
        members(inner);
        inner.Stop();
    }

    /// <summary>Fields come in rising order, each less than 16 above the one before: the short form always fits.</summary>
    private void Field(int field, int type)
    {
        _bytes.Add((byte)(((field - _last) << 4) | type));
        _last = field;
    }

    private void ListHead(int field, int itemType, int count)
    {
        Field(field, ListType);
        if (count < 15)
        {
            _bytes.Add((byte)((count << 4) | itemType));
            return;
        }
        _bytes.Add((byte)(0xF0 | itemType));
        VarInt((ulong)count);
    }

    private void Binary(string value)
    {
        byte[] text = Encoding.UTF8.GetBytes(value);
        VarInt((ulong)text.Length);
        _bytes.AddRange(text);
    }

    private void ZigZag(long value) => VarInt((ulong)((value << 1) ^ (value >> 63)));

    private void VarInt(ulong value)
    {
        for (; value >= 0x80; value >>= 7)
            _bytes.Add((byte)(value | 0x80));
        _bytes.Add((byte)value);
    }
}
