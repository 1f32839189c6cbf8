using TrimFit.Core.Statistics;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Tests.Turns.FilterError;

/// <summary>The turn model as a plain Kalman filter whose state holds the coefficients too: slow, general matrices, nothing clever.</summary>
/// <remarks>It stays as the check on the fast filter: same model, another algorithm (coefficients as states instead of columns, Joseph's
/// form instead of scalar updates, Van Loan's exponential instead of series and doubling).</remarks>
internal sealed class ReadableTurnFilter
{
    private readonly FlightColumns _flight;
    private readonly NoiseParameters _noise;
    private readonly int _k, _n;
    private readonly double[] _dynamics = new double[25], _density = new double[25];

    public ReadableTurnFilter(FlightColumns flight, NoiseParameters noise)
    {
        (_flight, _noise, _k) = (flight, noise, flight.Coefficients);
        _n = 5 + _k;
        if (noise.Order == ResponseOrder.First)
        {
            _dynamics[0] = -1 / noise.LagSec;
            _dynamics[2] = 1 / noise.LagSec;
        }
        else
        {
            double square = noise.NaturalFrequency * noise.NaturalFrequency;
            _dynamics[1] = 1;
            _dynamics[5] = -square;
            _dynamics[6] = -2 * noise.Damping * noise.NaturalFrequency;
            _dynamics[7] = square;
        }
        if (noise.Order == ResponseOrder.First)
            _density[0] = Math.Pow(noise.QuickDisturbance / noise.LagSec, 2);
        else
            _density[6] = Math.Pow(noise.QuickDisturbance * noise.NaturalFrequency * noise.NaturalFrequency, 2);
        _dynamics[12] = -1 / noise.DisturbanceTauSec;
        _dynamics[15] = 1;
        _dynamics[24] = -1 / noise.GustTauSec;
        _density[12] = 2 * noise.DisturbanceRms * noise.DisturbanceRms / noise.DisturbanceTauSec;
        _density[24] = flight.HasHeading ? 2 * noise.GustRms * noise.GustRms / noise.GustTauSec : 0;
    }

    public double LogLikelihood { get; private set; }

    public double[] Coefficients { get; private set; } = [];

    /// <summary>Covariance of the coefficients, row by row.</summary>
    public double[] Covariance { get; private set; } = [];

    public void Run()
    {
        var filter = new KalmanFilter(_n);
        double[] start = new double[_n], covariance = new double[_n * _n];
        for (int j = 0; j < _k; j++)
            covariance[((5 + j) * _n) + 5 + j] = _flight.PriorSd[j] * _flight.PriorSd[j];
        filter.Start(start, covariance);
        for (int i = 0; i < _flight.Count; i++)
        {
            (double[] transition, double[] noise, double[] input) = StepTo(i);
            filter.Predict(transition, noise, input);
            foreach ((double[] row, double value, double variance) in MeasurementsAt(i))
                filter.Update(row, value, variance);
        }
        LogLikelihood = filter.LogLikelihood;
        Coefficients = filter.State[5..].ToArray();
        Covariance = new double[_k * _k];
        for (int a = 0; a < _k; a++)
        {
            for (int b = 0; b < _k; b++)
                Covariance[(a * _k) + b] = filter.Covariance[((5 + a) * _n) + 5 + b];
        }
    }

    /// <summary>How the state comes from the row before, or anew at a reset.</summary>
    public (double[] Transition, double[] Noise, double[] Input) StepTo(int i)
    {
        double[] transition = new double[_n * _n], noise = new double[_n * _n], input = new double[_n];
        for (int j = 0; j < _k; j++)
            transition[((5 + j) * _n) + 5 + j] = 1;
        if ((_flight.Flags[i] & FlightColumns.Reset) != 0)
        {
            for (int j = 0; j < _k; j++)
                transition[5 + j] = _flight.InputRows[(i * _flight.Stride) + j + 1];
            input[3] = _flight.StartHeading[i];
            noise[0] = AugmentedFilter.StartRateSd * AugmentedFilter.StartRateSd;
            noise[_n + 1] = _noise.Order == ResponseOrder.Second ? noise[0] : 0;
            noise[(2 * _n) + 2] = _noise.DisturbanceRms * _noise.DisturbanceRms;
            noise[(3 * _n) + 3] = AugmentedFilter.StartHeadingSd * AugmentedFilter.StartHeadingSd;
            noise[(4 * _n) + 4] = _flight.HasHeading ? _noise.GustRms * _noise.GustRms : 0;
            return (transition, noise, input);
        }
        double dt = _flight.Steps[_flight.StepIndex[i - 1]];
        double[] phi = new double[25], q = new double[25];
        new VanLoan(5).Discretize(_dynamics, _density, dt, phi, q);
        // The input joins as a sixth state that stays put.
        double[] wide = new double[36], exponential = new double[36];
        for (int a = 0; a < 5; a++)
        {
            for (int b = 0; b < 5; b++)
                wide[(a * 6) + b] = _dynamics[(a * 5) + b];
        }
        if (_noise.Order == ResponseOrder.First)
            wide[5] = 1 / _noise.LagSec;
        else
            wide[11] = _noise.NaturalFrequency * _noise.NaturalFrequency;
        new MatrixExponential(6).Compute(wide, dt, exponential);
        for (int a = 0; a < 5; a++)
        {
            for (int b = 0; b < 5; b++)
            {
                transition[(a * _n) + b] = phi[(a * 5) + b];
                noise[(a * _n) + b] = q[(a * 5) + b];
            }
            for (int j = 0; j < _k; j++)
                transition[(a * _n) + 5 + j] = exponential[(a * 6) + 5] * _flight.InputRows[((i - 1) * _flight.Stride) + j + 1];
            // The brake's surprise corrects rate, disturbance and heading before the step.
            (ColumnKind Kind, int State)[] corrected = [(ColumnKind.RateSurprise, 0), (ColumnKind.DisturbanceSurprise, 2), (ColumnKind.HeadingSurprise, 3)];
            foreach ((ColumnKind kind, int state) in corrected)
            {
                if (_flight.IndexOf(kind) is int at and >= 0 && _flight.Surprise.Length > 0)
                    transition[(a * _n) + 5 + at] += phi[(a * 5) + state] * _flight.Surprise[i - 1];
            }
        }
        return (transition, noise, input);
    }

    public List<(double[] Row, double Value, double Variance)> MeasurementsAt(int i)
    {
        var list = new List<(double[], double, double)>();
        Take(FlightColumns.Gyro, _flight.GyroRows, _noise.GyroNoise, 0, -1);
        Take(FlightColumns.Heading, _flight.HeadingRows, _noise.HeadingNoise, 3, 4);
        Take(FlightColumns.Compass, _flight.CompassRows, _noise.CompassNoise, 3, -1);
        return list;

        void Take(byte flag, double[] rows, double sd, int first, int second)
        {
            if ((_flight.Flags[i] & flag) == 0)
                return;
            double[] row = new double[_n];
            row[first] = 1;
            if (second >= 0)
                row[second] = 1;
            for (int j = 0; j < _k; j++)
                row[5 + j] = -rows[(i * _flight.Stride) + j + 1];
            list.Add((row, rows[i * _flight.Stride], sd * sd));
        }
    }

    /// <summary>Log-density of all measurements at once, from their full covariance matrix: no recursion over measurements at all.</summary>
    public double DenseLogLikelihood()
    {
        var build = MathNet.Numerics.LinearAlgebra.Matrix<double>.Build;
        var states = new List<MathNet.Numerics.LinearAlgebra.Matrix<double>>();      // covariance of the state at each row
        var transitions = new List<MathNet.Numerics.LinearAlgebra.Matrix<double>>();
        var means = new List<MathNet.Numerics.LinearAlgebra.Vector<double>>();
        var covariance = build.Dense(_n, _n);
        for (int j = 0; j < _k; j++)
            covariance[5 + j, 5 + j] = _flight.PriorSd[j] * _flight.PriorSd[j];
        var mean = MathNet.Numerics.LinearAlgebra.Vector<double>.Build.Dense(_n);
        var all = new List<(int At, MathNet.Numerics.LinearAlgebra.Vector<double> Row, double Value, double Variance)>();
        for (int i = 0; i < _flight.Count; i++)
        {
            (double[] t, double[] q, double[] input) = StepTo(i);
            var transition = build.Dense(_n, _n, (a, b) => t[(a * _n) + b]);
            covariance = (transition * covariance * transition.Transpose()) + build.Dense(_n, _n, (a, b) => q[(a * _n) + b]);
            mean = (transition * mean) + MathNet.Numerics.LinearAlgebra.Vector<double>.Build.Dense(input);
            states.Add(covariance);
            transitions.Add(transition);
            means.Add(mean);
            foreach ((double[] row, double value, double variance) in MeasurementsAt(i))
                all.Add((i, MathNet.Numerics.LinearAlgebra.Vector<double>.Build.Dense(row), value, variance));
        }
        int m = all.Count;
        var matrix = build.Dense(m, m);
        var residual = MathNet.Numerics.LinearAlgebra.Vector<double>.Build.Dense(m);
        for (int a = 0; a < m; a++)
        {
            residual[a] = all[a].Value - (all[a].Row * means[all[a].At]);
            var carried = states[all[a].At] * all[a].Row; // Cov(state now, measurement a), carried forward
            int at = all[a].At;
            for (int b = a; b < m; b++)
            {
                while (at < all[b].At)
                    carried = transitions[++at] * carried;
                matrix[a, b] = matrix[b, a] = all[b].Row * carried;
            }
            matrix[a, a] += all[a].Variance;
        }
        var factor = matrix.Cholesky();
        return -0.5 * ((residual * factor.Solve(residual)) + factor.DeterminantLn + (m * Math.Log(Math.Tau)));
    }
}
