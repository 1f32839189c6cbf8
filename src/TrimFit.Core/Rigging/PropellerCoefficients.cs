namespace TrimFit.Core.Rigging;

/// <summary>Thrust and power coefficients of a propeller at one advance ratio.</summary>
/// <remarks>C_T = T/(ρ n² D⁴), C_P = P/(ρ n³ D⁵), n in rev/s: the conventions of J. B. Brandt, R. W. Deters, G. K. Ananda, O. D. Dantsker &amp; M. S. Selig,
/// UIUC Propeller Database.</remarks>
/// <param name="Thrust">C_T.</param>
/// <param name="Power">C_P.</param>
public readonly record struct PropellerCoefficients(double Thrust, double Power)
{
    /// <summary>C_Q = Q/(ρ n² D⁵) = C_P/(2π).</summary>
    public double Torque => Power / (2 * Math.PI);

    /// <summary>Static figure of merit √(2/π) C_T^1.5/C_P; 0 where there is no thrust. Means nothing in forward flight.</summary>
    public double FigureOfMerit => Thrust <= 0 ? 0 : Math.Sqrt(2 / Math.PI) * Thrust * Math.Sqrt(Thrust) / Power;

    /// <summary>Coefficients from what was measured.</summary>
    /// <param name="thrustN">Thrust, N.</param>
    /// <param name="powerW">Shaft power, W.</param>
    /// <param name="densityKgPerM3">Air density, kg/m³; above 0.</param>
    /// <param name="revPerSec">Propeller speed, rev/s; above 0.</param>
    /// <param name="diameterM">Diameter, m; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static PropellerCoefficients From(double thrustN, double powerW, double densityKgPerM3, double revPerSec, double diameterM)
    {
        double unit = ThrustUnit(densityKgPerM3, revPerSec, diameterM);
        return new(Guard.Finite(thrustN) / unit, Guard.Finite(powerW) / (unit * revPerSec * diameterM));
    }

    /// <summary>J = V/(n D).</summary>
    /// <param name="airspeedMPerSec">Speed along the axis, m/s.</param>
    /// <param name="revPerSec">Propeller speed, rev/s; above 0.</param>
    /// <param name="diameterM">Diameter, m; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double AdvanceRatio(double airspeedMPerSec, double revPerSec, double diameterM) =>
        Guard.Finite(airspeedMPerSec) / (Guard.Positive(revPerSec) * Guard.Positive(diameterM));

    /// <summary>Propulsive efficiency η = J C_T/C_P.</summary>
    public double Efficiency(double advanceRatio) => advanceRatio * Thrust / Power;

    /// <summary>Thrust, N.</summary>
    /// <inheritdoc cref="TorqueNm"/>
    public double ThrustN(double densityKgPerM3, double revPerSec, double diameterM) => Thrust * ThrustUnit(densityKgPerM3, revPerSec, diameterM);

    /// <summary>Shaft power, W.</summary>
    /// <inheritdoc cref="TorqueNm"/>
    public double PowerW(double densityKgPerM3, double revPerSec, double diameterM) =>
        Power * ThrustUnit(densityKgPerM3, revPerSec, diameterM) * revPerSec * diameterM;

    /// <summary>Shaft torque, N·m.</summary>
    /// <param name="densityKgPerM3">Air density, kg/m³; above 0.</param>
    /// <param name="revPerSec">Propeller speed, rev/s; above 0.</param>
    /// <param name="diameterM">Diameter, m; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public double TorqueNm(double densityKgPerM3, double revPerSec, double diameterM) =>
        Torque * ThrustUnit(densityKgPerM3, revPerSec, diameterM) * diameterM;

    /// <summary>Torque per thrust, m: D C_P/(2π C_T).</summary>
    /// <param name="diameterM">Diameter, m; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">The diameter is not above 0.</exception>
    public double TorqueArmM(double diameterM) => Guard.Positive(diameterM) * Torque / Thrust;

    private static double ThrustUnit(double density, double revPerSec, double diameter) =>
        Guard.Positive(density) * Guard.Positive(revPerSec) * revPerSec * Math.Pow(Guard.Positive(diameter), 4);
}
