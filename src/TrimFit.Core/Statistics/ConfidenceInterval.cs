namespace TrimFit.Core.Statistics;

/// <summary>An interval with its level.</summary>
/// <param name="Lower">Lower end.</param>
/// <param name="Upper">Upper end; not below <paramref name="Lower"/>.</param>
/// <param name="Level">Nominal coverage, such as 0.95.</param>
public readonly record struct ConfidenceInterval(double Lower, double Upper, double Level)
{
    /// <summary>Half of the width.</summary>
    public double HalfWidth => (Upper - Lower) / 2;

    /// <summary>Whether the interval excludes zero.</summary>
    public bool ExcludesZero => Lower > 0 || Upper < 0;

    /// <summary>Whether a value lies inside or on an end.</summary>
    public bool Contains(double value) => value >= Lower && value <= Upper;
}
