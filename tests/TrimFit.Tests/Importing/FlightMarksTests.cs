using TrimFit.Core.Logs;

namespace TrimFit.Tests.Importing;

public class FlightMarksTests
{
    /// <summary>Throttle of 40 % with blips to 70 % of 0.4 s each at the given times, and full and idle legs so that the range is the engine's.</summary>
    private static FlightLog Blipped(double step, double width, params double[] times)
    {
        int n = (int)(300 / step);
        double[] time = new double[n], throttle = new double[n];
        for (int i = 0; i < n; i++)
        {
            double t = time[i] = i * step;
            throttle[i] = t is > 200 and < 230 ? 1 : t is > 240 and < 270 ? 0.05 : 0.4;
            if (times.Any(b => t >= b && t < b + width))
                throttle[i] = 0.7;
        }
        return FlightLog.Create(time, [new(ChannelRole.Throttle, throttle)]);
    }

    [Fact]
    public void Three_quick_blips_are_a_mark_and_two_or_four_are_none()
    {
        FlightLog flight = Blipped(0.1, 0.4, 50, 51, 52, /* two */ 80, 81, /* four */ 110, 111, 112, 113, /* three */ 150, 151.2, 152.4);
        var marks = FlightMarks.Of(flight);
        Assert.Equal(2, marks.Length);
        Assert.All(marks, m => Assert.Equal(FlightMarkKind.Blips, m.Kind));
        Assert.InRange(marks[0].TimeSec, 52.3, 52.7); // where the third ends
        Assert.InRange(marks[1].TimeSec, 152.7, 153.1);
        Assert.Equal([1.0, 2.0], marks.Select(m => m.Number));
    }

    [Fact]
    public void A_change_of_power_a_slow_logger_and_a_slow_wave_are_no_blips()
    {
        Assert.Empty(FlightMarks.Of(Blipped(0.1, 0.4)));
        Assert.Empty(FlightMarks.Of(Blipped(1, 1, 50, 52, 54)));
        Assert.Empty(FlightMarks.Of(Blipped(0.1, 3, 50, 60, 70)));
    }

    [Fact]
    public void A_pause_of_the_recorder_is_a_mark_where_it_goes_on_and_a_drop_out_or_a_landing_is_none()
    {
        double[] time = [.. Enumerable.Range(0, 400).Select(i => (double)i).Where(t => t is not (> 100 and < 106 or > 200 and < 203 or > 250 and < 360))];
        var marks = FlightMarks.Of(FlightLog.Create(time, [new(ChannelRole.Altitude, [.. time.Select(_ => 500.0)])]));
        Assert.Empty(marks); // six steps of one second: nothing a pilot did for sure
        double[] quick = [.. Enumerable.Range(0, 4000).Select(i => i * 0.1).Where(t => t is not (> 100 and < 106 or > 200 and < 201 or > 250 and < 360))];
        marks = FlightMarks.Of(FlightLog.Create(quick, [new(ChannelRole.Altitude, [.. quick.Select(_ => 500.0)])]));
        FlightMark mark = Assert.Single(marks);
        Assert.Equal(FlightMarkKind.Pause, mark.Kind);
        Assert.Equal(106, mark.TimeSec, 0.11);
    }

    [Fact]
    public void Legs_of_a_sheet_refer_to_blips_and_the_result_says_so()
    {
        FlightLog flight = Blipped(0.1, 0.4, 50, 51, 52, 80, 81, 82);
        var sheet = new FlightSheet { Legs = [new() { Start = SheetTime.FromMarker(1), End = SheetTime.FromMarker(2), Kind = SheetLegKind.Other, Line = 3 }] };
        SheetedFlight sheeted = SheetLegs.Apply(flight, sheet);
        FoundLeg leg = Assert.Single(sheeted.Legs);
        Assert.Equal(52.4, leg.StatedStartSec, 0.2);
        Assert.Equal(82.4, leg.StatedEndSec, 0.2);
        Assert.Equal("The marks of the flight sheet are taken from three quick throttle blips: 2 found, at 52, 82 s.", Assert.Single(sheeted.Warnings).Message);
    }

    [Fact]
    public void A_marker_channel_comes_first()
    {
        FlightLog flight = Blipped(0.1, 0.4, 50, 51, 52).WithChannel(ChannelRole.Marker, [.. Enumerable.Range(0, 3000).Select(i => i is >= 700 and < 720 ? 1.0 : 0)]);
        FlightMark mark = Assert.Single(FlightMarks.Of(flight));
        Assert.Equal((FlightMarkKind.Channel, 70.0), (mark.Kind, Math.Round(mark.TimeSec, 6)));
    }
}
