namespace TrimFit.Core.Statistics;

/// <summary>What studies that differ by more than their own errors say about the next one, the standard deviation between them integrated out.</summary>
/// <remarks>With few studies whose errors are as large as what lies between them, a moment estimate of the variance between is often 0 and a
/// prediction from it far too narrow (J. P. T. Higgins, S. G. Thompson &amp; D. J. Spiegelhalter, J. R. Stat. Soc. A 172 (2009) 137). Here it has
/// a half-normal prior (A. Gelman, Bayesian Analysis 1 (2006) 515) and the mean a flat one; the prediction is the mixture over it (C. Röver, J. Stat. Softw. 93
/// (2020) 6, sections 2.5 to 2.7).</remarks>
public sealed class RandomEffectsPrediction
{
    /// <summary>Values of the standard deviation between that stand for its prior, alike in prior weight: more change the third digit.</summary>
    private const int Nodes = 32;

    private readonly double[] _mean, _spread, _weight; // of the mixture's normals; weights sum to 1

    private RandomEffectsPrediction(double[] mean, double[] spread, double[] weight, double betweenSd)
    {
        (_mean, _spread, _weight, BetweenSd) = (mean, spread, weight, betweenSd);
        for (int g = 0; g < Nodes; g++)
            Mean += weight[g] * mean[g];
    }

    /// <summary>Mean of the next study's true value.</summary>
    public double Mean { get; }

    /// <summary>Posterior mean of the standard deviation between studies.</summary>
    public double BetweenSd { get; }

    /// <summary>Standard deviation of the normal that has the mixture's 95 % interval around the mean.</summary>
    public double StandardDeviation
    {
        get
        {
            double low = 0, high = 0;
            for (int g = 0; g < Nodes; g++)
                high = Math.Max(high, Math.Abs(_mean[g] - Mean) + (10 * _spread[g]));
            for (int i = 0; i < 48; i++) // halving: the last digits do not matter
            {
                double half = low + ((high - low) / 2);
                if (Beyond(Mean, half, 0) > 0.05)
                    low = half;
                else
                    high = half;
            }
            return high / StandardNormal.Quantile(0.975);
        }
    }

    /// <summary>How often the next study's estimate would lie at least as far from the mean as one does.</summary>
    /// <param name="estimate">The estimate; finite.</param>
    /// <param name="variance">Its variance; not negative.</param>
    public double TailProbability(double estimate, double variance) => Beyond(Mean, Math.Abs(Guard.Finite(estimate) - Mean), Guard.NotNegative(variance));

    /// <summary>Predicts the next study.</summary>
    /// <param name="estimates">One estimate per study; at least one, finite.</param>
    /// <param name="variances">Their variances; above 0.</param>
    /// <param name="priorScale">Scale of the half-normal prior of the standard deviation between; above 0.</param>
    /// <exception cref="ArgumentException">Lengths differ, there is no study, or a value is outside its range.</exception>
    public static RandomEffectsPrediction Of(ReadOnlySpan<double> estimates, ReadOnlySpan<double> variances, double priorScale) =>
        Of(estimates, variances, priorScale, [], 1);

    /// <summary>Predicts the next study, of which others differ in something that shifts them by an unknown slope.</summary>
    /// <param name="estimates">One estimate per study; at least one, finite.</param>
    /// <param name="variances">Their variances; above 0.</param>
    /// <param name="priorScale">Scale of the half-normal prior of the standard deviation between; above 0.</param>
    /// <param name="differences">Columns of differences from the next study, each as long as <paramref name="estimates"/>.</param>
    /// <param name="slopeSd">Standard deviation of the normal prior with mean 0 of each column's slope; above 0.</param>
    /// <exception cref="ArgumentException">Lengths differ, there is no study, or a value is outside its range.</exception>
    public static RandomEffectsPrediction Of(ReadOnlySpan<double> estimates, ReadOnlySpan<double> variances, double priorScale, IReadOnlyList<double[]> differences, double slopeSd)
    {
        ArgumentNullException.ThrowIfNull(differences);
        Guard.SameLength(estimates, variances);
        Selection.CheckColumn(estimates, nameof(estimates));
        Guard.Positive(priorScale);
        double slopePrecision = 1 / (Guard.Positive(slopeSd) * slopeSd);
        foreach (double variance in variances)
            Guard.Positive(variance, nameof(variances));
        foreach (double[] column in differences)
        {
            Guard.SameLength(estimates, column, nameof(differences));
            Selection.CheckColumn(column, nameof(differences));
        }
        double[] between = new double[Nodes], mean = new double[Nodes], spread = new double[Nodes], weight = new double[Nodes];
        int n = differences.Count + 1;
        double[] system = new double[n * (n + 1)], x = new double[n];
        double largest = double.NegativeInfinity;
        for (int g = 0; g < Nodes; g++)
        {
            between[g] = priorScale * StandardNormal.Quantile((1 + ((g + 0.5) / Nodes)) / 2);
            double square = between[g] * between[g], logs = 0, quadratic = 0;
            Array.Clear(system);
            for (int c = 1; c < n; c++)
                system[(c * (n + 1)) + c] = slopePrecision;
            for (int i = 0; i < estimates.Length; i++)
            {
                double w = 1 / (variances[i] + square), r = estimates[i] - estimates[0]; // from the first one, so that a large common part keeps its digits
                x[0] = 1;
                for (int c = 1; c < n; c++)
                    x[c] = differences[c - 1][i];
                for (int a = 0; a < n; a++)
                {
                    for (int b = 0; b < n; b++)
                        system[(a * (n + 1)) + b] += w * x[a] * x[b];
                    system[(a * (n + 1)) + n] += w * x[a] * r;
                }
                quadratic += w * r * r;
                logs += Math.Log(w);
            }
            (double middle, double variance, double logDeterminant, double explained) = SolveFirst(system, n);
            mean[g] = estimates[0] + middle;
            spread[g] = Math.Sqrt(square + variance);
            weight[g] = 0.5 * (logs - logDeterminant - (quadratic - explained)); // mean and slopes integrated out
            largest = Math.Max(largest, weight[g]);
        }
        double total = 0, expected = 0;
        for (int g = 0; g < Nodes; g++)
        {
            weight[g] = Math.Exp(weight[g] - largest);
            total += weight[g];
        }
        for (int g = 0; g < Nodes; g++)
        {
            weight[g] /= total;
            expected += weight[g] * between[g];
        }
        return new(mean, spread, weight, expected);
    }

    private double Beyond(double centre, double half, double variance)
    {
        double outside = 0;
        for (int g = 0; g < Nodes; g++)
        {
            double sd = Math.Sqrt((_spread[g] * _spread[g]) + variance);
            outside += _weight[g] * (StandardNormal.Cdf((centre - half - _mean[g]) / sd) + StandardNormal.Cdf((_mean[g] - centre - half) / sd));
        }
        return outside;
    }

    /// <summary>First unknown of the normal equations (P | b), its variance, ln |P|, and b' P⁻¹ b. Eliminates the others first, so that the first one's pivot
    /// is one over its variance.</summary>
    private static (double Value, double Variance, double LogDeterminant, double Explained) SolveFirst(double[] system, int n)
    {
        int width = n + 1;
        double logs = 0, explained = 0;
        for (int p = n - 1; p >= 1; p--)
        {
            double pivot = system[(p * width) + p]; // above 0: the prior's precision is in it
            logs += Math.Log(pivot);
            explained += system[(p * width) + n] * system[(p * width) + n] / pivot;
            for (int a = 0; a < p; a++)
            {
                double factor = system[(a * width) + p] / pivot;
                for (int b = 0; b < p; b++)
                    system[(a * width) + b] -= factor * system[(p * width) + b];
                system[(a * width) + n] -= factor * system[(p * width) + n];
            }
        }
        double first = system[0];
        return (system[n] / first, 1 / first, logs + Math.Log(first), explained + (system[n] * system[n] / first));
    }
}
