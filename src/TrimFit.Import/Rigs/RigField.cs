using System.Collections.Immutable;
using TrimFit.Import.Toml;

namespace TrimFit.Import.Rigs;

/// <summary>One key of the rig file as a form asks for it.</summary>
public sealed record RigField
{
    private RigField(string table, string key, NumberRange? range, string[]? words = null, bool needed = false) =>
        (Table, Key, Range, Words, Needed) = (table, key, range, [.. words ?? []], needed);

    /// <summary>Table; empty for the top of the file.</summary>
    public string Table { get; }

    /// <summary>Key in it.</summary>
    public string Key { get; }

    /// <summary><c>table.key</c>, or the key alone at the top.</summary>
    public string Name => Table.Length == 0 ? Key : Table + "." + Key;

    /// <summary>The words it may be; empty for a number or free text.</summary>
    public ImmutableArray<string> Words { get; }

    /// <summary>Whether <c>fit</c> cannot start without it.</summary>
    public bool Needed { get; }

    /// <summary>Whether it is a number; repeats and a plus-minus are then welcome too.</summary>
    public bool IsNumber => Range is not null;

    /// <summary>Smallest number it may be; null for no number.</summary>
    public double? Min => Range?.Min;

    /// <summary>Largest number it may be; null for no number.</summary>
    public double? Max => Range?.Max;

    /// <summary>Its unit; empty for none.</summary>
    public string Unit => Range?.Unit ?? "";

    /// <summary>What a number outside the range usually is.</summary>
    public string Remedy => Range?.Remedy ?? "";

    private NumberRange? Range { get; }

    /// <summary>Every key a form asks for, in the order a person meets them. A rig file may say more; what else it says stays in it.</summary>
    public static ImmutableArray<RigField> All { get; } =
    [
        new("", "name", null),
        new("machine", "kind", null, ["foot_launch", "wheels"]),
        new("machine", "seats", new(1, 2, "", "A machine has one seat or two.")),
        new("mass", "pilot_kg", RigTables.Ranges.PilotKg, needed: true),
        new("mass", "passenger_kg", RigTables.Ranges.PassengerKg),
        new("mass", "power_unit_kg", RigTables.Ranges.PowerUnitKg, needed: true),
        new("mass", "fuel_kg", RigTables.Ranges.FuelKg),
        new("mass", "wheels_kg", RigTables.Ranges.WheelsKg),
        new("mass", "power_unit_lateral_mm", RigTables.Ranges.LateralMm),
        new("mass", "cg_depth_mm", RigTables.Ranges.DepthMm),
        new("carabiners", "left_mm", RigTables.Ranges.CarabinerMm with { Max = -50 }, needed: true),
        new("carabiners", "right_mm", RigTables.Ranges.CarabinerMm with { Min = 50 }, needed: true),
        new("hang_points", "front_left_mm", RigTables.Ranges.CarabinerMm),
        new("hang_points", "front_right_mm", RigTables.Ranges.CarabinerMm),
        new("hang_points", "front_offset_mm", RigTables.Ranges.LateralMm),
        new("hang_points", "rear_left_mm", RigTables.Ranges.CarabinerMm),
        new("hang_points", "rear_right_mm", RigTables.Ranges.CarabinerMm),
        new("hang_points", "rear_offset_mm", RigTables.Ranges.LateralMm),
        new("hang_points", "front_share", RigTables.Ranges.Share),
        new("propeller", "rotation", null, ["clockwise", "counter-clockwise", "contra-rotating"], needed: true),
        new("propeller", "diameter_m", RigTables.Ranges.DiameterM),
        new("propeller", "shaft_power_kw", RigTables.Ranges.ShaftPowerKw),
        new("propeller", "static_thrust_n", RigTables.Ranges.ThrustN),
        new("propeller", "full_power_rpm", RigTables.Ranges.Rpm),
        new("propeller", "rpm_is", null, ["propeller", "engine", "electrical"]),
        new("propeller", "reduction_ratio", RigTables.Ranges.ReductionRatio),
        new("propeller", "drive", null, ["direct", "belt", "gear", "clutch", "electric"]),
        new("propeller", "thrust_line_mm", RigTables.Ranges.LateralMm),
        new("propeller", "thrust_line_depth_mm", RigTables.Ranges.ThrustDepthMm),
        new("propeller", "hang_back_deg", RigTables.Ranges.HangBackDeg),
        new("propeller", "cant_deg", RigTables.Ranges.CantDeg),
        new("hang_check", "left_kg", RigTables.Ranges.HangKg),
        new("hang_check", "right_kg", RigTables.Ranges.HangKg),
        new("hang_check", "carabiner_spacing_mm", RigTables.Ranges.SpacingMm),
        new("brakes", "full_travel_mm", RigTables.Ranges.BrakeTravelMm),
        new("wing", "name", null),
        new("wing", "area_m2", RigTables.Ranges.WingAreaM2),
        new("wing", "mass_kg", RigTables.Ranges.WingKg),
        new("wing", "trim_speed_m_s", RigTables.Ranges.SpeedMPerSec),
        new("wing", "glide_sink_m_s", RigTables.Ranges.SinkMPerSec),
        new("wing", "sensitivity_deg_s_per_mm", RigTables.Ranges.Sensitivity),
    ];
}
