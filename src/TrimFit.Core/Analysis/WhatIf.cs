using System.Collections.Immutable;
using TrimFit.Core.Rigging;

namespace TrimFit.Core.Analysis;

/// <summary>What any travel of an adjustment would leave, by the draws of a result that is already there: "what if I move this".</summary>
/// <remarks>The draws are those of <see cref="TrimAnalysis.Run(Logs.FlightLog, Rig, TrimOptions, ReadOnlySpan{Logs.FoundLeg})"/> made again with its seed, so the rows at
/// <see cref="AdjustmentReport.Rounded"/> and <see cref="AdjustmentReport.FirstStep"/> hold the numbers of the result itself. Only adjustments of the
/// result can be asked for: where a guard withheld the travel, there is no "what if" either.</remarks>
public sealed class WhatIf
{
    private readonly TrimAnalysis _analysis;
    private readonly Lazy<TrimPosterior> _posterior;
    private readonly Lazy<(RigValues Nominal, PowerLevels Levels)> _rig;

    /// <summary>For a result. The draws are made at the first question.</summary>
    /// <param name="analysis">The result.</param>
    public WhatIf(TrimAnalysis analysis)
    {
        ArgumentNullException.ThrowIfNull(analysis);
        _analysis = analysis;
        _posterior = new(() => TrimPosterior.Draw(analysis.Rig, new RigSpread(analysis.Rig), analysis.Fit, analysis.Signals, analysis.Options));
        _rig = new(() => (new RigSpread(analysis.Rig).Nominal, PowerLevels.Of(analysis.Signals, analysis.Fit, analysis.Options.BalanceThrust)));
    }

    /// <summary>Travels worth asking for: steps of the part from beyond one end of the interval over zero to beyond the other, within the limits, with first step and rounded travel among them.</summary>
    /// <param name="kind">An adjustment of the result.</param>
    /// <param name="most">At most about this many, above 2.</param>
    /// <exception cref="ArgumentException">The result has no such adjustment.</exception>
    public ImmutableArray<double> Travels(AdjustmentKind kind, int most = 61)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(most, 3);
        AdjustmentReport report = Report(kind);
        AdjustmentLimit? limit = _analysis.Rig.Limits.GetValueOrDefault(kind);
        double step = limit?.Step ?? Adjustment.All.Single(a => a.Kind == kind).DefaultStep;
        double most95 = Math.Max(Math.Abs(report.Interval95.Lower), Math.Abs(report.Interval95.Upper));
        // Beyond three times the travel nobody asks, and an interval may be as good as open.
        double reach = Math.Max(Math.Min(1.25 * most95, 3 * Math.Abs(report.Rounded)), 10 * step);
        long stride = Math.Max(1, (long)Math.Ceiling(2 * reach / step / (most - 1)));
        long count = (long)Math.Ceiling(reach / step / stride);
        var travels = new SortedSet<double> { report.FirstStep, report.Rounded };
        for (long i = -count; i <= count; i++)
        {
            double travel = i * stride * step;
            bool seen = travels.Any(t => Math.Abs(t - travel) < 1e-9);
            if (!seen && !(travel < limit?.Min - 1e-9) && !(travel > limit?.Max + 1e-9))
                travels.Add(travel);
        }
        return [.. travels];
    }

    /// <summary>What a travel would leave.</summary>
    /// <param name="kind">An adjustment of the result.</param>
    /// <param name="travel">Travel in its unit, right positive; finite.</param>
    /// <exception cref="ArgumentException">The result has no such adjustment, or the travel is not finite.</exception>
    public WhatIfRow After(AdjustmentKind kind, double travel)
    {
        Guard.Finite(travel);
        AdjustmentReport report = Report(kind);
        TrimPosterior posterior = _posterior.Value;
        (RigValues nominal, PowerLevels levels) = _rig.Value;
        TravelEffect effect = TravelEffect.Of(Adjustment.All.Single(a => a.Kind == kind), _analysis.Rig, posterior, _analysis.Signals, _analysis.Fit)
            ?? throw new ArgumentException("the flight cannot say what it does", nameof(kind));
        return new WhatIfRow(travel, ShiftSolver.After(effect, in nominal, posterior, levels, _analysis.Signals, travel))
        {
            WithinLimits = report.WithinLimits is null ? null : Within(kind, travel),
        };
    }

    private bool Within(AdjustmentKind kind, double travel)
    {
        AdjustmentLimit? limit = _analysis.Rig.Limits.GetValueOrDefault(kind);
        return !(travel < limit?.Min - 1e-9) && !(travel > limit?.Max + 1e-9);
    }

    private AdjustmentReport Report(AdjustmentKind kind) => _analysis.Adjustments.FirstOrDefault(a => a.Kind == kind)
        ?? throw new ArgumentException($"{kind} is no adjustment of this result", nameof(kind));
}
