namespace TrimFit.Core.Logs;

/// <summary>What a <see cref="FlightLog"/> knows beside its columns.</summary>
public sealed record FlightLogOptions
{
    /// <summary>Absolute time of the log's zero; null when unknown.</summary>
    public DateTimeOffset? StartUtc { get; init; }

    /// <summary>Time of day of the log's zero when no date is known; follows from <see cref="StartUtc"/> when that is given.</summary>
    public TimeSpan? StartTimeOfDay { get; init; }

    /// <summary>Unit of the brake channels.</summary>
    public ControlUnit BrakeUnit { get; init; } = ControlUnit.Fraction;

    /// <summary>Unit of the trimmer channels.</summary>
    public ControlUnit TrimmerUnit { get; init; } = ControlUnit.Fraction;

    /// <summary>Delay of the gyro behind the GPS, s, when the import found one.</summary>
    public double GyroDelaySec { get; init => field = Guard.Finite(value); }
}
