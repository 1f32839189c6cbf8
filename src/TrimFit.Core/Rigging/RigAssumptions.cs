using System.Collections.Immutable;

namespace TrimFit.Core.Rigging;

internal static class RigAssumptions
{
    public static ImmutableArray<Assumption> Of(Rig rig)
    {
        var list = ImmutableArray.CreateBuilder<Assumption>();
        void Add(string name, Reading reading, double scale, string unit)
        {
            if (reading.Source == ReadingSource.Assumed)
                list.Add(new(name, reading.Value * scale, unit, reading.Low95 * scale, reading.High95 * scale));
        }
        const double Millimeters = 1000, Degrees = 180 / Math.PI;
        Add("power_unit_lateral_mm", rig.Mass.PowerUnitLateralM, Millimeters, "mm");
        if (rig.Mass.FuelKg.Value > 0)
            Add("fuel_lateral_mm", rig.Mass.FuelLateralM, Millimeters, "mm");
        Add("posture_mm", rig.Mass.PostureM, Millimeters, "mm");
        Add("cg_depth_mm", rig.Mass.CgDepthM, Millimeters, "mm");
        Add("hang_back_deg", rig.Propeller.HangBackRad, Degrees, "deg");
        Add("thrust_line_mm", rig.Propeller.ThrustLineM, Millimeters, "mm");
        Add("thrust_line_depth_mm", rig.Propeller.ThrustLineDepthM, Millimeters, "mm");
        if (rig.Propeller.ShaftPowerW is null && rig.Propeller.RotationSign != 0)
            Add("figure_of_merit", rig.Propeller.FigureOfMerit, 1, "1");
        Add("front_share", rig.HangPoints.FrontShare, 1, "1");
        Add("front_offset_mm", rig.HangPoints.FrontOffsetM, Millimeters, "mm");
        Add("rear_offset_mm", rig.HangPoints.RearOffsetM, Millimeters, "mm");
        Add("wing_mass_kg", rig.Wing.MassKg, 1, "kg");
        Add("line_length_m", rig.Wing.LineLengthM, 1, "m");
        return list.ToImmutable();
    }
}
