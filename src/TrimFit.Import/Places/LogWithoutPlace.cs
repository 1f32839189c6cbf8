using System.Globalization;
using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Core.Turns;

namespace TrimFit.Import.Places;

/// <summary>Writes a flight without where it was flown: coordinates go, the ground velocity that the analysis takes from them stays.</summary>
/// <remarks>Heights, times and velocities stay, so the shape of the track can be drawn again, but not where on the globe. CSV with a comma, one column
/// a role named by its word with the unit in brackets, numbers with all their digits; an empty cell where nothing was recorded.</remarks>
public static class LogWithoutPlace
{
    /// <summary>Name that such a log gets: the old one may be the name of a place.</summary>
    public const string FileName = "flight-without-place.csv";

    /// <summary>Whether a flight has coordinates to forget.</summary>
    public static bool HasPlace(FlightLog flight)
    {
        ArgumentNullException.ThrowIfNull(flight);
        return flight.Has(ChannelRole.Latitude) || flight.Has(ChannelRole.Longitude);
    }

    /// <summary>The flight as CSV, UTF-8.</summary>
    public static byte[] Write(FlightLog flight)
    {
        ArgumentNullException.ThrowIfNull(flight);
        var columns = new List<(string Head, double[] Values, double Factor)>();
        foreach (ChannelRole role in flight.Roles)
        {
            if (role is ChannelRole.Latitude or ChannelRole.Longitude or ChannelRole.Position)
                continue;
            (string unit, double factor) = UnitOf(role, flight);
            columns.Add((Head(role, unit), flight[role].ToArray(), factor));
        }
        bool hasVelocity = (flight.Has(ChannelRole.VelocityNorth) && flight.Has(ChannelRole.VelocityEast))
            || (flight.Has(ChannelRole.GroundSpeed) && flight.Has(ChannelRole.GroundCourse));
        if (!hasVelocity && HasPlace(flight))
        {
            (double[] north, double[] east, bool[] repeated) = GroundVelocity.Of(flight);
            KeepRepeats(north, east, repeated);
            columns.Add((Head(ChannelRole.VelocityNorth, "m/s"), north, 1));
            columns.Add((Head(ChannelRole.VelocityEast, "m/s"), east, 1));
        }
        (string timeHead, Func<double, string> time) = TimeOf(flight);
        var text = new StringBuilder(timeHead);
        foreach ((string head, _, _) in columns)
            text.Append(',').Append(head);
        text.Append('\n');
        ReadOnlySpan<double> timeSec = flight.TimeSec;
        for (int i = 0; i < timeSec.Length; i++)
        {
            text.Append(time(timeSec[i]));
            foreach ((_, double[] values, double factor) in columns)
            {
                text.Append(',');
                if (i < values.Length && double.IsFinite(values[i]))
                    text.Append((values[i] * factor).ToString("R", CultureInfo.InvariantCulture));
            }
            text.Append('\n');
        }
        return Encoding.UTF8.GetBytes(text.ToString());
    }

    /// <summary>A fix that the logger wrote again stays one that was written again, so that a frozen GPS is still seen as one.</summary>
    private static void KeepRepeats(double[] north, double[] east, bool[] repeated)
    {
        int last = -1;
        for (int i = 0; i < north.Length; i++)
        {
            if (double.IsFinite(north[i]))
                last = i;
            else if (repeated[i] && last >= 0)
                (north[i], east[i]) = (north[last], east[last]);
        }
    }

    private static string Head(ChannelRole role, string unit) => unit.Length == 0 ? ChannelRoles.NameOf(role) : $"{ChannelRoles.NameOf(role)} ({unit})";

    private static (string Unit, double Factor) UnitOf(ChannelRole role, FlightLog flight) => role switch
    {
        ChannelRole.BrakeLeft or ChannelRole.BrakeRight or ChannelRole.BrakeDifference => OfControl(flight.BrakeUnit),
        ChannelRole.TrimmerLeft or ChannelRole.TrimmerRight => OfControl(flight.TrimmerUnit),
        ChannelRole.Throttle or ChannelRole.Accelerator or ChannelRole.EngineNoise => ("%", 100),
        ChannelRole.HandsOff or ChannelRole.Marker => ("", 1),
        _ => (ChannelRoles.UnitOf(role), 1),
    };

    private static (string Unit, double Factor) OfControl(ControlUnit unit) => unit switch
    {
        ControlUnit.Fraction => ("%", 100),
        ControlUnit.Meter => ("m", 1),
        _ => ("", 1),
    };

    private static (string Head, Func<double, string> Text) TimeOf(FlightLog flight)
    {
        if (flight.StartUtc is DateTimeOffset start)
            return ("time", t => start.UtcDateTime.AddTicks(Ticks(t)).ToString("yyyy-MM-dd'T'HH:mm:ss.fffffff'Z'", CultureInfo.InvariantCulture));
        if (flight.StartTimeOfDay is TimeSpan day)
            return ("time", t => TimeSpan.FromTicks((day.Ticks + Ticks(t)) % TimeSpan.TicksPerDay).ToString("hh\\:mm\\:ss\\.fffffff", CultureInfo.InvariantCulture));
        return ("time (s)", t => t.ToString("R", CultureInfo.InvariantCulture));

        static long Ticks(double sec) => (long)Math.Round(sec * TimeSpan.TicksPerSecond);
    }
}
