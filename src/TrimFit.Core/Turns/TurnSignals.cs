using System.Collections.Immutable;

namespace TrimFit.Core.Turns;

/// <summary>One flight made ready for an estimator: inputs held over one clock, measurements where they were taken.</summary>
/// <remarks>All columns have one value per time stamp. Inputs (thrust, brakes, trimmers) are finite everywhere and hold between samples;
/// measurements (gyro, heading, velocity) are NaN where nothing was measured. Positive is to the pilot's right.</remarks>
public sealed partial class TurnSignals
{
    /// <summary>Seconds, strictly increasing.</summary>
    public required double[] TimeSec { get; init; }

    /// <summary>Thrust, N or fraction of full as <see cref="ThrustBasis"/> says; never negative.</summary>
    public required double[] Thrust { get; init; }

    /// <summary>Unit of <see cref="Thrust"/>.</summary>
    public required ThrustBasis ThrustBasis { get; init; }

    /// <summary>Full thrust in the same unit (1 when relative).</summary>
    public required double FullThrust { get; init; }

    /// <summary>Whether the log says anything about thrust at all.</summary>
    public required bool HasThrust { get; init; }

    /// <summary>Right minus left brake as logged (fraction, m or counts); all 0 without a steering channel.</summary>
    public required double[] BrakeDifference { get; init; }

    /// <summary>Whether brakes or a signed steering channel were logged.</summary>
    public required bool HasBrakes { get; init; }

    /// <summary>Right minus left trimmer as logged; empty when not logged.</summary>
    public double[] TrimmerDifference { get; init; } = [];

    /// <summary>Known shift of the suspended CG on ballast and weight-shift legs of the flight sheet, m, right positive, 0 elsewhere; empty
    /// when there is no such leg.</summary>
    public double[] CgShiftM { get; init; } = [];

    /// <summary>Measured yaw rate, rad/s, already right positive; NaN where missing; empty without a gyro.</summary>
    public double[] GyroRadPerSec { get; init; } = [];

    /// <summary>Square of speed of rotation over full, for the vibration offset of the gyro; all 0 when unknown.</summary>
    public required double[] RotationRatioSquared { get; init; }

    /// <summary>Compass heading, rad, wrapped as logged; NaN where missing; empty when not logged.</summary>
    public double[] HeadingRad { get; init; } = [];

    /// <summary>Ground velocity north, m/s, NaN where there was no new fix; empty without GPS.</summary>
    public double[] VelocityNorth { get; init; } = [];

    /// <summary>Ground velocity east, m/s.</summary>
    public double[] VelocityEast { get; init; } = [];

    /// <summary>Wind from the circle fit; null when the flight did not turn far enough.</summary>
    public Wind? Wind { get; init; }

    /// <summary>True where the sample may be used; false on the ground and in strong intended turns.</summary>
    public required bool[] Use { get; init; }

    /// <summary>Spans where <see cref="Use"/> is false, with the reason.</summary>
    public ImmutableArray<SpanLeftOut> SpansLeftOut { get; init; } = [];

    /// <summary>True where the pilot declared, or the brakes show, hands off.</summary>
    public required bool[] HandsOff { get; init; }

    /// <summary>Whether hands-off spans were declared by a sheet or channel (not guessed from brakes).</summary>
    public bool HandsOffDeclared { get; init; }

    /// <summary>Altitude, m, NaN where missing; empty when not logged.</summary>
    public double[] AltitudeM { get; init; } = [];

    /// <summary>Unit of <see cref="BrakeDifference"/>.</summary>
    public Logs.ControlUnit BrakeUnit { get; init; }

    /// <summary>What was found about the gyro; null without one.</summary>
    public Analysis.GyroReport? Gyro { get; init; }

    /// <summary>Whether GPS or compass confirm which way the yaw rate turns.</summary>
    public bool YawSignConfirmed { get; init; }

    /// <summary>Things found while preparing that people should know.</summary>
    public ImmutableArray<Analysis.Finding> Findings { get; init; } = [];

    /// <summary>Number of samples.</summary>
    public int Count => TimeSec.Length;

    /// <summary>Whether a gyro was logged.</summary>
    public bool HasGyro => GyroRadPerSec.Length > 0;

    /// <summary>Whether ground velocity is there.</summary>
    public bool HasVelocity => VelocityNorth.Length > 0;
}

/// <summary>Wind and airspeed from a circle through ground velocities.</summary>
public sealed record Wind
{
    /// <summary>The air's velocity to the north, m/s.</summary>
    public required double NorthMPerSec { get; init; }
    /// <summary>The air's velocity to the east, m/s.</summary>
    public required double EastMPerSec { get; init; }
    /// <summary>Airspeed, m/s.</summary>
    public required double AirspeedMPerSec { get; init; }
    /// <summary>Standard error of the north part, m/s.</summary>
    public required double NorthStdError { get; init; }
    /// <summary>Standard error of the east part, m/s.</summary>
    public required double EastStdError { get; init; }
    /// <summary>Standard error of the airspeed, m/s.</summary>
    public required double AirspeedStdError { get; init; }
    /// <summary>Directions covered, rad: 2π less the largest gap between air headings.</summary>
    public required double ArcRad { get; init; }
}
