using TrimFit.Core.Logs;
using static System.FormattableString;

namespace TrimFit.Import.Tracks;

/// <summary>IGC flight recorder files (FAI/IGC Technical Specification for GNSS Flight Recorders, appendix A).</summary>
/// <remarks>Read are the date (H), the additions to a fix (I) and the fixes (B). Names, registrations and recorder numbers in the A, H, L and
/// other records are never looked at. A fix marked V keeps its time, pressure and additions but not its position.</remarks>
public sealed class IgcLogFormat : ILogFormat
{
    private const int FixLength = 35;
    private const double MinutesPerThousandth = 1e-3;

    /// <inheritdoc/>
    public string Name => "IGC";

    /// <inheritdoc/>
    public bool Recognises(ReadOnlySpan<byte> head, string fileName)
    {
        foreach (Range range in head.SplitAny("\r\n"u8))
        {
            ReadOnlySpan<byte> line = head[range];
            if (line.StartsWith("HFDTE"u8) || (line.Length >= 25 && line[0] == 'B' && Digits.Unsigned(line[1..7]) is not null
                && line[14] is (byte)'N' or (byte)'S' && line[23] is (byte)'E' or (byte)'W' && line[24] is (byte)'A' or (byte)'V'))
                return true;
        }
        return false;
    }

    /// <inheritdoc/>
    public LogTable Read(LogSource source, ImportOptions options)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(options);
        using var stream = new HashingStream(source.Open(), source.Length, options.Progress);
        var lines = new ByteLines(stream);
        var table = new TrackTable();
        int latitude = table.AddColumn("latitude", ChannelRole.Latitude, "deg", "IGC B record");
        int longitude = table.AddColumn("longitude", ChannelRole.Longitude, "deg", "IGC B record");
        int pressure = table.AddColumn("pressure altitude", ChannelRole.Pressure, "m", "IGC B record, standard atmosphere");
        int altitude = table.AddColumn("GNSS altitude", ChannelRole.Altitude, "m", "IGC B record");
        List<Addition> additions = [];
        var clock = new DayClock();
        DateOnly? date = null;
        int notThreeDimensional = 0;
        double[] row = [];
        while (lines.Read())
        {
            ReadOnlySpan<byte> line = lines.Current;
            switch (line[0])
            {
                case (byte)'B':
                    if (row.Length == 0)
                        row = new double[4 + additions.Count];
                    if (Fix(line, row, additions, out double secondsOfDay, out bool valid) is string reason)
                    {
                        table.LeaveOut(reason, lines.Number);
                        break;
                    }
                    notThreeDimensional += valid ? 0 : 1;
                    table.Add(clock.Unroll(secondsOfDay), row, lines.Number);
                    break;
                case (byte)'H' when date is null && line.Length > 5 && line[2..5].SequenceEqual("DTE"u8):
                    int digits = line.IndexOfAnyInRange((byte)'0', (byte)'9'); // HFDTE160701 and, since 2015, HFDTEDATE:160701,01
                    date = digits >= 0 && line.Length >= digits + 6 ? Digits.Day(line.Slice(digits, 6)) : null;
                    break;
                case (byte)'I' when row.Length == 0 && additions.Count == 0:
                    additions = Additions(line, table);
                    break;
                case >= (byte)'A' and <= (byte)'Z':
                    break;
                default:
                    table.LeaveOut("not an IGC record", lines.Number);
                    break;
            }
        }
        string hash = stream.Finish();
        if (table.Count == 0)
        {
            throw LogFormatException.At(source.Name, null, null, table.RowsRead == 0 ? "an IGC file without a fix" : "an IGC file without a usable fix", "lines such as B1101355206343N00006198WA0058700558",
                "Copy the file from the recorder again; it may have been cut short.");
        }
        if (!table.HasValues(pressure))
            table.SetAside(pressure); // recorders without a pressure sensor write 0
        if (!table.HasValues(altitude))
        {
            table.SetAside(altitude);
            table.Warn("igc_no_gnss_altitude", $"{source.Name} has no GNSS altitude.");
        }
        if (notThreeDimensional > 0)
            table.Warn("igc_fix_not_valid", Invariant($"{source.Name}: {notThreeDimensional} of {table.Count} fixes are marked V (no three-dimensional position); their positions are not used."));
        if (date is null)
            table.Warn("igc_no_date", $"{source.Name} gives no date (HFDTE line); only its times of day are used.");
        Distrust(table, additions, latitude, longitude, source.Name);
        return table.Build((source.Name, hash, "IGC"), date is null ? ClockKind.TimeOfDay : ClockKind.Absolute,
            date is DateOnly day ? new DateTimeOffset(day.ToDateTime(TimeOnly.MinValue), TimeSpan.Zero) : null, options.Strict);
    }

    /// <summary>Reads a fix into the row; gives the reason when it cannot be used.</summary>
    private static string? Fix(ReadOnlySpan<byte> line, double[] row, List<Addition> additions, out double secondsOfDay, out bool valid)
    {
        secondsOfDay = 0;
        valid = false;
        if (line.Length < FixLength)
            return "fix cut short";
        if (Digits.TimeOfDay(line[1..7]) is not int seconds)
            return "fix without a time";
        secondsOfDay = seconds;
        if (Digits.Unsigned(line[7..9]) is not int latDeg || Digits.Unsigned(line[9..14]) is not int latMin || line[14] is not ((byte)'N' or (byte)'S')
            || Digits.Unsigned(line[15..18]) is not int lonDeg || Digits.Unsigned(line[18..23]) is not int lonMin || line[23] is not ((byte)'E' or (byte)'W')
            || line[24] is not ((byte)'A' or (byte)'V'))
            return "fix with a position that is none";
        if (Digits.Signed(line[25..30]) is not int pressureAltitude || Digits.Signed(line[30..35]) is not int gnssAltitude)
            return "fix with an altitude that is none";
        double latMinutes = latMin * MinutesPerThousandth, lonMinutes = lonMin * MinutesPerThousandth;
        for (int i = 0; i < additions.Count; i++)
        {
            Addition addition = additions[i];
            int? digits = line.Length >= addition.End ? Digits.Unsigned(line[addition.Start..addition.End]) : null;
            row[4 + i] = digits is int value ? addition.ToSi(value) : double.NaN;
            // Further decimals of the minutes and of the seconds; three digits of LAD stand for the fourth to sixth decimal.
            if (digits is int more && addition.Code is "LAD" or "LOD" or "TDS")
            {
                double fraction = more / Math.Pow(10, addition.End - addition.Start);
                latMinutes += addition.Code == "LAD" ? fraction * MinutesPerThousandth : 0;
                lonMinutes += addition.Code == "LOD" ? fraction * MinutesPerThousandth : 0;
                secondsOfDay += addition.Code == "TDS" ? fraction : 0;
            }
        }
        double lat = (latDeg + (latMinutes / 60)) * (line[14] == 'S' ? -1 : 1), lon = (lonDeg + (lonMinutes / 60)) * (line[23] == 'W' ? -1 : 1);
        if (latMin >= 60_000 || lonMin >= 60_000 || Math.Abs(lat) > 90 || Math.Abs(lon) > 180)
            return "fix with a position that is none";
        valid = line[24] == 'A' && (latDeg, latMin, lonDeg, lonMin) != (0, 0, 0, 0); // recorders without a fix write zeros
        row[0] = valid ? double.DegreesToRadians(lat) : double.NaN;
        row[1] = valid ? double.DegreesToRadians(lon) : double.NaN;
        row[2] = StandardAtmosphere.Pressure(pressureAltitude);
        row[3] = valid ? gnssAltitude : double.NaN;
        return null;
    }

    /// <summary>The I record: how many additions, then first byte, last byte and three-letter code of each.</summary>
    private static List<Addition> Additions(ReadOnlySpan<byte> line, TrackTable table)
    {
        var additions = new List<Addition>();
        if (line.Length < 3 || Digits.Unsigned(line[1..3]) is not int count)
            return additions;
        for (int i = 0; i < count && line.Length >= 10 + (7 * i); i++)
        {
            ReadOnlySpan<byte> part = line.Slice(3 + (7 * i), 7);
            if (Digits.Unsigned(part[..2]) is not int first || Digits.Unsigned(part[2..4]) is not int last || first <= FixLength || last < first || last - first > 8)
                continue;
            string code = System.Text.Encoding.Latin1.GetString(part[4..]);
            bool hasMotorNoise = additions.Exists(a => a.Code is "ENL" or "MOP");
            (ChannelRole? role, string unit) = code switch
            {
                "ENL" or "MOP" when !hasMotorNoise => (ChannelRole.EngineNoise, "of 999"),
                "GSP" => (ChannelRole.GroundSpeed, "km/h"),
                "TRT" => (ChannelRole.GroundCourse, "deg"),
                "HDT" => (ChannelRole.Heading, "deg"),
                _ => ((ChannelRole?)null, ""),
            };
            additions.Add(new(code, first - 1, last, table.AddColumn(code, role, unit, "IGC I record")));
        }
        return additions;
    }

    /// <summary>Sets the recorder's own speed and course aside when the positions contradict the speed: recorders differ in its unit.</summary>
    private static void Distrust(TrackTable table, List<Addition> additions, int latitude, int longitude, string name)
    {
        if (additions.Find(a => a.Code == "GSP") is not Addition speed)
            return;
        IReadOnlyList<double> lat = table.Values(latitude), lon = table.Values(longitude), own = table.Values(speed.Column);
        double[] fromPositions = TrackSpeed.Between(table.Times, lat, lon);
        var ratios = new List<double>();
        for (int i = 1; i < own.Count; i++)
        {
            if (fromPositions[i] > 3 && own[i] > 0)
                ratios.Add(own[i] / fromPositions[i]);
        }
        ratios.Sort();
        if (ratios.Count < 20 || ratios[ratios.Count / 2] is > 0.8 and < 1.25)
            return;
        table.SetAside(speed.Column);
        table.Warn("igc_speed_unit", Invariant($"{name}: the recorder's ground speed (GSP) is {ratios[ratios.Count / 2]:F2} times the speed between its positions; it is not used."));
    }

    private sealed record Addition(string Code, int Start, int End, int Column)
    {
        public double ToSi(int digits) => Code switch
        {
            "ENL" or "MOP" => digits / (Math.Pow(10, End - Start) - 1), // 000 to 999
            "GSP" => digits / 3.6,
            "TRT" or "HDT" => double.DegreesToRadians(digits),
            _ => digits,
        };
    }
}
