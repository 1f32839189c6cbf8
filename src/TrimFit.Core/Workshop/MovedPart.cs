using TrimFit.Core.Rigging;

namespace TrimFit.Core.Workshop;

/// <summary>How far a part was moved, by the readings before and after.</summary>
/// <param name="Travel">Travel that explains the readings best, SI in the part's unit, right positive.</param>
/// <param name="Misfit">Largest difference between a reading and what that travel would do to it, m or rad: another part moved too, or a reading is wrong.</param>
/// <param name="Step">Step the part can be set in, SI.</param>
public sealed record MovedPart(double Travel, double Misfit, double Step)
{
    private const double ProbeM = 0.001;

    private static readonly Func<RigValues, double>[] _places =
        [r => r.LeftM, r => r.RightM, r => r.FrontOffsetM, r => r.RearOffsetM, r => r.PowerUnitLateralM, r => r.ThrustLineM, r => r.CantRad];

    /// <summary>Finds the travel of a part between two rigs.</summary>
    /// <param name="kind">The part.</param>
    /// <param name="before">The rig before.</param>
    /// <param name="after">The rig after.</param>
    /// <returns>Null for a part whose place is not in a rig file: ballast, trimmers, brake lines.</returns>
    public static MovedPart? Between(AdjustmentKind kind, Rig before, Rig after)
    {
        ArgumentNullException.ThrowIfNull(before);
        ArgumentNullException.ThrowIfNull(after);
        Adjustment adjustment = Adjustment.All.Single(a => a.Kind == kind);
        if (adjustment.Move is null || kind == AdjustmentKind.Ballast)
            return null;
        double step = StepOf(kind, before);
        RigValues from = PlacesOf(before), to = PlacesOf(after);
        double[] read = [.. _places.Select(p => p(to) - p(from))];
        MovedPart? best = null;
        foreach (double side in (ReadOnlySpan<double>)[1, -1]) // a part that moves otherwise to the left than to the right
        {
            RigValues moved = adjustment.Move(from, side * ProbeM);
            double[] perTravel = [.. _places.Select(p => (p(moved) - p(from)) / (side * ProbeM))];
            double squares = perTravel.Sum(u => u * u), travel = read.Zip(perTravel, (r, u) => r * u).Sum() / squares;
            double misfit = read.Zip(perTravel, (r, u) => Math.Abs(r - (travel * u))).Max();
            if (travel * side >= 0 && (best is null || misfit < best.Misfit))
                best = new(travel, misfit, step);
        }
        return best ?? new(0, read.Max(Math.Abs), step);
    }

    /// <summary>Step in which a part can be set, SI: the rig's, or the customary one.</summary>
    public static double StepOf(AdjustmentKind kind, Rig rig)
    {
        ArgumentNullException.ThrowIfNull(rig);
        return rig.Limits.GetValueOrDefault(kind)?.Step ?? Adjustment.All.Single(a => a.Kind == kind).DefaultStep;
    }

    /// <summary>The places as they were read, without what a hang check makes of them.</summary>
    private static RigValues PlacesOf(Rig rig) => new()
    {
        LeftM = rig.Carabiners.LeftM.Value,
        RightM = rig.Carabiners.RightM.Value,
        FrontOffsetM = rig.HangPoints.FrontOffsetM.Value,
        RearOffsetM = rig.HangPoints.RearOffsetM.Value,
        PowerUnitLateralM = rig.Mass.PowerUnitLateralM.Value,
        ThrustLineM = rig.Propeller.ThrustLineM.Value,
        CantRad = rig.Propeller.CantRad.Value,
    };
}
