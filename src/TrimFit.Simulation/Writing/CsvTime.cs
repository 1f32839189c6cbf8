namespace TrimFit.Simulation;

/// <summary>How time is written.</summary>
public enum CsvTime
{
    /// <summary>Seconds since the start.</summary>
    ElapsedSeconds,
    /// <summary>Milliseconds since the start.</summary>
    ElapsedMilliseconds,
    /// <summary>ISO 8601 in UTC.</summary>
    Iso8601,
    /// <summary>Seconds since 1970.</summary>
    EpochSeconds,
    /// <summary>Milliseconds since 1970.</summary>
    EpochMilliseconds,
    /// <summary>Date and time of day in two columns.</summary>
    DateAndTime,
}
