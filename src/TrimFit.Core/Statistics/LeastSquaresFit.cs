using System.Collections.Immutable;

namespace TrimFit.Core.Statistics;

/// <summary>A linear least-squares fit.</summary>
public sealed record LeastSquaresFit
{
    /// <summary>Coefficients in the order of the columns; 0 for a column left out (see <see cref="ColumnsLeftOut"/>).</summary>
    public required ImmutableArray<double> Coefficients { get; init; }

    /// <summary>Observed less fitted, unweighted, one per row; rows of weight 0 included.</summary>
    public required ImmutableArray<double> Residuals { get; init; }

    /// <summary>(XᵀWX)⁻¹, row by row; rows and columns of a column left out are 0.</summary>
    public required ImmutableArray<double> InverseCross { get; init; }

    /// <summary>Weighted sum of squared residuals.</summary>
    public required double ResidualSumOfSquares { get; init; }

    /// <summary>Root of the residual sum of squares over the degrees of freedom; 0 when <see cref="DegreesOfFreedom"/> is 0.</summary>
    public required double ResidualScale { get; init; }

    /// <summary>Rows of positive weight less <see cref="Rank"/>; never negative.</summary>
    public required int DegreesOfFreedom { get; init; }

    /// <summary>Condition number (2-norm) of the used columns, each scaled to length 1; 1 without columns.</summary>
    public required double Condition { get; init; }

    /// <summary>Number of columns that say something of their own.</summary>
    public required int Rank { get; init; }

    /// <summary>Columns that are zero or a combination of earlier ones, in rising order; empty when the design has full rank.</summary>
    public required ImmutableArray<int> ColumnsLeftOut { get; init; }

    /// <summary>How the refinement ended.</summary>
    public required Convergence Convergence { get; init; }

    /// <summary>The options used.</summary>
    public required LeastSquaresOptions Options { get; init; }

    /// <summary>Variance of a coefficient (or covariance of two) for independent errors of equal variance.</summary>
    public double Covariance(int row, int column) =>
        ResidualScale * ResidualScale * InverseCross[(row * Coefficients.Length) + column];

    /// <summary>Value and standard error of a coefficient for independent errors of equal variance.</summary>
    public Estimate this[int column] => new(Coefficients[column], Math.Sqrt(Covariance(column, column)));
}
