using System.Collections.Immutable;

namespace TrimFit.Core.Statistics;

/// <summary>A regression whose errors carry a share of the error before.</summary>
public sealed record Ar1Fit
{
    /// <summary>Share of an error that the next one carries.</summary>
    public required double Rho { get; init; }

    /// <summary>Coefficients in the order of the columns; 0 for columns left out.</summary>
    public required ImmutableArray<double> Coefficients { get; init; }

    /// <summary>Covariance of the coefficients given ρ, row by row.</summary>
    public required ImmutableArray<double> Covariance { get; init; }

    /// <summary>Sum of squared residuals of the transformed rows.</summary>
    public required double ResidualSumOfSquares { get; init; }

    /// <summary>Scale of the new part of each error.</summary>
    public required double ResidualScale { get; init; }

    /// <summary>Transformed rows less used columns; never negative.</summary>
    public required int DegreesOfFreedom { get; init; }

    /// <summary>Durbin and Watson's statistic of the transformed rows.</summary>
    public required double DurbinWatson { get; init; }

    /// <summary>How the search for ρ ended; with one round allowed it counts as settled.</summary>
    public required Convergence Convergence { get; init; }

    /// <summary>The options used.</summary>
    public required Ar1Options Options { get; init; }

    /// <summary>Value and standard error of a coefficient.</summary>
    public Estimate this[int column] => new(Coefficients[column], Math.Sqrt(Covariance[(column * Coefficients.Length) + column]));
}
