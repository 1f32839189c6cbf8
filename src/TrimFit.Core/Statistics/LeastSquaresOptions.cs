namespace TrimFit.Core.Statistics;

/// <summary>Choices of a least-squares fit.</summary>
public sealed record LeastSquaresOptions
{
    /// <summary>A column counts as a combination of those before it when less than this share of its length is left beside them. Default
    /// 1e-12: a hundred times above the rounding of a few thousand rows, a hundred below what NIST's Filip needs.</summary>
    public double RankTolerance { get; init => field = Guard.Positive(value); } = 1e-12;

    /// <summary>Most steps of iterative refinement. Default 5: each step gains the digits that rounding left to the factorisation.</summary>
    public int RefinementSteps
    {
        get;
        init => field = value >= 0 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "must not be negative");
    } = 5;
}
