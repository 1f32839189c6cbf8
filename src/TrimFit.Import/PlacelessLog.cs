using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;

namespace TrimFit.Import;

/// <summary>A flight written as a log without its place: positions are left out, what they say about speed and course is kept.</summary>
/// <remarks>Every other channel is written to its last digit with its role and unit, so that reading it back gives the same columns. Time of day and
/// altitude stay: they are needed for the flight sheet and for level flight, and they name no place.</remarks>
public static class PlacelessLog
{
    private const string TimeName = "time";

    /// <summary>The log and what must be said about its columns to read it back.</summary>
    /// <param name="flight">The flight as read, before a sheet was applied.</param>
    /// <param name="name">File name of the log.</param>
    public static (LogSource Source, ImmutableArray<ColumnRule> Rules) Of(FlightLog flight, string name)
    {
        ArgumentNullException.ThrowIfNull(flight);
        bool speeds = (flight.Has(ChannelRole.VelocityNorth) && flight.Has(ChannelRole.VelocityEast)) || (flight.Has(ChannelRole.GroundSpeed) && flight.Has(ChannelRole.GroundCourse));
        var columns = new List<(ChannelRole Role, double[] Values)>();
        foreach (ChannelRole role in flight.Roles)
        {
            if (role is not (ChannelRole.Latitude or ChannelRole.Longitude or ChannelRole.Position))
                columns.Add((role, flight[role].ToArray()));
        }
        if (!speeds && flight.Has(ChannelRole.Latitude) && flight.Has(ChannelRole.Longitude))
        {
            (double[] north, double[] east, _) = GroundVelocity.Of(flight);
            columns.Add((ChannelRole.VelocityNorth, north));
            columns.Add((ChannelRole.VelocityEast, east));
        }
        var rules = ImmutableArray.CreateBuilder<ColumnRule>();
        rules.Add(new(ChannelRole.Time, TimeName, flight.StartUtc is null && flight.StartTimeOfDay is null ? "s" : null));
        rules.AddRange(columns.Select(c => new ColumnRule(c.Role, ChannelRoles.NameOf(c.Role), UnitOf(c.Role, flight))));
        var text = new StringBuilder(flight.Count * columns.Count * 8);
        text.Append(TimeName).Append(',').AppendJoin(',', columns.Select(c => ChannelRoles.NameOf(c.Role))).Append('\n');
        for (int i = 0; i < flight.Count; i++)
        {
            text.Append(Stamp(flight, flight.TimeSec[i]));
            foreach ((_, double[] values) in columns)
            {
                text.Append(',');
                if (double.IsFinite(values[i]))
                    text.Append(values[i].ToString("R", CultureInfo.InvariantCulture));
            }
            text.Append('\n');
        }
        return (LogSource.FromBytes(name, Encoding.UTF8.GetBytes(text.ToString())), rules.ToImmutable());
    }

    private static string Stamp(FlightLog flight, double timeSec)
    {
        // Tenths of a microsecond: the stamps of a GPS and more than those of any logger.
        if (flight.StartUtc is DateTimeOffset start)
            return start.UtcDateTime.AddTicks(Ticks(timeSec)).ToString("yyyy-MM-dd'T'HH:mm:ss.fffffff'Z'", CultureInfo.InvariantCulture);
        return flight.StartTimeOfDay is TimeSpan day
            ? new TimeSpan((day.Ticks + Ticks(timeSec)) % TimeSpan.TicksPerDay).ToString("hh':'mm':'ss'.'fffffff", CultureInfo.InvariantCulture)
            : timeSec.ToString("R", CultureInfo.InvariantCulture);
    }

    private static long Ticks(double timeSec) => (long)Math.Round(timeSec * TimeSpan.TicksPerSecond);

    private static string? UnitOf(ChannelRole role, FlightLog flight) => role switch
    {
        ChannelRole.BrakeLeft or ChannelRole.BrakeRight or ChannelRole.BrakeDifference => UnitOf(flight.BrakeUnit),
        ChannelRole.TrimmerLeft or ChannelRole.TrimmerRight => UnitOf(flight.TrimmerUnit),
        ChannelRole.HandsOff or ChannelRole.Marker => null,
        _ => ChannelRoles.UnitOf(role) is var unit && unit == "1" ? "0-1" : unit,
    };

    private static string? UnitOf(ControlUnit unit) => unit switch { ControlUnit.Fraction => "0-1", ControlUnit.Meter => "m", _ => "count" };
}
