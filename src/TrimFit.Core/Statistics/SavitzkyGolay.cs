namespace TrimFit.Core.Statistics;

/// <summary>Smoothing and differentiation by a polynomial fitted to a moving window of equally spaced samples.</summary>
/// <remarks>A. Savitzky &amp; M. J. E. Golay, Anal. Chem. 36 (1964) 1627, with the corrections of J. Steinier, Y. Termonia &amp; J. Deltour, Anal. Chem. 44
/// (1972) 1906. Weights by discrete orthogonal (Gram) polynomials: P. A. Gorry, Anal. Chem. 62 (1990) 570. One object per choice of window; using it
/// allocates nothing.</remarks>
public sealed class SavitzkyGolay
{
    private readonly double[] _weights; // row per position in the window, from −half to half

    /// <summary>Prepares the weights.</summary>
    /// <param name="points">Samples in the window; odd, at least 3.</param>
    /// <param name="degree">Degree of the polynomial, from 0, below <paramref name="points"/>.</param>
    /// <param name="derivative">Which derivative is wanted: 0 smooths; at most the degree.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public SavitzkyGolay(int points, int degree, int derivative = 0)
    {
        if (points < 3 || points % 2 == 0)
            throw new ArgumentOutOfRangeException(nameof(points), points, "must be odd and at least 3");
        if (degree < 0 || degree >= points)
            throw new ArgumentOutOfRangeException(nameof(degree), degree, "must be from 0 to below the number of points");
        if (derivative < 0 || derivative > degree)
            throw new ArgumentOutOfRangeException(nameof(derivative), derivative, "must be from 0 to the degree");
        (Points, Degree, Derivative) = (points, degree, derivative);
        int half = points / 2;
        _weights = new double[points * points];
        for (int at = -half; at <= half; at++)
        {
            for (int i = -half; i <= half; i++)
                _weights[((at + half) * points) + i + half] = Weight(i, at, half, degree, derivative);
        }
    }

    /// <summary>Samples in the window.</summary>
    public int Points { get; }

    /// <summary>Degree of the polynomial.</summary>
    public int Degree { get; }

    /// <summary>Derivative wanted.</summary>
    public int Derivative { get; }

    /// <summary>Weights for the middle of the window, per sample step to the power of the derivative.</summary>
    public ReadOnlySpan<double> CentralWeights => WeightsAt(0);

    /// <summary>Weights for a place in the window: 0 the middle, −half and half its ends.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The place is outside the window.</exception>
    public ReadOnlySpan<double> WeightsAt(int offset)
    {
        int half = Points / 2;
        if (Math.Abs(offset) > half)
            throw new ArgumentOutOfRangeException(nameof(offset), offset, "must lie in the window");
        return _weights.AsSpan((offset + half) * Points, Points);
    }

    /// <summary>Filters a column; the ends take their value from the first and last whole window's polynomial.</summary>
    /// <param name="values">Equally spaced samples, finite; at least <see cref="Points"/> of them.</param>
    /// <param name="spacing">Distance between samples; above 0. The result is in the values' unit over this unit to the power of the derivative.</param>
    /// <param name="filtered">Receives one value per sample; may not overlap <paramref name="values"/>.</param>
    /// <exception cref="ArgumentException">The columns differ in length, are shorter than the window, or overlap.</exception>
    public void Apply(ReadOnlySpan<double> values, double spacing, Span<double> filtered)
    {
        Guard.SameLength(values, filtered);
        Guard.Positive(spacing);
        int n = values.Length, half = Points / 2;
        if (n < Points)
            throw new ArgumentException(FormattableString.Invariant($"has {n} samples, expected at least the window's {Points}"), nameof(values));
        if (values.Overlaps(filtered))
            throw new ArgumentException("overlaps the samples it is made from", nameof(filtered));
        double unit = 1;
        for (int d = 0; d < Derivative; d++)
            unit /= spacing;
        for (int i = 0; i < n; i++)
        {
            int start = Math.Clamp(i - half, 0, n - Points);
            ReadOnlySpan<double> weights = WeightsAt(i - start - half);
            double sum = 0;
            for (int k = 0; k < weights.Length; k++)
                sum += weights[k] * values[start + k];
            filtered[i] = sum * unit;
        }
    }

    // Gorry's equation 11: Σ_k (2k+1) (2m)^(k)/(2m+k+1)^(k+1) p_k(i) p_k^(s)(t).
    private static double Weight(int i, int t, int m, int degree, int derivative)
    {
        double sum = 0;
        for (int k = 0; k <= degree; k++)
            sum += ((2 * k) + 1) * (Falling(2 * m, k) / Falling((2 * m) + k + 1, k + 1)) * Gram(i, m, k, 0) * Gram(t, m, k, derivative);
        return sum;
    }

    private static double Gram(int i, int m, int k, int s)
    {
        if (k < 0 || s < 0)
            return 0;
        if (k == 0)
            return s == 0 ? 1 : 0;
        double leading = ((4.0 * k) - 2) / (k * ((2.0 * m) - k + 1));
        double trailing = (k - 1.0) * ((2.0 * m) + k) / (k * ((2.0 * m) - k + 1));
        return (leading * ((i * Gram(i, m, k - 1, s)) + (s * Gram(i, m, k - 1, s - 1)))) - (trailing * Gram(i, m, k - 2, s));
    }

    private static double Falling(int a, int factors)
    {
        double product = 1;
        for (int j = a - factors + 1; j <= a; j++)
            product *= j;
        return product;
    }
}
