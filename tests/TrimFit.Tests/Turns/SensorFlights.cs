using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Import.Rigs;
using TrimFit.Simulation;

namespace TrimFit.Tests.Turns;

/// <summary>One ordinary made-up flight of about 17 minutes and ways to spoil its sensors.</summary>
internal static class SensorFlights
{
    private static readonly Lazy<SimulatedFlight> _plain = new(() => FlightSimulator.Fly(Ordinary(new SensorSuite { ElectricHz = 5 })));
    private static readonly Lazy<FlightLog> _truth =
        new(() => FlightSimulator.Fly(Ordinary(new SensorSuite { GyroNoiseRadPerSec = 0, GyroBiasRadPerSec = 0 })).Log);
    private static readonly Lazy<FlightLog> _phone =
        new(() => FlightSimulator.Fly(Ordinary(new SensorSuite { GyroHz = 0, InertialHz = 10, GyroBiasRadPerSec = 0 })).Log);

    /// <summary>The flight with sensors that are right; bias of the gyro 0.6 deg/s.</summary>
    public static SimulatedFlight Plain => _plain.Value;

    /// <summary>The same motion with a gyro without noise and bias.</summary>
    public static FlightLog Truth => _truth.Value;

    /// <summary>The same motion with a phone whose axes are those of the frame: three axes of gyro, without bias, and accelerometer.</summary>
    public static FlightLog Phone => _phone.Value;

    /// <summary>The rig of all of them.</summary>
    public static Rig Rig { get; } = RigOf(Ordinary(new SensorSuite()));

    /// <summary>Standing, take-off, then legs at changing power: hands off, course held, turns both ways.</summary>
    public static Scenario Ordinary(SensorSuite sensors, ulong seed = 11, Func<Scenario, Scenario>? change = null)
    {
        var legs = new List<FlightLeg>
        {
            new() { Control = LegControl.Ground, Power = LegPower.Idle, DurationSec = 30 },
            new() { Control = LegControl.TakeOff, Power = LegPower.Full, DurationSec = 10 },
            new() { Control = LegControl.HoldHeading, Power = LegPower.Full, DurationSec = 40 },
        };
        LegPower[] powers = [LegPower.Level, LegPower.Full, LegPower.Idle, LegPower.Full, LegPower.Level, LegPower.Idle, LegPower.Full, LegPower.Idle, LegPower.Level, LegPower.Full, LegPower.Idle, LegPower.Level];
        for (int i = 0; i < powers.Length; i++)
        {
            double side = i % 3 == 2 ? -1 : 1;
            legs.Add(new() { Control = LegControl.HandsOff, Power = powers[i], DurationSec = 30 });
            legs.Add(new() { Control = LegControl.Turn, Power = powers[i], TurnRad = side * double.DegreesToRadians(100), DurationSec = 25 });
            legs.Add(new() { Control = LegControl.HoldHeading, Power = powers[i], DurationSec = 20 });
        }
        var scenario = new Scenario { Name = "Sensor test machine", Seed = seed, Sensors = sensors, Legs = [.. legs] };
        return change is null ? scenario : change(scenario);
    }

    /// <summary>The rig of a scenario.</summary>
    public static Rig RigOf(Scenario scenario) => RigFileReader.Read("sensor-rig.toml", RigText.Write(scenario));

    /// <summary>The log with some columns changed or taken away (null).</summary>
    public static FlightLog With(FlightLog log, params (ChannelRole Role, Func<int, double, double>? Change)[] changes)
    {
        var columns = new Dictionary<ChannelRole, double[]>();
        foreach (ChannelRole role in log.Roles)
            columns[role] = log[role].ToArray();
        foreach ((ChannelRole role, Func<int, double, double>? change) in changes)
        {
            if (change is null)
                columns.Remove(role);
            else
                columns[role] = [.. columns[role].Select((v, i) => change(i, v))];
        }
        return FlightLog.Create(log.TimeSec, columns, new() { StartUtc = log.StartUtc, BrakeUnit = log.BrakeUnit, TrimmerUnit = log.TrimmerUnit });
    }

    /// <summary>Finding of a code, or a failure that lists what was found.</summary>
    public static Finding Single(IEnumerable<Finding> findings, FindingCode code)
    {
        Finding[] found = [.. findings.Where(f => f.Code == code)];
        Assert.True(found.Length == 1, $"{found.Length} findings of {code} among: {string.Join(", ", findings.Select(f => f.Code))}");
        return found[0];
    }

    /// <summary>Pull of the steady-window fit at a fraction of full thrust, deg/s.</summary>
    public static double PullDegPerSec(FlightLog log, Rig rig, double fraction)
    {
        TurnSignals signals = TurnSignals.From(log, rig);
        TurnFit fit = new SteadyWindowEstimator().Estimate(signals);
        return double.RadiansToDegrees(fit.PullAt(fraction * signals.FullThrust)?.Value ?? double.NaN);
    }

    /// <summary>True pull at a fraction of full thrust, deg/s, by the parabola of the simulator's truth.</summary>
    public static double TruePullDegPerSec(FlightTruth truth, double fraction)
    {
        double thrust = fraction * truth.FullThrustN;
        return double.RadiansToDegrees(truth.ConstantRadPerSec + (truth.ThrustRadPerSecPerN * thrust) + (truth.ThrustSquaredRadPerSecPerN2 * thrust * thrust));
    }
}
