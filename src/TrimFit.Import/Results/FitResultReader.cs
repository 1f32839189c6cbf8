using System.Text.Json;
using TrimFit.Core.Planning;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Import.Results;

/// <summary>Reads a result of <c>fit</c> (JSON, schema <c>trimfit-fit/1</c>) for what it tells the next test card.</summary>
public static class FitResultReader
{
    /// <summary>The schema this program reads.</summary>
    public const string Schema = "trimfit-fit/1";

    private const string Remedy = "Write it with: trimfit fit LOG --rig RIG --json FILE.";
    private const double RadPerDeg = Math.PI / 180, MmPerM = 1000;

    /// <summary>Reads the text of a result.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="json">The whole file.</param>
    /// <param name="brakeFullTravelM">Full brake travel of the machine, m, for brakes logged in mm; null when it is not known.</param>
    /// <exception cref="LogFormatException">The text is no such result.</exception>
    public static PriorFlight Read(string fileName, string json, double? brakeFullTravelM = null)
    {
        using ResultFile file = ResultFile.Read(fileName, json, Schema, Remedy);
        bool relative = file.Text("turn_model", "thrust_basis") == "relative";
        JsonElement? At(string setting) => file.List("pull", "at").Cast<JsonElement?>().FirstOrDefault(p => ResultFile.TextOf(p!.Value, "setting") == setting);
        double? full = relative ? 1 : At("full") is JsonElement f ? file.NumberOf(f, "thrust_n") : null;
        JsonElement? Coefficient(string name) =>
            file.List("turn_model", "coefficients").Cast<JsonElement?>().FirstOrDefault(c => ResultFile.TextOf(c!.Value, "name") == name);
        double? Value(string name) => Coefficient(name) is JsonElement c ? file.NumberOf(c, "value") * RadPerDeg : null;

        // Brakes as logged, per unit: percent of the travel or mm; counts say nothing of the travel.
        string? brakeUnit = Coefficient("brake_difference") is JsonElement b ? ResultFile.TextOf(b, "unit") : null;
        double? unitsOfTravel = brakeUnit is null ? null
            : brakeUnit.EndsWith('%') ? 100
            : brakeUnit.EndsWith("mm", StringComparison.Ordinal) ? brakeFullTravelM * MmPerM
            : null;
        bool brakesLogged = file.List("inputs", "files").Any(x => x.TryGetProperty("columns", out JsonElement columns) && columns.ValueKind == JsonValueKind.Array
            && columns.EnumerateArray().Any(c => c.ValueKind == JsonValueKind.Object && ResultFile.TextOf(c, "role") is "brake_left" or "brake_right" or "brake_difference"));
        double? north = file.Number("wind", "north_m_s"), east = file.Number("wind", "east_m_s");
        return new()
        {
            Noise = Noise(file),
            GyroRowsPerSec = file.Number("turn_model", "noise", "gyro_rows_per_s") ?? 0,
            HeadingRowsPerSec = file.Number("turn_model", "noise", "heading_rows_per_s") ?? 0,
            BrakesLogged = brakesLogged,
            Constant = Value("constant"),
            Slope = Value("thrust") * full,
            Curvature = Value("thrust_squared") * full * full,
            BrakePerTravel = Value("brake_difference") * unitsOfTravel,
            Idle = At("idle") is JsonElement idle ? file.NumberOf(idle, "thrust_fraction") : null,
            Level = file.Text("pull", "cruise_basis") == "zero_climb" && At("cruise") is JsonElement cruise ? file.NumberOf(cruise, "thrust_fraction") : null,
            AirspeedMPerSec = file.Number("wind", "airspeed_m_s"),
            WindMPerSec = north is double n && east is double e ? double.Hypot(n, e) : null,
            PullRadPerSec = file.Number("pull", "at_balance", "rate_deg_s") * RadPerDeg,
            HeldBrake = file.Number("pull", "at_balance", "held_brake") / unitsOfTravel,
        };
    }

    private static NoiseParameters? Noise(ResultFile file)
    {
        if (file.At("turn_model", "noise") is null)
            return null;
        NoiseParameters usual = new() { Order = ResponseOrder.First, DisturbanceRms = 1.5 * RadPerDeg, DisturbanceTauSec = 8 };
        double Of(string key, double otherwise, double scale = 1)
        {
            if (file.Number("turn_model", "noise", key) is not double value)
                return otherwise;
            return value >= 0 && (value > 0 || scale != 1) ? value * scale : throw file.Fault("turn_model.noise." + key, FormattableString.Invariant($"{value}"), "a number above 0", Remedy);
        }
        return new()
        {
            Order = file.Text("turn_model", "noise", "response") == "second" ? ResponseOrder.Second : ResponseOrder.First,
            LagSec = Of("lag_s", usual.LagSec),
            NaturalFrequency = Of("frequency_rad_s", usual.NaturalFrequency),
            Damping = Of("damping", usual.Damping),
            DisturbanceRms = Of("disturbance_deg_s", usual.DisturbanceRms, RadPerDeg),
            DisturbanceTauSec = Of("disturbance_tau_s", usual.DisturbanceTauSec),
            QuickDisturbance = Of("quick_deg_s_root_s", usual.QuickDisturbance, RadPerDeg),
            GyroNoise = Of("gyro_deg_s", usual.GyroNoise, RadPerDeg),
            HeadingNoise = Of("heading_deg", usual.HeadingNoise, RadPerDeg),
            GustRms = Of("gust_deg", usual.GustRms, RadPerDeg),
            GustTauSec = Of("gust_tau_s", usual.GustTauSec),
        };
    }
}
