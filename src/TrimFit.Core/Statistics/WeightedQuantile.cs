namespace TrimFit.Core.Statistics;

/// <summary>Quantile of weighted values: the inverse of their weighted distribution function, with the mean of two neighbours where it is flat.</summary>
/// <remarks>For whole-number weights this is type 2 of Hyndman &amp; Fan (1996) on the values repeated; for equal weights 0.5 gives the median.</remarks>
public static class WeightedQuantile
{
    // Sums of weights reach a probability only to rounding; this share of the total counts as reached.
    private const double FlatTolerance = 1e-12;

    /// <summary>The quantile; the columns are left as they were.</summary>
    /// <param name="values">At least one value, all finite, in any order.</param>
    /// <param name="weights">One weight per value, finite, not negative, not all 0.</param>
    /// <param name="probability">From 0 to 1.</param>
    /// <exception cref="ArgumentException">Lengths differ, the columns are empty, a value or weight is not allowed, or all weights are 0.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The probability is outside [0, 1].</exception>
    public static double Of(ReadOnlySpan<double> values, ReadOnlySpan<double> weights, double probability)
    {
        double[] result = new double[1];
        Of(values, weights, [probability], result);
        return result[0];
    }

    /// <summary>Several quantiles with one sort.</summary>
    /// <param name="values">At least one value, all finite, in any order.</param>
    /// <param name="weights">One weight per value, finite, not negative, not all 0.</param>
    /// <param name="probabilities">Each from 0 to 1.</param>
    /// <param name="quantiles">Receives one quantile per probability.</param>
    /// <exception cref="ArgumentException">Lengths differ, the columns are empty, a value or weight is not allowed, or all weights are 0.</exception>
    /// <exception cref="ArgumentOutOfRangeException">A probability is outside [0, 1].</exception>
    public static void Of(ReadOnlySpan<double> values, ReadOnlySpan<double> weights, ReadOnlySpan<double> probabilities, Span<double> quantiles)
    {
        Guard.SameLength(values, weights);
        Guard.SameLength(probabilities, quantiles);
        Selection.CheckColumn(values, nameof(values));
        double total = 0;
        for (int i = 0; i < weights.Length; i++)
            total += Guard.NotNegative(weights[i], nameof(weights));
        if (!(total > 0) || !double.IsFinite(total))
            throw new ArgumentException(FormattableString.Invariant($"add up to {total}: must be above 0 and finite"), nameof(weights));
        double[] sorted = values.ToArray();
        double[] carried = weights.ToArray();
        Array.Sort(sorted, carried);
        for (int q = 0; q < probabilities.Length; q++)
        {
            if (!(probabilities[q] is >= 0 and <= 1))
                throw new ArgumentOutOfRangeException(nameof(probabilities), probabilities[q], "must be from 0 to 1");
            quantiles[q] = At(sorted, carried, total, probabilities[q]);
        }
    }

    private static double At(ReadOnlySpan<double> sorted, ReadOnlySpan<double> weights, double total, double probability)
    {
        double wanted = probability * total, slack = FlatTolerance * total, sum = 0;
        int reached = -1;
        for (int i = 0; i < sorted.Length; i++)
        {
            if (weights[i] == 0)
                continue;
            if (reached >= 0)
                return (sorted[reached] / 2) + (sorted[i] / 2); // the next value that weighs something
            sum += weights[i];
            if (sum > wanted + slack)
                return sorted[i];
            if (sum >= wanted - slack)
                reached = i;
        }
        return sorted[reached >= 0 ? reached : LastOfWeight(weights)];
    }

    private static int LastOfWeight(ReadOnlySpan<double> weights)
    {
        int last = weights.Length - 1;
        while (weights[last] == 0)
            last--;
        return last;
    }
}
