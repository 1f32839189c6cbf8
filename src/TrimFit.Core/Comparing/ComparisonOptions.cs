using TrimFit.Core.Analysis;

namespace TrimFit.Core.Comparing;

/// <summary>Choices of one comparison.</summary>
public sealed record ComparisonOptions
{
    /// <summary>Balance thrust, tolerance, seed.</summary>
    public TrimOptions Trim { get; init; } = new();

    /// <summary>What the person says was changed; null when nothing was said: then the rig files tell.</summary>
    public ChangedPart? Changed { get; init; }

    /// <summary>Scatter of the pull from flight to flight.</summary>
    public FlightScatter Scatter { get; init; } = FlightScatter.Usual;

    /// <summary>Whether the next shift is worked out; a study of verdicts leaves it away.</summary>
    internal bool WithNext { get; init; } = true;
}
