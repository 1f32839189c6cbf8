using TrimFit.Core.Statistics;

namespace TrimFit.Core.Comparing;

/// <summary>How much of a pull went with what was changed.</summary>
/// <param name="Part">What was declared as changed.</param>
/// <param name="Of">Which pull the share is of.</param>
/// <param name="BeforeRadPerSec">That pull with the first setting.</param>
/// <param name="ChangeRadPerSec">After less before.</param>
/// <param name="ChangeInterval95">95 % interval of the change.</param>
/// <param name="Share">Share of the pull that went away with the part, (before − after)/before, by Fieller; null when the pull before does not differ
/// from zero. Above 1: it pulls the other way now; below 0: it pulls harder.</param>
public sealed record ChangeAttribution(
    ChangedPart Part, AttributedPull Of, double BeforeRadPerSec, double ChangeRadPerSec, ConfidenceInterval ChangeInterval95, FiellerSet? Share);

/// <summary>Which part of the pull a change is measured against.</summary>
public enum AttributedPull
{
    /// <summary>The pull without thrust.</summary>
    Constant,
    /// <summary>The growth from no thrust to level flight.</summary>
    Power,
    /// <summary>The pull at the balance thrust.</summary>
    AtBalance,
}
