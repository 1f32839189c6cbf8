using System.Collections.Immutable;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Analysis;

/// <summary>What a workshop's own jobs say about the sensitivity of the next wing, before it has flown.</summary>
/// <remarks>Random effects on the logarithm, one study a wing, brought to the new wing's area and load; the spread between wings is integrated out
/// (DEVELOPERS.md, "The shop's memory").</remarks>
public sealed record ShopMemory
{
    /// <summary>Word of this source in results.</summary>
    public const string Kind = "shop_memory";

    /// <summary>Fewest wings that say anything about the spread between wings.</summary>
    public const int FewestWings = 3;

    /// <summary>A wing whose p among the others, times the number of wings looked at, is below this is set aside and named.</summary>
    public const double ConflictP = 0.05;

    // Geometrically similar wings at one lift coefficient: the roll moment W e over dynamic pressure, area and span gives C_l = C_L e/b, and a
    // steady turn has r b/(2 V) in proportion to C_l, so S = r/e goes as V/b², that is (m/A)^(1/2)/A. Wings of a line are not scale copies, so
    // each exponent carries a standard deviation of a half (assumed, no source), which the wings themselves narrow.
    private const double AreaExponent = -1, LoadingExponent = 0.5, ExponentSd = 0.5;

    /// <summary>Scale of the prior of the standard deviation between wings, of the logarithm; half-normal (usual for ratios, C. Röver et al., Res. Synth.
    /// Methods 12 (2021) 448, from memory).</summary>
    private const double BetweenScale = 0.5;

    /// <summary>Log-sd for a size that is not known: wings for one person differ by about 20 % in area either way (common practice, no source).</summary>
    private const double UnknownSizeLogSd = 0.25;

    /// <summary>Natural logarithm of the predicted median, (rad/s)/m.</summary>
    public required double LogMedian { get; init; }

    /// <summary>Standard deviation of the logarithm of a new wing's sensitivity: that of the normal with the prediction's 95 % interval.</summary>
    public required double LogSd { get; init; }

    /// <summary>Wings it rests on.</summary>
    public required int Wings { get; init; }

    /// <summary>Standard deviation between wings, of the logarithm: posterior mean.</summary>
    public required double BetweenLogSd { get; init; }

    /// <summary>Wings that behave otherwise than the rest and were set aside, by the job that measured them first.</summary>
    public ImmutableArray<SetAsideWing> SetAside { get; init; } = [];

    /// <summary>Median, (rad/s)/m.</summary>
    public double RadPerSecPerM => Math.Exp(LogMedian);

    /// <summary>95 % interval of a new wing's sensitivity, (rad/s)/m.</summary>
    public ConfidenceInterval Interval95 => new(Math.Exp(LogMedian - (1.96 * LogSd)), Math.Exp(LogMedian + (1.96 * LogSd)), 0.95);

    /// <summary>What the measured wings say about a wing of some area and load.</summary>
    /// <param name="measured">Measurements of the book; several of one wing, or of one job without a wing's name, count as one study.</param>
    /// <param name="wingAreaM2">Area of the new wing, m²; null when not known.</param>
    /// <param name="suspendedKg">Load of the new wing, kg; above 0.</param>
    /// <returns>Null with fewer than <see cref="FewestWings"/> wings.</returns>
    public static ShopMemory? Of(IEnumerable<MeasuredSensitivity> measured, double? wingAreaM2, double suspendedKg)
    {
        ArgumentNullException.ThrowIfNull(measured);
        Guard.Positive(suspendedKg);
        List<Study> studies = [.. measured.GroupBy(m => m.WingId.Length > 0 ? "wing " + m.WingId : FormattableString.Invariant($"job {m.Job}"), StringComparer.Ordinal)
            .Select(g => Study.Of([.. g.Select(m => Moved(m, wingAreaM2, suspendedKg))])).OrderBy(s => s.Job)];
        var aside = new List<SetAsideWing>();
        // The one that fits the others least goes first: while it is among them it hides the next.
        while (studies.Count > FewestWings)
        {
            (Study Study, double P) worst = studies.Select(s => (s, AmongOthers(s, studies))).MinBy(s => s.Item2);
            double p = Math.Min(1, studies.Count * worst.P); // Bonferroni: as many wings were looked at
            if (p >= ConflictP)
                break;
            aside.Add(new(worst.Study.Job, worst.Study.WingId, Math.Exp(worst.Study.LogMedian), p));
            studies.Remove(worst.Study);
        }
        if (studies.Count < FewestWings)
            return null;
        RandomEffectsPrediction prediction = Predict(studies);
        return new ShopMemory
        {
            LogMedian = prediction.Mean,
            LogSd = prediction.StandardDeviation,
            Wings = studies.Count,
            BetweenLogSd = prediction.BetweenSd,
            SetAside = [.. aside.OrderBy(a => a.Job)],
        };
    }

    /// <summary>Prior-predictive p of a measurement of the new wing: how often a wing like the shop's would lie at least as far off.</summary>
    /// <param name="logMedian">Natural logarithm of what was measured, (rad/s)/m.</param>
    /// <param name="logSd">Its standard deviation; not negative.</param>
    public double PriorPredictiveP(double logMedian, double logSd) =>
        2 * StandardNormal.Cdf(-Math.Abs(Guard.Finite(logMedian) - LogMedian) / Math.Sqrt((LogSd * LogSd) + (logSd * logSd)));

    /// <summary>p of a wing under what the others predict for its own size, its own error included.</summary>
    private static double AmongOthers(Study study, List<Study> all) =>
        Predict([.. all.Where(s => s != study).Select(s => s with { Area = s.Area - study.Area, Loading = s.Loading - study.Loading })]).TailProbability(study.LogMedian, study.Variance);

    private static RandomEffectsPrediction Predict(IReadOnlyList<Study> studies) => RandomEffectsPrediction.Of([.. studies.Select(s => s.LogMedian)],
        [.. studies.Select(s => s.Variance)], BetweenScale, [[.. studies.Select(s => s.Area)], [.. studies.Select(s => s.Loading)]], ExponentSd);

    /// <summary>A measurement as it would be on a wing of another area and load, by the usual exponents.</summary>
    private static Study Moved(MeasuredSensitivity m, double? areaM2, double suspendedKg)
    {
        double variance = m.LogSd * m.LogSd;
        if (areaM2 is not double wanted) // sizes are then part of what lies between the wings
            return new(m.Job, m.WingId, m.LogMedian, variance, 0, 0);
        if (m.WingAreaM2 is not double own)
            return new(m.Job, m.WingId, m.LogMedian, variance + (UnknownSizeLogSd * UnknownSizeLogSd), 0, 0);
        double area = Math.Log(wanted / own), loading = Math.Log(suspendedKg / m.SuspendedKg) - area;
        return new(m.Job, m.WingId, m.LogMedian + (AreaExponent * area) + (LoadingExponent * loading), variance, area, loading);
    }

    /// <summary>One wing.</summary>
    /// <param name="Job">Job that measured it first.</param>
    /// <param name="WingId">What tells it from others.</param>
    /// <param name="LogMedian">Logarithm of its sensitivity, brought to the new wing's size.</param>
    /// <param name="Variance">Its variance.</param>
    /// <param name="Area">Logarithm of the new wing's area over its own.</param>
    /// <param name="Loading">The same of the load per area.</param>
    private sealed record Study(long Job, string WingId, double LogMedian, double Variance, double Area, double Loading)
    {
        /// <summary>Several measurements of one wing: their mean, with the model error that they share left whole.</summary>
        public static Study Of(Study[] measured)
        {
            if (measured.Length == 1)
                return measured[0];
            const double model = TrimPosterior.ModelErrorLogSd * TrimPosterior.ModelErrorLogSd;
            double[] weights = [.. measured.Select(m => 1 / Math.Max(m.Variance - model, 1e-4))];
            double total = weights.Sum();
            double Mean(Func<Study, double> value) => measured.Zip(weights, (m, w) => w * value(m)).Sum() / total;
            return new(measured.Min(m => m.Job), measured[0].WingId, Mean(m => m.LogMedian), (1 / total) + model, Mean(m => m.Area), Mean(m => m.Loading));
        }
    }
}
