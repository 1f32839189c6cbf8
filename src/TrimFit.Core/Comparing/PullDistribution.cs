using System.Collections.Immutable;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Comparing;

/// <summary>What is known about one turn rate or one change of it, with the flight scatter integrated out: a mixture of normals, or of Student's t.</summary>
public sealed class PullDistribution
{
    private const int MostDoublings = 60, MostHalvings = 200;

    /// <summary>One part of the mixture; weights of all parts add up to 1, degrees of freedom are infinite for a normal.</summary>
    internal readonly record struct Part(double Weight, double Mean, double Scale, double DegreesOfFreedom)
    {
        /// <summary>Probability of at most x in this part.</summary>
        public double Cdf(double x)
        {
            double z = (x - Mean) / Scale;
            return double.IsPositiveInfinity(DegreesOfFreedom) ? StandardNormal.Cdf(z) : StudentT.Cdf(z, DegreesOfFreedom);
        }

        /// <summary>Quantile of this part.</summary>
        public double Quantile(double p) =>
            Mean + (Scale * (double.IsPositiveInfinity(DegreesOfFreedom) ? StandardNormal.Quantile(p) : StudentT.Quantile(p, DegreesOfFreedom)));
    }

    internal PullDistribution(ImmutableArray<Part> parts) => Parts = parts;

    internal ImmutableArray<Part> Parts { get; }

    /// <summary>The mean (the centre of the parts), rad/s.</summary>
    public double Mean => Parts.Sum(p => p.Weight * p.Mean);

    /// <summary>Probability of at most a turn rate.</summary>
    /// <param name="radPerSec">rad/s.</param>
    public double Cdf(double radPerSec)
    {
        double sum = 0;
        foreach (Part part in Parts)
            sum += part.Weight * part.Cdf(radPerSec);
        return sum;
    }

    /// <summary>Quantile, rad/s.</summary>
    /// <param name="probability">Above 0 and below 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The probability is not inside (0, 1).</exception>
    public double Quantile(double probability)
    {
        Probability.Inside(probability);
        return Solve(Cdf, probability, Mean, Parts.Max(p => p.Scale));
    }

    /// <summary>Interval with equal tails.</summary>
    /// <param name="level">Such as 0.95.</param>
    /// <exception cref="ArgumentOutOfRangeException">The level is not inside (0, 1).</exception>
    public ConfidenceInterval Interval(double level) => new(Quantile((1 - level) / 2), Quantile((1 + level) / 2), level);

    /// <summary>Half-width of the 95 % interval in units of a normal's: the standard error that gives a normal this interval.</summary>
    public double StandardError => Interval(0.95).HalfWidth / StandardNormal.Quantile(0.975);

    /// <summary>Where a rising function reaches a probability.</summary>
    internal static double Solve(Func<double, double> cdf, double probability, double centre, double scale)
    {
        double step = scale > 0 ? scale : 1e-12, low = centre - step, high = centre + step;
        for (int i = 0; i < MostDoublings && cdf(low) > probability; i++)
            low -= step *= 2;
        step = scale > 0 ? scale : 1e-12;
        for (int i = 0; i < MostDoublings && cdf(high) < probability; i++)
            high += step *= 2;
        double close = 1e-7 * (scale > 0 ? scale : 1e-12); // far below anything shown
        for (int i = 0; i < MostHalvings && high - low > close; i++)
        {
            double middle = low + ((high - low) / 2);
            if (cdf(middle) < probability)
                low = middle;
            else
                high = middle;
        }
        return low + ((high - low) / 2);
    }
}
