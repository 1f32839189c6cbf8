namespace TrimFit.Core.Statistics;

/// <summary>The exponential of small matrices of one size, without allocation per call.</summary>
/// <remarks>Scaling and squaring with the [13/13] Padé approximant: N. J. Higham, SIAM J. Matrix Anal. Appl. 26 (2005) 1179. One instance per thread.</remarks>
public sealed class MatrixExponential
{
    // Largest norm for which the approximant alone is good to double precision (Higham 2005, Table 2.3).
    private const double LargestNorm = 5.371920351148152;

    // Coefficients of the [13/13] approximant, exact integers (Higham 2005, Algorithm 2.3).
    private static readonly double[] _b =
    [
        64764752532480000, 32382376266240000, 7771770303897600, 1187353796428800, 129060195264000, 10559470521600, 670442572800,
        33522128640, 1323241920, 40840800, 960960, 16380, 182, 1,
    ];

    private readonly int _n;
    private readonly double[] _scaled, _a2, _a4, _a6, _u, _v, _work;

    /// <summary>Workspace for n×n matrices.</summary>
    /// <param name="size">n; at least 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The size is below 1.</exception>
    public MatrixExponential(int size)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(size, 1);
        _n = size;
        int length = size * size;
        (_scaled, _a2, _a4, _a6) = (new double[length], new double[length], new double[length], new double[length]);
        (_u, _v, _work) = (new double[length], new double[length], new double[length]);
    }

    /// <summary>Writes e^(A t).</summary>
    /// <param name="matrix">A, row by row; finite.</param>
    /// <param name="time">t; finite.</param>
    /// <param name="result">Receives the exponential, row by row.</param>
    /// <exception cref="ArgumentException">A length does not match or a value is not finite.</exception>
    public void Compute(ReadOnlySpan<double> matrix, double time, Span<double> result)
    {
        int n = _n, length = n * n;
        if (matrix.Length != length || result.Length != length)
        {
            throw new ArgumentException(
                FormattableString.Invariant($"has {matrix.Length} values for a result of {result.Length}, expected {length} each"), nameof(matrix));
        }
        Guard.Finite(time);
        double norm = 0; // largest column sum
        for (int j = 0; j < n; j++)
        {
            double sum = 0;
            for (int i = 0; i < n; i++)
                sum += Math.Abs(matrix[(i * n) + j] * time);
            if (!double.IsFinite(sum))
                throw new ArgumentException(FormattableString.Invariant($"column {j} adds up to {sum}: must be finite"), nameof(matrix));
            norm = Math.Max(norm, sum);
        }
        int squarings = norm > LargestNorm ? Math.Max(0, Math.ILogB(norm / LargestNorm) + 1) : 0;
        double factor = Math.ScaleB(time, -squarings);
        for (int i = 0; i < length; i++)
            _scaled[i] = matrix[i] * factor;
        SmallMatrix.Multiply(_scaled, _scaled, _a2, n);
        SmallMatrix.Multiply(_a2, _a2, _a4, n);
        SmallMatrix.Multiply(_a4, _a2, _a6, n);
        // U = A (A⁶ (b13 A⁶ + b11 A⁴ + b9 A²) + b7 A⁶ + b5 A⁴ + b3 A² + b1 I), V likewise with even coefficients.
        for (int i = 0; i < length; i++)
            _work[i] = (_b[13] * _a6[i]) + (_b[11] * _a4[i]) + (_b[9] * _a2[i]);
        SmallMatrix.Multiply(_a6, _work, _v, n);
        for (int i = 0; i < length; i++)
            _v[i] += (_b[7] * _a6[i]) + (_b[5] * _a4[i]) + (_b[3] * _a2[i]) + (i % (n + 1) == 0 ? _b[1] : 0);
        SmallMatrix.Multiply(_scaled, _v, _u, n);
        for (int i = 0; i < length; i++)
            _work[i] = (_b[12] * _a6[i]) + (_b[10] * _a4[i]) + (_b[8] * _a2[i]);
        SmallMatrix.Multiply(_a6, _work, _v, n);
        for (int i = 0; i < length; i++)
            _v[i] += (_b[6] * _a6[i]) + (_b[4] * _a4[i]) + (_b[2] * _a2[i]) + (i % (n + 1) == 0 ? _b[0] : 0);
        for (int i = 0; i < length; i++)
        {
            _work[i] = _v[i] - _u[i];
            result[i] = _v[i] + _u[i];
        }
        SmallMatrix.Solve(_work, result, n); // never singular at this norm (Higham 2005, section 2)
        for (int k = 0; k < squarings; k++)
        {
            SmallMatrix.Multiply(result, result, _work, n);
            _work.AsSpan().CopyTo(result);
        }
    }
}
