using System.Collections.Immutable;
using TrimFit.Core.Analysis;

namespace TrimFit.Core.Planning;

/// <summary>What a card promised, as its file says it.</summary>
public sealed record CardPromise
{
    /// <summary>Expected half-width of the pull's 95 % interval, rad/s.</summary>
    public required double PullHalfWidthRadPerSec { get; init; }

    /// <summary>Expected half-width of the shift's 95 % interval, m; null when none was expected.</summary>
    public double? ShiftHalfWidthM { get; init; }

    /// <summary>Half-width of the shift that was wanted, m; null when none was.</summary>
    public double? WantedShiftHalfWidthM { get; init; }

    /// <summary>Standard error of the pull that was wanted, rad/s; null when none was.</summary>
    public double? WantedPullStdErrorRadPerSec { get; init; }
}

/// <summary>Whether a flight reached what its card promised, and which leg would help most.</summary>
public sealed record CardOutcome
{
    /// <summary>A range this much wider than expected still counts as reached where nothing was asked for: single flights scatter.</summary>
    public const double Allowance = 1.25;

    /// <summary>What was promised.</summary>
    public required CardPromise Promise { get; init; }

    /// <summary>Half-width of the pull's interval that came out, rad/s; null when the flight could not tell the pull.</summary>
    public required double? PullHalfWidthRadPerSec { get; init; }

    /// <summary>Standard error of the pull, rad/s; null when it could not be told.</summary>
    public required double? PullStdErrorRadPerSec { get; init; }

    /// <summary>Half-width of the shift's interval that came out, m; null when no shift is stated.</summary>
    public required double? ShiftHalfWidthM { get; init; }

    /// <summary>Whether it was reached: the wanted precision, or without one the expected range of the pull within <see cref="Allowance"/>.</summary>
    public required bool Reached { get; init; }

    /// <summary>Legs that would follow, the most useful first.</summary>
    public required ImmutableArray<NextLeg> NextLegs { get; init; }

    /// <summary>Compares a flight with its card.</summary>
    public static CardOutcome Of(CardPromise promise, TrimAnalysis analysis)
    {
        ArgumentNullException.ThrowIfNull(promise);
        ArgumentNullException.ThrowIfNull(analysis);
        double? pull = analysis.Pull.AtBalance.Interval95?.HalfWidth, shift = analysis.Shift?.Interval95.HalfWidth;
        double? error = pull / Statistics.StudentT.TwoSidedFactor(0.95, analysis.Fit.DegreesOfFreedom);
        return new()
        {
            Promise = promise,
            PullHalfWidthRadPerSec = pull,
            PullStdErrorRadPerSec = error,
            ShiftHalfWidthM = shift,
            Reached = promise.WantedShiftHalfWidthM is double width ? shift <= width
                : promise.WantedPullStdErrorRadPerSec is double wanted ? error <= wanted
                : pull <= Allowance * promise.PullHalfWidthRadPerSec,
            NextLegs = NextLeg.Of(analysis),
        };
    }
}
