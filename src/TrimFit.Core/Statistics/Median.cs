namespace TrimFit.Core.Statistics;

/// <summary>The middle value, by selection.</summary>
public static class Median
{
    /// <summary>The median; mean of the two middle values for an even number. The column is left as it was.</summary>
    /// <param name="values">At least one value, all finite, in any order.</param>
    /// <exception cref="ArgumentException">The column is empty or a value is not finite.</exception>
    public static double Of(ReadOnlySpan<double> values) => InPlace(values.ToArray());

    /// <summary>The median without a copy; the values end up in another order.</summary>
    /// <inheritdoc cref="Of"/>
    public static double InPlace(Span<double> values) => QuantileType7.InPlace(values, 0.5);
}
