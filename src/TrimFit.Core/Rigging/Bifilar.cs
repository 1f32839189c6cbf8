namespace TrimFit.Core.Rigging;

/// <summary>A body on two straight threads, free to twist about the vertical: a frame on its two risers.</summary>
/// <remarks>a and b are HALF the separations of the lower and upper ends, m; above 0. The weight is that of the hanging body, N; above 0.
/// Threads do not stretch; swinging and damping are left out. P. E. Jardin &amp; E. R. Mueller, "Optimized measurements of unmanned-air-vehicle mass
/// moment of inertia with a bifilar pendulum", J. Aircraft 46 (2009) 763.</remarks>
public static class Bifilar
{
    /// <summary>Stiffness for small twists, N·m/rad: W a b/H, H the vertical distance between the ends.</summary>
    /// <param name="weightN">Weight of the hanging body, N; above 0.</param>
    /// <param name="lowerHalfSeparationM">a, m; above 0.</param>
    /// <param name="upperHalfSeparationM">b, m; above 0.</param>
    /// <param name="heightM">Vertical distance between lower and upper ends at rest, m; above 0; the thread length when the threads are parallel.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is not above 0.</exception>
    public static double LinearStiffness(double weightN, double lowerHalfSeparationM, double upperHalfSeparationM, double heightM) =>
        Guard.Positive(weightN) * Guard.Positive(lowerHalfSeparationM) * Guard.Positive(upperHalfSeparationM) / Guard.Positive(heightM);

    /// <summary>Restoring torque at a twist, N·m: W a b sin θ/√(L² − a² − b² + 2ab cos θ).</summary>
    /// <param name="weightN">Weight of the hanging body, N; above 0.</param>
    /// <param name="lowerHalfSeparationM">a, m; above 0.</param>
    /// <param name="upperHalfSeparationM">b, m; above 0.</param>
    /// <param name="threadLengthM">L, m; above 0.</param>
    /// <param name="twistRad">θ, rad.</param>
    /// <returns>The torque that turns the body back, of the sign of sin θ; null where the threads cannot reach at that twist.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A length or weight is not above 0, or the twist is not finite.</exception>
    public static double? ExactTorque(double weightN, double lowerHalfSeparationM, double upperHalfSeparationM, double threadLengthM, double twistRad)
    {
        double a = Guard.Positive(lowerHalfSeparationM), b = Guard.Positive(upperHalfSeparationM);
        (double sin, double cos) = Math.SinCos(Guard.Finite(twistRad));
        double heightSquared = (Guard.Positive(threadLengthM) * threadLengthM) - (a * a) - (b * b) + (2 * a * b * cos);
        return heightSquared > 0 ? Guard.Positive(weightN) * a * b * sin / Math.Sqrt(heightSquared) : null;
    }

    /// <summary>Period of small twisting swings, s: 2π √(I/k).</summary>
    /// <param name="inertiaKgM2">Inertia about the vertical, kg·m²; above 0.</param>
    /// <param name="stiffnessNmPerRad">k, N·m/rad; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is not above 0.</exception>
    public static double Period(double inertiaKgM2, double stiffnessNmPerRad) =>
        2 * Math.PI * Math.Sqrt(Guard.Positive(inertiaKgM2) / Guard.Positive(stiffnessNmPerRad));

    /// <summary>Inertia about the vertical from a measured period, kg·m²: k (T/2π)².</summary>
    /// <param name="periodSec">Period of small twisting swings, s; above 0.</param>
    /// <param name="stiffnessNmPerRad">k, N·m/rad; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is not above 0.</exception>
    public static double Inertia(double periodSec, double stiffnessNmPerRad)
    {
        double perRadian = Guard.Positive(periodSec) / (2 * Math.PI);
        return Guard.Positive(stiffnessNmPerRad) * perRadian * perRadian;
    }
}
