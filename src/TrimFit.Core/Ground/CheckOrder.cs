using System.Collections.Immutable;

namespace TrimFit.Core.Ground;

/// <summary>One check with its reasons, strongest first.</summary>
/// <param name="Cause">What to look for.</param>
/// <param name="Reasons">Why it stands here; never empty.</param>
public sealed record OrderedCheck(SimpleCause Cause, ImmutableArray<CheckReason> Reasons);

/// <summary>Puts the checks of simple causes in the order a complaint suggests.</summary>
/// <remarks>Every cause starts with points for being quick to look at and frequent; each answer adds or takes points. The points are common practice with no
/// source: they order a list, they prove nothing, and no check is ever left out.</remarks>
public static class CheckOrder
{
    private static readonly SimpleCause[] _wing = [SimpleCause.BrakeLines, SimpleCause.Trimmers, SimpleCause.Risers];
    private static readonly SimpleCause[] _pilot = [SimpleCause.Harness, SimpleCause.LoadOnOneSide, SimpleCause.Seat];
    private static readonly SimpleCause[] _machine = [SimpleCause.SuspensionBarPivots, SimpleCause.EngineMounts, SimpleCause.Frame, SimpleCause.PropellerTrack];

    /// <summary>The checks in order; each once.</summary>
    public static ImmutableArray<OrderedCheck> Of(Complaint complaint)
    {
        ArgumentNullException.ThrowIfNull(complaint);
        SimpleCause[] all = Enum.GetValues<SimpleCause>();
        var points = all.ToDictionary(c => c, c => 1.0 - ((double)c / all.Length)); // the enum's order is the one without answers
        var reasons = all.ToDictionary(c => c, _ => new List<(double Points, CheckReason Reason)>());
        points[SimpleCause.AcceleratorLines] = 0; // only a pull with the accelerator brings it forward

        PullWhen when = complaint.When;
        bool engineOff = when.HasFlag(PullWhen.EngineOff);
        bool power = (when & (PullWhen.FullPower | PullWhen.Level)) != 0;
        if (engineOff)
            Add(CheckReason.EngineOff, 3, [.. _wing, .. _pilot]);
        else if (power)
            Add(CheckReason.WithPower, 3, _machine);
        if (when.HasFlag(PullWhen.Launch))
            Add(CheckReason.AtLaunch, 1, SimpleCause.BrakeLines, SimpleCause.Harness, SimpleCause.Seat);
        if (when.HasFlag(PullWhen.Accelerator))
        {
            Add(CheckReason.WithAccelerator, 6, SimpleCause.AcceleratorLines);
            Add(CheckReason.WithAccelerator, 3, SimpleCause.Risers, SimpleCause.Trimmers);
        }
        if (complaint.Since == PullSince.Suddenly)
            Add(CheckReason.Sudden, 8, SimpleCause.EngineMounts, SimpleCause.SuspensionBarPivots, SimpleCause.Risers, SimpleCause.Frame, SimpleCause.Trimmers);
        if (complaint.Side == PullSide.Changing)
            Add(CheckReason.ChangesSide, 4, SimpleCause.EngineMounts, SimpleCause.SuspensionBarPivots, SimpleCause.Harness, SimpleCause.Seat, SimpleCause.Trimmers);
        foreach (ChangedPart part in complaint.Changed)
            Add(CheckReason.Changed, 6, TouchedBy(part));
        switch (complaint.OtherWing)
        {
            case OtherWing.SamePull:
                Add(CheckReason.SameWithOtherWing, 4, [.. _pilot, .. _machine]);
                break;
            case OtherWing.NoPull or OtherWing.OtherWay:
                Add(CheckReason.GoneWithOtherWing, 5, _wing);
                break;
        }
        return
        [
            .. all.OrderByDescending(c => points[c]).ThenBy(c => c).Select(c => new OrderedCheck(c,
                reasons[c].Count == 0 ? [CheckReason.QuickAndFrequent] : [.. reasons[c].OrderByDescending(r => r.Points).Select(r => r.Reason).Distinct()])),
        ];

        void Add(CheckReason reason, double more, params ReadOnlySpan<SimpleCause> causes)
        {
            foreach (SimpleCause cause in causes)
            {
                points[cause] += more;
                reasons[cause].Add((more, reason));
            }
        }
    }

    private static SimpleCause[] TouchedBy(ChangedPart part) => part switch
    {
        ChangedPart.Geometry => [SimpleCause.SuspensionBarPivots, SimpleCause.EngineMounts, SimpleCause.Frame],
        ChangedPart.Wing => _wing,
        ChangedPart.BrakeLines => [SimpleCause.BrakeLines],
        ChangedPart.Trimmers => [SimpleCause.Trimmers],
        ChangedPart.Harness => [SimpleCause.Harness, SimpleCause.Seat],
        ChangedPart.Propeller => [SimpleCause.PropellerTrack, SimpleCause.EngineMounts],
        _ => [SimpleCause.LoadOnOneSide],
    };
}
