using System.Buffers;
using System.Globalization;

namespace TrimFit.Import.Tracks;

/// <summary>Numbers of fixed-width and comma-separated records, read strictly.</summary>
internal static class Digits
{
    private static readonly SearchValues<byte> _decimal = SearchValues.Create("0123456789."u8);

    /// <summary>A whole number of digits only; null when any other character is there, or none.</summary>
    public static int? Unsigned(ReadOnlySpan<byte> text)
    {
        if (text.Length is 0 or > 9)
            return null;
        int value = 0;
        foreach (byte b in text)
        {
            if (b is < (byte)'0' or > (byte)'9')
                return null;
            value = (value * 10) + (b - '0');
        }
        return value;
    }

    /// <summary>A whole number that may start with a minus sign.</summary>
    public static int? Signed(ReadOnlySpan<byte> text) =>
        text.Length > 0 && text[0] == '-' ? -Unsigned(text[1..]) : Unsigned(text);

    /// <summary>A number with digits, an optional point and an optional minus sign; NaN for an empty field, null for anything else.</summary>
    public static double? Decimal(ReadOnlySpan<byte> text)
    {
        if (text.IsEmpty)
            return double.NaN;
        ReadOnlySpan<byte> digits = text[0] == '-' ? text[1..] : text;
        if (digits.IsEmpty || digits.Length > 20 || digits.ContainsAnyExcept(_decimal) || digits.Count((byte)'.') > 1 || digits.SequenceEqual("."u8))
            return null;
        return double.Parse(text, NumberStyles.Float, CultureInfo.InvariantCulture);
    }

    /// <summary>Seconds since midnight from <c>HHMMSS</c>; null when it is no time. 60 is allowed for a leap second.</summary>
    public static int? TimeOfDay(ReadOnlySpan<byte> text) =>
        text.Length == 6 && Unsigned(text[..2]) is int h and < 24 && Unsigned(text[2..4]) is int m and < 60 && Unsigned(text[4..]) is int s and <= 60
            ? (h * 3600) + (m * 60) + s
            : null;

    /// <summary>A day from <c>DDMMYY</c>; null when it is none. Years 80 to 99 are 19xx: GPS time begins in 1980.</summary>
    public static DateOnly? Day(ReadOnlySpan<byte> text)
    {
        if (text.Length != 6 || Unsigned(text[..2]) is not int day || Unsigned(text[2..4]) is not int month || Unsigned(text[4..]) is not int year)
            return null;
        year += year < 80 ? 2000 : 1900;
        return month is >= 1 and <= 12 && day >= 1 && day <= DateTime.DaysInMonth(year, month) ? new(year, month, day) : null;
    }
}
