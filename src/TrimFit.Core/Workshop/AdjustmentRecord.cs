using System.Collections.Immutable;
using TrimFit.Core.Rigging;

namespace TrimFit.Core.Workshop;

/// <summary>A part that was moved, by the readings before and after.</summary>
public sealed record AdjustmentRecord
{
    /// <summary>Number in its job, from 1.</summary>
    public required int Number { get; init; }

    /// <summary>When it was written down, UTC.</summary>
    public required DateTimeOffset Made { get; init; }

    /// <summary>Number of the setup before.</summary>
    public required int FromSetup { get; init; }

    /// <summary>Number of the setup after.</summary>
    public required int ToSetup { get; init; }

    /// <summary>Which part.</summary>
    public required AdjustmentKind Kind { get; init; }

    /// <summary>Travel by the readings, SI in the part's unit, right positive.</summary>
    public required double Travel { get; init; }

    /// <summary>Travel that was recommended, the same unit; null when nothing was.</summary>
    public double? Recommended { get; init; }

    /// <summary>Number of the result that recommended it; null when none did.</summary>
    public int? RecommendedBy { get; init; }

    /// <summary>Whether the readings were asked for again, being more than one step off, and stood.</summary>
    public bool ReadingsConfirmed { get; init; }

    /// <summary>Who did it; empty when not given.</summary>
    public string By { get; init; } = "";

    /// <summary>Anything else; empty when nothing.</summary>
    public string Note { get; init; } = "";

    /// <summary>The readings after, as measured.</summary>
    public ImmutableArray<ReadingRecord> Readings { get; init; } = [];
}
