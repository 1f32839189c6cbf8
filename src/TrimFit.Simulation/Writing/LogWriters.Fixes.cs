using System.Globalization;
using System.Text;
using TrimFit.Core.Logs;

namespace TrimFit.Simulation;

public static partial class LogWriters
{
    private const double MetersPerSecondPerKnot = 1852.0 / 3600; // exact

    /// <summary>An IGC file: one fix a second, with an engine noise level when the log has one. FAI Technical Specification for GNSS Flight Recorders, Appendix A.</summary>
    /// <param name="log">The log; it needs a date, positions and altitudes.</param>
    /// <param name="pilotName">What stands in the pilot header, so that a test can look for it elsewhere.</param>
    /// <exception cref="ArgumentException">The log lacks date, position or altitude.</exception>
    public static byte[] Igc(FlightLog log, string pilotName = "")
    {
        ArgumentNullException.ThrowIfNull(log);
        DateTimeOffset start = Needed(log, ChannelRole.Altitude);
        bool noise = log.Has(ChannelRole.EngineNoise);
        var text = new StringBuilder();
        string date = start.UtcDateTime.ToString("ddMMyy", CultureInfo.InvariantCulture);
        text.Append("AXXX001\r\nHFDTEDATE:").Append(date).Append(",01\r\nHFPLTPILOTINCHARGE:").Append(pilotName)
            .Append("\r\nHFGTYGLIDERTYPE:made up\r\nHFDTMGPSDATUM:WGS84\r\n");
        if (noise)
            text.Append("I013638ENL\r\n");
        double altitude = double.NaN;
        double level = 0;
        for (int i = 0; i < log.Count; i++)
        {
            altitude = Held(log[ChannelRole.Altitude][i], altitude);
            if (noise)
                level = Held(log[ChannelRole.EngineNoise][i], level);
            double latitude = log[ChannelRole.Latitude][i];
            if (double.IsNaN(latitude) || double.IsNaN(altitude) || Math.Abs(log.TimeSec[i] - Math.Round(log.TimeSec[i])) > 1e-6)
                continue; // recorders write whole seconds
            DateTime moment = start.UtcDateTime.AddSeconds(Math.Round(log.TimeSec[i]));
            text.Append('B').Append(moment.ToString("HHmmss", CultureInfo.InvariantCulture))
                .Append(DegreesAndMinutes(latitude, 2, 3, "", "NS")).Append(DegreesAndMinutes(log[ChannelRole.Longitude][i], 3, 3, "", "EW"))
                .Append('A').Append(IgcAltitude(altitude)).Append(IgcAltitude(altitude));
            if (noise)
                text.Append(Math.Min(999, Math.Round(level * 999)).ToString("000", CultureInfo.InvariantCulture));
            text.Append("\r\n");
        }
        text.Append("G0000000000000000\r\n");
        return Encoding.ASCII.GetBytes(text.ToString());
    }

    /// <summary>A GPX 1.1 track with every fix.</summary>
    /// <exception cref="ArgumentException">The log lacks date or position.</exception>
    public static byte[] Gpx(FlightLog log)
    {
        ArgumentNullException.ThrowIfNull(log);
        DateTimeOffset start = Needed(log, ChannelRole.Longitude);
        var text = new StringBuilder("<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<gpx version=\"1.1\" creator=\"TrimFit\" xmlns=\"http://www.topografix.com/GPX/1/1\">\n<trk><trkseg>\n");
        double altitude = double.NaN;
        for (int i = 0; i < log.Count; i++)
        {
            if (log.Has(ChannelRole.Altitude))
                altitude = Held(log[ChannelRole.Altitude][i], altitude);
            double latitude = log[ChannelRole.Latitude][i];
            if (double.IsNaN(latitude))
                continue;
            text.Append("<trkpt lat=\"").Append(Fixed(double.RadiansToDegrees(latitude), 8))
                .Append("\" lon=\"").Append(Fixed(double.RadiansToDegrees(log[ChannelRole.Longitude][i]), 8)).Append("\">");
            if (!double.IsNaN(altitude))
                text.Append("<ele>").Append(Fixed(altitude, 2)).Append("</ele>");
            text.Append("<time>").Append(Moment(start, log.TimeSec[i]).ToString("yyyy-MM-ddTHH:mm:ss.fff'Z'", CultureInfo.InvariantCulture)).Append("</time></trkpt>\n");
        }
        text.Append("</trkseg></trk>\n</gpx>\n");
        return Encoding.UTF8.GetBytes(text.ToString());
    }

    /// <summary>NMEA 0183 sentences of every fix: RMC, GGA and VTG, each with its checksum.</summary>
    /// <exception cref="ArgumentException">The log lacks date, position, speed or course.</exception>
    public static byte[] Nmea(FlightLog log)
    {
        ArgumentNullException.ThrowIfNull(log);
        DateTimeOffset start = Needed(log, ChannelRole.GroundSpeed);
        var text = new StringBuilder();
        double altitude = double.NaN;
        for (int i = 0; i < log.Count; i++)
        {
            if (log.Has(ChannelRole.Altitude))
                altitude = Held(log[ChannelRole.Altitude][i], altitude);
            double latitude = log[ChannelRole.Latitude][i];
            if (double.IsNaN(latitude))
                continue;
            DateTime moment = Moment(start, log.TimeSec[i]);
            string clock = moment.ToString("HHmmss.ff", CultureInfo.InvariantCulture);
            string place = DegreesAndMinutes(latitude, 2, 5, ".", "NS", ",") + "," + DegreesAndMinutes(log[ChannelRole.Longitude][i], 3, 5, ".", "EW", ",");
            double metersPerSec = log[ChannelRole.GroundSpeed][i];
            string knots = Fixed(metersPerSec / MetersPerSecondPerKnot, 3);
            string course = Fixed(double.RadiansToDegrees(log[ChannelRole.GroundCourse][i]), 2);
            string height = double.IsNaN(altitude) ? "" : Fixed(altitude, 1);
            Sentence($"GPRMC,{clock},A,{place},{knots},{course},{moment.ToString("ddMMyy", CultureInfo.InvariantCulture)},,,A");
            Sentence($"GPGGA,{clock},{place},1,09,0.9,{height},M,0.0,M,,");
            Sentence($"GPVTG,{course},T,,M,{knots},N,{Fixed(metersPerSec * 3.6, 3)},K,A");
        }
        return Encoding.ASCII.GetBytes(text.ToString());

        void Sentence(string body)
        {
            int checksum = 0;
            foreach (char c in body)
                checksum ^= c;
            text.Append('$').Append(body).Append('*').Append(checksum.ToString("X2", CultureInfo.InvariantCulture)).Append("\r\n");
        }
    }

    private static DateTimeOffset Needed(FlightLog log, ChannelRole last)
    {
        foreach (ChannelRole role in new[] { ChannelRole.Latitude, ChannelRole.Longitude, last })
        {
            if (!log.Has(role))
                throw new ArgumentException("has no " + ChannelRoles.NameOf(role), nameof(log));
        }
        return log.StartUtc ?? throw new ArgumentException("has no date", nameof(log));
    }

    private static double Held(double value, double before) => double.IsNaN(value) ? before : value;

    private static DateTime Moment(DateTimeOffset start, double seconds) => start.UtcDateTime.AddMilliseconds(Math.Round(seconds * 1000));

    private static string IgcAltitude(double meters)
    {
        int whole = (int)Math.Round(meters);
        return whole < 0 ? "-" + (-whole).ToString("0000", CultureInfo.InvariantCulture) : whole.ToString("00000", CultureInfo.InvariantCulture);
    }

    /// <summary>Degrees and minutes, as IGC and NMEA write them.</summary>
    private static string DegreesAndMinutes(double rad, int degreeDigits, int minuteDecimals, string point, string hemispheres, string separator = "")
    {
        long scale = 1;
        for (int i = 0; i < minuteDecimals; i++)
            scale *= 10;
        long units = (long)Math.Round(Math.Abs(double.RadiansToDegrees(rad)) * 60 * scale); // rounded once, so that 60.000 minutes cannot appear
        long degrees = units / (60 * scale);
        long minutes = units / scale % 60;
        string fraction = (units % scale).ToString(new string('0', minuteDecimals), CultureInfo.InvariantCulture);
        return degrees.ToString(new string('0', degreeDigits), CultureInfo.InvariantCulture)
            + minutes.ToString("00", CultureInfo.InvariantCulture) + point + fraction + separator + hemispheres[rad < 0 ? 1 : 0];
    }
}
