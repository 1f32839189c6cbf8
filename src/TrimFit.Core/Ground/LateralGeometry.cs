using TrimFit.Core.Rigging;

namespace TrimFit.Core.Ground;

/// <summary>CG offset that tape and weighing give, with its spread: what a hang check is held against.</summary>
public sealed record LateralGeometry
{
    /// <summary>e by tape and weighing, the pilot in the middle, m.</summary>
    public required double OffsetM { get; init; }

    /// <summary>Its standard deviation, m: every lateral reading, and the seat nobody measured.</summary>
    public required double StandardDeviation { get; init; }

    /// <summary>m_p/m: what a seat that is off by 1 mm does to e.</summary>
    public required double PilotShare { get; init; }

    /// <summary>Finds it from a rig, to first order in every reading.</summary>
    public static LateralGeometry Of(Rig rig)
    {
        ArgumentNullException.ThrowIfNull(rig);
        RigValues values = new RigSpread(rig with { HangCheck = null }).Nominal;
        double pilot = values.PilotKg / values.SuspendedKg, front = values.FrontShare;
        double unit = rig.Mass.PowerUnitKg.Value / values.SuspendedKg, fuel = rig.Mass.FuelKg.Value / values.SuspendedKg;
        ReadOnlySpan<double> parts =
        [
            pilot * rig.Mass.PostureM.StandardDeviation,
            unit * rig.Mass.PowerUnitLateralM.StandardDeviation,
            fuel * rig.Mass.FuelLateralM.StandardDeviation,
            pilot * front * rig.HangPoints.FrontOffsetM.StandardDeviation,
            pilot * (1 - front) * rig.HangPoints.RearOffsetM.StandardDeviation,
            pilot * (values.FrontOffsetM - values.RearOffsetM) * rig.HangPoints.FrontShare.StandardDeviation,
            rig.Carabiners.LeftM.StandardDeviation / 2,
            rig.Carabiners.RightM.StandardDeviation / 2,
        ];
        double variance = 0;
        foreach (double part in parts)
            variance += part * part;
        return new() { OffsetM = values.CgOffsetM, StandardDeviation = Math.Sqrt(variance), PilotShare = pilot };
    }
}
