using System.Collections.Immutable;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>From the posterior to millimetres: the equivalent CG shift, and the travel of each part solved from the whole statics in every draw.</summary>
internal static class ShiftSolver
{
    /// <summary>First step of a change that nothing has confirmed yet, m (cautions page).</summary>
    private const double LargestFirstStepM = SafetyFigures.FirstStepMaxM;

    /// <summary>A step after which the chance of the wrong side passes this is not advised (model page section 3).</summary>
    private const double LargestWrongSide = 0.10;

    /// <summary>Screens of the upper end of |N|/k_chi at full thrust (model page section 1).</summary>
    private const double TwistCaution = SafetyFigures.TwistCautionRatio, TwistWarning = SafetyFigures.TwistWarningRatio, TwistRefused = SafetyFigures.TwistRefusedRatio;

    /// <summary>Share of draws in which a millimetre may work the other way before the adjustment is not offered (model page section 1).</summary>
    private const double LargestSignShare = 0.025;

    /// <summary>Share of draws in which the frame must twist one way before the direction is named (model page section 1).</summary>
    private const double DirectionShare = 0.975;

    /// <summary>Turns left that differ by less than this rank alike; then the riser twist decides, rad/s.</summary>
    private static readonly double RankingStepRadPerSec = double.DegreesToRadians(0.1);

    /// <summary>Twist ratios that differ by less than this rank alike; then the order of <see cref="AdjustmentKind"/> decides.</summary>
    private const double RankingTwistStep = 0.1;

    /// <summary>One way twists the risers this many times as much as another before the reason is given.</summary>
    private const double NotableTwistRatio = 2;

    private static readonly PowerSetting[] _settings = [PowerSetting.Off, PowerSetting.Idle, PowerSetting.Cruise, PowerSetting.Full];

    public static ShiftReport Shift(TrimPosterior posterior, PowerLevels levels, TurnSignals signals, TurnFit fit)
    {
        int count = posterior.Count;
        var shift = new double[count];
        var constantPart = new double[count];
        var powerPart = new double[count];
        for (int k = 0; k < count; k++)
        {
            shift[k] = -posterior.RateAt(k, posterior.BalanceOf(k, levels)) / posterior.Sensitivity[k];
            constantPart[k] = -posterior.Constant[k] / posterior.Sensitivity[k];
            powerPart[k] = shift[k] - constantPart[k];
        }
        (double median, ConfidenceInterval interval) = TrimPosterior.MedianAndInterval95(shift, posterior.Weight);
        return new ShiftReport
        {
            BalanceThrustN = signals.ThrustBasis == ThrustBasis.Newton ? levels.Balance * signals.FullThrust : null,
            BalanceThrustFraction = levels.Balance,
            CgShiftM = median,
            Interval95 = interval,
            ConstantPartM = WeightedQuantile.Of(constantPart, posterior.Weight, 0.5),
            PowerPartM = WeightedQuantile.Of(powerPart, posterior.Weight, 0.5),
            TurnLeftAt = TurnLeft(posterior, levels, signals, (k, _) => posterior.Sensitivity[k] * median),
        };
    }

    public static ImmutableArray<AdjustmentReport> Adjustments(
        Rig rig, RigSpread spread, TrimPosterior posterior, PowerLevels levels, TurnSignals signals, TurnFit fit, bool constantFirst,
        out ImmutableArray<Finding> notOffered, ImmutableArray<AdjustmentKind> only = default)
    {
        var unknown = ImmutableArray.CreateBuilder<Finding>();
        var reports = new List<AdjustmentReport>();
        foreach (Adjustment adjustment in Adjustment.All.Where(a => a.AppliesTo(rig) && (only.IsDefault || only.Contains(a.Kind))))
        {
            // No harness hang-point travel for a large constant pull before trimmers, lines and brakes are checked (model page section 2).
            if (constantFirst && adjustment.Kind is (AdjustmentKind.HarnessFront or AdjustmentKind.HarnessFrontRear))
                continue;
            if (TravelEffect.Of(adjustment, rig, posterior, signals, fit) is not TravelEffect effect)
                continue;
            if (Solve(adjustment, effect, rig, spread, posterior, levels, signals) is AdjustmentReport report)
                reports.Add(report);
            else
                unknown.Add(Finding.Of(FindingCode.EffectSignUnknown, (int)adjustment.Kind));
        }
        notOffered = unknown.ToImmutable();
        return
        [
            .. reports.OrderBy(r => r.WithinLimits == false)
                .ThenBy(r => r.TwistRatioHigh95 >= TwistRefused)
                .ThenBy(r => r.TwistRatioHigh95 >= TwistWarning)
                .ThenBy(r => Math.Round(Math.Abs(r.TurnLeftAt[2].RateRadPerSec ?? 0) / RankingStepRadPerSec)) // what rounding to real steps leaves
                .ThenBy(r => Math.Round((r.TwistRatioHigh95 ?? 0) / RankingTwistStep))
                .ThenBy(r => r.Kind),
        ];
    }

    /// <summary>Whether an adjustment may be named as the thing to do: not refused for riser twist, not beyond the rig's limits.</summary>
    public static bool Recommendable(AdjustmentReport report) =>
        report.WithinLimits != false && !report.Notes.Any(n => n.Code is FindingCode.TwistRefused or FindingCode.BeyondLimit);

    /// <summary>Why riser carabiners and harness hang points differ in riser twist, when they do by much and it matters; null otherwise.</summary>
    public static Finding? WhyTwist(ImmutableArray<AdjustmentReport> adjustments)
    {
        AdjustmentReport? carabiners = adjustments.FirstOrDefault(a => a.Kind == AdjustmentKind.CarabinerPair);
        AdjustmentReport? harness = adjustments.FirstOrDefault(a => a.Kind == AdjustmentKind.HarnessFrontRear);
        if (carabiners?.TwistRatio is not double c || harness?.TwistRatio is not double h)
            return null;
        (double low, double high, double worst) = c > h ? (h, c, carabiners.TwistRatioHigh95 ?? 0) : (c, h, harness.TwistRatioHigh95 ?? 0);
        if (!(high >= NotableTwistRatio * low) || worst < TwistCaution / 2) // a ratio that is small either way needs no explaining
            return null;
        return Finding.Of(c > h ? FindingCode.TwistByCarabiners : FindingCode.TwistByHarness, c, h);
    }

    private static AdjustmentReport? Solve(
        Adjustment adjustment, TravelEffect effect, Rig rig, RigSpread spread, TrimPosterior posterior, PowerLevels levels, TurnSignals signals)
    {
        int count = posterior.Count;
        var travel = new double[count];
        double positive = 0, total = 0;
        for (int k = 0; k < count; k++)
        {
            if (!(posterior.Weight[k] > 0))
                continue;
            double balance = posterior.BalanceOf(k, levels);
            (travel[k], double gain) = effect.Null(k, balance, posterior.RateAt(k, balance));
            total += posterior.Weight[k];
            positive += gain > 0 ? posterior.Weight[k] : 0;
        }
        if (Math.Min(positive, total - positive) > LargestSignShare * total)
            return null; // which way a travel works is not known well enough

        (double median, ConfidenceInterval interval) = TrimPosterior.MedianAndInterval95(travel, posterior.Weight);
        AdjustmentLimit? limit = rig.Limits.GetValueOrDefault(adjustment.Kind);
        double step = limit?.Step ?? adjustment.DefaultStep;
        double rounded = Math.Round(median / step) * step;
        double sign = Math.Sign(median);
        // The step after which the chance of having gone past the null is 10 %.
        double safe = WeightedQuantile.Of([.. travel.Select(d => d * sign)], posterior.Weight, LargestWrongSide);
        double first = Math.Min(SafetyFigures.FirstStepShare * Math.Abs(median), Math.Max(0, safe));
        if (adjustment.Unit == TravelUnit.Meter)
            first = Math.Min(first, LargestFirstStepM);
        first = sign * Math.Floor((first / step) + 1e-9) * step;

        RigValues nominal = spread.Nominal, moved = effect.Moved(nominal, rounded), firstMoved = effect.Moved(nominal, first);
        double wrongSide = 0;
        for (int k = 0; k < count; k++)
        {
            if (posterior.Weight[k] > 0 && travel[k] * sign < first * sign)
                wrongSide += posterior.Weight[k];
        }
        StateAfterTravel after = After(effect, nominal, posterior, levels, signals, rounded, out double high);
        bool? within = limit is null || (limit.Min is null && limit.Max is null) ? null
            : !(rounded < limit.Min - 1e-9) && !(rounded > limit.Max + 1e-9);
        var notes = ImmutableArray.CreateBuilder<Finding>();
        if (high >= TwistCaution)
            notes.Add(Finding.Of(high >= TwistRefused ? FindingCode.TwistRefused : high >= TwistWarning ? FindingCode.TwistWarning : FindingCode.TwistCaution, high));
        if (first == 0)
            notes.Add(Finding.Of(FindingCode.FirstStepTooSmall, step));
        if (within is null)
            notes.Add(Finding.Of(FindingCode.LimitNotGiven));
        else if (within == false)
            notes.Add(Finding.Of(FindingCode.BeyondLimit, rounded < 0 ? limit!.Min ?? 0 : limit!.Max ?? 0));
        if (Math.Abs(moved.CarabinerSpacingM - nominal.CarabinerSpacingM) > 1e-9)
            notes.Add(Finding.Of(FindingCode.SpacingChanges, moved.CarabinerSpacingM));
        return new AdjustmentReport
        {
            Kind = adjustment.Kind,
            Unit = adjustment.Unit,
            Travel = median,
            Interval95 = interval,
            Rounded = rounded,
            FirstStep = first,
            Efficiency = adjustment.CgOffsetPerTravel(nominal),
            ThrustLineOffsetM = moved.ThrustLineOffsetM,
            TwistRatio = after.TwistRatio,
            TwistRatioHigh95 = after.TwistRatioHigh95,
            TwistDirection = after.TwistDirection,
            RiserLoadLeftN = after.RiserLoadLeftN,
            RiserLoadRightN = after.RiserLoadRightN,
            HangCheckLeftKg = firstMoved.SuspendedKg * (0.5 - (firstMoved.CgOffsetM / firstMoved.CarabinerSpacingM)),
            HangCheckRightKg = firstMoved.SuspendedKg * (0.5 + (firstMoved.CgOffsetM / firstMoved.CarabinerSpacingM)),
            HangCheckPlusMinusKg = 1.96 * (RigHang.Of(rig)?.NextFlightSdM ?? LateralGeometry.Of(rig).StandardDeviation) * firstMoved.SuspendedKg / firstMoved.CarabinerSpacingM,
            HangCheckDifferenceKg = 2 * ((firstMoved.SuspendedKg * firstMoved.CgOffsetM / firstMoved.CarabinerSpacingM) - (nominal.SuspendedKg * nominal.CgOffsetM / nominal.CarabinerSpacingM)),
            TurnLeftAt = after.TurnLeftAt,
            WithinLimits = within,
            ProbabilityWrongSide = total > 0 ? wrongSide / total : 1,
            Notes = notes.ToImmutable(),
        };
    }

    /// <summary>What a travel leaves: turn at each power, riser twist at full thrust, riser loads and hang check.</summary>
    public static StateAfterTravel After(TravelEffect effect, in RigValues nominal, TrimPosterior posterior, PowerLevels levels, TurnSignals signals, double travel) =>
        After(effect, nominal, posterior, levels, signals, travel, out _);

    /// <summary>The same, with the upper 95 % of |N|/k_chi, which screens want also where thrust is relative.</summary>
    private static StateAfterTravel After(
        TravelEffect effect, in RigValues nominal, TrimPosterior posterior, PowerLevels levels, TurnSignals signals, double travel, out double twistHigh95)
    {
        int count = posterior.Count;
        var ratio = new double[count];
        double left = 0, right = 0;
        for (int k = 0; k < count; k++)
        {
            if (!(posterior.Weight[k] > 0))
                continue;
            double sine = effect.TwistSineAtFull(k, travel);
            ratio[k] = Math.Abs(sine);
            if (sine < 0)
                left += posterior.Weight[k];
            else
                right += posterior.Weight[k];
        }
        Span<double> ratios = stackalloc double[2];
        WeightedQuantile.Of(ratio, posterior.Weight, [0.5, 0.975], ratios);
        twistHigh95 = ratios[1];
        RigValues moved = effect.Moved(nominal, travel);
        StaticState full = RigStatics.Solve(moved, nominal.FullThrustN);
        bool newtons = signals.ThrustBasis == ThrustBasis.Newton;
        return new StateAfterTravel
        {
            TurnLeftAt = TurnLeft(posterior, levels, signals, (k, fraction) => effect.TurnChange(k, fraction, travel)),
            TwistRatio = newtons ? ratios[0] : null,
            TwistRatioHigh95 = newtons ? ratios[1] : null,
            TwistDirection = left > DirectionShare * (left + right) ? TwistDirection.Left
                : right > DirectionShare * (left + right) ? TwistDirection.Right : TwistDirection.Unknown,
            RiserLoadLeftN = newtons ? full.RiserLoadLeftN : null,
            RiserLoadRightN = newtons ? full.RiserLoadRightN : null,
            HangCheckLeftKg = moved.SuspendedKg * (0.5 - (moved.CgOffsetM / moved.CarabinerSpacingM)),
            HangCheckRightKg = moved.SuspendedKg * (0.5 + (moved.CgOffsetM / moved.CarabinerSpacingM)),
        };
    }

    /// <summary>Turn left at each power when <paramref name="change"/> (draw, fraction of full) is added.</summary>
    private static ImmutableArray<PullAtSetting> TurnLeft(TrimPosterior posterior, PowerLevels levels, TurnSignals signals, Func<int, double, double> change)
    {
        int count = posterior.Count;
        var left = new double[count];
        var result = ImmutableArray.CreateBuilder<PullAtSetting>();
        foreach (PowerSetting setting in _settings)
        {
            double fraction = setting switch
            {
                PowerSetting.Off => 0,
                PowerSetting.Idle => levels.Idle,
                PowerSetting.Cruise => levels.Cruise,
                _ => 1,
            };
            for (int k = 0; k < count; k++)
                left[k] = posterior.Weight[k] > 0 ? posterior.RateAt(k, fraction) + change(k, fraction) : 0;
            (double rate, ConfidenceInterval interval) = TrimPosterior.MedianAndInterval95(left, posterior.Weight);
            result.Add(new PullAtSetting
            {
                Setting = setting,
                ThrustFraction = fraction,
                ThrustN = signals.ThrustBasis == ThrustBasis.Newton ? fraction * signals.FullThrust : null,
                RateRadPerSec = rate,
                Interval95 = interval,
            });
        }
        return result.ToImmutable();
    }
}
