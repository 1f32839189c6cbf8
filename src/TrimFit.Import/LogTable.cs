using TrimFit.Core.Logs;

namespace TrimFit.Import;

/// <summary>One file as columns in SI units over its own clock, before several are joined.</summary>
public sealed class LogTable
{
    /// <summary>The account of the file for the diagnostics.</summary>
    public required InputFile File { get; init; }

    /// <summary>What the clock counts.</summary>
    public required ClockKind Clock { get; init; }

    /// <summary>Absolute time of <c>TimeSec = 0</c> for <see cref="ClockKind.Absolute"/>; for <see cref="ClockKind.TimeOfDay"/> midnight of day 1.</summary>
    public DateTimeOffset? Origin { get; init; }

    /// <summary>Whether the absolute clock is known to be UTC (GPS time, epoch, a zone in the stamp) and not perhaps local time.</summary>
    public bool IsUtc { get; init; }

    /// <summary>Time of each row, s, finite and strictly increasing. Starts at 0 for elapsed clocks whatever the file's zero was.</summary>
    public required double[] TimeSec { get; init; }

    /// <summary>What the file's own clock showed at <c>TimeSec = 0</c>, s, for <see cref="ClockKind.Elapsed"/>: files of one recording share that clock.</summary>
    public double ElapsedStartSec { get; init; }

    /// <summary>Columns by role in SI units, NaN where a cell was empty.</summary>
    public required IReadOnlyDictionary<ChannelRole, double[]> Columns { get; init; }

    /// <summary>Unit of the brake columns.</summary>
    public ControlUnit BrakeUnit { get; init; }

    /// <summary>Unit of the trimmer columns.</summary>
    public ControlUnit TrimmerUnit { get; init; }

    /// <summary>Sentences to be said about this file.</summary>
    public IReadOnlyList<Notice> Warnings { get; init; } = [];
}

/// <summary>What a file's clock counts.</summary>
public enum ClockKind
{
    /// <summary>Seconds since an unknown moment.</summary>
    Elapsed,
    /// <summary>Time of day without a date.</summary>
    TimeOfDay,
    /// <summary>Date and time.</summary>
    Absolute,
}
