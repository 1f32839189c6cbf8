using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;
using TrimFit.Core.Units;

namespace TrimFit.Core.Turns;

/// <summary>Turns the three axes of a gyro, mounted in any attitude, into the rate of the heading.</summary>
/// <remarks>
/// <para>The heading rate is the part of the rotation along gravity, and gravity is the mean of the accelerometer over ten seconds to either
/// side, never across a sudden change of attitude (the frame pitching with the power, or the sensor slipping). Bias of the three axes comes from
/// standing still, or from the heading in flight; only its change with attitude is taken out here, its mean stays in the result and is reported.</para>
/// <para>Error: in a coordinated turn the accelerometer feels the frame's own down, not the Earth's, so the rate along it is the heading rate
/// times cos(bank), 0.2 % less at 3 deg/s and 0.8 % at 6 deg/s at 11 m/s; <see cref="TakeBankOut"/> puts that right when the airspeed is known.
/// A mean over ten seconds of vibration (3 m/s² at 10 Hz) leaves the axis within 2 deg, which is 0.06 % of the rate. While the bank changes, a
/// frame pitched by p adds sin(p) times the bank rate, that is sin(p) V/g times the change of turn rate: at 10 deg and 11 m/s this looks
/// like a delay of 0.2 s, and it is moved like one.</para>
/// </remarks>
internal static class GyroLevelling
{
    private const double BinSec = 1;
    private const int MeanBins = 10, CompareBins = 8, FewestCompareBins = 4;

    /// <summary>A lasting change of gravity's direction by this much within seconds ends a mean.</summary>
    private static readonly double _changeRad = double.DegreesToRadians(12);

    /// <summary>Such a change is put down to the frame pitching with the power when the power changed then and the angle is no more than this.</summary>
    private static readonly double _powerPitchRad = double.DegreesToRadians(35);

    /// <summary>A change in flight by this much while the power stayed is a slip; less is a new seat, trimmer or accelerator.</summary>
    private static readonly double _slipRad = double.DegreesToRadians(20);

    /// <summary>Without a reading of the power, a change of this much is a slip.</summary>
    private static readonly double _slipWithoutPowerRad = double.DegreesToRadians(35);

    /// <summary>A sensor whose attitude wanders by this much about its own mean is loose.</summary>
    private static readonly double _looseRad = double.DegreesToRadians(25);

    /// <summary>Bias of one axis of a small gyro when nothing is known, sd, rad/s: data sheets give 1 to 5 deg/s at most.</summary>
    private static readonly double _biasPriorRadPerSec = double.DegreesToRadians(2);

    private const double PowerChange = 0.08, PowerChangeWithinSec = 4, AroundSlipSec = 2;
    private const double FewestGravityShare = 0.5;
    private const int MostSlips = 5;

    /// <summary>What levelling made of the three axes.</summary>
    /// <param name="YawRate">Rate along gravity, rad/s, right positive; NaN where missing or left out; empty when the gyro is set aside.</param>
    /// <param name="Bias">Bias that the rate still holds; null when unknown.</param>
    /// <param name="Sign">−1 when the heading showed that the accelerometer counts the other way; else 1.</param>
    public sealed record Result(double[] YawRate, Estimate? Bias, int Sign);

    /// <summary>Levels by gravity; null when the accelerometer does not hold gravity.</summary>
    /// <param name="time">Clock, s.</param>
    /// <param name="gyro">Three axes, rad/s.</param>
    /// <param name="acceleration">The same axes of the accelerometer, any unit.</param>
    /// <param name="power">Fraction of full thrust, held; empty or NaN where unknown.</param>
    /// <param name="heading">Unwrapped heading, rad; empty when there is none.</param>
    /// <param name="inFlight">Where the machine flies.</param>
    /// <param name="still">Bias of the three axes from standing still; null when there was none.</param>
    /// <param name="findings">Receives what people should know.</param>
    public static Result? ByGravity(
        double[] time, double[][] gyro, double[][] acceleration, double[] power, double[] heading, bool[] inFlight, Standstill? still, List<Finding> findings)
    {
        Gravity? gravity = Gravity.Of(time, acceleration);
        if (gravity is null)
            return null;
        (List<int> cuts, List<(int Bin, double Angle)> slips) = gravity.Changes(time, power, inFlight);
        double wander = gravity.Wander(cuts, time, inFlight);
        if (slips.Count > MostSlips || wander > _looseRad)
        {
            findings.Add(Finding.Of(FindingCode.GyroLoose, slips.Count, wander));
            return new([], null, 1);
        }
        double[][] down = gravity.Down(cuts, time);
        if (still is not null)
            gyro = [.. gyro.Select((axis, c) => axis.Select(w => w - still.Bias[c].Value).ToArray())];
        double[] rate = Along(down, gyro);
        foreach ((int bin, _) in slips)
        {
            double at = gravity.TimeOf(bin);
            for (int i = 0; i < time.Length; i++)
            {
                if (Math.Abs(time[i] - at) <= AroundSlipSec + BinSec)
                    rate[i] = double.NaN;
            }
        }

        double[] sd = [.. Enumerable.Range(0, 3).Select(c => still?.Bias[c].StandardError ?? _biasPriorRadPerSec)];
        double[] bias = new double[3], biasError = [.. sd];
        int sign = 1;
        bool biasKnown = still is not null;
        if (heading.Length > 0 && new HeadingRegression(time, [rate], heading, inFlight).Fit(true, true) is HeadingMatch first
            && Math.Abs(first.Coefficients[0]) > 5 * first[0].StandardError)
        {
            sign = Math.Sign(first.Coefficients[0]);
            if (sign < 0)
            {
                down = [.. down.Select(axis => axis.Select(d => -d).ToArray())];
                rate = [.. rate.Select(r => -r)];
            }
            double[][] columns = [rate, .. down.Select((axis, c) => axis.Select((d, i) => double.IsFinite(rate[i]) ? -d : double.NaN).ToArray())];
            double scale = Math.Abs(first.Coefficients[0]);
            HeadingMatch? match = new HeadingRegression(time, columns, heading, inFlight)
                .Fit(false, false, first.DelaySec?.Value ?? 0, [double.PositiveInfinity, sd[0] * scale, sd[1] * scale, sd[2] * scale]);
            if (match is not null && match.Coefficients[0] > 0)
            {
                for (int c = 0; c < 3; c++)
                {
                    bias[c] = match.Coefficients[c + 1] / match.Coefficients[0];
                    biasError[c] = Math.Min(sd[c], match[c + 1].StandardError / match.Coefficients[0]);
                }
                biasKnown = true;
            }
        }

        foreach ((int bin, double angle) in slips)
            findings.Add(Finding.Of(FindingCode.GyroSlipped, gravity.TimeOf(bin), angle, biasKnown ? 1 : 0));
        if (!biasKnown && slips.Count > 0)
            KeepLongest(time, rate, inFlight, [.. slips.Select(s => gravity.TimeOf(s.Bin))]);

        // Only what the bias changes by with attitude is taken out; its mean over the flight stays, as in any other gyro.
        var mean = new double[3];
        int count = 0;
        for (int i = 0; i < time.Length; i++)
        {
            if (!inFlight[i] || !double.IsFinite(rate[i]))
                continue;
            count++;
            for (int c = 0; c < 3; c++)
                mean[c] += down[c][i];
        }
        double kept = 0, variance = 0;
        for (int c = 0; c < 3; c++)
        {
            mean[c] /= Math.Max(1, count);
            kept += mean[c] * ((still?.Bias[c].Value ?? 0) + bias[c]);
            variance += mean[c] * mean[c] * biasError[c] * biasError[c];
        }
        for (int i = 0; i < time.Length; i++)
        {
            double off = 0;
            for (int c = 0; c < 3; c++)
                off += down[c][i] * bias[c];
            rate[i] += kept - off; // NaN stays NaN
        }
        findings.Add(Finding.Of(FindingCode.GyroLevelled, Math.Acos(Math.Clamp(Math.Abs(mean[2]) / Math.Max(1e-9, Norm(mean)), 0, 1))));
        if (still is not null)
            findings.Add(Finding.Of(FindingCode.GyroBiasFromStandstill, kept, Math.Sqrt(variance), still.Seconds));
        return new(rate, biasKnown ? new Estimate(kept, Math.Sqrt(variance)) : null, sign);
    }

    /// <summary>Makes the rate about the banked frame's own axis that of the heading: r = p/cos(bank), and tan(bank) = V r/g makes sin(bank) = V p/g.</summary>
    /// <param name="rate">Rate p with its bias, rad/s; changed in place.</param>
    /// <param name="smoothed">The same, smoothed, for the bank.</param>
    /// <param name="bias">Bias within, rad/s.</param>
    /// <param name="airspeed">Airspeed V, m/s.</param>
    public static void TakeBankOut(double[] rate, double[] smoothed, double bias, double airspeed)
    {
        const double SteepestSine = 0.8; // beyond, the turn is no longer the coordinated one of the formula
        for (int i = 0; i < rate.Length; i++)
        {
            double sine = Math.Min(SteepestSine, Math.Abs(airspeed * (smoothed[i] - bias) / PhysicalConstants.StandardGravity));
            if (double.IsFinite(sine))
                rate[i] = bias + ((rate[i] - bias) / Math.Sqrt(1 - (sine * sine)));
        }
    }

    /// <summary>Finds the axis along which the rotation is the heading's, by regression on the heading; null when it is not clear.</summary>
    /// <remarks>The rate comes out in the heading's own scale. When the axes of the first and second half of the flight differ by more than 20 deg
    /// and three standard errors, the sensor moved and the gyro is set aside.</remarks>
    public static Result? ByHeading(double[] time, double[][] gyro, double[] heading, bool[] inFlight, List<Finding> findings)
    {
        if (heading.Length == 0 || Axis(gyro, inFlight) is not HeadingMatch match)
            return null;
        double size = Norm(match.Coefficients);
        double error = Enumerable.Range(0, 3).Max(c => match[c].StandardError);
        if (!(size > 8 * error))
            return null;
        int[] flying = [.. Enumerable.Range(0, time.Length).Where(i => inFlight[i])];
        int middle = flying[flying.Length / 2];
        HeadingMatch? early = Axis(gyro, [.. inFlight.Select((f, i) => f && i < middle)]), late = Axis(gyro, [.. inFlight.Select((f, i) => f && i >= middle)]);
        if (early is not null && late is not null)
        {
            double cosine = Dot(early.Coefficients, late.Coefficients) / (Norm(early.Coefficients) * Norm(late.Coefficients));
            double angle = Math.Acos(Math.Clamp(cosine, -1, 1));
            double spread = Math.Sqrt(Square(early) + Square(late));
            if (angle > Math.Max(double.DegreesToRadians(20), 3 * spread)) // false for NaN
            {
                findings.Add(Finding.Of(FindingCode.GyroLoose, 1, angle));
                return new([], null, 1);
            }
        }
        findings.Add(Finding.Of(FindingCode.GyroAxisFromGps, error / size));
        double[] rate = Along([.. match.Coefficients.Select(c => Enumerable.Repeat(c, time.Length).ToArray())], gyro);
        return new(rate, new Estimate(-match.Intercept.Value, match.Intercept.StandardError), 1);

        HeadingMatch? Axis(double[][] axes, bool[] use) => new HeadingRegression(time, axes, heading, use).Fit(true, true);

        static double Square(HeadingMatch m)
        {
            double worst = Enumerable.Range(0, 3).Max(c => m[c].StandardError) / Norm(m.Coefficients);
            return worst * worst;
        }
    }

    /// <summary>The axis that words such as <c>x forward, y right, z down</c> say is the vertical one, and +1 when it points down; z down without words.</summary>
    public static (int Axis, int Sign) VerticalAxis(string? words)
    {
        foreach (string part in (words ?? "").Split(',', StringSplitOptions.TrimEntries))
        {
            int axis = part.Length > 0 ? "xyz".IndexOf(part[0], StringComparison.Ordinal) : -1;
            if (axis >= 0 && part.EndsWith(" down", StringComparison.Ordinal))
                return (axis, 1);
            if (axis >= 0 && part.EndsWith(" up", StringComparison.Ordinal))
                return (axis, -1);
        }
        return (2, 1);
    }

    private static void KeepLongest(double[] time, double[] rate, bool[] inFlight, double[] slips)
    {
        double[] edges = [double.NegativeInfinity, .. slips.Order(), double.PositiveInfinity];
        int[] counts = new int[edges.Length - 1];
        int Part(double t) => Array.FindLastIndex(edges, e => t > e);
        for (int i = 0; i < time.Length; i++)
        {
            if (inFlight[i] && double.IsFinite(rate[i]))
                counts[Part(time[i])]++;
        }
        int best = Array.IndexOf(counts, counts.Max());
        for (int i = 0; i < time.Length; i++)
        {
            if (Part(time[i]) != best)
                rate[i] = double.NaN;
        }
    }

    private static double[] Along(double[][] direction, double[][] gyro)
    {
        var rate = new double[gyro[0].Length];
        for (int i = 0; i < rate.Length; i++)
            rate[i] = (direction[0][i] * gyro[0][i]) + (direction[1][i] * gyro[1][i]) + (direction[2][i] * gyro[2][i]);
        return rate;
    }

    private static double Dot(double[] a, double[] b) => (a[0] * b[0]) + (a[1] * b[1]) + (a[2] * b[2]);

    private static double Norm(double[] v) => Math.Sqrt(Dot(v, v));

    /// <summary>Means of the accelerometer over seconds.</summary>
    private sealed class Gravity
    {
        private readonly double _start;
        private readonly double[][] _mean; // one vector for each second, empty where there is none

        private Gravity(double start, double[][] mean) => (_start, _mean) = (start, mean);

        public double TimeOf(int bin) => _start + (bin * BinSec);

        public static Gravity? Of(double[] time, double[][] acceleration)
        {
            int bins = 1 + (int)((time[^1] - time[0]) / BinSec);
            var sum = new double[bins][];
            var count = new int[bins];
            double squares = 0;
            int samples = 0;
            for (int i = 0; i < time.Length; i++)
            {
                double x = acceleration[0][i], y = acceleration[1][i], z = acceleration[2][i];
                double square = (x * x) + (y * y) + (z * z);
                if (!double.IsFinite(square))
                    continue;
                int bin = (int)((time[i] - time[0]) / BinSec);
                double[] s = sum[bin] ??= new double[3];
                (s[0], s[1], s[2]) = (s[0] + x, s[1] + y, s[2] + z);
                count[bin]++;
                squares += square;
                samples++;
            }
            if (samples < 10)
                return null;
            // Linear acceleration has no lasting direction: means over ten seconds nearly vanish beside the samples.
            double lasting = 0;
            int weight = 0;
            for (int b = 0; b < bins; b += MeanBins)
            {
                var s = new double[3];
                int n = 0;
                for (int k = b; k < Math.Min(bins, b + MeanBins); k++)
                {
                    if (count[k] == 0)
                        continue;
                    n += count[k];
                    for (int c = 0; c < 3; c++)
                        s[c] += sum[k][c];
                }
                lasting += n > 0 ? Norm(s) : 0;
                weight += n;
            }
            if (lasting / weight < FewestGravityShare * Math.Sqrt(squares / samples))
                return null;
            for (int b = 0; b < bins; b++)
            {
                if (count[b] == 0)
                    sum[b] = [];
                for (int c = 0; c < sum[b].Length; c++)
                    sum[b][c] /= count[b];
            }
            return new(time[0], sum);
        }

        /// <summary>Where gravity's direction changes for good: all such places, and those in flight that the power does not explain.</summary>
        public (List<int> Cuts, List<(int Bin, double Angle)> Slips) Changes(double[] time, double[] power, bool[] inFlight)
        {
            int bins = _mean.Length;
            var angle = new double[bins];
            for (int k = 1; k < bins; k++)
            {
                double[]? before = MeanOf(k - CompareBins, k, FewestCompareBins), after = MeanOf(k, k + CompareBins, FewestCompareBins);
                angle[k] = before is null || after is null ? 0 : Angle(before, after);
            }
            var cuts = new List<int>();
            var slips = new List<(int, double)>();
            var order = Enumerable.Range(0, bins).Where(k => angle[k] > _changeRad).OrderByDescending(k => angle[k]).ThenBy(k => k);
            var taken = new bool[bins];
            foreach (int k in order)
            {
                if (taken[k])
                    continue;
                for (int j = Math.Max(0, k - CompareBins); j < Math.Min(bins, k + CompareBins + 1); j++)
                    taken[j] = true;
                cuts.Add(k);
                (bool flying, double? change) = Around(time, power, inFlight, TimeOf(k));
                double allowed = change is not double c ? _slipWithoutPowerRad : c > PowerChange ? _powerPitchRad : _slipRad;
                if (flying && angle[k] > allowed)
                    slips.Add((k, angle[k]));
            }
            cuts.Sort();
            slips.Sort();
            return (cuts, slips);
        }

        /// <summary>Typical angle in flight between the mean of a second and the mean around it, rad.</summary>
        public double Wander(List<int> cuts, double[] time, bool[] inFlight)
        {
            double[][] around = Smooth(cuts);
            var flying = new bool[_mean.Length];
            for (int i = 0; i < time.Length; i++)
                flying[(int)((time[i] - _start) / BinSec)] |= inFlight[i];
            double[] angles = [.. Enumerable.Range(0, _mean.Length)
                .Where(k => flying[k] && _mean[k].Length > 0 && around[k].Length > 0).Select(k => Angle(_mean[k], around[k]))];
            return angles.Length > 0 ? Median.InPlace(angles) : 0;
        }

        /// <summary>Unit vector down in the sensor's axes at each time: what rests feels a push up.</summary>
        public double[][] Down(List<int> cuts, double[] time)
        {
            double[][] around = Smooth(cuts);
            double[][] down = [Missing(), Missing(), Missing()];
            for (int i = 0; i < time.Length; i++)
            {
                double[] g = around[(int)((time[i] - _start) / BinSec)];
                if (g.Length == 0)
                    continue;
                double norm = Norm(g);
                for (int c = 0; c < 3; c++)
                    down[c][i] = -g[c] / norm;
            }
            return down;

            double[] Missing()
            {
                var column = new double[time.Length];
                Array.Fill(column, double.NaN);
                return column;
            }
        }

        private double[][] Smooth(List<int> cuts)
        {
            var smooth = new double[_mean.Length][];
            int next = 0, from = 0;
            for (int k = 0; k < smooth.Length; k++)
            {
                while (next < cuts.Count && cuts[next] <= k)
                    from = cuts[next++];
                int to = next < cuts.Count ? cuts[next] : smooth.Length;
                smooth[k] = MeanOf(Math.Max(from, k - MeanBins), Math.Min(to, k + MeanBins + 1), 1) ?? [];
            }
            return smooth;
        }

        private double[]? MeanOf(int from, int to, int fewest)
        {
            var mean = new double[3];
            int n = 0;
            for (int k = Math.Max(0, from); k < Math.Min(_mean.Length, to); k++)
            {
                if (_mean[k].Length == 0)
                    continue;
                n++;
                for (int c = 0; c < 3; c++)
                    mean[c] += _mean[k][c];
            }
            return n >= fewest && Norm(mean) > 0 ? mean : null;
        }

        private static (bool Flying, double? PowerChange) Around(double[] time, double[] power, bool[] inFlight, double at)
        {
            bool flying = false;
            double low = double.NaN, high = double.NaN;
            int from = Array.BinarySearch(time, at - PowerChangeWithinSec);
            for (int i = from < 0 ? ~from : from; i < time.Length && time[i] <= at + PowerChangeWithinSec; i++)
            {
                flying |= inFlight[i];
                if (i >= power.Length || !double.IsFinite(power[i]))
                    continue;
                low = double.IsNaN(low) ? power[i] : Math.Min(low, power[i]);
                high = double.IsNaN(high) ? power[i] : Math.Max(high, power[i]);
            }
            return (flying, double.IsNaN(low) ? null : high - low);
        }

        private static double Angle(double[] a, double[] b) => Math.Acos(Math.Clamp(Dot(a, b) / (Norm(a) * Norm(b)), -1, 1));
    }
}
