using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>Takes out of a track what no flight could have flown.</summary>
internal static class GpsCleaning
{
    /// <summary>A fix is wild when its velocity leaves the median of its neighbours by six normal-consistent MADs and by this many m/s: a tight
    /// spiral (40 deg/s at 14 m/s) changes the velocity by 5 m/s in half a second, but its median follows.</summary>
    private const double SmallestJump = 6, MadsOff = 6;
    private const int Around = 2;
    private const double LongestNeighbourSec = 4;

    /// <summary>Sets wild velocities to NaN.</summary>
    /// <returns>Fixes left out, and fixes before.</returns>
    public static (int Wild, int Fixes) RemoveOutliers(ReadOnlySpan<double> time, double[] north, double[] east)
    {
        var fixes = new List<int>();
        for (int i = 0; i < north.Length; i++)
        {
            if (double.IsFinite(north[i]) && double.IsFinite(east[i]))
                fixes.Add(i);
        }
        int n = fixes.Count;
        if (n < (2 * Around) + 1)
            return (0, n);
        var deviation = new double[n];
        Span<double> nearNorth = stackalloc double[(2 * Around) + 1], nearEast = stackalloc double[(2 * Around) + 1];
        for (int k = 0; k < n; k++)
        {
            int first = Math.Clamp(k - Around, 0, n - (2 * Around) - 1);
            int count = 0;
            for (int j = first; j <= first + (2 * Around); j++)
            {
                if (Math.Abs(time[fixes[j]] - time[fixes[k]]) > LongestNeighbourSec)
                    continue;
                nearNorth[count] = north[fixes[j]];
                nearEast[count++] = east[fixes[j]];
            }
            if (count < 3)
                continue; // alone: nothing says that it is wild
            double dn = north[fixes[k]] - Median.InPlace(nearNorth[..count]);
            double de = east[fixes[k]] - Median.InPlace(nearEast[..count]);
            deviation[k] = Math.Sqrt((dn * dn) + (de * de));
        }
        double limit = Math.Max(SmallestJump, MadsOff * NormalConsistentMad.About(deviation, 0));
        int wild = 0;
        for (int k = 0; k < n; k++)
        {
            if (!(deviation[k] > limit))
                continue;
            north[fixes[k]] = east[fixes[k]] = double.NaN;
            wild++;
        }
        return (wild, n);
    }

    /// <summary>Spans in which the track stood still on one fix while the machine flew, and how long they lasted together, s.</summary>
    /// <remarks>A logger that runs faster than its GPS repeats each fix too, so a span counts only when it is much longer than usual.</remarks>
    public static (int Spans, double Seconds) Frozen(ReadOnlySpan<double> time, ReadOnlySpan<double> north, ReadOnlySpan<double> east, ReadOnlySpan<bool> repeated, FlightSpan flight)
    {
        const double ShortestSec = 2.5, TimesUsual = 4;
        var steps = new List<double>();
        double lastNew = double.NaN;
        for (int i = 0; i < time.Length; i++)
        {
            if (!double.IsFinite(north[i]))
                continue;
            if (double.IsFinite(lastNew))
                steps.Add(time[i] - lastNew);
            lastNew = time[i];
        }
        if (steps.Count < 3)
            return (0, 0);
        double limit = Math.Max(ShortestSec, TimesUsual * Median.Of([.. steps]));
        int spans = 0;
        double seconds = 0, since = double.NaN, lastRepeat = double.NaN;
        double speed = 0;
        for (int i = 0; i <= time.Length; i++)
        {
            bool isNew = i < time.Length && double.IsFinite(north[i]);
            if (i == time.Length || isNew)
            {
                if (lastRepeat - since >= limit && speed > FlightSpan.FlyingSpeed) // NaN compares false
                {
                    spans++;
                    seconds += lastRepeat - since;
                }
                if (isNew)
                {
                    speed = Math.Sqrt((north[i] * north[i]) + (east[i] * east[i]));
                    since = time[i];
                }
                lastRepeat = double.NaN;
            }
            else if (repeated[i] && time[i] > flight.FirstFlyingSec && time[i] < flight.LastFlyingSec)
            {
                lastRepeat = time[i];
            }
        }
        return (spans, seconds);
    }
}
