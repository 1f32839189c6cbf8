using TrimFit.Core.Units;

namespace TrimFit.Core.Turns;

/// <summary>The steady, coordinated, level turn: rate, radius, bank and load.</summary>
/// <remarks>tan φ = ω V/g (FAA Pilot's Handbook of Aeronautical Knowledge, chapter 5, "Rate of Turn", "Radius of Turn"). Sideslip and sink are left out.
/// Right bank and right turn are positive. Speeds are true airspeeds, m/s.</remarks>
public static class TurnGeometry
{
    /// <summary>Rate of turn, rad/s: g tan φ/V.</summary>
    /// <param name="bankRad">Bank, rad; between −π/2 and π/2.</param>
    /// <param name="airspeedMPerSec">Airspeed, m/s; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double RateRadPerSec(double bankRad, double airspeedMPerSec) =>
        PhysicalConstants.StandardGravity * Math.Tan(Bank(bankRad)) / Guard.Positive(airspeedMPerSec);

    /// <summary>Radius of turn, m: V²/(g tan |φ|); null in straight flight, where there is none.</summary>
    /// <param name="bankRad">Bank, rad; between −π/2 and π/2.</param>
    /// <param name="airspeedMPerSec">Airspeed, m/s; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double? RadiusM(double bankRad, double airspeedMPerSec)
    {
        double radius = Guard.Positive(airspeedMPerSec) * airspeedMPerSec / (PhysicalConstants.StandardGravity * Math.Tan(Math.Abs(Bank(bankRad))));
        return double.IsFinite(radius) ? radius : null;
    }

    /// <summary>Bank for a rate of turn, rad: atan(ω V/g).</summary>
    /// <param name="rateRadPerSec">Rate of turn, rad/s.</param>
    /// <param name="airspeedMPerSec">Airspeed, m/s; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double BankRad(double rateRadPerSec, double airspeedMPerSec) =>
        Math.Atan(Guard.Finite(rateRadPerSec) * Guard.Positive(airspeedMPerSec) / PhysicalConstants.StandardGravity);

    /// <summary>Load factor 1/cos φ.</summary>
    /// <param name="bankRad">Bank, rad; between −π/2 and π/2.</param>
    /// <exception cref="ArgumentOutOfRangeException">The bank is outside its range.</exception>
    public static double LoadFactor(double bankRad) => 1 / Math.Cos(Bank(bankRad));

    private static double Bank(double bankRad) => Math.Abs(bankRad) < Math.PI / 2
        ? bankRad
        : throw new ArgumentOutOfRangeException(nameof(bankRad), bankRad, "must be between -π/2 and π/2");
}
