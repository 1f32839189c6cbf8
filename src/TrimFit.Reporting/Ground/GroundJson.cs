using System.Text.Json.Serialization;

namespace TrimFit.Reporting.Json;

internal sealed record ChecksJson
{
    public string Schema { get; } = "trimfit-checks/1";
    public required string ProgramVersion { get; init; }
    public required ComplaintJson Complaint { get; init; }
    public required CheckJson[] Checks { get; init; }
    public required MessageJson[] Cautions { get; init; }
}

internal sealed record ComplaintJson(string Side, string[] When, string Since, string[] Changed, string OtherWing);

/// <summary>One check; found is for the number written beside it, null on a fresh sheet.</summary>
internal sealed record CheckJson(string Cause, string Part, string Number, string Unit, string[] Reasons, double? Found);

internal sealed record HangChangeJson
{
    public string Schema { get; } = "trimfit-hang-change/1";
    public required string ProgramVersion { get; init; }
    public required string Kind { get; init; }
    public required double? Travel { get; init; }
    public required string Unit { get; init; }
    public required string Verdict { get; init; }
    public required double? ExpectedMm { get; init; }
    public required double? MeasuredMm { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required double? LogLikelihoodRatio { get; init; }
    public required int? HangsAfter { get; init; }
    public required int? HangsEach { get; init; }
    public required HangCheckJson Expected { get; init; }
    public required string Sentence { get; init; }
    public required MessageJson[] Warnings { get; init; }
    public required MessageJson[] Cautions { get; init; }
}

/// <summary>The hang check as the rig's result gives it.</summary>
internal sealed record HangResultJson
{
    [JsonPropertyName("e_mm")] public required double? OffsetMm { get; init; }
    public required double? Low95 { get; init; }
    public required double? High95 { get; init; }
    public required int Hangs { get; init; }
    public required double? BothScalesKg { get; init; }
    public required double? SeatingSdMm { get; init; }
    public required double? TapeMm { get; init; }
    public required double? TapePlusMinusMm { get; init; }
}

[JsonSourceGenerationOptions(WriteIndented = true, PropertyNamingPolicy = JsonKnownNamingPolicy.SnakeCaseLower, NewLine = "\n")]
[JsonSerializable(typeof(ChecksJson))]
[JsonSerializable(typeof(HangChangeJson))]
internal sealed partial class GroundJsonContext : JsonSerializerContext;
