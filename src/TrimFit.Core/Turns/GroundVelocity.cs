using TrimFit.Core.Logs;
using TrimFit.Core.Units;

namespace TrimFit.Core.Turns;

/// <summary>Ground velocity from whatever the log has: velocities, speed and course, or positions.</summary>
internal static class GroundVelocity
{
    /// <summary>Longest step between fixes over which positions are differenced, s.</summary>
    private const double LongestStepSec = 3.5;

    /// <summary>North and east velocity at the time of each new fix, NaN elsewhere; empty when the log has none of the sources.</summary>
    /// <remarks><c>Repeated</c> is true where the logger wrote its last fix again.</remarks>
    public static (double[] North, double[] East, bool[] Repeated) Of(FlightLog log)
    {
        var repeated = new bool[log.Count];
        (double[] North, double[] East) velocity =
            log.Has(ChannelRole.VelocityNorth) && log.Has(ChannelRole.VelocityEast)
                ? FromColumns(log[ChannelRole.VelocityNorth], log[ChannelRole.VelocityEast], static (n, e) => (n, e), repeated)
            : log.Has(ChannelRole.GroundSpeed) && log.Has(ChannelRole.GroundCourse)
                ? FromColumns(log[ChannelRole.GroundSpeed], log[ChannelRole.GroundCourse], static (v, c) => (v * Math.Cos(c), v * Math.Sin(c)), repeated)
            : log.Has(ChannelRole.Latitude) && log.Has(ChannelRole.Longitude)
                ? FromPositions(log.TimeSec, log[ChannelRole.Latitude], log[ChannelRole.Longitude], repeated)
            : ([], []);
        return (velocity.North, velocity.East, repeated);
    }

    private static (double[] North, double[] East) FromColumns(ReadOnlySpan<double> first, ReadOnlySpan<double> second, Func<double, double, (double, double)> convert, bool[] repeated)
    {
        double[] north = Missing(first.Length), east = Missing(first.Length);
        double lastFirst = double.NaN, lastSecond = double.NaN;
        for (int i = 0; i < north.Length; i++)
        {
            if (!double.IsFinite(first[i]) || !double.IsFinite(second[i]))
                continue;
            if (first[i] == lastFirst && second[i] == lastSecond) // the logger repeats its last fix: no new measurement
            {
                repeated[i] = true;
                continue;
            }
            (lastFirst, lastSecond) = (first[i], second[i]);
            (north[i], east[i]) = convert(first[i], second[i]);
        }
        return (north, east);
    }

    /// <summary>Central differences over the fixes before and after, so that the velocity belongs to the fix's own time.</summary>
    private static (double[] North, double[] East) FromPositions(ReadOnlySpan<double> timeSec, ReadOnlySpan<double> latitude, ReadOnlySpan<double> longitude, bool[] repeated)
    {
        double[] north = Missing(timeSec.Length), east = Missing(timeSec.Length);
        var fixes = new List<int>();
        for (int i = 0; i < timeSec.Length; i++)
        {
            if (!double.IsFinite(latitude[i]) || !double.IsFinite(longitude[i]))
                continue;
            repeated[i] = fixes.Count > 0 && latitude[i] == latitude[fixes[^1]] && longitude[i] == longitude[fixes[^1]];
            if (!repeated[i])
                fixes.Add(i);
        }
        for (int k = 1; k + 1 < fixes.Count; k++)
        {
            int before = fixes[k - 1], here = fixes[k], after = fixes[k + 1];
            double span = timeSec[after] - timeSec[before];
            if (timeSec[here] - timeSec[before] > LongestStepSec || timeSec[after] - timeSec[here] > LongestStepSec)
                continue;
            double cos = Math.Cos(latitude[here]);
            north[here] = (latitude[after] - latitude[before]) * PhysicalConstants.MeanEarthRadius / span;
            east[here] = Angles.Wrap(longitude[after] - longitude[before]) * cos * PhysicalConstants.MeanEarthRadius / span;
        }
        return (north, east);
    }

    private static double[] Missing(int count)
    {
        var column = new double[count];
        Array.Fill(column, double.NaN);
        return column;
    }
}
