namespace TrimFit.Core.Statistics;

/// <summary>Where a robust regression starts.</summary>
public enum RobustStart
{
    /// <summary>Least squares. Enough for Huber's loss, whose minimum is one.</summary>
    LeastSquares,

    /// <summary>The exact fit through few rows, among many drawn, whose absolute residuals have the least
    /// median: holds with up to nearly half of the rows wild.</summary>
    LeastMedian,
}
