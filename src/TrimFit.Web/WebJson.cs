using System.Text.Json.Serialization;

namespace TrimFit.Web;

internal sealed record HealthJson(string Status, string ProgramVersion);

internal sealed record ProgressJson(string Phase, string Text, double? Share);

internal sealed record RigCheckJson(RigFaultJson[] Faults, string Drawing, string[] Other);

internal sealed record RigFaultJson(string Field, string Message);

[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.SnakeCaseLower)]
[JsonSerializable(typeof(HealthJson))]
[JsonSerializable(typeof(ProgressJson))]
[JsonSerializable(typeof(RigCheckJson))]
[JsonSerializable(typeof(SortedDictionary<string, string[]>))]
internal sealed partial class WebJson : JsonSerializerContext;
