using System.Collections.Immutable;
using TrimFit.Core.Comparing;

namespace TrimFit.Reporting;

/// <summary>Everything a report of <c>compare</c> shows.</summary>
public sealed record CompareReport
{
    /// <summary>The result.</summary>
    public required FlightComparison Comparison { get; init; }

    /// <summary>The flights by themselves, in the order of the comparison's.</summary>
    public required ImmutableArray<FitReport> Flights { get; init; }

    /// <summary>The sealed order that was opened; null when there was none.</summary>
    public OpenedOrder? Order { get; init; }

    /// <summary>The program.</summary>
    public required Provenance Provenance { get; init; }
}

/// <summary>A sealed order of settings once it is opened.</summary>
/// <param name="File">Its file.</param>
/// <param name="Setups">Settings in the order to be flown.</param>
/// <param name="Commitment">The number printed on the card when it was sealed.</param>
public sealed record OpenedOrder(SourceFile File, ImmutableArray<string> Setups, string Commitment);
