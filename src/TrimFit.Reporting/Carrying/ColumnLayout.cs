using System.Buffers.Binary;

namespace TrimFit.Reporting.Carrying;

/// <summary>Lays a table of text out column by column and back, byte for byte: like stands by like, which packs better.</summary>
/// <remarks>Packed: separator (1 byte), columns, rows (4 bytes each, little-endian), then each column's cells, each ended by a line feed.</remarks>
internal static class ColumnLayout
{
    private const byte LineFeed = (byte)'\n';
    private const int HeadBytes = 9;

    /// <summary>Lays it out; false when the text is no table: lines of different numbers of cells, or no line feed at its end.</summary>
    public static bool TryPack(ReadOnlySpan<byte> text, out byte[] packed)
    {
        packed = [];
        int first = text.IndexOf(LineFeed);
        if (first < 0 || text[^1] != LineFeed)
            return false;
        foreach (byte separator in ",;\t"u8)
        {
            int columns = text[..first].Count(separator) + 1;
            if (columns < 2 || !HasShape(text, separator, columns, out int rows))
                continue;
            packed = new byte[HeadBytes + text.Length];
            packed[0] = separator;
            BinaryPrimitives.WriteInt32LittleEndian(packed.AsSpan(1), columns);
            BinaryPrimitives.WriteInt32LittleEndian(packed.AsSpan(5), rows);
            int[] next = Starts(text, separator, columns);
            int column = 0;
            foreach (byte b in text)
            {
                bool ends = b == separator || b == LineFeed;
                packed[next[column]++] = ends ? LineFeed : b;
                column = b == LineFeed ? 0 : b == separator ? column + 1 : column;
            }
            return true;
        }
        return false;
    }

    /// <summary>Gives the text back.</summary>
    /// <exception cref="InvalidDataException">It was not packed by <see cref="TryPack"/>.</exception>
    public static byte[] Unpack(ReadOnlySpan<byte> packed)
    {
        if (packed.Length < HeadBytes)
            throw Damaged();
        byte separator = packed[0];
        int columns = BinaryPrimitives.ReadInt32LittleEndian(packed[1..]), rows = BinaryPrimitives.ReadInt32LittleEndian(packed[5..]);
        ReadOnlySpan<byte> cells = packed[HeadBytes..];
        if (columns < 2 || rows < 1 || (long)columns * rows > cells.Length)
            throw Damaged();
        int[] next = new int[columns];
        int column = 0, row = 0;
        for (int i = 0; i < cells.Length && column < columns; i++)
        {
            if (cells[i] == LineFeed && ++row == rows)
            {
                row = 0;
                if (++column < columns)
                    next[column] = i + 1;
            }
        }
        if (column != columns)
            throw Damaged();
        byte[] text = new byte[cells.Length];
        int at = 0;
        for (int r = 0; r < rows; r++)
        {
            for (int c = 0; c < columns; c++)
            {
                ReadOnlySpan<byte> rest = cells[next[c]..];
                int length = rest.IndexOf(LineFeed);
                if (length < 0)
                    throw Damaged();
                rest[..length].CopyTo(text.AsSpan(at));
                at += length;
                text[at++] = c == columns - 1 ? LineFeed : separator;
                next[c] += length + 1;
            }
        }
        return at == text.Length ? text : throw Damaged();
    }

    private static bool HasShape(ReadOnlySpan<byte> text, byte separator, int columns, out int rows)
    {
        rows = 0;
        while (!text.IsEmpty)
        {
            int end = text.IndexOf(LineFeed);
            if (text[..end].Count(separator) + 1 != columns)
                return false;
            text = text[(end + 1)..];
            rows++;
        }
        return true;
    }

    /// <summary>Where each column begins in the packed bytes.</summary>
    private static int[] Starts(ReadOnlySpan<byte> text, byte separator, int columns)
    {
        int[] size = new int[columns];
        int column = 0;
        foreach (byte b in text)
        {
            size[column]++;
            column = b == LineFeed ? 0 : b == separator ? column + 1 : column;
        }
        int[] start = new int[columns];
        start[0] = HeadBytes;
        for (int c = 1; c < columns; c++)
            start[c] = start[c - 1] + size[c - 1];
        return start;
    }

    private static InvalidDataException Damaged() => new("the carried input is damaged");
}
