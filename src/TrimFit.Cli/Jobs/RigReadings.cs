using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;

namespace TrimFit.Cli;

/// <summary>Readings of a rig file that a technician can stand for: places and scales that were measured.</summary>
internal static class RigReadings
{
    private const double MmPerM = 1000;

    public static ImmutableArray<ReadingRecord> Of(Rig rig)
    {
        var readings = ImmutableArray.CreateBuilder<ReadingRecord>();
        Add("carabiners.left_mm", rig.Carabiners.LeftM, MmPerM);
        Add("carabiners.right_mm", rig.Carabiners.RightM, MmPerM);
        Add("hang_points.front_offset_mm", rig.HangPoints.FrontOffsetM, MmPerM);
        Add("hang_points.rear_offset_mm", rig.HangPoints.RearOffsetM, MmPerM);
        Add("propeller.thrust_line_mm", rig.Propeller.ThrustLineM, MmPerM);
        if (rig.HangCheck is RigHangCheck check)
        {
            Add("hang_check.left_kg", check.LeftKg, 1);
            Add("hang_check.right_kg", check.RightKg, 1);
        }
        return readings.ToImmutable();

        void Add(string key, Reading reading, double scale)
        {
            if (reading.Source == ReadingSource.Measured)
                readings.Add(new(key, Math.Round(reading.Value * scale, 6))); // a micrometre: what the edge of SI adds in dust is not a reading
        }
    }
}
