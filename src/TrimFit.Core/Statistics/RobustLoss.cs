namespace TrimFit.Core.Statistics;

/// <summary>How a large residual loses its pull.</summary>
public enum RobustLoss
{
    /// <summary>Huber's: pull grows to k residual scales and stays there. One minimum; outliers in y are bounded, not forgotten.</summary>
    Huber,

    /// <summary>Tukey's bisquare: pull falls back to nothing at c residual scales. Far outliers are forgotten; may have several minima.</summary>
    TukeyBisquare,
}
