using System.Collections.Immutable;
using System.Runtime.InteropServices;

namespace TrimFit.Core.Statistics;

/// <summary>Linear regression that a few wild rows cannot pull away: M-estimates by reweighted least squares.</summary>
/// <remarks>P. J. Huber, "Robust Statistics" (1981), chapter 7; P. W. Holland &amp; R. E. Welsch, Commun. Stat. A6 (1977) 813. Huber's fit starts from least
/// squares, the bisquare from Huber's fit, so that it settles in the minimum the bulk of the rows points to. Where more than a few rows may be wild, or
/// values of the design itself, start the bisquare from the least median (P. J. Rousseeuw, J. Am. Stat. Assoc. 79 (1984) 871).</remarks>
public static class RobustRegression
{
    // Rounding of an exact fit is no scale: below this share of the largest residual it counts as 0.
    private const double ExactFit = 1e-13;

    /// <summary>Fits y by the columns of a design.</summary>
    /// <param name="designColumnMajor">n×p design, column after column; finite.</param>
    /// <param name="y">n observations; finite.</param>
    /// <param name="columns">p, at least 1.</param>
    /// <param name="options">Choices; null for the defaults.</param>
    /// <exception cref="ArgumentException">Lengths do not match or a value is not finite.</exception>
    public static RobustFit Fit(ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> y, int columns, RobustOptions? options = null)
    {
        options ??= new RobustOptions();
        LeastSquaresFit plain = LeastSquares.Fit(designColumnMajor, y, columns);
        LeastSquaresFit fit = plain;
        double[] weights = new double[y.Length];
        double[] work = new double[y.Length];
        Array.Fill(weights, 1);
        if (options.Start == RobustStart.LeastMedian)
            fit = LeastMedian(designColumnMajor, y, columns, options, plain, work);
        double scale = InitialScale(fit, options, work);
        Convergence convergence = default;
        if (options.Start == RobustStart.LeastSquares || options.Loss == RobustLoss.Huber)
            convergence = Iterate(RobustLoss.Huber, designColumnMajor, y, columns, options, ref fit, ref scale, weights, work);
        if (options.Loss == RobustLoss.TukeyBisquare)
        {
            Convergence second = Iterate(RobustLoss.TukeyBisquare, designColumnMajor, y, columns, options, ref fit, ref scale, weights, work);
            convergence = second with { Iterations = convergence.Iterations + second.Iterations };
        }
        int degrees = Math.Max(0, y.Length - fit.Rank);
        return new RobustFit
        {
            Coefficients = fit.Coefficients,
            Covariance = Covariance(plain, fit.Residuals.AsSpan(), scale, degrees, options),
            Residuals = fit.Residuals,
            Weights = ImmutableCollectionsMarshal.AsImmutableArray(weights),
            ResidualScale = scale,
            DegreesOfFreedom = degrees,
            ColumnsLeftOut = fit.ColumnsLeftOut,
            Convergence = convergence,
            Options = options,
        };
    }

    // Exact fits through p rows drawn at random; the one of least median absolute residual.
    private static LeastSquaresFit LeastMedian(
        ReadOnlySpan<double> design, ReadOnlySpan<double> y, int p, RobustOptions options, LeastSquaresFit plain, double[] work)
    {
        int n = y.Length;
        if (n <= plain.Rank)
            return plain;
        SeededRandom random = new(options.Seed);
        double[] weights = new double[n];
        LeastSquaresFit best = plain;
        double least = MedianSize(plain, work);
        for (int draw = 0; draw < options.Draws; draw++)
        {
            Array.Clear(weights);
            for (int k = 0; k < plain.Rank;)
            {
                int row = random.NextInt32(n);
                if (weights[row] == 0)
                {
                    weights[row] = 1;
                    k++;
                }
            }
            LeastSquaresFit trial = LeastSquares.Fit(design, y, p, weights);
            if (trial.Rank < plain.Rank)
                continue;
            double median = MedianSize(trial, work);
            if (median < least)
                (best, least) = (trial, median);
        }
        return best;
    }

    private static double MedianSize(LeastSquaresFit fit, double[] work)
    {
        for (int i = 0; i < work.Length; i++)
            work[i] = Math.Abs(fit.Residuals[i]);
        return Median.InPlace(work);
    }

    private static Convergence Iterate(
        RobustLoss loss,
        ReadOnlySpan<double> design,
        ReadOnlySpan<double> y,
        int columns,
        RobustOptions options,
        ref LeastSquaresFit fit,
        ref double scale,
        double[] weights,
        double[] work)
    {
        double step = 0;
        for (int iteration = 1; iteration <= options.MaximumIterations; iteration++)
        {
            if (!(scale > 0))
                return new Convergence(true, iteration - 1, 0); // the bulk is met exactly: nothing left to weigh
            for (int i = 0; i < weights.Length; i++)
                weights[i] = Weight(loss, fit.Residuals[i] / scale, options);
            LeastSquaresFit next = LeastSquares.Fit(design, y, columns, weights);
            if (next.Rank < fit.Rank)
                return new Convergence(false, iteration, step); // so many rows forgotten that a column lost its support: keep the last good fit
            double moved = 0, size = 0;
            for (int i = 0; i < weights.Length; i++)
            {
                moved += (next.Residuals[i] - fit.Residuals[i]) * (next.Residuals[i] - fit.Residuals[i]);
                size += fit.Residuals[i] * fit.Residuals[i];
            }
            step = size > 0 ? Math.Sqrt(moved / size) : 0;
            double before = scale;
            fit = next;
            scale = NextScale(fit, scale, options, work);
            step = Math.Max(step, Math.Abs(scale - before) / before);
            if (step <= options.Tolerance)
                return new Convergence(true, iteration, step);
        }
        return new Convergence(false, options.MaximumIterations, step);
    }

    private static double Weight(RobustLoss loss, double u, RobustOptions options)
    {
        double size = Math.Abs(u);
        if (loss == RobustLoss.Huber)
            return size <= options.HuberConstant ? 1 : options.HuberConstant / size;
        double t = size / options.BisquareConstant;
        return t < 1 ? (1 - (t * t)) * (1 - (t * t)) : 0;
    }

    private static double Slope(double u, RobustOptions options)
    {
        double size = Math.Abs(u);
        if (options.Loss == RobustLoss.Huber)
            return size <= options.HuberConstant ? 1 : 0;
        double square = u / options.BisquareConstant * (u / options.BisquareConstant);
        return square < 1 ? (1 - square) * (1 - (5 * square)) : 0;
    }

    private static double InitialScale(LeastSquaresFit fit, RobustOptions options, double[] work) =>
        options.Scale == RobustScale.Fixed ? options.FixedScale : Mad(fit, options, work);

    private static double NextScale(LeastSquaresFit fit, double scale, RobustOptions options, double[] work) => options.Scale switch
    {
        RobustScale.Fixed => options.FixedScale,
        RobustScale.Mad => Mad(fit, options, work),
        _ => Proposal2(fit, scale, options.HuberConstant),
    };

    private static double Mad(LeastSquaresFit fit, RobustOptions options, double[] work)
    {
        if (work.Length == 0)
            return 0;
        double largest = 0;
        for (int i = 0; i < work.Length; i++)
        {
            work[i] = Math.Abs(fit.Residuals[i]);
            largest = Math.Max(largest, work[i]);
        }
        double scale = options.MadFactor * Median.InPlace(work);
        return scale > ExactFit * largest ? scale : 0;
    }

    // One step of s² ← s² Σψ²(r/s)/((n − p) β), β = E ψ²(z) of a normal z (Huber 1981, section 7.7).
    private static double Proposal2(LeastSquaresFit fit, double scale, double k)
    {
        double inside = 1 - (2 * StandardNormal.Cdf(-k));
        double beta = inside + (k * k * (1 - inside)) - (2 * k * StandardNormal.Density(k));
        double sum = 0;
        foreach (double residual in fit.Residuals)
        {
            double clipped = Math.Clamp(residual, -k * scale, k * scale);
            sum += clipped * clipped;
        }
        int degrees = fit.Residuals.Length - fit.Rank;
        return degrees > 0 ? Math.Sqrt(sum / (degrees * beta)) : 0;
    }

    // Huber (1981), equation 6.5: κ² [Σψ²/(n − p)]/mean(ψ')² (XᵀX)⁻¹ s², κ = 1 + (p/n) var(ψ')/mean(ψ')².
    private static ImmutableArray<double> Covariance(LeastSquaresFit plain, ReadOnlySpan<double> residuals, double scale, int degrees, RobustOptions options)
    {
        int n = residuals.Length, p = plain.Coefficients.Length;
        double[] covariance = new double[p * p];
        if (!(scale > 0) || degrees == 0)
            return [.. covariance];
        double squares = 0, mean = 0, spread = 0;
        foreach (double residual in residuals)
        {
            double psi = residual * Weight(options.Loss, residual / scale, options);
            squares += psi * psi;
            mean += Slope(residual / scale, options) / n;
        }
        foreach (double residual in residuals)
        {
            double deviation = Slope(residual / scale, options) - mean;
            spread += deviation * deviation / (n - 1);
        }
        if (!(mean > 0))
            return [.. covariance]; // no row in the middle of the loss: the formula has nothing to say
        double kappa = 1 + (plain.Rank * spread / (n * mean * mean));
        double variance = squares / degrees * (kappa / mean) * (kappa / mean);
        for (int i = 0; i < covariance.Length; i++)
            covariance[i] = variance * plain.InverseCross[i];
        return [.. covariance];
    }
}
