using System.Collections.Immutable;

namespace TrimFit.Core.Workshop;

/// <summary>A flight of a job.</summary>
public sealed record FlightRecord
{
    /// <summary>Number in its job, from 1.</summary>
    public required int Number { get; init; }

    /// <summary>When it came into the book, UTC.</summary>
    public required DateTimeOffset Added { get; init; }

    /// <summary>Number of the setup it was flown with.</summary>
    public required int Setup { get; init; }

    /// <summary>When its log begins, UTC as far as the logger knew; null when it knew no date.</summary>
    public DateTimeOffset? Flown { get; init; }

    /// <summary>The wing it was flown with; empty when it is the job's.</summary>
    public string WingId { get; init; } = "";

    /// <summary>Logs and sheet, in the order they were given.</summary>
    public ImmutableArray<InputRecord> Inputs { get; init; } = [];
}
