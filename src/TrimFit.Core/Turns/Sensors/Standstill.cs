using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>A span before launch in which the machine stands still: what a rate sensor reads then is its bias.</summary>
/// <param name="Bias">Mean and standard error for each axis, rad/s.</param>
/// <param name="Seconds">Length of the span.</param>
internal sealed record Standstill(Estimate[] Bias, double Seconds)
{
    private const double BinSec = 1, ShortestSec = 8, StandingSpeed = 1.0;

    /// <summary>Without a GPS the span must be long, in height level, with the engine off or idle: only then is it no calm glide.</summary>
    private const double ShortestBlindSec = 15, LevelM = 1.0, IdleFraction = 0.15;

    private static readonly double _steadyRadPerSec = double.DegreesToRadians(1.0);

    /// <summary>Drift of a small gyro between standing and flying (temperature), rad/s: common practice, no source.</summary>
    private static readonly double _driftRadPerSec = double.DegreesToRadians(0.05);

    /// <summary>Finds the longest such span before the first flight; null when there is none.</summary>
    /// <param name="time">Clock, s.</param>
    /// <param name="axes">Rates, rad/s, NaN where missing.</param>
    /// <param name="speed">Ground speed, m/s, NaN where there is no fix; empty without a GPS.</param>
    /// <param name="power">Fraction of full thrust, held; NaN or empty where unknown.</param>
    /// <param name="altitude">Altitude, m; empty when not logged.</param>
    /// <param name="flight">The flight; null when no GPS shows it.</param>
    public static Standstill? Of(double[] time, double[][] axes, double[] speed, double[] power, double[] altitude, FlightSpan? flight)
    {
        if (time.Length < 2)
            return null;
        bool tracked = speed.Length > 0;
        double until = tracked ? flight?.FirstFlyingSec ?? time[^1] : time[^1];
        int bins = (int)((until - time[0]) / BinSec);
        if (bins < ShortestSec || (!tracked && (altitude.Length == 0 || !power.Any(double.IsFinite))))
            return null;
        int m = axes.Length;
        var mean = new double[bins * m];
        var count = new int[bins];
        var still = new bool[bins];
        var height = new double[bins];
        Array.Fill(still, true);
        Array.Fill(height, double.NaN);
        double lastSpeed = double.NaN, lastHeight = double.NaN;
        for (int i = 0; i < time.Length; i++)
        {
            int bin = (int)((time[i] - time[0]) / BinSec);
            if (bin >= bins)
                break;
            if (tracked && double.IsFinite(speed[i]))
                lastSpeed = speed[i];
            if (i < altitude.Length && double.IsFinite(altitude[i]))
                lastHeight = altitude[i];
            height[bin] = lastHeight;
            double p = i < power.Length ? power[i] : double.NaN;
            still[bin] &= !(p > IdleFraction) && (tracked ? lastSpeed < StandingSpeed : p <= IdleFraction);
            if (!Array.TrueForAll(axes, a => double.IsFinite(a[i])))
                continue;
            count[bin]++;
            for (int c = 0; c < m; c++)
                mean[(bin * m) + c] += axes[c][i];
        }
        for (int b = 0; b < bins; b++)
        {
            still[b] &= count[b] > 0;
            for (int c = 0; c < m; c++)
                mean[(b * m) + c] /= Math.Max(1, count[b]);
        }
        (int From, int To) best = (0, 0);
        for (int from = 0; from < bins; from++)
        {
            if (!still[from])
                continue;
            int to = from;
            while (to < bins && still[to] && Steady(from, to))
                to++;
            if (to - from > best.To - best.From)
                best = (from, to);
            if (to == bins)
                break;
        }
        int n = best.To - best.From;
        if (n < (tracked ? ShortestSec : ShortestBlindSec))
            return null;
        var bias = new Estimate[m];
        for (int c = 0; c < m; c++)
        {
            double[] values = [.. Enumerable.Range(best.From, n).Select(b => mean[(b * m) + c])];
            double error = SampleMoments.StandardDeviation(values) / Math.Sqrt(n);
            bias[c] = new(SampleMoments.Mean(values), Math.Sqrt((error * error) + (_driftRadPerSec * _driftRadPerSec)));
        }
        return new(bias, n * BinSec);

        bool Steady(int from, int to)
        {
            for (int c = 0; c < m; c++)
            {
                if (!(Math.Abs(mean[(to * m) + c] - mean[(from * m) + c]) < 3 * _steadyRadPerSec))
                    return false;
            }
            return tracked || Math.Abs(height[to] - height[from]) < LevelM;
        }
    }
}
