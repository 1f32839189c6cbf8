using System.Collections.Immutable;

namespace TrimFit.Core.Statistics;

/// <summary>A circle of least squared distance with what is needed to doubt it.</summary>
public sealed record GeometricCircleFit
{
    /// <summary>The circle.</summary>
    public required Circle Circle { get; init; }

    /// <summary>Weighted sum of squared distances of the points from the circle.</summary>
    public required double SumOfSquares { get; init; }

    /// <summary>Points of positive weight less 3.</summary>
    public required int DegreesOfFreedom { get; init; }

    /// <summary>Root of <see cref="SumOfSquares"/> over <see cref="DegreesOfFreedom"/>; 0 when no degree of freedom is left.</summary>
    public required double ResidualScale { get; init; }

    /// <summary>Covariance of centre x, centre y and radius, 3×3 row by row: residual scale squared times (JᵀWJ)⁻¹. Holds for independent
    /// errors; points of a flight log are correlated, so it is a lower bound there.</summary>
    public required ImmutableArray<double> Covariance { get; init; }

    /// <summary>How the iteration ended.</summary>
    public required Convergence Convergence { get; init; }
}
