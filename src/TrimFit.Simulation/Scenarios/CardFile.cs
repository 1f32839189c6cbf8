using System.Collections.Immutable;
using System.Text.Json;
using static System.FormattableString;

namespace TrimFit.Simulation;

/// <summary>Reads the legs of a test card (JSON, schema <c>trimfit-card/1</c>), so that a made-up flight can fly it.</summary>
internal static class CardFile
{
    private const string Schema = "trimfit-card/1";

    /// <summary>The legs, flown from a start heading.</summary>
    /// <param name="fileName">Name for messages.</param>
    /// <param name="json">The whole file.</param>
    /// <param name="headingRad">Heading of the first run, rad.</param>
    /// <param name="fullTravelM">Full brake travel, m.</param>
    /// <exception cref="ScenarioFormatException">The text is no card, or one without legs.</exception>
    public static ImmutableArray<FlightLeg> Legs(string fileName, string json, double headingRad, double fullTravelM)
    {
        JsonDocument document;
        try
        {
            document = JsonDocument.Parse(json.TrimStart('\uFEFF'));
        }
        catch (JsonException fault)
        {
            throw new ScenarioFormatException(Invariant($"{fileName}({fault.LineNumber + 1}): this is not JSON. Write the card with: trimfit card --rig RIG --json FILE."), fault);
        }
        using (document)
        {
            JsonElement root = document.RootElement;
            if (root.ValueKind != JsonValueKind.Object || !root.TryGetProperty("schema", out JsonElement schema) || schema.ValueKind != JsonValueKind.String || schema.GetString() != Schema)
                throw new ScenarioFormatException(Invariant($"{fileName}: expected a test card with schema \"{Schema}\". Write it with: trimfit card --rig RIG --json FILE."));
            if (!root.TryGetProperty("legs", out JsonElement list) || list.ValueKind != JsonValueKind.Array || list.GetArrayLength() == 0)
                throw new ScenarioFormatException(Invariant($"{fileName}: the card has no legs; was it refused? Plan another one."));
            var legs = ImmutableArray.CreateBuilder<FlightLeg>();
            foreach (JsonElement leg in list.EnumerateArray())
                legs.Add(Leg(fileName, legs.Count + 1, leg, headingRad, fullTravelM));
            return legs.ToImmutable();
        }
    }

    private static FlightLeg Leg(string fileName, int number, JsonElement leg, double headingRad, double fullTravelM)
    {
        const double MmPerM = 1000, Percent = 100;
        LegControl control = Word("kind") switch
        {
            "hold" => LegControl.HoldHeading,
            "hands_off" => LegControl.HandsOff,
            "brake_step" or "circle" => LegControl.Brakes,
            "ballast" => LegControl.Ballast,
            "turn" => LegControl.Turn,
            string other => throw Fault("kind", other, "hold, hands_off, brake_step, circle, ballast or turn"),
        };
        LegPower power = Word("power") switch
        {
            "off" => LegPower.Off,
            "idle" => LegPower.Idle,
            "level" => LegPower.Level,
            "full" => LegPower.Full,
            string other => throw Fault("power", other, "off, idle, level or full"),
        };
        double seconds = Number("seconds", 0.1, 3600);
        double left = Number("brake_left_percent", 0, Percent) / Percent, right = Number("brake_right_percent", 0, Percent) / Percent;
        return new()
        {
            DurationSec = seconds,
            Power = power,
            Control = control,
            HeadingRad = control == LegControl.HoldHeading ? headingRad + double.DegreesToRadians(Number("heading_deg", -1e6, 1e6)) : null,
            TurnRad = control == LegControl.Turn ? double.DegreesToRadians(Number("turn_deg", -720, 720)) : 0,
            BrakeLeftM = left * fullTravelM,
            BrakeRightM = right * fullTravelM,
            BallastKg = Number("ballast_kg", 0, 50),
            BallastArmM = Number("ballast_arm_mm", -2000, 2000) / MmPerM,
        };

        string Word(string key) => leg.ValueKind == JsonValueKind.Object && leg.TryGetProperty(key, out JsonElement e) && e.ValueKind == JsonValueKind.String
            ? e.GetString()!
            : throw Fault(key, "nothing", "a word");

        double Number(string key, double least, double most) =>
            leg.TryGetProperty(key, out JsonElement e) && e.ValueKind == JsonValueKind.Number && e.GetDouble() is double value && value >= least && value <= most
                ? value
                : throw Fault(key, leg.TryGetProperty(key, out JsonElement found) ? found.GetRawText() : "nothing", Invariant($"a number from {least} to {most}"));

        ScenarioFormatException Fault(string key, string found, string expected) =>
            new(Invariant($"{fileName}: leg {number}, {key}: found {found}, expected {expected}."));
    }
}
