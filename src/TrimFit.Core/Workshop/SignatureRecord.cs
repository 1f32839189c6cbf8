using System.Collections.Immutable;

namespace TrimFit.Core.Workshop;

/// <summary>A technician's word that the work is done: his name, the date, the readings. It is his, not the program's.</summary>
public sealed record SignatureRecord
{
    /// <summary>When it was written down, UTC.</summary>
    public required DateTimeOffset Made { get; init; }

    /// <summary>The technician's name.</summary>
    public required string Name { get; init; }

    /// <summary>The date he signs with.</summary>
    public required DateOnly Date { get; init; }

    /// <summary>Number of the setup he signs for.</summary>
    public required int Setup { get; init; }

    /// <summary>The readings he signs for; at least one.</summary>
    public ImmutableArray<ReadingRecord> Readings { get; init; } = [];

    /// <summary>Anything else; empty when nothing.</summary>
    public string Note { get; init; } = "";
}
