using TrimFit.Core.Logs;

namespace TrimFit.Tests.Importing;

public class SheetLegsTests
{
    [Theory]
    [InlineData(-4.0, 3.5)]
    [InlineData(0.0, 0.0)]
    [InlineData(4.5, -4.5)]
    public void Sloppy_edges_of_a_hands_off_leg_move_to_the_brakes_release_and_grip(double startError, double endError)
    {
        FlightLog flight = Flight(600, brakesOffFrom: 200, brakesOffTo: 260);
        FoundLeg leg = Assert.Single(SheetLegs.Apply(flight, Sheet(SheetLegKind.HandsOff, 200 + startError, 260 + endError)).Legs);
        Assert.Equal(ChannelRole.BrakeLeft, leg.StartFoundIn);
        Assert.Equal(ChannelRole.BrakeLeft, leg.EndFoundIn);
        Assert.InRange(leg.StartSec, 199.5, 200.5);       // the made-up brakes are released at 200 s and gripped at 260 s
        Assert.InRange(leg.EndSec, 259.5, 260.5);
        Assert.Equal(200 + startError, leg.StatedStartSec);
        Assert.Equal(260 + endError, leg.StatedEndSec);
    }

    [Fact]
    public void A_power_leg_moves_to_the_throttle()
    {
        FoundLeg leg = Assert.Single(SheetLegs.Apply(Flight(600, 0, 0), Sheet(SheetLegKind.Other, 304, 397)).Legs); // throttle 0.7 from 300 to 400 s
        Assert.Equal(ChannelRole.Throttle, leg.StartFoundIn);
        Assert.InRange(leg.StartSec, 299.5, 300.5);
        Assert.InRange(leg.EndSec, 399.5, 400.5);
    }

    [Fact]
    public void Hands_off_is_marked_inside_the_found_edges_only()
    {
        FlightLog marked = SheetLegs.Apply(Flight(600, 200, 260), Sheet(SheetLegKind.HandsOff, 203, 257)).Flight;
        ReadOnlySpan<double> column = marked[ChannelRole.HandsOff];
        for (int i = 0; i < marked.Count; i++)
        {
            if (marked.TimeSec[i] is < 199 or > 261)
                Assert.Equal(0, column[i]);
            if (marked.TimeSec[i] is > 201 and < 259)
                Assert.Equal(1, column[i]);
        }
    }

    [Fact]
    public void A_hands_off_leg_that_no_control_shows_loses_five_seconds_at_each_edge()
    {
        FoundLeg leg = Assert.Single(SheetLegs.Apply(Gps(600), Sheet(SheetLegKind.HandsOff, 100, 150)).Legs);
        Assert.Equal((105, 145), (leg.StartSec, leg.EndSec));
        Assert.Null(leg.StartFoundIn);
    }

    [Fact]
    public void A_hands_off_leg_of_ten_seconds_that_no_control_shows_is_left_out_and_named()
    {
        SheetedFlight result = SheetLegs.Apply(Gps(600), Sheet(SheetLegKind.HandsOff, 100, 110));
        Assert.Empty(result.Legs);
        Assert.Equal([new Notice("sheet_leg_short", "The hands-off leg on line 7 of the flight sheet is too short once 5 s are taken off edges that no control shows; it is left out.")], result.Warnings);
        Assert.False(result.Flight[ChannelRole.HandsOff].Contains(1));
    }

    [Fact]
    public void A_leg_outside_the_log_is_left_out_and_named()
    {
        SheetedFlight result = SheetLegs.Apply(Gps(600), Sheet(SheetLegKind.Held, 590, 620));
        Assert.Empty(result.Legs);
        Assert.Equal([new Notice("sheet_leg_outside", "The leg on line 7 of the flight sheet, 590 to 620 s, lies outside the log, which runs from 0 to 600 s; it is left out.")], result.Warnings);
    }

    [Fact]
    public void Clock_times_are_placed_by_the_logs_own_clock_over_midnight_too()
    {
        FlightLog flight = Gps(600, new(2026, 5, 17, 23, 58, 0, TimeSpan.Zero));
        FoundLeg leg = Assert.Single(SheetLegs.Apply(flight, Clock(new(23, 59, 30), new(0, 0, 15))).Legs);
        Assert.Equal((90, 135), (leg.StatedStartSec, leg.StatedEndSec));
    }

    [Fact]
    public void A_watch_on_local_time_is_recognised_and_said()
    {
        FlightLog flight = Gps(600, new(2026, 5, 17, 8, 0, 0, TimeSpan.Zero));
        SheetedFlight result = SheetLegs.Apply(flight, Clock(new(10, 1, 0), new(10, 2, 0)));
        Assert.Equal(60, Assert.Single(result.Legs).StatedStartSec);
        Assert.Equal([new Notice("sheet_clock_shifted", "The clock of the flight sheet is taken to be 2 h ahead of the log's, as a watch on local time is; only so do the legs lie in the flight.")], result.Warnings);
    }

    [Fact]
    public void Clock_times_that_fit_several_time_zones_are_refused()
    {
        FlightLog flight = Gps(9000, new(2026, 5, 17, 8, 0, 0, TimeSpan.Zero));
        SheetedFlight result = SheetLegs.Apply(flight, Clock(new(11, 1, 0), new(11, 2, 0)));
        Assert.Empty(result.Legs);
        Assert.Equal([new Notice("sheet_clock_ambiguous", "The clock times of the flight sheet fit the log with more than one time zone; those legs are left out. Give seconds since the start of the log, or the log's own clock.")], result.Warnings);
    }

    [Fact]
    public void Clock_times_for_a_log_without_a_time_of_day_are_refused() =>
        Assert.Equal([new Notice("sheet_clock_unknown", "The flight sheet gives clock times, but the log knows no time of day; those legs are left out. Give seconds since the start of the log.")],
            SheetLegs.Apply(Gps(600), Clock(new(11, 1, 0), new(11, 2, 0))).Warnings);

    [Fact]
    public void A_sheet_of_another_day_is_named()
    {
        FlightLog flight = Gps(600, new(2026, 5, 17, 8, 0, 0, TimeSpan.Zero));
        Assert.Equal([new Notice("sheet_date", "The flight sheet is of 2026-05-20, the log of 2026-05-17: check that they belong together.")],
            SheetLegs.Apply(flight, new FlightSheet { Date = new(2026, 5, 20) }).Warnings);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void Marks_give_the_edges_whether_numbered_or_not(bool numbered)
    {
        double[] marks = new double[601];
        for (int k = 1; k <= 3; k++)
            marks[100 * k] = numbered ? k : 1;
        FlightLog flight = Gps(600).WithChannel(ChannelRole.Marker, marks);
        var sheet = new FlightSheet { Legs = [new() { Start = SheetTime.FromMarker(2), End = SheetTime.FromMarker(3), Kind = SheetLegKind.Held }] };
        FoundLeg leg = Assert.Single(SheetLegs.Apply(flight, sheet).Legs);
        Assert.Equal((200, 300), (leg.StatedStartSec, leg.StatedEndSec));
    }

    [Fact]
    public void A_mark_the_log_does_not_hold_is_named()
    {
        var sheet = new FlightSheet { Legs = [new() { Start = SheetTime.FromMarker(2), End = SheetTime.FromMarker(3), Kind = SheetLegKind.Held, Line = 4 }] };
        Assert.Equal([new Notice("sheet_mark_missing", "The leg on line 4 of the flight sheet runs from mark 2 to mark 3, which the log does not hold; it is left out.")],
            SheetLegs.Apply(Gps(600), sheet).Warnings);
    }

    private static FlightSheet Sheet(SheetLegKind kind, double start, double end) =>
        new() { Legs = [new() { Start = SheetTime.FromSeconds(start), End = SheetTime.FromSeconds(end), Kind = kind, Line = 7 }] };

    private static FlightSheet Clock(TimeSpan start, TimeSpan end) =>
        new() { Legs = [new() { Start = SheetTime.FromClock(start), End = SheetTime.FromClock(end), Kind = SheetLegKind.Held, Line = 7 }] };

    /// <summary>A log at 1 Hz with GPS altitude only.</summary>
    private static FlightLog Gps(int seconds, DateTimeOffset? start = null)
    {
        double[] time = [.. Enumerable.Range(0, seconds + 1).Select(i => (double)i)];
        return FlightLog.Create(time, [new(ChannelRole.Altitude, [.. time.Select(t => 300 + Math.Sin(t / 50))])], new() { StartUtc = start });
    }

    /// <summary>A log at 10 Hz: brakes held at about 12 % but for the span hands off, throttle 0.7 from 300 to 400 s and 0.2 else, all noisy.</summary>
    private static FlightLog Flight(int seconds, double brakesOffFrom, double brakesOffTo)
    {
        var random = new Random(5);
        double[] time = [.. Enumerable.Range(0, (seconds * 10) + 1).Select(i => i / 10.0)];
        double[] brake = [.. time.Select(t => t >= brakesOffFrom && t <= brakesOffTo ? 0.002 * random.NextDouble() : 0.12 + (0.03 * random.NextDouble()))];
        double[] throttle = [.. time.Select(t => (t is >= 300 and <= 400 ? 0.7 : 0.2) + (0.01 * random.NextDouble()))];
        return FlightLog.Create(time, [new(ChannelRole.BrakeLeft, brake), new(ChannelRole.Throttle, throttle)]);
    }
}
