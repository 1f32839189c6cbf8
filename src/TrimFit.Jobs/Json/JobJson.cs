using System.Text.Json.Serialization;

namespace TrimFit.Jobs.Json;

/// <summary>A job as JSON, schema <c>trimfit-job/1</c>: in an export, and as the result of <c>job show</c>.</summary>
internal sealed class JobJson
{
    public const string SchemaName = "trimfit-job/1";

    public required string Schema { get; init; }
    public required long Number { get; init; }
    public required string Uid { get; init; }
    public required string Opened { get; init; }
    public required string Complaint { get; init; }
    public required string Machine { get; init; }
    public required string Customer { get; init; }
    public required string Wing { get; init; }
    public required string WingId { get; init; }
    public required SetupJson[] Setups { get; init; }
    public required CheckJson[] Checks { get; init; }
    public required FlightJson[] Flights { get; init; }
    public required ResultJson[] Results { get; init; }
    public required AdjustmentJson[] Adjustments { get; init; }
    public required NoteJson[] Notes { get; init; }
    public required SignatureJson[] Signatures { get; init; }
}

internal sealed class SetupJson
{
    public required int Number { get; init; }
    public required string Made { get; init; }
    public required string RigName { get; init; }
    public required string RigSha256 { get; init; }
    public required int? ChangedFrom { get; init; }
    public required string Note { get; init; }
}

internal sealed class InputJson
{
    public required string Role { get; init; }
    public required string Name { get; init; }
    public required string Sha256 { get; init; }
}

internal sealed class FlightJson
{
    public required int Number { get; init; }
    public required string Added { get; init; }
    public required int Setup { get; init; }
    public required string? Flown { get; init; }
    public required string WingId { get; init; }
    public required InputJson[] Inputs { get; init; }
}

internal sealed class ResultJson
{
    public required int Number { get; init; }
    public required string Made { get; init; }
    public required string Kind { get; init; }
    public required int Flight { get; init; }
    public required string ProgramVersion { get; init; }
    public required string Options { get; init; }
    public required string Sha256 { get; init; }
    public required InputJson[] Inputs { get; init; }
    public required string Verdict { get; init; }
    public required string Strength { get; init; }
    [JsonPropertyName("rate_deg_s")]
    public required double? Rate { get; init; }
    [JsonPropertyName("rate_low95")]
    public required double? RateLow95 { get; init; }
    [JsonPropertyName("rate_high95")]
    public required double? RateHigh95 { get; init; }
    public required SensitivityJson[] Sensitivities { get; init; }
}

internal sealed class SensitivityJson
{
    public required string Source { get; init; }
    [JsonPropertyName("deg_s_per_mm")]
    public required double Value { get; init; }
    public required double LogSd { get; init; }
    [JsonPropertyName("wing_area_m2")]
    public required double? WingArea { get; init; }
    public required double SuspendedKg { get; init; }
}

internal sealed class ReadingJson
{
    public required string Key { get; init; }
    public required double Value { get; init; }
}

internal sealed class AdjustmentJson
{
    public required int Number { get; init; }
    public required string Made { get; init; }
    public required int FromSetup { get; init; }
    public required int ToSetup { get; init; }
    public required string Kind { get; init; }
    public required double Travel { get; init; }
    public required double? Recommended { get; init; }
    public required string Unit { get; init; }
    public required int? RecommendedBy { get; init; }
    public required bool ReadingsConfirmed { get; init; }
    public required string By { get; init; }
    public required string Note { get; init; }
    public required ReadingJson[] Readings { get; init; }
}

internal sealed class CheckJson
{
    public required int Number { get; init; }
    public required string Made { get; init; }
    public required int? Setup { get; init; }
    public required string Code { get; init; }
    public required string Outcome { get; init; }
    public required double? Value { get; init; }
    public required string Unit { get; init; }
    public required string Note { get; init; }
    public required string By { get; init; }
}

internal sealed class NoteJson
{
    public required string Made { get; init; }
    public required string Text { get; init; }
}

internal sealed class SignatureJson
{
    public required string Made { get; init; }
    public required string Name { get; init; }
    public required string Date { get; init; }
    public required int Setup { get; init; }
    public required string Note { get; init; }
    public required ReadingJson[] Readings { get; init; }
}

// A name this version does not know would be lost without a word, so it is a fault.
[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.SnakeCaseLower, WriteIndented = true, NewLine = "\n",
    UnmappedMemberHandling = JsonUnmappedMemberHandling.Disallow, RespectNullableAnnotations = true, AllowDuplicateProperties = false)]
[JsonSerializable(typeof(JobJson))]
internal sealed partial class JobJsonContext : JsonSerializerContext;
