namespace TrimFit.Core.Statistics;

/// <summary>Where the mean of a column changes, by least total squared deviation.</summary>
/// <remarks>A break b means that a new segment starts at index b; equally, that b values lie before it. Ties go to the earlier break.</remarks>
public static class ChangePoints
{
    /// <summary>Segments of least cost, each break charged a penalty: pruned exact linear time. R. Killick, P. Fearnhead &amp; I. A. Eckley, J. Am. Stat. Assoc. 107
    /// (2012) 1590. The answer is that of <see cref="OptimalPartitioning"/>, usually in much less time.</summary>
    /// <param name="values">Finite values in order.</param>
    /// <param name="penalty">Charge per break, in the square of the values' unit; not negative.</param>
    /// <param name="minimumSegment">Fewest values in a segment; at least 1.</param>
    /// <returns>Breaks in rising order; none when the column is shorter than two segments.</returns>
    /// <exception cref="ArgumentException">A value is not finite, or an argument is outside its range.</exception>
    public static int[] Pelt(ReadOnlySpan<double> values, double penalty, int minimumSegment = 1) =>
        Partition(values, penalty, minimumSegment, prune: true);

    /// <summary>The same by trying every last break: B. Jackson et al., IEEE Signal Process. Lett. 12 (2005) 105. Time grows with the square of the length.</summary>
    /// <inheritdoc cref="Pelt"/>
    public static int[] OptimalPartitioning(ReadOnlySpan<double> values, double penalty, int minimumSegment = 1) =>
        Partition(values, penalty, minimumSegment, prune: false);

    /// <summary>The best segmentation with a given number of breaks. J. Bai &amp; P. Perron, J. Appl. Econometrics 18 (2003) 1.</summary>
    /// <param name="values">Finite values in order.</param>
    /// <param name="breaks">Number of breaks; not negative.</param>
    /// <param name="minimumSegment">Fewest values in a segment; at least 1.</param>
    /// <returns>Breaks in rising order; null when the column is too short for them.</returns>
    /// <exception cref="ArgumentException">A value is not finite, or an argument is outside its range.</exception>
    public static int[]? WithBreaks(ReadOnlySpan<double> values, int breaks, int minimumSegment = 1)
    {
        Sums sums = Sums.Of(values, minimumSegment);
        ArgumentOutOfRangeException.ThrowIfNegative(breaks);
        int n = values.Length;
        if (n == 0 || (breaks + 1L) * minimumSegment > n)
            return null;
        double[] best = new double[n + 1], next = new double[n + 1];
        int[,] from = new int[breaks + 1, n + 1];
        for (int t = 0; t <= n; t++)
            best[t] = t >= minimumSegment ? sums.Cost(0, t) : double.PositiveInfinity;
        for (int m = 1; m <= breaks; m++)
        {
            Array.Fill(next, double.PositiveInfinity);
            for (int t = (m + 1) * minimumSegment; t <= n; t++)
            {
                for (int s = m * minimumSegment; s <= t - minimumSegment; s++)
                {
                    double cost = best[s] + sums.Cost(s, t);
                    if (cost < next[t])
                        (next[t], from[m, t]) = (cost, s);
                }
            }
            (best, next) = (next, best);
        }
        int[] found = new int[breaks];
        for (int m = breaks, end = n; m > 0; m--)
            found[m - 1] = end = from[m, end];
        return found;
    }

    /// <summary>Sum of squared deviations from the mean of each segment.</summary>
    /// <param name="values">Finite values in order.</param>
    /// <param name="breaks">Breaks in rising order, each inside the column.</param>
    /// <exception cref="ArgumentException">A value is not finite or the breaks do not rise.</exception>
    public static double Cost(ReadOnlySpan<double> values, ReadOnlySpan<int> breaks)
    {
        Sums sums = Sums.Of(values, 1);
        double cost = 0;
        int start = 0;
        foreach (int end in breaks)
        {
            if (end <= start || end >= values.Length)
                throw new ArgumentException(FormattableString.Invariant($"break {end} does not lie after {start} and before {values.Length}"), nameof(breaks));
            cost += sums.Cost(start, end);
            start = end;
        }
        return cost + sums.Cost(start, values.Length);
    }

    private static int[] Partition(ReadOnlySpan<double> values, double penalty, int minimumSegment, bool prune)
    {
        Sums sums = Sums.Of(values, minimumSegment);
        Guard.NotNegative(penalty);
        int n = values.Length;
        double[] best = new double[n + 1]; // least cost of the first t values with penalty for each segment, less one
        int[] last = new int[n + 1];
        int[] expires = new int[n + 1]; // a pruned start may still serve ends too close behind the one that pruned it
        List<int> starts = [];
        best[0] = -penalty;
        for (int t = 1; t <= n; t++)
        {
            best[t] = double.PositiveInfinity;
            int arriving = t - minimumSegment;
            if (arriving < 0)
                continue;
            if (arriving == 0 || double.IsFinite(best[arriving]))
            {
                starts.Add(arriving);
                expires[arriving] = int.MaxValue;
            }
            int kept = 0;
            for (int k = 0; k < starts.Count; k++)
            {
                int s = starts[k];
                if (expires[s] <= t)
                    continue;
                starts[kept++] = s;
                double cost = best[s] + sums.Cost(s, t) + penalty;
                if (cost < best[t])
                    (best[t], last[t]) = (cost, s);
            }
            starts.RemoveRange(kept, starts.Count - kept);
            if (!prune)
                continue;
            foreach (int s in starts)
            {
                // A start no better now than the best ending here can never win once this end may itself be a start.
                if (best[s] + sums.Cost(s, t) > best[t] && expires[s] == int.MaxValue)
                    expires[s] = t + minimumSegment;
            }
        }
        List<int> found = [];
        for (int end = n; end > 0 && double.IsFinite(best[end]) && last[end] > 0; end = last[end])
            found.Add(last[end]);
        found.Reverse();
        return [.. found];
    }

    // Running sums about the column's mean, so that a large common part costs no digits.
    private readonly struct Sums
    {
        private readonly double[] _sum, _squares;

        private Sums(double[] sum, double[] squares) => (_sum, _squares) = (sum, squares);

        public static Sums Of(ReadOnlySpan<double> values, int minimumSegment)
        {
            ArgumentOutOfRangeException.ThrowIfLessThan(minimumSegment, 1);
            double mean = values.IsEmpty ? 0 : SampleMoments.Mean(values);
            double[] sum = new double[values.Length + 1], squares = new double[values.Length + 1];
            for (int i = 0; i < values.Length; i++)
            {
                double deviation = values[i] - mean;
                sum[i + 1] = sum[i] + deviation;
                squares[i + 1] = squares[i] + (deviation * deviation);
            }
            return new(sum, squares);
        }

        public double Cost(int start, int end)
        {
            double total = _sum[end] - _sum[start];
            return Math.Max(0, _squares[end] - _squares[start] - (total * total / (end - start)));
        }
    }
}
