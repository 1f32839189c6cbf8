namespace TrimFit.Core.Statistics;

/// <summary>Whether a sandwich covariance is enlarged for the coefficients that were estimated.</summary>
public enum SmallSample
{
    /// <summary>No factor: the asymptotic form.</summary>
    None,

    /// <summary>Times n/(n−p); for clusters G/(G−1)·(n−1)/(n−p).</summary>
    DegreesOfFreedom,
}
