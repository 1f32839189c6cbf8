using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Simulation;

namespace TrimFit.Tests.Turns;

/// <summary>Thrust from whatever was logged, against the thrust that follows from the speed of rotation of the same flight.</summary>
public class ThrustSourceTests
{
    private static readonly ChannelRole[] _engine = [ChannelRole.Rpm, ChannelRole.Throttle, ChannelRole.Voltage, ChannelRole.Current];

    private static Rig Rig => SensorFlights.Rig;

    private static ThrustSource Of(FlightLog log, Rig rig) => ThrustSource.Of(log, rig, Propulsion.Of(rig));

    /// <summary>The plain flight with only some of its engine channels.</summary>
    private static FlightLog Only(params ChannelRole[] kept) =>
        SensorFlights.With(SensorFlights.Plain.Log, [.. _engine.Except(kept).Select(role => (role, (Func<int, double, double>?)null))]);

    /// <summary>Root mean square difference of two thrusts in the air, as a share of full.</summary>
    private static double Difference(ThrustSource a, ThrustSource b)
    {
        double[] time = SensorFlights.Plain.Log.TimeSec.ToArray();
        double[] d = [.. a.Thrust.Select((t, i) => time[i] > 60 ? (t - b.Thrust[i]) / b.FullThrust : double.NaN).Where(double.IsFinite)];
        Assert.True(d.Length > 5000);
        return Math.Sqrt(d.Select(x => x * x).Average());
    }

    [Fact]
    public void Volts_and_amperes_give_the_thrust_that_the_rpm_gives()
    {
        ThrustSource electric = Of(Only(ChannelRole.Voltage, ChannelRole.Current), Rig);
        Assert.Equal(ThrustBasis.Newton, electric.Basis);
        Assert.InRange(Difference(electric, Of(Only(ChannelRole.Rpm), Rig)), 0, 0.04);
        Finding power = Assert.Single(electric.Findings);
        Assert.Equal(FindingCode.ThrustFromPower, power.Code);
        // By hand: 2π · 39.8 · 56 = 14004 W at the shaft at sea level, over 0.82; the air at 250 m and above is 2 to 7 % thinner.
        Assert.InRange(power.Values[0], 15500, 17300);
        Assert.Equal(1, power.Values[1]);
    }

    [Fact]
    public void Electric_power_that_never_reaches_the_rigs_shaft_power_takes_full_power_from_the_rig()
    {
        Rig strong = Rig with { Propeller = Rig.Propeller with { ShaftPowerW = 20000 } };
        Finding power = Of(Only(ChannelRole.Voltage, ChannelRole.Current), strong).Findings.Single(f => f.Code == FindingCode.ThrustFromPower);
        Accuracy.AgreesTo(9, 20000 / 0.82, power.Values[0]);
        Assert.Equal(0, power.Values[1]);
    }

    [Fact]
    public void A_current_alone_counts_as_power_on_an_electric_machine_only()
    {
        Rig electric = Rig with { Propeller = Rig.Propeller with { Drive = PropellerDrive.Electric } };
        ThrustSource source = Of(Only(ChannelRole.Current), electric);
        Assert.Equal(FindingCode.CurrentTakenAsPower, Assert.Single(source.Findings).Code);
        Assert.InRange(Difference(source, Of(Only(ChannelRole.Rpm), Rig)), 0, 0.08); // the sagging voltage is not in it
        Rig petrol = Rig with { Wing = Rig.Wing with { GlideSinkMPerSec = null } };
        Assert.Equal(FindingCode.NoThrust, Assert.Single(Of(Only(ChannelRole.Current), petrol).Findings).Code);
    }

    [Fact]
    public void Motor_current_goes_before_rpm_and_is_taken_as_proportional_to_thrust()
    {
        double[] rpm = Of(Only(ChannelRole.Rpm), Rig).RotationRatioSquared;
        double[] time = SensorFlights.Plain.Log.TimeSec.ToArray();
        var columns = SensorFlights.Plain.Log.Roles.ToDictionary(r => r, r => SensorFlights.Plain.Log[r].ToArray());
        columns[ChannelRole.MotorCurrent] = [.. rpm.Select(r => 240 * r)];
        FlightLog log = FlightLog.Create(time, columns);
        ThrustSource source = Of(log, Rig);
        Finding motor = Assert.Single(source.Findings);
        Assert.Equal(FindingCode.ThrustFromMotorCurrent, motor.Code);
        Assert.Equal(240, motor.Values[0], 6.0);
        Assert.InRange(Difference(source, Of(Only(ChannelRole.Rpm), Rig)), 0, 0.03);
    }

    [Fact]
    public void A_throttle_table_is_followed_through_its_points_and_rises_between_them()
    {
        Rig table = Rig with { Propeller = Rig.Propeller with { ThrottleThrust = [(0, 0.05), (0.3, 0.1), (0.5, 0.6), (1, 1)] } };
        double[] time = [.. Enumerable.Range(0, 101).Select(i => i * 0.1)];
        double[] throttle = [.. Enumerable.Range(0, 101).Select(i => i * 0.01)];
        ThrustSource source = Of(FlightLog.Create(time, [new(ChannelRole.Throttle, throttle)]), table);
        double full = source.FullThrust;
        Assert.Equal(0.05 * full, source.Thrust[0], 9);
        Assert.Equal(0.1 * full, source.Thrust[30], 9);
        Assert.Equal(0.6 * full, source.Thrust[50], 9);
        Assert.Equal(full, source.Thrust[100], 9);
        Assert.All(Enumerable.Range(1, 100), i => Assert.True(source.Thrust[i] > source.Thrust[i - 1]));
        // Fritsch & Carlson by hand at 0.4. Secants 1/6, 2.5, 0.8. Slope at 0.3: mean 4/3, shortened in the first interval (α = 1, β = 8) to
        // 3/√65 · 8 · 1/6 = 4/√65; at 0.5: mean 1.65, which stays. Middle of the cubic: (0.1 + 0.6)/2 + 0.2 (4/√65 − 1.65)/8.
        Accuracy.AgreesTo(9, (0.35 + (0.2 * ((4 / Math.Sqrt(65)) - 1.65) / 8)) * full, source.Thrust[40]);
    }

    [Fact]
    public void A_clutch_of_unknown_speed_stands_at_the_logs_idle_and_gives_no_thrust_there()
    {
        Rig clutch = Rig with
        {
            Propeller = Rig.Propeller with
            {
                Drive = PropellerDrive.Clutch,
                RpmIs = RpmMeaning.Engine,
                ReductionRatio = 2.5,
                FullPowerRevPerSec = 2.5 * 39.8,
                ClutchEngageRevPerSec = null,
            },
        };
        FlightLog log = SensorFlights.With(Only(ChannelRole.Rpm), (ChannelRole.Rpm, (_, v) => 2.5 * v)); // engine turns, idling at 0.3 of full
        ThrustSource source = Of(log, clutch);
        Finding engage = source.Findings.Single(f => f.Code == FindingCode.ClutchEngageAssumed);
        Assert.Equal(1.25 * 0.3 * 2.5 * 39.8, engage.Values[0], 1.5);
        double[] rpm = ThrustSource.Held(log, ChannelRole.Rpm);
        Assert.All(Enumerable.Range(0, log.Count).Where(i => rpm[i] < 0.33 * 2.5 * 39.8), i => Assert.Equal(0, source.Thrust[i]));
        Assert.Contains(source.Thrust, t => t > 500);
        Rig given = clutch with { Propeller = clutch.Propeller with { ClutchEngageRevPerSec = 50 } };
        Assert.DoesNotContain(Of(log, given).Findings, f => f.Code == FindingCode.ClutchEngageAssumed);
    }

    [Fact]
    public void A_clutch_machine_whose_propeller_stands_at_idle_is_fitted_right()
    {
        Scenario scenario = SensorFlights.Ordinary(new SensorSuite(), change: s => s with { Propeller = s.Propeller with { Clutch = true } });
        SimulatedFlight flight = FlightSimulator.Fly(scenario);
        TurnSignals signals = TurnSignals.From(flight.Log, SensorFlights.RigOf(scenario));
        Assert.Contains(signals.Thrust.Where((_, i) => signals.Use[i]), t => t == 0);
        TurnFit fit = new SteadyWindowEstimator().Estimate(signals);
        foreach (double fraction in (double[])[0, 0.4])
        {
            Core.Statistics.Estimate pull = fit.PullAt(fraction * signals.FullThrust)!.Value;
            Assert.Equal(SensorFlights.TruePullDegPerSec(flight.Truth, fraction), double.RadiansToDegrees(pull.Value), 3 * double.RadiansToDegrees(pull.StandardError));
        }
    }

    [Fact]
    public void Counter_rotating_propellers_claim_no_pull_of_power()
    {
        Scenario scenario = SensorFlights.Ordinary(new SensorSuite(), change: s => s with
        {
            Propeller = s.Propeller with { Rotation = 0 },
            Wing = s.Wing with { ConstantPullRadPerSec = double.DegreesToRadians(2.5) },
        });
        TrimAnalysis result = TrimAnalysis.Run(FlightSimulator.Fly(scenario).Log, SensorFlights.RigOf(scenario), new TrimOptions());
        SensorFlights.Single(result.Warnings, FindingCode.ContraRotating);
        Assert.Equal(VerdictCode.ConstantPull, result.Verdict.Code);
    }

    [Fact]
    public void Climb_gives_the_thrust_when_nothing_of_the_engine_was_logged()
    {
        ThrustSource climb = Of(Only(), Rig), rpm = Of(Only(ChannelRole.Rpm), Rig);
        Finding finding = Assert.Single(climb.Findings);
        Assert.Equal(FindingCode.ThrustFromClimb, finding.Code);
        // By hand: W = 124 kg · 9.80665 = 1216 N; over 11 m/s; times √(0.3² + 0.2²) m/s.
        Accuracy.AgreesTo(3, 1216.02 / 11 * Math.Sqrt(0.13), finding.Values[0]);
        double[] time = SensorFlights.Plain.Log.TimeSec.ToArray();
        double[] d = [.. climb.Thrust.Select((t, i) => time[i] > 60 ? t - rpm.Thrust[i] : double.NaN).Where(double.IsFinite)];
        Assert.InRange(d.Average(), -40, 40);
        Assert.InRange(d.Select(Math.Abs).Order().ElementAt(d.Length / 2), 0, 60);
    }

    [Fact]
    public void The_climb_checks_the_rigs_thrust_and_finds_a_wrong_one()
    {
        TurnSignals right = TurnSignals.From(SensorFlights.Plain.Log, Rig);
        Finding agrees = ClimbThrust.Check(right, Rig, Propulsion.Of(Rig))!;
        Assert.Equal(FindingCode.ThrustScaleByClimb, agrees.Code);
        Assert.Equal(1, agrees.Values[0], 0.12); // the simulator's thrust does not fall in flight
        Assert.InRange(agrees.Values[1], 0.005, 0.1);
        Assert.Equal(1, agrees.Values[3]);
        Rig wrong = Rig with { Propeller = Rig.Propeller with { StaticThrustN = Reading.Measured(1100, 20) } };
        Finding differs = ClimbThrust.Check(TurnSignals.From(SensorFlights.Plain.Log, wrong), wrong, Propulsion.Of(wrong))!;
        Assert.Equal(600.0 / 1100, differs.Values[0], 0.08);
        Rig half = Rig with { Propeller = Rig.Propeller with { StaticThrustN = Reading.Measured(350, 10) } };
        Assert.Equal(0, ClimbThrust.Check(TurnSignals.From(SensorFlights.Plain.Log, half), half, Propulsion.Of(half))!.Values[3]);
    }

    [Fact]
    public void A_rig_without_a_thrust_gets_one_from_climb_to_be_looked_at()
    {
        Rig silent = Rig with { Propeller = Rig.Propeller with { StaticThrustN = null, ShaftPowerW = null } };
        TurnSignals signals = TurnSignals.From(SensorFlights.Plain.Log, silent);
        Assert.Equal(ThrustBasis.Relative, signals.ThrustBasis);
        Finding full = ClimbThrust.Check(signals, silent, Propulsion.Of(silent))!;
        Assert.Equal(FindingCode.FullThrustByClimb, full.Code);
        Assert.Equal(600, full.Values[0], 80.0);
    }

    [Fact]
    public void Thrust_in_flight_follows_from_the_static_one_at_the_same_power()
    {
        double area = MomentumTheory.DiskArea(1.25);
        // Independent: bisection on P = T (V/2 + √(V²/4 + T/(2ρA))) with P = 600 · √(600/(2ρA)) = 8475.96 W, done in Python.
        Accuracy.AgreesTo(12, 448.56640211862583, InFlightThrust.AtConstantPower(600, area, 1.225, 11));
        Assert.Equal(600, InFlightThrust.AtConstantPower(600, area, 1.225, 0), 9);
        Assert.Equal(0, InFlightThrust.AtConstantPower(0, area, 1.225, 11));
        Assert.Throws<ArgumentOutOfRangeException>(() => InFlightThrust.AtConstantPower(600, area, 1.225, double.NaN));
    }
}
