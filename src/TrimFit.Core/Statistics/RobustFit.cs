using System.Collections.Immutable;

namespace TrimFit.Core.Statistics;

/// <summary>A robust linear regression.</summary>
public sealed record RobustFit
{
    /// <summary>Coefficients in the order of the columns; 0 for columns left out.</summary>
    public required ImmutableArray<double> Coefficients { get; init; }

    /// <summary>Covariance of the coefficients, row by row: Huber's (1981) form with correction for estimated coefficients; 0 throughout when the scale is 0.</summary>
    public required ImmutableArray<double> Covariance { get; init; }

    /// <summary>Observed less fitted.</summary>
    public required ImmutableArray<double> Residuals { get; init; }

    /// <summary>Weight of each row at the end, from 0 (forgotten) to 1 (counted in full).</summary>
    public required ImmutableArray<double> Weights { get; init; }

    /// <summary>Residual scale; 0 when more than half of the rows are met exactly.</summary>
    public required double ResidualScale { get; init; }

    /// <summary>Rows less used columns; never negative.</summary>
    public required int DegreesOfFreedom { get; init; }

    /// <summary>Columns that are combinations of earlier ones.</summary>
    public required ImmutableArray<int> ColumnsLeftOut { get; init; }

    /// <summary>How the iteration ended.</summary>
    public required Convergence Convergence { get; init; }

    /// <summary>The options used.</summary>
    public required RobustOptions Options { get; init; }

    /// <summary>Value and standard error of a coefficient.</summary>
    public Estimate this[int column] => new(Coefficients[column], Math.Sqrt(Covariance[(column * Coefficients.Length) + column]));
}
