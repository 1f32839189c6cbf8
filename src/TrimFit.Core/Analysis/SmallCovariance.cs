namespace TrimFit.Core.Analysis;

/// <summary>Inverse of a covariance of a few rows.</summary>
internal static class SmallCovariance
{
    /// <summary>The inverse by Gauss-Jordan elimination on the scaled matrix; null when it is singular to rounding.</summary>
    /// <param name="matrix">n × n, symmetric, row by row.</param>
    /// <param name="n">Rows.</param>
    public static double[]? TryInvert(ReadOnlySpan<double> matrix, int n)
    {
        double[] scale = new double[n], a = new double[n * n], inverse = new double[n * n];
        for (int i = 0; i < n; i++)
        {
            double variance = matrix[(i * n) + i];
            if (!(variance > 0))
                return null;
            scale[i] = 1 / Math.Sqrt(variance);
            inverse[(i * n) + i] = 1;
        }
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
                a[(i * n) + j] = matrix[(i * n) + j] * scale[i] * scale[j];
        }
        for (int p = 0; p < n; p++) // positive definite: no pivoting needed
        {
            double pivot = a[(p * n) + p];
            if (!(pivot > 1e-12))
                return null;
            for (int j = 0; j < n; j++)
            {
                a[(p * n) + j] /= pivot;
                inverse[(p * n) + j] /= pivot;
            }
            for (int i = 0; i < n; i++)
            {
                double factor = a[(i * n) + p];
                if (i == p || factor == 0)
                    continue;
                for (int j = 0; j < n; j++)
                {
                    a[(i * n) + j] -= factor * a[(p * n) + j];
                    inverse[(i * n) + j] -= factor * inverse[(p * n) + j];
                }
            }
        }
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
                inverse[(i * n) + j] *= scale[i] * scale[j];
        }
        return inverse;
    }
}
