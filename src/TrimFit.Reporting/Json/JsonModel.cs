using System.Text.Json.Serialization;

namespace TrimFit.Reporting.Json;

// The results as scripts read them: names and units are fixed in DEVELOPERS.md, "Name table". A property is one JSON key, in this order;
// every number is finite or null.

internal sealed record FitJson
{
    public string Schema { get; init; } = "trimfit-fit/1";
    public required InputsJson Inputs { get; init; }
    public required SamplingJson Sampling { get; init; }
    public required WindJson? Wind { get; init; }
    public required GyroJson? Gyro { get; init; }
    public required TurnModelJson TurnModel { get; init; }
    public required CrossCheckJson? CrossCheck { get; init; }
    public required PullJson Pull { get; init; }
    public required SensitivityJson Sensitivity { get; init; }
    public required ShiftJson? Shift { get; init; }
    public required AdjustmentJson[] Adjustments { get; init; }
    public required VerdictJson Verdict { get; init; }
    public required AssumptionJson[] Assumptions { get; init; }
    public required SpanJson[] SpansLeftOut { get; init; }
    public required MessageJson[] Warnings { get; init; }
    public required MessageJson[] Cautions { get; init; }

    /// <summary>Whether the flight reached what its test card promised; left out without a card.</summary>
    [JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] public CardOutcomeJson? Card { get; init; }
}

internal sealed record InspectJson
{
    public string Schema { get; init; } = "trimfit-inspect/1";
    public required InputsJson Inputs { get; init; }
    public required SamplingJson Sampling { get; init; }
    public required WindJson? Wind { get; init; }
    public required GyroJson? Gyro { get; init; }
    public required MessageJson[] Warnings { get; init; }
    public required MessageJson[] Cautions { get; init; }
}

internal sealed record RigJson
{
    public string Schema { get; init; } = "trimfit-rig-result/1";
    public required SourceJson Rig { get; init; }
    public required string ProgramVersion { get; init; }
    public required MassesJson Masses { get; init; }
    [JsonPropertyName("e_mm")] public required double? OffsetMm { get; init; }
    [JsonPropertyName("t_mm")] public required double? ThrustLineMm { get; init; }
    public required double? CarabinerSpacingMm { get; init; }
    public required double? FullThrustN { get; init; }
    public required double? FullTorqueNm { get; init; }
    public required double? FigureOfMerit { get; init; }
    public required double? TwistStiffnessNmPerRad { get; init; }
    public required double? TorqueBalancingMm { get; init; }
    public required HangCheckJson HangCheck { get; init; }
    public required HangResultJson? HangCheckMeasured { get; init; }
    public required RigAtJson[] At { get; init; }
    public required RigAdjustmentJson[] Adjustments { get; init; }
    public required AssumptionJson[] Assumptions { get; init; }
    public required MessageJson[] Warnings { get; init; }
    public required MessageJson[] Cautions { get; init; }
}

internal sealed record InputsJson
{
    public required FileJson[] Files { get; init; }
    public required SourceJson? Rig { get; init; }
    public required SourceJson? Sheet { get; init; }
    public required string ProgramVersion { get; init; }
}

internal sealed record SourceJson(string Name, string Sha256);

internal sealed record FileJson
{
    public required string Name { get; init; }
    public required string Sha256 { get; init; }
    public required string Format { get; init; }
    public required int RowsRead { get; init; }
    public required RowsLeftOutJson[] RowsLeftOut { get; init; }
    public required ColumnJson[] Columns { get; init; }
}

internal sealed record RowsLeftOutJson(string Reason, int Rows, int FirstLine);

internal sealed record ColumnJson(string Name, string? Role, string? Unit, string? Basis, int Missing);

internal sealed record SamplingJson
{
    public required string? Start { get; init; }
    public required double? DurationS { get; init; }
    public required double? RateHz { get; init; }
    public required GapJson[] Gaps { get; init; }
    public required ClockJson[] Clocks { get; init; }
}

internal sealed record GapJson(double? StartS, double? DurationS);

internal sealed record ClockJson(string File, double? ClockOffsetS, double? StdErrorS);

internal sealed record WindJson
{
    [JsonPropertyName("north_m_s")] public required double? North { get; init; }
    [JsonPropertyName("east_m_s")] public required double? East { get; init; }
    [JsonPropertyName("airspeed_m_s")] public required double? Airspeed { get; init; }
    public required double? ArcDeg { get; init; }
    [JsonPropertyName("north_std_error_m_s")] public required double? NorthStdError { get; init; }
    [JsonPropertyName("east_std_error_m_s")] public required double? EastStdError { get; init; }
    [JsonPropertyName("airspeed_std_error_m_s")] public required double? AirspeedStdError { get; init; }
}

internal sealed record GyroJson
{
    [JsonPropertyName("bias_deg_s")] public required double? Bias { get; init; }
    [JsonPropertyName("bias_std_error_deg_s")] public required double? BiasStdError { get; init; }
    public required double? Scale { get; init; }
    public required int? Sign { get; init; }
    public required double? DelayS { get; init; }
    public required double? ScaleStdError { get; init; }
    public required double? DelayStdErrorS { get; init; }
}

internal record TurnModelJson
{
    public required string Method { get; init; }
    public required string ThrustBasis { get; init; }
    public required CoefficientJson[] Coefficients { get; init; }
    public required double?[][] Covariance { get; init; }
    public required double? LagS { get; init; }
    public required DisturbanceJson Disturbance { get; init; }
    [JsonPropertyName("n_eff")] public required double? EffectiveSamples { get; init; }
    public required double? Condition { get; init; }

    /// <summary>What a test card is planned from; left out for a method that does not find it.</summary>
    [JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] public NoiseJson? Noise { get; init; }
}

internal sealed record NoiseJson
{
    public required string Response { get; init; }
    public required double? LagS { get; init; }
    public required double? FrequencyRadS { get; init; }
    public required double? Damping { get; init; }
    public required double? DisturbanceDegS { get; init; }
    public required double? DisturbanceTauS { get; init; }
    public required double? QuickDegSRootS { get; init; }
    public required double? GyroDegS { get; init; }
    public required double? HeadingDeg { get; init; }
    public required double? GustDeg { get; init; }
    public required double? GustTauS { get; init; }
    public required double? GyroRowsPerS { get; init; }
    public required double? HeadingRowsPerS { get; init; }
}

internal sealed record CrossCheckJson : TurnModelJson
{
    /// <summary><c>agrees</c>, <c>differs</c>, or null when one of the two cannot say.</summary>
    [JsonPropertyOrder(1)] // after the keys it shares with the turn model
    public required string? Agreement { get; init; }
}

internal sealed record CoefficientJson
{
    public required string Name { get; init; }
    public required string Unit { get; init; }
    public required double? Value { get; init; }
    public required double? StdError { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required string? Reason { get; init; }
}

internal sealed record DisturbanceJson
{
    [JsonPropertyName("rms_deg_s")] public required double? Rms { get; init; }
    public required double? TauS { get; init; }
}

internal sealed record PullJson
{
    public required PullAtJson[] At { get; init; }
    public required PullAtJson AtBalance { get; init; }
    public required string CruiseBasis { get; init; }
    [JsonPropertyName("smallest_detectable_deg_s")] public required double? SmallestDetectable { get; init; }
}

internal sealed record PullAtJson
{
    public required string Setting { get; init; }
    public required double? ThrustN { get; init; }
    public required double? ThrustFraction { get; init; }
    [JsonPropertyName("rate_deg_s")] public required double? Rate { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required double? HeldBrake { get; init; }
}

internal sealed record SensitivityJson
{
    [JsonPropertyName("deg_s_per_mm")] public required double? Value { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required SensitivitySourceJson[] Sources { get; init; }
    public required bool Conflict { get; init; }
    public required double? EffectiveSamples { get; init; }
    public required double? PriorPredictiveP { get; init; }
    public required IntervalJson YawRatio { get; init; }
}

internal sealed record SensitivitySourceJson
{
    public required string Kind { get; init; }
    [JsonPropertyName("deg_s_per_mm")] public required double? Value { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required bool Used { get; init; }
}

internal sealed record IntervalJson(double? Value, double? Low95, double? High95);

internal sealed record ShiftJson
{
    public required double? BalanceThrustN { get; init; }
    public required double? BalanceThrustFraction { get; init; }
    public required IntervalJson CgMm { get; init; }
    public required double? ConstantPartMm { get; init; }
    public required double? PowerPartMm { get; init; }
    public required PullAtJson[] TurnLeftAt { get; init; }
}

internal sealed record AdjustmentJson
{
    public required string Kind { get; init; }
    public required string Part { get; init; }
    public required string Toward { get; init; }
    public required double? Travel { get; init; }
    public required string Unit { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required double? Rounded { get; init; }
    public required double? FirstStep { get; init; }
    public required double? Efficiency { get; init; }
    public required double? ThrustLineOffsetMm { get; init; }
    public required double? TwistRatio { get; init; }
    public required double? TwistRatioHigh95 { get; init; }
    public required string TwistDirection { get; init; }
    public required double? RiserLoadLeftN { get; init; }
    public required double? RiserLoadRightN { get; init; }
    public required HangCheckJson HangCheck { get; init; }
    public required PullAtJson[] TurnLeftAt { get; init; }
    public required bool? WithinLimits { get; init; }
    public required double? ProbabilityWrongSide { get; init; }
    public required MessageJson[] Notes { get; init; }
}

internal sealed record HangCheckJson(double? LeftKg, double? RightKg);

internal sealed record VerdictJson
{
    public required string Code { get; init; }
    public required string Strength { get; init; }
    public required string Sentence { get; init; }
    public required MessageJson[] Reasons { get; init; }
}

internal sealed record AssumptionJson
{
    public required string Name { get; init; }
    public required double? Value { get; init; }
    public required string Unit { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
}

internal sealed record SpanJson(double? StartS, double? EndS, string Reason);

internal sealed record MessageJson(string Code, string Message);

internal sealed record MassesJson
{
    public required double? SuspendedKg { get; init; }
    public required double? PilotKg { get; init; }
    public required double? PowerUnitKg { get; init; }
    public required double? SuspendedWeightN { get; init; }
    public required double? CgLateralMm { get; init; }
    public required double? CarabinerMiddleMm { get; init; }
}

internal sealed record RigAtJson
{
    public required string Setting { get; init; }
    public required double? ThrustN { get; init; }
    public required double? TorqueNm { get; init; }
    public required double? HangBackDeg { get; init; }
    public required double? YawMomentNm { get; init; }
    public required double? RollMomentNm { get; init; }
    public required double? RiserLoadLeftN { get; init; }
    public required double? RiserLoadRightN { get; init; }
    public required double? TwistDeg { get; init; }
    public required double? TwistRatio { get; init; }
    public required double? TwistRatioHigh95 { get; init; }
}

internal sealed record RigAdjustmentJson
{
    public required string Kind { get; init; }
    public required string Part { get; init; }
    public required double? Efficiency { get; init; }
    public required double? CgMmPerTravel { get; init; }
    public required double? ThrustLineMmPerTravel { get; init; }
    public required string Unit { get; init; }
    public required double? Min { get; init; }
    public required double? Max { get; init; }
    public required double? Step { get; init; }
}

[JsonSourceGenerationOptions(WriteIndented = true, PropertyNamingPolicy = JsonKnownNamingPolicy.SnakeCaseLower, NewLine = "\n")]
[JsonSerializable(typeof(FitJson))]
[JsonSerializable(typeof(CompareJson))]
[JsonSerializable(typeof(InspectJson))]
[JsonSerializable(typeof(RigJson))]
[JsonSerializable(typeof(CardJson))]
internal sealed partial class ResultJsonContext : JsonSerializerContext;
