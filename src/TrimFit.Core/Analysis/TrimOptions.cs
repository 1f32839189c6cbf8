using System.Collections.Immutable;
using TrimFit.Core.Units;

namespace TrimFit.Core.Analysis;

/// <summary>Choices of one analysis.</summary>
public sealed record TrimOptions
{
    /// <summary>Where the turn is to be nulled.</summary>
    public BalanceThrust BalanceThrust { get; init; } = BalanceThrust.Cruise;

    /// <summary>Turn rate that counts as no pull; default 1 deg/s.</summary>
    public AngularRate Tolerance { get; init => field = AngularRate.FromRadPerSec(Guard.Positive(value.RadPerSec)); } = AngularRate.FromDegPerSec(1);

    /// <summary>Other flights of the same machine with a part moved by a known amount; none by default.</summary>
    public ImmutableArray<KnownChange> KnownChanges { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>What the workshop's own jobs say about this wing's sensitivity; null without a job book.</summary>
    public ShopMemory? ShopMemory { get; init; }

    /// <summary>Seed of the posterior's draws; the same seed gives the same result.</summary>
    public ulong Seed { get; init; } = 1;

    /// <summary>Draws of the posterior; default 8000: the ends of a 95 % interval then move by about 1 % of its width between seeds.</summary>
    public int Draws { get; init => field = value >= 100 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "at least 100"); } = 8000;
}
