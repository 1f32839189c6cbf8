using System.Runtime.InteropServices;

namespace TrimFit.Core.Statistics;

/// <summary>Covariances of least-squares coefficients that stay right when errors differ in size or hang together within clusters.</summary>
/// <remarks>(XᵀX)⁻¹ S (XᵀX)⁻¹, S the covariance of the scores xᵢeᵢ. A design without full rank gives 0 in the rows and columns of the
/// columns left out, as in <see cref="LeastSquares"/>. For a weighted fit pass √w times the rows of design and residuals.</remarks>
public static class SandwichCovariance
{
    /// <summary>Covariance for independent errors of unequal variance: HC0, or HC1 with the factor n/(n−p). H. White, Econometrica 48 (1980) 817.</summary>
    /// <param name="designColumnMajor">n×p design, column after column.</param>
    /// <param name="residuals">n residuals of the fit.</param>
    /// <param name="columns">p.</param>
    /// <param name="smallSample">Factor for estimated coefficients.</param>
    /// <returns>p×p covariance, row by row.</returns>
    /// <exception cref="ArgumentException">Lengths do not match or a value is not finite.</exception>
    public static double[] HeteroskedasticityConsistent(
        ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> residuals, int columns, SmallSample smallSample = SmallSample.None) =>
        NeweyWest.Covariance(designColumnMajor, residuals, columns, 0, smallSample);

    /// <summary>Covariance for errors that hang together within clusters and not between them: CR1 with the factor, CR0 without.</summary>
    /// <param name="designColumnMajor">n×p design, column after column.</param>
    /// <param name="residuals">n residuals of the fit.</param>
    /// <param name="columns">p.</param>
    /// <param name="clusters">Cluster of each row, any numbers, in any order.</param>
    /// <param name="smallSample">Factor for few clusters and estimated coefficients.</param>
    /// <returns>p×p covariance, row by row. Use t with clusters − 1 degrees of freedom; with one cluster the scores sum to zero and so does this.</returns>
    /// <exception cref="ArgumentException">Lengths do not match or a value is not finite.</exception>
    public static double[] Clustered(
        ReadOnlySpan<double> designColumnMajor,
        ReadOnlySpan<double> residuals,
        int columns,
        ReadOnlySpan<int> clusters,
        SmallSample smallSample = SmallSample.DegreesOfFreedom)
    {
        LeastSquares.CheckShape(designColumnMajor, residuals, columns, []);
        int n = residuals.Length, p = columns;
        if (clusters.Length != n)
            throw new ArgumentException(FormattableString.Invariant($"has {clusters.Length} rows, expected {n}"), nameof(clusters));
        Dictionary<int, int> index = [];
        List<double> sums = [];
        for (int i = 0; i < n; i++)
        {
            if (!index.TryGetValue(clusters[i], out int at))
            {
                at = index.Count;
                index.Add(clusters[i], at);
                for (int j = 0; j < p; j++)
                    sums.Add(0);
            }
            Span<double> sum = CollectionsMarshal.AsSpan(sums).Slice(at * p, p);
            for (int j = 0; j < p; j++)
                sum[j] += designColumnMajor[(j * n) + i] * residuals[i];
        }
        double[] meat = new double[p * p];
        ReadOnlySpan<double> all = CollectionsMarshal.AsSpan(sums);
        for (int c = 0; c < index.Count; c++)
        {
            for (int a = 0; a < p; a++)
            {
                for (int b = 0; b < p; b++)
                    meat[(a * p) + b] += all[(c * p) + a] * all[(c * p) + b];
            }
        }
        HouseholderQr qr = HouseholderQr.Factor(designColumnMajor.ToArray(), n, p, new LeastSquaresOptions().RankTolerance);
        int groups = index.Count;
        double factor = smallSample == SmallSample.DegreesOfFreedom && groups > 1 && n > qr.Rank
            ? groups / (groups - 1.0) * (n - 1.0) / (n - qr.Rank)
            : 1;
        return Sandwich(qr.InverseCross(p), meat, p, factor);
    }

    internal static double[] Sandwich(ReadOnlySpan<double> bread, ReadOnlySpan<double> meat, int p, double factor)
    {
        double[] half = new double[p * p];
        double[] result = new double[p * p];
        SmallMatrix.Multiply(bread, meat, half, p);
        SmallMatrix.Multiply(half, bread, result, p);
        for (int a = 0; a < p; a++)
        {
            for (int b = a; b < p; b++)
            {
                double mean = factor * (result[(a * p) + b] + result[(b * p) + a]) / 2; // symmetric to the last bit
                result[(a * p) + b] = mean;
                result[(b * p) + a] = mean;
            }
        }
        return result;
    }
}
