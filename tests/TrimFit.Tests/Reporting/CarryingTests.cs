using System.Text;
using CsCheck;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Pages;
using TrimFit.Reporting.Carrying;

namespace TrimFit.Tests.Reporting;

public class CarryingTests
{
    private static readonly byte[] _log = Encoding.UTF8.GetBytes("t,gz\n0,1.5\n1,\n2,-3\n");

    [Fact]
    public void A_table_comes_back_byte_for_byte() => Gen.Select(Gen.Int[1, 6], Gen.Int[1, 8], Gen.Char[",;\t"]).SelectMany((columns, rows, separator) =>
        Gen.String[Gen.Char["0123456789.- \r\"é"], 0, 5].Array[(columns + 1) * rows].Select(cells => (columns + 1, separator, cells))).Sample(t =>
        {
            (int columns, char separator, string[] cells) = t;
            byte[] text = Encoding.UTF8.GetBytes(string.Concat(cells.Select((c, i) => c + ((i + 1) % columns == 0 ? '\n' : separator))));
            return ColumnLayout.TryPack(text, out byte[] packed) && ColumnLayout.Unpack(packed).AsSpan().SequenceEqual(text);
        });

    [Theory]
    [InlineData("")]
    [InlineData("no table\n")]
    [InlineData("a,b\n1,2,3\n")]
    [InlineData("a,b\n1,2")]
    [InlineData("\n\n")]
    public void What_is_no_table_is_left_as_it_is(string text) => Assert.False(ColumnLayout.TryPack(Encoding.UTF8.GetBytes(text), out _));

    [Fact]
    public void A_page_gives_back_what_it_carries()
    {
        ReportInput input = Input();
        ReportInput back = ReportInput.FindIn(Carrying(input))!;
        Assert.Equal(_log, back.Logs[0].Content.ToArray());
        Assert.Equal(("demo.csv", "phone.zip"), (back.Logs[0].Name, back.Logs[0].Recording));
        Assert.Equal("rig", Encoding.UTF8.GetString(back.Rig.Content.Span));
        Assert.Equal("sheet", Encoding.UTF8.GetString(back.Sheet!.Content.Span));
        Assert.Equal(["yaw_rate=gz:deg/s"], back.Columns);
        Assert.Equal(("full", 1.5, 7UL, true, "{\"a\":1}"), (back.Balance, back.ToleranceDegPerSec, back.Seed, back.WithoutPlace, back.Result));
    }

    [Fact]
    public void A_page_without_input_says_so() => Assert.Null(ReportInput.FindIn(ReportPage.Fit(ReportFixture.Report(), new())));

    [Fact]
    public void A_damaged_page_is_named_as_damaged()
    {
        string page = Carrying(Input());
        int from = page.IndexOf("data-schema", StringComparison.Ordinal) + 40;
        for (int i = 0; i < 200; i++) // every place, one letter changed
        {
            char[] broken = page.ToCharArray();
            int at = from + i;
            if (broken[at] is '\n' or '<' or '>')
                continue;
            broken[at] = broken[at] == 'A' ? 'B' : 'A';
            try
            {
                ReportInput.FindIn(new string(broken));
            }
            catch (InvalidDataException)
            {
            }
        }
        Assert.Throws<InvalidDataException>(() => ReportInput.FindIn(page[..(from + 30)]));
        Assert.Throws<InvalidDataException>(() => ReportInput.FindIn("<template id=\"trimfit-input\" data-schema=\"trimfit-input/1\">!</template>"));
        Assert.Throws<InvalidDataException>(() => ReportInput.FindIn("<template id=\"trimfit-input\" data-schema=\"trimfit-input/1\"></template>"));
    }

    [Fact]
    public void Results_agree_within_the_named_tolerance_and_differ_beyond_it()
    {
        const string Before = "{\"verdict\":{\"code\":\"balanced\",\"sentence\":\"a\"},\"pull\":[{\"rate_deg_s\":-1.4},{\"rate_deg_s\":null}],\"inputs\":{\"program_version\":\"1\"}}";
        Assert.True(ResultComparison.Of(Before, Before.Replace("-1.4", "-1.40013", StringComparison.Ordinal).Replace("\"a\"", "\"b\"", StringComparison.Ordinal)
            .Replace("\"1\"", "\"2\"", StringComparison.Ordinal)).Agrees);
        Assert.Equal(["pull[0].rate_deg_s: -1.4, now -1.4002"], ResultComparison.Of(Before, Before.Replace("-1.4", "-1.4002", StringComparison.Ordinal)).Differences);
        Assert.Equal(["verdict.code: balanced, now both"], ResultComparison.Of(Before, Before.Replace("balanced", "both", StringComparison.Ordinal)).Differences);
        Assert.Equal(["pull[1].rate_deg_s: null, now 2"], ResultComparison.Of(Before, Before.Replace("null", "2", StringComparison.Ordinal)).Differences);
        Assert.Equal(["pull: 2 entries, now 1"], ResultComparison.Of(Before, Before.Replace(",{\"rate_deg_s\":null}", "", StringComparison.Ordinal)).Differences);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void A_log_without_its_place_keeps_all_else(bool positionsOnly)
    {
        double[] time = [.. Enumerable.Range(0, 60).Select(i => i * 0.5)];
        double[] latitude = [.. time.Select(t => 0.7 + (t * 2e-6))], longitude = [.. time.Select(t => 0.1 + (t * 1e-6))];
        var channels = new Dictionary<ChannelRole, double[]>
        {
            [ChannelRole.YawRate] = [.. time.Select((t, i) => i % 7 == 3 ? double.NaN : Math.Sin(t) / 3)],
            [ChannelRole.BrakeLeft] = [.. time.Select(t => t / 100)],
            [ChannelRole.BrakeRight] = [.. time.Select(t => t / 300)],
            [ChannelRole.Altitude] = [.. time.Select(t => 400 + t)],
            [ChannelRole.Throttle] = [.. time.Select(t => t / 40)],
            [ChannelRole.Latitude] = latitude,
            [ChannelRole.Longitude] = longitude,
        };
        if (!positionsOnly)
        {
            channels[ChannelRole.GroundSpeed] = [.. time.Select(t => 10 + (t / 7))];
            channels[ChannelRole.GroundCourse] = [.. time.Select(t => t / 10)];
        }
        FlightLog flight = FlightLog.Create(time, channels, new() { BrakeUnit = ControlUnit.Meter, StartUtc = new DateTimeOffset(2025, 5, 17, 7, 0, 0, TimeSpan.Zero) });
        (LogSource source, System.Collections.Immutable.ImmutableArray<ColumnRule> rules) = PlacelessLog.Of(flight, "x.csv");
        FlightLog back = FlightReader.Read([source], new() { Columns = rules, Strict = true }).Flight;
        Assert.False(back.Has(ChannelRole.Latitude) || back.Has(ChannelRole.Longitude) || back.Has(ChannelRole.Position));
        Assert.Equal(flight.StartUtc, back.StartUtc);
        Assert.Equal(ControlUnit.Meter, back.BrakeUnit);
        Assert.All(time.Zip(back.TimeSec.ToArray()), t => Assert.Equal(t.First, t.Second, 6));
        foreach (ChannelRole role in channels.Keys.Where(r => r is not (ChannelRole.Latitude or ChannelRole.Longitude)))
            Assert.Equal(flight[role].ToArray(), back[role].ToArray());
        if (positionsOnly)
        {
            // By hand: 2e-6 rad/s of latitude is 12.742 m/s north on a sphere of 6,371,008.8 m.
            Assert.Equal(2e-6 * 6371008.8, back[ChannelRole.VelocityNorth][10], 6);
            Assert.Equal(1e-6 * 6371008.8 * Math.Cos(latitude[10]), back[ChannelRole.VelocityEast][10], 6);
        }
        using var reader = new StreamReader(source.Open());
        Assert.DoesNotContain("lat", reader.ReadToEnd(), StringComparison.OrdinalIgnoreCase);
    }

    private static ReportInput Input() => new()
    {
        Logs = [new("demo.csv", _log) { Recording = "phone.zip" }],
        Rig = new("rig.toml", "rig"u8.ToArray()),
        Sheet = new("sheet.toml", "sheet"u8.ToArray()),
        Columns = ["yaw_rate=gz:deg/s"],
        Balance = "full",
        ToleranceDegPerSec = 1.5,
        Seed = 7,
        WithoutPlace = true,
        Result = "{\"a\":1}",
    };

    private static string Carrying(ReportInput input) => ReportPage.Fit(ReportFixture.Report(), new(), input.Pack());
}
