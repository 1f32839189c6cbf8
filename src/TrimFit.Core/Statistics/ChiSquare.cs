using MathNet.Numerics;

namespace TrimFit.Core.Statistics;

/// <summary>The chi-square distribution.</summary>
public static class ChiSquare
{
    /// <summary>Density at x.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The degrees of freedom are not above 0 and finite.</exception>
    public static double Density(double x, double degreesOfFreedom)
    {
        double half = Guard.Positive(degreesOfFreedom) / 2;
        return x <= 0 ? 0 : Math.Exp(((half - 1) * Math.Log(x / 2)) - (x / 2) - SpecialFunctions.GammaLn(half)) / 2;
    }

    /// <summary>Probability of a value below x.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The degrees of freedom are not above 0 and finite.</exception>
    public static double Cdf(double x, double degreesOfFreedom)
    {
        double half = Guard.Positive(degreesOfFreedom) / 2;
        return x <= 0 ? 0 : SpecialFunctions.GammaLowerRegularized(half, x / 2);
    }

    /// <summary>Probability of a value above x: the p-value of a chi-square statistic; keeps its digits when small.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The degrees of freedom are not above 0 and finite.</exception>
    public static double UpperTail(double x, double degreesOfFreedom)
    {
        double half = Guard.Positive(degreesOfFreedom) / 2;
        return x <= 0 ? 1 : SpecialFunctions.GammaUpperRegularized(half, x / 2);
    }

    /// <summary>The value that a probability lies below.</summary>
    /// <param name="probability">Above 0 and below 1.</param>
    /// <param name="degreesOfFreedom">Above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double Quantile(double probability, double degreesOfFreedom)
    {
        double p = Probability.Inside(probability);
        double upper = Guard.Positive(degreesOfFreedom);
        while (Cdf(upper, degreesOfFreedom) < p)
            upper *= 2;
        double lower = upper;
        while (lower > 0 && Cdf(lower, degreesOfFreedom) > p)
            lower /= 2;
        return Probability.Solve(x => Cdf(x, degreesOfFreedom), x => Density(x, degreesOfFreedom), p, lower, upper);
    }
}
