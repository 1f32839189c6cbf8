namespace TrimFit.Import.Tracks;

/// <summary>The standard atmosphere up to 11 km (ICAO Doc 7488), which defines pressure altitude.</summary>
internal static class StandardAtmosphere
{
    private const double SeaLevelPressure = 101_325;       // Pa, exact by definition
    private const double SeaLevelTemperature = 288.15;     // K, exact by definition
    private const double LapseRate = 0.0065;               // K/m, exact by definition
    private const double Exponent = 5.255879812716677;     // g/(R L) with g = 9.80665 m/s², R = 287.05287 J/(kg K)

    /// <summary>Static pressure, Pa, at a pressure altitude, m; NaN passes through.</summary>
    public static double Pressure(double altitude) => SeaLevelPressure * Math.Pow(1 - (LapseRate * altitude / SeaLevelTemperature), Exponent);
}
