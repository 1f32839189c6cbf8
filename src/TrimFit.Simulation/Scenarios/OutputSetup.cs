using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>How a flight is written to files.</summary>
public sealed record OutputSetup
{
    /// <summary>Which log files are written.</summary>
    public LogSet Logs { get; init; }

    /// <summary>How CSV files are written.</summary>
    public CsvDialect Dialect { get; init; } = new();

    /// <summary>Seconds by which the engine logger's clock is ahead of the fixes' clock.</summary>
    public double EngineClockOffsetSec { get; init => field = Guard.Finite(value); }

    /// <summary>Standard deviation of the times on the flight sheet, s: pilots are not clocks. Errors stay below twice it.</summary>
    public double SheetSloppinessSec { get; init => field = Guard.NotNegative(value); }
}
