using TrimFit.Core.Logs;

namespace TrimFit.Simulation;

/// <summary>How one channel is written: names, unit, factor from SI and the digits a logger gives.</summary>
internal sealed record CsvColumn(ChannelRole Role, string Snake, string Words, string Unit, double Factor, int Digits)
{
    private const double DegPerRad = 180 / Math.PI;

    /// <summary>The columns in their order for a log; roles it lacks are left away.</summary>
    public static List<CsvColumn> For(FlightLog log, IReadOnlySet<ChannelRole>? only = null)
    {
        bool fraction = log.BrakeUnit == ControlUnit.Fraction;
        bool phone = log.Has(ChannelRole.GyroZ);
        string brakeUnit = fraction ? "%" : "mm";
        string brakeSuffix = fraction ? "_pct" : "_mm";
        double brakeFactor = fraction ? 100 : 1000;
        CsvColumn[] all =
        [
            new(ChannelRole.Rpm, "rpm", "Engine speed", "rpm", 60, 0),
            new(ChannelRole.Throttle, "throttle_pct", "Throttle", "%", 100, 1),
            new(ChannelRole.Voltage, "voltage_v", "Voltage", "V", 1, 2),
            new(ChannelRole.Current, "current_a", "Current", "A", 1, 1),
            new(ChannelRole.YawRate, phone ? "yaw_rate_dps" : "gyro_z_dps", "Yaw rate", "°/s", DegPerRad, 2),
            new(ChannelRole.GyroX, "gyro_x_rad_s", "Gyro X", "rad/s", 1, 5),
            new(ChannelRole.GyroY, "gyro_y_rad_s", "Gyro Y", "rad/s", 1, 5),
            new(ChannelRole.GyroZ, "gyro_z_rad_s", "Gyro Z", "rad/s", 1, 5),
            new(ChannelRole.AccelerationX, "acc_x_m_s2", "Acceleration X", "m/s2", 1, 3),
            new(ChannelRole.AccelerationY, "acc_y_m_s2", "Acceleration Y", "m/s2", 1, 3),
            new(ChannelRole.AccelerationZ, "acc_z_m_s2", "Acceleration Z", "m/s2", 1, 3),
            new(ChannelRole.Heading, "heading_deg", "Heading", "°", DegPerRad, 1),
            new(ChannelRole.BrakeLeft, "brake_left" + brakeSuffix, "Brake left", brakeUnit, brakeFactor, 1),
            new(ChannelRole.BrakeRight, "brake_right" + brakeSuffix, "Brake right", brakeUnit, brakeFactor, 1),
            new(ChannelRole.TrimmerLeft, "trimmer_left_mm", "Trimmer left", "mm", 1000, 1),
            new(ChannelRole.TrimmerRight, "trimmer_right_mm", "Trimmer right", "mm", 1000, 1),
            new(ChannelRole.EngineNoise, "engine_noise_pct", "Engine noise", "%", 100, 1),
            new(ChannelRole.Marker, "marker", "Marker", "", 1, 0),
            new(ChannelRole.HandsOff, "hands_off", "Hands off", "", 1, 0),
            new(ChannelRole.Latitude, "lat_deg", "Latitude", "°", DegPerRad, 7),
            new(ChannelRole.Longitude, "lon_deg", "Longitude", "°", DegPerRad, 7),
            new(ChannelRole.GroundSpeed, "speed_kmh", "Speed", "km/h", 3.6, 2),
            new(ChannelRole.GroundCourse, "course_deg", "Course", "°", DegPerRad, 2),
            new(ChannelRole.Altitude, "altitude_m", "Altitude", "m", 1, 1),
            new(ChannelRole.VerticalSpeed, "vario_m_s", "Vertical speed", "m/s", 1, 2),
            new(ChannelRole.Airspeed, "airspeed_m_s", "Airspeed", "m/s", 1, 2),
        ];
        return [.. all.Where(c => log.Has(c.Role) && (only is null || only.Contains(c.Role)))];
    }
}
