namespace TrimFit.Core.Logs;

/// <summary>The unit in which a brake or trimmer was logged; it stays as logged, since travel and fraction need not be proportional.</summary>
public enum ControlUnit
{
    /// <summary>Fraction 0 to 1 of the travel (logged in percent or 0 to 1).</summary>
    Fraction,
    /// <summary>Travel in metres (logged in mm, cm, m or inches).</summary>
    Meter,
    /// <summary>Counts of a sensor without a scale.</summary>
    Count,
}
