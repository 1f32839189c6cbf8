namespace TrimFit.Core.Statistics;

/// <summary>Quantile of weighted values: the inverse of their weighted distribution function, with the mean of two neighbours where it is flat.</summary>
/// <remarks>For whole-number weights this is type 2 of Hyndman &amp; Fan (1996) on the values repeated; for equal weights 0.5 gives the median.</remarks>
public static class WeightedQuantile
{
    // Sums of weights reach a probability only to rounding; this share of the total counts as reached.
    private const double FlatTolerance = 1e-12;

    /// <summary>A part this short is simply sorted.</summary>
    private const int SmallPart = 24;

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

    /// <summary>Several quantiles at once: only the parts of the column around them are sorted.</summary>
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
        foreach (double probability in probabilities)
        {
            if (!(probability is >= 0 and <= 1))
                throw new ArgumentOutOfRangeException(nameof(probabilities), probability, "must be from 0 to 1");
        }
        double[] sorted = values.ToArray();
        double[] carried = weights.ToArray();
        SortAround(sorted, carried, 0, total, probabilities);
        for (int q = 0; q < probabilities.Length; q++)
            quantiles[q] = At(sorted, carried, total, probabilities[q]);
    }

    /// <summary>Quicksort that leaves alone every part no quantile falls into; the parts are in order, and so is what lies around a quantile.</summary>
    /// <param name="values">Values of this part.</param>
    /// <param name="weights">Their weights, moved with them.</param>
    /// <param name="before">Sum of the weights before this part.</param>
    /// <param name="total">Sum of all weights.</param>
    /// <param name="probabilities">Which quantiles are wanted.</param>
    private static void SortAround(Span<double> values, Span<double> weights, double before, double total, ReadOnlySpan<double> probabilities)
    {
        while (values.Length > SmallPart)
        {
            double low = values[0], high = values[^1], pivot = values[values.Length / 2];
            pivot = Math.Max(Math.Min(low, high), Math.Min(pivot, Math.Max(low, high))); // the middle of three
            int i = 0, j = values.Length - 1;
            while (i <= j)
            {
                while (values[i] < pivot)
                    i++;
                while (values[j] > pivot)
                    j--;
                if (i <= j)
                {
                    (values[i], values[j]) = (values[j], values[i]);
                    (weights[i], weights[j]) = (weights[j], weights[i]);
                    i++;
                    j--;
                }
            }
            double afterLeft = before, beforeRight = before;
            for (int k = 0; k < i; k++)
            {
                if (k <= j)
                    afterLeft += weights[k];
                beforeRight += weights[k];
            }
            if (Wanted(before, afterLeft, total, probabilities))
                SortAround(values[..(j + 1)], weights[..(j + 1)], before, total, probabilities);
            values = values[i..];
            weights = weights[i..];
            before = beforeRight;
            double end = before;
            foreach (double weight in weights)
                end += weight;
            if (!Wanted(before, end, total, probabilities))
                return;
        }
        values.Sort(weights);
    }

    /// <summary>Whether a quantile falls between two sums of weights, or on their edge.</summary>
    private static bool Wanted(double from, double to, double total, ReadOnlySpan<double> probabilities)
    {
        double slack = 2 * FlatTolerance * total; // twice that of At, so that both neighbours of a flat place are in order
        foreach (double probability in probabilities)
        {
            if (probability * total >= from - slack && probability * total <= to + slack)
                return true;
        }
        return false;
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
