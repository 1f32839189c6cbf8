namespace TrimFit.Core.Comparing;

/// <summary>What a comparison found, in one word.</summary>
public enum ComparisonVerdictCode
{
    /// <summary>The pull left at idle, level flight and full power was shown to lie inside the tolerance.</summary>
    Fixed,
    /// <summary>The pull became smaller.</summary>
    Better,
    /// <summary>No change was shown.</summary>
    NoClearChange,
    /// <summary>The pull became larger.</summary>
    Worse,
}

/// <summary>What a comparison found.</summary>
/// <param name="Code">The word.</param>
/// <param name="ShownEqual">Whether the change was shown to lie inside the tolerance at idle, level flight and full power; what no clear change then means.</param>
/// <param name="WithheldFixed">The pull left lies inside the tolerance, but no steering was logged and no hands-off spans were declared, so it may have
/// been held.</param>
public sealed record ComparisonVerdict(ComparisonVerdictCode Code, bool ShownEqual, bool WithheldFixed);
