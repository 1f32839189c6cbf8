namespace TrimFit.Core.Planning;

/// <summary>What a flight is logged with, as far as a card has to know.</summary>
public enum CardLogger
{
    /// <summary>Gyro, GPS, throttle or rpm, and brakes.</summary>
    Full,
    /// <summary>Gyro and GPS of a telephone; power and hands-off legs from the flight sheet.</summary>
    Phone,
    /// <summary>GPS alone; power and hands-off legs from the flight sheet.</summary>
    Gps,
}
