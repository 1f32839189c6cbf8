using System.Collections.Immutable;
using TrimFit.Core.Comparing;

namespace TrimFit.Import.Flights;

/// <summary>A list of flights to be compared, in the order flown. Paths are as written, from the list's own folder.</summary>
public sealed record FlightList
{
    /// <summary>The flights.</summary>
    public required ImmutableArray<ListedFlight> Flights { get; init; }

    /// <summary>What was changed between the settings; null when the list does not say.</summary>
    public ChangedPart? Changed { get; init; }

    /// <summary>File with the sealed order of a blind trial; null without one.</summary>
    public string? SealedOrder { get; init; }

    /// <summary>Rig file of each setting of a blind trial, by the setting's word.</summary>
    public ImmutableDictionary<string, string> SetupRigs { get; init; } = ImmutableDictionary<string, string>.Empty;
}

/// <summary>One flight of a list.</summary>
public sealed record ListedFlight
{
    /// <summary>Its logs; at least one.</summary>
    public required ImmutableArray<string> Logs { get; init; }

    /// <summary>Its rig file; null only where a sealed order names the setting.</summary>
    public string? Rig { get; init; }

    /// <summary>Its flight sheet; null without one.</summary>
    public string? Sheet { get; init; }

    /// <summary>The setting's word; null only where a sealed order names it.</summary>
    public string? Setup { get; init; }

    /// <summary>Line in the list, counted from 1.</summary>
    public int Line { get; init; }
}
