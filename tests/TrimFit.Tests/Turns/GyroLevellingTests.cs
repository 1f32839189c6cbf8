using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Simulation;

namespace TrimFit.Tests.Turns;

/// <summary>A phone at any attitude: the frame's own axes of one simulated flight, turned here by matrices written apart from the program's.</summary>
public class GyroLevellingTests
{
    private const double SlipSec = 430, BiasDeg = 0.6;

    private static readonly ChannelRole[] _gyro = [ChannelRole.GyroX, ChannelRole.GyroY, ChannelRole.GyroZ];
    private static readonly ChannelRole[] _acceleration = [ChannelRole.AccelerationX, ChannelRole.AccelerationY, ChannelRole.AccelerationZ];

    /// <summary>A rotation spread evenly over all attitudes (K. Shoemake, Graphics Gems III (1992) 124).</summary>
    private static double[,] AnyRotation(Random random)
    {
        double u = random.NextDouble(), a = Math.Tau * random.NextDouble(), b = Math.Tau * random.NextDouble();
        double x = Math.Sqrt(1 - u) * Math.Sin(a), y = Math.Sqrt(1 - u) * Math.Cos(a), z = Math.Sqrt(u) * Math.Sin(b), w = Math.Sqrt(u) * Math.Cos(b);
        return new[,]
        {
            { 1 - (2 * ((y * y) + (z * z))), 2 * ((x * y) - (w * z)), 2 * ((x * z) + (w * y)) },
            { 2 * ((x * y) + (w * z)), 1 - (2 * ((x * x) + (z * z))), 2 * ((y * z) - (w * x)) },
            { 2 * ((x * z) - (w * y)), 2 * ((y * z) + (w * x)), 1 - (2 * ((x * x) + (y * y))) },
        };
    }

    private static double[] Turned(double[,] r, double x, double y, double z) =>
        [.. Enumerable.Range(0, 3).Select(k => (r[k, 0] * x) + (r[k, 1] * y) + (r[k, 2] * z))];

    /// <summary>The phone's log with its axes turned by the attitude of each time, and a bias on each axis of the gyro.</summary>
    private static FlightLog Mounted(Func<double, double[,]> attitude, double biasDeg = BiasDeg)
    {
        FlightLog log = SensorFlights.Phone;
        double[][] Turn(ChannelRole[] roles, double offset)
        {
            double[] x = log[roles[0]].ToArray(), y = log[roles[1]].ToArray(), z = log[roles[2]].ToArray(), time = log.TimeSec.ToArray();
            double[][] turned = [new double[x.Length], new double[x.Length], new double[x.Length]];
            for (int i = 0; i < x.Length; i++)
            {
                double[] v = Turned(attitude(time[i]), x[i], y[i], z[i]);
                for (int k = 0; k < 3; k++)
                    turned[k][i] = v[k] + offset;
            }
            return turned;
        }
        double[][] gyro = Turn(_gyro, double.DegreesToRadians(biasDeg)), acceleration = Turn(_acceleration, 0);
        return SensorFlights.With(log,
            [.. _gyro.Select((role, k) => (role, (Func<int, double, double>?)((i, _) => gyro[k][i]))),
             .. _acceleration.Select((role, k) => (role, (Func<int, double, double>?)((i, _) => acceleration[k][i])))]);
    }

    /// <summary>Largest mean difference, deg/s, of levelled and true turn rate over straight flight at low, middle and high power before and after the slip.</summary>
    private static double WorstMeanError(TurnSignals signals)
    {
        ReadOnlySpan<double> truth = SensorFlights.Truth[ChannelRole.YawRate];
        double bias = signals.Gyro!.BiasRadPerSec!.Value.Value;
        double[] sum = new double[6];
        int[] count = new int[6];
        for (int i = 0; i < signals.Count; i++)
        {
            double d = signals.GyroRadPerSec[i] - bias - truth[i];
            if (!signals.Use[i] || !double.IsFinite(d) || Math.Abs(truth[i]) > 0.12)
                continue;
            int group = (signals.Thrust[i] < 100 ? 0 : signals.Thrust[i] < 400 ? 1 : 2) + (signals.TimeSec[i] < SlipSec ? 0 : 3);
            sum[group] += d;
            count[group]++;
        }
        Assert.All(count, n => Assert.True(n > 200));
        return sum.Select((s, k) => Math.Abs(double.RadiansToDegrees(s / count[k]))).Max();
    }

    [Fact]
    public void A_phone_at_20_attitudes_with_one_slip_in_flight_gives_the_true_turn_and_the_right_pull()
    {
        var random = new Random(20260711);
        double[] reference = [.. ((double[])[0.1, 0.4, 1]).Select(f => SensorFlights.PullDegPerSec(SensorFlights.Plain.Log, SensorFlights.Rig, f))];
        double[] felt = [.. _acceleration.Select(MeanAroundSlip)];
        int recognised = 0;
        for (int k = 0; k < 20; k++)
        {
            double[,] before = AnyRotation(random), after = AnyRotation(random);
            double[] up = Turned(before, felt[0], felt[1], felt[2]), upAfter = Turned(after, felt[0], felt[1], felt[2]);
            double angle = Math.Acos(((up[0] * upAfter[0]) + (up[1] * upAfter[1]) + (up[2] * upAfter[2])) / ((felt[0] * felt[0]) + (felt[1] * felt[1]) + (felt[2] * felt[2])));
            FlightLog log = Mounted(t => t < SlipSec ? before : after);
            TurnSignals signals = TurnSignals.From(log, SensorFlights.Rig);
            if (angle > double.DegreesToRadians(25)) // a slip that hardly moves gravity needs no new levelling and is not told from a new seat
            {
                Finding slip = SensorFlights.Single(signals.Findings, FindingCode.GyroSlipped);
                Assert.Equal(SlipSec, slip.Values[0], 2.0);
                Assert.Equal(angle, slip.Values[1], 0.15);
                Assert.Equal(1, slip.Values[2]);
                recognised++;
            }
            SensorFlights.Single(signals.Findings, FindingCode.GyroLevelled);
            double worst = WorstMeanError(signals);
            Assert.True(worst < 0.15, FormattableString.Invariant($"attitude {k}: {worst:F3} deg/s"));
            TurnFit fit = new SteadyWindowEstimator().Estimate(signals);
            foreach ((double fraction, double expected) in ((double[])[0.1, 0.4, 1]).Zip(reference))
                Assert.Equal(expected, double.RadiansToDegrees(fit.PullAt(fraction * signals.FullThrust)!.Value.Value), 0.3);
        }
        Assert.True(recognised >= 17, FormattableString.Invariant($"{recognised} of 20"));
    }

    private static double MeanAroundSlip(ChannelRole role)
    {
        double[] time = SensorFlights.Phone.TimeSec.ToArray();
        return SensorFlights.Phone[role].ToArray().Where((v, i) => double.IsFinite(v) && Math.Abs(time[i] - SlipSec) < 8).Average();
    }

    [Fact]
    public void The_main_estimator_gives_the_true_pull_near_level_power_from_spoilt_sensors()
    {
        var random = new Random(12);
        double[,] before = AnyRotation(random), after = AnyRotation(random);
        FlightLog phone = Mounted(t => t < SlipSec ? before : after);
        FlightLog spoilt = SensorFlights.With(
            FlightSimulator.Fly(SensorFlights.Ordinary(new SensorSuite { GyroDelaySec = 0.8, GyroScale = -Math.Cos(double.DegreesToRadians(35)) })).Log,
            (ChannelRole.YawRate, (_, v) => double.DegreesToRadians(v)));
        double truth = SensorFlights.TruePullDegPerSec(SensorFlights.Plain.Truth, 0.4);
        foreach (FlightLog log in (FlightLog[])[phone, spoilt])
        {
            TurnSignals signals = TurnSignals.From(log, SensorFlights.Rig);
            Core.Statistics.Estimate pull = new FilterErrorEstimator().Estimate(signals).PullAt(0.4 * signals.FullThrust)!.Value;
            Assert.InRange(double.RadiansToDegrees(pull.StandardError), 0.01, 0.4);
            Assert.Equal(truth, double.RadiansToDegrees(pull.Value), 3 * double.RadiansToDegrees(pull.StandardError));
        }
    }

    [Fact]
    public void A_slip_made_by_the_simulator_itself_is_found_at_its_time()
    {
        var sensors = new SensorSuite
        {
            GyroHz = 0,
            InertialHz = 10,
            Mounting = new(2.0, 0.4, -1.0),
            SlipTimeSec = 501,
            MountingAfterSlip = new(0.9, -0.7, 2.5),
        };
        SensorReport report = SensorReport.Of(FlightSimulator.Fly(SensorFlights.Ordinary(sensors)).Log, SensorFlights.Rig);
        Assert.Equal(501, SensorFlights.Single(report.Findings, FindingCode.GyroSlipped).Values[0], 2.0);
        Assert.Equal(1, report.Gyro!.Sign);
    }

    [Fact]
    public void The_pitch_of_the_frame_with_power_is_no_slip()
    {
        double[,] attitude = AnyRotation(new Random(3));
        SensorReport report = SensorReport.Of(Mounted(_ => attitude), SensorFlights.Rig);
        Assert.DoesNotContain(report.Findings, f => f.Code is FindingCode.GyroSlipped or FindingCode.GyroLoose);
    }

    [Fact]
    public void Standing_still_gives_the_bias_along_the_turn_axis_without_a_GPS()
    {
        double[,] attitude = AnyRotation(new Random(4));
        FlightLog log = SensorFlights.With(Mounted(_ => attitude),
            (ChannelRole.Latitude, null), (ChannelRole.Longitude, null), (ChannelRole.GroundSpeed, null), (ChannelRole.GroundCourse, null));
        TurnSignals signals = TurnSignals.From(log, SensorFlights.Rig);
        SensorFlights.Single(signals.Findings, FindingCode.GyroBiasFromStandstill);
        Assert.True(WorstMeanError(signals) < 0.3);
    }

    [Fact]
    public void After_a_slip_without_GPS_and_standing_still_only_the_longest_mounting_is_kept()
    {
        var random = new Random(6);
        double[,] before = AnyRotation(random), after = AnyRotation(random);
        FlightLog log = SensorFlights.With(Mounted(t => t < SlipSec ? before : after),
            (ChannelRole.Latitude, null), (ChannelRole.Longitude, null), (ChannelRole.GroundSpeed, null), (ChannelRole.GroundCourse, null),
            (ChannelRole.Altitude, null), (ChannelRole.VerticalSpeed, null)); // no height: standing cannot be told from gliding
        TurnSignals signals = TurnSignals.From(log, SensorFlights.Rig);
        Finding slip = signals.Findings.Single(f => f.Code == FindingCode.GyroSlipped && Math.Abs(f.Values[0] - SlipSec) < 3);
        Assert.Equal(0, slip.Values[2]);
        Assert.Null(signals.Gyro!.BiasRadPerSec);
        bool early = signals.GyroRadPerSec.Where((_, i) => signals.TimeSec[i] < SlipSec - 4).Any(double.IsFinite);
        bool late = signals.GyroRadPerSec.Where((_, i) => signals.TimeSec[i] > SlipSec + 4).Any(double.IsFinite);
        Assert.True(early ^ late);
    }

    [Fact]
    public void A_phone_that_moves_every_40_seconds_is_loose_and_set_aside_and_the_GPS_gives_the_turn()
    {
        var random = new Random(7);
        double[][,] attitudes = [.. Enumerable.Range(0, 60).Select(_ => AnyRotation(random))];
        FlightLog log = Mounted(t => attitudes[(int)(t / 40)]);
        TurnSignals signals = TurnSignals.From(log, SensorFlights.Rig);
        Finding loose = SensorFlights.Single(signals.Findings, FindingCode.GyroLoose);
        Assert.True(loose.Values[0] > 5);
        Assert.False(signals.HasGyro);
        double pull = SensorFlights.PullDegPerSec(log, SensorFlights.Rig, 0.4);
        Assert.Equal(SensorFlights.PullDegPerSec(SensorFlights.Plain.Log, SensorFlights.Rig, 0.4), pull, 0.5);
    }

    [Fact]
    public void A_phone_that_swings_on_a_cord_is_loose_even_without_a_lasting_move()
    {
        static double[,] Swung(double t)
        {
            (double s, double c) = Math.SinCos(1.2 * Math.Sin(Math.Tau * t / 5)); // 69 deg to either side in 5 s, about the x axis
            return new[,] { { 1.0, 0, 0 }, { 0, c, s }, { 0, -s, c } };
        }
        TurnSignals signals = TurnSignals.From(Mounted(Swung), SensorFlights.Rig);
        Assert.True(SensorFlights.Single(signals.Findings, FindingCode.GyroLoose).Values[1] > double.DegreesToRadians(25));
        Assert.False(signals.HasGyro);
    }

    [Fact]
    public void An_accelerometer_that_counts_the_other_way_changes_nothing()
    {
        double[,] attitude = AnyRotation(new Random(8));
        FlightLog log = Mounted(_ => attitude);
        FlightLog other = SensorFlights.With(log, [.. _acceleration.Select(role => (role, (Func<int, double, double>?)((_, v) => -v)))]);
        Assert.Equal(SensorFlights.PullDegPerSec(log, SensorFlights.Rig, 0.4), SensorFlights.PullDegPerSec(other, SensorFlights.Rig, 0.4), 1e-6);
    }

    [Theory]
    [InlineData(true)]  // no accelerometer
    [InlineData(false)] // one that has gravity taken out
    public void Without_gravity_the_axis_is_found_from_the_GPS_track(bool without)
    {
        double[,] attitude = AnyRotation(new Random(9));
        var noise = new Random(10);
        FlightLog log = SensorFlights.With(Mounted(_ => attitude),
            [.. _acceleration.Select(role => (role, without ? null : (Func<int, double, double>?)((_, v) => double.IsNaN(v) ? v : noise.NextDouble() - 0.5)))]);
        TurnSignals signals = TurnSignals.From(log, SensorFlights.Rig);
        Finding axis = SensorFlights.Single(signals.Findings, FindingCode.GyroAxisFromGps);
        Assert.InRange(double.RadiansToDegrees(axis.Values[0]), 0.1, 6);
        double pull = SensorFlights.PullDegPerSec(log, SensorFlights.Rig, 0.4);
        Assert.Equal(SensorFlights.PullDegPerSec(SensorFlights.Plain.Log, SensorFlights.Rig, 0.4), pull, 0.3);
    }

    [Theory]
    [InlineData(null, 2, 1)]
    [InlineData("x forward, y right, z down", 2, 1)]
    [InlineData("x right, y up, z back", 1, -1)]
    [InlineData("x down, y right, z back", 0, 1)]
    public void The_rigs_words_say_which_axis_is_vertical(string? words, int axis, int sign) =>
        Assert.Equal((axis, sign), GyroLevelling.VerticalAxis(words));

    [Fact]
    public void Without_gravity_GPS_and_compass_an_axis_is_taken_on_trust_and_said_to_be()
    {
        FlightLog log = SensorFlights.With(SensorFlights.Phone,
            (ChannelRole.AccelerationX, null), (ChannelRole.Latitude, null), (ChannelRole.Longitude, null),
            (ChannelRole.GroundSpeed, null), (ChannelRole.GroundCourse, null));
        SensorReport report = SensorReport.Of(log, SensorFlights.Rig);
        Assert.Equal([2, 1], SensorFlights.Single(report.Findings, FindingCode.GyroAxisAssumed).Values);
    }

    [Fact]
    public void The_rate_about_a_banked_axis_becomes_that_of_the_heading()
    {
        // By hand: V = 11 m/s, r = 0.3 rad/s: tan(bank) = 11 · 0.3/9.80665, cos(bank) = 0.947777; the axis reads 0.3 · 0.947777 = 0.284333 plus its bias.
        double[] rate = [0.284333 + 0.01];
        GyroLevelling.TakeBankOut(rate, [0.284333 + 0.01], 0.01, 11);
        Assert.Equal(0.31, rate[0], 5);
    }
}
