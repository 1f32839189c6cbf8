namespace TrimFit.Import.Csv;

/// <summary>Where the time of a row comes from.</summary>
internal enum CsvTimeKind
{
    /// <summary>A number that counts from an unknown moment.</summary>
    Elapsed,
    /// <summary>A number that counts from 1970.</summary>
    Epoch,
    /// <summary>A stamp with the date in the same cell.</summary>
    DateTime,
    /// <summary>Date and time of day in two columns.</summary>
    TwoColumns,
    /// <summary>Time of day without a date.</summary>
    TimeOfDay,
    /// <summary>Time of day out of stamps whose date can be read both ways.</summary>
    ClockOfDateTime,
    /// <summary>GPS week and seconds of the week.</summary>
    GpsWeek,
}

/// <summary>How the time of a row is read.</summary>
/// <param name="Kind">Where it comes from.</param>
/// <param name="Time">Column of the time, or of the seconds of the week.</param>
/// <param name="Date">Column of the date or of the week; null without one.</param>
/// <param name="Order">Order of day, month and year.</param>
/// <param name="UnitExponent">Power of ten of a number's unit in seconds: 0, −3, −6, −9; for other units <paramref name="UnitFactor"/> says.</param>
/// <param name="UnitFactor">Seconds in the unit when it is no power of ten (min, h); else 1.</param>
/// <param name="IsUtc">Whether the clock is known to be UTC.</param>
/// <param name="Packed">Whether the time of day is written as one number, hhmmss.</param>
internal sealed record CsvTime(CsvTimeKind Kind, CsvColumn Time, CsvColumn? Date, DateOrder Order, int UnitExponent, double UnitFactor, bool IsUtc, bool Packed = false)
{
    /// <summary>A coarser clock of the file that knows the date or the time of day, when <see cref="Time"/> only counts; null without one.</summary>
    public CsvTime? Anchor { get; init; }
}
