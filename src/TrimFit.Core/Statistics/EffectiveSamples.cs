namespace TrimFit.Core.Statistics;

/// <summary>How many equally weighted samples a weighted sample is worth.</summary>
public static class EffectiveSamples
{
    /// <summary>Kish's (Σw)²/Σw² ("Survey Sampling", 1965, section 11.7); from 1 to the number of weights.</summary>
    /// <param name="weights">Finite, not negative; any scale. All 0, or none at all, gives 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">A weight is negative or not finite.</exception>
    public static double Kish(ReadOnlySpan<double> weights)
    {
        double largest = 0;
        foreach (double weight in weights)
            largest = Math.Max(largest, Guard.NotNegative(weight, nameof(weights)));
        if (largest == 0)
            return 0;
        double sum = 0, squares = 0;
        foreach (double weight in weights)
        {
            double share = weight / largest; // so that squares of tiny or huge likelihoods stay in range
            sum += share;
            squares += share * share;
        }
        return sum * sum / squares;
    }
}
