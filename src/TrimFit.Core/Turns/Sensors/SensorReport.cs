using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Core.Turns;

/// <summary>What the sensors of a flight say about each other: for people, before any turn is fitted.</summary>
public sealed record SensorReport
{
    /// <summary>Bias, scale, sign and delay of the gyro; null without one.</summary>
    public GyroReport? Gyro { get; init; }

    /// <summary>Wind and airspeed; null when the flight did not turn far enough or has no GPS.</summary>
    public Wind? Wind { get; init; }

    /// <summary>Directions covered by air headings, rad; 0 without GPS.</summary>
    public double WindArcRad { get; init; }

    /// <summary>Whether GPS or compass show which way the yaw rate turns.</summary>
    public bool YawSignConfirmed { get; init; }

    /// <summary>What was found, each with its number and with what was done about it.</summary>
    public ImmutableArray<Finding> Findings { get; init; } = [];

    /// <summary>Checks the sensors of a flight against each other.</summary>
    /// <param name="log">The flight.</param>
    /// <param name="rig">The rig, for what the power readings mean and how the gyro is mounted; null when it is not known.</param>
    public static SensorReport Of(FlightLog log, Rig? rig = null)
    {
        ArgumentNullException.ThrowIfNull(log);
        return log.Count == 0 ? new() : PreparedSensors.Of(log, PowerGuess(log, rig), rig?.Log.GyroOrientation).Report;
    }

    /// <summary>Fraction of full power, for telling idle from power: from the rig, or from what was logged.</summary>
    private static double[] PowerGuess(FlightLog log, Rig? rig)
    {
        if (rig is not null)
        {
            ThrustSource source = ThrustSource.Of(log, rig, Propulsion.Of(rig));
            return source.Known ? [.. source.Thrust.Select(t => t / source.FullThrust)] : [];
        }
        foreach (ChannelRole role in (ReadOnlySpan<ChannelRole>)[ChannelRole.Rpm, ChannelRole.Power, ChannelRole.MotorCurrent, ChannelRole.Current, ChannelRole.Throttle])
        {
            if (!log.Has(role))
                continue;
            double[] held = ThrustSource.Held(log, role);
            double largest = held.Where(double.IsFinite).DefaultIfEmpty(0).Max();
            double power = role == ChannelRole.Rpm ? 2 : 1; // thrust goes with the square of the speed
            return largest > 0 ? [.. held.Select(h => Math.Pow(Math.Max(0, h) / largest, power))] : [];
        }
        return [];
    }
}
