using System.Text.Json.Serialization;

namespace TrimFit.Reporting.Json;

// The result of `compare`, in the forms of `fit` where they are the same.

internal sealed record CompareJson
{
    public string Schema { get; init; } = "trimfit-compare/1";
    public required string ProgramVersion { get; init; }
    public required string ThrustBasis { get; init; }
    public required string? Changed { get; init; }
    public required CompareSetupJson? Before { get; init; }
    public required CompareSetupJson? After { get; init; }
    public required CompareSetupJson[] Setups { get; init; }
    public required CompareChangeJson? Change { get; init; }
    public required double? RemovedPercent { get; init; }
    [JsonPropertyName("removed_low95")] public required double? RemovedLow95 { get; init; }
    [JsonPropertyName("removed_high95")] public required double? RemovedHigh95 { get; init; }
    public required CompareAttributionJson? Attribution { get; init; }
    public required CompareSwapBackJson[] SwapBacks { get; init; }
    public required CompareTrendJson? Trend { get; init; }
    public required CompareScatterJson? FlightScatter { get; init; }
    public required SensitivityJson? Sensitivity { get; init; }
    public required bool PairUsed { get; init; }
    public required ShiftJson? Shift { get; init; }
    public required AdjustmentJson[] Adjustments { get; init; }
    public required CompareVerdictJson? Verdict { get; init; }
    public required CompareOrderJson? SealedOrder { get; init; }
    public required MessageJson[] Warnings { get; init; }
    public required MessageJson[] Cautions { get; init; }
}

internal sealed record CompareSetupJson
{
    public required string Setup { get; init; }
    public required string Pooling { get; init; }
    public required double? CgOffsetMm { get; init; }
    public required ComparePullJson[] At { get; init; }
    public required ComparePullJson AtBalance { get; init; }
    public required CompareFlightJson[] Flights { get; init; }
}

internal sealed record CompareFlightJson(string Name, string? Date, FitJson Result);

internal sealed record ComparePullJson
{
    public required string Setting { get; init; }
    public required double? ThrustN { get; init; }
    public required double? ThrustFraction { get; init; }
    [JsonPropertyName("rate_deg_s")] public required double? Rate { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required double? Low90 { get; init; }
    public required double? High90 { get; init; }
}

internal sealed record CompareChangeJson
{
    public required CompareChangeAtJson[] At { get; init; }
    public required CompareChangeAtJson AtBalance { get; init; }
    public required CompareCoefficientJson[] Coefficients { get; init; }
}

internal sealed record CompareChangeAtJson
{
    public required string Setting { get; init; }
    [JsonPropertyName("rate_deg_s")] public required double? Rate { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required double? SizeLow95 { get; init; }
    public required double? SizeHigh95 { get; init; }
}

internal sealed record CompareCoefficientJson
{
    public required string Name { get; init; }
    public required string Unit { get; init; }
    public required double? Before { get; init; }
    public required double? After { get; init; }
    public required double? Change { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
}

internal sealed record CompareAttributionJson
{
    public required string Part { get; init; }
    public required string Of { get; init; }
    [JsonPropertyName("before_deg_s")] public required double? Before { get; init; }
    [JsonPropertyName("change_deg_s")] public required double? Change { get; init; }
    [JsonPropertyName("change_low95")] public required double? ChangeLow95 { get; init; }
    [JsonPropertyName("change_high95")] public required double? ChangeHigh95 { get; init; }
    public required double? SharePercent { get; init; }
    [JsonPropertyName("share_low95")] public required double? ShareLow95 { get; init; }
    [JsonPropertyName("share_high95")] public required double? ShareHigh95 { get; init; }
}

internal sealed record CompareSwapBackJson
{
    public required string Setup { get; init; }
    public required string First { get; init; }
    public required string Second { get; init; }
    [JsonPropertyName("change_deg_s")] public required double? Change { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required bool Agrees { get; init; }
}

internal sealed record CompareTrendJson
{
    [JsonPropertyName("deg_s_per_mm")] public required double? Slope { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required IntervalJson BestCgOffsetMm { get; init; }
    public required string BestSeen { get; init; }
}

internal sealed record CompareScatterJson
{
    public required string Basis { get; init; }
    [JsonPropertyName("assumed_deg_s")] public required double? Assumed { get; init; }
    [JsonPropertyName("std_dev_deg_s")] public required double? StdDev { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
}

internal sealed record CompareVerdictJson
{
    public required string Code { get; init; }
    /// <summary>Whether the change was shown to lie inside the tolerance; tells the two kinds of no clear change apart.</summary>
    public required bool ShownEqual { get; init; }
    /// <summary>Strength of the next step.</summary>
    public required string? Strength { get; init; }
    public required string Sentence { get; init; }
    public required MessageJson[] Reasons { get; init; }
}

internal sealed record CompareOrderJson(SourceJson File, string[] Setups, string Commitment);
