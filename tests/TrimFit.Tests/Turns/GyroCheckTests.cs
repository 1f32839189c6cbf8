using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Turns;
using TrimFit.Simulation;

namespace TrimFit.Tests.Turns;

/// <summary>A yaw gyro against the GPS on made-up flights whose truth is known.</summary>
public class GyroCheckTests
{
    private const double DegreesInRadian = 180 / Math.PI;

    /// <summary>The pull of the flight with right sensors: what every mended flight must give again, deg/s at a tenth, four tenths and all of full thrust.</summary>
    private static void PullIsThatOfRightSensors(FlightLog log, double within)
    {
        foreach (double fraction in (double[])[0.1, 0.4, 1])
        {
            double expected = SensorFlights.PullDegPerSec(SensorFlights.Plain.Log, SensorFlights.Rig, fraction);
            Assert.Equal(expected, SensorFlights.PullDegPerSec(log, SensorFlights.Rig, fraction), within);
        }
    }

    private static GyroReport Gyro(FlightLog log, out SensorReport report)
    {
        report = SensorReport.Of(log, SensorFlights.Rig);
        return report.Gyro ?? throw new InvalidOperationException("the report has no gyro");
    }

    [Fact]
    public void A_right_gyro_is_left_alone_and_its_bias_is_found()
    {
        GyroReport gyro = Gyro(SensorFlights.Plain.Log, out SensorReport report);
        Assert.Equal(1, gyro.Sign);
        Assert.Equal(1, gyro.Scale!.Value, 0.04);
        Assert.Equal(0, gyro.DelaySec!.Value, 0.1);
        Assert.Equal(0.6, double.RadiansToDegrees(gyro.BiasRadPerSec!.Value.Value), 0.1); // as simulated
        Assert.Equal([FindingCode.GyroBiasFromStandstill], report.Findings.Select(f => f.Code));
        Finding still = report.Findings[0];
        Assert.Equal(0.6, double.RadiansToDegrees(still.Values[0]), 3 * double.RadiansToDegrees(still.Values[1]));
        Assert.InRange(still.Values[2], 25, 45); // it stood for 30 s and then began to run
    }

    [Fact]
    public void The_pull_near_level_power_of_the_flight_with_right_sensors_is_the_simulators_within_its_error()
    {
        TurnSignals signals = TurnSignals.From(SensorFlights.Plain.Log, SensorFlights.Rig);
        Core.Statistics.Estimate pull = new SteadyWindowEstimator().Estimate(signals).PullAt(0.4 * signals.FullThrust)!.Value;
        double truth = SensorFlights.TruePullDegPerSec(SensorFlights.Plain.Truth, 0.4);
        Assert.Equal(truth, double.RadiansToDegrees(pull.Value), 3 * double.RadiansToDegrees(pull.StandardError));
    }

    [Fact]
    public void A_gyro_upside_down_is_turned_over()
    {
        FlightLog log = SensorFlights.With(SensorFlights.Plain.Log, (ChannelRole.YawRate, (_, v) => -v));
        GyroReport gyro = Gyro(log, out SensorReport report);
        Assert.Equal(-1, gyro.Sign);
        Assert.Equal(-1, gyro.Scale!.Value, 0.04);
        SensorFlights.Single(report.Findings, FindingCode.GyroSignReversed);
        PullIsThatOfRightSensors(log, 1e-6);
    }

    [Theory]
    [InlineData(1 / DegreesInRadian)] // rad/s under a deg/s name: the import divided by 57.3
    [InlineData(DegreesInRadian)]     // deg/s under a rad/s name
    public void A_gyro_in_the_other_unit_is_recognised_and_mended(double factor)
    {
        FlightLog log = SensorFlights.With(SensorFlights.Plain.Log, (ChannelRole.YawRate, (_, v) => v * factor));
        Gyro(log, out SensorReport report);
        Finding unit = SensorFlights.Single(report.Findings, FindingCode.GyroUnitCorrected);
        Assert.Equal(1, unit.Values[0] / factor, 0.04);
        PullIsThatOfRightSensors(log, 1e-6);
    }

    [Fact]
    public void A_gyro_upside_down_in_the_other_unit_and_late_is_mended_in_all_three()
    {
        Scenario late = SensorFlights.Ordinary(new SensorSuite { GyroDelaySec = 0.8 });
        FlightLog log = SensorFlights.With(FlightSimulator.Fly(late).Log, (ChannelRole.YawRate, (_, v) => -v / DegreesInRadian));
        Gyro(log, out SensorReport report);
        SensorFlights.Single(report.Findings, FindingCode.GyroSignReversed);
        SensorFlights.Single(report.Findings, FindingCode.GyroUnitCorrected);
        SensorFlights.Single(report.Findings, FindingCode.GyroDelayed);
        PullIsThatOfRightSensors(log, 0.1);
    }

    [Fact]
    public void A_gyro_tilted_by_35_degrees_is_recognised_and_its_scale_mended()
    {
        Scenario tilted = SensorFlights.Ordinary(new SensorSuite { GyroScale = Math.Cos(double.DegreesToRadians(35)) });
        FlightLog log = FlightSimulator.Fly(tilted).Log;
        Gyro(log, out SensorReport report);
        Finding scale = SensorFlights.Single(report.Findings, FindingCode.GyroScaleCorrected);
        Assert.Equal(0.8192, scale.Values[0], 3 * scale.Values[1]); // cos 35 deg
        Assert.Equal(35, double.RadiansToDegrees(scale.Values[2]), 5.0);
        PullIsThatOfRightSensors(log, 0.1);
    }

    [Fact]
    public void A_gyro_that_is_0_8_s_late_is_moved()
    {
        FlightLog log = FlightSimulator.Fly(SensorFlights.Ordinary(new SensorSuite { GyroDelaySec = 0.8 })).Log;
        GyroReport gyro = Gyro(log, out SensorReport report);
        Finding late = SensorFlights.Single(report.Findings, FindingCode.GyroDelayed);
        Assert.Equal(0.8, late.Values[0], 3 * late.Values[1]);
        Assert.InRange(late.Values[1], 0.005, 0.1);
        Assert.Equal(late.Values[0], gyro.DelaySec);
        PullIsThatOfRightSensors(log, 0.1);
        Assert.True(RmsDegPerSec(TurnSignals.From(log, SensorFlights.Rig).GyroRadPerSec) < 1.0); // its noise is 0.8 deg/s
        Assert.True(RmsDegPerSec(log[ChannelRole.YawRate].ToArray()) > 1.3);                  // unmoved
    }

    private static double RmsDegPerSec(double[] gyro)
    {
        double[] truth = SensorFlights.Truth[ChannelRole.YawRate].ToArray();
        double[] off = [.. gyro.Select((g, i) => i > 600 && i < gyro.Length - 20 ? g - double.DegreesToRadians(0.6) - truth[i] : double.NaN).Where(double.IsFinite)];
        return double.RadiansToDegrees(Math.Sqrt(off.Select(d => d * d).Average()));
    }

    [Fact]
    public void A_late_GPS_is_moved_instead_of_the_gyro()
    {
        FlightLog log = FlightSimulator.Fly(SensorFlights.Ordinary(new SensorSuite { GpsDelaySec = 0.6 })).Log;
        GyroReport gyro = Gyro(log, out SensorReport report);
        Finding late = SensorFlights.Single(report.Findings, FindingCode.GpsDelayed);
        Assert.Equal(0.6, late.Values[0], 3 * late.Values[1]);
        Assert.Equal(-late.Values[0], gyro.DelaySec!.Value, 12);
        Assert.Equal(log[ChannelRole.YawRate].ToArray(), TurnSignals.From(log, SensorFlights.Rig).GyroRadPerSec);
        PullIsThatOfRightSensors(log, 0.1);
    }

    [Fact]
    public void A_gyro_in_no_known_unit_is_calibrated_by_the_GPS()
    {
        FlightLog log = SensorFlights.With(SensorFlights.Plain.Log, (ChannelRole.YawRate, (_, v) => v * 5));
        Gyro(log, out SensorReport report);
        Finding scale = SensorFlights.Single(report.Findings, FindingCode.GyroScaleOff);
        Assert.Equal(5, scale.Values[0], 0.2);
        Assert.Equal(1, scale.Values[1]);
        PullIsThatOfRightSensors(log, 0.2);
    }

    [Fact]
    public void Without_GPS_and_compass_nothing_is_said_of_scale_and_sign_but_the_bias_comes_from_standing_still()
    {
        FlightLog log = SensorFlights.With(SensorFlights.Plain.Log,
            (ChannelRole.Latitude, null), (ChannelRole.Longitude, null), (ChannelRole.GroundSpeed, null), (ChannelRole.GroundCourse, null));
        GyroReport gyro = Gyro(log, out SensorReport report);
        Assert.Null(gyro.Scale);
        Assert.Null(gyro.Sign);
        Assert.Null(gyro.DelaySec);
        Assert.False(report.YawSignConfirmed);
        SensorFlights.Single(report.Findings, FindingCode.YawSignUnconfirmed);
        SensorFlights.Single(report.Findings, FindingCode.GyroBiasFromStandstill);
        Assert.Equal(0.6, double.RadiansToDegrees(gyro.BiasRadPerSec!.Value.Value), 0.3);
        double pull = SensorFlights.PullDegPerSec(log, SensorFlights.Rig, 0.4); // identified, since standing still gave the bias
        Assert.Equal(SensorFlights.PullDegPerSec(SensorFlights.Plain.Log, SensorFlights.Rig, 0.4), pull, 0.4);
    }

    [Fact]
    public void Delay_scale_and_intercept_of_an_exact_turn_are_found()
    {
        // heading h(t) with rate r(t); the gyro reads 0.8 r(t − 0.37 s) + 0.01
        static double Rate(double t) => (0.2 * Math.Sin(t / 6)) + (0.1 * Math.Cos(t / 2.3));
        static double Angle(double t) => (-1.2 * Math.Cos(t / 6)) + (0.23 * Math.Sin(t / 2.3));
        double[] time = [.. Enumerable.Range(0, 6000).Select(i => i * 0.1)];
        double[] gyro = [.. time.Select(t => (0.8 * Rate(t - 0.37)) + 0.01)];
        double[] heading = [.. time.Select((t, i) => i % 2 == 0 ? Angle(t) : double.NaN)];
        bool[] use = [.. time.Select(_ => true)];
        HeadingMatch match = new HeadingRegression(time, [gyro], heading, use).Fit(intercept: true, findDelay: true)!;
        Accuracy.AgreesTo(3, 1 / 0.8, match.Coefficients[0]);
        Accuracy.AgreesTo(2, -0.01 / 0.8, match.Intercept.Value);
        Assert.Equal(0.37, match.DelaySec!.Value.Value, 0.002);
    }

    [Fact]
    public void A_column_moved_earlier_goes_by_whole_samples_and_never_mixes_two()
    {
        double[] time = [0, 0.1, 0.2, 0.3, 0.4, 0.5, 5, 5.1];
        double[] moved = GyroCheck.Earlier(time, [0, 2, 4, 6, 8, 10, 100, 102], 0.21);
        Assert.Equal([4, 6, 8, 10, double.NaN, double.NaN, double.NaN, double.NaN], moved); // nothing comes from across the pause
        Assert.Equal([0, 2, 4], GyroCheck.Earlier([0, 0.1, 0.2], [0, 2, 4], 0.04)); // less than half a sample is left
    }

    [Fact]
    public void A_log_of_one_row_has_a_report_without_a_gyro_scale()
    {
        FlightLog log = FlightLog.Create([0], [new(ChannelRole.YawRate, [0.1])]);
        SensorReport report = SensorReport.Of(log, SensorFlights.Rig);
        Assert.Null(report.Gyro!.Scale);
        Assert.Null(report.Gyro.BiasRadPerSec);
    }
}
