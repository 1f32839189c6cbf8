namespace TrimFit.Core.Statistics;

/// <summary>Choices of a regression with first-order autoregressive errors.</summary>
public sealed record Ar1Options
{
    /// <summary>How ρ is measured. The rule matters: some data have a different fixed point under each. Default: regression on the value before.</summary>
    public RhoRule Rule { get; init; } = RhoRule.Regression;

    /// <summary>Most rounds; 1 is the two-step form. Default 200.</summary>
    public int MaximumIterations
    {
        get;
        init => field = value > 0 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "must be above 0");
    } = 200;

    /// <summary>ρ has settled when it moves by less than this. Default 1e-10.</summary>
    public double Tolerance { get; init => field = Guard.Positive(value); } = 1e-10;
}
