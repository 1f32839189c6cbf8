using TrimFit.Core.Rigging;

namespace TrimFit.Core.Ground;

/// <summary>The hang check of a rig file.</summary>
public static class RigHang
{
    /// <summary>e from the rig's hang check; null without one.</summary>
    public static HangCheckResult? Of(Rig rig)
    {
        ArgumentNullException.ThrowIfNull(rig);
        return rig.HangCheck is null ? null : Of(rig, rig.HangCheck);
    }

    /// <summary>e from hangs on a rig.</summary>
    /// <param name="rig">The rig: spacing where the check gives none, and the pilot's share of the mass.</param>
    /// <param name="check">The hangs.</param>
    public static HangCheckResult Of(Rig rig, RigHangCheck check)
    {
        ArgumentNullException.ThrowIfNull(rig);
        ArgumentNullException.ThrowIfNull(check);
        Reading left = rig.Carabiners.LeftM, right = rig.Carabiners.RightM;
        double spacing = check.CarabinerSpacingM?.Value ?? (right.Value - left.Value);
        double spacingSd = check.CarabinerSpacingM?.StandardDeviation
            ?? Math.Sqrt((left.StandardDeviation * left.StandardDeviation) + (right.StandardDeviation * right.StandardDeviation));
        double pilot = rig.Mass.PilotKg.Value + rig.Mass.PassengerKg.Value;
        double share = pilot / RigSpread.SuspendedKg(rig);
        var options = new HangCheckOptions();
        if (check.Hangs.IsEmpty) // a number with its own spread may speak of a worse scale; lists hold the seating, which is counted by itself
            options = options with { ScaleSdKg = Math.Max(options.ScaleSdKg, Math.Max(check.LeftKg.StandardDeviation, check.RightKg.StandardDeviation)) };
        return HangCheck.Measure(check.AllHangs, spacing, spacingSd, share, options);
    }

    /// <summary>Change of e that an adjustment makes, with its spread from what was not measured, m.</summary>
    /// <param name="rig">The rig before the change.</param>
    /// <param name="adjustment">What is moved; it must move the rig.</param>
    /// <param name="travel">How far, SI, right positive.</param>
    /// <exception cref="ArgumentException">The adjustment works through the wing's controls.</exception>
    public static (double ChangeM, double StandardDeviation, double SpacingM) Expected(Rig rig, Adjustment adjustment, double travel)
    {
        ArgumentNullException.ThrowIfNull(rig);
        ArgumentNullException.ThrowIfNull(adjustment);
        Func<RigValues, double, RigValues> move = adjustment.Move ?? throw new ArgumentException("works through the wing's controls: a hang check cannot show it", nameof(adjustment));
        var spread = new RigSpread(rig);
        RigValues nominal = spread.Nominal, moved = move(nominal, travel);
        double change = moved.CgOffsetM - nominal.CgOffsetM;
        var random = new Statistics.SeededRandom(1);
        const int Draws = 500; // a standard deviation good to 3 %
        double squares = 0;
        for (int k = 0; k < Draws; k++)
        {
            RigValues draw = spread.Draw(random);
            double off = move(draw, travel).CgOffsetM - draw.CgOffsetM - change;
            squares += off * off;
        }
        return (change, Math.Sqrt(squares / Draws), moved.CarabinerSpacingM);
    }
}
