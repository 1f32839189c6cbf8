namespace TrimFit.Core.Statistics;

/// <summary>How the residual scale of a robust fit is found.</summary>
public enum RobustScale
{
    /// <summary>Median absolute residual, about 0, at every step.</summary>
    Mad,

    /// <summary>Huber's Proposal 2: the scale at which clipped residuals have the variance that clipped normal ones have.</summary>
    HuberProposal2,

    /// <summary>Given by the caller and kept.</summary>
    Fixed,
}
