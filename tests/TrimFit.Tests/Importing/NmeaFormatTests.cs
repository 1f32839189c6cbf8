using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Import;
using TrimFit.Import.Tracks;

namespace TrimFit.Tests.Importing;

public class NmeaFormatTests
{
    private static readonly NmeaLogFormat _nmea = new();

    // Widely reproduced examples of NMEA 0183 sentences with valid checksums.
    private const string Rmc = "$GPRMC,123519,A,4807.038,N,01131.000,E,022.4,084.4,230394,003.1,W*6A";
    private const string Gga = "$GPGGA,123519,4807.038,N,01131.000,E,1,08,0.9,545.4,M,46.9,M,,*47";

    [Fact]
    public void RMC_gives_time_position_speed_and_course()
    {
        LogTable table = _nmea.Read("n.nmea", Rmc + "\r\n");
        Assert.Equal(new DateTimeOffset(1994, 3, 23, 12, 35, 19, TimeSpan.Zero), table.Origin!.Value.AddSeconds(table.TimeSec[0]));
        Accuracy.AgreesTo(12, 48.1173 * Math.PI / 180, table.Columns[ChannelRole.Latitude][0]);
        Accuracy.AgreesTo(12, (11 + (31.0 / 60)) * Math.PI / 180, table.Columns[ChannelRole.Longitude][0]);
        Accuracy.AgreesTo(7, 11.523556, table.Columns[ChannelRole.GroundSpeed][0]); // 22.4 kt, 1 kt = 1852 m/h
        Accuracy.AgreesTo(12, 84.4 * Math.PI / 180, table.Columns[ChannelRole.GroundCourse][0]);
    }

    [Theory]
    [InlineData("$GPRMC,222414.00,A,4915.3920,N,12259.8072,W,000.2,242.0,211210,,,A*49", 49.2565333333, -122.99678666667, 2010, 12, 21, 22, 24, 14)]
    [InlineData("$GPRMC,001207.00,A,4911.2236,N,12254.4779,W,012.3,201.0,170109,,*2D", 49.18706, -122.907965, 2009, 1, 17, 0, 12, 7)]
    [InlineData("$GPRMC,225446,A,4916.45,N,12311.12,W,000.5,054.7,191194,020.3,E*68", 49.2741666667, -123.1853333333, 1994, 11, 19, 22, 54, 46)]
    [InlineData("$GPRMC,081836,A,3751.65,S,14507.36,E,000.0,360.0,130998,011.3,E*62", -37.8608333333, 145.1226666667, 1998, 9, 13, 8, 18, 36)]
    public void Sentences_in_circulation_are_read(string sentence, double latitude, double longitude, int year, int month, int day, int hour, int minute, int second)
    {
        LogTable table = _nmea.Read("n.nmea", sentence);
        Assert.Equal(new DateTimeOffset(year, month, day, hour, minute, second, TimeSpan.Zero), table.Origin!.Value.AddSeconds(table.TimeSec[0]));
        Accuracy.AgreesTo(9, latitude * Math.PI / 180, table.Columns[ChannelRole.Latitude][0]);   // by hand: degrees + minutes/60
        Accuracy.AgreesTo(9, longitude * Math.PI / 180, table.Columns[ChannelRole.Longitude][0]);
    }

    [Fact]
    public void Sentences_of_one_time_make_one_row()
    {
        LogTable table = _nmea.Read("n.nmea", $"{Gga}\n{Rmc}\n{Sum("GPRMC,123520,A,4807.040,N,01131.000,E,,,230394,,")}\n{Sum("GPVTG,90.0,T,,M,10.0,N,18.5,K")}\n");
        Assert.Equal([45_319, 45_320], table.TimeSec);
        Assert.Equal([545.4, double.NaN], table.Columns[ChannelRole.Altitude]);
        Accuracy.AgreesTo(7, 5.1444444, table.Columns[ChannelRole.GroundSpeed][1]); // VTG fills what RMC leaves blank: 10 kt
        Accuracy.AgreesTo(12, Math.PI / 2, table.Columns[ChannelRole.GroundCourse][1]);
    }

    [Fact]
    public void Without_RMC_only_times_of_day_are_known_and_that_is_said()
    {
        LogTable table = _nmea.Read("n.nmea", Gga);
        Assert.Equal(ClockKind.TimeOfDay, table.Clock);
        Assert.Equal([new Notice("nmea_no_date", "n.nmea gives no date (RMC sentence); only its times of day are used.")], table.Warnings);
    }

    [Fact]
    public void The_date_is_that_of_the_first_row_when_the_first_RMC_comes_after_midnight()
    {
        LogTable table = _nmea.Read("n.nmea", $"{Sum("GPGGA,235959,4807.038,N,01131.000,E,1,08,0.9,545.4,M,46.9,M,,")}\n{Sum("GPRMC,000000,A,4807.038,N,01131.000,E,1,2,240394,,")}\n");
        Assert.Equal(new DateTimeOffset(1994, 3, 23, 0, 0, 0, TimeSpan.Zero), table.Origin);
        Assert.Equal([86_399, 86_400], table.TimeSec);
    }

    [Fact]
    public void Bad_lines_are_counted_by_reason_with_their_first_line()
    {
        LogTable table = _nmea.Read("n.nmea", string.Join('\n', Rmc, Rmc.Replace("*6A", "*6B", StringComparison.Ordinal), Rmc[..^3], "hello", Sum("GPRMC,,V,,,,,,,,,,N"), Sum("GPRMC,123521,V,,,,,,,230394,,,N"),
            Sum("GPRMC,123522,A,4867.038,N,01131.000,E,022.4,084.4,230394,003.1,W"), Sum("GPGSV,1,1,00"), Sum("GPRMC,123525,A,4807.038,N,01131.000,E,022.4,084.4,230394,003.1,W")));
        Assert.Equal([45_319, 45_325], table.TimeSec);
        Assert.Equal([new("checksum does not agree", 1, 2), new("sentence without a checksum", 1, 3), new("not an NMEA sentence", 1, 4), new("no fix", 3, 5),
            new RowsLeftOut("sentence with a field that is none", 1, 7)], table.File.LeftOut);
        Assert.Equal(9, table.File.RowsRead);
    }

    [Theory]
    [InlineData("$GPRMC,123519,A,4807.038,N,01131.000,E,022.4,084.4,230394,003.1,W\n", "n.nmea: found an NMEA file without a usable fix in 1 rows, expected RMC or GGA sentences with a position and a checksum. Record again under open sky, with RMC and GGA switched on.")]
    [InlineData("$GPVTG,90.0,T,,M,10.0,N,18.5,K*41\n", "n.nmea: found an NMEA file without a usable fix in 1 rows, expected RMC or GGA sentences with a position and a checksum. Record again under open sky, with RMC and GGA switched on.")]
    public void A_file_without_a_usable_fix_gives_one_clear_message(string text, string message) => Assert.Equal(message, _nmea.Refusal("n.nmea", text));

    [Theory]
    [InlineData(Gga, true)]
    [InlineData("boot\r\n" + Rmc, true)]
    [InlineData("time,$GPRMC,\n", false)]
    [InlineData("B1101355206343N00006198WA0058700558", false)]
    public void NMEA_is_recognised_by_its_sentences(string head, bool expected) => Assert.Equal(expected, _nmea.Recognises(head));

    [Fact]
    public void No_damage_gives_another_exception_or_loses_a_row_unsaid()
    {
        var text = new StringBuilder();
        for (int i = 0; i < 30; i++)
            text.AppendLine(Sum(FormattableString.Invariant($"GPRMC,1235{i:00},A,4807.{38 + i:000},N,01131.000,E,022.4,084.4,230394,003.1,W")));
        (int read, int refused) = ImportText.Damage(_nmea, "n.nmea", Encoding.Latin1.GetBytes(text.ToString()), 1000, 9);
        Assert.True(read > 500 && refused > 5, $"{read} read, {refused} refused");
    }

    /// <summary>A sentence with its checksum, counted here independently of the reader.</summary>
    private static string Sum(string body) => FormattableString.Invariant($"${body}*{body.Aggregate(0, (sum, c) => sum ^ c):X2}");
}
