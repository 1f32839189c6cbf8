using System.Text.Json.Serialization;

namespace TrimFit.Reporting.Carrying;

/// <summary>What stands before the packed files.</summary>
internal sealed record InputManifest
{
    public required FileEntry[] Files { get; init; }
    public required string[] Columns { get; init; }
    public required string Balance { get; init; }
    public required double ToleranceDegS { get; init; }
    public required ulong Seed { get; init; }
    public bool WithoutPlace { get; init; }
}

/// <summary>One packed file.</summary>
internal sealed record FileEntry
{
    public required string Role { get; init; }
    public required string Name { get; init; }
    public string? Recording { get; init; }
    public required int Length { get; init; }
    public bool ByColumns { get; init; }
}

[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.SnakeCaseLower, RespectRequiredConstructorParameters = true, RespectNullableAnnotations = true)]
[JsonSerializable(typeof(InputManifest))]
internal sealed partial class InputManifestContext : JsonSerializerContext;
