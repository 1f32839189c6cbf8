using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>Checks of brakes, throttle and clock against the rest of the log.</summary>
internal static class ControlChecks
{
    /// <summary>A clear turn: faster than this, and with the brakes apart by more than their upper quarter.</summary>
    private static readonly double _clearTurnRadPerSec = double.DegreesToRadians(6);

    private const double FewestTurnSec = 10, AgainstShare = 0.8;
    private const double RateSpanSec = 2;
    private const int FewestPairs = 30;
    private const double SmallestRankCorrelation = 0.5;
    private const double UnevenStep = 0.5, UnevenShare = 0.2;
    private const int FewestSteps = 100;

    /// <summary>Brakes against the turn in clear, intended turns; nothing is said when there are too few.</summary>
    /// <remarks>Only large brakes and strong turns count: while a course is held the brake answers the turn, and its sign says nothing.</remarks>
    public static Finding? Brakes(double[] time, double[] brakes, double[] turnRate, bool[] inFlight)
    {
        double[] sizes = [.. brakes.Where((b, i) => inFlight[i] && double.IsFinite(b)).Select(Math.Abs)];
        if (sizes.Length < FewestPairs)
            return null;
        double large = Math.Max(0.5 * QuantileType7.Of(sizes, 0.99), 1e-9);
        double with = 0, against = 0;
        double heldSince = double.NaN;
        int side = 0;
        for (int i = 1; i < time.Length; i++)
        {
            int now = inFlight[i] && Math.Abs(brakes[i]) > large ? Math.Sign(brakes[i]) : 0;
            if (now != side)
                (side, heldSince) = (now, time[i]);
            // The turn follows the brake by a second or two.
            if (side == 0 || time[i] - heldSince < RateSpanSec || !(Math.Abs(turnRate[i]) > _clearTurnRadPerSec))
                continue;
            double dt = Math.Min(1, time[i] - time[i - 1]);
            if (Math.Sign(turnRate[i]) == side)
                with += dt;
            else
                against += dt;
        }
        double all = with + against;
        return all >= FewestTurnSec && against > AgainstShare * all ? Finding.Of(FindingCode.BrakesAgainstTurn, all, against / all) : null;
    }

    /// <summary>Throttle against speed of rotation, over means of three seconds: Spearman's rank correlation.</summary>
    public static Finding? Throttle(FlightLog log, bool[] inFlight)
    {
        if (!log.Has(ChannelRole.Throttle) || !log.Has(ChannelRole.Rpm))
            return null;
        double[] throttle = ThrustSource.Held(log, ChannelRole.Throttle), rpm = ThrustSource.Held(log, ChannelRole.Rpm);
        var x = new List<double>();
        var y = new List<double>();
        double sumX = 0, sumY = 0, since = double.NaN;
        int n = 0;
        for (int i = 0; i < log.Count; i++)
        {
            if (!inFlight[i] || !double.IsFinite(throttle[i]) || !double.IsFinite(rpm[i]))
                continue;
            if (n > 0 && log.TimeSec[i] - since >= 3)
            {
                x.Add(sumX / n);
                y.Add(sumY / n);
                (sumX, sumY, n) = (0, 0, 0);
            }
            if (n == 0)
                since = log.TimeSec[i];
            sumX += throttle[i];
            sumY += rpm[i];
            n++;
        }
        if (x.Count < FewestPairs || x.Max() - x.Min() < 0.2)
            return null;
        double rank = RankCorrelation([.. x], [.. y]);
        return rank < SmallestRankCorrelation ? Finding.Of(FindingCode.ThrottleAgainstRpm, rank) : null;
    }

    /// <summary>Unevenness of one column's time stamps.</summary>
    public static Finding? Jitter(ReadOnlySpan<double> time, ReadOnlySpan<double> column)
    {
        var steps = new List<double>();
        double last = double.NaN;
        for (int i = 0; i < column.Length; i++)
        {
            if (!double.IsFinite(column[i]))
                continue;
            if (double.IsFinite(last))
                steps.Add(time[i] - last);
            last = time[i];
        }
        if (steps.Count < FewestSteps)
            return null;
        double median = Median.Of([.. steps]);
        double share = steps.Count(s => Math.Abs(s - median) > UnevenStep * median) / (double)steps.Count;
        return share > UnevenShare ? Finding.Of(FindingCode.TimeJitter, median, share) : null;
    }

    private static double RankCorrelation(double[] x, double[] y)
    {
        double[] a = Ranks(x), b = Ranks(y);
        double mean = (x.Length - 1) / 2.0, ab = 0, aa = 0, bb = 0;
        for (int i = 0; i < a.Length; i++)
        {
            ab += (a[i] - mean) * (b[i] - mean);
            aa += (a[i] - mean) * (a[i] - mean);
            bb += (b[i] - mean) * (b[i] - mean);
        }
        return aa > 0 && bb > 0 ? ab / Math.Sqrt(aa * bb) : 0;
    }

    /// <summary>Ranks from 0; equal values share the mean of theirs.</summary>
    private static double[] Ranks(double[] values)
    {
        int[] order = [.. Enumerable.Range(0, values.Length).OrderBy(i => values[i])];
        var ranks = new double[values.Length];
        for (int i = 0; i < order.Length;)
        {
            int end = i;
            while (end + 1 < order.Length && values[order[end + 1]] == values[order[i]])
                end++;
            for (int k = i; k <= end; k++)
                ranks[order[k]] = (i + end) / 2.0;
            i = end + 1;
        }
        return ranks;
    }
}
