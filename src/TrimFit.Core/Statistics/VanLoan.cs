namespace TrimFit.Core.Statistics;

/// <summary>Exact discrete form of dx/dt = A x + noise of spectral density Q over a step, without allocation per call.</summary>
/// <remarks>C. F. Van Loan, IEEE Trans. Autom. Control 23 (1978) 395: the exponential of [[−A, Q], [0, Aᵀ]] t holds Φ and Φ⁻¹ Q_d. One instance per thread.
/// Steps many times longer than the fastest time constant lose digits in Q_d (e^(−A t) grows while Φ decays), so such a step is taken in halves.</remarks>
public sealed class VanLoan
{
    // Above this norm of A t the step is halved: e^(‖At‖) then costs fewer than two of the sixteen digits.
    private const double LargestNorm = 2;

    private readonly int _n;
    private readonly MatrixExponential _exponential;
    private readonly double[] _block, _result, _product, _moved;

    /// <summary>Workspace for n states.</summary>
    /// <param name="states">n; at least 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no state.</exception>
    public VanLoan(int states)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(states, 1);
        _n = states;
        _exponential = new MatrixExponential(2 * states);
        (_block, _result) = (new double[4 * states * states], new double[4 * states * states]);
        (_product, _moved) = (new double[states * states], new double[states * states]);
    }

    /// <summary>Writes the transition matrix and the covariance of the noise over a step.</summary>
    /// <param name="dynamics">A, row by row, 1/s.</param>
    /// <param name="spectralDensity">Q, row by row, symmetric, positive semidefinite: unit² per s.</param>
    /// <param name="step">Length of the step, s; not negative.</param>
    /// <param name="transition">Receives Φ = e^(A t).</param>
    /// <param name="processNoise">Receives Q_d = ∫ e^(A s) Q e^(Aᵀ s) ds over the step, symmetric.</param>
    /// <exception cref="ArgumentException">A length does not match or a value is not finite.</exception>
    public void Discretize(ReadOnlySpan<double> dynamics, ReadOnlySpan<double> spectralDensity, double step, Span<double> transition, Span<double> processNoise)
    {
        int n = _n, length = n * n;
        if (dynamics.Length != length || spectralDensity.Length != length || transition.Length != length || processNoise.Length != length)
            throw new ArgumentException(FormattableString.Invariant($"has {dynamics.Length} values, expected {length} like all matrices here"), nameof(dynamics));
        Guard.NotNegative(step);
        double norm = 0;
        for (int j = 0; j < n; j++)
        {
            double sum = 0;
            for (int i = 0; i < n; i++)
                sum += Math.Abs(dynamics[(i * n) + j]);
            norm = Math.Max(norm, sum * step);
        }
        int halvings = norm > LargestNorm ? Math.ILogB(norm / LargestNorm) + 1 : 0;
        double part = Math.ScaleB(step, -halvings);
        int wide = 2 * n;
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                _block[(i * wide) + j] = -dynamics[(i * n) + j];
                _block[(i * wide) + n + j] = spectralDensity[(i * n) + j];
                _block[((n + i) * wide) + n + j] = dynamics[(j * n) + i];
            }
        }
        _exponential.Compute(_block, part, _result);
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                transition[(i * n) + j] = _result[((n + j) * wide) + n + i];
                _product[(i * n) + j] = _result[(i * wide) + n + j];
            }
        }
        SmallMatrix.Multiply(transition, _product, processNoise, n);
        for (int k = 0; k < halvings; k++)
        {
            // Two steps in a row: Q ← Q + Φ Q Φᵀ, Φ ← Φ Φ.
            SmallMatrix.Multiply(transition, processNoise, _product, n);
            SmallMatrix.MultiplyTransposed(_product, transition, _moved, n);
            for (int i = 0; i < length; i++)
                processNoise[i] += _moved[i];
            SmallMatrix.Multiply(transition, transition, _product, n);
            _product.AsSpan().CopyTo(transition);
        }
        for (int i = 0; i < n; i++)
        {
            for (int j = i + 1; j < n; j++)
            {
                double mean = 0.5 * (processNoise[(i * n) + j] + processNoise[(j * n) + i]);
                processNoise[(i * n) + j] = mean;
                processNoise[(j * n) + i] = mean;
            }
        }
    }
}
