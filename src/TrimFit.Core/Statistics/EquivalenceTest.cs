namespace TrimFit.Core.Statistics;

/// <summary>Two one-sided tests: is a difference small enough not to matter? D. J. Schuirmann, J. Pharmacokin. Biopharm. 15 (1987) 657.</summary>
public static class EquivalenceTest
{
    /// <summary>Tests a difference against margins on both sides.</summary>
    /// <param name="difference">Difference with its standard error (above 0) and degrees of freedom.</param>
    /// <param name="lowerMargin">Largest difference below 0 that does not matter.</param>
    /// <param name="upperMargin">Largest difference above 0 that does not matter; above <paramref name="lowerMargin"/>.</param>
    /// <param name="significance">Chance of calling a difference at a margin small; default 0.05.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static EquivalenceResult TwoOneSided(MeanDifference difference, double lowerMargin, double upperMargin, double significance = 0.05)
    {
        double error = Guard.Positive(difference.StandardError, nameof(difference));
        double degrees = difference.DegreesOfFreedom;
        if (!(Guard.Finite(upperMargin) > Guard.Finite(lowerMargin)))
            throw new ArgumentOutOfRangeException(nameof(upperMargin), upperMargin, "must be above the lower margin");
        double level = 1 - Probability.Inside(2 * significance, nameof(significance));
        double lower = (Guard.Finite(difference.Value, nameof(difference)) - lowerMargin) / error;
        double upper = (difference.Value - upperMargin) / error;
        double half = StudentT.TwoSidedFactor(level, degrees) * error;
        double p = Math.Max(StudentT.Cdf(-lower, degrees), StudentT.Cdf(upper, degrees));
        return new EquivalenceResult(lower, upper, p, new ConfidenceInterval(difference.Value - half, difference.Value + half, level), p < significance);
    }
}
