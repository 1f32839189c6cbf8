namespace TrimFit.Core.Statistics;

/// <summary>A confidence set for a ratio of two estimates.</summary>
/// <remarks>Only <see cref="FiellerKind.Interval"/> has ends that bound the ratio; the other two are unbounded and are never given as numbers that could be
/// mistaken for such.</remarks>
public sealed record FiellerSet
{
    /// <summary>Shape of the set.</summary>
    public required FiellerKind Kind { get; init; }

    /// <summary>Numerator over denominator; null when the denominator is exactly 0.</summary>
    public required double? Ratio { get; init; }

    /// <summary>The interval; null unless <see cref="Kind"/> is <see cref="FiellerKind.Interval"/>.</summary>
    public ConfidenceInterval? Interval { get; init; }

    /// <summary>The open gap that the set leaves out; null unless <see cref="Kind"/> is <see cref="FiellerKind.Outside"/>.</summary>
    public ConfidenceInterval? Gap { get; init; }

    /// <summary>Level asked for.</summary>
    public required double Level { get; init; }

    /// <summary>g = t² var(denominator)/denominator²: below 1 for an interval; null when the denominator is exactly 0.</summary>
    public required double? G { get; init; }

    /// <summary>Standard error by the delta method, for comparison; it has no meaning where the set is unbounded, and is null there.</summary>
    public double? DeltaStandardError { get; init; }

    /// <summary>Whether a value belongs to the set.</summary>
    public bool Contains(double value) => Kind switch
    {
        FiellerKind.Interval => Interval!.Value.Contains(value),
        FiellerKind.Outside => value <= Gap!.Value.Lower || value >= Gap.Value.Upper,
        _ => true,
    };
}
