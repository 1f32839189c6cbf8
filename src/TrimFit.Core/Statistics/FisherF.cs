using MathNet.Numerics;

namespace TrimFit.Core.Statistics;

/// <summary>Fisher's F distribution.</summary>
public static class FisherF
{
    /// <summary>Probability of a value above f.</summary>
    /// <param name="f">The statistic.</param>
    /// <param name="numerator">Degrees of freedom of the numerator; above 0.</param>
    /// <param name="denominator">Degrees of freedom of the denominator; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">Degrees of freedom are not above 0 and finite.</exception>
    public static double UpperTail(double f, double numerator, double denominator)
    {
        Guard.Positive(numerator);
        Guard.Positive(denominator);
        return f <= 0 ? 1 : SpecialFunctions.BetaRegularized(denominator / 2, numerator / 2, denominator / (denominator + (numerator * f)));
    }
}
