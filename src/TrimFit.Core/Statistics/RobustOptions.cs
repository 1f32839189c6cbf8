namespace TrimFit.Core.Statistics;

/// <summary>Choices of a robust regression.</summary>
public sealed record RobustOptions
{
    /// <summary>Loss; Huber's by default, because it has one minimum.</summary>
    public RobustLoss Loss { get; init; } = RobustLoss.Huber;

    /// <summary>Scale; median absolute residual by default.</summary>
    public RobustScale Scale { get; init; } = RobustScale.Mad;

    /// <summary>Start; least squares by default.</summary>
    public RobustStart Start { get; init; } = RobustStart.LeastSquares;

    /// <summary>Seed of the draws of <see cref="RobustStart.LeastMedian"/>.</summary>
    public ulong Seed { get; init; } = 1;

    /// <summary>Draws of <see cref="RobustStart.LeastMedian"/>. Default 500: with four coefficients and 40 % wild rows the chance that none is clean is 1e-30.</summary>
    public int Draws
    {
        get;
        init => field = value > 0 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "must be above 0");
    } = 500;

    /// <summary>Huber's k in units of the residual scale. Default 1.345: 95 % efficiency on normal errors (Holland &amp; Welsch 1977).</summary>
    public double HuberConstant { get; init => field = Guard.Positive(value); } = 1.345;

    /// <summary>Tukey's c in units of the residual scale. Default 4.685: 95 % efficiency on normal errors (Holland &amp; Welsch 1977).</summary>
    public double BisquareConstant { get; init => field = Guard.Positive(value); } = 4.685;

    /// <summary>Factor from the median absolute residual to the scale. Default exact for normal errors; many programs round it to 1/0.6745.</summary>
    public double MadFactor { get; init => field = Guard.Positive(value); } = NormalConsistentMad.Factor;

    /// <summary>The scale for <see cref="RobustScale.Fixed"/>, in the unit of y. Default 1.</summary>
    public double FixedScale { get; init => field = Guard.Positive(value); } = 1;

    /// <summary>The iteration has settled when the fitted values move by less than this share of the residuals' length. Default 1e-10.</summary>
    public double Tolerance { get; init => field = Guard.Positive(value); } = 1e-10;

    /// <summary>Most steps of each stage. Default 500: Huber's steps shrink by a factor of two or more on ordinary data.</summary>
    public int MaximumIterations
    {
        get;
        init => field = value > 0 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "must be above 0");
    } = 500;
}
