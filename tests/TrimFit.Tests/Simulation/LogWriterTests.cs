using System.Globalization;
using System.Text;
using System.Xml.Linq;
using TrimFit.Core.Logs;
using TrimFit.Simulation;

namespace TrimFit.Tests.Simulation;

public class LogWriterTests
{
    private static readonly DateTimeOffset _start = new(2025, 5, 17, 23, 59, 58, TimeSpan.Zero);

    /// <summary>Three rows, the second without a fix.</summary>
    private static FlightLog Small() => FlightLog.Create(
        [0, 0.5, 1],
        new Dictionary<ChannelRole, double[]>
        {
            [ChannelRole.Rpm] = [40, 39.5, double.NaN],
            [ChannelRole.YawRate] = [Math.PI / 180, -Math.PI / 90, 0],
            [ChannelRole.BrakeLeft] = [0.05, -0.00001, 0.0123],
            [ChannelRole.Latitude] = [Math.PI / -4, double.NaN, Rad(-45.9999999)],
            [ChannelRole.Longitude] = [Rad(120.5), double.NaN, Rad(-0.25)],
            [ChannelRole.GroundSpeed] = [10, double.NaN, 12],
            [ChannelRole.GroundCourse] = [Math.PI, double.NaN, Math.PI / 2],
            [ChannelRole.Altitude] = [250.44, double.NaN, -3.6],
            [ChannelRole.EngineNoise] = [0.5, double.NaN, double.NaN],
        },
        new() { StartUtc = _start, BrakeUnit = ControlUnit.Meter });

    [Fact]
    public void The_plain_dialect_is_comma_point_and_blank() => Assert.Equal(
        """
        time_s,rpm,gyro_z_dps,brake_left_mm,engine_noise_pct,lat_deg,lon_deg,speed_kmh,course_deg,altitude_m
        0.00,2400,1.00,50.0,50.0,-45.0000000,120.5000000,36.00,180.00,250.4
        0.50,2370,-2.00,0.0,,,,,,
        1.00,,0.00,12.3,,-45.9999999,-0.2500000,43.20,90.00,-3.6

        """.ReplaceLineEndings("\n"),
        Encoding.UTF8.GetString(LogWriters.Csv(Small())));

    [Theory]
    [InlineData("semicolon", "\uFEFFTime [s];Engine speed [rpm];Yaw rate [°/s];Brake left [mm]\r\n0,00;2400;1,00;50,0\r\n0,50;2370;-2,00;0,0\r\n1,00;;0,00;12,3\r\n")]
    [InlineData("tab", "time_utc\trpm\tgyro_z_dps\tbrake_left_mm\n2025-05-17T23:59:58.000Z\t2400\t1.00\t50.0\n2025-05-17T23:59:58.500Z\t2370\t-2.00\t0.0\n2025-05-17T23:59:59.000Z\tn/a\t0.00\t12.3\n")]
    [InlineData("pipe", "unix_time_ms|rpm|gyro_z_dps|brake_left_mm|\n1747526398000|2400|1.00|50.0|\n1747526398500|2370|-2.00|0.0|\n1747526399000||0.00|12.3|\n")]
    [InlineData("units_row", "Unix time,Engine speed,Yaw rate,Brake left\rs,rpm,°/s,mm\r1747526398.00,2400,1.00,50.0\r1747526398.50,2370,-2.00,0.0\r1747526399.00,NaN,0.00,12.3\r")]
    [InlineData("preamble", "# flight log, made up\n# firmware: 0.0\nsample interval;0.1 s\n\ntime_s,rpm,gyro_z_dps,brake_left_mm\n0.00,2400,1.00,50.0\n0.50,2370,-2.00,0.0\n1.00,-,0.00,12.3\n")]
    [InlineData("long", "time_utc,channel,value\n2025-05-17T23:59:58.000Z,rpm,2400\n2025-05-17T23:59:58.000Z,gyro_z_dps,1.00\n2025-05-17T23:59:58.000Z,brake_left_mm,50.0\n2025-05-17T23:59:58.500Z,rpm,2370\n2025-05-17T23:59:58.500Z,gyro_z_dps,-2.00\n2025-05-17T23:59:58.500Z,brake_left_mm,0.0\n2025-05-17T23:59:59.000Z,gyro_z_dps,0.00\n2025-05-17T23:59:59.000Z,brake_left_mm,12.3\n")]
    public void Dialects_write_what_their_names_say(string name, string text) =>
        Assert.Equal(text, Encoding.UTF8.GetString(LogWriters.Csv(Small(), CsvDialects.All[name], new HashSet<ChannelRole> { ChannelRole.Rpm, ChannelRole.YawRate, ChannelRole.BrakeLeft })));

    [Fact]
    public void Encodings_are_those_named()
    {
        var rate = new HashSet<ChannelRole> { ChannelRole.YawRate };
        Assert.StartsWith("\uFEFFTime [s]\tYaw rate [°/s]\r\n", Encoding.Unicode.GetString(LogWriters.Csv(Small(), CsvDialects.All["utf16"], rate)), StringComparison.Ordinal);
        byte[] bare = LogWriters.Csv(Small(), CsvDialects.All["utf16_without_mark"], rate);
        Assert.Equal([(byte)'t', 0, (byte)'i', 0], bare[..4]);
        byte[] ansi = LogWriters.Csv(Small(), CsvDialects.All["windows_1252"], rate);
        Assert.Contains((byte)0xB0, ansi); // the degree sign in Windows-1252
        Assert.StartsWith("Date,Time UTC,Yaw rate [", Encoding.Latin1.GetString(ansi), StringComparison.Ordinal);
        Assert.Contains("\n2025-05-17,23:59:58.500,-2.00\n", Encoding.Latin1.GetString(ansi), StringComparison.Ordinal);
    }

    [Fact]
    public void Every_digit_gives_the_same_number_back()
    {
        string[] rows = Encoding.UTF8.GetString(LogWriters.Csv(Small(), CsvDialects.All["every_digit"], new HashSet<ChannelRole> { ChannelRole.BrakeLeft })).Split('\n');
        Assert.Equal(-0.00001 * 1000, double.Parse(rows[2].Split(',')[1], CultureInfo.InvariantCulture));
        Assert.DoesNotContain("E", rows[2], StringComparison.OrdinalIgnoreCase);
    }

    [Fact]
    public void A_restart_repeats_the_header_and_ends_lines_oddly()
    {
        CsvDialect dialect = CsvDialects.All["restart"] with { RepeatHeaderEvery = 2 };
        Assert.Equal("time_ms,rpm\r\r\n0,2400\r\r\n500,2370\r\r\n",
            Encoding.UTF8.GetString(LogWriters.Csv(Small(), dialect, new HashSet<ChannelRole> { ChannelRole.Rpm })));
        Assert.Equal("time_ms,gyro_z_dps\r\r\n0,1.00\r\r\n500,-2.00\r\r\ntime_ms,gyro_z_dps\r\r\n1000,0.00\r\r\n",
            Encoding.UTF8.GetString(LogWriters.Csv(Small(), dialect, new HashSet<ChannelRole> { ChannelRole.YawRate })));
    }

    [Fact]
    public void A_logger_may_run_on_its_own_clock() => Assert.Equal(
        "time_s,rpm\n17.40,2400\n17.90,2370\n",
        Encoding.UTF8.GetString(LogWriters.Csv(Small(), new() { ClockOffsetSec = 17.4 }, new HashSet<ChannelRole> { ChannelRole.Rpm })));

    [Fact]
    public void A_comma_is_not_both_separator_and_decimal_mark()
    {
        ArgumentException fault = Assert.Throws<ArgumentException>(() => LogWriters.Csv(Small(), new() { DecimalComma = true }));
        Assert.Equal("a comma cannot be both separator and decimal mark (Parameter 'dialect')", fault.Message);
    }

    [Fact]
    public void Igc_records_hold_time_place_and_noise_level() => Assert.Equal(
        "AXXX001\r\nHFDTEDATE:170525,01\r\nHFPLTPILOTINCHARGE:nobody\r\nHFGTYGLIDERTYPE:made up\r\nHFDTMGPSDATUM:WGS84\r\nI013638ENL\r\n" +
        "B2359584500000S12030000EA0025000250500\r\nB2359594600000S00015000WA-0004-0004500\r\nG0000000000000000\r\n", // 45.9999999 degrees round to 46, not to 45 degrees 60
        Encoding.ASCII.GetString(LogWriters.Igc(Small(), "nobody")));

    [Fact]
    public void Gpx_is_a_track_with_time()
    {
        XNamespace gpx = "http://www.topografix.com/GPX/1/1";
        XElement[] points = [.. XDocument.Parse(Encoding.UTF8.GetString(LogWriters.Gpx(Small()))).Descendants(gpx + "trkpt")];
        Assert.Equal(2, points.Length);
        Assert.Equal("-45.00000000", points[0].Attribute("lat")!.Value);
        Assert.Equal("120.50000000", points[0].Attribute("lon")!.Value);
        Assert.Equal("2025-05-17T23:59:59.000Z", points[1].Element(gpx + "time")!.Value);
        Assert.Equal("-3.60", points[1].Element(gpx + "ele")!.Value);
    }

    [Fact]
    public void Nmea_sentences_carry_their_checksum()
    {
        string[] lines = Encoding.ASCII.GetString(LogWriters.Nmea(Small())).Split("\r\n", StringSplitOptions.RemoveEmptyEntries);
        Assert.Equal(6, lines.Length);
        Assert.StartsWith("$GPRMC,235958.00,A,4500.00000,S,12030.00000,E,19.438,180.00,170525,,,A*", lines[0], StringComparison.Ordinal);
        Assert.StartsWith("$GPGGA,235958.00,4500.00000,S,12030.00000,E,1,09,0.9,250.4,M,0.0,M,,*", lines[1], StringComparison.Ordinal);
        foreach (string line in lines)
        {
            string body = line[1..line.IndexOf('*', StringComparison.Ordinal)];
            Assert.Equal(line[^2..], body.Aggregate(0, (sum, c) => sum ^ c).ToString("X2", CultureInfo.InvariantCulture));
        }
    }

    [Fact]
    public void A_writer_says_what_its_log_lacks()
    {
        FlightLog bare = FlightLog.Create([0, 1], new Dictionary<ChannelRole, double[]> { [ChannelRole.Rpm] = [1, 2] });
        Assert.Equal("has no latitude (Parameter 'log')", Assert.Throws<ArgumentException>(() => LogWriters.Igc(bare)).Message);
        Assert.Equal("has no date, which this way of writing time needs (Parameter 'log')",
            Assert.Throws<ArgumentException>(() => LogWriters.Csv(bare, CsvDialects.All["tab"])).Message);
        Assert.Equal("has no three-axis gyro: set inertial_hz in [sensors] (Parameter 'log')",
            Assert.Throws<ArgumentException>(() => FlightFiles.PhoneFolder(bare, "phone")).Message);
    }

    [Theory]
    [InlineData("de-DE")]
    [InlineData("tr-TR")]
    [InlineData("ar-SA")]
    public void Files_are_the_same_in_every_culture(string culture)
    {
        SimulatedFlight flight = FlightSimulator.Fly(new Scenario { Legs = [new() { DurationSec = 5 }] });
        string[] expected = [.. FlightFiles.Of(flight, "x").Select(f => Encoding.UTF8.GetString(f.Content.Span))];
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo(culture);
            SimulatedFlight again = FlightSimulator.Fly(new Scenario { Legs = [new() { DurationSec = 5 }] });
            Assert.Equal(expected, FlightFiles.Of(again, "x").Select(f => Encoding.UTF8.GetString(f.Content.Span)));
            Assert.Equal(LogWriters.Nmea(flight.Log), LogWriters.Nmea(again.Log));
            Assert.Equal(LogWriters.Igc(flight.Log), LogWriters.Igc(again.Log));
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    [Theory]
    [InlineData(LogSet.Csv, "x.csv")]
    [InlineData(LogSet.EngineCsvAndIgc, "x-engine.csv x.igc")]
    [InlineData(LogSet.EngineCsvAndGpx, "x-engine.csv x.gpx")]
    [InlineData(LogSet.EngineCsvAndNmea, "x-engine.csv x.nmea")]
    [InlineData(LogSet.PhoneAndGpx, "x-phone/gyroscope.csv x-phone/accelerometer.csv x-phone/location.csv x-phone/barometer.csv x.gpx x-engine.csv")]
    [InlineData(LogSet.Igc, "x.igc")]
    public void A_set_of_logs_has_its_files(LogSet set, string names)
    {
        Scenario s = new() { Legs = [new() { DurationSec = 5 }], Sensors = new() { InertialHz = 50 }, Output = new() { Logs = set, EngineClockOffsetSec = 17.4 } };
        SimulatedFlight flight = FlightSimulator.Fly(s);
        Assert.Equal(names.Split(' '), FlightFiles.Logs(flight, "x").Select(f => f.Name));
        Assert.Equal([.. names.Split(' '), "x-rig.toml", "x-sheet.toml", "x-truth.json"], FlightFiles.Of(flight, "x").Select(f => f.Name));
        FlightFile? engine = FlightFiles.Logs(flight, "x").FirstOrDefault(f => f.Name == "x-engine.csv");
        if (engine is not null)
        {
            string text = Encoding.UTF8.GetString(engine.Content.Span);
            Assert.DoesNotContain("lat_deg", text, StringComparison.Ordinal);
            Assert.Contains("\n17.40,", text, StringComparison.Ordinal);
        }
    }

    private static double Rad(double degrees) => double.DegreesToRadians(degrees);
}
