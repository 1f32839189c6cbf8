namespace TrimFit.Core.Statistics;

/// <summary>Kernels for small dense matrices held row by row in spans; no allocation.</summary>
internal static class SmallMatrix
{
    /// <summary>Replaces the lower triangle of a symmetric positive definite matrix by its Cholesky factor.</summary>
    /// <returns>False when the matrix is not positive definite; its content is then undefined.</returns>
    public static bool Cholesky(Span<double> a, int n)
    {
        for (int j = 0; j < n; j++)
        {
            double diagonal = a[(j * n) + j];
            for (int k = 0; k < j; k++)
                diagonal -= a[(j * n) + k] * a[(j * n) + k];
            if (!(diagonal > 0))
                return false;
            diagonal = Math.Sqrt(diagonal);
            a[(j * n) + j] = diagonal;
            for (int i = j + 1; i < n; i++)
            {
                double value = a[(i * n) + j];
                for (int k = 0; k < j; k++)
                    value -= a[(i * n) + k] * a[(j * n) + k];
                a[(i * n) + j] = value / diagonal;
            }
        }
        return true;
    }

    /// <summary>Solves L Lᵀ x = b in place, L from <see cref="Cholesky"/>.</summary>
    public static void SolveCholesky(ReadOnlySpan<double> l, Span<double> b, int n)
    {
        for (int i = 0; i < n; i++)
        {
            double value = b[i];
            for (int k = 0; k < i; k++)
                value -= l[(i * n) + k] * b[k];
            b[i] = value / l[(i * n) + i];
        }
        for (int i = n - 1; i >= 0; i--)
        {
            double value = b[i];
            for (int k = i + 1; k < n; k++)
                value -= l[(k * n) + i] * b[k];
            b[i] = value / l[(i * n) + i];
        }
    }

    /// <summary>Cholesky factor of a semidefinite matrix: a direction without variance gets a column of zeros.</summary>
    public static void CholeskySemidefinite(Span<double> a, int n)
    {
        for (int j = 0; j < n; j++)
        {
            double diagonal = a[(j * n) + j];
            double full = Math.Abs(diagonal);
            for (int k = 0; k < j; k++)
                diagonal -= a[(j * n) + k] * a[(j * n) + k];
            bool empty = !(diagonal > 1e-14 * full); // what rounding leaves of a variance that is a combination of earlier ones
            diagonal = empty ? 0 : Math.Sqrt(diagonal);
            a[(j * n) + j] = diagonal;
            for (int i = j + 1; i < n; i++)
            {
                double value = a[(i * n) + j];
                for (int k = 0; k < j; k++)
                    value -= a[(i * n) + k] * a[(j * n) + k];
                a[(i * n) + j] = empty ? 0 : value / diagonal;
            }
        }
    }

    /// <summary>Solves L Lᵀ x = b in place for a factor from <see cref="CholeskySemidefinite"/>; directions without variance get 0.</summary>
    public static void SolveCholeskySemidefinite(ReadOnlySpan<double> l, Span<double> b, int n)
    {
        for (int i = 0; i < n; i++)
        {
            double value = b[i];
            for (int k = 0; k < i; k++)
                value -= l[(i * n) + k] * b[k];
            b[i] = l[(i * n) + i] == 0 ? 0 : value / l[(i * n) + i];
        }
        for (int i = n - 1; i >= 0; i--)
        {
            double value = b[i];
            for (int k = i + 1; k < n; k++)
                value -= l[(k * n) + i] * b[k];
            b[i] = l[(i * n) + i] == 0 ? 0 : value / l[(i * n) + i];
        }
    }

    /// <summary>Solves A x = b for a symmetric positive definite A, which is overwritten; x replaces b.</summary>
    /// <returns>False when A is not positive definite.</returns>
    public static bool SolvePositive(Span<double> a, Span<double> b, int n)
    {
        if (!Cholesky(a, n))
            return false;
        SolveCholesky(a, b, n);
        return true;
    }

    /// <summary>Inverse of a symmetric positive definite matrix.</summary>
    /// <returns>False when it is not positive definite.</returns>
    public static bool InvertPositive(ReadOnlySpan<double> a, Span<double> inverse, int n)
    {
        double[] factor = a[..(n * n)].ToArray();
        if (!Cholesky(factor, n))
            return false;
        double[] column = new double[n];
        for (int j = 0; j < n; j++)
        {
            Array.Clear(column);
            column[j] = 1;
            SolveCholesky(factor, column, n);
            for (int i = 0; i < n; i++)
                inverse[(i * n) + j] = column[i];
        }
        return true;
    }

    /// <summary>Solves A X = B for square A and B by elimination with row exchange; A is overwritten, X replaces B.</summary>
    /// <returns>False when A is singular.</returns>
    public static bool Solve(Span<double> a, Span<double> b, int n)
    {
        for (int k = 0; k < n; k++)
        {
            int pivot = k;
            for (int i = k + 1; i < n; i++)
            {
                if (Math.Abs(a[(i * n) + k]) > Math.Abs(a[(pivot * n) + k]))
                    pivot = i;
            }
            if (a[(pivot * n) + k] == 0)
                return false;
            for (int j = 0; j < n && pivot != k; j++)
            {
                (a[(k * n) + j], a[(pivot * n) + j]) = (a[(pivot * n) + j], a[(k * n) + j]);
                (b[(k * n) + j], b[(pivot * n) + j]) = (b[(pivot * n) + j], b[(k * n) + j]);
            }
            for (int i = k + 1; i < n; i++)
            {
                double factor = a[(i * n) + k] / a[(k * n) + k];
                if (factor == 0)
                    continue;
                for (int j = k; j < n; j++)
                    a[(i * n) + j] -= factor * a[(k * n) + j];
                for (int j = 0; j < n; j++)
                    b[(i * n) + j] -= factor * b[(k * n) + j];
            }
        }
        for (int i = n - 1; i >= 0; i--)
        {
            for (int j = 0; j < n; j++)
            {
                double value = b[(i * n) + j];
                for (int k = i + 1; k < n; k++)
                    value -= a[(i * n) + k] * b[(k * n) + j];
                b[(i * n) + j] = value / a[(i * n) + i];
            }
        }
        return true;
    }

    /// <summary>C = A B, all n×n; C may not overlap A or B.</summary>
    public static void Multiply(ReadOnlySpan<double> a, ReadOnlySpan<double> b, Span<double> c, int n)
    {
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                double sum = 0;
                for (int k = 0; k < n; k++)
                    sum += a[(i * n) + k] * b[(k * n) + j];
                c[(i * n) + j] = sum;
            }
        }
    }

    /// <summary>C = A Bᵀ, all n×n; C may not overlap A or B.</summary>
    public static void MultiplyTransposed(ReadOnlySpan<double> a, ReadOnlySpan<double> b, Span<double> c, int n)
    {
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                double sum = 0;
                for (int k = 0; k < n; k++)
                    sum += a[(i * n) + k] * b[(j * n) + k];
                c[(i * n) + j] = sum;
            }
        }
    }
}
