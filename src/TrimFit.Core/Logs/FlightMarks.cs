using System.Collections.Immutable;

namespace TrimFit.Core.Logs;

/// <summary>Marks that a pilot can set with a bare logger: a marker channel, three quick throttle blips, a pause of the recorder.</summary>
/// <remarks>The first kind that the flight holds is used, in this order: with a marker button nobody blips, and a recorder that drops out by itself
/// must not renumber marks that were blipped.</remarks>
public static class FlightMarks
{
    /// <summary>Blips of one mark.</summary>
    public const int BlipsOfMark = 3;

    /// <summary>A blip rises by at least this share of the column's range above what stood before, and is over within this time, s.</summary>
    private const double BlipShare = 0.12, LongestBlipSec = 2.0, ShortestBlipSec = 0.1;

    /// <summary>Blips of one mark follow each other within this, s (from start to start).</summary>
    private const double LongestBetweenSec = 3.0;

    /// <summary>A logger must be at least this quick to show a blip, s between samples.</summary>
    private const double SlowestStepSec = 0.5;

    /// <summary>A pause that a pilot makes: longer than a drop-out of a few samples, shorter than a landing, s.</summary>
    private const double ShortestPauseSec = 3, LongestPauseSec = 90, StepsOfPause = 8;

    private static readonly ChannelRole[] _engine = [ChannelRole.Throttle, ChannelRole.Rpm, ChannelRole.Power, ChannelRole.Current, ChannelRole.EngineNoise];

    /// <summary>The marks of a flight in order; empty when it has none of any kind.</summary>
    /// <param name="flight">The flight.</param>
    public static ImmutableArray<FlightMark> Of(FlightLog flight)
    {
        ArgumentNullException.ThrowIfNull(flight);
        ImmutableArray<FlightMark> marks = Channel(flight);
        if (marks.IsEmpty)
            marks = Blips(flight);
        return marks.IsEmpty ? Pauses(flight) : marks;
    }

    private static ImmutableArray<FlightMark> Channel(FlightLog flight)
    {
        ReadOnlySpan<double> time = flight.TimeSec, marker = flight[ChannelRole.Marker];
        double? same = null;
        bool counted = false, hasZeros = false; // without zeros an empty cell is what parts two marks
        foreach (double value in marker)
        {
            hasZeros |= value == 0;
            if (double.IsFinite(value) && value != 0)
            {
                counted |= same is double s && s != value;
                same = value;
            }
        }
        var marks = ImmutableArray.CreateBuilder<FlightMark>();
        var seen = new HashSet<double>();
        bool up = false;
        for (int i = 0; i < marker.Length; i++)
        {
            if (hasZeros && double.IsNaN(marker[i]))
                continue;
            bool set = double.IsFinite(marker[i]) && marker[i] != 0;
            if (set && counted && seen.Add(marker[i]))
                marks.Add(new(marker[i], time[i], FlightMarkKind.Channel)); // where the column first has the number
            if (set && !up && !counted)
                marks.Add(new(marks.Count + 1, time[i], FlightMarkKind.Channel));
            up = set;
        }
        return marks.ToImmutable();
    }

    /// <summary>Three short rises of throttle, or of what follows it, one after the other; the mark stands at the end of the third.</summary>
    private static ImmutableArray<FlightMark> Blips(FlightLog flight)
    {
        foreach (ChannelRole role in _engine)
        {
            if (!flight.Has(role))
                continue;
            ImmutableArray<FlightMark> marks = Blips(flight.TimeSec, flight[role]);
            if (!marks.IsEmpty)
                return marks;
        }
        return [];
    }

    private static ImmutableArray<FlightMark> Blips(ReadOnlySpan<double> timeSec, ReadOnlySpan<double> column)
    {
        var time = new List<double>();
        var value = new List<double>();
        for (int i = 0; i < column.Length; i++)
        {
            if (double.IsFinite(column[i]))
            {
                time.Add(timeSec[i]);
                value.Add(column[i]);
            }
        }
        if (value.Count < 10 || (time[^1] - time[0]) / (value.Count - 1) > SlowestStepSec)
            return [];
        double[] sorted = [.. value.Order()];
        double rise = BlipShare * (sorted[(int)(0.98 * (sorted.Length - 1))] - sorted[(int)(0.02 * (sorted.Length - 1))]);
        if (!(rise > 0))
            return [];
        // A blip: up by the rise above the level before it, and back near that level within two seconds.
        var blips = new List<(double Start, double End)>();
        for (int i = 1; i < value.Count; i++)
        {
            double before = value[i - 1];
            if (value[i] - before < rise / 3) // the foot of a rise; the top may take some samples more
                continue;
            int top = i;
            double highest = value[i];
            int end = -1;
            for (int j = i; j < value.Count && time[j] - time[i - 1] <= LongestBlipSec; j++)
            {
                if (value[j] > highest)
                    (highest, top) = (value[j], j);
                if (j > top && highest - before >= rise && value[j] - before < 0.3 * (highest - before))
                {
                    end = j;
                    break;
                }
            }
            if (end < 0 || time[end] - time[i - 1] < ShortestBlipSec)
                continue;
            blips.Add((time[i - 1], time[end]));
            i = end;
        }
        var marks = ImmutableArray.CreateBuilder<FlightMark>();
        int run = 0;
        for (int i = 0; i < blips.Count; i++)
        {
            run = i > 0 && blips[i].Start - blips[i - 1].Start <= LongestBetweenSec ? run + 1 : 1;
            bool last = i + 1 == blips.Count || blips[i + 1].Start - blips[i].Start > LongestBetweenSec;
            if (run == BlipsOfMark && last) // four or more are a pilot who plays with the throttle
                marks.Add(new(marks.Count + 1, blips[i].End, FlightMarkKind.Blips));
        }
        return marks.ToImmutable();
    }

    /// <summary>A pause of the record; the mark stands where it goes on.</summary>
    private static ImmutableArray<FlightMark> Pauses(FlightLog flight)
    {
        ReadOnlySpan<double> time = flight.TimeSec;
        if (time.Length < 20)
            return [];
        double[] steps = new double[time.Length - 1];
        for (int i = 0; i < steps.Length; i++)
            steps[i] = time[i + 1] - time[i];
        double[] sorted = [.. steps.Order()];
        double usual = sorted[sorted.Length / 2];
        var marks = ImmutableArray.CreateBuilder<FlightMark>();
        for (int i = 0; i < steps.Length; i++)
        {
            if (steps[i] >= Math.Max(ShortestPauseSec, StepsOfPause * usual) && steps[i] <= LongestPauseSec)
                marks.Add(new(marks.Count + 1, time[i + 1], FlightMarkKind.Pause));
        }
        return marks.ToImmutable();
    }
}

/// <summary>A mark set in flight.</summary>
/// <param name="Number">Its number, as logged or counted from 1.</param>
/// <param name="TimeSec">When, on the log's clock, s.</param>
/// <param name="Kind">What it is made of.</param>
public readonly record struct FlightMark(double Number, double TimeSec, FlightMarkKind Kind);

/// <summary>What a mark is made of.</summary>
public enum FlightMarkKind
{
    /// <summary>A marker channel.</summary>
    Channel,
    /// <summary>Three quick throttle blips.</summary>
    Blips,
    /// <summary>A pause of the recorder.</summary>
    Pause,
}
