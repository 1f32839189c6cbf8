using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Core.Planning;

/// <summary>What the last flight tells the next card: noise, pull, powers and logger.</summary>
public sealed record PriorFlight
{
    /// <summary>Time constants and noise levels of the last fit; null when it had none.</summary>
    public NoiseParameters? Noise { get; init; }

    /// <summary>Gyro rows a second; 0 without a gyro.</summary>
    public double GyroRowsPerSec { get; init; }

    /// <summary>Rows with a heading from GPS a second; 0 without GPS.</summary>
    public double HeadingRowsPerSec { get; init; }

    /// <summary>Whether brakes were logged.</summary>
    public bool BrakesLogged { get; init; }

    /// <summary>Turn without thrust, rad/s; null when the flight could not tell.</summary>
    public double? Constant { get; init; }

    /// <summary>Growth per full thrust, rad/s.</summary>
    public double? Slope { get; init; }

    /// <summary>Curvature per full thrust squared, rad/s.</summary>
    public double? Curvature { get; init; }

    /// <summary>Turn per difference of one full brake travel, rad/s; null when it is not known.</summary>
    public double? BrakePerTravel { get; init; }

    /// <summary>Thrust of idle, fraction of full; null when not known.</summary>
    public double? Idle { get; init; }

    /// <summary>Thrust of level flight, fraction of full; null when not known.</summary>
    public double? Level { get; init; }

    /// <summary>Airspeed, m/s; null when not known.</summary>
    public double? AirspeedMPerSec { get; init; }

    /// <summary>Speed of the wind, m/s; null when not known.</summary>
    public double? WindMPerSec { get; init; }

    /// <summary>Pull at the balance thrust, rad/s; null when not known.</summary>
    public double? PullRadPerSec { get; init; }

    /// <summary>Brake that held it, fraction of full travel, right positive; null when not known.</summary>
    public double? HeldBrake { get; init; }

    /// <summary>What a result tells.</summary>
    public static PriorFlight Of(TrimAnalysis analysis)
    {
        ArgumentNullException.ThrowIfNull(analysis);
        TurnFit fit = analysis.Fit;
        double full = analysis.Signals.FullThrust;
        double? travel = analysis.Signals.BrakeUnit switch
        {
            ControlUnit.Fraction => 1,
            ControlUnit.Meter => analysis.Rig.BrakeFullTravelM,
            _ => null,
        };
        PullAtSetting At(PowerSetting setting) => analysis.Pull.At.Single(p => p.Setting == setting);
        return new()
        {
            Noise = fit.Noise,
            GyroRowsPerSec = fit.GyroRowsPerSec,
            HeadingRowsPerSec = fit.HeadingRowsPerSec,
            BrakesLogged = analysis.Signals.HasBrakes,
            Constant = fit[TurnCoefficient.Constant]?.Value,
            Slope = fit[TurnCoefficient.Thrust]?.Value * full,
            Curvature = fit[TurnCoefficient.ThrustSquared]?.Value * full * full,
            BrakePerTravel = fit[TurnCoefficient.BrakeDifference]?.Value * travel,
            Idle = At(PowerSetting.Idle).ThrustFraction,
            Level = analysis.Pull.CruiseBasis == CruiseBasis.ZeroClimb ? At(PowerSetting.Cruise).ThrustFraction : null,
            AirspeedMPerSec = analysis.Signals.Wind?.AirspeedMPerSec,
            WindMPerSec = analysis.Signals.Wind is Wind w ? double.Hypot(w.NorthMPerSec, w.EastMPerSec) : null,
            PullRadPerSec = analysis.Pull.AtBalance.RateRadPerSec,
            HeldBrake = analysis.Pull.AtBalance.HeldBrake / travel,
        };
    }
}
