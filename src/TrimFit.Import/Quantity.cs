namespace TrimFit.Import;

/// <summary>Kinds of quantity that units of a log measure.</summary>
public enum Quantity
{
    /// <summary>Seconds.</summary>
    Time,
    /// <summary>Order of day, month and year in a date.</summary>
    DateOrder,
    /// <summary>Radians.</summary>
    Angle,
    /// <summary>Radians per second.</summary>
    AngularRate,
    /// <summary>Revolutions per second.</summary>
    Rotation,
    /// <summary>Metres per second.</summary>
    Speed,
    /// <summary>Metres.</summary>
    Length,
    /// <summary>Metres per second squared.</summary>
    Acceleration,
    /// <summary>Pascals.</summary>
    Pressure,
    /// <summary>Fraction of a range.</summary>
    Fraction,
    /// <summary>Counts of a sensor without a scale.</summary>
    Count,
    /// <summary>Volts.</summary>
    Voltage,
    /// <summary>Amperes.</summary>
    Current,
    /// <summary>Watts.</summary>
    Power,
    /// <summary>A unit that is known and that no role has, such as dB.</summary>
    Other,
}
