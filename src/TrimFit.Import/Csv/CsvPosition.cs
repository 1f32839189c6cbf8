namespace TrimFit.Import.Csv;

/// <summary>Latitude and longitude in one cell.</summary>
internal static class CsvPosition
{
    /// <summary>Whether the text is a letter N, S, E or W behind a number of degrees.</summary>
    public static bool IsHemisphere(ReadOnlySpan<byte> text) => text.Length == 1 && (text[0] & ~0x20) is 'N' or 'S' or 'E' or 'W';

    /// <summary>Reads two numbers, latitude first, separated by a space, a semicolon or a comma that is no decimal mark.</summary>
    /// <param name="cell">The cell's bytes, such as <c>31.166881 121.356245</c>.</param>
    /// <param name="decimalMark">The file's decimal mark.</param>
    /// <param name="latitudeDeg">Latitude, deg, −90 to 90.</param>
    /// <param name="longitudeDeg">Longitude, deg, −180 to 360.</param>
    public static bool TryParse(ReadOnlySpan<byte> cell, byte decimalMark, out double latitudeDeg, out double longitudeDeg)
    {
        longitudeDeg = double.NaN;
        latitudeDeg = double.NaN;
        cell = CsvNumber.Trim(cell);
        int at = cell.IndexOf((byte)' ');
        if (at < 0)
            at = cell.IndexOf((byte)';');
        if (at < 0 && decimalMark != (byte)',')
            at = cell.IndexOf((byte)',');
        if (at <= 0)
            return false;
        ReadOnlySpan<byte> second = CsvNumber.Trim(cell[(at + 1)..]);
        ReadOnlySpan<byte> first = CsvNumber.Trim(cell[..at]);
        if (first.Length > 1 && first[^1] is (byte)';' || first.Length > 1 && first[^1] is (byte)',' && decimalMark != (byte)',')
            first = first[..^1];
        return CsvNumber.Parse(first, decimalMark, out latitudeDeg, out ReadOnlySpan<byte> behindFirst) == CellKind.Number && behindFirst.IsEmpty
            && CsvNumber.Parse(second, decimalMark, out longitudeDeg, out ReadOnlySpan<byte> behindSecond) == CellKind.Number && behindSecond.IsEmpty
            && Math.Abs(latitudeDeg) <= 90 && longitudeDeg is >= -180 and <= 360;
    }
}
