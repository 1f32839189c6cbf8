using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;

namespace TrimFit.Reporting.Wording;

/// <summary>The kinds of first sentence.</summary>
internal enum AnswerKind
{
    /// <summary>No turn rate can be stated.</summary>
    CannotTell,
    /// <summary>The slope contradicts the rig file.</summary>
    Contradiction,
    /// <summary>Balanced inside the tolerance.</summary>
    Balanced,
    /// <summary>A rate, a part and its travel.</summary>
    Travel,
    /// <summary>A rate whose side is certain, no travel.</summary>
    Direction,
    /// <summary>A rate whose side is not certain.</summary>
    SideUnknown,
}

/// <summary>What the first sentence says, before it is said in a language.</summary>
internal sealed record FitAnswer
{
    public required AnswerKind Kind { get; init; }
    public required BalanceThrust Power { get; init; }
    public required double ToleranceRadPerSec { get; init; }
    public double RateRadPerSec { get; init; }
    public ConfidenceInterval? Interval95 { get; init; }
    public AdjustmentReport? Adjustment { get; init; }
    public Finding? Reason { get; init; }
    public required VerdictStrength Strength { get; init; }

    /// <summary>The adjustment to name first: the first in the result's order that was neither refused nor lies beyond the rig's limits.</summary>
    public static AdjustmentReport? Best(TrimAnalysis analysis)
    {
        if (!analysis.Verdict.TravelGiven || analysis.Verdict.Strength == VerdictStrength.None)
            return null;
        foreach (AdjustmentReport a in analysis.Adjustments)
        {
            if (a.WithinLimits != false && !a.Notes.Any(n => n.Code is FindingCode.TwistRefused or FindingCode.BeyondLimit))
                return a;
        }
        return null;
    }

    public static FitAnswer Of(TrimAnalysis analysis)
    {
        PullAtSetting pull = analysis.Pull.AtBalance;
        Finding? conflict = analysis.Verdict.Reasons.FirstOrDefault(r => r.Code == FindingCode.RotationConflict);
        AdjustmentReport? best = Best(analysis);
        Finding? reason = analysis.Verdict.Reasons.FirstOrDefault();
        if (best is null && reason is null) // nothing offered although travel may be stated: the refusal is the reason
        {
            reason = analysis.Adjustments.SelectMany(a => a.Notes)
                .FirstOrDefault(n => n.Code is FindingCode.TwistRefused or FindingCode.BeyondLimit);
        }
        AnswerKind kind = (pull.RateRadPerSec, pull.Interval95, analysis.Verdict.Code) switch
        {
            (null, _, _) or (_, null, _) => AnswerKind.CannotTell,
            _ when conflict is not null => AnswerKind.Contradiction,
            (_, _, VerdictCode.Balanced) => AnswerKind.Balanced,
            (_, { ExcludesZero: false }, _) => AnswerKind.SideUnknown,
            _ when best is not null => AnswerKind.Travel,
            _ => AnswerKind.Direction,
        };
        return new()
        {
            Kind = kind,
            Power = analysis.Options.BalanceThrust,
            ToleranceRadPerSec = analysis.Options.Tolerance.RadPerSec,
            RateRadPerSec = pull.RateRadPerSec ?? 0,
            Interval95 = pull.Interval95,
            Adjustment = kind == AnswerKind.Travel ? best : null,
            Reason = conflict ?? reason,
            Strength = analysis.Verdict.Strength,
        };
    }
}
