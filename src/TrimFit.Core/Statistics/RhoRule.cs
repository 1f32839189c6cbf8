namespace TrimFit.Core.Statistics;

/// <summary>How the memory of residuals is measured from them.</summary>
public enum RhoRule
{
    /// <summary>Σ e_t e_{t−1}/Σ e²_{t−1}: regression on the value before.</summary>
    Regression,

    /// <summary>Σ e_t e_{t−1}/Σ e_t² over all rows: the first autocorrelation; never beyond ±1.</summary>
    Autocorrelation,
}
