namespace TrimFit.Core.Rigging;

/// <summary>The actuator disc: least power for a thrust.</summary>
/// <remarks>W. J. M. Rankine and R. E. Froude; J. G. Leishman, "Principles of Helicopter Aerodynamics", chapter 2. Inviscid, uniform inflow; what a real
/// propeller needs more is in its figure of merit. Density in kg/m³, disc area in m², both above 0.</remarks>
public static class MomentumTheory
{
    /// <summary>Area of the disc, m².</summary>
    /// <exception cref="ArgumentOutOfRangeException">The diameter (m) is not above 0.</exception>
    public static double DiskArea(double diameterM) => Math.PI / 4 * Guard.Positive(diameterM) * diameterM;

    /// <summary>Induced velocity at the disc at standstill, m/s: √(T/(2ρA)). The far wake has twice that.</summary>
    /// <param name="thrustN">Thrust, N; not negative.</param>
    /// <param name="diskAreaM2">Area of the disc, m².</param>
    /// <param name="densityKgPerM3">Air density, kg/m³.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double InducedVelocity(double thrustN, double diskAreaM2, double densityKgPerM3) =>
        Math.Sqrt(Guard.NotNegative(thrustN) / (2 * Guard.Positive(densityKgPerM3) * Guard.Positive(diskAreaM2)));

    /// <summary>Induced velocity while moving along the axis at a speed, m/s: −V/2 + √(V²/4 + T/(2ρA)).</summary>
    /// <param name="thrustN">Thrust, N; not negative.</param>
    /// <param name="diskAreaM2">Area of the disc, m².</param>
    /// <param name="densityKgPerM3">Air density, kg/m³.</param>
    /// <param name="axialSpeedMPerSec">Speed of the disc through the air in the direction of its thrust, m/s; not negative.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double InducedVelocity(double thrustN, double diskAreaM2, double densityKgPerM3, double axialSpeedMPerSec)
    {
        double still = InducedVelocity(thrustN, diskAreaM2, densityKgPerM3);
        double half = Guard.NotNegative(axialSpeedMPerSec) / 2;
        double sum = half + double.Hypot(half, still);
        return sum == 0 ? 0 : still * still / sum; // the root written without cancellation
    }

    /// <summary>Least power for a thrust at standstill, W: T^1.5/√(2ρA).</summary>
    /// <inheritdoc cref="InducedVelocity(double, double, double)"/>
    public static double IdealPower(double thrustN, double diskAreaM2, double densityKgPerM3) =>
        thrustN * InducedVelocity(thrustN, diskAreaM2, densityKgPerM3);

    /// <summary>Shaft power for a thrust at standstill, W: the ideal power over the figure of merit.</summary>
    /// <param name="thrustN">Thrust, N; not negative.</param>
    /// <param name="diskAreaM2">Area of the disc, m².</param>
    /// <param name="densityKgPerM3">Air density, kg/m³.</param>
    /// <param name="figureOfMerit">Ideal over real power, above 0 and at most 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double Power(double thrustN, double diskAreaM2, double densityKgPerM3, double figureOfMerit) =>
        IdealPower(thrustN, diskAreaM2, densityKgPerM3) / Merit(figureOfMerit);

    /// <summary>Thrust at standstill from shaft power, N: (FM · P)^⅔ (2ρA)^⅓.</summary>
    /// <param name="powerW">Shaft power, W; not negative.</param>
    /// <param name="diskAreaM2">Area of the disc, m².</param>
    /// <param name="densityKgPerM3">Air density, kg/m³.</param>
    /// <param name="figureOfMerit">Ideal over real power, above 0 and at most 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double Thrust(double powerW, double diskAreaM2, double densityKgPerM3, double figureOfMerit)
    {
        double ideal = Guard.NotNegative(powerW) * Merit(figureOfMerit);
        return Math.Cbrt(ideal * ideal * 2 * Guard.Positive(densityKgPerM3) * Guard.Positive(diskAreaM2));
    }

    /// <summary>Figure of merit that thrust and shaft power at standstill imply; above 1 means that one of them is wrong.</summary>
    /// <param name="thrustN">Thrust, N; not negative.</param>
    /// <param name="powerW">Shaft power, W; above 0.</param>
    /// <param name="diskAreaM2">Area of the disc, m².</param>
    /// <param name="densityKgPerM3">Air density, kg/m³.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double FigureOfMerit(double thrustN, double powerW, double diskAreaM2, double densityKgPerM3) =>
        IdealPower(thrustN, diskAreaM2, densityKgPerM3) / Guard.Positive(powerW);

    private static double Merit(double figureOfMerit) => figureOfMerit is > 0 and <= 1
        ? figureOfMerit
        : throw new ArgumentOutOfRangeException(nameof(figureOfMerit), figureOfMerit, "must be above 0 and at most 1");
}
