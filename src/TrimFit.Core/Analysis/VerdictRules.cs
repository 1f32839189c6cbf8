using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>Verdict, strength and guards as interfaces are fixed: the first rule that holds decides.</summary>
internal static class VerdictRules
{
    /// <summary>A constant pull that answers to more than this is looked for in trimmers, lines and brakes first, m (model page section 2).</summary>
    public const double LargestConstantPartM = SafetyFigures.ConstantPartFirstM;

    /// <summary>A pull beyond this is not for another test flight, rad/s (cautions page).</summary>
    public static readonly double StrongPullRadPerSec = SafetyFigures.StrongPull.RadPerSec;

    private const double DirectionShare = 0.975, PredictionShare = 0.95, FairHalfWidth = 0.5, DeclaredOffsetShare = 0.5;

    public sealed record Outcome(VerdictCode Code, ImmutableArray<Finding> Reasons, bool ShiftAllowed, bool TravelAllowed);

    public static Outcome Judge(
        TurnSignals signals, TurnFit fit, Rig rig, RigSpread spread, TrimOptions options, PowerLevels levels, PullReport pull, TrimPosterior posterior)
    {
        double tolerance = options.Tolerance.RadPerSec;
        var reasons = ImmutableArray.CreateBuilder<Finding>();
        bool steered = signals.HasBrakes || signals.HandsOffDeclared;
        if (!steered)
            reasons.Add(Finding.Of(FindingCode.NoSteeringNoHandsOff));

        foreach (Finding notice in fit.Notices)
        {
            if (notice.Code is FindingCode.NoThrust or FindingCode.NoTurnRate or FindingCode.TooLittleSteadyFlight or FindingCode.ThrustRangeTooSmall
                or FindingCode.GyroBiasUnknown)
                reasons.Add(notice);
        }
        if (!signals.HasThrust && !reasons.Any(r => r.Code == FindingCode.NoThrust))
            reasons.Add(Finding.Of(FindingCode.NoThrust));
        Estimate? brake = fit[TurnCoefficient.BrakeDifference];
        double t = StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom);
        bool reversed = brake is Estimate b && b.Value + (t * b.StandardError) < 0;
        if (reversed)
            reasons.Add(Finding.Of(FindingCode.BrakeSignReversed, brake!.Value.Value));

        Estimate? slope = fit[TurnCoefficient.Thrust];
        if (slope is null || pull.AtBalance.Interval95 is not ConfidenceInterval p95 || pull.AtBalance.RateRadPerSec is not double p)
            return Insufficient(reasons);
        if (reversed)
            return Insufficient(reasons);
        if (RotationConflict(rig, slope.Value, t, posterior) is Finding conflict)
        {
            reasons.Insert(0, conflict);
            return Insufficient(reasons);
        }
        if (!levels.BalanceFlown)
        {
            reasons.Add(Finding.Of(FindingCode.BalanceThrustNotFlown, levels.Balance, levels.FlownLow, levels.FlownHigh));
            return Insufficient(reasons);
        }
        if (p95.HalfWidth > 2 * tolerance)
        {
            reasons.Add(Finding.Of(FindingCode.PullTooUncertain, p95.HalfWidth, 2 * tolerance));
            return Insufficient(reasons);
        }
        if (steered && pull.Balance90 is ConfidenceInterval p90 && p90.Lower >= -tolerance && p90.Upper <= tolerance)
            return new(VerdictCode.Balanced, reasons.ToImmutable(), ShiftAllowed: true, TravelAllowed: false);
        if (posterior.Report.Conflict)
        {
            reasons.AddRange(posterior.Findings.Where(f => f.Code is FindingCode.SensitivityConflict or FindingCode.SourcesConflict));
            return Insufficient(reasons);
        }

        Estimate constant = fit[TurnCoefficient.Constant]!.Value;
        double growth = p - constant.Value;
        bool constantDiffers = Math.Abs(constant.Value) > t * constant.StandardError;
        bool growthDiffers = Math.Abs(growth) > t * GrowthError(fit, levels.Balance * signals.FullThrust);
        bool pullDiffers = p95.ExcludesZero;
        bool travel = steered;
        if (pullDiffers && growthDiffers && Math.Sign(p) != Math.Sign(growth))
        {
            if (steered && DeclaresOffsetAgainstTorque(spread, constant.Value, posterior))
                return new(VerdictCode.OverCompensated, reasons.ToImmutable(), travel, travel);
            reasons.Add(Finding.Of(FindingCode.ConstantPullSource));
            return new(VerdictCode.ConstantPull, reasons.ToImmutable(), travel, travel);
        }
        if (constantDiffers && growthDiffers && Math.Sign(constant.Value) == Math.Sign(growth) && pullDiffers)
            return new(VerdictCode.Both, reasons.ToImmutable(), travel, travel);
        if (pullDiffers && growthDiffers)
            return new(VerdictCode.PowerPull, reasons.ToImmutable(), travel, travel);
        if (pullDiffers)
        {
            reasons.Add(Finding.Of(FindingCode.ConstantPullSource));
            return new(VerdictCode.ConstantPull, reasons.ToImmutable(), travel, travel);
        }
        // Neither a pull nor its absence: half the tolerance either way would decide.
        if (steered)
            reasons.Add(Finding.Of(FindingCode.PullTooUncertain, p95.HalfWidth, tolerance / 2));
        return Insufficient(reasons);
    }

    /// <summary>Firm: a known shift was flown, brakes were logged and stepped, the yaw sign is confirmed, and the recommended travel's interval
    /// lies within one step of what is set.</summary>
    public static bool IsFirm(VerdictStrength soFar, TrimPosterior posterior, TurnSignals signals, TurnFit fit, ImmutableArray<AdjustmentReport> adjustments, Rig rig)
    {
        if (soFar != VerdictStrength.Fair || !posterior.DirectUsed || !signals.HasBrakes || !signals.YawSignConfirmed
            || fit[TurnCoefficient.BrakeDifference] is not Estimate brake
            || !(brake.Value > StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom) * brake.StandardError)
            || adjustments.FirstOrDefault(ShiftSolver.Recommendable) is not AdjustmentReport best)
            return false;
        double step = rig.Limits.GetValueOrDefault(best.Kind)?.Step ?? Adjustment.All.Single(a => a.Kind == best.Kind).DefaultStep;
        return best.Interval95.Upper - best.Rounded <= step && best.Rounded - best.Interval95.Lower <= step;
    }

    /// <summary>Strength of a shift from one flight: fair needs torque, a ballast leg or a pair, and an interval within half the median either way, weak a certain direction.</summary>
    public static VerdictStrength StrengthOf(TrimPosterior posterior, ShiftReport shift)
    {
        double median = shift.CgShiftM;
        ConfidenceInterval interval = shift.Interval95;
        if (!interval.ExcludesZero || posterior.Report.RadPerSecPerM is null) // without enough draws there is no interval to speak of
            return VerdictStrength.None;
        bool within = Math.Max(interval.Upper - median, median - interval.Lower) <= FairHalfWidth * Math.Abs(median);
        return (posterior.TorqueUsed || posterior.DirectUsed) && within ? VerdictStrength.Fair : VerdictStrength.Weak;
    }

    private static Outcome Insufficient(ImmutableArray<Finding>.Builder reasons) => new(VerdictCode.Insufficient, reasons.ToImmutable(), false, false);

    /// <summary>A slope certain of its sign against a rig certain of the other: rotation, gyro or steering signs or the thrust line are entered wrong.</summary>
    private static Finding? RotationConflict(Rig rig, Estimate slope, double t, TrimPosterior posterior)
    {
        if (rig.Propeller.RotationSign == 0 || !(Math.Abs(slope.Value) > t * slope.StandardError))
            return null;
        double against = slope.Value > 0 ? 1 - posterior.PredictsRightShare : posterior.PredictsRightShare;
        return against >= PredictionShare ? Finding.Of(FindingCode.RotationConflict, Math.Sign(slope.Value), against) : null;
    }

    /// <summary>Standard error of the pull at a thrust less the pull without thrust.</summary>
    private static double GrowthError(TurnFit fit, double thrust)
    {
        int n = fit.Coefficients.Length;
        double c11 = fit.Covariance[n + 1], c12 = fit.Covariance[n + 2], c22 = fit.Covariance[(2 * n) + 2];
        return Math.Sqrt(Math.Max(0, (thrust * thrust * c11) + (2 * thrust * thrust * thrust * c12) + (thrust * thrust * thrust * thrust * c22)));
    }

    /// <summary>Whether the rig has a CG offset against the torque at least half as large as C/S.</summary>
    private static bool DeclaresOffsetAgainstTorque(RigSpread spread, double constant, TrimPosterior posterior)
    {
        RigValues rig = spread.Nominal;
        if (rig.RotationSign == 0 || posterior.Report.RadPerSecPerM is not double sensitivity)
            return false;
        double against = rig.CgOffsetM * rig.RotationSign; // e = rot Q/W balances the torque
        return against >= DeclaredOffsetShare * Math.Abs(constant) / sensitivity && Math.Sign(constant) == rig.RotationSign;
    }
}
