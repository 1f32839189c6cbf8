using TrimFit.Core.Rigging;
using TrimFit.Core.Units;

namespace TrimFit.Core.Ground;

/// <summary>Static thrust from a tethered scale, with the air it was pulled in.</summary>
/// <remarks>At one speed of rotation thrust goes with density (propeller coefficients, model of <see cref="PropellerCoefficients"/>), so a test on a hot day or in the
/// mountains reads less. A scale in kg shows force over standard gravity.</remarks>
public static class StaticThrust
{
    /// <summary>Largest angle between rope and thrust axis that is still a thrust test, rad: 20 deg (common practice, no source).</summary>
    public static readonly double LargestRopeAngleRad = double.DegreesToRadians(20);

    /// <summary>Thrust along the axis, N.</summary>
    /// <param name="pullKg">Reading of the scale in the rope, kg; above 0.</param>
    /// <param name="ropeAngleRad">Angle between rope and thrust axis, rad: the scale carries the thrust over its cosine.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double FromPull(double pullKg, double ropeAngleRad = 0)
    {
        if (!(Math.Abs(ropeAngleRad) <= LargestRopeAngleRad))
            throw new ArgumentOutOfRangeException(nameof(ropeAngleRad), ropeAngleRad, "must be within 20 deg");
        return Guard.Positive(pullKg) * PhysicalConstants.StandardGravity * Math.Cos(ropeAngleRad);
    }

    /// <summary>Density of the air of the test, kg/m³, from its temperature and the standard atmosphere's pressure at its height.</summary>
    /// <remarks>The day's pressure differs from the standard by up to 3 %; moist air is up to 1 % lighter. Both are left out.</remarks>
    /// <param name="temperatureC">°C, from −60 to 60.</param>
    /// <param name="heightM">Height above the sea, m, from −500 to 6000.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double AirDensity(double temperatureC, double heightM)
    {
        if (!(temperatureC is >= -60 and <= 60))
            throw new ArgumentOutOfRangeException(nameof(temperatureC), temperatureC, "must be from -60 to 60 °C");
        if (!(heightM is >= -500 and <= 6000))
            throw new ArgumentOutOfRangeException(nameof(heightM), heightM, "must be from -500 to 6000 m");
        return StandardAtmosphere.Density(StandardAtmosphere.AtGeometric(heightM).PressurePa, temperatureC + 273.15);
    }

    /// <summary>The same thrust in sea-level air at the same speed of rotation, N.</summary>
    /// <param name="thrustN">Thrust, N.</param>
    /// <param name="airDensity">Density it was pulled in, kg/m³; above 0.</param>
    public static double AtSeaLevel(double thrustN, double airDensity) => Guard.Finite(thrustN) * PhysicalConstants.SeaLevelDensity / Guard.Positive(airDensity);
}
