using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.SimulationTests;

namespace TrimFit.Tests.Turns.FilterError;

public class FilterErrorEstimatorTests
{
    private static readonly FilterErrorEstimator _estimator = new();

    private static TurnScenario Machine(int seed, bool second = false, Sensors sensors = Sensors.GyroAndGps) =>
        TurnScenario.Random(new Gauss(seed), second, sensors, Hardship.None) with { DurationSec = 300 };

    private static TurnSignals Flight(int seed, bool second = false, Sensors sensors = Sensors.GyroAndGps) =>
        MadeUpFlight.Fly(Machine(seed, second, sensors), new Gauss(seed + 1000));

    private static TurnSignals Change(TurnSignals s, double[]? gyro = null, double[]? thrust = null, bool? hasThrust = null, double[]? brakes = null, bool? hasBrakes = null,
        bool? gps = null, bool[]? use = null, GyroReport? report = null, double[]? rotation = null) => new()
        {
            TimeSec = s.TimeSec,
            Thrust = thrust ?? s.Thrust,
            ThrustBasis = s.ThrustBasis,
            FullThrust = s.FullThrust,
            HasThrust = hasThrust ?? s.HasThrust,
            BrakeDifference = brakes ?? s.BrakeDifference,
            HasBrakes = hasBrakes ?? s.HasBrakes,
            GyroRadPerSec = gyro ?? s.GyroRadPerSec,
            RotationRatioSquared = rotation ?? s.RotationRatioSquared,
            VelocityNorth = gps == false ? [] : s.VelocityNorth,
            VelocityEast = gps == false ? [] : s.VelocityEast,
            Wind = gps == false ? null : s.Wind,
            Use = use ?? s.Use,
            HandsOff = s.HandsOff,
            HandsOffDeclared = s.HandsOffDeclared,
            Gyro = report,
        };

    private static void Holds(double truth, Estimate? found, double errors)
    {
        Assert.NotNull(found);
        Assert.True(Math.Abs(found.Value.Value - truth) < errors * found.Value.StandardError,
            FormattableString.Invariant($"truth {truth:G4}, found {found.Value.Value:G4} ± {found.Value.StandardError:G3}"));
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void A_made_up_flight_is_found_again_and_so_is_the_order_of_its_wing(bool second)
    {
        TurnScenario machine = Machine(3, second);
        TurnFit fit = _estimator.Estimate(Flight(3, second));
        Holds(machine.PullAt(machine.LevelShare), fit.PullAt(machine.LevelThrust), 4);
        Holds(machine.SlopePerFull / machine.FullThrust, fit[TurnCoefficient.Thrust], 4);
        Holds(machine.Brake, fit[TurnCoefficient.BrakeDifference], 4);
        Holds(machine.GyroBias, fit.GyroBiasRadPerSec, 4);
        Assert.Equal(second, fit.ResponseIsSecondOrder);
        Assert.True(fit.Convergence!.Value.Converged);
        Assert.InRange(fit.EffectiveSamples, 5, 500);
    }

    [Fact]
    public void Left_and_right_are_treated_alike()
    {
        TurnSignals s = Flight(5);
        var mirrored = new TurnSignals
        {
            TimeSec = s.TimeSec,
            Thrust = s.Thrust,
            ThrustBasis = s.ThrustBasis,
            FullThrust = s.FullThrust,
            HasThrust = true,
            BrakeDifference = [.. s.BrakeDifference.Select(b => -b)],
            HasBrakes = true,
            GyroRadPerSec = [.. s.GyroRadPerSec.Select(g => -g)],
            RotationRatioSquared = s.RotationRatioSquared,
            VelocityNorth = s.VelocityNorth,
            VelocityEast = [.. s.VelocityEast.Select(v => -v)],
            Wind = s.Wind! with { EastMPerSec = -s.Wind.EastMPerSec },
            Use = s.Use,
            HandsOff = s.HandsOff,
        };
        TurnFit fit = _estimator.Estimate(s), other = _estimator.Estimate(mirrored);
        Accuracy.AgreesTo(6, -fit[TurnCoefficient.Constant]!.Value.Value, other[TurnCoefficient.Constant]!.Value.Value);
        Accuracy.AgreesTo(6, -fit[TurnCoefficient.Thrust]!.Value.Value, other[TurnCoefficient.Thrust]!.Value.Value);
        Accuracy.AgreesTo(6, fit[TurnCoefficient.BrakeDifference]!.Value.Value, other[TurnCoefficient.BrakeDifference]!.Value.Value);
    }

    [Fact]
    public void Units_of_thrust_and_brakes_do_not_change_the_pull()
    {
        TurnSignals s = Flight(6);
        TurnFit fit = _estimator.Estimate(s);
        TurnFit counts = _estimator.Estimate(Change(s, brakes: [.. s.BrakeDifference.Select(b => 1024 * b)])); // a power of two: exact
        Accuracy.AgreesTo(9, fit[TurnCoefficient.BrakeDifference]!.Value.Value, 1024 * counts[TurnCoefficient.BrakeDifference]!.Value.Value);
        Accuracy.AgreesTo(9, fit.PullAt(300)!.Value.Value, counts.PullAt(300)!.Value.Value);
    }

    [Fact]
    public void What_is_not_to_be_used_does_not_count()
    {
        TurnSignals s = Flight(8);
        bool[] use = [.. Enumerable.Range(0, s.Count).Select(i => i is < 900 or > 1300)];
        double[] wild = [.. s.GyroRadPerSec.Select((g, i) => use[i] ? g : 3)];
        TurnFit fit = _estimator.Estimate(Change(s, use: use)), other = _estimator.Estimate(Change(s, gyro: wild, use: use));
        Assert.Equal(fit.Coefficients.AsEnumerable(), other.Coefficients);
    }

    [Fact]
    public void Spikes_of_a_hundred_degrees_a_second_hardly_move_the_pull()
    {
        TurnScenario machine = Machine(9);
        TurnSignals s = Flight(9);
        var random = new Gauss(1);
        double[] spiked = [.. s.GyroRadPerSec.Select(g => random.Uniform() < 0.01 ? g + 1.75 : g)];
        Estimate clean = _estimator.Estimate(s).PullAt(machine.LevelThrust)!.Value;
        TurnFit fit = _estimator.Estimate(Change(s, gyro: spiked));
        Estimate found = fit.PullAt(machine.LevelThrust)!.Value;
        Assert.True(Math.Abs(found.Value - clean.Value) < 0.5 * clean.StandardError, FormattableString.Invariant($"{clean.Value:G4} became {found.Value:G4}"));
        Assert.Contains(fit.Notices, n => n.Code == FindingCode.TurnOutliers);
    }

    [Fact]
    public void Without_GPS_or_standing_still_the_constant_is_not_told()
    {
        TurnSignals s = Flight(10);
        TurnFit fit = _estimator.Estimate(Change(s, gps: false));
        Assert.Null(fit[TurnCoefficient.Constant]);
        Assert.Equal("the gyro's own bias cannot be told from a constant pull without GPS, compass or a spell of standing still", fit.Coefficients[0].Reason);
        Assert.NotNull(fit[TurnCoefficient.Thrust]);
        Assert.Null(fit.GyroBiasRadPerSec);
        Assert.Contains(fit.Notices, n => n.Code == FindingCode.GyroBiasUnknown);
    }

    [Fact]
    public void Standing_still_gives_the_bias_without_GPS()
    {
        TurnScenario machine = Machine(11);
        TurnSignals s = Flight(11);
        double error = double.DegreesToRadians(0.05);
        TurnFit fit = _estimator.Estimate(Change(s, gps: false, report: new GyroReport { BiasRadPerSec = new(machine.GyroBias, error) }));
        Holds(machine.PullAt(machine.LevelShare), fit.PullAt(machine.LevelThrust), 4);
        Assert.True(fit.GyroBiasRadPerSec!.Value.StandardError <= 1.01 * error);
    }

    [Fact]
    public void Flat_throttle_shows_no_growth_with_power_and_says_so()
    {
        TurnSignals s = Flight(12);
        TurnFit fit = _estimator.Estimate(Change(s, thrust: [.. s.TimeSec.Select((_, i) => i % 2 == 0 ? 400.0 : 402.0)]));
        Assert.Null(fit[TurnCoefficient.Thrust]);
        Assert.Equal("thrust stayed between 400 and 402 N", fit.Coefficients[1].Reason);
        Assert.Equal("cannot be told from the growth with thrust: thrust stayed between 400 and 402 N", fit.Coefficients[0].Reason);
        Assert.NotNull(fit[TurnCoefficient.BrakeDifference]);
        Assert.NotEmpty(fit.Points);
        Assert.All(fit.Points, p => Assert.InRange(p.Thrust, 400, 402)); // drawn where they were flown
    }

    [Fact]
    public void Without_thrust_the_mean_pull_is_still_given()
    {
        TurnSignals s = Flight(13);
        TurnFit fit = _estimator.Estimate(Change(s, hasThrust: false, thrust: new double[s.Count]));
        Assert.NotNull(fit[TurnCoefficient.Constant]);
        Assert.Equal("the log says nothing about thrust", fit.Coefficients[1].Reason);
        Assert.Contains(fit.Notices, n => n.Code == FindingCode.NoThrust);
    }

    [Fact]
    public void Brakes_that_follow_thrust_are_named()
    {
        TurnSignals s = Flight(14);
        TurnFit fit = _estimator.Estimate(Change(s, brakes: [.. s.Thrust.Select(t => -0.2 * t / s.FullThrust)]));
        Finding finding = Assert.Single(fit.Notices, n => n.Code == FindingCode.BrakesCollinear);
        Assert.InRange(finding.Values[0], 0.99, 1);
        Assert.All(fit.Coefficients, c => Assert.True(c.Estimate is null || double.IsFinite(c.Estimate.Value.StandardError)));
    }

    [Fact]
    public void Without_brakes_only_declared_hands_off_spans_count()
    {
        TurnScenario machine = Machine(15, sensors: Sensors.Gps5HzAndSheet);
        TurnSignals s = Flight(15, sensors: Sensors.Gps5HzAndSheet);
        TurnFit fit = _estimator.Estimate(s);
        Holds(machine.PullAt(machine.LevelShare), fit.PullAt(machine.LevelThrust), 4);
        Assert.Equal("no brakes or steering channel logged", fit.Coefficients[3].Reason);
        Assert.All(fit.Points, p => Assert.True(p.HandsOff));
        Assert.DoesNotContain(fit.Notices, n => n.Code == FindingCode.NoSteeringNoHandsOff);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void A_machine_that_hardly_turns_keeps_its_brakes_with_GPS_alone(bool slow)
    {
        Sensors sensors = slow ? Sensors.Gps1Hz : Sensors.Gps5Hz;
        // With wind columns taken at the measured heading the brake coefficient of such a flight came out at a tenth of its size.
        for (int seed = 20; seed < 24; seed++)
        {
            TurnScenario machine = Machine(seed, sensors: sensors) with
            {
                Constant = 0,
                SlopePerFull = 0,
                CurvaturePerFull = 0,
                DisturbanceRms = double.DegreesToRadians(0.8),
                DurationSec = 600,
            };
            TurnFit fit = _estimator.Estimate(MadeUpFlight.Fly(machine, new Gauss(seed + 1000)));
            Assert.InRange(fit[TurnCoefficient.BrakeDifference]!.Value.Value / machine.Brake, 0.5, 1.5);
        }
    }

    [Fact]
    public void A_dead_band_of_the_brakes_is_found_only_where_there_is_one()
    {
        TurnScenario machine = Machine(30) with { DurationSec = 600 };
        TurnFit without = _estimator.Estimate(MadeUpFlight.Fly(machine, new Gauss(77)));
        TurnFit with = _estimator.Estimate(MadeUpFlight.Fly(machine with { Hardship = Hardship.BrakeDeadBand }, new Gauss(77)));
        Assert.Null(without.BrakeDeadBand);
        Assert.InRange(with.BrakeDeadBand!.Value, 0.05, 0.11); // made with 0.08
        Holds(machine.Brake, with[TurnCoefficient.BrakeDifference], 4);
    }

    [Fact]
    public void A_held_course_shows_as_feedback_and_lone_brake_steps_do_not()
    {
        TurnScenario machine = Machine(31) with { DurationSec = 600 };
        TurnSignals held = MadeUpFlight.Fly(machine with { Hardship = Hardship.HeldLegs }, new Gauss(78));
        double[] steps = [.. held.TimeSec.Select(t => (t % 40) is > 20 and < 26 ? (t % 80 > 40 ? 0.15 : -0.15) : 0)];
        double share = _estimator.Estimate(held).BrakeFeedbackShare!.Value;
        double lone = _estimator.Estimate(Change(held, brakes: steps)).BrakeFeedbackShare!.Value;
        Assert.True(share > lone + 0.2, FormattableString.Invariant($"held {share:F2}, steps {lone:F2}"));
        Assert.InRange(lone, 0, 0.35);
    }

    [Fact]
    public void Nothing_usable_gives_reasons_and_no_numbers()
    {
        TurnSignals s = Flight(16);
        TurnFit fit = _estimator.Estimate(Change(s, use: new bool[s.Count]));
        Assert.All(fit.Coefficients, c => Assert.Equal("no part of the flight is usable", c.Reason));
        Assert.All(fit.Coefficients, c => Assert.Null(c.Estimate));
        TurnFit bare = _estimator.Estimate(Change(s, gyro: [], gps: false));
        Assert.All(bare.Coefficients, c => Assert.Equal("too few measurements of the turn are usable", c.Reason));
        Assert.Equal(FindingCode.NoTurnRate, Assert.Single(bare.Notices).Code);
    }

    [Fact]
    public void Holes_in_every_channel_leave_no_NaN_in_the_result()
    {
        TurnSignals s = Flight(17);
        var random = new Gauss(2);
        double[] gyro = [.. s.GyroRadPerSec.Select((g, i) => random.Uniform() < 0.3 || i is > 500 and < 900 ? double.NaN : g)];
        TurnFit fit = _estimator.Estimate(Change(s, gyro: gyro));
        Assert.All(fit.Covariance, v => Assert.True(double.IsFinite(v)));
        Assert.All(fit.Coefficients, c => Assert.True(double.IsFinite(c.Estimate!.Value.Value) && double.IsFinite(c.Estimate.Value.StandardError)));
        Assert.All(fit.Points, p => Assert.True(double.IsFinite(p.TurnRateRadPerSec) && double.IsFinite(p.Thrust)));
    }

    [Fact]
    public void The_same_flight_gives_the_same_numbers_to_the_last_bit()
    {
        TurnSignals s = Flight(18);
        Assert.Equal(_estimator.Estimate(s).Covariance.AsEnumerable(), _estimator.Estimate(s).Covariance);
    }
}
