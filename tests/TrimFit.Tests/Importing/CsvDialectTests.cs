using System.Text;
using TrimFit.Core.Logs;

namespace TrimFit.Tests.Importing;

/// <summary>One small log in the dialects of loggers: whatever the dialect, the numbers are the same.</summary>
public class CsvDialectTests
{
    private const string Plain = "time_s,yaw_rate_dps,rpm\n0.0,1.5,6000\n0.1,-2.25,6050\n0.2,,6100\n0.3,4,6150\n";

    static CsvDialectTests() => Encoding.RegisterProvider(CodePagesEncodingProvider.Instance);

    /// <summary>Dialect, how the import describes it, the file.</summary>
    public static TheoryData<string, string, byte[]> Dialects => new()
    {
        { "comma", "CSV, comma, decimal point, UTF-8", Utf8(Plain) },
        { "semicolon", "CSV, semicolon, decimal point, UTF-8", Utf8(Plain.Replace(',', ';')) },
        { "tab", "CSV, tab, decimal point, UTF-8", Utf8(Plain.Replace(',', '\t')) },
        { "pipe", "CSV, pipe, decimal point, UTF-8", Utf8(Plain.Replace(',', '|')) },
        { "semicolon and decimal comma", "CSV, semicolon, decimal comma, UTF-8", Utf8(Plain.Replace(',', ';').Replace('.', ',')) },
        { "tab and decimal comma", "CSV, tab, decimal comma, UTF-8", Utf8(Plain.Replace(',', '\t').Replace('.', ',')) },
        { "comma and quoted decimal comma", "CSV, comma, decimal comma, UTF-8", Utf8("time_s,yaw_rate_dps,rpm\n\"0,0\",\"1,5\",6000\n\"0,1\",\"-2,25\",6050\n\"0,2\",,6100\n\"0,3\",4,6150\n") },
        { "separator hint", "CSV, semicolon, decimal comma, UTF-8", Utf8("sep=;\n" + Plain.Replace(',', ';').Replace('.', ',')) },
        { "UTF-8 with BOM", "CSV, comma, decimal point, UTF-8 with BOM", [0xEF, 0xBB, 0xBF, .. Utf8(Plain)] },
        { "UTF-16 LE with BOM", "CSV, comma, decimal point, UTF-16 LE", [0xFF, 0xFE, .. Encoding.Unicode.GetBytes(Plain)] },
        { "UTF-16 BE with BOM", "CSV, comma, decimal point, UTF-16 BE", [0xFE, 0xFF, .. Encoding.BigEndianUnicode.GetBytes(Plain)] },
        { "UTF-16 LE without BOM", "CSV, comma, decimal point, UTF-16 LE without BOM", Encoding.Unicode.GetBytes(Plain) },
        { "UTF-16 BE without BOM", "CSV, comma, decimal point, UTF-16 BE without BOM", Encoding.BigEndianUnicode.GetBytes(Plain) },
        { "UTF-32 LE with BOM", "CSV, comma, decimal point, UTF-32 LE", [0xFF, 0xFE, 0, 0, .. Encoding.UTF32.GetBytes(Plain)] },
        { "Windows-1252", "CSV, semicolon, decimal comma, Windows-1252", Encoding.GetEncoding(1252).GetBytes("Zeit [s];Gierrate [°/s];Drehzahl [1/min];Höhe [m]\n0,0;1,5;6000;10\n0,1;-2,25;6050;10\n0,2;;6100;10\n0,3;4;6150;10\n") },
        { "UTF-8 beyond Latin", "CSV, comma, decimal point, UTF-8", Utf8("время (с),yaw rate (°/s),обороты (об/мин),высота (м)\n0.0,1.5,6000,10\n0.1,-2.25,6050,10\n0.2,,6100,10\n0.3,4,6150,10\n") },
        { "CRLF", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace("\n", "\r\n")) },
        { "CR", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace("\n", "\r")) },
        { "CR CR LF", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace("\n", "\r\r\n")) },
        { "no line end at the end", "CSV, comma, decimal point, UTF-8", Utf8(Plain.TrimEnd('\n')) },
        { "empty lines between", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace("\n", "\n\n")) },
        { "comment preamble", "CSV, comma, decimal point, UTF-8", Utf8("# engine monitor, firmware 1.7\n# serial 0000\n" + Plain) },
        { "header in a comment", "CSV, comma, decimal point, UTF-8", Utf8("# " + Plain) },
        { "comments in the data", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace("0.2,", "# engine stopped, 1, 2\n// restarted\n0.2,")) },
        { "key-value preamble", "CSV, comma, decimal point, UTF-8", Utf8("Device,engine monitor\nSerial,12345\nStart,2026-05-12 10:00:00\n\n" + Plain) },
        { "key-value preamble with colons", "CSV, semicolon, decimal point, UTF-8", Utf8("Device: engine monitor\nSerial: 12345\n" + Plain.Replace(',', ';')) },
        { "units row", "CSV, comma, decimal point, UTF-8", Utf8("time,yaw rate,rpm\ns,deg/s,1/min\n0.0,1.5,6000\n0.1,-2.25,6050\n0.2,,6100\n0.3,4,6150\n") },
        { "units row in brackets", "CSV, semicolon, decimal point, UTF-8", Utf8("time;yaw rate;rpm\n[s];[deg/s];[-]\n0.0;1.5;6000\n0.1;-2.25;6050\n0.2;;6100\n0.3;4;6150\n") },
        { "two header rows", "CSV, comma, decimal point, UTF-8", Utf8("Clock,Gyro,,Engine\ntime (s),x (deg/s),z (deg/s),rpm\n0.0,0,1.5,6000\n0.1,0,-2.25,6050\n0.2,0,,6100\n0.3,0,4,6150\n") },
        { "three header rows", "CSV, comma, decimal point, UTF-8", Utf8("Clock,Gyro,,Engine\ntime,x,z,rpm\ns,deg/s,deg/s,1/min\n0.0,0,1.5,6000\n0.1,0,-2.25,6050\n0.2,0,,6100\n0.3,0,4,6150\n") },
        { "quoted cells", "CSV, comma, decimal point, UTF-8", Utf8("\"time_s\",\"yaw_rate_dps\",\"rpm\"\n\"0.0\",\"1.5\",\"6000\"\n\"0.1\",\"-2.25\",\"6050\"\n\"0.2\",\"\",\"6100\"\n\"0.3\",\"4\",\"6150\"\n") },
        { "quoted cells with line ends and separators", "CSV, comma, decimal point, UTF-8", Utf8("time_s,\"yaw\nrate (deg/s)\",rpm,note\n0.0,1.5,6000,\"start,\nthen \"\"idle\"\"\"\n0.1,-2.25,6050,\n0.2,,6100,\n0.3,4,6150,\n") },
        { "trailing delimiter in every row", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace("\n", ",\n")) },
        { "trailing delimiter in the data only", "CSV, comma, decimal point, UTF-8", Utf8("time_s,yaw_rate_dps,rpm\n0.0,1.5,6000,\n0.1,-2.25,6050,\n0.2,,6100,\n0.3,4,6150,\n") },
        { "trailing delimiter in the header only", "CSV, comma, decimal point, UTF-8", Utf8("time_s,yaw_rate_dps,rpm,\n0.0,1.5,6000\n0.1,-2.25,6050\n0.2,,6100\n0.3,4,6150\n") },
        { "rows that leave trailing empty cells away", "CSV, comma, decimal point, UTF-8", Utf8("time_s,yaw_rate_dps,rpm,note,extra\n0.0,1.5,6000\n0.1,-2.25,6050,a\n0.2,,6100\n0.3,4,6150,b,c\n0.4,,\n") },
        { "NUL padding", "CSV, comma, decimal point, UTF-8", [.. Utf8(Plain), .. new byte[4096]] },
        { "NUL block inside", "CSV, comma, decimal point, UTF-8", [.. Utf8(Plain[..50]), .. new byte[512], .. Utf8(Plain[50..])] },
        { "spaces around cells", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace(",", " ,  ")) },
        { "words for nothing: NaN", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace(",,", ",NaN,")) },
        { "words for nothing: n/a", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace(",,", ",n/a,")) },
        { "words for nothing: -", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace(",,", ",-,")) },
        { "words for nothing: *", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace(",,", ",*,")) },
        { "numbers for nothing: 999999", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace(",,", ",999999,")) },
        { "numbers for nothing: -32768", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace(",,", ",-32768,")) },
        { "units inside cells", "CSV, comma, decimal point, UTF-8", Utf8("time,yaw rate,rpm\n0.0 s,1.5 °/s,6000 rpm\n0.1 s,-2.25 °/s,6050 rpm\n0.2 s,,6100 rpm\n0.3 s,4 °/s,6150 rpm\n") },
        { "exponents", "CSV, comma, decimal point, UTF-8", Utf8("time_s,yaw_rate_dps,rpm\n0.0e0,1.5e0,6.0E+3\n1e-1,-225e-2,6.05e3\n2e-1,,6.1e3\n3e-1,4.0,6.15e3\n") },
        { "plus signs and a real minus", "CSV, comma, decimal point, UTF-8", Utf8(Plain.Replace(",1.5", ",+1.5").Replace("-2.25", "\u22122.25")) },
        { "milliseconds", "CSV, comma, decimal point, UTF-8", Utf8("time_ms,yaw_rate_dps,rpm\n5000,1.5,6000\n5100,-2.25,6050\n5200,,6100\n5300,4,6150\n") },
        { "microseconds", "CSV, comma, decimal point, UTF-8", Utf8("time [us],yaw_rate_dps,rpm\n5000000,1.5,6000\n5100000,-2.25,6050\n5200000,,6100\n5300000,4,6150\n") },
        { "ISO 8601", "CSV, comma, decimal point, UTF-8", Utf8("utc,yaw_rate_dps,rpm\n2026-05-12T10:00:00.000Z,1.5,6000\n2026-05-12T10:00:00.100Z,-2.25,6050\n2026-05-12T10:00:00.200Z,,6100\n2026-05-12T10:00:00.300Z,4,6150\n") },
        { "epoch in seconds", "CSV, comma, decimal point, UTF-8", Utf8("timestamp,yaw_rate_dps,rpm\n1778580000.0,1.5,6000\n1778580000.1,-2.25,6050\n1778580000.2,,6100\n1778580000.3,4,6150\n") },
        { "epoch in milliseconds", "CSV, comma, decimal point, UTF-8", Utf8("timestamp,yaw_rate_dps,rpm\n1778580000000,1.5,6000\n1778580000100,-2.25,6050\n1778580000200,,6100\n1778580000300,4,6150\n") },
        { "epoch in microseconds", "CSV, comma, decimal point, UTF-8", Utf8("timestamp,yaw_rate_dps,rpm\n1778580000000000,1.5,6000\n1778580000100000,-2.25,6050\n1778580000200000,,6100\n1778580000300000,4,6150\n") },
        { "epoch in nanoseconds", "CSV, comma, decimal point, UTF-8", Utf8("timestamp,yaw_rate_dps,rpm\n1778580000000000000,1.5,6000\n1778580000100000000,-2.25,6050\n1778580000200000000,,6100\n1778580000300000000,4,6150\n") },
        { "date and time in two columns", "CSV, comma, decimal point, UTF-8", Utf8("Date,Time,yaw_rate_dps,rpm\n2026-05-12,10:00:00.000,1.5,6000\n2026-05-12,10:00:00.100,-2.25,6050\n2026-05-12,10:00:00.200,,6100\n2026-05-12,10:00:00.300,4,6150\n") },
        { "European dates", "CSV, semicolon, decimal comma, UTF-8", Utf8("Datum;Uhrzeit;Gierrate [°/s];rpm\n12.05.2026;10:00:00,000;1,5;6000\n12.05.2026;10:00:00,100;-2,25;6050\n12.05.2026;10:00:00,200;;6100\n12.05.2026;10:00:00,300;4;6150\n") },
        { "American dates", "CSV, comma, decimal point, UTF-8", Utf8("Date,Time,yaw_rate_dps,rpm\n05/22/2026,10:00:00.000 AM,1.5,6000\n05/22/2026,10:00:00.100 AM,-2.25,6050\n05/22/2026,10:00:00.200 AM,,6100\n05/22/2026,10:00:00.300 AM,4,6150\n") },
        { "GPS week and seconds", "CSV, comma, decimal point, UTF-8", Utf8("week,tow_s,yaw_rate_dps,rpm\n2418,208818.0,1.5,6000\n2418,208818.1,-2.25,6050\n2418,208818.2,,6100\n2418,208818.3,4,6150\n") },
        { "time of day past midnight", "CSV, comma, decimal point, UTF-8", Utf8("time,yaw_rate_dps,rpm\n23:59:59.800,1.5,6000\n23:59:59.900,-2.25,6050\n00:00:00.000,,6100\n00:00:00.100,4,6150\n") },
        { "one value per row", "CSV, comma, decimal point, UTF-8", Utf8("time_s,name,value,unit\n0.0,yaw rate,1.5,deg/s\n0.0,rpm,6000,rpm\n0.1,yaw rate,-2.25,deg/s\n0.1,rpm,6050,rpm\n0.2,rpm,6100,rpm\n0.3,yaw rate,4,deg/s\n0.3,rpm,6150,rpm\n") },
        { "one value per row, one channel after the other", "CSV, comma, decimal point, UTF-8", Utf8("channel;time_s;value\nyaw_rate_dps;0.0;1.5\nyaw_rate_dps;0.1;-2.25\nyaw_rate_dps;0.3;4\nrpm;0.0;6000\nrpm;0.1;6050\nrpm;0.2;6100\nrpm;0.3;6150\n".Replace(';', ',')) },
    };

    [Theory]
    [MemberData(nameof(Dialects))]
    public void Every_dialect_gives_the_same_numbers(string dialect, string description, byte[] file)
    {
        FlightImport import = Logs.ReadBytes(file);
        Assert.Equal(description, import.Diagnostics.Files[0].Format);
        Assert.Equal([0, 0.1, 0.2, 0.3], import.Flight.TimeSec.ToArray().Take(4).Select(t => Math.Round(t - import.Flight.TimeSec[0], 9)));
        ChannelRole yaw = dialect.EndsWith("header rows", StringComparison.Ordinal) ? ChannelRole.GyroZ : ChannelRole.YawRate;
        Assert.Equal([1.5, -2.25, double.NaN, 4], import.Flight[yaw].ToArray().Take(4).Select(r => Math.Round(double.RadiansToDegrees(r), 9)));
        Assert.Equal([6000, 6050, 6100, 6150], import.Flight[ChannelRole.Rpm].ToArray().Take(4).Select(r => Math.Round(r * 60, 9)));
        Assert.Empty(import.Diagnostics.Files[0].LeftOut);
    }

    private static byte[] Utf8(string text) => Encoding.UTF8.GetBytes(text);
}
