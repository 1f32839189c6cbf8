using TrimFit.Core.Logs;

namespace TrimFit.Import.Csv;

/// <summary>Chooses the columns that give the time and how they are read.</summary>
internal static class CsvTimeChoice
{
    /// <summary>Lengths, s, between which the record of a flight is taken to lie when a time has no unit.</summary>
    private const double ShortestFlightSec = 20, LongestFlightSec = 12 * 3600;

    private static readonly (int Exponent, double Low, double High)[] _epochs =
        [(0, 3e8, 5e9), (-3, 3e11, 5e12), (-6, 3e14, 5e15), (-9, 3e17, 5e18)]; // from 1979 to 2128, in s, ms, us, ns

    private enum Look
    {
        Nothing,
        Number,
        DateTime,
        Date,
        AmbiguousDate,
        TimeOfDay,
        PackedTime,
    }

    /// <summary>Chooses; a column that is not chosen loses its role.</summary>
    /// <exception cref="LogFormatException">No column gives the time.</exception>
    public static CsvTime Choose(string file, CsvHead head, IReadOnlyList<CsvColumn> columns, List<Notice> notices, Func<string> names)
    {
        List<CsvColumn> times = [.. columns.Where(c => c.Role == ChannelRole.Time)];
        List<CsvColumn> dates = [.. columns.Where(c => c.Role == ChannelRole.Date)];
        if (times.Any(c => c.Told))
            times.RemoveAll(c => !Keep(c));
        if (dates.Any(c => c.Told))
            dates.RemoveAll(c => !Keep(c));
        var looks = columns.Where(c => c.Role is ChannelRole.Time or ChannelRole.Date).ToDictionary(c => c, c => LookOf(head, c));
        times.RemoveAll(c => looks[c] == Look.Nothing && !c.Told && Drop(c));
        // A "date" with the time of day in it is a time; a "time" that is a date only is a date.
        foreach (CsvColumn column in dates.Where(c => looks[c] == Look.DateTime).ToList())
        {
            dates.Remove(column);
            times.Add(column);
        }
        foreach (CsvColumn column in times.Where(c => looks[c] is Look.Date or Look.AmbiguousDate).ToList())
        {
            times.Remove(column);
            dates.Add(column);
        }
        foreach (CsvColumn column in times)
        {
            if (looks[column] == Look.Number && IsPacked(head, column, dates.Count > 0))
                looks[column] = Look.PackedTime;
        }
        dates.RemoveAll(c => looks[c] is not (Look.Date or Look.AmbiguousDate) && Drop(c));
        if (times.Count == 0 && columns.FirstOrDefault(c => c.Role is null && LookOf(head, c) == Look.DateTime) is { } stamped)
        {
            stamped.RoleBasis = "inferred from the data";
            times.Add(stamped);
            looks[stamped] = Look.DateTime;
        }
        CsvColumn? week = columns.FirstOrDefault(c => c.Role is null && ColumnNames.IsWeek(c.BareName) && Numbers(head, c) is [>= 0 and < 10000, ..]);
        CsvColumn? weekTime = columns.FirstOrDefault(c => c.Role is null && ColumnNames.IsWeekTime(c.BareName) && Numbers(head, c).Length > 0);
        if (week is not null && weekTime is not null && !times.Exists(c => c.Told || looks[c] == Look.DateTime || Epoch(head, c) is not null))
            return BuildWeek(head, columns, week, weekTime);
        if (times.Count == 0)
        {
            if (head.HeaderLine == 0 && !columns.Any(c => c.Told))
                throw CsvPlan.NoHeader(file, head);
            throw LogFormatException.At(file, Math.Max(1, head.HeaderLine), null, $"no column for the time; the header has {names()}",
                "a column with the time of each row", "Name it: --column time=NAME:s.");
        }
        CsvColumn time = times.OrderByDescending(c => c.Told).ThenBy(c => Preference(head, c, looks[c], dates.Count > 0)).ThenBy(c => c.Rank).ThenBy(c => c.Index).First();
        CsvColumn? date = looks[time] is Look.TimeOfDay or Look.PackedTime ? dates.OrderByDescending(c => c.Told).ThenBy(c => c.Index).FirstOrDefault() : null;
        CsvColumn? counter = time.Told || looks[time] == Look.Number && Epoch(head, time) is null || !IsCoarse(head, time) ? null
            : times.Find(c => looks[c] == Look.Number && Epoch(head, c) is null && !IsCoarse(head, c));
        if (counter is not null)
        {
            notices.Add(new("two_clocks", $"{file}: the stamps of column \"{time.Name}\" are coarser than the sampling; they give the start, and column \"{counter.Name}\" gives the steps."));
        }
        else if (times.Count > 1 && !time.Told)
        {
            notices.Add(new("several_columns", $"{file}: {string.Join(", ", times.OrderBy(c => c.Index).Select(c => $"\"{c.Name}\""))} can all give the time; \"{time.Name}\" is used. To choose: --column time=NAME."));
        }
        foreach (CsvColumn other in columns)
        {
            if (other.Role is ChannelRole.Time or ChannelRole.Date && other != time && other != date && other != counter)
                other.Release();
        }
        time.Role = ChannelRole.Time;
        if (date is not null)
            date.Role = ChannelRole.Date;
        if (counter is null)
            return Build(file, head, time, date, looks[time], notices);
        counter.Role = ChannelRole.Time;
        return BuildNumber(file, head, counter, isUtc: false, notices) with { Anchor = Build(file, head, time, date, looks[time], notices) };
    }

    // Whether most rows of the head share their stamp with the row before.
    private static bool IsCoarse(CsvHead head, CsvColumn column)
    {
        int same = 0, all = 0;
        for (int i = 1; i < head.Sample.Count; i++)
        {
            byte[][] before = head.Sample[i - 1].Cells, now = head.Sample[i].Cells;
            if (column.Index >= before.Length || column.Index >= now.Length)
                continue;
            all++;
            same += before[column.Index].AsSpan().SequenceEqual(now[column.Index]) ? 1 : 0;
        }
        return all >= 5 && same > 0.4 * all;
    }

    // 194159, 194200, …: hours, minutes and seconds in one number. A counter would pass through numbers ending in 60 to 99 within 41 of its steps.
    private static bool IsPacked(CsvHead head, CsvColumn column, bool hasDate)
    {
        double[] values = Numbers(head, column);
        if (column.Unit is not null || values.Length < 2 || values.Any(v => v is < 0 or >= 240000 || v % 100 >= 60 || v / 100 % 100 >= 60))
            return false;
        return values.Max() >= 10000 && (hasDate || values.Max() - values.Min() > 100 && values.Length > 41);
    }

    private static bool Keep(CsvColumn column) => column.Told || !Drop(column);

    private static bool Drop(CsvColumn column)
    {
        column.Release();
        return true;
    }

    private static int Preference(CsvHead head, CsvColumn column, Look look, bool hasDate) => look switch
    {
        Look.DateTime => 0,
        Look.Number when Epoch(head, column) is not null => 0,
        Look.TimeOfDay or Look.PackedTime when hasDate => 1,
        Look.TimeOfDay or Look.PackedTime => 2,
        Look.Number => 3,
        _ => 4,
    };

    private static CsvTime Build(string file, CsvHead head, CsvColumn time, CsvColumn? date, Look look, List<Notice> notices)
    {
        bool isUtc = time.Name.Contains("utc", StringComparison.OrdinalIgnoreCase) || time.Name.Contains("gps", StringComparison.OrdinalIgnoreCase)
            || time.Name.Contains("zulu", StringComparison.OrdinalIgnoreCase);
        bool packed = look == Look.PackedTime;
        if (look == Look.Number)
            return BuildNumber(file, head, time, isUtc, notices);
        CsvColumn dated = date ?? time;
        DateOrder order = dated.Unit?.Quantity == Quantity.DateOrder
            ? dated.Unit.Name switch { "dmy" => DateOrder.DayMonthYear, "mdy" => DateOrder.MonthDayYear, _ => DateOrder.YearMonthDay }
            : OrderOf(head, dated);
        time.Unit = null;
        time.UnitBasis = "";
        if (date is not null)
        {
            date.Unit = null;
            date.UnitBasis = "";
        }
        bool hasDate = date is not null || look == Look.DateTime;
        if (hasDate && order == DateOrder.Unknown && head.Sample.Any(r => dated.Index < r.Cells.Length && TimeText.TryParse(r.Cells[dated.Index], DateOrder.Unknown, out TimeStamp stamp) && stamp.AmbiguousDate))
        {
            notices.Add(new("date_order_unknown",
                $"{file}: the dates of column \"{dated.Name}\" can be read as day/month and as month/day; only the time of day is used. To say which: --column {ChannelRoles.NameOf(dated.Role!.Value)}={dated.Name}:dmy or :mdy."));
            date?.Release();
            return new(look == Look.DateTime ? CsvTimeKind.ClockOfDateTime : CsvTimeKind.TimeOfDay, time, null, DateOrder.Unknown, 0, 1, isUtc, packed);
        }
        return new(date is not null ? CsvTimeKind.TwoColumns : look == Look.DateTime ? CsvTimeKind.DateTime : CsvTimeKind.TimeOfDay, time, date, order, 0, 1, isUtc, packed);
    }

    private static CsvTime BuildWeek(CsvHead head, IReadOnlyList<CsvColumn> columns, CsvColumn week, CsvColumn time)
    {
        foreach (CsvColumn other in columns)
        {
            if (other.Role is ChannelRole.Time or ChannelRole.Date)
                other.Release();
        }
        (week.Role, week.RoleBasis, week.Unit, week.UnitBasis) = (ChannelRole.Date, "name, GPS week", null, "");
        (time.Role, time.RoleBasis) = (ChannelRole.Time, "name, time of the GPS week");
        const double weekSec = 604800;
        if (time.Unit?.Quantity != Quantity.Time)
        {
            time.Unit = UnitOf(Numbers(head, time).Max() > weekSec ? -3 : 0);
            time.UnitBasis = "inferred from the data";
        }
        return new(CsvTimeKind.GpsWeek, time, week, default, time.Unit.Name switch { "ms" => -3, "us" => -6, "ns" => -9, _ => 0 }, 1, true);
    }

    private static CsvTime BuildNumber(string file, CsvHead head, CsvColumn time, bool isUtc, List<Notice> notices)
    {
        int? epoch = Epoch(head, time);
        if (time.Unit is null && UnitInCells(head, time) is { } written)
        {
            time.Unit = written;
            time.UnitBasis = "from cells";
        }
        if (time.Unit is { Quantity: Quantity.Time } unit)
        {
            int exponent = unit.Name switch { "s" => 0, "ms" => -3, "us" => -6, "ns" => -9, _ => 1 };
            bool isEpoch = epoch is not null && epoch == exponent;
            return new(isEpoch ? CsvTimeKind.Epoch : CsvTimeKind.Elapsed, time, null, default, Math.Min(exponent, 0), exponent == 1 ? unit.Factor : 1, isUtc || isEpoch);
        }
        time.UnitBasis = "inferred from the data";
        if (epoch is { } power)
        {
            time.Unit = UnitOf(power);
            return new(CsvTimeKind.Epoch, time, null, default, power, 1, true);
        }
        int inferred = InferElapsed(head, time);
        time.Unit = UnitOf(inferred);
        notices.Add(new("time_unit_inferred", $"{file}: column \"{time.Name}\" has no unit; its numbers are taken as {time.Unit.Name}, which makes the record as long as a flight. To say another: --column time={time.Name}:UNIT."));
        return new(CsvTimeKind.Elapsed, time, null, default, inferred, 1, isUtc);
    }

    // A flight lasts minutes to hours: seconds, milliseconds or microseconds, whichever makes it so.
    private static int InferElapsed(CsvHead head, CsvColumn time)
    {
        double[] values = Numbers(head, time);
        if (values.Length < 2)
            return 0;
        double span = values.Max() - values.Min();
        double rows = Math.Max(head.Sample.Count, head.EstimatedRows);
        double whole = span * rows / Math.Max(1, head.Sample.Count);
        double step = span / (values.Length - 1);
        bool integers = values.All(v => v == Math.Floor(v)); // exact: whole numbers below 2^53
        foreach (int exponent in (ReadOnlySpan<int>)[0, -3, -6])
        {
            if (whole * Math.Pow(10, exponent) is >= ShortestFlightSec and <= LongestFlightSec)
                return exponent;
        }
        return !integers || step < 5 ? 0 : step < 5000 ? -3 : -6;
    }

    private static LogUnit UnitOf(int exponent)
    {
        string name = exponent switch { 0 => "s", -3 => "ms", -6 => "us", _ => "ns" };
        return LogUnits.TryParse(name, out LogUnit unit) ? unit : new(name, Quantity.Time, Math.Pow(10, exponent));
    }

    private static int? Epoch(CsvHead head, CsvColumn column)
    {
        double[] values = Numbers(head, column);
        if (values.Length == 0)
            return null;
        foreach ((int exponent, double low, double high) in _epochs)
        {
            if (values.All(v => v >= low && v <= high))
                return exponent;
        }
        return null;
    }

    private static LogUnit? UnitInCells(CsvHead head, CsvColumn column)
    {
        foreach (CsvHead.CsvRecord row in head.Sample)
        {
            if (column.Index < row.Cells.Length && CsvNumber.Parse(row.Cells[column.Index], head.DecimalMark, out _, out ReadOnlySpan<byte> suffix) == CellKind.Number && !suffix.IsEmpty)
                return IsTimeUnit(suffix, out LogUnit unit) ? unit : null;
        }
        return null;
    }

    private static bool IsTimeUnit(ReadOnlySpan<byte> text, out LogUnit unit) =>
        LogUnits.TryParse(System.Text.Encoding.UTF8.GetString(text), out unit) && unit.Quantity == Quantity.Time;

    private static double[] Numbers(CsvHead head, CsvColumn column) =>
    [.. head.Sample.Where(r => column.Index < r.Cells.Length)
        .Select(r => CsvNumber.Parse(r.Cells[column.Index], head.DecimalMark, out double value, out _) == CellKind.Number ? value : double.NaN)
        .Where(double.IsFinite)];

    private static DateOrder OrderOf(CsvHead head, CsvColumn column)
    {
        foreach (CsvHead.CsvRecord row in head.Sample)
        {
            if (column.Index < row.Cells.Length && TimeText.OrderOf(row.Cells[column.Index]) is DateOrder.DayMonthYear or DateOrder.MonthDayYear)
                return TimeText.OrderOf(row.Cells[column.Index])!.Value;
        }
        return DateOrder.Unknown;
    }

    private static Look LookOf(CsvHead head, CsvColumn column)
    {
        int numbers = 0, dateTimes = 0, dates = 0, ambiguous = 0, times = 0, all = 0;
        bool named = column.Role == ChannelRole.Date && !column.BareName.Contains("time", StringComparison.OrdinalIgnoreCase);
        foreach (CsvHead.CsvRecord row in head.Sample)
        {
            if (column.Index >= row.Cells.Length || CsvNumber.IsMissing(row.Cells[column.Index]))
                continue;
            byte[] cell = row.Cells[column.Index];
            all++;
            bool number = CsvNumber.Parse(cell, head.DecimalMark, out _, out ReadOnlySpan<byte> suffix) == CellKind.Number && (suffix.IsEmpty || IsTimeUnit(suffix, out _));
            if (number && !named)
                numbers++;
            else if (TimeText.TryParse(cell, DateOrder.Unknown, out TimeStamp stamp))
            {
                bool dated = stamp.Day is not null || stamp.AmbiguousDate;
                dateTimes += dated && stamp.HasTime ? 1 : 0;
                dates += dated && !stamp.HasTime && stamp.Day is not null ? 1 : 0;
                ambiguous += dated && !stamp.HasTime && stamp.AmbiguousDate ? 1 : 0;
                times += dated ? 0 : 1;
            }
        }
        double most = 0.5 * all;
        return all == 0 ? Look.Nothing
            : numbers > most ? Look.Number
            : dateTimes > most ? Look.DateTime
            : dates > most ? Look.Date
            : ambiguous > most ? Look.AmbiguousDate
            : times > most ? Look.TimeOfDay
            : Look.Nothing;
    }
}
