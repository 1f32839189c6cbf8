namespace TrimFit.Core.Statistics;

/// <summary>Mean, standard deviation and autocorrelation of a column, by sums about the mean.</summary>
/// <remarks>Two passes with sums in doubled precision: large values with small differences (NIST NumAcc4) keep the digits their storage has left.</remarks>
public static class SampleMoments
{
    /// <summary>Arithmetic mean.</summary>
    /// <param name="values">At least one value, all finite.</param>
    /// <exception cref="ArgumentException">The column is empty or a value is not finite.</exception>
    public static double Mean(ReadOnlySpan<double> values)
    {
        Selection.CheckColumn(values, nameof(values));
        DoubleDouble sum = default;
        foreach (double value in values)
            sum.Add(value);
        return sum.Value / values.Length;
    }

    /// <summary>Standard deviation with divisor n − 1.</summary>
    /// <param name="values">At least two values, all finite.</param>
    /// <exception cref="ArgumentException">There are fewer than two values or one is not finite.</exception>
    public static double StandardDeviation(ReadOnlySpan<double> values) => Math.Sqrt(Variance(values));

    /// <summary>Variance with divisor n − 1.</summary>
    /// <inheritdoc cref="StandardDeviation"/>
    public static double Variance(ReadOnlySpan<double> values)
    {
        double mean = Mean(values);
        if (values.Length < 2)
            throw new ArgumentException("has one value: a variance needs two", nameof(values));
        return CenteredProducts(values, mean, 0) / (values.Length - 1);
    }

    /// <summary>Autocorrelation at a lag: Σ (y_t − ȳ)(y_{t+l} − ȳ)/Σ (y_t − ȳ)². 0 for a column of equal values.</summary>
    /// <param name="values">At least one value, all finite, equally spaced in time.</param>
    /// <param name="lag">From 0; at or beyond the length the sum is empty and the answer 0.</param>
    /// <exception cref="ArgumentException">The column is empty, a value is not finite or the lag negative.</exception>
    public static double Autocorrelation(ReadOnlySpan<double> values, int lag)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(lag);
        double mean = Mean(values);
        double total = CenteredProducts(values, mean, 0);
        return total > 0 ? CenteredProducts(values, mean, lag) / total : 0;
    }

    // The mean is rounded to a double; taking the products' own mean deviation out repairs what that rounding leaves at lag 0.
    private static double CenteredProducts(ReadOnlySpan<double> values, double mean, int lag)
    {
        DoubleDouble products = default, deviations = default;
        for (int i = 0; i < values.Length; i++)
        {
            double deviation = values[i] - mean;
            deviations.Add(deviation);
            if (i >= lag)
                products.AddProduct(deviation, values[i - lag] - mean);
        }
        double rest = deviations.Value;
        return lag == 0 ? Math.Max(0, products.Value - (rest * rest / values.Length)) : products.Value;
    }
}
