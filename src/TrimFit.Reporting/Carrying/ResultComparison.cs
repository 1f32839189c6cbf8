using System.Collections.Immutable;
using System.Text.Json;

namespace TrimFit.Reporting.Carrying;

/// <summary>Whether two results of the same input agree: those of an old report and of today's program.</summary>
public sealed record ResultComparison
{
    /// <summary>Numbers agree when they differ by at most this share of the larger: far below what any report shows, far above the last bits of another processor.</summary>
    public const double RelativeTolerance = 1e-4;

    /// <summary>Differences below this are none, in whatever unit: for numbers that are zero but for rounding.</summary>
    public const double AbsoluteTolerance = 1e-9;

    /// <summary>Texts that are part of the result; all others are wording, which may become better.</summary>
    private static readonly string[] _codes = ["schema", "code", "strength", "kind", "name", "unit", "setting", "method", "thrust_basis", "agreement", "cruise_basis", "twist_direction", "toward"];

    /// <summary>What differs, as <c>pull.at[2].rate_deg_s: -1.41, now -1.38</c>; empty when all agrees.</summary>
    public required ImmutableArray<string> Differences { get; init; }

    /// <summary>Whether all agrees.</summary>
    public bool Agrees => Differences.IsEmpty;

    /// <summary>Compares two results of <c>fit</c> as JSON.</summary>
    /// <param name="before">The older one.</param>
    /// <param name="now">The newer one.</param>
    /// <exception cref="JsonException">One is no JSON.</exception>
    public static ResultComparison Of(string before, string now)
    {
        using JsonDocument old = JsonDocument.Parse(before), today = JsonDocument.Parse(now);
        var differences = ImmutableArray.CreateBuilder<string>();
        Compare("", "", old.RootElement, today.RootElement, differences);
        return new() { Differences = differences.ToImmutable() };
    }

    private static void Compare(string path, string key, JsonElement old, JsonElement now, ImmutableArray<string>.Builder differences)
    {
        switch (old.ValueKind, now.ValueKind)
        {
            case (JsonValueKind.Object, JsonValueKind.Object):
                foreach (JsonProperty property in old.EnumerateObject())
                {
                    // What was read is the same by its hashes; cautions and warnings are words.
                    if (path.Length == 0 && property.Name is "inputs" or "cautions" or "warnings")
                        continue;
                    string inner = path.Length == 0 ? property.Name : $"{path}.{property.Name}";
                    if (now.TryGetProperty(property.Name, out JsonElement other))
                        Compare(inner, property.Name, property.Value, other, differences);
                    else
                        differences.Add($"{inner}: no longer given");
                }
                break;
            case (JsonValueKind.Array, JsonValueKind.Array):
                if (old.GetArrayLength() != now.GetArrayLength())
                {
                    differences.Add(FormattableString.Invariant($"{path}: {old.GetArrayLength()} entries, now {now.GetArrayLength()}"));
                    break;
                }
                for (int i = 0; i < old.GetArrayLength(); i++)
                    Compare(FormattableString.Invariant($"{path}[{i}]"), key, old[i], now[i], differences);
                break;
            case (JsonValueKind.Number, JsonValueKind.Number):
                double a = old.GetDouble(), b = now.GetDouble();
                if (Math.Abs(a - b) > Math.Max(AbsoluteTolerance, RelativeTolerance * Math.Max(Math.Abs(a), Math.Abs(b))))
                    differences.Add($"{path}: {old.GetRawText()}, now {now.GetRawText()}");
                break;
            case (JsonValueKind.String, JsonValueKind.String):
                if (_codes.Contains(key) && old.GetString() != now.GetString())
                    differences.Add($"{path}: {old.GetString()}, now {now.GetString()}");
                break;
            default:
                if (old.ValueKind != now.ValueKind)
                    differences.Add($"{path}: {old.GetRawText()}, now {now.GetRawText()}");
                break;
        }
    }
}
