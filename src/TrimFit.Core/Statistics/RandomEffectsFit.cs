namespace TrimFit.Core.Statistics;

/// <summary>A mean over studies (flights) that differ by more than their own errors.</summary>
public sealed record RandomEffectsFit
{
    /// <summary>Number of studies.</summary>
    public required int Studies { get; init; }

    /// <summary>Variance between studies, in the square of the unit; not negative.</summary>
    public required double BetweenVariance { get; init; }

    /// <summary>Weighted mean with the standard error that takes the variance between as known.</summary>
    public required Estimate Mean { get; init; }

    /// <summary>Mean with weights 1/variance: what holds if the studies do not differ.</summary>
    public required Estimate FixedMean { get; init; }

    /// <summary>Cochran's Q of heterogeneity, with studies − 1 degrees of freedom.</summary>
    public required TestStatistic Heterogeneity { get; init; }

    /// <summary>Share of the spread that is between studies, max(0, 1 − (k − 1)/Q); 0 for one study.</summary>
    public required double BetweenShare { get; init; }

    /// <summary>Standard error of Hartung, Knapp, Sidik and Jonkman; for t with studies − 1 degrees of freedom; null for one study.</summary>
    public required double? HartungKnappStandardError { get; init; }

    /// <summary>Interval that takes the variance between as known (normal); covers too little with few studies.</summary>
    public ConfidenceInterval NormalInterval(double level)
    {
        double half = StudentT.TwoSidedFactor(level, double.PositiveInfinity) * Mean.StandardError;
        return new(Mean.Value - half, Mean.Value + half, level);
    }

    /// <summary>Hartung and Knapp's interval: t with studies − 1 degrees of freedom; null for one study.</summary>
    /// <param name="level">Such as 0.95.</param>
    /// <param name="neverNarrower">True keeps the standard error from falling below the one of <see cref="Mean"/> (factor not below 1), as it would when few
    /// studies agree by chance.</param>
    public ConfidenceInterval? HartungKnappInterval(double level, bool neverNarrower = true)
    {
        if (HartungKnappStandardError is not double error)
            return null;
        double half = StudentT.TwoSidedFactor(level, Studies - 1) * (neverNarrower ? Math.Max(error, Mean.StandardError) : error);
        return new(Mean.Value - half, Mean.Value + half, level);
    }

    /// <summary>Interval for the true value of a further study (normal).</summary>
    public ConfidenceInterval PredictionInterval(double level)
    {
        double half = StudentT.TwoSidedFactor(level, double.PositiveInfinity) * Math.Sqrt((Mean.StandardError * Mean.StandardError) + BetweenVariance);
        return new(Mean.Value - half, Mean.Value + half, level);
    }
}
