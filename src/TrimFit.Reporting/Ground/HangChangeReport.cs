using System.Collections.Immutable;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;

namespace TrimFit.Reporting;

/// <summary>Everything the report of a change proved by the hang check shows.</summary>
public sealed record HangChangeReport
{
    /// <summary>What was moved.</summary>
    public required Adjustment Adjustment { get; init; }

    /// <summary>How far, SI, right positive.</summary>
    public required double Travel { get; init; }

    /// <summary>The verdict.</summary>
    public required HangChangeResult Change { get; init; }

    /// <summary>Readings that were to be expected after the change, from the hang check before it.</summary>
    public required HangReading Expected { get; init; }

    /// <summary>Half of their 95 % range, kg.</summary>
    public required double ExpectedPlusMinusKg { get; init; }

    /// <summary>What the readings after the change contradict.</summary>
    public ImmutableArray<GroundFault> Faults { get; init; } = [];

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}
