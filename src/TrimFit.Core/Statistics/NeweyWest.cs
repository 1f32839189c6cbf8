namespace TrimFit.Core.Statistics;

/// <summary>Covariance of least-squares coefficients under errors that follow each other in time (HAC), with Bartlett weights.</summary>
/// <remarks>W. K. Newey &amp; K. D. West, Econometrica 55 (1987) 703: S = Σ over lags l of (1 − l/(L+1)) (Γ_l + Γ_lᵀ), positive semidefinite.
/// Rows are equally spaced in time within a segment; products never cross from one segment to another.</remarks>
public static class NeweyWest
{
    /// <summary>HAC covariance of the coefficients.</summary>
    /// <param name="designColumnMajor">n×p design, column after column, rows in time order. For a weighted fit √w times the rows.</param>
    /// <param name="residuals">n residuals of the fit (√w times them for a weighted one).</param>
    /// <param name="columns">p.</param>
    /// <param name="lag">L, the last lag counted; 0 gives White's covariance; lags beyond the rows add nothing.</param>
    /// <param name="smallSample">Factor for estimated coefficients.</param>
    /// <param name="segments">Segment of each row: equal in unbroken spans, different across a gap; empty for one segment.</param>
    /// <returns>p×p covariance, row by row; 0 in rows and columns of design columns that are combinations of earlier ones.</returns>
    /// <exception cref="ArgumentException">Lengths do not match, a value is not finite, or the lag is negative.</exception>
    public static double[] Covariance(
        ReadOnlySpan<double> designColumnMajor,
        ReadOnlySpan<double> residuals,
        int columns,
        int lag,
        SmallSample smallSample = SmallSample.None,
        ReadOnlySpan<int> segments = default)
    {
        LeastSquares.CheckShape(designColumnMajor, residuals, columns, []);
        ArgumentOutOfRangeException.ThrowIfNegative(lag);
        int n = residuals.Length, p = columns;
        CheckSegments(segments, n);
        double[] scores = new double[n * p]; // row by row: the inner loops walk over one row
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < p; j++)
                scores[(i * p) + j] = designColumnMajor[(j * n) + i] * residuals[i];
        }
        double[] meat = new double[p * p];
        double[] gamma = new double[p * p];
        for (int l = 0; l <= lag && l < n; l++)
        {
            Array.Clear(gamma);
            for (int i = l; i < n; i++)
            {
                if (l > 0 && !segments.IsEmpty && segments[i] != segments[i - l])
                    continue;
                ReadOnlySpan<double> now = scores.AsSpan(i * p, p), then = scores.AsSpan((i - l) * p, p);
                for (int a = 0; a < p; a++)
                {
                    for (int b = 0; b < p; b++)
                        gamma[(a * p) + b] += now[a] * then[b];
                }
            }
            double weight = (l == 0 ? 0.5 : 1) * (1 - (l / (lag + 1.0)));
            for (int a = 0; a < p; a++)
            {
                for (int b = 0; b < p; b++)
                    meat[(a * p) + b] += weight * (gamma[(a * p) + b] + gamma[(b * p) + a]);
            }
        }
        HouseholderQr qr = HouseholderQr.Factor(designColumnMajor.ToArray(), n, p, new LeastSquaresOptions().RankTolerance);
        double factor = smallSample == SmallSample.DegreesOfFreedom && n > qr.Rank ? n / (double)(n - qr.Rank) : 1;
        return SandwichCovariance.Sandwich(qr.InverseCross(p), meat, p, factor);
    }

    /// <summary>The rule of thumb ⌊4 (n/100)^(2/9)⌋ (Newey &amp; West, Rev. Econ. Stud. 61 (1994) 631, Bartlett kernel).</summary>
    /// <exception cref="ArgumentOutOfRangeException">The number of rows is negative.</exception>
    public static int AutomaticLag(int rows)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(rows);
        return (int)Math.Floor(4 * Math.Pow(rows / 100.0, 2.0 / 9));
    }

    /// <summary>Bandwidth chosen from the data, lags counted as L + 1: 1.1447 (n (s₁/s₀)²)^(1/3), s from the first
    /// <see cref="AutomaticLag(int)"/> autocovariances of the summed scores, a column of equal values (the intercept) left out.</summary>
    /// <remarks>Newey &amp; West (1994), equations 3.8 to 3.15, without prewhitening. The lag for <see cref="Covariance"/> is its floor;
    /// R sandwich's <c>bwNeweyWest</c> gives the same number. 0 when the scores vanish.</remarks>
    /// <inheritdoc cref="Covariance"/>
    public static double Bandwidth(ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> residuals, int columns, ReadOnlySpan<int> segments = default)
    {
        LeastSquares.CheckShape(designColumnMajor, residuals, columns, []);
        int n = residuals.Length;
        CheckSegments(segments, n);
        double[] sums = new double[n];
        for (int j = 0; j < columns; j++)
        {
            ReadOnlySpan<double> column = designColumnMajor.Slice(j * n, n);
            bool constant = columns > 1 && !column.ContainsAnyExcept(column.IsEmpty ? 0 : column[0]);
            for (int i = 0; i < n && !constant; i++)
                sums[i] += column[i] * residuals[i];
        }
        int last = Math.Min(AutomaticLag(n), n - 1);
        double s0 = 0, s1 = 0;
        for (int l = 0; l <= last; l++)
        {
            double covariance = 0;
            for (int i = l; i < n; i++)
            {
                if (segments.IsEmpty || segments[i] == segments[i - l])
                    covariance += sums[i] * sums[i - l];
            }
            covariance /= n;
            s0 += l == 0 ? covariance : 2 * covariance;
            s1 += 2 * l * covariance;
        }
        return s0 == 0 ? 0 : 1.1447 * Math.Cbrt(n * (s1 / s0) * (s1 / s0));
    }

    private static void CheckSegments(ReadOnlySpan<int> segments, int rows)
    {
        if (!segments.IsEmpty && segments.Length != rows)
            throw new ArgumentException(FormattableString.Invariant($"has {segments.Length} rows, expected {rows}"), nameof(segments));
    }
}
