using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace TrimFit.Core.Turns.FilterError;

/// <summary>Kalman filter of the turn model run at once on the measurements and on every column of the linear part.</summary>
/// <remarks>de Jong (1991), "The diffuse Kalman filter", Annals of Statistics 19:1073, doi 10.1214/aos/1176348139: with gains that do not
/// depend on the data, filtering each column gives innovations e₀ + Eβ, so the coefficients β follow by generalised least squares with
/// their priors, exactly, and the likelihood with β integrated out (proper normal priors) comes with them. A measurement at a time, which
/// needs no matrix inverse. The instance owns its work space, so a search allocates nothing per evaluation.</remarks>
internal sealed class AugmentedFilter
{
    /// <summary>Standard deviation of the turn rate where nothing is known of it (start, after a pause), rad/s.</summary>
    public const double StartRateSd = 0.2;

    /// <summary>Standard deviation of the heading there, rad; it is measured to 0.1 rad at once, so 10 rad is as good as unknown.</summary>
    public const double StartHeadingSd = 10;

    private readonly FlightColumns _flight;
    private readonly int _stride;
    private readonly int _k;
    private readonly double[] _state;
    private readonly double[] _normal;   // (k+1) rows of stride: the sums of e e'/F
    private readonly double[] _rows;     // innovations over sqrt(F), one row for each measurement
    private readonly double[] _variance; // F
    private readonly double[] _standardised;
    private readonly double[] _precision;
    private readonly double[] _factor;
    private readonly double[] _right;
    private readonly TurnDynamics[] _steps;

    public AugmentedFilter(FlightColumns flight)
    {
        _flight = flight;
        _stride = flight.Stride;
        _k = flight.Coefficients;
        _state = new double[5 * _stride];
        _normal = new double[(_k + 1) * _stride];
        _rows = new double[flight.Measurements * _stride];
        _variance = new double[flight.Measurements];
        _standardised = new double[flight.Measurements];
        _precision = new double[_k];
        _factor = new double[_k * _k];
        _right = new double[_k];
        _steps = new TurnDynamics[flight.Steps.Length];
        ExtraVariance = new double[flight.Measurements];
        Coefficients = new double[_k];
        for (int j = 0; j < _k; j++)
            SetPriorSd(j, flight.PriorSd[j]);
    }

    /// <summary>Variance added to the noise of single measurements that were found to be outliers; in the order of measurements.</summary>
    public double[] ExtraVariance { get; }

    /// <summary>β of the last run.</summary>
    public double[] Coefficients { get; }

    /// <summary>Variances of the innovations of the last run.</summary>
    public ReadOnlySpan<double> Variances => _variance;

    /// <summary>Innovations at β over their standard deviations.</summary>
    public ReadOnlySpan<double> Standardised => _standardised;

    /// <summary>Row of standardised columns of one measurement: data first, then the derivative by each β.</summary>
    public ReadOnlySpan<double> Row(int measurement) => _rows.AsSpan(measurement * _stride, _k + 1);

    public double PriorPrecision(int j) => _precision[j];

    public void SetPriorSd(int j, double sd) => _precision[j] = 1 / (sd * sd);

    /// <summary>Runs the filter and returns minus the log-likelihood, β integrated out; +∞ when the parameters make no sense.</summary>
    public double Run(NoiseParameters noise) => Run(noise, null);

    /// <summary>Runs the filter; with a limit, raises the noise of outlying measurements on the way, at the given coefficients.</summary>
    /// <remarks>Chang (2014), "Robust Kalman filtering based on Mahalanobis distance as outlier judging criterion", Journal of Geodesy
    /// 88:391, doi 10.1007/s00190-013-0690-8: the noise of a measurement is raised until its squared distance meets the criterion. A sensor's
    /// gross error is short. Where a sensor goes on to the same side, the machine really turns (a thermal), and the third measurement in a row is
    /// believed: a filter that goes on mistrusting what it sees loses its way for good.</remarks>
    public double RunRobust(NoiseParameters noise, double limit)
    {
        double[] beta = [.. Coefficients];
        Array.Clear(ExtraVariance);
        return Run(noise, new Judge(beta, limit));
    }

    /// <summary>Judge of outliers, with how many each sensor has had in a row to one side (signed).</summary>
    private sealed record Judge(double[] Beta, double Limit)
    {
        public int GyroRun, HeadingRun, CompassRun;

        /// <summary>Whether an outlier to a side may still be a gross error of the sensor.</summary>
        public static bool IsShort(ref int run, double innovation)
        {
            int side = Math.Sign(innovation);
            run = Math.Sign(run) == side ? run + side : side;
            return Math.Abs(run) <= LongestError;
        }
    }

    private const int LongestError = 2; // rows, 0.4 s


    private double Run(NoiseParameters noise, Judge? judge)
    {
        FlightColumns f = _flight;
        for (int i = 0; i < _steps.Length; i++)
            _steps[i] = TurnDynamics.Over(f.Steps[i], noise);
        Array.Clear(_normal);

        ref double state = ref MemoryMarshal.GetArrayDataReference(_state);
        int stride = _stride;
        ref double r = ref state;
        ref double p = ref Unsafe.Add(ref state, stride);
        ref double w = ref Unsafe.Add(ref state, 2 * stride);
        ref double s = ref Unsafe.Add(ref state, 3 * stride);
        ref double g = ref Unsafe.Add(ref state, 4 * stride);
        double p00 = 0, p01 = 0, p02 = 0, p03 = 0, p04 = 0, p11 = 0, p12 = 0, p13 = 0, p14 = 0, p22 = 0, p23 = 0, p24 = 0, p33 = 0, p34 = 0, p44 = 0;
        double gyroNoise = noise.GyroNoise * noise.GyroNoise;
        double headingNoise = noise.HeadingNoise * noise.HeadingNoise;
        double compassNoise = noise.CompassNoise * noise.CompassNoise;
        bool gusts = f.HasHeading;
        int surprises = f.Surprise.Length > 0 ? f.IndexOf(ColumnKind.RateSurprise) + 1 : 0;
        int m = 0;
        for (int i = 0; i < f.Count; i++)
        {
            byte flags = f.Flags[i];
            if ((flags & FlightColumns.Reset) != 0)
            {
                Array.Clear(_state);
                Array.Copy(f.InputRows, i * stride, _state, 0, stride); // the turn that belongs to the inputs
                _state[3 * stride] = f.StartHeading[i];
                p01 = p02 = p03 = p04 = p12 = p13 = p14 = p23 = p24 = p34 = 0;
                p00 = StartRateSd * StartRateSd;
                p11 = noise.Order == ResponseOrder.Second ? StartRateSd * StartRateSd : 0;
                p22 = noise.DisturbanceRms * noise.DisturbanceRms;
                p33 = StartHeadingSd * StartHeadingSd;
                p44 = gusts ? noise.GustRms * noise.GustRms : 0;
            }
            else
            {
                ref readonly TurnDynamics d = ref _steps[f.StepIndex[i - 1]];
                if (surprises > 0 && f.Surprise[i - 1] is double surprise && surprise != 0)
                {
                    Unsafe.Add(ref r, surprises) += surprise;
                    Unsafe.Add(ref w, surprises + 1) += surprise;
                    Unsafe.Add(ref s, surprises + 2) += surprise;
                }
                Propagate(in d, ref r, ref p, ref w, ref s, ref g, ref f.InputRows[(i - 1) * stride], stride);

                double m00 = (d.Rr * p00) + (d.Rp * p01) + (d.Rw * p02), m01 = (d.Rr * p01) + (d.Rp * p11) + (d.Rw * p12);
                double m02 = (d.Rr * p02) + (d.Rp * p12) + (d.Rw * p22), m03 = (d.Rr * p03) + (d.Rp * p13) + (d.Rw * p23);
                double m04 = (d.Rr * p04) + (d.Rp * p14) + (d.Rw * p24);
                double m10 = (d.Pr * p00) + (d.Pp * p01) + (d.Pw * p02), m11 = (d.Pr * p01) + (d.Pp * p11) + (d.Pw * p12);
                double m12 = (d.Pr * p02) + (d.Pp * p12) + (d.Pw * p22), m13 = (d.Pr * p03) + (d.Pp * p13) + (d.Pw * p23);
                double m14 = (d.Pr * p04) + (d.Pp * p14) + (d.Pw * p24);
                double m20 = d.Ww * p02, m21 = d.Ww * p12, m22 = d.Ww * p22, m23 = d.Ww * p23, m24 = d.Ww * p24;
                double m30 = p03 + (d.Sr * p00) + (d.Sp * p01) + (d.Sw * p02), m31 = p13 + (d.Sr * p01) + (d.Sp * p11) + (d.Sw * p12);
                double m32 = p23 + (d.Sr * p02) + (d.Sp * p12) + (d.Sw * p22), m33 = p33 + (d.Sr * p03) + (d.Sp * p13) + (d.Sw * p23);
                double m34 = p34 + (d.Sr * p04) + (d.Sp * p14) + (d.Sw * p24);
                p00 = (m00 * d.Rr) + (m01 * d.Rp) + (m02 * d.Rw) + d.Q00;
                p01 = (m00 * d.Pr) + (m01 * d.Pp) + (m02 * d.Pw) + d.Q01;
                p02 = (m02 * d.Ww) + d.Q02;
                p03 = m03 + (m00 * d.Sr) + (m01 * d.Sp) + (m02 * d.Sw) + d.Q03;
                p11 = (m10 * d.Pr) + (m11 * d.Pp) + (m12 * d.Pw) + d.Q11;
                p12 = (m12 * d.Ww) + d.Q12;
                p13 = m13 + (m10 * d.Sr) + (m11 * d.Sp) + (m12 * d.Sw) + d.Q13;
                p22 = (m22 * d.Ww) + d.Q22;
                p23 = m23 + (m20 * d.Sr) + (m21 * d.Sp) + (m22 * d.Sw) + d.Q23;
                p33 = m33 + (m30 * d.Sr) + (m31 * d.Sp) + (m32 * d.Sw) + d.Q33;
                p04 = m04 * d.Gg;
                p14 = m14 * d.Gg;
                p24 = m24 * d.Gg;
                p34 = m34 * d.Gg;
                p44 = gusts ? (d.Gg * p44 * d.Gg) + d.Q44 : 0;
            }
            if ((flags & FlightColumns.Gyro) != 0)
            {
                double plain = p00 + gyroNoise;
                double noiseHere = gyroNoise + Extra(m, FlightColumns.Gyro, plain, ref f.GyroRows[i * stride], ref r, ref r, 0);
                double variance = p00 + noiseHere;
                double c = 1 / variance;
                double k0 = p00 * c, k1 = p01 * c, k2 = p02 * c, k3 = p03 * c, k4 = p04 * c;
                Update(m++, variance, k0, k1, k2, k3, k4, ref f.GyroRows[i * stride], ref r, ref r, 0);
                double h0 = p00, h1 = p01, h2 = p02, h3 = p03, h4 = p04;
                Reduce(h0, h1, h2, h3, h4, k0, k1, k2, k3, k4);
            }
            if ((flags & FlightColumns.Heading) != 0)
            {
                double h0 = p03 + p04, h1 = p13 + p14, h2 = p23 + p24, h3 = p33 + p34, h4 = p34 + p44;
                double plain = h3 + h4 + headingNoise;
                double variance = plain + Extra(m, FlightColumns.Heading, plain, ref f.HeadingRows[i * stride], ref s, ref g, 1);
                double c = 1 / variance;
                double k0 = h0 * c, k1 = h1 * c, k2 = h2 * c, k3 = h3 * c, k4 = h4 * c;
                Update(m++, variance, k0, k1, k2, k3, k4, ref f.HeadingRows[i * stride], ref s, ref g, 1);
                Reduce(h0, h1, h2, h3, h4, k0, k1, k2, k3, k4);
            }
            if ((flags & FlightColumns.Compass) != 0)
            {
                double h0 = p03, h1 = p13, h2 = p23, h3 = p33, h4 = p34;
                double plain = h3 + compassNoise;
                double variance = plain + Extra(m, FlightColumns.Compass, plain, ref f.CompassRows[i * stride], ref s, ref s, 0);
                double c = 1 / variance;
                double k0 = h0 * c, k1 = h1 * c, k2 = h2 * c, k3 = h3 * c, k4 = h4 * c;
                Update(m++, variance, k0, k1, k2, k3, k4, ref f.CompassRows[i * stride], ref s, ref s, 0);
                Reduce(h0, h1, h2, h3, h4, k0, k1, k2, k3, k4);
            }
        }
        return Solve();

        void Reduce(double h0, double h1, double h2, double h3, double h4, double k0, double k1, double k2, double k3, double k4)
        {
            p00 -= h0 * k0;
            p01 -= h0 * k1;
            p02 -= h0 * k2;
            p03 -= h0 * k3;
            p04 -= h0 * k4;
            p11 -= h1 * k1;
            p12 -= h1 * k2;
            p13 -= h1 * k3;
            p14 -= h1 * k4;
            p22 -= h2 * k2;
            p23 -= h2 * k3;
            p24 -= h2 * k4;
            p33 -= h3 * k3;
            p34 -= h3 * k4;
            p44 -= h4 * k4;
        }

        double Extra(int at, byte flag, double plain, ref double row, ref double first, ref double second, double both)
        {
            if (judge is null)
                return ExtraVariance[at];
            double innovation = row - first - (both * second);
            for (int j = 1; j <= judge.Beta.Length; j++)
                innovation += (Unsafe.Add(ref row, j) - Unsafe.Add(ref first, j) - (both * Unsafe.Add(ref second, j))) * judge.Beta[j - 1];
            double limit = judge.Limit * judge.Limit * plain;
            ref int run = ref flag == FlightColumns.Gyro ? ref judge.GyroRun : ref flag == FlightColumns.Heading ? ref judge.HeadingRun : ref judge.CompassRun;
            double extra = 0;
            if (innovation * innovation <= limit)
                run = 0;
            else if (Judge.IsShort(ref run, innovation))
                extra = plain * ((innovation * innovation / limit) - 1);
            ExtraVariance[at] = extra;
            return extra;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Propagate(in TurnDynamics d, ref double r, ref double p, ref double w, ref double s, ref double g, ref double input, int stride)
    {
        for (nuint j = 0; j < (nuint)stride; j += 4)
        {
            Vector256<double> vr = Vector256.LoadUnsafe(ref r, j), vp = Vector256.LoadUnsafe(ref p, j), vw = Vector256.LoadUnsafe(ref w, j);
            Vector256<double> x = Vector256.LoadUnsafe(ref input, j);
            Vector256<double> vs = Vector256.LoadUnsafe(ref s, j) + (vr * d.Sr) + (vp * d.Sp) + (vw * d.Sw) + (x * d.Gs);
            Vector256<double> nr = (vr * d.Rr) + (vp * d.Rp) + (vw * d.Rw) + (x * d.Gr);
            Vector256<double> np = (vr * d.Pr) + (vp * d.Pp) + (vw * d.Pw) + (x * d.Gp);
            nr.StoreUnsafe(ref r, j);
            np.StoreUnsafe(ref p, j);
            (vw * d.Ww).StoreUnsafe(ref w, j);
            vs.StoreUnsafe(ref s, j);
            (Vector256.LoadUnsafe(ref g, j) * d.Gg).StoreUnsafe(ref g, j);
        }
    }

    private void Update(int m, double variance, double k0, double k1, double k2, double k3, double k4, ref double row, ref double first, ref double second, double both)
    {
        int stride = _stride;
        _variance[m] = variance;
        double root = 1 / Math.Sqrt(variance);
        ref double state = ref MemoryMarshal.GetArrayDataReference(_state);
        ref double stored = ref _rows[m * stride];
        for (nuint j = 0; j < (nuint)stride; j += 4)
        {
            Vector256<double> e = Vector256.LoadUnsafe(ref row, j) - Vector256.LoadUnsafe(ref first, j) - (Vector256.LoadUnsafe(ref second, j) * both);
            (e * root).StoreUnsafe(ref stored, j);
            Add(ref state, j, e * k0);
            Add(ref state, j + (nuint)stride, e * k1);
            Add(ref state, j + (nuint)(2 * stride), e * k2);
            Add(ref state, j + (nuint)(3 * stride), e * k3);
            Add(ref state, j + (nuint)(4 * stride), e * k4);
        }
        ref double normal = ref MemoryMarshal.GetArrayDataReference(_normal);
        for (int a = 0; a <= _k; a++)
        {
            Vector256<double> factor = Vector256.Create(Unsafe.Add(ref stored, a));
            nuint at = (nuint)(a * stride);
            for (nuint j = (nuint)(a & ~3); j < (nuint)stride; j += 4) // upper triangle, in whole vectors
                Add(ref normal, at + j, Vector256.LoadUnsafe(ref stored, j) * factor);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Add(ref double target, nuint at, Vector256<double> value) =>
        (Vector256.LoadUnsafe(ref target, at) + value).StoreUnsafe(ref target, at);

    /// <summary>Generalised least squares for β, and minus the log-likelihood.</summary>
    private double Solve()
    {
        int k = _k, stride = _stride;
        for (int a = 0; a < k; a++)
        {
            _right[a] = -_normal[a + 1]; // row 0 holds the products with the data
            for (int b = a; b < k; b++)
            {
                double value = _normal[((a + 1) * stride) + b + 1];
                _factor[(a * k) + b] = _factor[(b * k) + a] = value;
            }
            _factor[(a * k) + a] += _precision[a];
        }
        if (!SmallCholesky.Factor(_factor, k))
            return double.PositiveInfinity;
        _right.CopyTo(Coefficients, 0);
        SmallCholesky.Solve(_factor, k, Coefficients);
        double sum = _normal[0], logs = 0;
        for (int a = 0; a < k; a++)
        {
            sum -= _right[a] * Coefficients[a];
            logs += (2 * Math.Log(_factor[(a * k) + a])) - Math.Log(_precision[a]);
        }
        int measurements = _flight.Measurements;
        double product = 1; // a logarithm for every eight variances; they lie between 1e-9 and 1e4, so the product stays far from the limits
        for (int i = 0; i < measurements; i++)
        {
            product *= _variance[i];
            if ((i & 7) == 7)
            {
                logs += Math.Log(product);
                product = 1;
            }
            ref double row = ref _rows[i * stride];
            double z = row;
            for (int j = 0; j < k; j++)
                z += Unsafe.Add(ref row, j + 1) * Coefficients[j];
            _standardised[i] = z;
        }
        logs += Math.Log(product);
        double value2 = (sum + logs + (measurements * Math.Log(Math.Tau))) / 2;
        return double.IsFinite(value2) ? value2 : double.PositiveInfinity;
    }

    /// <summary>Covariance of β given the noise parameters, row by row: the inverse of information and prior of the last run.</summary>
    public double[] ConditionalCovariance() => SmallCholesky.Inverse(_factor, _k);

    /// <summary>Information of the measurements on β, without priors, of the last run.</summary>
    public double[] Information()
    {
        double[] information = new double[_k * _k];
        for (int a = 0; a < _k; a++)
        {
            for (int b = a; b < _k; b++)
                information[(a * _k) + b] = information[(b * _k) + a] = _normal[((a + 1) * _stride) + b + 1];
        }
        return information;
    }
}
