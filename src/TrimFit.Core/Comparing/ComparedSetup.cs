using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Comparing;

/// <summary>All flights of one setting together.</summary>
public sealed record ComparedSetup
{
    /// <summary>The setting's word.</summary>
    public required string Name { get; init; }

    /// <summary>Places of its flights among those of the comparison.</summary>
    public required ImmutableArray<int> Flights { get; init; }

    /// <summary>How its flights were put together.</summary>
    public required PoolingMethod Method { get; init; }

    /// <summary>Pull at off, idle, cruise, full, in this order.</summary>
    public required ImmutableArray<SetupPull> At { get; init; }

    /// <summary>Pull at the balance thrust.</summary>
    public required SetupPull AtBalance { get; init; }

    /// <summary>CG offset from the middle between the riser carabiners by the rig file, m, right positive.</summary>
    public required double CgOffsetM { get; init; }
}

/// <summary>How the flights of a setting were put together.</summary>
public enum PoolingMethod
{
    /// <summary>One or two flights: the scatter between flights is assumed (or known) and integrated out.</summary>
    AssumedScatter,
    /// <summary>Three flights or more: random effects, interval of Hartung and Knapp.</summary>
    RandomEffects,
}

/// <summary>Pull of one setting at one power.</summary>
/// <param name="Setting">Which power.</param>
/// <param name="ThrustFraction">Thrust as a fraction of full.</param>
/// <param name="ThrustN">Thrust, N; null when thrust is relative.</param>
/// <param name="Rate">Turn rate with brakes even, with the scatter between flights in it.</param>
public sealed record SetupPull(PowerSetting Setting, double ThrustFraction, double? ThrustN, PullDistribution Rate)
{
    /// <summary>95 % interval of the turn rate, rad/s.</summary>
    public ConfidenceInterval Interval95 { get; } = Rate.Interval(0.95);
}
