namespace TrimFit.Core.Statistics;

/// <summary>Rauch, Tung and Striebel's smoother: what is known of each state after all measurements. AIAA Journal 3 (1965) 1445.</summary>
/// <remarks>Fed by a <see cref="KalmanFilter"/>, forwards: at each time <see cref="Predicted"/> after its prediction, then <see cref="Filtered"/> after its
/// measurements. The first time has no prediction. The first filtered state must no longer be diffuse.</remarks>
public sealed class RtsSmoother
{
    private readonly int _n;
    private readonly List<double[]> _transitions = [], _predicted = [], _predictedCovariance = [], _states = [], _covariances = [];

    /// <summary>A smoother for states of one size.</summary>
    /// <param name="states">Number of states; at least 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no state.</exception>
    public RtsSmoother(int states)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(states, 1);
        _n = states;
    }

    /// <summary>Times recorded.</summary>
    public int Count => _states.Count;

    /// <summary>Notes the prediction for the next time.</summary>
    /// <param name="filter">The filter after its prediction.</param>
    /// <param name="transition">The Φ it was carried with, row by row.</param>
    /// <exception cref="InvalidOperationException">The filtered state before it was not recorded.</exception>
    public void Predicted(KalmanFilter filter, ReadOnlySpan<double> transition)
    {
        if (_transitions.Count != Count - 1)
            throw new InvalidOperationException("Record the filtered state of each time before the prediction for the next.");
        _transitions.Add(transition.ToArray());
        _predicted.Add(filter.State.ToArray());
        _predictedCovariance.Add(filter.Covariance.ToArray());
    }

    /// <summary>Notes the state after the measurements of a time, which may be none.</summary>
    /// <param name="filter">The filter after its measurements.</param>
    /// <exception cref="InvalidOperationException">The prediction for this time was not recorded, or the state is still diffuse.</exception>
    public void Filtered(KalmanFilter filter)
    {
        if (_transitions.Count != Count)
            throw new InvalidOperationException("Record the prediction for a time before its filtered state.");
        if (filter.IsDiffuse)
            throw new InvalidOperationException("A state of which nothing is known cannot be smoothed: start recording after the measurements that settle it.");
        _states.Add(filter.State.ToArray());
        _covariances.Add(filter.Covariance.ToArray());
    }

    /// <summary>Runs backwards over what was recorded and replaces filtered by smoothed states.</summary>
    public void Smooth()
    {
        int n = _n;
        double[] factor = new double[n * n], product = new double[n * n], gain = new double[n * n], difference = new double[n * n];
        double[] column = new double[n];
        for (int t = Count - 2; t >= 0; t--)
        {
            // Gain G = P Φᵀ P⁻¹(t+1|t), found row by row from P(t+1|t) Gᵀ = Φ P.
            SmallMatrix.Multiply(_transitions[t], _covariances[t], product, n);
            _predictedCovariance[t].CopyTo(factor, 0);
            SmallMatrix.CholeskySemidefinite(factor, n);
            for (int i = 0; i < n; i++)
            {
                for (int k = 0; k < n; k++)
                    column[k] = product[(k * n) + i];
                SmallMatrix.SolveCholeskySemidefinite(factor, column, n);
                column.CopyTo(gain, i * n);
            }
            for (int i = 0; i < n; i++)
            {
                double sum = 0;
                for (int k = 0; k < n; k++)
                    sum += gain[(i * n) + k] * (_states[t + 1][k] - _predicted[t][k]);
                _states[t][i] += sum;
            }
            for (int i = 0; i < n * n; i++)
                difference[i] = _covariances[t + 1][i] - _predictedCovariance[t][i];
            SmallMatrix.Multiply(gain, difference, product, n);
            SmallMatrix.MultiplyTransposed(product, gain, difference, n);
            for (int i = 0; i < n * n; i++)
                _covariances[t][i] += difference[i];
        }
    }

    /// <summary>State of a time: smoothed after <see cref="Smooth"/>, filtered before.</summary>
    public ReadOnlySpan<double> State(int time) => _states[time];

    /// <summary>Its covariance, row by row.</summary>
    public ReadOnlySpan<double> Covariance(int time) => _covariances[time];
}
