using System.Collections.Immutable;

namespace TrimFit.Import.Rigs;

/// <summary>A reading taken on the ground and the place in the rig file it goes to.</summary>
public sealed record MeasuredKey
{
    private MeasuredKey(string table, string key, MeasureGroup group, int repeats = 3, string[]? words = null, string[]? supersedes = null) =>
        (Table, Key, Group, Repeats, Words, Supersedes) = (table, key, group, repeats, [.. words ?? []], [.. supersedes ?? []]);

    /// <summary>Table of the rig file.</summary>
    public string Table { get; }

    /// <summary>Key in it; its ending is its unit.</summary>
    public string Key { get; }

    /// <summary>Which sheet and which part of the questions it belongs to.</summary>
    public MeasureGroup Group { get; }

    /// <summary>How many readings are asked for.</summary>
    public int Repeats { get; }

    /// <summary>The words it may be; empty for a number.</summary>
    public ImmutableArray<string> Words { get; }

    /// <summary>Keys (<c>table.key</c>) whose value this reading takes the place of.</summary>
    public ImmutableArray<string> Supersedes { get; }

    /// <summary><c>table.key</c>.</summary>
    public string Name => Table + "." + Key;

    /// <summary>Unit at the end of the key; empty for none.</summary>
    public string Unit => Key switch
    {
        _ when Key.EndsWith("_mm", StringComparison.Ordinal) => "mm",
        _ when Key.EndsWith("_kg", StringComparison.Ordinal) => "kg",
        _ when Key.EndsWith("_deg", StringComparison.Ordinal) => "deg",
        _ when Key.EndsWith("_c", StringComparison.Ordinal) => "°C",
        _ when Key.EndsWith("_m", StringComparison.Ordinal) => "m",
        _ => "",
    };

    private static readonly string[] _hangSession =
        ["hang_check.exchanged_left_kg", "hang_check.exchanged_right_kg", "hang_check.lean_right_left_kg", "hang_check.lean_right_right_kg", "hang_check.carabiner_spacing_mm"];

    /// <summary>Every reading, in the order it is asked for.</summary>
    public static ImmutableArray<MeasuredKey> All { get; } =
    [
        new("carabiners", "left_mm", MeasureGroup.Tape),
        new("carabiners", "right_mm", MeasureGroup.Tape),
        new("hang_points", "front_left_mm", MeasureGroup.Tape, supersedes: ["hang_points.front_offset_mm"]),
        new("hang_points", "front_right_mm", MeasureGroup.Tape, supersedes: ["hang_points.front_offset_mm"]),
        new("hang_points", "rear_left_mm", MeasureGroup.Tape, supersedes: ["hang_points.rear_offset_mm"]),
        new("hang_points", "rear_right_mm", MeasureGroup.Tape, supersedes: ["hang_points.rear_offset_mm"]),
        new("propeller", "thrust_line_mm", MeasureGroup.Tape),
        new("propeller", "thrust_line_depth_mm", MeasureGroup.Tape),
        new("propeller", "hang_back_deg", MeasureGroup.Tape),
        new("mass", "pilot_kg", MeasureGroup.HangCheck, repeats: 1),
        new("mass", "fuel_kg", MeasureGroup.HangCheck, repeats: 1),
        new("hang_check", "carabiner_spacing_mm", MeasureGroup.HangCheck),
        new("hang_check", "left_kg", MeasureGroup.HangCheck, supersedes: _hangSession),
        new("hang_check", "right_kg", MeasureGroup.HangCheck, supersedes: _hangSession),
        new("hang_check", "exchanged_left_kg", MeasureGroup.HangCheck),
        new("hang_check", "exchanged_right_kg", MeasureGroup.HangCheck),
        new("hang_check", "lean_right_left_kg", MeasureGroup.HangCheck, repeats: 1),
        new("hang_check", "lean_right_right_kg", MeasureGroup.HangCheck, repeats: 1),
        new("weighing", "rear_strap_kg", MeasureGroup.Weighing, supersedes: ["hang_points.front_share"]),
        new("mass", "power_unit_kg", MeasureGroup.Weighing, repeats: 1),
        new("weighing", "scale_spacing_mm", MeasureGroup.Weighing, supersedes: ["mass.power_unit_lateral_mm"]),
        new("weighing", "power_unit_left_kg", MeasureGroup.Weighing, supersedes: ["mass.power_unit_lateral_mm"]),
        new("weighing", "power_unit_right_kg", MeasureGroup.Weighing, supersedes: ["mass.power_unit_lateral_mm"]),
        new("propeller", "rotation", MeasureGroup.Rotation, repeats: 1, words: ["clockwise", "counter-clockwise", "contra-rotating"]),
        new("propeller", "crank_rotation", MeasureGroup.Rotation, repeats: 1, words: ["clockwise", "counter-clockwise"]),
        new("propeller", "drive", MeasureGroup.Rotation, repeats: 1, words: ["direct", "belt", "gear", "clutch", "electric"]),
        new("propeller", "crank_turns", MeasureGroup.Rotation, repeats: 1),
        new("propeller", "propeller_turns", MeasureGroup.Rotation, repeats: 1),
        new("thrust_test", "pull_kg", MeasureGroup.Thrust, supersedes: ["propeller.static_thrust_n", "propeller.static_thrust_air_density"]),
        new("thrust_test", "temperature_c", MeasureGroup.Thrust, repeats: 1),
        new("thrust_test", "height_m", MeasureGroup.Thrust, repeats: 1),
        new("thrust_test", "rope_angle_deg", MeasureGroup.Thrust, repeats: 1),
    ];

    /// <summary>The reading of a name, <c>table.key</c> or the key alone where one table has it; null when there is none.</summary>
    public static MeasuredKey? Find(string name)
    {
        MeasuredKey[] found = [.. All.Where(k => k.Name == name || k.Key == name)];
        return found.Length == 1 ? found[0] : null;
    }
}

/// <summary>What is measured together.</summary>
public enum MeasureGroup
{
    /// <summary>Tape and level on the frame.</summary>
    Tape,
    /// <summary>Two hanging scales.</summary>
    HangCheck,
    /// <summary>Power unit on two scales, rear strap.</summary>
    Weighing,
    /// <summary>Sense of rotation and reduction, plug out.</summary>
    Rotation,
    /// <summary>Static thrust on a tethered scale.</summary>
    Thrust,
}
