namespace TrimFit.Core.Statistics;

/// <summary>Median absolute deviation, scaled so that normal values give their standard deviation.</summary>
public static class NormalConsistentMad
{
    /// <summary>1 over the upper quartile of the standard normal distribution, 1.4826 to four decimals.</summary>
    public const double Factor = 1.482602218505602;

    /// <summary>Scale about the median; 0 when more than half of the values are equal.</summary>
    /// <param name="values">At least one value, all finite, in any order; left as they were.</param>
    /// <exception cref="ArgumentException">The column is empty or a value is not finite.</exception>
    public static double Of(ReadOnlySpan<double> values) => About(values, Median.Of(values));

    /// <summary>Scale about a given centre: 0 for residuals.</summary>
    /// <param name="values">At least one value, all finite, in any order; left as they were.</param>
    /// <param name="center">The centre.</param>
    /// <exception cref="ArgumentException">The column is empty or a value is not finite.</exception>
    public static double About(ReadOnlySpan<double> values, double center)
    {
        double[] deviations = new double[values.Length];
        for (int i = 0; i < values.Length; i++)
            deviations[i] = Math.Abs(values[i] - center);
        return Factor * Median.InPlace(deviations);
    }
}
