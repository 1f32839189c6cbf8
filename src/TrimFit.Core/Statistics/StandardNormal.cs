using MathNet.Numerics;

namespace TrimFit.Core.Statistics;

/// <summary>The standard normal distribution.</summary>
public static class StandardNormal
{
    /// <summary>Density at z.</summary>
    public static double Density(double z) => Math.Exp(-0.5 * z * z) / Math.Sqrt(2 * Math.PI);

    /// <summary>Probability of a value below z; keeps its digits in the lower tail.</summary>
    public static double Cdf(double z) => 0.5 * SpecialFunctions.Erfc(-z / Constants.Sqrt2);

    /// <summary>The value that a probability lies below.</summary>
    /// <param name="probability">Above 0 and below 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The probability is not inside (0, 1).</exception>
    public static double Quantile(double probability)
    {
        Probability.Inside(probability);
        return -Constants.Sqrt2 * SpecialFunctions.ErfcInv(2 * probability);
    }
}
