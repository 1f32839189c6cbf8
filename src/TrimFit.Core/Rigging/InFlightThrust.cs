namespace TrimFit.Core.Rigging;

/// <summary>How thrust falls from the static value as the machine moves, by momentum theory at one shaft power.</summary>
/// <remarks>The disc's power is the same still and moving, P = T (V + v) with T = 2ρA v (V + v); so v (V + v)² = v₀³ with v₀ the induced velocity at
/// standstill (J. G. Leishman, "Principles of Helicopter Aerodynamics", chapter 2, axial climb). A fixed-pitch propeller speeds up a little as
/// it unloads, and its figure of merit changes: the result is good to about 10 %.</remarks>
public static class InFlightThrust
{
    /// <summary>Thrust at an airspeed, N.</summary>
    /// <param name="staticThrustN">Thrust at standstill, N; not negative.</param>
    /// <param name="diskAreaM2">Area of the disc, m²; above 0.</param>
    /// <param name="densityKgPerM3">Air density, kg/m³; above 0.</param>
    /// <param name="airspeedMPerSec">Airspeed along the axis, m/s; not negative.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double AtConstantPower(double staticThrustN, double diskAreaM2, double densityKgPerM3, double airspeedMPerSec)
    {
        double still = MomentumTheory.InducedVelocity(staticThrustN, diskAreaM2, densityKgPerM3);
        double speed = Guard.NotNegative(airspeedMPerSec);
        if (still == 0)
            return 0;
        double v = still, wanted = still * still * still;
        for (int i = 0; i < 50; i++) // convex and rising from a start above the root: Newton comes down to it without passing
        {
            double sum = speed + v;
            double step = ((v * sum * sum) - wanted) / (sum * (sum + (2 * v)));
            v -= step;
            if (Math.Abs(step) <= 1e-14 * v)
                break;
        }
        return 2 * densityKgPerM3 * diskAreaM2 * v * (speed + v);
    }
}
