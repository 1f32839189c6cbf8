using System.Collections.Immutable;
using TrimFit.Reporting.Documents;

namespace TrimFit.Reporting;

/// <summary>What a workshop hands over with the machine: one side, no statistics. What is null or empty becomes a line to write on.</summary>
public sealed record CustomerPage
{
    /// <summary>The machine.</summary>
    public string? Machine { get; init; }

    /// <summary>Whose it is.</summary>
    public string? Customer { get; init; }

    /// <summary>The wing it was flown with.</summary>
    public string? Wing { get; init; }

    /// <summary>Date as it shall be read.</summary>
    public string? Date { get; init; }

    /// <summary>What the customer told.</summary>
    public string? Complaint { get; init; }

    /// <summary>What was checked; empty for the usual list with open boxes.</summary>
    public ImmutableArray<CheckItem> Checks { get; init; } = [];

    /// <summary>What was measured, whole sentences.</summary>
    public string? Measured { get; init; }

    /// <summary>What was changed, or is to be changed, whole sentences.</summary>
    public string? Changed { get; init; }

    /// <summary>Readings before and after the change.</summary>
    public ImmutableArray<CustomerReading> Readings { get; init; } = [];

    /// <summary>What is left over and normal, whole sentences; null when nothing is known of it.</summary>
    public string? LeftOver { get; init; }

    /// <summary>Whether a part was moved, which brings the cautions for the first flight after a change.</summary>
    public bool PartMoved { get; init; }

    /// <summary>Whether the distance between the riser carabiners changed.</summary>
    public bool SpacingChanged { get; init; }

    /// <summary>Who signed for the workshop and when, as it shall be read; null for a line to sign on.</summary>
    public string? SignedBy { get; init; }
}
