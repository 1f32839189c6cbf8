using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Turns;

namespace TrimFit.Tests.Turns;

/// <summary>Fixes, brakes, throttle and clock against the rest of the log.</summary>
public class TrackAndControlTests
{
    private static FlightLog Plain => SensorFlights.Plain.Log;

    private static SensorReport Report(FlightLog log) => SensorReport.Of(log, SensorFlights.Rig);

    [Fact]
    public void Wild_fixes_are_counted_and_left_out_and_the_wind_stays()
    {
        int fix = 0, spoilt = 0;
        FlightLog log = SensorFlights.With(Plain, (ChannelRole.GroundSpeed, (_, v) =>
        {
            if (!double.IsFinite(v) || ++fix % 97 != 0)
                return v;
            spoilt++;
            return 45;
        }
        ));
        SensorReport report = Report(log);
        Assert.Equal([spoilt, fix], SensorFlights.Single(report.Findings, FindingCode.GpsOutliers).Values.Select(v => (int)v));
        Wind clean = Report(Plain).Wind!;
        Assert.Equal(clean.NorthMPerSec, report.Wind!.NorthMPerSec, 0.1);
        Assert.Equal(clean.EastMPerSec, report.Wind.EastMPerSec, 0.1);
    }

    [Fact]
    public void A_tight_spiral_is_not_taken_for_wild_fixes()
    {
        // 60 deg/s at 14 m/s, a fix a second and five a second
        foreach (double step in (double[])[1, 0.2])
        {
            double[] time = [.. Enumerable.Range(0, 200).Select(i => i * step)];
            double[] north = [.. time.Select(t => 14 * Math.Cos(t * Math.PI / 3))], east = [.. time.Select(t => 14 * Math.Sin(t * Math.PI / 3))];
            Assert.Equal((0, 200), GpsCleaning.RemoveOutliers(time, north, east));
        }
    }

    [Fact]
    public void Frozen_fixes_in_flight_are_counted_with_their_time()
    {
        double[] time = Plain.TimeSec.ToArray();
        FlightLog Freeze(FlightLog log, double from, double to, params ChannelRole[] roles) =>
            SensorFlights.With(log, [.. roles.Select(role =>
            {
                double last = double.NaN;
                return (role, (Func<int, double, double>?)((i, v) =>
                {
                    if (double.IsFinite(v) && !(time[i] >= from && time[i] <= to))
                        last = v;
                    return double.IsFinite(v) ? last : v;
                }));
            })]);
        ChannelRole[] fix = [ChannelRole.Latitude, ChannelRole.Longitude, ChannelRole.GroundSpeed, ChannelRole.GroundCourse];
        FlightLog log = Freeze(Freeze(Plain, 300, 306, fix), 500, 508, fix);
        Finding frozen = SensorFlights.Single(Report(log).Findings, FindingCode.GpsFrozen);
        Assert.Equal(2, frozen.Values[0]);
        Assert.Equal(14.4, frozen.Values[1], 0.5); // 6 s and 8 s, counted from the fix before, 0.2 s earlier
        Assert.DoesNotContain(Report(Plain).Findings, f => f.Code is FindingCode.GpsFrozen or FindingCode.GpsOutliers);
    }

    [Fact]
    public void Left_and_right_brake_exchanged_are_found_in_the_turns()
    {
        double[] left = Plain[ChannelRole.BrakeLeft].ToArray(), right = Plain[ChannelRole.BrakeRight].ToArray();
        FlightLog swapped = SensorFlights.With(Plain, (ChannelRole.BrakeLeft, (i, _) => right[i]), (ChannelRole.BrakeRight, (i, _) => left[i]));
        Finding against = SensorFlights.Single(Report(swapped).Findings, FindingCode.BrakesAgainstTurn);
        Assert.True(against.Values[0] > 20);
        Assert.True(against.Values[1] > 0.9);
        Assert.DoesNotContain(Report(Plain).Findings, f => f.Code == FindingCode.BrakesAgainstTurn);
    }

    [Fact]
    public void A_throttle_that_runs_against_the_rpm_is_found()
    {
        FlightLog reversed = SensorFlights.With(Plain, (ChannelRole.Throttle, (_, v) => 1 - v));
        Assert.True(SensorFlights.Single(Report(reversed).Findings, FindingCode.ThrottleAgainstRpm).Values[0] < -0.8);
        Assert.DoesNotContain(Report(Plain).Findings, f => f.Code == FindingCode.ThrottleAgainstRpm);
    }

    [Theory]
    [InlineData(4, true)]    // a quarter of the steps three times as long
    [InlineData(10, false)]  // a tenth
    public void Uneven_time_stamps_are_told_with_their_share(int every, bool told)
    {
        var time = new double[401];
        for (int i = 1; i < time.Length; i++)
            time[i] = time[i - 1] + (i % every == 0 ? 0.3 : 0.1);
        Finding? jitter = ControlChecks.Jitter(time, new double[401]);
        Assert.Equal(told, jitter is not null);
        if (jitter is null)
            return;
        Assert.Equal(0.1, jitter.Values[0], 9);
        Assert.Equal(0.25, jitter.Values[1], 9);
    }

    [Fact]
    public void Standing_still_is_told_from_a_calm_glide_without_a_GPS_only_by_height_and_engine()
    {
        double[] time = [.. Enumerable.Range(0, 600).Select(i => i * 0.1)];
        double[][] axes = [[.. time.Select((_, i) => 0.01 + (i % 2 == 0 ? 0.002 : -0.002))]];
        double[] idle = [.. time.Select(_ => 0.08)], full = [.. time.Select(_ => 1.0)];
        double[] level = [.. time.Select(_ => 250.0)], sinking = [.. time.Select(t => 250 - (1.5 * t))];
        Standstill still = Standstill.Of(time, axes, [], idle, level, null)!;
        Accuracy.AgreesTo(6, 0.01, still.Bias[0].Value);
        Assert.Equal(double.DegreesToRadians(0.05), still.Bias[0].StandardError, 6); // the drift allowed for; the ripple averages out
        Assert.Null(Standstill.Of(time, axes, [], idle, sinking, null));
        Assert.Null(Standstill.Of(time, axes, [], full, level, null));
        Assert.Null(Standstill.Of(time, axes, [], [], level, null));
        Assert.Null(Standstill.Of(time, axes, [], idle, [], null));
        Assert.Null(Standstill.Of([], [[]], [], [], [], null));
    }
}
