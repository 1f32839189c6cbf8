namespace TrimFit.Import.Csv;

/// <summary>Turns the time cells of a row into seconds.</summary>
internal sealed class CsvClock(CsvTime time, byte decimalMark)
{
    /// <summary>The file's decimal mark, which the rows may find out late.</summary>
    public byte DecimalMark { get; set; } = decimalMark;

    private const long SecondsPerDay = 86400;
    private const long SecondsPerWeek = 604800;

    // 1980-01-06 in Unix seconds; GPS time runs 18 s ahead of UTC since 2017-01-01 (IERS Bulletin C 52), and no leap second has been announced since.
    private const long GpsEpochUnixSec = 315_964_800;
    private const int GpsLeapSec = 18;

    private readonly byte[] _lastDate = new byte[10];
    private bool _hasLastDate;
    private int _lastDay;

    /// <summary>Whether a stamp carried its zone.</summary>
    public bool SawZone { get; private set; }

    /// <summary>Reads the time of a row.</summary>
    /// <param name="cell">The time cell.</param>
    /// <param name="dateCell">The date or week cell; empty without one.</param>
    /// <param name="seconds">Whole seconds since the clock's zero: 1970, midnight or unknown.</param>
    /// <param name="fraction">What is left, 0 to below 1 s (or any number of seconds for an unusual way of writing).</param>
    public CellKind Read(ReadOnlySpan<byte> cell, ReadOnlySpan<byte> dateCell, out long seconds, out double fraction)
    {
        seconds = 0;
        fraction = 0;
        switch (time.Kind)
        {
            case CsvTimeKind.Elapsed or CsvTimeKind.Epoch:
                return ReadNumber(cell, time.UnitExponent, time.UnitFactor, out seconds, out fraction);
            case CsvTimeKind.GpsWeek:
                if (CsvNumber.Parse(dateCell, DecimalMark, out double week, out _) is var kind && kind != CellKind.Number)
                    return kind;
                if (ReadNumber(cell, time.UnitExponent, time.UnitFactor, out seconds, out fraction) is var read && read != CellKind.Number)
                    return read;
                if (!(week is >= 0 and < 10000) || week != Math.Floor(week)) // exact: a whole number of weeks
                    return CellKind.Text;
                seconds += GpsEpochUnixSec + (long)week * SecondsPerWeek - GpsLeapSec;
                return CellKind.Number;
            default:
                return ReadText(cell, dateCell, ref seconds, ref fraction);
        }
    }

    private CellKind ReadText(ReadOnlySpan<byte> cell, ReadOnlySpan<byte> dateCell, ref long seconds, ref double fraction)
    {
        if (time.Kind == CsvTimeKind.DateTime && TryReadIso(cell, out seconds, out fraction))
            return CellKind.Number;
        TimeStamp stamp;
        if (!(time.Packed ? TimeText.TryParsePacked(cell, out stamp) : TimeText.TryParse(cell, time.Order, out stamp)) || !stamp.HasTime)
            return CsvNumber.IsMissing(cell) ? CellKind.Missing : CellKind.Text;
        int day = 0;
        if (time.Kind == CsvTimeKind.DateTime)
        {
            if (stamp.Day is null)
                return CellKind.Text;
            day = stamp.Day.Value;
        }
        else if (time.Kind == CsvTimeKind.TwoColumns)
        {
            if (_hasLastDate && dateCell.SequenceEqual(_lastDate))
            {
                day = _lastDay;
            }
            else
            {
                if (!TimeText.TryParse(dateCell, time.Order, out TimeStamp date) || date.Day is null)
                    return CsvNumber.IsMissing(dateCell) ? CellKind.Missing : CellKind.Text;
                day = date.Day.Value;
                Remember(dateCell, day);
            }
        }
        SawZone |= stamp.ZoneSec is not null;
        seconds = day * SecondsPerDay + stamp.Seconds - (stamp.ZoneSec ?? 0);
        fraction = stamp.Fraction;
        return CellKind.Number;
    }

    private void Remember(ReadOnlySpan<byte> date, int day)
    {
        _hasLastDate = date.Length == _lastDate.Length;
        if (_hasLastDate)
        {
            date.CopyTo(_lastDate);
            _lastDay = day;
        }
    }

    // 2026-05-12T10:11:12[.345][Z], by far the commonest; everything else goes the long way.
    private bool TryReadIso(ReadOnlySpan<byte> cell, out long seconds, out double fraction)
    {
        seconds = 0;
        fraction = 0;
        if (cell.Length < 19 || cell[10] is not ((byte)'T' or (byte)' ') || cell[13] != (byte)':' || cell[16] != (byte)':')
            return false;
        if (!_hasLastDate || !cell[..10].SequenceEqual(_lastDate))
        {
            if (!TimeText.TryParse(cell[..10], DateOrder.Unknown, out TimeStamp date) || date.Day is null)
                return false;
            Remember(cell[..10], date.Day.Value);
        }
        uint h = Two(cell[11], cell[12]), m = Two(cell[14], cell[15]), s = Two(cell[17], cell[18]);
        if (h > 23 || m > 59 || s > 60)
            return false;
        int at = 19;
        if (at < cell.Length && cell[at] is (byte)'.' or (byte)',')
        {
            at++;
            ulong digits = 0;
            int count = 0;
            for (; at < cell.Length && (uint)(cell[at] - '0') <= 9; at++, count++)
                digits = digits * 10 + (uint)(cell[at] - '0');
            if (count is 0 or > 15)
                return false;
            fraction = digits / _tens[count];
        }
        if (at < cell.Length)
        {
            if (at != cell.Length - 1 || cell[at] != (byte)'Z')
                return false;
            SawZone = true;
        }
        seconds = _lastDay * SecondsPerDay + h * 3600 + m * 60 + s;
        return true;
    }

    private static readonly double[] _tens = [.. Enumerable.Range(0, 16).Select(e => Math.Pow(10, e))];

    private static uint Two(byte tens, byte ones)
    {
        uint t = (uint)(tens - '0'), o = (uint)(ones - '0');
        return t > 9 || o > 9 ? 100 : t * 10 + o;
    }

    private CellKind ReadNumber(ReadOnlySpan<byte> cell, int unitExponent, double unitFactor, out long seconds, out double fraction)
    {
        seconds = 0;
        fraction = 0;
        if (unitFactor == 1 && CsvNumber.TryParseParts(cell, DecimalMark, out CsvNumber.Parts parts))
        {
            int exponent = parts.Exponent + unitExponent;
            if (exponent is <= 0 and >= -18)
            {
                // Whole seconds and rest apart, so that a Unix time in ns keeps its last digit.
                ulong scale = Power(-exponent);
                seconds = (long)(parts.Digits / scale);
                fraction = (double)(parts.Digits % scale) / scale;
                if (parts.Negative)
                    (seconds, fraction) = (-seconds, -fraction);
                return CellKind.Number;
            }
        }
        CellKind kind = CsvNumber.Parse(cell, DecimalMark, out double value, out ReadOnlySpan<byte> suffix);
        if (kind != CellKind.Number)
            return kind;
        if (suffix.IsEmpty)
            value *= unitFactor * Math.Pow(10, unitExponent);
        else if (LogUnits.TryParse(System.Text.Encoding.UTF8.GetString(suffix), out LogUnit unit) && unit.Quantity == Quantity.Time)
            value *= unit.Factor;
        else
            return CellKind.Text;
        if (!(Math.Abs(value) < 1e15))
            return CellKind.Text;
        seconds = (long)Math.Floor(value);
        fraction = value - seconds;
        return CellKind.Number;
    }

    private static ulong Power(int exponent)
    {
        ulong power = 1;
        for (int i = 0; i < exponent; i++)
            power *= 10;
        return power;
    }
}
