namespace TrimFit.Core.Logs;

/// <summary>What a column of a log is. The word a person writes is <see cref="ChannelRoles.NameOf"/>; values inside are SI.</summary>
public enum ChannelRole
{
    /// <summary>Time of the sample, s.</summary>
    Time,
    /// <summary>Calendar date that goes with a time of day.</summary>
    Date,
    /// <summary>Throttle, fraction 0 to 1 of its travel.</summary>
    Throttle,
    /// <summary>Speed of rotation as the logger gives it (propeller, engine or electrical: the rig says which), rev/s.</summary>
    Rpm,
    /// <summary>Electrical or shaft power, W.</summary>
    Power,
    /// <summary>Voltage, V.</summary>
    Voltage,
    /// <summary>Current, A.</summary>
    Current,
    /// <summary>Engine noise level, fraction 0 to 1 of the recorder's range.</summary>
    EngineNoise,
    /// <summary>Yaw rate, rad/s, right positive.</summary>
    YawRate,
    /// <summary>Gyroscope x axis, rad/s.</summary>
    GyroX,
    /// <summary>Gyroscope y axis, rad/s.</summary>
    GyroY,
    /// <summary>Gyroscope z axis, rad/s.</summary>
    GyroZ,
    /// <summary>Acceleration x axis (with or without gravity), m/s².</summary>
    AccelerationX,
    /// <summary>Acceleration y axis, m/s².</summary>
    AccelerationY,
    /// <summary>Acceleration z axis, m/s².</summary>
    AccelerationZ,
    /// <summary>Heading of the nose, rad clockwise from north.</summary>
    Heading,
    /// <summary>Roll (bank) angle, rad, right positive.</summary>
    Roll,
    /// <summary>Roll rate, rad/s, right positive.</summary>
    RollRate,
    /// <summary>Left brake, in <see cref="FlightLog.BrakeUnit"/>; positive is pulled.</summary>
    BrakeLeft,
    /// <summary>Right brake, in <see cref="FlightLog.BrakeUnit"/>; positive is pulled.</summary>
    BrakeRight,
    /// <summary>One signed steering channel, right minus left, in <see cref="FlightLog.BrakeUnit"/>.</summary>
    BrakeDifference,
    /// <summary>Left trimmer, in <see cref="FlightLog.TrimmerUnit"/>.</summary>
    TrimmerLeft,
    /// <summary>Right trimmer, in <see cref="FlightLog.TrimmerUnit"/>.</summary>
    TrimmerRight,
    /// <summary>Accelerator, fraction of its travel.</summary>
    Accelerator,
    /// <summary>Latitude, rad (WGS-84).</summary>
    Latitude,
    /// <summary>Longitude, rad (WGS-84).</summary>
    Longitude,
    /// <summary>Latitude and longitude in one cell; split by the import.</summary>
    Position,
    /// <summary>Altitude, m.</summary>
    Altitude,
    /// <summary>Static pressure, Pa.</summary>
    Pressure,
    /// <summary>Vertical speed, m/s, up positive.</summary>
    VerticalSpeed,
    /// <summary>Speed over ground, m/s.</summary>
    GroundSpeed,
    /// <summary>Course over ground, rad clockwise from north.</summary>
    GroundCourse,
    /// <summary>Ground velocity to the north, m/s.</summary>
    VelocityNorth,
    /// <summary>Ground velocity to the east, m/s.</summary>
    VelocityEast,
    /// <summary>True airspeed, m/s.</summary>
    Airspeed,
    /// <summary>1 where the pilot declared hands off, else 0.</summary>
    HandsOff,
    /// <summary>Number of a mark set in flight.</summary>
    Marker,
    /// <summary>Current through the windings of an electric motor, A; it follows the shaft's torque.</summary>
    MotorCurrent,
}
