using TrimFit.Core.Logs;
using static System.FormattableString;

namespace TrimFit.Import.Tracks;

/// <summary>NMEA 0183 recordings: RMC, GGA and VTG sentences of any talker, with their checksum.</summary>
/// <remarks>Sentences of one time make one row. A row is counted once however many sentences it took; a sentence that cannot be used counts as
/// a row left out. Other sentences are passed over.</remarks>
public sealed class NmeaLogFormat : ILogFormat
{
    private const double MetersPerSecPerKnot = 1852.0 / 3600; // exact: nautical mile of 1929

    /// <inheritdoc/>
    public string Name => "NMEA";

    /// <inheritdoc/>
    public bool Recognises(ReadOnlySpan<byte> head, string fileName)
    {
        foreach (Range range in head.SplitAny("\r\n"u8))
        {
            ReadOnlySpan<byte> line = head[range];
            if (line.Length > 7 && line[0] == '$' && line[6] == ',' && line[3..6] is [(byte)'R', (byte)'M', (byte)'C'] or [(byte)'G', (byte)'G', (byte)'A'] or [(byte)'V', (byte)'T', (byte)'G'])
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
        var rows = new EpochRows();
        while (lines.Read())
        {
            ReadOnlySpan<byte> line = lines.Current;
            if (line[0] != '$')
            {
                rows.Table.LeaveOut("not an NMEA sentence", lines.Number);
                continue;
            }
            int star = line.LastIndexOf((byte)'*');
            ReadOnlySpan<byte> body = star > 0 ? line[1..star] : line[1..];
            if (body.Length < 6 || body[2..5] is not ([(byte)'R', (byte)'M', (byte)'C'] or [(byte)'G', (byte)'G', (byte)'A'] or [(byte)'V', (byte)'T', (byte)'G']))
                continue;
            if (star < 0)
            {
                rows.Table.LeaveOut("sentence without a checksum", lines.Number);
                continue;
            }
            if (!ChecksumHolds(body, line[(star + 1)..]))
            {
                rows.Table.LeaveOut("checksum does not agree", lines.Number);
                continue;
            }
            if (!rows.Take(body, lines.Number))
                rows.Table.LeaveOut("sentence with a field that is none", lines.Number);
        }
        rows.Flush();
        string hash = stream.Finish();
        TrackTable table = rows.Table;
        if (table.Count == 0)
        {
            throw LogFormatException.At(source.Name, null, null, Invariant($"an NMEA file without a usable fix in {table.RowsRead} rows"), "RMC or GGA sentences with a position and a checksum",
                "Record again under open sky, with RMC and GGA switched on.");
        }
        if (rows.Date is null)
            table.Warn("nmea_no_date", $"{source.Name} gives no date (RMC sentence); only its times of day are used.");
        return table.Build((source.Name, hash, "NMEA 0183"), rows.Date is null ? ClockKind.TimeOfDay : ClockKind.Absolute,
            rows.Date is DateOnly day ? new DateTimeOffset(day.ToDateTime(TimeOnly.MinValue), TimeSpan.Zero) : null, options.Strict);
    }

    /// <summary>The exclusive or of all characters between <c>$</c> and <c>*</c>, as two hexadecimal digits.</summary>
    internal static bool ChecksumHolds(ReadOnlySpan<byte> body, ReadOnlySpan<byte> digits)
    {
        int sum = 0;
        foreach (byte b in body)
            sum ^= b;
        digits = digits.TrimEnd((byte)' ');
        return digits.Length == 2 && Hex(digits[0]) is int high && Hex(digits[1]) is int low && (high << 4) + low == sum;
    }

    private static int? Hex(byte b) => b switch
    {
        >= (byte)'0' and <= (byte)'9' => b - '0',
        >= (byte)'A' and <= (byte)'F' => b - 'A' + 10,
        >= (byte)'a' and <= (byte)'f' => b - 'a' + 10,
        _ => null,
    };

    /// <summary>Gathers the sentences of one time into a row.</summary>
    private sealed class EpochRows
    {
        private const int Latitude = 0, Longitude = 1, Altitude = 2, Speed = 3, Course = 4;

        private readonly DayClock _clock = new();
        private readonly double[] _row = [double.NaN, double.NaN, double.NaN, double.NaN, double.NaN];
        private double? _secondsOfDay;
        private DateOnly? _rowDate;
        private int _line;

        public EpochRows()
        {
            Table.AddColumn("latitude", ChannelRole.Latitude, "deg", "NMEA RMC or GGA");
            Table.AddColumn("longitude", ChannelRole.Longitude, "deg", "NMEA RMC or GGA");
            Table.AddColumn("altitude", ChannelRole.Altitude, "m", "NMEA GGA");
            Table.AddColumn("speed", ChannelRole.GroundSpeed, "kt", "NMEA RMC or VTG");
            Table.AddColumn("course", ChannelRole.GroundCourse, "deg", "NMEA RMC or VTG");
        }

        public TrackTable Table { get; } = new();

        /// <summary>Day of the first row's midnight; null until a sentence gave a date.</summary>
        public DateOnly? Date { get; private set; }

        /// <summary>Takes a sentence; false when a field is not what it must be.</summary>
        public bool Take(ReadOnlySpan<byte> body, int line)
        {
            var fields = new List<Range>();
            foreach (Range range in body.Split((byte)','))
                fields.Add(range);
            return body[2..5] switch
            {
                [(byte)'R', ..] => Rmc(body, fields, line),
                [(byte)'G', ..] => Gga(body, fields, line),
                _ => Vtg(body, fields),
            };
        }

        /// <summary>Ends the row under way.</summary>
        public void Flush()
        {
            if (_secondsOfDay is not double seconds)
                return;
            _secondsOfDay = null;
            if (_row.AsSpan().IndexOfAnyExcept(double.NaN) < 0)
            {
                Table.LeaveOut("no fix", _line);
                return;
            }
            double time = _clock.Unroll(seconds);
            if (Date is null && _rowDate is DateOnly date)
                Date = date.AddDays(-_clock.Days);
            Table.Add(time, _row, _line);
            Array.Fill(_row, double.NaN);
            _rowDate = null;
        }

        private bool Rmc(ReadOnlySpan<byte> body, List<Range> fields, int line)
        {
            if (fields.Count < 10)
                return false;
            if (body[fields[1]].IsEmpty)
                return NoFix(line);
            if (Time(body[fields[1]]) is not double seconds)
                return false;
            Begin(seconds, line);
            if (!body[fields[2]].SequenceEqual("A"u8))
                return body[fields[2]].SequenceEqual("V"u8); // V: the receiver warns, so nothing of it is used
            DateOnly? day = Digits.Day(body[fields[9]]);
            if (Digits.Decimal(body[fields[7]]) is not double speed || speed < 0 || Digits.Decimal(body[fields[8]]) is not double course
                || (day is null && !body[fields[9]].IsEmpty) || !Position(body, fields, 3))
                return false;
            _rowDate ??= day;
            _row[Speed] = speed * MetersPerSecPerKnot;
            _row[Course] = double.DegreesToRadians(course);
            return true;
        }

        private bool Gga(ReadOnlySpan<byte> body, List<Range> fields, int line)
        {
            if (fields.Count < 11)
                return false;
            if (body[fields[1]].IsEmpty)
                return NoFix(line);
            if (Time(body[fields[1]]) is not double seconds)
                return false;
            Begin(seconds, line);
            if (body[fields[6]].IsEmpty || body[fields[6]].SequenceEqual("0"u8))
                return true; // no fix
            if (Digits.Decimal(body[fields[9]]) is not double altitude || !Position(body, fields, 2))
                return false;
            _row[Altitude] = altitude;
            return true;
        }

        private bool Vtg(ReadOnlySpan<byte> body, List<Range> fields)
        {
            if (fields.Count < 8 || Digits.Decimal(body[fields[1]]) is not double course || Digits.Decimal(body[fields[5]]) is not double speed || speed < 0)
                return false;
            if (_secondsOfDay is null)
                return true; // has no time of its own, and no row is under way
            _row[Course] = double.IsNaN(_row[Course]) ? double.DegreesToRadians(course) : _row[Course];
            _row[Speed] = double.IsNaN(_row[Speed]) ? speed * MetersPerSecPerKnot : _row[Speed];
            return true;
        }

        private bool NoFix(int line)
        {
            Table.LeaveOut("no fix", line);
            return true;
        }

        private void Begin(double seconds, int line)
        {
            if (_secondsOfDay == seconds)
                return;
            Flush();
            (_secondsOfDay, _line) = (seconds, line);
        }

        private bool Position(ReadOnlySpan<byte> body, List<Range> fields, int first)
        {
            double? latitude = Angle(body[fields[first]], 2, body[fields[first + 1]], (byte)'N', (byte)'S', 90);
            double? longitude = Angle(body[fields[first + 2]], 3, body[fields[first + 3]], (byte)'E', (byte)'W', 180);
            if (latitude is null || longitude is null)
                return false;
            (_row[Latitude], _row[Longitude]) = (latitude.Value, longitude.Value);
            return true;
        }

        /// <summary>An angle, rad, from <c>ddmm.mmm</c> and its side.</summary>
        private static double? Angle(ReadOnlySpan<byte> text, int degreeDigits, ReadOnlySpan<byte> side, byte positive, byte negative, double limit)
        {
            if (text.Length < degreeDigits + 2 || side.Length != 1 || (side[0] != positive && side[0] != negative)
                || Digits.Unsigned(text[..degreeDigits]) is not int degrees || Digits.Decimal(text[degreeDigits..]) is not (>= 0 and < 60 and double minutes))
                return null;
            double angle = degrees + (minutes / 60);
            return angle <= limit ? double.DegreesToRadians(side[0] == negative ? -angle : angle) : null;
        }

        /// <summary>Seconds since midnight from <c>hhmmss</c> with an optional fraction.</summary>
        private static double? Time(ReadOnlySpan<byte> text)
        {
            if (text.Length < 6 || Digits.TimeOfDay(text[..6]) is not int whole)
                return null;
            if (text.Length == 6)
                return whole;
            return text[6] == '.' && Digits.Decimal(text[6..]) is double fraction ? whole + (double.IsNaN(fraction) ? 0 : fraction) : text.Length == 7 && text[6] == '.' ? whole : null;
        }
    }
}
