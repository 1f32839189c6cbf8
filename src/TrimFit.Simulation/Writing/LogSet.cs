namespace TrimFit.Simulation;

/// <summary>Which log files a flight is written to.</summary>
public enum LogSet
{
    /// <summary>One CSV file with everything.</summary>
    Csv,
    /// <summary>A CSV file without fixes, on its own clock, and an IGC file.</summary>
    EngineCsvAndIgc,
    /// <summary>A CSV file without fixes, on its own clock, and a GPX file.</summary>
    EngineCsvAndGpx,
    /// <summary>A CSV file without fixes, on its own clock, and an NMEA file.</summary>
    EngineCsvAndNmea,
    /// <summary>A folder of a phone, one CSV file for each sensor, a GPX file, and an engine CSV when rpm, throttle or brakes were logged.</summary>
    PhoneAndGpx,
    /// <summary>An IGC file alone.</summary>
    Igc,
}
