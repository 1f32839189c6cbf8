using System.Globalization;
using System.Text;

namespace TrimFit.Simulation;

/// <summary>The rig file that the pilot of a made-up flight would write.</summary>
public static class RigText
{
    /// <summary>Writes the rig file (TOML, schema <c>trimfit-rig/1</c>).</summary>
    /// <param name="s">The machine.</param>
    /// <param name="knowledge">What the pilot knows of it and how wrongly; null is what the scenario says.</param>
    public static string Write(Scenario s, RigKnowledge? knowledge = null)
    {
        ArgumentNullException.ThrowIfNull(s);
        RigKnowledge k = knowledge ?? s.Knowledge;
        var text = new StringBuilder();
        PropellerSetup p = s.Propeller;
        GeometrySetup g = s.Geometry;
        int rotation = k.RotationWrong ? -p.Rotation : p.Rotation;
        Line($"schema = \"trimfit-rig/1\"");
        Line($"name = \"{s.Name.Replace("\\", "\\\\", StringComparison.Ordinal).Replace("\"", "\\\"", StringComparison.Ordinal)}\"");
        Table("machine");
        Line($"kind = \"foot_launch\"");
        Table("mass");
        Line($"pilot_kg = {Value(s.Mass.PilotKg)}");
        Line($"power_unit_kg = {Value(s.Mass.PowerUnitKg)}");
        if (k.Offsets)
            Line($"power_unit_lateral_mm = {Mm(s.Mass.PowerUnitLateralM)}");
        if (k.ThrustLine)
            Line($"cg_depth_mm = {Mm(s.Mass.CgDepthM)}");
        Table("propeller");
        Line($"rotation = \"{(rotation > 0 ? "clockwise" : rotation < 0 ? "counter-clockwise" : "contra-rotating")}\"");
        Line($"diameter_m = {Value(p.DiameterM)}");
        if (k.Power)
        {
            Line($"shaft_power_kw = {Value(Math.Tau * p.FullRevPerSec * p.FullTorqueNm * (1 + k.PowerError) / 1000)}");
            Line($"static_thrust_n = {Value(p.FullThrustN * (1 + k.ThrustError))}");
        }
        Line($"full_power_rpm = {Value(p.FullRevPerSec * s.Sensors.RpmFactor * 60)}");
        if (s.Sensors.RpmFactor != 1) // 1: the logger counts the propeller, exactly
        {
            Line($"rpm_is = \"engine\"");
            Line($"reduction_ratio = {Value(s.Sensors.RpmFactor)}");
        }
        if (p.Clutch)
        {
            Line($"drive = \"clutch\"");
            Line($"clutch_engage_rpm = {Value(PropellerSetup.ClutchOverIdle * p.IdleRatio * p.FullRevPerSec * s.Sensors.RpmFactor * 60)}");
        }
        if (k.ThrustLine)
        {
            Line($"hang_back_deg = {Value(double.RadiansToDegrees(p.HangBackRad + k.HangBackErrorRad))}");
            Line($"thrust_line_mm = {Mm(p.ThrustLineM + k.ThrustLineErrorM)}");
            Line($"thrust_line_depth_mm = {Mm(p.ThrustLineDepthM)}");
        }
        Table("carabiners");
        Line($"left_mm = {Mm(g.LeftCarabinerM + k.CarabinerErrorM)}");
        Line($"right_mm = {Mm(g.RightCarabinerM + k.CarabinerErrorM)}");
        if (k.Offsets)
        {
            Table("hang_points");
            Line($"front_share = {Value(g.FrontShare)}");
            Line($"front_offset_mm = {Mm(g.FrontHangPointsM + k.HangPointErrorM)}");
            Line($"rear_offset_mm = {Mm(g.RearHangPointsM + k.HangPointErrorM)}");
        }
        Table("brakes");
        Line($"full_travel_mm = {Mm(s.Brakes.FullTravelM)}");
        Table("wing");
        Line($"mass_kg = {Value(s.Mass.WingKg)}");
        if (k.WingSpeeds)
        {
            Line($"trim_speed_m_s = {Value(s.Wing.TrimSpeedMPerSec)}");
            Line($"glide_sink_m_s = {Value(s.Wing.GlideSinkMPerSec)}");
        }
        if (k.Lines)
        {
            Line($"line_length_m = {Value(s.Wing.LineLengthM)}");
            Line($"line_spread_m = {Value(s.Wing.LineSpreadM)}");
        }
        if (k.SensitivityRadPerSecPerM is double sensitivity)
            Line($"sensitivity_deg_s_per_mm = {Value(double.RadiansToDegrees(sensitivity) / 1000)}");
        return text.ToString();

        void Line(FormattableString line) => text.Append(line.ToString(CultureInfo.InvariantCulture)).Append('\n');
        void Table(string name) => text.Append('\n').Append('[').Append(name).Append("]\n");
    }

    private static string Mm(double meters) => Value(meters * 1000);

    private static string Value(double value) => Math.Round(value, 4).ToString("0.####", CultureInfo.InvariantCulture) is "-0" ? "0"
        : Math.Round(value, 4).ToString("0.####", CultureInfo.InvariantCulture);
}
