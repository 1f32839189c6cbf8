namespace TrimFit.Core.Statistics;

/// <summary>Regression with first-order autoregressive errors e_t = ρ e_{t−1} + new, by generalised differences.</summary>
/// <remarks>D. Cochrane &amp; G. H. Orcutt, J. Am. Stat. Assoc. 44 (1949) 32, drops the first row of each segment; S. J. Prais &amp; C. B. Winsten, Cowles
/// Commission Discussion Paper 383 (1954), keeps it with the weight √(1 − ρ²). Rows are in time order and equally spaced within a segment.</remarks>
public static class Ar1Regression
{
    // ρ at or beyond 1 has no stationary start; a run of rows that drifts away is kept just inside.
    private const double LargestRho = 0.9999;

    /// <summary>Cochrane and Orcutt's estimate: the first row of each segment is dropped.</summary>
    /// <param name="designColumnMajor">n×p design, column after column; finite.</param>
    /// <param name="y">n observations; finite.</param>
    /// <param name="columns">p, at least 1.</param>
    /// <param name="options">Choices; null for the defaults.</param>
    /// <param name="segments">Segment of each row, different across a gap; empty for one segment.</param>
    /// <exception cref="ArgumentException">Lengths do not match or a value is not finite.</exception>
    public static Ar1Fit CochraneOrcutt(
        ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> y, int columns, Ar1Options? options = null, ReadOnlySpan<int> segments = default) =>
        Fit(designColumnMajor, y, columns, keepFirst: false, options ?? new Ar1Options(), segments);

    /// <summary>Prais and Winsten's estimate: the first row of each segment is kept.</summary>
    /// <inheritdoc cref="CochraneOrcutt"/>
    public static Ar1Fit PraisWinsten(
        ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> y, int columns, Ar1Options? options = null, ReadOnlySpan<int> segments = default) =>
        Fit(designColumnMajor, y, columns, keepFirst: true, options ?? new Ar1Options(), segments);

    /// <summary>ρ of residuals by a rule, kept inside ±0.9999; 0 for residuals that are all 0.</summary>
    /// <param name="residuals">Residuals in time order.</param>
    /// <param name="rule">How it is measured.</param>
    /// <param name="segments">Segment of each row; empty for one segment.</param>
    public static double Rho(ReadOnlySpan<double> residuals, RhoRule rule, ReadOnlySpan<int> segments = default)
    {
        double products = 0, squares = 0;
        for (int i = 0; i < residuals.Length; i++)
        {
            bool follows = Follows(segments, i);
            if (follows)
                products += residuals[i] * residuals[i - 1];
            if (rule == RhoRule.Autocorrelation)
                squares += residuals[i] * residuals[i];
            else if (follows)
                squares += residuals[i - 1] * residuals[i - 1];
        }
        return squares > 0 ? Math.Clamp(products / squares, -LargestRho, LargestRho) : 0;
    }

    private static Ar1Fit Fit(ReadOnlySpan<double> design, ReadOnlySpan<double> y, int p, bool keepFirst, Ar1Options options, ReadOnlySpan<int> segments)
    {
        LeastSquares.CheckShape(design, y, p, []);
        int n = y.Length;
        if (!segments.IsEmpty && segments.Length != n)
            throw new ArgumentException(FormattableString.Invariant($"has {segments.Length} rows, expected {n}"), nameof(segments));
        int rows = 0;
        for (int i = 0; i < n; i++)
            rows += keepFirst || Follows(segments, i) ? 1 : 0;
        double[] transformed = new double[rows * p];
        double[] target = new double[rows];
        int[] runs = new int[rows];
        double[] residuals = [.. LeastSquares.Fit(design, y, p).Residuals];
        double rho = Rho(residuals, options.Rule, segments);
        LeastSquaresFit fit;
        double step;
        int round = 0;
        while (true)
        {
            round++;
            Transform(design, y, p, rho, keepFirst, segments, transformed, target, runs);
            fit = LeastSquares.Fit(transformed, target, p);
            for (int i = 0; i < n; i++)
            {
                double fitted = 0;
                for (int j = 0; j < p; j++)
                    fitted += design[(j * n) + i] * fit.Coefficients[j];
                residuals[i] = y[i] - fitted;
            }
            double next = Rho(residuals, options.Rule, segments);
            step = Math.Abs(next - rho);
            if (step <= options.Tolerance || round == options.MaximumIterations)
                break;
            rho = next;
        }
        double[] covariance = new double[p * p];
        for (int i = 0; i < covariance.Length; i++)
            covariance[i] = fit.ResidualScale * fit.ResidualScale * fit.InverseCross[i];
        return new Ar1Fit
        {
            Rho = rho,
            Coefficients = fit.Coefficients,
            Covariance = [.. covariance],
            ResidualSumOfSquares = fit.ResidualSumOfSquares,
            ResidualScale = fit.ResidualScale,
            DegreesOfFreedom = fit.DegreesOfFreedom,
            DurbinWatson = ResidualTests.DurbinWatson(fit.Residuals.AsSpan(), runs),
            Convergence = new Convergence(step <= options.Tolerance || options.MaximumIterations == 1, round, step),
            Options = options,
        };
    }

    private static void Transform(
        ReadOnlySpan<double> design,
        ReadOnlySpan<double> y,
        int p,
        double rho,
        bool keepFirst,
        ReadOnlySpan<int> segments,
        Span<double> transformed,
        Span<double> target,
        Span<int> runs)
    {
        int n = y.Length, rows = target.Length, row = 0, run = 0;
        double first = Math.Sqrt(1 - (rho * rho));
        for (int i = 0; i < n; i++)
        {
            bool follows = Follows(segments, i);
            run += follows ? 0 : 1;
            if (!follows && !keepFirst)
                continue;
            target[row] = follows ? y[i] - (rho * y[i - 1]) : first * y[i];
            for (int j = 0; j < p; j++)
            {
                double value = design[(j * n) + i];
                transformed[(j * rows) + row] = follows ? value - (rho * design[(j * n) + i - 1]) : first * value;
            }
            runs[row++] = run;
        }
    }

    private static bool Follows(ReadOnlySpan<int> segments, int row) => row > 0 && (segments.IsEmpty || segments[row] == segments[row - 1]);
}
