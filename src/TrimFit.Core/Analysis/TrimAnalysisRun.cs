using System.Collections.Immutable;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Core.Analysis;

public sealed partial record TrimAnalysis
{
    /// <summary>Analyses one flight with one rig.</summary>
    /// <remarks>Never throws on thin data: what the flight cannot give is null and the verdict says what is missing.</remarks>
    /// <param name="flight">The flight.</param>
    /// <param name="rig">The rig.</param>
    /// <param name="options">Balance thrust, tolerance, seed.</param>
    /// <param name="legs">Legs of the pilot's sheet with their places in the flight; none without a sheet.</param>
    public static TrimAnalysis Run(FlightLog flight, Rig rig, TrimOptions options, params ReadOnlySpan<FoundLeg> legs)
    {
        ArgumentNullException.ThrowIfNull(flight);
        ArgumentNullException.ThrowIfNull(rig);
        ArgumentNullException.ThrowIfNull(options);
        TurnSignals signals = TurnSignals.From(flight, rig, legs);
        return Run(signals, new FilterErrorEstimator().Estimate(signals), rig, options, new SteadyWindowEstimator().Estimate(signals));
    }

    /// <summary>The same from signals and a fit that are already there.</summary>
    internal static TrimAnalysis Run(TurnSignals signals, TurnFit fit, Rig rig, TrimOptions options, TurnFit? crossCheck = null)
    {
        var spread = new RigSpread(rig);
        var warnings = new List<Finding>(signals.Findings);
        foreach (Finding notice in fit.Notices)
        {
            if (!warnings.Any(w => w.Code == notice.Code))
                warnings.Add(notice);
        }
        PowerLevels levels = PowerLevels.Of(signals, fit, options.BalanceThrust);
        if (signals.HasThrust && levels.CruiseBasis == CruiseBasis.Assumed)
            warnings.Add(Finding.Of(FindingCode.CruiseAssumed, levels.Cruise));
        PullReport pull = PullOf(signals, fit, levels);
        TrimPosterior posterior = TrimPosterior.Draw(rig, spread, fit, signals, options);
        warnings.AddRange(posterior.Findings);
        warnings.AddRange(spread.Propulsion.Findings(rig));
        if (ClimbThrust.Check(signals, rig, spread.Propulsion) is Finding climb)
            warnings.Add(climb);

        VerdictRules.Outcome outcome = VerdictRules.Judge(signals, fit, rig, spread, options, levels, pull, posterior);
        ShiftReport? shift = outcome.ShiftAllowed ? ShiftSolver.Shift(posterior, levels, signals, fit) : null;
        ImmutableArray<AdjustmentReport> adjustments = [];
        VerdictStrength strength = VerdictStrength.None;
        if (shift is not null)
        {
            strength = VerdictRules.StrengthOf(posterior, shift);
            if (outcome.TravelAllowed && strength != VerdictStrength.None)
            {
                bool constantFirst = Math.Abs(shift.ConstantPartM) > VerdictRules.LargestConstantPartM;
                if (constantFirst)
                    warnings.Add(Finding.Of(FindingCode.ConstantPartFirst, shift.ConstantPartM));
                adjustments = ShiftSolver.Adjustments(rig, spread, posterior, levels, signals, fit, constantFirst, out ImmutableArray<Finding> notOffered);
                warnings.AddRange(notOffered);
                if (ShiftSolver.WhyTwist(adjustments) is Finding why)
                    warnings.Add(why);
                if (VerdictRules.IsFirm(strength, posterior, signals, fit, adjustments, rig))
                    strength = VerdictStrength.Firm;
            }
            (string Source, FiellerSet Set)[] ratios = [.. RatioCheck.Of(signals, fit, levels, options)];
            shift = shift with { Ratios = [.. ratios.Select(r => r.Set)] };
            warnings.AddRange(ratios.Where(r => r.Set.Kind != FiellerKind.Interval)
                .Select(r => Finding.Of(FindingCode.RatioUnbounded, SourceAlone.IndexOf(r.Source))));
        }
        TravelEffect? first = adjustments.FirstOrDefault(ShiftSolver.Recommendable) is AdjustmentReport best
            ? TravelEffect.Of(Adjustment.All.Single(a => a.Kind == best.Kind), rig, posterior, signals, fit) : null;
        if (CheapestCheck.Of(outcome, rig, posterior, levels, first) is Finding check)
            warnings.Add(check);
        if (pull.AtBalance.RateRadPerSec is double rate && Math.Abs(rate) > VerdictRules.StrongPullRadPerSec)
            warnings.Add(Finding.Of(FindingCode.StrongPull, rate));

        return new TrimAnalysis
        {
            Rig = rig,
            Options = options,
            Signals = signals,
            Gyro = GyroOf(signals, fit),
            Fit = fit,
            CrossCheck = crossCheck,
            Pull = pull,
            Sensitivity = posterior.Report with { Conflict = posterior.Report.Conflict || outcome.Reasons.Any(r => r.Code == FindingCode.RotationConflict) },
            Shift = strength == VerdictStrength.None ? null : shift,
            Adjustments = adjustments,
            RigReport = RigReporter.Of(rig, options.Seed),
            Verdict = new Verdict
            {
                Code = outcome.Code,
                Strength = outcome.Code == VerdictCode.Insufficient ? VerdictStrength.None : strength,
                TravelGiven = adjustments.Length > 0,
                Reasons = outcome.Reasons,
            },
            Assumptions = [.. rig.Assumptions(), .. spread.Propulsion.Assumptions(rig), .. LevelAssumptions(signals, levels)],
            Warnings = [.. warnings],
        };
    }

    private static IEnumerable<Assumption> LevelAssumptions(TurnSignals signals, PowerLevels levels)
    {
        if (signals.HasThrust && levels.CruiseBasis == CruiseBasis.Assumed)
            yield return new("cruise_thrust_percent", 100 * levels.Cruise, "%", 45, 75); // range: common practice, no source
    }

    private static GyroReport? GyroOf(TurnSignals signals, TurnFit fit) =>
        signals.Gyro is null ? null : signals.Gyro with { BiasRadPerSec = fit.GyroBiasRadPerSec ?? signals.Gyro.BiasRadPerSec };

    internal static PullReport PullOf(TurnSignals signals, TurnFit fit, PowerLevels levels)
    {
        Estimate? brake = fit[TurnCoefficient.BrakeDifference];
        PullAtSetting At(PowerSetting setting, double fraction, double fractionError)
        {
            Estimate? pull = signals.HasThrust ? fit.PullAt(fraction * signals.FullThrust) : null;
            Estimate? wide = pull is Estimate e ? Widen(fit, signals, e, fraction, fractionError) : null;
            double t = StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom);
            return new PullAtSetting
            {
                Setting = setting,
                ThrustFraction = fraction,
                ThrustN = signals.ThrustBasis == ThrustBasis.Newton ? fraction * signals.FullThrust : null,
                RateRadPerSec = wide?.Value,
                Interval95 = wide is Estimate w ? new ConfidenceInterval(w.Value - (t * w.StandardError), w.Value + (t * w.StandardError), 0.95) : null,
                HeldBrake = wide is Estimate r && brake is Estimate b && b.Value > 2 * b.StandardError ? -r.Value / b.Value : null,
            };
        }
        PullAtSetting balance = At(levels.BalanceSetting, levels.Balance, levels.BalanceStdError);
        double? half = balance.Interval95?.HalfWidth;
        double factor95 = StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom), factor90 = StudentT.TwoSidedFactor(0.90, fit.DegreesOfFreedom);
        double? error = half / factor95;
        return new PullReport
        {
            At =
            [
                At(PowerSetting.Off, 0, 0), At(PowerSetting.Idle, levels.Idle, 0),
                At(PowerSetting.Cruise, levels.Cruise, levels.CruiseStdError), At(PowerSetting.Full, 1, 0),
            ],
            AtBalance = balance,
            Balance90 = balance.RateRadPerSec is double r && error is double se
                ? new ConfidenceInterval(r - (factor90 * se), r + (factor90 * se), 0.90) : null,
            // 5 % two-sided, found in 80 % of cases: (t_0.975 + t_0.8) standard errors.
            SmallestDetectableRadPerSec = error * (factor95 + StudentT.Quantile(0.8, fit.DegreesOfFreedom)),
            CruiseBasis = levels.CruiseBasis,
        };
    }

    /// <summary>Adds what the pull owes to not knowing the level-flight thrust exactly.</summary>
    private static Estimate Widen(TurnFit fit, TurnSignals signals, Estimate pull, double fraction, double fractionError)
    {
        double slope = fit[TurnCoefficient.Thrust]?.Value ?? 0, curvature = fit[TurnCoefficient.ThrustSquared]?.Value ?? 0;
        double growth = (slope + (2 * curvature * fraction * signals.FullThrust)) * signals.FullThrust;
        double extra = growth * fractionError;
        return pull with { StandardError = Math.Sqrt((pull.StandardError * pull.StandardError) + (extra * extra)) };
    }
}
