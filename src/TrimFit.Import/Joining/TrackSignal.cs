using TrimFit.Core.Logs;

namespace TrimFit.Import.Joining;

/// <summary>Something two loggers of one flight both felt, as a running integral over time.</summary>
/// <remarks>Every signal is compared as its mean over a window, the difference of the integral at the window's ends: angles and altitudes are
/// integrals already, rates and engine levels are summed by the trapezoid rule. Both sides thus pass the same symmetric filter, which moves
/// nothing in time. A window that touches a pause of more than 5 s has no value.</remarks>
internal sealed class TrackSignal
{
    private const double LongestPauseSec = 5;

    /// <summary>Below this speed a course is noise, and nothing flies, m/s.</summary>
    private const double SlowestMPerSec = 3;

    /// <summary>No wing turns faster than this over some seconds, rad/s; what does is a fault of a fix or a hand on the sensor.</summary>
    private const double FastestTurn = 1.2;

    private readonly double[] _time, _integral;

    private TrackSignal(SignalKind kind, double[] time, double[] integral) => (Kind, _time, _integral) = (kind, time, integral);

    public SignalKind Kind { get; }

    public double Start => _time[0];

    public double End => _time[^1];

    /// <summary>All signals of a table; times are the table's plus <paramref name="shift"/>.</summary>
    public static IEnumerable<TrackSignal> Of(LogTable table, double shift)
    {
        if (Course(table) is (double[] courseTime, double[] course) && FromAngle(SignalKind.Turn, courseTime, course, shift) is TrackSignal gps)
            yield return gps;
        foreach (ChannelRole role in GyroRoles(table))
        {
            if (FromRate(SignalKind.Turn, table.TimeSec, table.Columns[role], shift) is TrackSignal gyro)
                yield return gyro;
        }
        if (Levelled(table) is double[] levelled && FromRate(SignalKind.Turn, table.TimeSec, levelled, shift) is TrackSignal level)
            yield return level;
        if (table.Columns.TryGetValue(ChannelRole.Heading, out double[]? heading) && FromAngle(SignalKind.Turn, table.TimeSec, heading, shift) is TrackSignal compass)
            yield return compass;
        if (Height(table) is double[] height && FromIntegral(SignalKind.Climb, table.TimeSec, height, shift) is TrackSignal climb)
            yield return climb;
        foreach (ChannelRole role in new[] { ChannelRole.Rpm, ChannelRole.Current, ChannelRole.Power, ChannelRole.Throttle, ChannelRole.EngineNoise })
        {
            if (table.Columns.TryGetValue(role, out double[]? engine) && FromRate(SignalKind.Engine, table.TimeSec, engine, shift) is TrackSignal level2)
            {
                yield return level2;
                break;
            }
        }
        if (Speed(table) is (double[] speedTime, double[] speed) && FromRate(SignalKind.Speed, speedTime, speed, shift) is TrackSignal fast)
            yield return fast;
    }

    /// <summary>Mean rate of the signal in a window of half-width <paramref name="half"/> about each time of a grid; NaN where it has none.</summary>
    public double[] Means(double first, double step, int count, double half)
    {
        double[] upper = Integrals(first + half, step, count), lower = Integrals(first - half, step, count);
        for (int i = 0; i < count; i++)
        {
            upper[i] = (upper[i] - lower[i]) / (2 * half);
            if (Kind == SignalKind.Turn && Math.Abs(upper[i]) > FastestTurn)
                upper[i] = double.NaN;
        }
        // A window across a pause would compare a mean with nothing behind it.
        int pause = 1;
        for (int i = 0; i < count; i++)
        {
            double from = first + (i * step) - half, to = from + (2 * half);
            while (pause < _time.Length && _time[pause] < from)
                pause++;
            for (int k = pause; k < _time.Length && _time[k - 1] < to; k++)
            {
                if (_time[k] - _time[k - 1] > LongestPauseSec)
                    upper[i] = double.NaN;
            }
        }
        return upper;
    }

    private double[] Integrals(double first, double step, int count)
    {
        double[] values = new double[count];
        int k = 1;
        for (int i = 0; i < count; i++)
        {
            double t = first + (i * step);
            if (!(t >= _time[0] && t <= _time[^1]))
            {
                values[i] = double.NaN;
                continue;
            }
            while (k < _time.Length - 1 && _time[k] < t)
                k++;
            values[i] = _integral[k - 1] + ((_integral[k] - _integral[k - 1]) * (t - _time[k - 1]) / (_time[k] - _time[k - 1]));
        }
        return values;
    }

    private static TrackSignal? FromRate(SignalKind kind, double[] time, double[] rate, double shift)
    {
        (List<double> at, List<double> values) = Finite(time, rate, shift);
        double[] integral = new double[at.Count];
        for (int i = 1; i < integral.Length; i++)
            integral[i] = integral[i - 1] + ((values[i] + values[i - 1]) / 2 * (at[i] - at[i - 1]));
        return Make(kind, at, integral);
    }

    private static TrackSignal? FromAngle(SignalKind kind, double[] time, double[] angle, double shift)
    {
        (List<double> at, List<double> values) = Finite(time, angle, shift);
        double[] integral = new double[at.Count];
        for (int i = 0; i < integral.Length; i++)
            integral[i] = i == 0 ? values[0] : integral[i - 1] + Math.IEEERemainder(values[i] - values[i - 1], 2 * Math.PI);
        return Make(kind, at, integral);
    }

    private static TrackSignal? FromIntegral(SignalKind kind, double[] time, double[] height, double shift)
    {
        (List<double> at, List<double> values) = Finite(time, height, shift);
        return Make(kind, at, [.. values]);
    }

    private static TrackSignal? Make(SignalKind kind, List<double> time, double[] integral) =>
        time.Count >= 20 && time[^1] - time[0] >= 30 ? new(kind, [.. time], integral) : null;

    private static (List<double> Time, List<double> Values) Finite(double[] time, double[] values, double shift)
    {
        var at = new List<double>();
        var kept = new List<double>();
        for (int i = 0; i < time.Length; i++)
        {
            if (double.IsFinite(values[i]))
            {
                at.Add(time[i] + shift);
                kept.Add(values[i]);
            }
        }
        return (at, kept);
    }

    private static IEnumerable<ChannelRole> GyroRoles(LogTable table) =>
        new[] { ChannelRole.YawRate, ChannelRole.GyroZ, ChannelRole.GyroY, ChannelRole.GyroX }.Where(table.Columns.ContainsKey);

    /// <summary>Rate about the mean direction of the acceleration, which is close to the vertical; null without three axes of both.</summary>
    private static double[]? Levelled(LogTable table)
    {
        if (!table.Columns.TryGetValue(ChannelRole.GyroX, out double[]? x) || !table.Columns.TryGetValue(ChannelRole.GyroY, out double[]? y) || !table.Columns.TryGetValue(ChannelRole.GyroZ, out double[]? z)
            || !table.Columns.TryGetValue(ChannelRole.AccelerationX, out double[]? ax) || !table.Columns.TryGetValue(ChannelRole.AccelerationY, out double[]? ay) || !table.Columns.TryGetValue(ChannelRole.AccelerationZ, out double[]? az))
            return null;
        double mx = MeanOf(ax), my = MeanOf(ay), mz = MeanOf(az), length = Math.Sqrt((mx * mx) + (my * my) + (mz * mz));
        if (!(length > 0.6)) // acceleration without gravity averages to nothing and has no direction to level by; in g it is 1, in m/s² 9.8
            return null;
        double[] rate = new double[x.Length];
        for (int i = 0; i < rate.Length; i++)
            rate[i] = ((x[i] * mx) + (y[i] * my) + (z[i] * mz)) / length;
        return rate;
    }

    private static double MeanOf(double[] column)
    {
        double sum = 0;
        int n = 0;
        foreach (double v in column)
        {
            if (double.IsFinite(v))
                (sum, n) = (sum + v, n + 1);
        }
        return n == 0 ? double.NaN : sum / n;
    }

    /// <summary>Altitude, or the height of the pressure: its logarithm times the scale height of the atmosphere (8.4 km near the ground).</summary>
    private static double[]? Height(LogTable table)
    {
        const double ScaleHeight = 8400;
        return table.Columns.TryGetValue(ChannelRole.Pressure, out double[]? pressure) ? [.. pressure.Select(p => p > 0 ? -ScaleHeight * Math.Log(p) : double.NaN)]
            : table.Columns.GetValueOrDefault(ChannelRole.Altitude);
    }

    /// <summary>Course over ground, from velocities, the logged course, or positions a second apart that moved.</summary>
    private static (double[] Time, double[] Course)? Course(LogTable table)
    {
        if (table.Columns.TryGetValue(ChannelRole.VelocityNorth, out double[]? north) && table.Columns.TryGetValue(ChannelRole.VelocityEast, out double[]? east))
            return (table.TimeSec, [.. north.Zip(east, (n, e) => Math.Sqrt((n * n) + (e * e)) > SlowestMPerSec ? Math.Atan2(e, n) : double.NaN)]);
        if (table.Columns.TryGetValue(ChannelRole.GroundCourse, out double[]? course))
            return (table.TimeSec, table.Columns.TryGetValue(ChannelRole.GroundSpeed, out double[]? speed) ? [.. course.Zip(speed, (c, v) => v > SlowestMPerSec ? c : double.NaN)] : course);
        return Steps(table) is { } steps ? (steps.Time, [.. steps.North.Zip(steps.East, (n, e) => Math.Sqrt((n * n) + (e * e)) > SlowestMPerSec ? Math.Atan2(e, n) : double.NaN)]) : null;
    }

    private static (double[] Time, double[] Speed)? Speed(LogTable table)
    {
        if (table.Columns.TryGetValue(ChannelRole.GroundSpeed, out double[]? speed))
            return (table.TimeSec, speed);
        return Steps(table) is { } steps ? (steps.Time, [.. steps.North.Zip(steps.East, (n, e) => Math.Sqrt((n * n) + (e * e)))]) : null;
    }

    /// <summary>Velocity between positions about a second apart, at the middle of each step; positions that repeat are one fix.</summary>
    private static (double[] Time, double[] North, double[] East)? Steps(LogTable table)
    {
        if (!table.Columns.TryGetValue(ChannelRole.Latitude, out double[]? latitude) || !table.Columns.TryGetValue(ChannelRole.Longitude, out double[]? longitude))
            return null;
        var at = new List<double>();
        var north = new List<double>();
        var east = new List<double>();
        int last = -1;
        for (int i = 0; i < latitude.Length; i++)
        {
            if (!double.IsFinite(latitude[i]) || !double.IsFinite(longitude[i]))
                continue;
            if (last < 0)
            {
                last = i;
                continue;
            }
            double dt = table.TimeSec[i] - table.TimeSec[last];
            if (dt < 0.9 || (latitude[i] == latitude[last] && longitude[i] == longitude[last] && dt < LongestPauseSec)) // exact: the same bits of a repeated fix
                continue;
            at.Add(table.TimeSec[last] + (dt / 2));
            north.Add(Core.Units.PhysicalConstants.MeanEarthRadius * (latitude[i] - latitude[last]) / dt);
            east.Add(Core.Units.PhysicalConstants.MeanEarthRadius * Math.IEEERemainder(longitude[i] - longitude[last], 2 * Math.PI) * Math.Cos(latitude[i]) / dt);
            last = i;
        }
        return ([.. at], [.. north], [.. east]);
    }
}

/// <summary>What a <see cref="TrackSignal"/> measures.</summary>
internal enum SignalKind
{
    /// <summary>Turning: gyro, compass or course.</summary>
    Turn,
    /// <summary>Climb by altitude or pressure.</summary>
    Climb,
    /// <summary>How hard the engine works.</summary>
    Engine,
    /// <summary>Speed over ground.</summary>
    Speed,
}
