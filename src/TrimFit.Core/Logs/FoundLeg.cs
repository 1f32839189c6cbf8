using System.Collections.Immutable;

namespace TrimFit.Core.Logs;

/// <summary>A leg of the sheet with its place in the flight.</summary>
public sealed record FoundLeg
{
    /// <summary>The leg as written.</summary>
    public required SheetLeg Leg { get; init; }

    /// <summary>Start as written, on the flight's clock, s.</summary>
    public required double StatedStartSec { get; init; }

    /// <summary>End as written, on the flight's clock, s.</summary>
    public required double StatedEndSec { get; init; }

    /// <summary>Start as used, s.</summary>
    public required double StartSec { get; init; }

    /// <summary>End as used, s; after <see cref="StartSec"/>.</summary>
    public required double EndSec { get; init; }

    /// <summary>Channel whose change gave the start; null when none changed within 5 s of it.</summary>
    public ChannelRole? StartFoundIn { get; init; }

    /// <summary>Channel whose change gave the end; null when none changed within 5 s of it.</summary>
    public ChannelRole? EndFoundIn { get; init; }
}

/// <summary>A flight with the legs of its sheet.</summary>
public sealed record SheetedFlight
{
    /// <summary>The flight, its <see cref="ChannelRole.HandsOff"/> column filled from the hands-off legs.</summary>
    public required FlightLog Flight { get; init; }

    /// <summary>Legs that lie in the flight, in the order of the sheet.</summary>
    public required ImmutableArray<FoundLeg> Legs { get; init; }

    /// <summary>What did not fit, each a whole sentence.</summary>
    public ImmutableArray<Notice> Warnings { get; init; } = [];
}
