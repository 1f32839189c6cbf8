using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Import;
using TrimFit.Import.Tracks;

namespace TrimFit.Tests.Importing;

public class GpxFormatTests
{
    private static readonly GpxLogFormat _gpx = new();

    // Form: GPX 1.1 schema documentation (topografix.com); GPX 1.0 has speed and course in the point.
    private const string Eleven = """
        <?xml version="1.0" encoding="UTF-8"?>
        <gpx version="1.1" creator="SecretDevice 123" xmlns="http://www.topografix.com/GPX/1/1">
          <metadata><name>Secret place</name><author><name>Secret Person</name></author><time>2020-01-01T00:00:00Z</time></metadata>
          <wpt lat="1" lon="2"><time>2026-05-17T09:00:00Z</time></wpt>
          <trk><name>Secret flight</name><trkseg>
            <trkpt lat="45.5" lon="-7.25"><ele>312.5</ele><time>2026-05-17T10:00:00Z</time></trkpt>
            <trkpt lat="45.5001" lon="-7.25"><ele>313</ele><time>2026-05-17T10:00:00.500Z</time>
              <extensions><x:TrackPointExtension xmlns:x="urn:x"><x:speed>11.5</x:speed><x:course>90</x:course></x:TrackPointExtension></extensions></trkpt>
          </trkseg><trkseg>
            <trkpt lat="45.5002" lon="-7.25"><time>2026-05-17T12:00:02+02:00</time></trkpt>
          </trkseg></trk>
        </gpx>
        """;

    [Fact]
    public void A_GPX_11_track_is_read_with_its_extensions()
    {
        LogTable table = _gpx.Read("t.gpx", Eleven);
        Assert.Equal(new DateTimeOffset(2026, 5, 17, 10, 0, 0, TimeSpan.Zero), table.Origin);
        Assert.Equal([0, 0.5, 2], table.TimeSec);
        Accuracy.AgreesTo(14, 45.5 * Math.PI / 180, table.Columns[ChannelRole.Latitude][0]);
        Accuracy.AgreesTo(14, -7.25 * Math.PI / 180, table.Columns[ChannelRole.Longitude][0]);
        Assert.Equal([312.5, 313, double.NaN], table.Columns[ChannelRole.Altitude]);
        Assert.Equal([double.NaN, 11.5, double.NaN], table.Columns[ChannelRole.GroundSpeed]);
        Accuracy.AgreesTo(14, Math.PI / 2, table.Columns[ChannelRole.GroundCourse][1]);
        Assert.Equal(3, table.File.RowsRead);
    }

    [Fact]
    public void A_GPX_10_track_is_read_with_speed_and_course_in_the_point()
    {
        LogTable table = _gpx.Read("t.gpx", """
            <gpx version="1.0" creator="x" xmlns="http://www.topografix.com/GPX/1/0"><trk><trkseg>
            <trkpt lat="1" lon="2"><ele>3</ele><time>2026-05-17 10:00:00</time><course>180</course><speed>9.5</speed></trkpt></trkseg></trk></gpx>
            """);
        Assert.Equal([9.5], table.Columns[ChannelRole.GroundSpeed]);
        Accuracy.AgreesTo(14, Math.PI, table.Columns[ChannelRole.GroundCourse][0]);
        Assert.Equal(new DateTimeOffset(2026, 5, 17, 10, 0, 0, TimeSpan.Zero), table.Origin);
    }

    [Fact]
    public void UTF_16_is_read()
    {
        byte[] bytes = [.. Encoding.Unicode.GetPreamble(), .. Encoding.Unicode.GetBytes(Eleven.Replace("UTF-8", "UTF-16", StringComparison.Ordinal))];
        Assert.True(_gpx.Recognises(bytes, "t.gpx"));
        Assert.Equal(3, _gpx.Read(LogSource.FromBytes("t.gpx", bytes), new()).TimeSec.Length);
    }

    [Fact]
    public void Points_that_cannot_be_used_are_counted_by_reason_with_their_first_line()
    {
        LogTable table = _gpx.Read("t.gpx", """
            <gpx><trk><trkseg>
            <trkpt lat="1" lon="2"><time>2026-05-17T10:00:00Z</time></trkpt>
            <trkpt lat="91" lon="2"><time>2026-05-17T10:00:01Z</time></trkpt>
            <trkpt lat="1,5" lon="2"><time>2026-05-17T10:00:02Z</time></trkpt>
            <trkpt lat="1" lon="2"/>
            <trkpt lat="1" lon="2"><time>17.05.2026</time></trkpt>
            <trkpt lat="1" lon="2"><time>2026-05-17T10:00:00Z</time></trkpt>
            <trkpt lat="1" lon="2"><time>2026-05-17T09:59:00Z</time></trkpt>
            </trkseg></trk></gpx>
            """);
        Assert.Equal(7, table.File.RowsRead);
        Assert.Equal([new("point with a position that is none", 2, 3), new("point without a time", 1, 5), new("point with a time that is none", 1, 6),
            new("time repeats", 1, 7), new RowsLeftOut("time runs back", 1, 8)], table.File.LeftOut);
    }

    [Fact]
    public void A_track_that_breaks_off_gives_what_was_recorded_and_says_so()
    {
        LogTable table = _gpx.Read("t.gpx", Eleven[..Eleven.IndexOf("<time>2026-05-17T12", StringComparison.Ordinal)]);
        Assert.Equal([0, 0.5], table.TimeSec);
        Assert.Equal([new RowsLeftOut("the file breaks off or is damaged here", 1, 10)], table.File.LeftOut);
        Assert.Equal([new Notice("gpx_breaks_off", "t.gpx breaks off or is damaged at line 10; the 2 points before are used.")], table.Warnings);
    }

    public static TheoryData<string, string> Refusals() => new()
    {
        { "<gpx><trk><trkseg><trkpt lat=\"1\" lon=\"2\"><time>2026-05", "t.gpx(1): found XML that breaks off or is damaged, expected a GPX track. Export the track again." },
        { "<!DOCTYPE gpx [<!ENTITY a \"aaaa\"><!ENTITY b \"&a;&a;\">]>\n<gpx>&b;</gpx>", "t.gpx: found a document type definition, expected a GPX track. Export the track again." },
        { "<gpx><wpt lat=\"1\" lon=\"2\"/></gpx>", "t.gpx: found a GPX file without a track point, expected track points with positions and times. Export the recorded track, not a route or waypoints." },
        { "<gpx><trk><trkseg><trkpt lat=\"1\" lon=\"2\"/></trkseg></trk></gpx>", "t.gpx: found 1 track points of which none has a position and a time, expected track points with positions and times. Export the recorded track, not a route or waypoints." },
    };

    [Theory]
    [MemberData(nameof(Refusals))]
    public void A_file_without_a_usable_track_gives_one_clear_message(string text, string message) => Assert.Equal(message, _gpx.Refusal("t.gpx", text));

    [Fact]
    public void Names_and_devices_reach_no_result_and_no_message()
    {
        LogTable table = _gpx.Read("t.gpx", Eleven[..^8]);
        string everything = string.Join('\n', table.Warnings) + table.File + string.Join('\n', table.File.Columns) + string.Join('\n', table.File.LeftOut);
        Assert.DoesNotContain("secret", everything, StringComparison.OrdinalIgnoreCase);
    }

    [Theory]
    [InlineData(Eleven, true)]
    [InlineData("<!-- a <kml> --><gpx>", true)]
    [InlineData("<?xml version=\"1.0\"?><kml>", false)]
    [InlineData("time,note\n1,<gpx>\n", false)]
    [InlineData("<!DOCTYPE gpx [<!ENTITY a \"aaaa\">]>\n<gpx>", true)]
    [InlineData("time,rpm\n", false)]
    public void GPX_is_recognised_by_its_root(string head, bool expected) => Assert.Equal(expected, _gpx.Recognises(head));

    [Fact]
    public void No_damage_gives_another_exception_or_loses_a_row_unsaid()
    {
        (int read, int refused) = ImportText.Damage(_gpx, "t.gpx", Encoding.UTF8.GetBytes(Eleven), 1000, 8);
        Assert.True(read > 50 && refused > 300, $"{read} read, {refused} refused");
    }
}
