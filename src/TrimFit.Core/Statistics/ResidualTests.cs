namespace TrimFit.Core.Statistics;

/// <summary>Tests of what least-squares residuals should not show: memory and unequal variance.</summary>
/// <remarks>Rows are in time order and equally spaced. A fit without residuals, or without degrees of freedom, gives statistic 0 and p-value 1.</remarks>
public static class ResidualTests
{
    /// <summary>Durbin and Watson's Σ(e_t − e_{t−1})²/Σe_t², 2 without first-order memory, towards 0 with positive memory. Biometrika 37 (1950) 409.</summary>
    /// <param name="residuals">Finite residuals in time order.</param>
    /// <param name="segments">Segment of each row; differences never cross from one to another. Empty for one segment.</param>
    /// <returns>From 0 to 4; 2 for residuals that are all 0.</returns>
    /// <exception cref="ArgumentException">The segments have another length.</exception>
    public static double DurbinWatson(ReadOnlySpan<double> residuals, ReadOnlySpan<int> segments = default)
    {
        if (!segments.IsEmpty && segments.Length != residuals.Length)
            throw new ArgumentException(FormattableString.Invariant($"has {segments.Length} rows, expected {residuals.Length}"), nameof(segments));
        double differences = 0, squares = 0;
        for (int i = 0; i < residuals.Length; i++)
        {
            squares += residuals[i] * residuals[i];
            if (i > 0 && (segments.IsEmpty || segments[i] == segments[i - 1]))
                differences += (residuals[i] - residuals[i - 1]) * (residuals[i] - residuals[i - 1]);
        }
        return squares > 0 ? differences / squares : 2;
    }

    /// <summary>Breusch and Godfrey's Lagrange multiplier n R² of the residuals on the design and their own lags, missing lags taken as 0.</summary>
    /// <remarks>T. S. Breusch, Aust. Econ. Papers 17 (1978) 334; L. G. Godfrey, Econometrica 46 (1978) 1293.</remarks>
    /// <param name="designColumnMajor">n×p design of the fit, column after column.</param>
    /// <param name="residuals">Its residuals in time order.</param>
    /// <param name="columns">p.</param>
    /// <param name="lags">Lags tested together; at least 1.</param>
    /// <exception cref="ArgumentException">Lengths do not match, a value is not finite, or there is no lag.</exception>
    public static TestStatistic BreuschGodfrey(ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> residuals, int columns, int lags)
    {
        (LeastSquaresFit auxiliary, double total) = BreuschGodfreyFit(designColumnMajor, residuals, columns, lags);
        return total > 0 ? TestStatistic.ChiSquared(residuals.Length * (1 - (auxiliary.ResidualSumOfSquares / total)), lags) : new(0, lags, 1);
    }

    /// <summary>The F form of Breusch and Godfrey's test, with lags and n − p − lags degrees of freedom; better kept to its level in short records.</summary>
    /// <inheritdoc cref="BreuschGodfrey"/>
    public static TestStatistic BreuschGodfreyF(ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> residuals, int columns, int lags)
    {
        (LeastSquaresFit auxiliary, double total) = BreuschGodfreyFit(designColumnMajor, residuals, columns, lags);
        if (!(total > 0) || auxiliary.DegreesOfFreedom == 0 || auxiliary.ResidualSumOfSquares == 0)
            return new(0, lags, 1);
        double f = (total - auxiliary.ResidualSumOfSquares) / lags / (auxiliary.ResidualSumOfSquares / auxiliary.DegreesOfFreedom);
        return new(f, lags, FisherF.UpperTail(f, lags, auxiliary.DegreesOfFreedom));
    }

    /// <summary>Ljung and Box's n(n+2) Σ r_l²/(n − l), r about the mean. Biometrika 65 (1978) 297.</summary>
    /// <param name="residuals">Residuals in time order, finite.</param>
    /// <param name="lags">Lags tested together; at least 1 and below the number of residuals.</param>
    /// <param name="fitted">Coefficients of a time-series model that were estimated: taken off the degrees of freedom.</param>
    /// <exception cref="ArgumentException">A value is not finite, or the counts do not fit.</exception>
    public static TestStatistic LjungBox(ReadOnlySpan<double> residuals, int lags, int fitted = 0)
    {
        double sum = 0;
        int n = residuals.Length;
        CheckLags(residuals, lags, fitted);
        for (int l = 1; l <= lags; l++)
        {
            double r = SampleMoments.Autocorrelation(residuals, l);
            sum += r * r / (n - l);
        }
        return TestStatistic.ChiSquared(n * (n + 2.0) * sum, lags - fitted);
    }

    /// <summary>Box and Pierce's n Σ r_l². J. Am. Stat. Assoc. 65 (1970) 1509.</summary>
    /// <inheritdoc cref="LjungBox"/>
    public static TestStatistic BoxPierce(ReadOnlySpan<double> residuals, int lags, int fitted = 0)
    {
        double sum = 0;
        CheckLags(residuals, lags, fitted);
        for (int l = 1; l <= lags; l++)
        {
            double r = SampleMoments.Autocorrelation(residuals, l);
            sum += r * r;
        }
        return TestStatistic.ChiSquared(residuals.Length * sum, lags - fitted);
    }

    /// <summary>Koenker's studentised Breusch-Pagan test: n R² of the squared residuals on the design. R. Koenker, J. Econometrics 17 (1981) 107.</summary>
    /// <param name="designColumnMajor">n×p design of the fit, with a column of ones, column after column.</param>
    /// <param name="residuals">Its residuals.</param>
    /// <param name="columns">p.</param>
    /// <exception cref="ArgumentException">Lengths do not match or a value is not finite.</exception>
    public static TestStatistic Koenker(ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> residuals, int columns)
    {
        double[] squares = new double[residuals.Length];
        for (int i = 0; i < squares.Length; i++)
            squares[i] = residuals[i] * residuals[i];
        LeastSquaresFit fit = LeastSquares.Fit(designColumnMajor, squares, columns);
        int degrees = Math.Max(0, fit.Rank - 1);
        double total = squares.Length > 1 ? (squares.Length - 1) * SampleMoments.Variance(squares) : 0;
        return total > 0 ? TestStatistic.ChiSquared(Math.Max(0, squares.Length * (1 - (fit.ResidualSumOfSquares / total))), degrees) : new(0, degrees, 1);
    }

    private static (LeastSquaresFit Auxiliary, double Total) BreuschGodfreyFit(ReadOnlySpan<double> design, ReadOnlySpan<double> residuals, int columns, int lags)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(lags, 1);
        LeastSquares.CheckShape(design, residuals, columns, []);
        int n = residuals.Length;
        double[] wide = new double[n * (columns + lags)];
        design.CopyTo(wide);
        for (int l = 1; l <= lags; l++)
        {
            for (int i = l; i < n; i++)
                wide[((columns + l - 1) * n) + i] = residuals[i - l];
        }
        DoubleDouble total = default;
        foreach (double residual in residuals)
            total.AddProduct(residual, residual);
        return (LeastSquares.Fit(wide, residuals, columns + lags), total.Value);
    }

    private static void CheckLags(ReadOnlySpan<double> residuals, int lags, int fitted)
    {
        Selection.CheckColumn(residuals, nameof(residuals));
        ArgumentOutOfRangeException.ThrowIfLessThan(lags, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(lags, residuals.Length);
        ArgumentOutOfRangeException.ThrowIfNegative(fitted);
    }
}
