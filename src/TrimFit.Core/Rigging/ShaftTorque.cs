namespace TrimFit.Core.Rigging;

/// <summary>Torque and power of a turning shaft: Q = P/(2π n).</summary>
public static class ShaftTorque
{
    /// <summary>Torque from power.</summary>
    /// <param name="powerW">Shaft power, W; not negative.</param>
    /// <param name="revPerSec">Speed of the shaft the torque is wanted on, rev/s; above 0. For a propeller behind a reduction its own speed, not the engine's.</param>
    /// <returns>N·m.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double FromPower(double powerW, double revPerSec) => Guard.NotNegative(powerW) / (2 * Math.PI * Guard.Positive(revPerSec));

    /// <summary>Power from torque.</summary>
    /// <param name="torqueNm">Torque, N·m; not negative.</param>
    /// <param name="revPerSec">Speed of the same shaft, rev/s; not negative.</param>
    /// <returns>W.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double Power(double torqueNm, double revPerSec) => 2 * Math.PI * Guard.NotNegative(torqueNm) * Guard.NotNegative(revPerSec);
}
