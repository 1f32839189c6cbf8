namespace TrimFit.Core.Statistics;

/// <summary>A Kalman filter with scalar measurements one at a time and states of which nothing is known at the start.</summary>
/// <remarks>Written to be read and to check faster filters against. Measurements taken together are given one after the other, which is exact when
/// their errors are independent. Diffuse start: S. J. Koopman &amp; J. Durbin, J. Time Ser. Anal. 21 (2000) 281. Matrices are row by row. Steps allocate
/// nothing.</remarks>
public sealed class KalmanFilter
{
    // Share of |z|² times the largest diffuse variance below which what is unknown of a measurement is the rounding of a zero. States should be in
    // units that keep the parts of z within six powers of ten.
    private const double DiffuseTolerance = 1e-13;

    private readonly int _n;
    private readonly double[] _state, _covariance, _diffuse, _gain, _diffuseGain, _moved, _work, _product;
    // Directions of which nothing is known. A measurement that lowers their number lowers it by one, so the end is counted, not guessed from rounding.
    private int _unknown;

    /// <summary>A filter whose states are known to be 0; see <see cref="Start"/>.</summary>
    /// <param name="states">Number of states; at least 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no state.</exception>
    public KalmanFilter(int states)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(states, 1);
        _n = states;
        (_state, _gain, _diffuseGain, _moved) = (new double[states], new double[states], new double[states], new double[states]);
        (_covariance, _diffuse) = (new double[states * states], new double[states * states]);
        (_work, _product) = (new double[states * states], new double[states * states]);
    }

    /// <summary>Number of states.</summary>
    public int States => _n;

    /// <summary>Current estimate.</summary>
    public ReadOnlySpan<double> State => _state;

    /// <summary>Its covariance, row by row; the finite part while the start is still diffuse.</summary>
    public ReadOnlySpan<double> Covariance => _covariance;

    /// <summary>Whether some direction of the state is still unknown.</summary>
    public bool IsDiffuse => _unknown > 0;

    /// <summary>Logarithm of the likelihood of the measurements so far; a measurement used up by a diffuse start counts −½ ln F∞ and no 2π.</summary>
    public double LogLikelihood { get; private set; }

    /// <summary>Measurements counted.</summary>
    public int Measurements { get; private set; }

    /// <summary>Sets the state and what is known of it, and forgets the likelihood.</summary>
    /// <param name="state">Estimate.</param>
    /// <param name="covariance">Covariance, row by row, symmetric and positive semidefinite.</param>
    /// <param name="diffuse">True for each state of which nothing is known; empty for none. Its row and column of the covariance are 0.</param>
    /// <exception cref="ArgumentException">A length does not match.</exception>
    public void Start(ReadOnlySpan<double> state, ReadOnlySpan<double> covariance, ReadOnlySpan<bool> diffuse = default)
    {
        if (state.Length != _n || covariance.Length != _n * _n || (!diffuse.IsEmpty && diffuse.Length != _n))
        {
            throw new ArgumentException(
                FormattableString.Invariant($"has {state.Length} values with a covariance of {covariance.Length}, expected {_n} and {_n * _n}"), nameof(state));
        }
        state.CopyTo(_state);
        covariance.CopyTo(_covariance);
        Array.Clear(_diffuse);
        _unknown = 0;
        for (int i = 0; i < diffuse.Length; i++)
        {
            if (diffuse[i])
            {
                _diffuse[(i * _n) + i] = 1;
                _unknown++;
            }
        }
        LogLikelihood = 0;
        Measurements = 0;
    }

    /// <summary>Carries the state forward: x ← Φx + input, P ← ΦPΦᵀ + Q.</summary>
    /// <param name="transition">Φ, row by row.</param>
    /// <param name="processNoise">Q, row by row.</param>
    /// <param name="input">Added to the state; empty for none.</param>
    /// <exception cref="ArgumentException">A length does not match.</exception>
    public void Predict(ReadOnlySpan<double> transition, ReadOnlySpan<double> processNoise, ReadOnlySpan<double> input = default)
    {
        if (transition.Length != _n * _n || processNoise.Length != _n * _n || (!input.IsEmpty && input.Length != _n))
        {
            throw new ArgumentException(
                FormattableString.Invariant($"has {transition.Length} values beside a process noise of {processNoise.Length}, expected {_n * _n} each"),
                nameof(transition));
        }
        for (int i = 0; i < _n; i++)
        {
            double sum = input.IsEmpty ? 0 : input[i];
            for (int j = 0; j < _n; j++)
                sum += transition[(i * _n) + j] * _state[j];
            _moved[i] = sum;
        }
        _moved.CopyTo(_state, 0);
        Carry(transition, _covariance);
        for (int i = 0; i < _covariance.Length; i++)
            _covariance[i] += processNoise[i];
        if (_unknown > 0)
            Carry(transition, _diffuse);
    }

    /// <summary>Takes in a measurement y = z·x + error.</summary>
    /// <param name="row">z.</param>
    /// <param name="measurement">y; finite. A missing one is simply not given.</param>
    /// <param name="variance">Variance of the error; not negative.</param>
    /// <returns>The innovation. With variance 0 the measurement said nothing that was not certain, and the state was left as it was.</returns>
    /// <exception cref="ArgumentException">The length does not match, the measurement is not finite or the variance negative.</exception>
    public Innovation Update(ReadOnlySpan<double> row, double measurement, double variance)
    {
        if (row.Length != _n)
            throw new ArgumentException(FormattableString.Invariant($"has {row.Length} values, expected {_n}"), nameof(row));
        Guard.NotNegative(variance);
        double innovation = Guard.Finite(measurement);
        for (int i = 0; i < _n; i++)
            innovation -= row[i] * _state[i];
        double f = variance + Project(_covariance, row, _gain);
        if (_unknown > 0)
        {
            double unknown = Project(_diffuse, row, _diffuseGain);
            double length = 0, largest = 0;
            for (int i = 0; i < _n; i++)
            {
                length += row[i] * row[i];
                largest = Math.Max(largest, _diffuse[(i * _n) + i]);
            }
            if (unknown > DiffuseTolerance * length * largest)
                return UpdateDiffuse(innovation, f, unknown);
        }
        Measurements++;
        if (!(f > 0))
            return new Innovation(innovation, 0, false);
        for (int i = 0; i < _n; i++)
            _state[i] += _gain[i] * innovation / f;
        // Joseph's form (I − kz) P (I − kz)ᵀ + k h kᵀ written out for one measurement keeps the covariance symmetric and not negative.
        for (int i = 0; i < _n; i++)
        {
            for (int j = 0; j < _n; j++)
                _work[(i * _n) + j] = (i == j ? 1 : 0) - (_gain[i] / f * row[j]);
        }
        SmallMatrix.Multiply(_work, _covariance, _product, _n);
        SmallMatrix.MultiplyTransposed(_product, _work, _covariance, _n);
        for (int i = 0; i < _n; i++)
        {
            for (int j = 0; j < _n; j++)
                _covariance[(i * _n) + j] += variance * (_gain[i] / f) * (_gain[j] / f);
        }
        Symmetrize(_covariance);
        LogLikelihood -= 0.5 * (Math.Log(2 * Math.PI * f) + (innovation * innovation / f));
        return new Innovation(innovation, f, false);
    }

    // Koopman & Durbin (2000), equations for F∞ > 0.
    private Innovation UpdateDiffuse(double innovation, double f, double unknown)
    {
        for (int i = 0; i < _n; i++)
            _state[i] += _diffuseGain[i] * innovation / unknown;
        for (int i = 0; i < _n; i++)
        {
            for (int j = 0; j < _n; j++)
            {
                double mm = _diffuseGain[i] * _diffuseGain[j] / unknown;
                _covariance[(i * _n) + j] += (mm * f / unknown) - (((_gain[i] * _diffuseGain[j]) + (_diffuseGain[i] * _gain[j])) / unknown);
                _diffuse[(i * _n) + j] -= mm;
            }
        }
        Symmetrize(_covariance);
        Symmetrize(_diffuse);
        _unknown--;
        if (_unknown == 0)
            Array.Clear(_diffuse);
        Measurements++;
        LogLikelihood -= 0.5 * Math.Log(unknown);
        return new Innovation(innovation, 0, true);
    }

    // P zᵀ into gain; returns z P zᵀ.
    private double Project(ReadOnlySpan<double> covariance, ReadOnlySpan<double> row, Span<double> gain)
    {
        double total = 0;
        for (int i = 0; i < _n; i++)
        {
            double sum = 0;
            for (int j = 0; j < _n; j++)
                sum += covariance[(i * _n) + j] * row[j];
            gain[i] = sum;
            total += row[i] * sum;
        }
        return total;
    }

    private void Carry(ReadOnlySpan<double> transition, Span<double> covariance)
    {
        SmallMatrix.Multiply(transition, covariance, _work, _n);
        SmallMatrix.MultiplyTransposed(_work, transition, covariance, _n);
        Symmetrize(covariance);
    }

    private void Symmetrize(Span<double> a)
    {
        for (int i = 0; i < _n; i++)
        {
            for (int j = i + 1; j < _n; j++)
            {
                double mean = 0.5 * (a[(i * _n) + j] + a[(j * _n) + i]);
                a[(i * _n) + j] = mean;
                a[(j * _n) + i] = mean;
            }
        }
    }
}
