namespace TrimFit.Core.Turns.FilterError;

/// <summary>Cholesky factors of the few-by-few matrices of the search, in place and without allocation.</summary>
internal static class SmallCholesky
{
    /// <summary>Replaces a symmetric matrix (row by row) by its lower factor; false when it is not positive definite.</summary>
    public static bool Factor(Span<double> a, int n)
    {
        for (int j = 0; j < n; j++)
        {
            double sum = a[(j * n) + j];
            for (int k = 0; k < j; k++)
                sum -= a[(j * n) + k] * a[(j * n) + k];
            if (!(sum > 0) || double.IsInfinity(sum))
                return false;
            double root = Math.Sqrt(sum);
            a[(j * n) + j] = root;
            for (int i = j + 1; i < n; i++)
            {
                double dot = a[(i * n) + j];
                for (int k = 0; k < j; k++)
                    dot -= a[(i * n) + k] * a[(j * n) + k];
                a[(i * n) + j] = dot / root;
                a[(j * n) + i] = 0;
            }
        }
        return true;
    }

    /// <summary>Solves L L' x = b in place.</summary>
    public static void Solve(ReadOnlySpan<double> factor, int n, Span<double> b)
    {
        for (int i = 0; i < n; i++)
        {
            double sum = b[i];
            for (int k = 0; k < i; k++)
                sum -= factor[(i * n) + k] * b[k];
            b[i] = sum / factor[(i * n) + i];
        }
        for (int i = n - 1; i >= 0; i--)
        {
            double sum = b[i];
            for (int k = i + 1; k < n; k++)
                sum -= factor[(k * n) + i] * b[k];
            b[i] = sum / factor[(i * n) + i];
        }
    }

    /// <summary>The inverse of L L', row by row.</summary>
    public static double[] Inverse(ReadOnlySpan<double> factor, int n)
    {
        double[] inverse = new double[n * n];
        Span<double> column = n <= 64 ? stackalloc double[n] : new double[n];
        for (int j = 0; j < n; j++)
        {
            column.Clear();
            column[j] = 1;
            Solve(factor, n, column);
            for (int i = 0; i < n; i++)
                inverse[(i * n) + j] = column[i];
        }
        return inverse;
    }
}
