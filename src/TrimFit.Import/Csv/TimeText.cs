namespace TrimFit.Import.Csv;

/// <summary>Order of day, month and year in a date of numbers.</summary>
internal enum DateOrder
{
    /// <summary>Not known; only dates with the year first or a month's name can be read.</summary>
    Unknown,
    /// <summary>Day, month, year.</summary>
    DayMonthYear,
    /// <summary>Month, day, year.</summary>
    MonthDayYear,
    /// <summary>Year, month, day, as told; a year of four digits in front needs no telling.</summary>
    YearMonthDay,
}

/// <summary>A time stamp as written.</summary>
/// <param name="Day">Days since 1970-01-01; null without a date.</param>
/// <param name="HasTime">Whether a time of day stands there.</param>
/// <param name="Seconds">Whole seconds since midnight of the stamp's own zone.</param>
/// <param name="Fraction">Fraction of a second, 0 to below 1.</param>
/// <param name="ZoneSec">Zone, s east of UTC; null without one.</param>
/// <param name="AmbiguousDate">Whether the date can be read both ways and was left away.</param>
internal readonly record struct TimeStamp(int? Day, bool HasTime, long Seconds, double Fraction, int? ZoneSec, bool AmbiguousDate);

/// <summary>Reads dates and times of day as loggers write them.</summary>
internal static class TimeText
{
    private const int SecondsPerDay = 86400;
    private static readonly int _epochDay = DateOnly.FromDateTime(DateTime.UnixEpoch).DayNumber;
    private static readonly string[] _months = ["jan", "feb", "mar", "apr", "may", "jun", "jul", "aug", "sep", "oct", "nov", "dec"];

    /// <summary>Reads a stamp: a date, a time of day, or both in either order of writing.</summary>
    /// <param name="cell">The cell's bytes.</param>
    /// <param name="order">How dates of numbers are read.</param>
    /// <param name="stamp">The stamp.</param>
    /// <returns>False when the cell is no stamp, or a stamp that does not exist (month 13, 25:61).</returns>
    public static bool TryParse(ReadOnlySpan<byte> cell, DateOrder order, out TimeStamp stamp)
    {
        stamp = default;
        ReadOnlySpan<byte> rest = CsvNumber.Trim(cell);
        if (rest.Length is < 4 or > 48)
            return false;
        int? day = null;
        bool ambiguous = false, hasDate = false;
        if (!LooksLikeTime(rest))
        {
            if (!TryReadDate(ref rest, order, out day, out ambiguous))
                return false;
            hasDate = true;
            if (rest.IsEmpty)
            {
                stamp = new(day, false, 0, 0, null, ambiguous);
                return true;
            }
            if (rest[0] is (byte)'T' or (byte)'t' or (byte)' ' or (byte)',' or (byte)'_' or (byte)';' or (byte)'-')
                rest = CsvNumber.Trim(rest[1..]);
        }
        if (!TryReadTime(ref rest, out long seconds, out double fraction))
            return false;
        if (!TryReadZone(rest, out int? zone))
            return false;
        if (hasDate && seconds > SecondsPerDay)
            return false;
        stamp = new(day, true, seconds, fraction, zone, ambiguous);
        return true;
    }

    /// <summary>Reads a time of day written as one number, hhmmss with or without a fraction.</summary>
    public static bool TryParsePacked(ReadOnlySpan<byte> cell, out TimeStamp stamp)
    {
        stamp = default;
        if (!CsvNumber.TryParseParts(CsvNumber.Trim(cell), (byte)'.', out CsvNumber.Parts parts) || parts.Negative || parts.Exponent is > 0 or < -12)
            return false;
        ulong scale = 1;
        for (int i = 0; i < -parts.Exponent; i++)
            scale *= 10;
        ulong whole = parts.Digits / scale;
        ulong h = whole / 10000, m = whole / 100 % 100, s = whole % 100;
        if (h > 23 || m > 59 || s > 60)
            return false;
        stamp = new(null, true, (long)(h * 3600 + m * 60 + s), (double)(parts.Digits % scale) / scale, null, false);
        return true;
    }

    /// <summary>Whether a date of numbers tells its order: the larger number of two that start it is no month.</summary>
    /// <returns>Null when the cell is no such date; <see cref="DateOrder.Unknown"/> when both orders are possible.</returns>
    public static DateOrder? OrderOf(ReadOnlySpan<byte> cell)
    {
        ReadOnlySpan<byte> rest = CsvNumber.Trim(cell);
        if (!TryReadNumber(ref rest, 2, out int first, out _) || rest.IsEmpty || rest[0] is not ((byte)'/' or (byte)'.' or (byte)'-'))
            return null;
        byte mark = rest[0];
        rest = rest[1..];
        if (!TryReadNumber(ref rest, 2, out int second, out _) || rest.IsEmpty || rest[0] != mark)
            return null;
        if (first > 12 && second <= 12)
            return DateOrder.DayMonthYear;
        if (second > 12 && first <= 12)
            return DateOrder.MonthDayYear;
        // Points between day, month and year are written only where the day stands first.
        return mark == (byte)'.' ? DateOrder.DayMonthYear : DateOrder.Unknown;
    }

    // A time of day: one or two digits and a colon.
    private static bool LooksLikeTime(ReadOnlySpan<byte> text)
    {
        int colon = text.IndexOf((byte)':');
        return colon is > 0 and <= 3 && IsDigit(text[colon - 1]) && IsDigit(text[0]);
    }

    private static bool TryReadDate(ref ReadOnlySpan<byte> text, DateOrder order, out int? day, out bool ambiguous)
    {
        day = null;
        ambiguous = false;
        ReadOnlySpan<byte> rest = text;
        if (TryReadMonthName(ref rest, out int namedMonth)) // May 12 2026
        {
            rest = SkipMarks(rest);
            if (!TryReadNumber(ref rest, 2, out int d, out _))
                return false;
            rest = SkipMarks(rest);
            return TryReadNumber(ref rest, 4, out int y, out int yearDigits) && Finish(y, yearDigits, namedMonth, d, rest, ref text, out day);
        }
        if (!TryReadNumber(ref rest, 8, out int first, out int firstDigits))
            return false;
        if (firstDigits is 8 or 6 && (rest.IsEmpty || !IsDigit(rest[0]) && rest[0] is not ((byte)'/' or (byte)'.')))
        {
            if (firstDigits == 8) // 20260512
                return Finish(first / 10000, 4, first / 100 % 100, first % 100, rest, ref text, out day);
            (int a, int b, int c) = (first / 10000, first / 100 % 100, first % 100);
            switch (order) // 120526 needs telling
            {
                case DateOrder.DayMonthYear:
                    return Finish(c, 2, b, a, rest, ref text, out day);
                case DateOrder.MonthDayYear:
                    return Finish(c, 2, a, b, rest, ref text, out day);
                case DateOrder.YearMonthDay:
                    return Finish(a, 2, b, c, rest, ref text, out day);
                default:
                    ambiguous = true;
                    text = rest;
                    return true;
            }
        }
        if (rest.IsEmpty || rest[0] is not ((byte)'-' or (byte)'/' or (byte)'.' or (byte)' '))
            return false;
        byte mark = rest[0];
        rest = rest[1..];
        if (firstDigits == 4)
        {
            if (!TryReadNumber(ref rest, 2, out int month, out _) || rest.IsEmpty || rest[0] != mark)
                return false;
            rest = rest[1..];
            return TryReadNumber(ref rest, 2, out int d, out _) && Finish(first, 4, month, d, rest, ref text, out day);
        }
        if (TryReadMonthName(ref rest, out namedMonth)) // 12-May-2026
        {
            rest = SkipMarks(rest);
            return TryReadNumber(ref rest, 4, out int y, out int yearDigits) && Finish(y, yearDigits, namedMonth, first, rest, ref text, out day);
        }
        if (mark == (byte)' ' || firstDigits > 2 || !TryReadNumber(ref rest, 2, out int second, out _) || rest.IsEmpty || rest[0] != mark)
            return false;
        rest = rest[1..];
        if (!TryReadNumber(ref rest, 4, out int year, out int digits) || digits == 3)
            return false;
        if (order == DateOrder.Unknown)
        {
            if (first is < 1 or > 31 || second is < 1 or > 31)
                return false;
            ambiguous = true;
            text = rest;
            return true;
        }
        if (order == DateOrder.YearMonthDay)
            return Finish(first, 2, second, year, rest, ref text, out day);
        (int dd, int mm) = order == DateOrder.DayMonthYear ? (first, second) : (second, first);
        return Finish(year, digits, mm, dd, rest, ref text, out day);
    }

    private static bool Finish(int year, int yearDigits, int month, int dayOfMonth, ReadOnlySpan<byte> rest, ref ReadOnlySpan<byte> text, out int? day)
    {
        day = null;
        if (yearDigits <= 2)
            year += year < 80 ? 2000 : 1900; // the GPS epoch is 1980
        if (year is < 1970 or > 2999 || month is < 1 or > 12 || dayOfMonth < 1 || dayOfMonth > DateTime.DaysInMonth(year, month))
            return false;
        day = new DateOnly(year, month, dayOfMonth).DayNumber - _epochDay;
        text = rest;
        return true;
    }

    private static bool TryReadTime(ref ReadOnlySpan<byte> text, out long seconds, out double fraction)
    {
        seconds = 0;
        fraction = 0;
        ReadOnlySpan<byte> rest = text;
        if (!TryReadNumber(ref rest, 6, out int first, out int digits))
            return false;
        int hour, minute = 0, second = 0;
        bool pairOnly = false;
        if (digits == 6 || digits == 4 && (rest.IsEmpty || rest[0] != (byte)':')) // HHMMSS behind a date
        {
            hour = digits == 6 ? first / 10000 : first / 100;
            minute = digits == 6 ? first / 100 % 100 : first % 100;
            second = digits == 6 ? first % 100 : 0;
        }
        else
        {
            if (digits > 3 || rest.IsEmpty || rest[0] != (byte)':')
                return false;
            rest = rest[1..];
            hour = first;
            if (!TryReadNumber(ref rest, 2, out minute, out int minuteDigits) || minuteDigits != 2)
                return false;
            if (!rest.IsEmpty && rest[0] == (byte)':')
            {
                rest = rest[1..];
                if (!TryReadNumber(ref rest, 2, out second, out int secondDigits) || secondDigits != 2)
                    return false;
            }
            else
            {
                pairOnly = true;
            }
        }
        bool hasFraction = false;
        if (rest.Length > 1 && rest[0] is (byte)'.' or (byte)',' or (byte)':' && rest.Length > 1 && IsDigit(rest[1]))
        {
            hasFraction = true;
            rest = rest[1..];
            double scale = 1;
            double value = 0;
            int read = 0;
            while (!rest.IsEmpty && IsDigit(rest[0]))
            {
                if (read++ < 15)
                {
                    value = value * 10 + (rest[0] - '0');
                    scale *= 10;
                }
                rest = rest[1..];
            }
            fraction = value / scale;
        }
        if (pairOnly && hasFraction)
            (hour, minute, second) = (0, hour, minute); // 12:34.5 counts minutes and seconds
        if (minute > 59 && !(pairOnly && hasFraction) || second > 60)
            return false;
        ReadOnlySpan<byte> tail = CsvNumber.Trim(rest);
        if (tail.Length >= 2 && (tail[1] | 0x20) == 'm' && (tail[0] | 0x20) is 'a' or 'p')
        {
            if (tail.Length >= 2 && (hour is < 1 or > 12))
                return false;
            hour = hour % 12 + ((tail[0] | 0x20) == 'p' ? 12 : 0);
            tail = CsvNumber.Trim(tail[2..]);
        }
        seconds = hour * 3600L + minute * 60 + second;
        text = tail;
        return true;
    }

    private static bool TryReadZone(ReadOnlySpan<byte> text, out int? zoneSec)
    {
        zoneSec = null;
        if (text.IsEmpty)
            return true;
        if (text.Length == 1 && text[0] is (byte)'Z' or (byte)'z' || text.SequenceEqual("UTC"u8) || text.SequenceEqual("GMT"u8))
        {
            zoneSec = 0;
            return true;
        }
        if (text.StartsWith("UTC"u8) || text.StartsWith("GMT"u8))
            text = text[3..];
        if (text.IsEmpty || text[0] is not ((byte)'+' or (byte)'-'))
            return false;
        int sign = text[0] == (byte)'-' ? -1 : 1;
        ReadOnlySpan<byte> rest = text[1..];
        if (!TryReadNumber(ref rest, 4, out int first, out int digits))
            return false;
        int minutes = 0;
        if (digits > 2)
            (first, minutes) = (first / 100, first % 100);
        else if (!rest.IsEmpty && (rest[0] != (byte)':' || !TryReadNumber(ref rest, 1, 2, out minutes)))
            return false;
        if (!rest.IsEmpty || first > 14 || minutes > 59)
            return false;
        zoneSec = sign * (first * 3600 + minutes * 60);
        return true;
    }

    private static bool TryReadNumber(ref ReadOnlySpan<byte> text, int from, int maximumDigits, out int value)
    {
        ReadOnlySpan<byte> rest = text[from..];
        bool read = TryReadNumber(ref rest, maximumDigits, out value, out _);
        text = rest;
        return read;
    }

    private static bool TryReadNumber(ref ReadOnlySpan<byte> text, int maximumDigits, out int value, out int digits)
    {
        value = 0;
        digits = 0;
        while (digits < text.Length && digits < maximumDigits && IsDigit(text[digits]))
            value = value * 10 + (text[digits++] - '0');
        if (digits == 0)
            return false;
        text = text[digits..];
        return true;
    }

    private static bool TryReadMonthName(ref ReadOnlySpan<byte> text, out int month)
    {
        for (month = 1; month <= 12; month++)
        {
            string name = _months[month - 1];
            if (text.Length >= 3 && (text[0] | 0x20) == name[0] && (text[1] | 0x20) == name[1] && (text[2] | 0x20) == name[2])
            {
                int end = 3;
                while (end < text.Length && (text[end] | 0x20) is >= 'a' and <= 'z')
                    end++;
                text = text[end..];
                return true;
            }
        }
        return false;
    }

    private static ReadOnlySpan<byte> SkipMarks(ReadOnlySpan<byte> text)
    {
        while (!text.IsEmpty && text[0] is (byte)'-' or (byte)' ' or (byte)',' or (byte)'.' or (byte)'/')
            text = text[1..];
        return text;
    }

    private static bool IsDigit(byte b) => (uint)(b - '0') <= 9;
}
