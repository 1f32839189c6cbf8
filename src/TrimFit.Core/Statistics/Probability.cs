using System.Runtime.CompilerServices;

namespace TrimFit.Core.Statistics;

/// <summary>Checks of probabilities, and the search every quantile shares.</summary>
internal static class Probability
{
    public static double Inside(double value, [CallerArgumentExpression(nameof(value))] string? name = null) =>
        value > 0 && value < 1 ? value : throw new ArgumentOutOfRangeException(name, value, "must be above 0 and below 1");

    /// <summary>ln(1 + x) with its digits kept near 0, where the runtime's <c>double.LogP1</c> rounds 1 + x first. W. Kahan's form.</summary>
    public static double Log1P(double x)
    {
        double u = 1 + x;
        return u == 1 ? x : double.IsPositiveInfinity(u) ? u : Math.Log(u) * (x / (u - 1));
    }

    /// <summary>Root of cdf(x) = p in a bracket, by Newton steps that fall back to halving.</summary>
    /// <param name="cdf">Rising function.</param>
    /// <param name="density">Its slope.</param>
    /// <param name="target">p.</param>
    /// <param name="lower">cdf(lower) is at most p.</param>
    /// <param name="upper">cdf(upper) is at least p.</param>
    public static double Solve(Func<double, double> cdf, Func<double, double> density, double target, double lower, double upper)
    {
        double x = lower + ((upper - lower) / 2);
        for (int i = 0; i < 200; i++) // halving alone needs at most some 110 steps for a double
        {
            double error = cdf(x) - target;
            if (error == 0)
                return x;
            if (error > 0)
                upper = x;
            else
                lower = x;
            double slope = density(x);
            double next = x - (error / slope);
            if (!(next > lower && next < upper))
                next = lower + ((upper - lower) / 2);
            if (Math.Abs(next - x) <= 2e-16 * Math.Abs(x))
                return next;
            x = next;
        }
        return x;
    }
}
