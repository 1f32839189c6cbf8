using System.Collections.Immutable;
using TrimFit.Core.Analysis;

namespace TrimFit.Core.Logs;

/// <summary>What the pilot did on one flight, as written down by hand.</summary>
public sealed record FlightSheet
{
    /// <summary>Day of the flight; null when not given.</summary>
    public DateOnly? Date { get; init; }

    /// <summary>Trimmer setting of the wing in the pilot's words; empty when not given.</summary>
    public string WingTrim { get; init; } = "";

    /// <summary>Accelerator, fraction 0 to 1 of its travel; null when not given.</summary>
    public double? Accelerator { get; init; }

    /// <summary>Fuel at take-off, kg; null when not given.</summary>
    public double? FuelStartKg { get; init; }

    /// <summary>Fuel after landing, kg; null when not given.</summary>
    public double? FuelEndKg { get; init; }

    /// <summary>Height of the field above sea level, m; null when not given.</summary>
    public double? GroundAltitudeM { get; init; }

    /// <summary>Anything else.</summary>
    public string Notes { get; init; } = "";

    /// <summary>The legs in the order of the sheet.</summary>
    public ImmutableArray<SheetLeg> Legs { get; init; } = [];
}

/// <summary>One leg of a flight sheet. Its edges may be off by some seconds; <see cref="SheetLegs"/> finds them in the data.</summary>
public sealed record SheetLeg
{
    /// <summary>When the leg begins.</summary>
    public required SheetTime Start { get; init; }

    /// <summary>When it ends.</summary>
    public required SheetTime End { get; init; }

    /// <summary>What the pilot did.</summary>
    public required SheetLegKind Kind { get; init; }

    /// <summary>The power in words; null when not given.</summary>
    public PowerSetting? Power { get; init; }

    /// <summary>Throttle, fraction 0 to 1; null when not given.</summary>
    public double? ThrottleFraction { get; init; }

    /// <summary>Left brake, m of travel; null when not given.</summary>
    public double? BrakeLeftM { get; init; }

    /// <summary>Right brake, m of travel; null when not given.</summary>
    public double? BrakeRightM { get; init; }

    /// <summary>Ballast, kg; null when not given.</summary>
    public double? BallastKg { get; init; }

    /// <summary>Lateral place of the ballast from the machine's centre line, m, right positive; null when not given.</summary>
    public double? BallastArmM { get; init; }

    /// <summary>Line of the leg in the sheet's file, counted from 1; 0 when it is from no file.</summary>
    public int Line { get; init; }
}

/// <summary>What a pilot did on a leg.</summary>
public enum SheetLegKind
{
    /// <summary>Something else.</summary>
    Other,
    /// <summary>Hands off the brakes, in the toggles without load.</summary>
    HandsOff,
    /// <summary>A course held with the brakes.</summary>
    Held,
    /// <summary>One brake pulled by a known amount and held.</summary>
    BrakeStep,
    /// <summary>Weight shifted in the harness.</summary>
    WeightShift,
    /// <summary>Ballast carried on one side.</summary>
    Ballast,
}

/// <summary>A moment on a flight sheet: time of day, seconds of the log's clock, or the number of a mark set in flight.</summary>
public readonly record struct SheetTime
{
    private SheetTime(SheetTimeKind kind, double value) => (Kind, Value) = (kind, value);

    /// <summary>What <see cref="Value"/> counts.</summary>
    public SheetTimeKind Kind { get; }

    /// <summary>Seconds since midnight, seconds of the log, or the mark's number.</summary>
    public double Value { get; }

    /// <summary>A time on a watch.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not inside one day.</exception>
    public static SheetTime FromClock(TimeSpan sinceMidnight) => sinceMidnight >= TimeSpan.Zero && sinceMidnight < TimeSpan.FromDays(1)
        ? new(SheetTimeKind.Clock, sinceMidnight.TotalSeconds)
        : throw new ArgumentOutOfRangeException(nameof(sinceMidnight), sinceMidnight, "must lie inside one day");

    /// <summary>Seconds of the log's own clock.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Negative or not finite.</exception>
    public static SheetTime FromSeconds(double seconds) => new(SheetTimeKind.Seconds, Guard.NotNegative(seconds));

    /// <summary>The mark with this number, the first is 1.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Below 0.</exception>
    public static SheetTime FromMarker(int number) => new(SheetTimeKind.Marker, Guard.NotNegative(number));
}

/// <summary>What a <see cref="SheetTime"/> counts.</summary>
public enum SheetTimeKind
{
    /// <summary>Seconds of the log's clock.</summary>
    Seconds,
    /// <summary>Time of day on a watch.</summary>
    Clock,
    /// <summary>Number of a mark.</summary>
    Marker,
}
