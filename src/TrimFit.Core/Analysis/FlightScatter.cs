using System.Collections.Immutable;
using TrimFit.Core.Statistics;
using TrimFit.Core.Units;

namespace TrimFit.Core.Analysis;

/// <summary>How far the pull of one unchanged machine scatters from flight to flight: straps, posture, fuel, air.</summary>
/// <remarks>Nobody knows it from one or two flights, so its standard deviation has a half-normal prior that is integrated out (A. Gelman, Bayesian
/// Analysis 1 (2006) 515, on priors of a standard deviation between few groups). A book of earlier flights may know it.</remarks>
public sealed record FlightScatter
{
    private FlightScatter(double radPerSec, bool isKnown) => (RadPerSec, IsKnown) = (radPerSec, isKnown);

    /// <summary>Scale of the half-normal prior, or the standard deviation itself when it is known, rad/s.</summary>
    public double RadPerSec { get; }

    /// <summary>Whether the standard deviation is taken as known.</summary>
    public bool IsKnown { get; }

    /// <summary>Half-normal with scale 0.4 deg/s: 3 to 5 mm of posture or strap at a usual sensitivity (common practice, no source).</summary>
    public static FlightScatter Usual { get; } = Assumed(AngularRate.FromDegPerSec(0.4));

    /// <summary>No scatter at all.</summary>
    public static FlightScatter None { get; } = new(0, true);

    /// <summary>A half-normal prior on the standard deviation.</summary>
    /// <param name="scale">Its scale; above 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">Not above 0 or not finite.</exception>
    public static FlightScatter Assumed(AngularRate scale) => new(Guard.Positive(scale.RadPerSec, nameof(scale)), false);

    /// <summary>A standard deviation that earlier flights gave.</summary>
    /// <param name="standardDeviation">Not negative.</param>
    /// <exception cref="ArgumentOutOfRangeException">Negative or not finite.</exception>
    public static FlightScatter Known(AngularRate standardDeviation) => new(Guard.NotNegative(standardDeviation.RadPerSec, nameof(standardDeviation)), true);

    /// <summary>Mean square of the scatter under the prior: scale² of a half-normal.</summary>
    internal double MeanSquare => RadPerSec * RadPerSec;

    /// <summary>Standard deviations that stand for the prior, alike in weight: quantiles at the middles of equal parts; one when it is known.</summary>
    internal ImmutableArray<double> Nodes(int count) => IsKnown
        ? [RadPerSec]
        : [.. Enumerable.Range(0, count).Select(i => RadPerSec * StandardNormal.Quantile((1 + ((i + 0.5) / count)) / 2))];
}
