using System.Collections.Immutable;
using TrimFit.Core.Ground;

namespace TrimFit.Reporting;

/// <summary>Everything a report of <c>job checks</c> shows.</summary>
public sealed record ChecksReport
{
    /// <summary>What the pilot told.</summary>
    public required Complaint Complaint { get; init; }

    /// <summary>The checks in order.</summary>
    public required ImmutableArray<OrderedCheck> Checks { get; init; }

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}
