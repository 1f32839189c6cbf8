using TrimFit.Core.Statistics;

namespace TrimFit.Core.Analysis;

/// <summary>What one source of the sensitivity says by itself.</summary>
/// <param name="Kind">Word of the source.</param>
/// <param name="Median">Median, (rad/s)/m.</param>
/// <param name="LogSd">Standard deviation of its logarithm; infinite when it is hardly ever positive.</param>
/// <param name="PositiveShare">Share of draws in which it is positive.</param>
/// <param name="Interval95">95 % interval.</param>
internal sealed record SourceAlone(string Kind, double Median, double LogSd, double PositiveShare, ConfidenceInterval Interval95)
{
    /// <summary>The words of sources, in the order a finding numbers them.</summary>
    private static readonly string[] _kinds = ["prior", "torque", "ballast", "pair", "user", ShopMemory.Kind];

    public static SourceAlone Of(string kind, double[] values)
    {
        double[] logs = [.. values.Where(v => v > 0).Select(v => Math.Log(v))];
        double logSd = logs.Length > 1
            ? (QuantileType7.Of(logs, 0.975) - QuantileType7.Of(logs, 0.025)) / (2 * 1.96)
            : double.PositiveInfinity;
        return new(kind, QuantileType7.Of(values, 0.5), logSd, logs.Length / (double)values.Length,
            new ConfidenceInterval(QuantileType7.Of(values, 0.025), QuantileType7.Of(values, 0.975), 0.95));
    }

    public static int IndexOf(string kind) => Array.IndexOf(_kinds, kind);

    /// <summary>Pairs of sources that say different things: two-sided p of the difference of their logarithms, and a measured source that is negative.</summary>
    /// <param name="sources">At least one; the first is the prior with what the user states.</param>
    /// <param name="level">p below which, shared among the pairs, two sources clash.</param>
    public static IEnumerable<(SourceAlone First, SourceAlone Second, double P)> Clashes(SourceAlone[] sources, double level)
    {
        // Torque against the prior is tested by the prior-predictive p, which knows the curve too.
        (SourceAlone First, SourceAlone Second)[] pairs =
        [
            .. from i in Enumerable.Range(0, sources.Length)
               from j in Enumerable.Range(i + 1, sources.Length - i - 1)
               where !(sources[i].Kind == "prior" && sources[j].Kind == "torque")
               select (sources[i], sources[j]),
        ];
        foreach ((SourceAlone first, SourceAlone second) in pairs)
        {
            double p;
            if (second.PositiveShare < level / 2)
            {
                p = second.PositiveShare; // the turn went against the known shift
            }
            else if (first.Median > 0 && second.Median > 0)
            {
                double z = Math.Log(second.Median / first.Median) / Math.Sqrt((first.LogSd * first.LogSd) + (second.LogSd * second.LogSd));
                p = Math.Min(1, 2 * StandardNormal.Cdf(-Math.Abs(z)) * pairs.Length);
            }
            else
            {
                continue;
            }
            if (p < level)
                yield return (first, second, p);
        }
    }
}
