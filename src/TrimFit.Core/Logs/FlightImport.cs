using System.Collections.Immutable;

namespace TrimFit.Core.Logs;

/// <summary>A flight with the account of how it was read.</summary>
/// <param name="Flight">The columns.</param>
/// <param name="Diagnostics">What was read, left out and inferred.</param>
public sealed record FlightImport(FlightLog Flight, ImportDiagnostics Diagnostics)
{
    /// <summary>Legs of the pilot's sheet with their places in the flight; empty without a sheet.</summary>
    public ImmutableArray<FoundLeg> Legs { get; init; } = [];
}
