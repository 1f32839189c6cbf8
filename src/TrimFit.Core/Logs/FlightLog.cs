using System.Collections.Immutable;

namespace TrimFit.Core.Logs;

/// <summary>One flight as columns over one clock: every channel has one value per time stamp, NaN where its logger recorded nothing.</summary>
/// <remarks>Loggers of different rates share the union of their time stamps, so a slow channel is NaN between its samples; nothing is
/// resampled. Values are SI (<see cref="ChannelRoles.UnitOf"/>), body axes x forward, y right, z down, positive to the pilot's right.</remarks>
public sealed class FlightLog
{
    private readonly double[] _timeSec;
    private readonly Dictionary<ChannelRole, double[]> _channels;

    private FlightLog(double[] timeSec, Dictionary<ChannelRole, double[]> channels, FlightLogOptions options)
    {
        _timeSec = timeSec;
        _channels = channels;
        StartUtc = options.StartUtc;
        BrakeUnit = options.BrakeUnit;
        TrimmerUnit = options.TrimmerUnit;
        GyroDelaySec = options.GyroDelaySec;
        StartTimeOfDay = options.StartUtc?.UtcDateTime.TimeOfDay ?? options.StartTimeOfDay;
    }

    /// <summary>Seconds since <see cref="StartUtc"/> or since the first sample; finite and strictly increasing.</summary>
    public ReadOnlySpan<double> TimeSec => _timeSec;

    /// <summary>Number of time stamps.</summary>
    public int Count => _timeSec.Length;

    /// <summary>Absolute time of <c>TimeSec = 0</c>; null when no logger knew the date.</summary>
    public DateTimeOffset? StartUtc { get; }

    /// <summary>Time of day of <c>TimeSec = 0</c> on the log's clock, for logs that know no date too; null when only elapsed time is known.</summary>
    public TimeSpan? StartTimeOfDay { get; }

    /// <summary>Unit of the brake channels.</summary>
    public ControlUnit BrakeUnit { get; }

    /// <summary>Unit of the trimmer channels.</summary>
    public ControlUnit TrimmerUnit { get; }

    /// <summary>Known delay of the gyro behind the GPS, s; 0 when none was found.</summary>
    public double GyroDelaySec { get; }

    /// <summary>Roles that have a column with at least one value, in the order of <see cref="ChannelRole"/>.</summary>
    public ImmutableArray<ChannelRole> Roles => [.. _channels.Keys.Order()];

    /// <summary>Whether the role has a column.</summary>
    public bool Has(ChannelRole role) => _channels.ContainsKey(role);

    /// <summary>The column of a role, in its SI unit, NaN where nothing was recorded; empty when the log has no such column.</summary>
    public ReadOnlySpan<double> this[ChannelRole role] => _channels.TryGetValue(role, out double[]? column) ? column : [];

    /// <summary>Copies columns into a log. Columns without a single finite value are left away.</summary>
    /// <exception cref="ArgumentException">Times are not finite and increasing, or a column has another length or an infinite value.</exception>
    public static FlightLog Create(ReadOnlySpan<double> timeSec, IEnumerable<KeyValuePair<ChannelRole, double[]>> channels, FlightLogOptions? options = null)
    {
        ArgumentNullException.ThrowIfNull(channels);
        return TakeOver(timeSec.ToArray(), channels.Select(c => KeyValuePair.Create(c.Key, c.Value.ToArray())), options);
    }

    /// <summary>As <see cref="Create"/> without the copy: for columns that were just made and that nobody else holds. A long log is most of the memory.</summary>
    internal static FlightLog TakeOver(double[] timeSec, IEnumerable<KeyValuePair<ChannelRole, double[]>> channels, FlightLogOptions? options = null)
    {
        Guard.StrictlyIncreasing(timeSec);
        var kept = new Dictionary<ChannelRole, double[]>();
        foreach ((ChannelRole role, double[] column) in channels)
        {
            Guard.SameLength(timeSec, column, ChannelRoles.NameOf(role));
            if (column.AsSpan().ContainsAnyInfinite())
                throw new ArgumentException("holds an infinite value", ChannelRoles.NameOf(role));
            if (column.AsSpan().ContainsAnyFinite())
                kept[role] = column;
        }
        return new(timeSec, kept, options ?? new());
    }

    /// <summary>The same flight with one column put in or replaced.</summary>
    /// <exception cref="ArgumentException">The column has another length or an infinite value.</exception>
    public FlightLog WithChannel(ChannelRole role, ReadOnlySpan<double> column)
    {
        Guard.SameLength(_timeSec, column);
        double[] copy = column.ToArray();
        if (copy.AsSpan().ContainsAnyInfinite())
            throw new ArgumentException("holds an infinite value", nameof(column));
        var channels = new Dictionary<ChannelRole, double[]>(_channels); // columns never change, so both logs may hold them
        if (copy.AsSpan().ContainsAnyFinite())
            channels[role] = copy;
        else
            channels.Remove(role);
        return new(_timeSec, channels, new()
        {
            StartUtc = StartUtc,
            StartTimeOfDay = StartTimeOfDay,
            BrakeUnit = BrakeUnit,
            TrimmerUnit = TrimmerUnit,
            GyroDelaySec = GyroDelaySec,
        });
    }
}
