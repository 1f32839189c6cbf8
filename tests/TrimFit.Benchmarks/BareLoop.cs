using System.Buffers.Text;

namespace TrimFit.Benchmarks;

/// <summary>The yardstick of CSV readers: one loop over the bytes, no check of anything, columns that grow.</summary>
internal static class BareLoop
{
    public static double[][] Read(string path, int columns)
    {
        double[][] table = [.. Enumerable.Range(0, columns).Select(_ => new double[1 << 16])];
        byte[] bytes = File.ReadAllBytes(path);
        ReadOnlySpan<byte> rest = bytes.AsSpan()[(bytes.AsSpan().IndexOf((byte)'\n') + 1)..];
        int row = 0;
        while (rest.Length > 0)
        {
            if (row == table[0].Length)
            {
                for (int c = 0; c < columns; c++)
                    Array.Resize(ref table[c], 2 * row);
            }
            for (int c = 0; c < columns; c++)
            {
                int end = rest.IndexOfAny((byte)',', (byte)'\n');
                ReadOnlySpan<byte> cell = end < 0 ? rest : rest[..end];
                if (c == 0)
                    table[0][row] = Seconds(cell);
                else
                    _ = Utf8Parser.TryParse(cell, out table[c][row], out _);
                rest = end < 0 ? default : rest[(end + 1)..];
            }
            row++;
        }
        for (int c = 0; c < columns; c++)
            Array.Resize(ref table[c], row);
        return table;
    }

    /// <summary>2025-05-17T08:00:00.000Z as seconds since 1970.</summary>
    private static double Seconds(ReadOnlySpan<byte> cell)
    {
        int Two(ReadOnlySpan<byte> s, int at) => (10 * (s[at] - '0')) + s[at + 1] - '0';
        int year = (100 * Two(cell, 0)) + Two(cell, 2);
        var day = new DateOnly(year, Two(cell, 5), Two(cell, 8));
        return ((day.DayNumber - 719162) * 86400.0) + (3600 * Two(cell, 11)) + (60 * Two(cell, 14)) + Two(cell, 17) + ((100 * (cell[20] - '0')) + Two(cell, 21)) / 1000.0;
    }
}
