using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>What was logged and how well. A rate of 0 leaves the sensor away; other rates must divide <see cref="StepsPerSecond"/>.</summary>
public sealed record SensorSuite
{
    /// <summary>Steps of the simulation in a second.</summary>
    public const int StepsPerSecond = 50;

    /// <summary>Rate of the yaw gyro, Hz.</summary>
    public int GyroHz { get; init => field = Rate(value); } = 10;

    /// <summary>Bias of the gyro, rad/s.</summary>
    public double GyroBiasRadPerSec { get; init => field = Guard.Finite(value); } = double.DegreesToRadians(0.6);

    /// <summary>White noise of a gyro sample, rad/s.</summary>
    public double GyroNoiseRadPerSec { get; init => field = Guard.NotNegative(value); } = double.DegreesToRadians(0.8);

    /// <summary>Offset of the gyro by vibration at full speed of rotation, growing with its square, rad/s.</summary>
    public double GyroVibrationRadPerSec { get; init => field = Guard.Finite(value); }

    /// <summary>Delay of the gyro, s.</summary>
    public double GyroDelaySec { get; init => field = Guard.NotNegative(value); }

    /// <summary>Factor on the true rate; −1 is a gyro upside down, cos of the tilt one mounted askew.</summary>
    public double GyroScale { get; init => field = Guard.Finite(value); } = 1;

    /// <summary>Whether the logger gives the rate of the heading; false gives the rate about the frame's own axis, less by bank and pitch.</summary>
    public bool GyroLevelled { get; init; } = true;

    /// <summary>Rate of the fixes, Hz.</summary>
    public int GpsHz { get; init => field = Rate(value); } = 5;

    /// <summary>Noise of a position, m (each of north and east).</summary>
    public double GpsPositionNoiseM { get; init => field = Guard.NotNegative(value); } = 0.8;

    /// <summary>Correlation time of the position error, s.</summary>
    public double GpsPositionTauSec { get; init => field = Guard.Positive(value); } = 30;

    /// <summary>White noise of a velocity, m/s (each of north and east).</summary>
    public double GpsVelocityNoiseMPerSec { get; init => field = Guard.NotNegative(value); } = 0.12;

    /// <summary>Delay of the fixes, s.</summary>
    public double GpsDelaySec { get; init => field = Guard.NotNegative(value); }

    /// <summary>Drop-outs of the fixes per hour.</summary>
    public double GpsDropoutsPerHour { get; init => field = Guard.NotNegative(value); }

    /// <summary>Length of a drop-out, s.</summary>
    public double GpsDropoutSec { get; init => field = Guard.Positive(value); } = 8;

    /// <summary>Freezes per hour, in which the last fix is repeated.</summary>
    public double GpsFreezesPerHour { get; init => field = Guard.NotNegative(value); }

    /// <summary>Length of a freeze, s.</summary>
    public double GpsFreezeSec { get; init => field = Guard.Positive(value); } = 5;

    /// <summary>Rate of the compass, Hz.</summary>
    public int CompassHz { get; init => field = Rate(value); }

    /// <summary>White noise of the compass, rad.</summary>
    public double CompassNoiseRad { get; init => field = Guard.NotNegative(value); } = double.DegreesToRadians(2);

    /// <summary>Constant error of the compass, rad.</summary>
    public double CompassOffsetRad { get; init => field = Guard.Finite(value); }

    /// <summary>Rate of altitude and vertical speed, Hz.</summary>
    public int BarometerHz { get; init => field = Rate(value); } = 5;

    /// <summary>Noise of the altitude, m.</summary>
    public double AltitudeNoiseM { get; init => field = Guard.NotNegative(value); } = 0.2;

    /// <summary>Noise of the vertical speed, m/s.</summary>
    public double VerticalSpeedNoiseMPerSec { get; init => field = Guard.NotNegative(value); } = 0.15;

    /// <summary>Rate of the speed of rotation, Hz.</summary>
    public int RpmHz { get; init => field = Rate(value); } = 10;

    /// <summary>Noise of the speed of rotation, rev/s.</summary>
    public double RpmNoiseRevPerSec { get; init => field = Guard.NotNegative(value); } = 0.2;

    /// <summary>Logged revolutions per revolution of the propeller: a reduction ratio, or pole pairs times it.</summary>
    public double RpmFactor { get; init => field = Guard.Positive(value); } = 1;

    /// <summary>Rate of the throttle, Hz.</summary>
    public int ThrottleHz { get; init => field = Rate(value); } = 10;

    /// <summary>Rate of the brakes, Hz.</summary>
    public int BrakesHz { get; init => field = Rate(value); } = 10;

    /// <summary>Noise of a brake travel, m.</summary>
    public double BrakeNoiseM { get; init => field = Guard.NotNegative(value); } = 0.001;

    /// <summary>Right-minus-left zero error of the brakes, m.</summary>
    public double BrakeZeroErrorM { get; init => field = Guard.Finite(value); }

    /// <summary>Whether the brakes are logged in fractions of their travel instead of metres.</summary>
    public bool BrakesAsFraction { get; init; }

    /// <summary>Rate of the airspeed, Hz.</summary>
    public int AirspeedHz { get; init => field = Rate(value); }

    /// <summary>Noise of the airspeed, m/s.</summary>
    public double AirspeedNoiseMPerSec { get; init => field = Guard.NotNegative(value); } = 0.3;

    /// <summary>Rate of the electrical channels (voltage, current, power), Hz; for an electric machine.</summary>
    public int ElectricHz { get; init => field = Rate(value); }

    /// <summary>Rate of an engine noise level, Hz.</summary>
    public int EngineNoiseHz { get; init => field = Rate(value); }

    /// <summary>Rate of the trimmers, Hz.</summary>
    public int TrimmersHz { get; init => field = Rate(value); }

    /// <summary>Whether the pilot sets a mark at the start of each leg, numbered from 1.</summary>
    public bool MarksLegs { get; init; }

    /// <summary>Whether hands-off legs are marked in a channel, at the rate of the brakes or else of the fastest sensor.</summary>
    public bool MarksHandsOff { get; init; }

    /// <summary>Rate of a three-axis gyro and accelerometer (a phone), Hz.</summary>
    public int InertialHz { get; init => field = Rate(value); }

    /// <summary>How the phone lies in the frame: roll, pitch and yaw of its axes, rad.</summary>
    public MountingAttitude Mounting { get; init; } = new(0, 0, 0);

    /// <summary>Time at which the phone slips, s; null when it never does.</summary>
    public double? SlipTimeSec { get; init; }

    /// <summary>How the phone lies after the slip.</summary>
    public MountingAttitude MountingAfterSlip { get; init; } = new(0, 0, 0);

    /// <summary>White noise of an acceleration, m/s².</summary>
    public double AccelerationNoiseMPerSec2 { get; init => field = Guard.NotNegative(value); } = 0.6;

    /// <summary>White noise added to acceleration at full speed of rotation by vibration, m/s².</summary>
    public double AccelerationVibrationMPerSec2 { get; init => field = Guard.NotNegative(value); } = 3;

    private static int Rate(int value) => value == 0 || (value > 0 && StepsPerSecond % value == 0)
        ? value
        : throw new ArgumentOutOfRangeException(nameof(value), value, FormattableString.Invariant($"must be 0 or divide {StepsPerSecond}"));
}
