namespace TrimFit.Core.Statistics;

/// <summary>Mean over studies with a variance between them.</summary>
/// <remarks>R. DerSimonian &amp; N. Laird, Control. Clin. Trials 7 (1986) 177; R. C. Paule &amp; J. Mandel, J. Res. NBS 87 (1982) 377; J. Hartung &amp; G. Knapp,
/// Stat. Med. 20 (2001) 3875.</remarks>
public static class RandomEffects
{
    /// <summary>Variance between by DerSimonian and Laird's moment estimate.</summary>
    /// <param name="estimates">One estimate per study; at least one, finite.</param>
    /// <param name="variances">Their variances; above 0.</param>
    /// <exception cref="ArgumentException">Lengths differ, there is no study, or a value is outside its range.</exception>
    public static RandomEffectsFit DerSimonianLaird(ReadOnlySpan<double> estimates, ReadOnlySpan<double> variances)
    {
        Check(estimates, variances);
        double sum = 0, squares = 0;
        foreach (double variance in variances)
        {
            sum += 1 / variance;
            squares += 1 / (variance * variance);
        }
        double q = Q(estimates, variances, 0);
        double scale = sum - (squares / sum);
        double between = scale > 0 ? Math.Max(0, (q - (estimates.Length - 1)) / scale) : 0;
        return Pool(estimates, variances, between);
    }

    /// <summary>Variance between by Paule and Mandel: the one at which Q equals its expectation k − 1; 0 when Q is below it already.</summary>
    /// <inheritdoc cref="DerSimonianLaird"/>
    public static RandomEffectsFit PauleMandel(ReadOnlySpan<double> estimates, ReadOnlySpan<double> variances)
    {
        Check(estimates, variances);
        double wanted = estimates.Length - 1;
        if (Q(estimates, variances, 0) <= wanted)
            return Pool(estimates, variances, 0);
        double upper = 0;
        foreach (double variance in variances)
            upper = Math.Max(upper, variance);
        double lower = 0;
        while (Q(estimates, variances, upper) > wanted)
        {
            lower = upper;
            upper *= 2;
        }
        for (int i = 0; i < 200 && lower < upper; i++) // halving: Q falls steadily with the variance between
        {
            double middle = lower + ((upper - lower) / 2);
            if (middle == lower || middle == upper)
                break;
            if (Q(estimates, variances, middle) > wanted)
                lower = middle;
            else
                upper = middle;
        }
        return Pool(estimates, variances, lower + ((upper - lower) / 2));
    }

    private static RandomEffectsFit Pool(ReadOnlySpan<double> estimates, ReadOnlySpan<double> variances, double between)
    {
        int k = estimates.Length;
        double q = Q(estimates, variances, 0);
        Estimate mean = Mean(estimates, variances, between);
        return new RandomEffectsFit
        {
            Studies = k,
            BetweenVariance = between,
            Mean = mean,
            FixedMean = Mean(estimates, variances, 0),
            Heterogeneity = TestStatistic.ChiSquared(q, k - 1),
            BetweenShare = q > 0 ? Math.Max(0, 1 - ((k - 1) / q)) : 0,
            HartungKnappStandardError = k > 1 ? Math.Sqrt(Q(estimates, variances, between) / (k - 1)) * mean.StandardError : null,
        };
    }

    private static Estimate Mean(ReadOnlySpan<double> estimates, ReadOnlySpan<double> variances, double between)
    {
        double weights = 0, sum = 0;
        for (int i = 0; i < estimates.Length; i++)
        {
            double w = 1 / (variances[i] + between);
            weights += w;
            sum += w * (estimates[i] - estimates[0]); // from the first one, so that a large common part keeps its digits
        }
        return new(estimates[0] + (sum / weights), Math.Sqrt(1 / weights));
    }

    private static double Q(ReadOnlySpan<double> estimates, ReadOnlySpan<double> variances, double between)
    {
        double mean = Mean(estimates, variances, between).Value;
        double q = 0;
        for (int i = 0; i < estimates.Length; i++)
            q += (estimates[i] - mean) * (estimates[i] - mean) / (variances[i] + between);
        return q;
    }

    private static void Check(ReadOnlySpan<double> estimates, ReadOnlySpan<double> variances)
    {
        Guard.SameLength(estimates, variances);
        Selection.CheckColumn(estimates, nameof(estimates));
        foreach (double variance in variances)
            Guard.Positive(variance, nameof(variances));
    }
}
