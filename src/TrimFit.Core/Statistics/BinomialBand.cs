using MathNet.Numerics;

namespace TrimFit.Core.Statistics;

/// <summary>Exact limits for counts and shares: does a simulated coverage differ from what was promised?</summary>
public static class BinomialBand
{
    /// <summary>Counts that chance alone does not leave: each tail beyond them has at most half of 1 − level.</summary>
    /// <param name="trials">Number of trials; at least 1.</param>
    /// <param name="probability">Chance of success in each; above 0 and below 1.</param>
    /// <param name="level">Such as 0.99.</param>
    /// <returns>Lowest and highest count inside the band.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static (int Lowest, int Highest) Counts(int trials, double probability, double level)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(trials, 1);
        double p = Probability.Inside(probability);
        double tail = (1 - Probability.Inside(level)) / 2;
        return (First(trials, k => Cdf(k, trials, p) > tail), First(trials, k => UpperTail(k + 1, trials, p) <= tail));
    }

    /// <summary>Probability of at most a count of successes.</summary>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double Cdf(int count, int trials, double probability)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(trials, 1);
        Probability.Inside(probability);
        return count < 0 ? 0 : count >= trials ? 1 : SpecialFunctions.BetaRegularized(trials - count, count + 1.0, 1 - probability);
    }

    /// <summary>Probability of at least a count of successes.</summary>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static double UpperTail(int count, int trials, double probability)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(trials, 1);
        Probability.Inside(probability);
        return count <= 0 ? 1 : count > trials ? 0 : SpecialFunctions.BetaRegularized(count, trials - count + 1.0, probability);
    }

    /// <summary>Exact interval for the chance behind an observed count (C. J. Clopper &amp; E. S. Pearson, Biometrika 26 (1934) 404).</summary>
    /// <param name="successes">From 0 to <paramref name="trials"/>.</param>
    /// <param name="trials">At least 1.</param>
    /// <param name="level">Such as 0.95.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is outside its range.</exception>
    public static ConfidenceInterval ClopperPearson(int successes, int trials, double level)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(trials, 1);
        ArgumentOutOfRangeException.ThrowIfNegative(successes);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(successes, trials);
        double tail = (1 - Probability.Inside(level)) / 2;
        double lower = successes == 0 ? 0 : Root(p => UpperTail(successes, trials, p) - tail);
        double upper = successes == trials ? 1 : Root(p => tail - Cdf(successes, trials, p));
        return new(lower, upper, level);
    }

    // Both functions rise with p; halving reaches the last digit in at most some 60 steps away from 0, which p never reaches here.
    private static double Root(Func<double, double> rising)
    {
        double lower = 0, upper = 1;
        for (int i = 0; i < 200; i++)
        {
            double middle = lower + ((upper - lower) / 2);
            if (middle == lower || middle == upper)
                break;
            if (rising(middle) > 0)
                upper = middle;
            else
                lower = middle;
        }
        return lower + ((upper - lower) / 2);
    }

    // Smallest count from which a condition holds.
    private static int First(int trials, Func<int, bool> holds)
    {
        int lower = 0, upper = trials;
        while (lower < upper)
        {
            int middle = lower + ((upper - lower) / 2);
            if (holds(middle))
                upper = middle;
            else
                lower = middle + 1;
        }
        return lower;
    }
}
