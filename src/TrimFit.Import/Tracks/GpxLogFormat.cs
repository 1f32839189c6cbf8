using System.Globalization;
using System.Text;
using System.Xml;
using TrimFit.Core.Logs;
using static System.FormattableString;

namespace TrimFit.Import.Tracks;

/// <summary>GPX 1.0 and 1.1 tracks (topografix.com schema documentation).</summary>
/// <remarks>Read are the track points: position, elevation, time, and speed (m/s) and course (deg), which GPX 1.0 has in the point and 1.1 in its
/// extensions. Names, authors, descriptions and body sensors are passed over. A document type definition is refused: it can only do harm.
/// A file that breaks off, as after a flat battery, gives the points before the break and says so.</remarks>
public sealed class GpxLogFormat : ILogFormat
{
    private const int Latitude = 0, Longitude = 1, Altitude = 2, Speed = 3, Course = 4;

    /// <inheritdoc/>
    public string Name => "GPX";

    /// <inheritdoc/>
    public bool Recognises(ReadOnlySpan<byte> head, string fileName)
    {
        // NULs are dropped so that UTF-16 is seen too.
        string start = Encoding.Latin1.GetString(head[..Math.Min(head.Length, 8192)]).Replace("\0", "", StringComparison.Ordinal);
        ReadOnlySpan<char> rest = start.AsSpan().TrimStart("\u00EF\u00BB\u00BF\u00FF\u00FE \t\r\n"); // byte order marks as Latin-1
        while (rest.StartsWith("<?", StringComparison.Ordinal) || rest.StartsWith("<!", StringComparison.Ordinal))
        {
            string close = rest.StartsWith("<!--", StringComparison.Ordinal) ? "-->" : rest[1] == '?' ? "?>" : ">";
            int end = rest.IndexOf(close, StringComparison.Ordinal);
            if (end < 0)
                return false;
            rest = rest[(end + close.Length)..];
            if (close == ">" && rest.Contains("<gpx", StringComparison.Ordinal))
                return true; // inside a document type definition, which the reader then refuses by name
            rest = rest.TrimStart();
        }
        return rest.StartsWith("<gpx", StringComparison.Ordinal);
    }

    /// <inheritdoc/>
    public LogTable Read(LogSource source, ImportOptions options)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(options);
        using var stream = new HashingStream(source.Open(), source.Length, options.Progress);
        var table = new TrackTable();
        table.AddColumn("lat", ChannelRole.Latitude, "deg", "GPX trkpt");
        table.AddColumn("lon", ChannelRole.Longitude, "deg", "GPX trkpt");
        table.AddColumn("ele", ChannelRole.Altitude, "m", "GPX trkpt");
        table.AddColumn("speed", ChannelRole.GroundSpeed, "m/s", "GPX trkpt");
        table.AddColumn("course", ChannelRole.GroundCourse, "deg", "GPX trkpt");
        DateTimeOffset? origin = null;
        var settings = new XmlReaderSettings
        {
            DtdProcessing = DtdProcessing.Prohibit,
            XmlResolver = null,
            IgnoreComments = true,
            IgnoreProcessingInstructions = true,
            MaxCharactersFromEntities = 1024,
        };
        int line = 0;
        try
        {
            using var reader = XmlReader.Create(stream, settings);
            var place = (IXmlLineInfo)reader;
            while (reader.Read())
            {
                line = place.LineNumber;
                if (reader.NodeType != XmlNodeType.Element || reader.LocalName != "trkpt")
                    continue;
                double[] row = [double.NaN, double.NaN, double.NaN, double.NaN, double.NaN];
                string? latitude = reader.GetAttribute("lat"), longitude = reader.GetAttribute("lon");
                string? time = Point(reader, row);
                if (Number(latitude) is not (>= -90 and <= 90 and double lat) || Number(longitude) is not (>= -180 and <= 180 and double lon))
                    table.LeaveOut("point with a position that is none", line);
                else if (time is null)
                    table.LeaveOut("point without a time", line);
                else if (Moment(time) is not DateTimeOffset moment)
                    table.LeaveOut("point with a time that is none", line);
                else
                {
                    origin ??= moment;
                    row[Latitude] = double.DegreesToRadians(lat);
                    row[Longitude] = double.DegreesToRadians(lon);
                    table.Add((moment - origin.Value).TotalSeconds, row, line);
                }
            }
        }
        catch (XmlException e)
        {
            if (table.Count < 2)
            {
                throw LogFormatException.At(source.Name, e.LineNumber > 0 ? e.LineNumber : null, null, e.Message.Contains("dtd", StringComparison.OrdinalIgnoreCase) ? "a document type definition" : "XML that breaks off or is damaged",
                    "a GPX track", "Export the track again.");
            }
            table.LeaveOut("the file breaks off or is damaged here", Math.Max(line, e.LineNumber));
            table.Warn("gpx_breaks_off", Invariant($"{source.Name} breaks off or is damaged at line {Math.Max(line, e.LineNumber)}; the {table.Count} points before are used."));
        }
        string hash = stream.Finish();
        if (table.Count == 0)
        {
            throw LogFormatException.At(source.Name, null, null, table.RowsRead == 0 ? "a GPX file without a track point" : Invariant($"{table.RowsRead} track points of which none has a position and a time"), "track points with positions and times",
                "Export the recorded track, not a route or waypoints.");
        }
        return table.Build((source.Name, hash, "GPX"), ClockKind.Absolute, origin, options.Strict);
    }

    /// <summary>Reads what is inside a track point; gives its time.</summary>
    private static string? Point(XmlReader reader, double[] row)
    {
        string? time = null;
        if (reader.IsEmptyElement)
            return null;
        int depth = reader.Depth;
        bool read = reader.Read();
        while (read && reader.Depth > depth)
        {
            if (reader.NodeType == XmlNodeType.Element && reader.LocalName is "ele" or "time" or "speed" or "course" && !reader.IsEmptyElement)
            {
                string name = reader.LocalName;
                if (TextOf(reader) is string text)
                {
                    switch (name)
                    {
                        case "time" when reader.Depth == depth + 1:
                            time = text;
                            break;
                        case "ele":
                            row[Altitude] = Number(text) ?? double.NaN;
                            break;
                        case "speed":
                            row[Speed] = Number(text) is double speed and >= 0 ? speed : double.NaN;
                            break;
                        case "course":
                            row[Course] = Number(text) is double course and >= 0 and <= 360 ? double.DegreesToRadians(course) : double.NaN;
                            break;
                        default:
                            break;
                    }
                }
            }
            read = reader.Read();
        }
        return time;
    }

    /// <summary>The text of an element without children; the reader then stands on its end.</summary>
    private static string? TextOf(XmlReader reader)
    {
        int depth = reader.Depth;
        string? text = null;
        while (reader.Read() && reader.Depth > depth)
        {
            if (reader.NodeType is XmlNodeType.Text or XmlNodeType.CDATA)
                text = reader.Value.Trim();
        }
        return text;
    }

    private static double? Number(string? text) =>
        double.TryParse(text, NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent, CultureInfo.InvariantCulture, out double value) && double.IsFinite(value) ? value : null;

    /// <summary>ISO 8601 with an optional fraction; without a zone it is UTC, as the schema says.</summary>
    private static DateTimeOffset? Moment(string text) =>
        text.Length >= 19 && text[4] == '-' && text[10] is 'T' or ' '
        && DateTimeOffset.TryParse(text, CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal | DateTimeStyles.AdjustToUniversal, out DateTimeOffset moment)
            ? moment
            : null;
}
