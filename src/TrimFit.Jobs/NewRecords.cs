using System.Collections.Immutable;
using TrimFit.Core.Workshop;

namespace TrimFit.Jobs;

/// <summary>A file with its bytes, to be kept.</summary>
/// <param name="Role">Its role, one of <see cref="InputRecord"/>.</param>
/// <param name="Name">File name without its folder.</param>
/// <param name="Bytes">Its bytes.</param>
public sealed record KeptFile(string Role, string Name, ReadOnlyMemory<byte> Bytes);

/// <summary>A flight to be kept together with its first result: both come into the book or neither does.</summary>
public sealed record NewFlight
{
    /// <summary>Number of the setup it was flown with; not looked at with <see cref="NewRig"/>.</summary>
    public required int Setup { get; init; }

    /// <summary>The machine it was flown with, when that is another setup than the latest; null to use <see cref="Setup"/>.</summary>
    public KeptFile? NewRig { get; init; }

    /// <summary>When its log begins; null when unknown.</summary>
    public DateTimeOffset? Flown { get; init; }

    /// <summary>The wing it was flown with; empty when it is the job's.</summary>
    public string WingId { get; init; } = "";

    /// <summary>Logs and sheet.</summary>
    public required ImmutableArray<KeptFile> Inputs { get; init; }

    /// <summary>Its result.</summary>
    public required NewResult Result { get; init; }
}

/// <summary>A result to be kept. Its <see cref="ResultRecord"/> holds everything but what the book gives: number, time, flight of a new flight, hash.</summary>
public sealed record NewResult
{
    /// <summary>Kind, version, options, verdict, rate, sensitivities; inputs, number, time and hash are filled in by the book.</summary>
    public required ResultRecord Record { get; init; }

    /// <summary>The result as JSON.</summary>
    public required ReadOnlyMemory<byte> Json { get; init; }

    /// <summary>Every file it rests on, with its bytes.</summary>
    public required ImmutableArray<KeptFile> Inputs { get; init; }
}
