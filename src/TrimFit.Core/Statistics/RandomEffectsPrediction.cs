namespace TrimFit.Core.Statistics;

/// <summary>What studies that differ by more than their own errors say about the next one, the standard deviation between them integrated out.</summary>
/// <remarks>With few studies whose errors are as large as what lies between them, a moment estimate of the variance between is often 0 and a
/// prediction from it far too narrow (J. P. T. Higgins, S. G. Thompson &amp; D. J. Spiegelhalter, J. R. Stat. Soc. A 172 (2009) 137). Here it has
/// a half-normal prior (A. Gelman, Bayesian Analysis 1 (2006) 515) and the mean a flat one; the prediction is the mixture over it (C. Röver, J. Stat. Softw. 93
/// (2020) 6, sections 2.5 to 2.7).</remarks>
/// <param name="Mean">Mean of the next study's true value.</param>
/// <param name="StandardDeviation">Standard deviation of the normal that has the mixture's 95 % interval around the mean.</param>
/// <param name="BetweenSd">Posterior mean of the standard deviation between studies.</param>
public sealed record RandomEffectsPrediction(double Mean, double StandardDeviation, double BetweenSd)
{
    /// <summary>Values of the standard deviation between that stand for its prior, alike in prior weight: more change the third digit.</summary>
    private const int Nodes = 48;

    /// <summary>Predicts the next study.</summary>
    /// <param name="estimates">One estimate per study; at least one, finite.</param>
    /// <param name="variances">Their variances; above 0.</param>
    /// <param name="priorScale">Scale of the half-normal prior of the standard deviation between; above 0.</param>
    /// <exception cref="ArgumentException">Lengths differ, there is no study, or a value is outside its range.</exception>
    public static RandomEffectsPrediction Of(ReadOnlySpan<double> estimates, ReadOnlySpan<double> variances, double priorScale)
    {
        Guard.SameLength(estimates, variances);
        Selection.CheckColumn(estimates, nameof(estimates));
        Guard.Positive(priorScale);
        foreach (double variance in variances)
            Guard.Positive(variance, nameof(variances));
        Span<double> between = stackalloc double[Nodes], mean = stackalloc double[Nodes], spread = stackalloc double[Nodes], weight = stackalloc double[Nodes];
        double largest = double.NegativeInfinity;
        for (int g = 0; g < Nodes; g++)
        {
            between[g] = priorScale * StandardNormal.Quantile((1 + ((g + 0.5) / Nodes)) / 2);
            double square = between[g] * between[g], weights = 0, sum = 0, logs = 0;
            for (int i = 0; i < estimates.Length; i++)
            {
                double w = 1 / (variances[i] + square);
                weights += w;
                sum += w * (estimates[i] - estimates[0]);
                logs += Math.Log(w);
            }
            double middle = sum / weights, q = 0;
            for (int i = 0; i < estimates.Length; i++)
                q += (estimates[i] - estimates[0] - middle) * (estimates[i] - estimates[0] - middle) / (variances[i] + square);
            mean[g] = middle;
            spread[g] = Math.Sqrt(square + (1 / weights));
            weight[g] = 0.5 * (logs - Math.Log(weights) - q); // the mean integrated out under its flat prior
            largest = Math.Max(largest, weight[g]);
        }
        double total = 0, expected = 0, expectedBetween = 0;
        for (int g = 0; g < Nodes; g++)
        {
            weight[g] = Math.Exp(weight[g] - largest);
            total += weight[g];
            expected += weight[g] * mean[g];
            expectedBetween += weight[g] * between[g];
        }
        expected /= total;
        double low = 0, high = 0;
        for (int g = 0; g < Nodes; g++)
            high = Math.Max(high, Math.Abs(mean[g] - expected) + (10 * spread[g]));
        for (int i = 0; i < 100 && low < high; i++) // half-width of the mixture's 95 % interval around its mean
        {
            double half = low + ((high - low) / 2), inside = 0;
            for (int g = 0; g < Nodes; g++)
                inside += weight[g] * (StandardNormal.Cdf((expected + half - mean[g]) / spread[g]) - StandardNormal.Cdf((expected - half - mean[g]) / spread[g]));
            if (inside / total < 0.95)
                low = half;
            else
                high = half;
        }
        return new(estimates[0] + expected, high / StandardNormal.Quantile(0.975), expectedBetween / total);
    }
}
