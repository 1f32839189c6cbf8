namespace TrimFit.Core.Statistics;

/// <summary>Sample quantile that interpolates at 1 + (n − 1) p: type 7 of Hyndman &amp; Fan, The American Statistician 50 (1996) 361.</summary>
public static class QuantileType7
{
    /// <summary>The quantile; the column is left as it was.</summary>
    /// <param name="values">At least one value, all finite, in any order.</param>
    /// <param name="probability">From 0 (the smallest value) to 1 (the largest).</param>
    /// <exception cref="ArgumentException">The column is empty or a value is not finite.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The probability is outside [0, 1].</exception>
    public static double Of(ReadOnlySpan<double> values, double probability) => InPlace(values.ToArray(), probability);

    /// <summary>The quantile without a copy; the values end up in another order.</summary>
    /// <inheritdoc cref="Of"/>
    public static double InPlace(Span<double> values, double probability)
    {
        Selection.CheckColumn(values, nameof(values));
        if (!(probability is >= 0 and <= 1))
            throw new ArgumentOutOfRangeException(nameof(probability), probability, "must be from 0 to 1");
        double position = (values.Length - 1) * probability;
        int below = (int)Math.Floor(position);
        double lower = Selection.Nth(values, below);
        double share = position - below;
        if (share == 0)
            return lower;
        double upper = double.PositiveInfinity;
        foreach (double value in values[(below + 1)..]) // all of them are at least the lower one after the selection
            upper = Math.Min(upper, value);
        return lower + (share * (upper - lower));
    }
}
