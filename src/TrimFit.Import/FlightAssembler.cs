using System.Collections.Immutable;
using TrimFit.Core.Logs;

namespace TrimFit.Import;

/// <summary>Sums up the clock of a flight.</summary>
internal static class FlightAssembler
{
    /// <summary>Median steps that make a pause.</summary>
    private const double GapSteps = 5;

    /// <summary>Shortest pause, s, that is called one.</summary>
    private const double GapSec = 2;

    /// <summary>Rate, duration and pauses.</summary>
    /// <param name="timeSec">Time of each row, s, strictly increasing.</param>
    /// <param name="columns">Columns over that time; the fastest one gives the rate.</param>
    /// <param name="start">Absolute time of zero, when known.</param>
    public static SamplingSummary Summarise(double[] timeSec, IEnumerable<double[]> columns, DateTimeOffset? start)
    {
        double rowStep = MedianStep(timeSec, timeSec);
        double step = double.PositiveInfinity;
        foreach (double[] column in columns)
        {
            double own = Array.Exists(column, double.IsNaN) ? MedianStep(timeSec, column) : rowStep;
            step = own > 0 ? Math.Min(step, own) : step;
        }
        if (double.IsPositiveInfinity(step))
            step = rowStep;
        double pause = Math.Max(GapSec, GapSteps * rowStep);
        var gaps = ImmutableArray.CreateBuilder<TimeGap>();
        for (int i = 1; i < timeSec.Length; i++)
        {
            double length = timeSec[i] - timeSec[i - 1];
            if (length > pause)
                gaps.Add(new(timeSec[i - 1], length));
        }
        return new SamplingSummary
        {
            Start = start + TimeSpan.FromSeconds(timeSec.Length > 0 ? timeSec[0] : 0),
            DurationSec = timeSec.Length > 0 ? timeSec[^1] - timeSec[0] : 0,
            RateHz = step > 0 ? 1 / step : 0,
            Gaps = gaps.ToImmutable(),
        };
    }

    /// <summary>Median time between the values of a column; 0 with fewer than two.</summary>
    private static double MedianStep(double[] timeSec, double[] column)
    {
        double[] steps = new double[Math.Max(0, timeSec.Length - 1)];
        int count = 0;
        int last = -1;
        for (int i = 0; i < column.Length; i++)
        {
            if (!double.IsFinite(column[i]))
                continue;
            if (last >= 0)
                steps[count++] = timeSec[i] - timeSec[last];
            last = i;
        }
        return count == 0 ? 0 : Order.LowerMedian(steps.AsSpan(0, count));
    }
}
