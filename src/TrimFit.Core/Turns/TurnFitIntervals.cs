using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>Intervals of a turn fit's estimates, all with the fit's own degrees of freedom.</summary>
public static class TurnFitIntervals
{
    /// <summary>95 % interval of an estimate of this fit: value ± t · standard error, Student's t with the fit's degrees of freedom.</summary>
    /// <returns>The interval in the estimate's unit; null when the degrees of freedom or the error leave none (not above 0, not finite).</returns>
    public static ConfidenceInterval? Interval95(this TurnFit fit, Estimate estimate)
    {
        ArgumentNullException.ThrowIfNull(fit);
        if (!(fit.DegreesOfFreedom > 0))
            return null;
        double half = StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom) * estimate.StandardError;
        return double.IsFinite(half) && double.IsFinite(estimate.Value) ? new(estimate.Value - half, estimate.Value + half, 0.95) : null;
    }

    /// <summary>Whether two fits of one flight say the same pull at a thrust: their 95 % intervals overlap.</summary>
    /// <remarks>A coarse check by intent: both use the same flight, so a difference beyond both intervals means that one of them is wrong.</remarks>
    /// <param name="fit">The main fit.</param>
    /// <param name="other">The fit beside it.</param>
    /// <param name="thrust">N, or fraction of full, as both fits' <see cref="TurnFit.ThrustBasis"/> says.</param>
    /// <returns>Null when one of them cannot say.</returns>
    public static bool? AgreesWith(this TurnFit fit, TurnFit? other, double thrust)
    {
        ArgumentNullException.ThrowIfNull(fit);
        if (other is null || other.ThrustBasis != fit.ThrustBasis)
            return null;
        ConfidenceInterval? a = fit.PullAt(thrust) is Estimate e ? fit.Interval95(e) : null;
        ConfidenceInterval? b = other.PullAt(thrust) is Estimate f ? other.Interval95(f) : null;
        return a is ConfidenceInterval p && b is ConfidenceInterval q ? p.Lower <= q.Upper && q.Lower <= p.Upper : null;
    }
}
