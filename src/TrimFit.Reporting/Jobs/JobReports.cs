using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Workshop;

namespace TrimFit.Reporting.Jobs;

/// <summary>Everything a job's page shows.</summary>
public sealed record JobReport
{
    /// <summary>The job.</summary>
    public required JobRecord Job { get; init; }

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}

/// <summary>Everything the customer's page of a job shows.</summary>
public sealed record JobCustomerReport
{
    /// <summary>The job.</summary>
    public required JobRecord Job { get; init; }

    /// <summary>Readings of the machine as it came.</summary>
    public ImmutableArray<ReadingRecord> Before { get; init; } = [];

    /// <summary>Readings of the machine as it goes.</summary>
    public ImmutableArray<ReadingRecord> After { get; init; } = [];
}

/// <summary>Everything the list of a book shows.</summary>
public sealed record JobListReport
{
    /// <summary>The jobs in the order to show them.</summary>
    public required ImmutableArray<JobSummary> Jobs { get; init; }

    /// <summary>Bytes the book takes on the disk.</summary>
    public required long BookBytes { get; init; }

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}

/// <summary>Everything the histories of some jobs show.</summary>
public sealed record JobHistoryReport
{
    /// <summary>The jobs.</summary>
    public required ImmutableArray<JobRecord> Jobs { get; init; }

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}

/// <summary>Everything the shop's memory shows.</summary>
public sealed record ShopMemoryReport
{
    /// <summary>What was measured, by job.</summary>
    public required ImmutableArray<MeasuredSensitivity> Measured { get; init; }

    /// <summary>What follows for a usual wing; null with too few wings.</summary>
    public ShopMemory? Memory { get; init; }

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}
