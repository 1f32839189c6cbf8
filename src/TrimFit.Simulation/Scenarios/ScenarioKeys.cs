namespace TrimFit.Simulation;

/// <summary>Every key of a scenario file, by table: its unit and where it goes. A new setting is one line here.</summary>
internal static class ScenarioKeys
{
    private const double Mm = 1e-3;
    private const double Percent = 1e-2;
    private const double PerMinute = 1.0 / 60;
    private const double Deg = Math.PI / 180;

    private static readonly Dictionary<string, int> Rotations = new() { ["clockwise"] = 1, ["counter-clockwise"] = -1, ["contra-rotating"] = 0 };

    private static readonly Dictionary<string, TurnResponse> Responses = new()
    {
        ["first_order"] = TurnResponse.FirstOrder,
        ["second_order"] = TurnResponse.SecondOrder,
    };

    private static readonly Dictionary<string, LogSet> LogSets = new()
    {
        ["csv"] = LogSet.Csv,
        ["engine_csv_and_igc"] = LogSet.EngineCsvAndIgc,
        ["engine_csv_and_gpx"] = LogSet.EngineCsvAndGpx,
        ["engine_csv_and_nmea"] = LogSet.EngineCsvAndNmea,
        ["phone_and_gpx"] = LogSet.PhoneAndGpx,
        ["igc"] = LogSet.Igc,
    };

    private static readonly Dictionary<string, LegPower> Powers = new()
    {
        ["off"] = LegPower.Off,
        ["idle"] = LegPower.Idle,
        ["level"] = LegPower.Level,
        ["full"] = LegPower.Full,
    };

    private static readonly Dictionary<string, LegControl> Controls = new()
    {
        ["hands_off"] = LegControl.HandsOff,
        ["brakes"] = LegControl.Brakes,
        ["hold"] = LegControl.HoldHeading,
        ["turn"] = LegControl.Turn,
        ["circle"] = LegControl.Circle,
        ["weight_shift"] = LegControl.WeightShift,
        ["ballast"] = LegControl.Ballast,
        ["ground"] = LegControl.Ground,
        ["take_off"] = LegControl.TakeOff,
        ["land"] = LegControl.Land,
    };

    /// <summary>The word of a leg's control.</summary>
    public static string WordFor(LegControl control) => Controls.First(c => c.Value == control).Key;

    /// <summary>The word of a leg's power.</summary>
    public static string WordFor(LegPower power) => Powers.First(p => p.Value == power).Key;

    /// <summary>Keys of the tables; the empty name is the top of the file.</summary>
    public static Dictionary<string, Dictionary<string, ScenarioKey<Scenario>>> Tables { get; } = new()
    {
        [""] = new()
        {
            ["name"] = ScenarioKey<Scenario>.Text(static (s, v) => s with { Name = v }),
            ["seed"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with
            {
                Seed = v >= 0 ? (ulong)v : throw new ArgumentOutOfRangeException(nameof(v), v, "must not be negative"),
            }),
        },
        ["mass"] = new()
        {
            ["pilot_kg"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Mass = s.Mass with { PilotKg = v } }),
            ["power_unit_kg"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Mass = s.Mass with { PowerUnitKg = v } }),
            ["wing_kg"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Mass = s.Mass with { WingKg = v } }),
            ["power_unit_lateral_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Mass = s.Mass with { PowerUnitLateralM = v } }),
            ["posture_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Mass = s.Mass with { PostureM = v } }),
            ["cg_depth_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Mass = s.Mass with { CgDepthM = v } }),
            ["yaw_inertia_kg_m2"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Mass = s.Mass with { YawInertiaKgM2 = v } }),
            ["swing_damping"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Mass = s.Mass with { SwingDamping = v } }),
            ["roll_frequency_hz"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Mass = s.Mass with { RollFrequencyHz = v } }),
        },
        ["propeller"] = new()
        {
            ["rotation"] = ScenarioKey<Scenario>.Word(Rotations, static (s, v) => s with { Propeller = s.Propeller with { Rotation = v } }),
            ["full_thrust_n"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Propeller = s.Propeller with { FullThrustN = v } }),
            ["full_torque_nm"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Propeller = s.Propeller with { FullTorqueNm = v } }),
            ["torque_exponent"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Propeller = s.Propeller with { TorqueExponent = v } }),
            ["diameter_m"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Propeller = s.Propeller with { DiameterM = v } }),
            ["full_rpm"] = ScenarioKey<Scenario>.Number(PerMinute, static (s, v) => s with { Propeller = s.Propeller with { FullRevPerSec = v } }),
            ["idle_ratio"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Propeller = s.Propeller with { IdleRatio = v } }),
            ["clutch"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Propeller = s.Propeller with { Clutch = v } }),
            ["engine_lag_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Propeller = s.Propeller with { EngineLagSec = v } }),
            ["throttle_exponent"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Propeller = s.Propeller with { ThrottleExponent = v } }),
            ["hang_back_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Propeller = s.Propeller with { HangBackRad = v } }),
            ["cant_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Propeller = s.Propeller with { CantRad = v } }),
            ["thrust_line_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Propeller = s.Propeller with { ThrustLineM = v } }),
            ["thrust_line_depth_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Propeller = s.Propeller with { ThrustLineDepthM = v } }),
        },
        ["geometry"] = new()
        {
            ["left_carabiner_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Geometry = s.Geometry with { LeftCarabinerM = v } }),
            ["right_carabiner_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Geometry = s.Geometry with { RightCarabinerM = v } }),
            ["front_share"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Geometry = s.Geometry with { FrontShare = v } }),
            ["front_hang_points_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Geometry = s.Geometry with { FrontHangPointsM = v } }),
            ["rear_hang_points_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Geometry = s.Geometry with { RearHangPointsM = v } }),
        },
        ["wing"] = new()
        {
            ["sensitivity_deg_s_per_mm"] = ScenarioKey<Scenario>.Number(Deg / Mm, static (s, v) => s with { Wing = s.Wing with { SensitivityRadPerSecPerM = v } }),
            ["yaw_ratio"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Wing = s.Wing with { YawRatio = v } }),
            ["constant_pull_deg_s"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Wing = s.Wing with { ConstantPullRadPerSec = v } }),
            ["trimmer_turn_deg_s_per_mm"] = ScenarioKey<Scenario>.Number(Deg / Mm, static (s, v) => s with { Wing = s.Wing with { TrimmerTurnPerMeter = v } }),
            ["line_length_m"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Wing = s.Wing with { LineLengthM = v } }),
            ["line_spread_m"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Wing = s.Wing with { LineSpreadM = v } }),
            ["trim_speed_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Wing = s.Wing with { TrimSpeedMPerSec = v } }),
            ["glide_sink_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Wing = s.Wing with { GlideSinkMPerSec = v } }),
            ["response"] = ScenarioKey<Scenario>.Word(Responses, static (s, v) => s with { Wing = s.Wing with { Response = v } }),
            ["turn_lag_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Wing = s.Wing with { TurnLagSec = v } }),
            ["turn_period_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Wing = s.Wing with { TurnPeriodSec = v } }),
            ["turn_damping"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Wing = s.Wing with { TurnDamping = v } }),
        },
        ["brakes"] = new()
        {
            ["turn_deg_s_per_mm"] = ScenarioKey<Scenario>.Number(Deg / Mm, static (s, v) => s with { Brakes = s.Brakes with { TurnPerMeter = v } }),
            ["full_travel_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Brakes = s.Brakes with { FullTravelM = v } }),
            ["right_line_shorter_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Brakes = s.Brakes with { RightLineShorterM = v } }),
            ["soft_start_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Brakes = s.Brakes with { SoftStartM = v } }),
        },
        ["air"] = new()
        {
            ["wind_north_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { WindNorthMPerSec = v } }),
            ["wind_east_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { WindEastMPerSec = v } }),
            ["shear_per_100_m"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { ShearPer100M = v } }),
            ["slow_wind_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { SlowWindMPerSec = v } }),
            ["slow_wind_tau_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { SlowWindTauSec = v } }),
            ["gust_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { GustMPerSec = v } }),
            ["gust_length_m"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { GustLengthM = v } }),
            ["disturbance_deg_s"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Air = s.Air with { DisturbanceRadPerSec = v } }),
            ["disturbance_tau_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { DisturbanceTauSec = v } }),
            ["second_disturbance_deg_s"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Air = s.Air with { SecondDisturbanceRadPerSec = v } }),
            ["second_disturbance_tau_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { SecondDisturbanceTauSec = v } }),
            ["thermals_per_hour"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { ThermalsPerHour = v } }),
            ["thermal_lift_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { ThermalLiftMPerSec = v } }),
            ["thermal_turn_deg_s"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Air = s.Air with { ThermalTurnRadPerSec = v } }),
            ["thermal_crossing_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Air = s.Air with { ThermalCrossingSec = v } }),
            ["density_follows_altitude"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Air = s.Air with { DensityFollowsAltitude = v } }),
        },
        ["pilot"] = new()
        {
            ["reaction_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Pilot = s.Pilot with { ReactionSec = v } }),
            ["hand_lag_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Pilot = s.Pilot with { HandLagSec = v } }),
            ["heading_gain"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Pilot = s.Pilot with { HeadingGain = v } }),
            ["rate_gain"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Pilot = s.Pilot with { RateGain = v } }),
            ["integral_gain"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Pilot = s.Pilot with { IntegralGain = v } }),
            ["heading_dead_band_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Pilot = s.Pilot with { HeadingDeadBandRad = v } }),
            ["hand_noise_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Pilot = s.Pilot with { HandNoiseM = v } }),
            ["resting_brake_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Pilot = s.Pilot with { RestingBrakeM = v } }),
            ["turn_brake_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Pilot = s.Pilot with { TurnBrakeM = v } }),
        },
        ["start"] = new()
        {
            ["latitude_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Start = s.Start with { LatitudeRad = v } }),
            ["longitude_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Start = s.Start with { LongitudeRad = v } }),
            ["altitude_m"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Start = s.Start with { AltitudeM = v } }),
            ["heading_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Start = s.Start with { HeadingRad = v } }),
            ["time"] = ScenarioKey<Scenario>.Moment(static (s, v) => s with { Start = s.Start with { TimeUtc = v } }),
        },
        ["sensors"] = new()
        {
            ["gyro_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { GyroHz = v } }),
            ["gyro_bias_deg_s"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { GyroBiasRadPerSec = v } }),
            ["gyro_noise_deg_s"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { GyroNoiseRadPerSec = v } }),
            ["gyro_vibration_deg_s"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { GyroVibrationRadPerSec = v } }),
            ["gyro_delay_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GyroDelaySec = v } }),
            ["gyro_scale"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GyroScale = v } }),
            ["gyro_levelled"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Sensors = s.Sensors with { GyroLevelled = v } }),
            ["gps_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { GpsHz = v } }),
            ["gps_position_noise_m"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GpsPositionNoiseM = v } }),
            ["gps_position_tau_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GpsPositionTauSec = v } }),
            ["gps_velocity_noise_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GpsVelocityNoiseMPerSec = v } }),
            ["gps_delay_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GpsDelaySec = v } }),
            ["gps_dropouts_per_hour"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GpsDropoutsPerHour = v } }),
            ["gps_dropout_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GpsDropoutSec = v } }),
            ["gps_freezes_per_hour"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GpsFreezesPerHour = v } }),
            ["gps_freeze_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { GpsFreezeSec = v } }),
            ["compass_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { CompassHz = v } }),
            ["compass_noise_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { CompassNoiseRad = v } }),
            ["compass_offset_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { CompassOffsetRad = v } }),
            ["barometer_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { BarometerHz = v } }),
            ["altitude_noise_m"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { AltitudeNoiseM = v } }),
            ["vertical_speed_noise_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { VerticalSpeedNoiseMPerSec = v } }),
            ["rpm_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { RpmHz = v } }),
            ["rpm_noise"] = ScenarioKey<Scenario>.Number(PerMinute, static (s, v) => s with { Sensors = s.Sensors with { RpmNoiseRevPerSec = v } }),
            ["rpm_factor"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { RpmFactor = v } }),
            ["throttle_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { ThrottleHz = v } }),
            ["brakes_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { BrakesHz = v } }),
            ["brake_noise_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Sensors = s.Sensors with { BrakeNoiseM = v } }),
            ["brake_zero_error_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Sensors = s.Sensors with { BrakeZeroErrorM = v } }),
            ["brakes_as_percent"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Sensors = s.Sensors with { BrakesAsFraction = v } }),
            ["airspeed_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { AirspeedHz = v } }),
            ["airspeed_noise_m_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { AirspeedNoiseMPerSec = v } }),
            ["electric_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { ElectricHz = v } }),
            ["marks_hands_off"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Sensors = s.Sensors with { MarksHandsOff = v } }),
            ["engine_noise_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { EngineNoiseHz = v } }),
            ["trimmers_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { TrimmersHz = v } }),
            ["marks_legs"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Sensors = s.Sensors with { MarksLegs = v } }),
            ["inertial_hz"] = ScenarioKey<Scenario>.Whole(static (s, v) => s with { Sensors = s.Sensors with { InertialHz = v } }),
            ["mounting_roll_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { Mounting = s.Sensors.Mounting with { RollRad = v } } }),
            ["mounting_pitch_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { Mounting = s.Sensors.Mounting with { PitchRad = v } } }),
            ["mounting_yaw_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { Mounting = s.Sensors.Mounting with { YawRad = v } } }),
            ["slip_time_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { SlipTimeSec = v } }),
            ["slipped_roll_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { MountingAfterSlip = s.Sensors.MountingAfterSlip with { RollRad = v } } }),
            ["slipped_pitch_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { MountingAfterSlip = s.Sensors.MountingAfterSlip with { PitchRad = v } } }),
            ["slipped_yaw_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Sensors = s.Sensors with { MountingAfterSlip = s.Sensors.MountingAfterSlip with { YawRad = v } } }),
            ["acceleration_noise_m_s2"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { AccelerationNoiseMPerSec2 = v } }),
            ["acceleration_vibration_m_s2"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Sensors = s.Sensors with { AccelerationVibrationMPerSec2 = v } }),
        },
        ["output"] = new()
        {
            ["logs"] = ScenarioKey<Scenario>.Word(LogSets, static (s, v) => s with { Output = s.Output with { Logs = v } }),
            ["dialect"] = ScenarioKey<Scenario>.Word(CsvDialects.ByName, static (s, v) => s with { Output = s.Output with { Dialect = v } }),
            ["engine_clock_offset_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Output = s.Output with { EngineClockOffsetSec = v } }),
            ["sheet_sloppiness_s"] = ScenarioKey<Scenario>.Number(1, static (s, v) => s with { Output = s.Output with { SheetSloppinessSec = v } }),
        },
        ["rig"] = new()
        {
            ["knows_power"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Knowledge = s.Knowledge with { Power = v } }),
            ["knows_thrust_line"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Knowledge = s.Knowledge with { ThrustLine = v } }),
            ["knows_lines"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Knowledge = s.Knowledge with { Lines = v } }),
            ["knows_wing_speeds"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Knowledge = s.Knowledge with { WingSpeeds = v } }),
            ["knows_offsets"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Knowledge = s.Knowledge with { Offsets = v } }),
            ["power_error_percent"] = ScenarioKey<Scenario>.Number(Percent, static (s, v) => s with { Knowledge = s.Knowledge with { PowerError = v } }),
            ["thrust_error_percent"] = ScenarioKey<Scenario>.Number(Percent, static (s, v) => s with { Knowledge = s.Knowledge with { ThrustError = v } }),
            ["thrust_line_error_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Knowledge = s.Knowledge with { ThrustLineErrorM = v } }),
            ["hang_back_error_deg"] = ScenarioKey<Scenario>.Number(Deg, static (s, v) => s with { Knowledge = s.Knowledge with { HangBackErrorRad = v } }),
            ["carabiner_error_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Knowledge = s.Knowledge with { CarabinerErrorM = v } }),
            ["hang_point_error_mm"] = ScenarioKey<Scenario>.Number(Mm, static (s, v) => s with { Knowledge = s.Knowledge with { HangPointErrorM = v } }),
            ["rotation_wrong"] = ScenarioKey<Scenario>.Flag(static (s, v) => s with { Knowledge = s.Knowledge with { RotationWrong = v } }),
            ["sensitivity_deg_s_per_mm"] = ScenarioKey<Scenario>.Number(Deg / Mm, static (s, v) => s with { Knowledge = s.Knowledge with { SensitivityRadPerSecPerM = v } }),
        },
    };

    /// <summary>Keys of a leg.</summary>
    public static Dictionary<string, ScenarioKey<FlightLeg>> Leg { get; } = new()
    {
        ["duration_s"] = ScenarioKey<FlightLeg>.Number(1, static (l, v) => l with { DurationSec = v }),
        ["power"] = ScenarioKey<FlightLeg>.Word(Powers, static (l, v) => l with { Power = v }),
        ["throttle_percent"] = ScenarioKey<FlightLeg>.Number(Percent, static (l, v) => l with { ThrottleFraction = v }),
        ["control"] = ScenarioKey<FlightLeg>.Word(Controls, static (l, v) => l with { Control = v }),
        ["brake_left_mm"] = ScenarioKey<FlightLeg>.Number(Mm, static (l, v) => l with { BrakeLeftM = v }),
        ["brake_right_mm"] = ScenarioKey<FlightLeg>.Number(Mm, static (l, v) => l with { BrakeRightM = v }),
        ["heading_deg"] = ScenarioKey<FlightLeg>.Number(Deg, static (l, v) => l with { HeadingRad = v }),
        ["turn_deg"] = ScenarioKey<FlightLeg>.Number(Deg, static (l, v) => l with { TurnRad = v }),
        ["turn_rate_deg_s"] = ScenarioKey<FlightLeg>.Number(Deg, static (l, v) => l with { TurnRateRadPerSec = v }),
        ["ballast_kg"] = ScenarioKey<FlightLeg>.Number(1, static (l, v) => l with { BallastKg = v }),
        ["ballast_arm_mm"] = ScenarioKey<FlightLeg>.Number(Mm, static (l, v) => l with { BallastArmM = v }),
        ["trimmer_left_mm"] = ScenarioKey<FlightLeg>.Number(Mm, static (l, v) => l with { TrimmerLeftM = v }),
        ["trimmer_right_mm"] = ScenarioKey<FlightLeg>.Number(Mm, static (l, v) => l with { TrimmerRightM = v }),
        ["weight_shift_mm"] = ScenarioKey<FlightLeg>.Number(Mm, static (l, v) => l with { WeightShiftM = v }),
    };
}
