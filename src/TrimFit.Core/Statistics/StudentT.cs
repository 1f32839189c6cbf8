using MathNet.Numerics;

namespace TrimFit.Core.Statistics;

/// <summary>Student's t distribution with any positive, also fractional or infinite, degrees of freedom.</summary>
/// <remarks>Probabilities come from the regularised incomplete beta function; quantiles are searched here, because the general root search of
/// the numerics library stops at |t| = 800 and at an absolute 1e-12.</remarks>
public static class StudentT
{
    /// <summary>Density at t.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The degrees of freedom are not above 0.</exception>
    public static double Density(double t, double degreesOfFreedom)
    {
        double v = Checked(degreesOfFreedom);
        if (double.IsPositiveInfinity(v))
            return StandardNormal.Density(t);
        double constant = SpecialFunctions.GammaLn((v + 1) / 2) - SpecialFunctions.GammaLn(v / 2) - (0.5 * Math.Log(v * Math.PI));
        return Math.Exp(constant - ((v + 1) / 2 * Probability.Log1P(t * t / v)));
    }

    /// <summary>Probability of a value below t; keeps its digits in the lower tail.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The degrees of freedom are not above 0.</exception>
    public static double Cdf(double t, double degreesOfFreedom)
    {
        double v = Checked(degreesOfFreedom);
        if (double.IsPositiveInfinity(v))
            return StandardNormal.Cdf(t);
        double square = t * t;
        if (double.IsPositiveInfinity(square))
            return t > 0 ? 1 : 0;
        // Both forms give the upper tail; the one whose argument is at most a half keeps its digits.
        double tail = square > v
            ? 0.5 * SpecialFunctions.BetaRegularized(v / 2, 0.5, v / (v + square))
            : 0.5 * (1 - SpecialFunctions.BetaRegularized(0.5, v / 2, square / (v + square)));
        return t > 0 ? 1 - tail : tail;
    }

    /// <summary>The value that a probability lies below.</summary>
    /// <param name="probability">Above 0 and below 1.</param>
    /// <param name="degreesOfFreedom">Above 0; infinity gives the normal quantile.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double Quantile(double probability, double degreesOfFreedom)
    {
        double p = Probability.Inside(probability);
        double v = Checked(degreesOfFreedom);
        if (double.IsPositiveInfinity(v))
            return StandardNormal.Quantile(p);
        if (p == 0.5)
            return 0;
        double tail = Math.Min(p, 1 - p);
        double lower = -1;
        while (Cdf(lower, v) > tail && lower > -1e300)
            lower *= 2;
        double quantile = Probability.Solve(t => Cdf(t, v), t => Density(t, v), tail, lower, lower == -1 ? 0 : lower / 2);
        return p < 0.5 ? quantile : -quantile;
    }

    /// <summary>Half-width factor of a two-sided interval: the quantile at (1 + level)/2.</summary>
    /// <param name="level">Such as 0.95; above 0 and below 1.</param>
    /// <param name="degreesOfFreedom">Above 0; infinity gives the normal factor.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double TwoSidedFactor(double level, double degreesOfFreedom) =>
        -Quantile((1 - Probability.Inside(level)) / 2, degreesOfFreedom);

    /// <summary>Probability of a value at least as far from 0 as t, on either side.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The degrees of freedom are not above 0.</exception>
    public static double TwoSidedP(double t, double degreesOfFreedom) => 2 * Cdf(-Math.Abs(t), degreesOfFreedom);

    private static double Checked(double degreesOfFreedom) => degreesOfFreedom > 0
        ? degreesOfFreedom
        : throw new ArgumentOutOfRangeException(nameof(degreesOfFreedom), degreesOfFreedom, "must be above 0");
}
