using System.Text.Json.Serialization;

namespace TrimFit.Reporting.Json;

// A test card as scripts read it (schema trimfit-card/1). A property is one JSON key, in this order; every number is finite or null.

internal sealed record CardJson
{
    public string Schema { get; init; } = "trimfit-card/1";
    public required string Name { get; init; }
    public required SourceJson Rig { get; init; }
    public required SourceJson? From { get; init; }
    public required string ProgramVersion { get; init; }
    public required CardAskedJson Asked { get; init; }
    public required CardRefusalJson? Refusal { get; init; }
    public required CardFlightJson? Flight { get; init; }
    public required CardLegJson[] Legs { get; init; }
    public required CardPredictionJson? Prediction { get; init; }
    public required CardMachineJson Machine { get; init; }
    public required string? SealedOrder { get; init; }
    public required MessageJson[] Cautions { get; init; }
}

internal sealed record CardAskedJson
{
    public required double? WidthMm { get; init; }
    [JsonPropertyName("std_error_deg_s")] public required double? StdError { get; init; }
    public required double? Minutes { get; init; }
    public required double? BallastKg { get; init; }
    public required double? BallastArmMm { get; init; }
    public required bool EngineOff { get; init; }
    public required double? FloorM { get; init; }
    public required string BalanceThrust { get; init; }
}

internal sealed record CardRefusalJson
{
    public required string Code { get; init; }
    public required string Sentence { get; init; }
    public required double? LeastReachableMm { get; init; }
    [JsonPropertyName("least_reachable_deg_s")] public required double? LeastReachableDegS { get; init; }
}

internal sealed record CardFlightJson
{
    public required double? DurationS { get; init; }
    public required int Runs { get; init; }
    public required double? StartHeightM { get; init; }
    public required double? FloorM { get; init; }
    public required double? HighestAboveStartM { get; init; }
    [JsonPropertyName("wind_limit_m_s")] public required double? WindLimit { get; init; }
    public required double? DriftAtLimitM { get; init; }
    public required double? FuelKg { get; init; }
    public required double? BatteryWh { get; init; }
    public required double? MinutesNeeded { get; init; }
}

internal sealed record CardLegJson
{
    public required int Number { get; init; }
    public required string Kind { get; init; }
    public required string Power { get; init; }
    public required double? ThrustFraction { get; init; }
    public required double? StartS { get; init; }
    public required double? Seconds { get; init; }
    public required double? HeadingDeg { get; init; }
    public required double? TurnDeg { get; init; }
    public required double? BrakeLeftPercent { get; init; }
    public required double? BrakeRightPercent { get; init; }
    public required double? BallastKg { get; init; }
    public required double? BallastArmMm { get; init; }
    public required double? HeightM { get; init; }
    public required string Say { get; init; }
}

internal sealed record CardPredictionJson
{
    [JsonPropertyName("pull_half_width_deg_s")] public required double? PullHalfWidth { get; init; }
    [JsonPropertyName("pull_std_error_deg_s")] public required double? PullStdError { get; init; }
    [JsonPropertyName("known_noise_std_error_deg_s")] public required double? KnownNoiseStdError { get; init; }
    public required double? Inflation { get; init; }
    public required double? TFactor { get; init; }
    public required double? ShiftHalfWidthMm { get; init; }
    public required double? SensitivityFloorMm { get; init; }
    public required string[] Sources { get; init; }
    public required string[] Coefficients { get; init; }
    public required double?[][] Covariance { get; init; }
    public required int Draws { get; init; }
    public required bool? Reaches { get; init; }
}

internal sealed record CardMachineJson
{
    public required string Logger { get; init; }
    public required string NoiseFrom { get; init; }
    public required string PullFrom { get; init; }
    public required double? IdleFraction { get; init; }
    public required double? LevelFraction { get; init; }
    public required double? BalanceFraction { get; init; }
    [JsonPropertyName("pull_deg_s")] public required double? Pull { get; init; }
    [JsonPropertyName("airspeed_m_s")] public required double? Airspeed { get; init; }
    [JsonPropertyName("sink_m_s")] public required double? Sink { get; init; }
    [JsonPropertyName("disturbance_deg_s")] public required double? Disturbance { get; init; }
    public required double? DisturbanceTauS { get; init; }
}

internal sealed record CardOutcomeJson
{
    public required bool Reached { get; init; }
    [JsonPropertyName("predicted_pull_half_width_deg_s")] public required double? PredictedPull { get; init; }
    [JsonPropertyName("pull_half_width_deg_s")] public required double? Pull { get; init; }
    public required double? PredictedShiftHalfWidthMm { get; init; }
    public required double? ShiftHalfWidthMm { get; init; }
    public required double? WantedShiftHalfWidthMm { get; init; }
    [JsonPropertyName("wanted_pull_std_error_deg_s")] public required double? WantedPullStdError { get; init; }
    [JsonPropertyName("pull_std_error_deg_s")] public required double? PullStdError { get; init; }
    public required NextLegJson[] NextLegs { get; init; }
}

internal sealed record NextLegJson
{
    public required string Kind { get; init; }
    public required string Power { get; init; }
    public required double? Seconds { get; init; }
    public required double? PullFactor { get; init; }
    public required double? ShiftFactor { get; init; }
}
