using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using System.Text.Json.Serialization;
using TrimFit.Core.Planning;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting;

/// <summary>What the speaking card's page needs: its texts, legs and cautions.</summary>
public static class SpeakingCardData
{
    /// <summary>The data as JSON that may stand inside a script element: no character of it ends one.</summary>
    /// <param name="report">The card; it must have legs.</param>
    /// <param name="style">Units and culture.</param>
    /// <exception cref="ArgumentException">The card was refused.</exception>
    public static string Json(CardReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        if (report.Plan.Legs.IsEmpty)
            throw new ArgumentException("has no legs", nameof(report));
        var numbers = new Numbers(style);
        CardWords words = style.Words.Card;
        var data = new SpeakingJson
        {
            Name = report.Rig.Name,
            Language = style.Words.Language,
            Texts = new(words.Speaking),
            Answer = words.Answer(report.Plan, numbers),
            Cautions = [.. CardDocument.CautionsOf(report.Plan).Select(c => style.Words.Caution(c, numbers))],
            Rules = [.. words.Rules(report.Plan, numbers)],
            Legs = [.. report.Plan.Legs.Select(l => new SpeakingLegJson
            {
                Start = l.StartSec,
                Seconds = l.Seconds,
                Say = words.Say(l, report.Rig, numbers),
                Beeps = l.Kind switch { CardLegKind.Hold => 1, CardLegKind.HandsOff or CardLegKind.Ballast => 2, CardLegKind.BrakeStep or CardLegKind.Circle => 3, _ => 4 },
                Sheet = string.Join('\n', CardSheetText.Keys(l, report.Rig)),
            })],
            Id = "",
        };
        // Two cards in one browser must not mix their clocks.
        string id = Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(JsonSerializer.Serialize(data, SpeakingJsonContext.Default.SpeakingJson))))[..12];
        return JsonSerializer.Serialize(data with { Id = id }, SpeakingJsonContext.Default.SpeakingJson); // the default encoder escapes <, > and &
    }
}

internal sealed record SpeakingJson
{
    public required string Id { get; init; }
    public required string Name { get; init; }
    public required string Language { get; init; }
    public required Dictionary<string, string> Texts { get; init; }
    public required string Answer { get; init; }
    public required string[] Cautions { get; init; }
    public required string[] Rules { get; init; }
    public required SpeakingLegJson[] Legs { get; init; }
}

internal sealed record SpeakingLegJson
{
    public required double Start { get; init; }
    public required double Seconds { get; init; }
    public required string Say { get; init; }
    public required int Beeps { get; init; }
    public required string Sheet { get; init; }
}

[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase)]
[JsonSerializable(typeof(SpeakingJson))]
internal sealed partial class SpeakingJsonContext : JsonSerializerContext;
