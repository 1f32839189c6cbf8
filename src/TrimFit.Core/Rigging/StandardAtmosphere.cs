using TrimFit.Core.Units;

namespace TrimFit.Core.Rigging;

/// <summary>The ICAO standard atmosphere from −5.1 to 80 km geopotential height.</summary>
/// <remarks>ICAO Doc 7488, "Manual of the ICAO Standard Atmosphere"; ISO 2533:1975. A real day's density differs by several percent: give measured
/// pressure and temperature to <see cref="Density"/> where they are known.</remarks>
public static class StandardAtmosphere
{
    private const double GasConstant = 287.05287; // J/(kg·K), exact by definition of the standard atmosphere
    private const double HeatRatio = 1.4; // exact by definition
    private const double EarthRadius = 6356766; // m, exact by definition: nominal radius of the geopotential transformation
    private const double SeaLevelTemperature = 288.15; // K, exact by definition
    private const double SeaLevelPressure = 101325; // Pa, exact by definition
    private const double Lowest = -5100; // m: both printed tables begin at −5000 m, one of them geometric
    private const double Highest = 80000; // m

    // Base height (m) and temperature gradient (K/m) of each layer, exact by definition.
    private static readonly double[] _baseHeights = [0, 11000, 20000, 32000, 47000, 51000, 71000];
    private static readonly double[] _gradients = [-0.0065, 0, 0.001, 0.0028, 0, -0.0028, -0.002];

    /// <summary>Air at a geopotential height.</summary>
    /// <param name="geopotentialM">Geopotential height, m, from −5100 to 80000.</param>
    /// <exception cref="ArgumentOutOfRangeException">The height is outside the table.</exception>
    public static AirState AtGeopotential(double geopotentialM)
    {
        if (!(geopotentialM is >= Lowest and <= Highest))
            throw new ArgumentOutOfRangeException(nameof(geopotentialM), geopotentialM, "must be from -5100 to 80000 m");
        double temperature = SeaLevelTemperature, pressure = SeaLevelPressure;
        for (int layer = 0; ; layer++)
        {
            bool last = layer == _baseHeights.Length - 1 || geopotentialM <= _baseHeights[layer + 1];
            double rise = (last ? geopotentialM : _baseHeights[layer + 1]) - _baseHeights[layer];
            double gradient = _gradients[layer];
            double above = temperature + (gradient * rise);
            pressure *= gradient == 0
                ? Math.Exp(-PhysicalConstants.StandardGravity * rise / (GasConstant * temperature))
                : Math.Pow(above / temperature, -PhysicalConstants.StandardGravity / (GasConstant * gradient));
            temperature = above;
            if (last)
                return new AirState(temperature, pressure, pressure / (GasConstant * temperature), Math.Sqrt(HeatRatio * GasConstant * temperature));
        }
    }

    /// <summary>Air at a geometric height above mean sea level.</summary>
    /// <param name="geometricM">Geometric height, m; its geopotential height from −5100 to 80000.</param>
    /// <exception cref="ArgumentOutOfRangeException">The height is outside the table.</exception>
    public static AirState AtGeometric(double geometricM) => AtGeopotential(Geopotential(geometricM));

    /// <summary>Geopotential height of a geometric height, m: r h/(r + h).</summary>
    /// <param name="geometricM">Geometric height, m; above minus the Earth's radius.</param>
    /// <exception cref="ArgumentOutOfRangeException">The height is not finite or below the Earth's centre.</exception>
    public static double Geopotential(double geometricM) => EarthRadius * Guard.Finite(geometricM) / Guard.Positive(EarthRadius + geometricM);

    /// <summary>Geometric height of a geopotential height, m: r H/(r − H).</summary>
    /// <param name="geopotentialM">Geopotential height, m; below the Earth's radius.</param>
    /// <exception cref="ArgumentOutOfRangeException">The height is not finite or reaches infinity.</exception>
    public static double Geometric(double geopotentialM) => EarthRadius * Guard.Finite(geopotentialM) / Guard.Positive(EarthRadius - geopotentialM);

    /// <summary>Density of dry air, kg/m³: p/(R T).</summary>
    /// <param name="pressurePa">Pressure, Pa; above 0.</param>
    /// <param name="temperatureK">Temperature, K; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is not above 0.</exception>
    public static double Density(double pressurePa, double temperatureK) => Guard.Positive(pressurePa) / (GasConstant * Guard.Positive(temperatureK));

    /// <summary>Geopotential height in the lowest layer at which the standard atmosphere has a pressure: what a barometric altimeter set to 1013.25 hPa shows.</summary>
    /// <param name="pressurePa">Pressure, Pa; from that at 11 km (22632 Pa) up.</param>
    /// <returns>m.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The pressure is below that at 11 km or not finite.</exception>
    public static double PressureAltitude(double pressurePa)
    {
        double exponent = -GasConstant * _gradients[0] / PhysicalConstants.StandardGravity;
        double height = SeaLevelTemperature / _gradients[0] * (Math.Pow(Guard.Positive(pressurePa) / SeaLevelPressure, exponent) - 1);
        return height <= _baseHeights[1] + 1e-6 // the boundary itself comes back with some rounding
            ? height
            : throw new ArgumentOutOfRangeException(nameof(pressurePa), pressurePa, "must be at least the pressure at 11 km, 22632 Pa");
    }
}
