using System.Collections.Immutable;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Analysis;

/// <summary>What a workshop's own jobs say about the sensitivity of the next wing, before it has flown.</summary>
/// <remarks>Random effects on the logarithm, one study a wing, brought to the new wing's area and load (DEVELOPERS.md, "The shop's memory").
/// Variance between by Paule and Mandel, error of the mean by Hartung and Knapp, never below the plain one; the prediction has k − 2 degrees of
/// freedom (J. P. T. Higgins, S. G. Thompson &amp; D. J. Spiegelhalter, J. R. Stat. Soc. A 172 (2009) 137, eq. 12).</remarks>
public sealed record ShopMemory
{
    /// <summary>Word of this source in results.</summary>
    public const string Kind = "shop_memory";

    /// <summary>Fewest wings that say anything about the spread between wings: k − 2 degrees of freedom need three.</summary>
    public const int FewestWings = 3;

    /// <summary>A wing whose p among the others is below this is set aside and named (the level of every conflict).</summary>
    public const double ConflictP = 0.05;

    // Geometrically similar wings at one lift coefficient: the roll moment W e over dynamic pressure, area and span gives C_l = C_L e/b, and a
    // steady turn has r b/(2 V) in proportion to C_l, so S = r/e goes as V/b², that is (m/A)^(1/2)/A. Wings of a line are not scale copies, so
    // each exponent carries a standard deviation of a half (assumed, no source).
    private const double AreaExponent = -1, LoadingExponent = 0.5, ExponentSd = 0.5;

    /// <summary>Log-sd for a size that is not known: wings for one person differ by about 20 % in area either way (common practice, no source).</summary>
    private const double UnknownSizeLogSd = 0.25;

    /// <summary>Natural logarithm of the predicted median, (rad/s)/m.</summary>
    public required double LogMedian { get; init; }

    /// <summary>Standard deviation of the logarithm of a new wing's sensitivity: that of the normal with the prediction's 95 % interval.</summary>
    public required double LogSd { get; init; }

    /// <summary>Wings it rests on.</summary>
    public required int Wings { get; init; }

    /// <summary>Standard deviation between wings, of the logarithm.</summary>
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
            if (worst.P >= ConflictP)
                break;
            aside.Add(new(worst.Study.Job, worst.Study.WingId, Math.Exp(worst.Study.LogMedian), worst.P));
            studies.Remove(worst.Study);
        }
        if (studies.Count < FewestWings)
            return null;
        Prediction prediction = Prediction.From(studies);
        return new ShopMemory
        {
            LogMedian = prediction.Mean,
            LogSd = prediction.Sd,
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

    /// <summary>p of a wing under what the others predict, its own error included.</summary>
    private static double AmongOthers(Study study, List<Study> all)
    {
        Prediction others = Prediction.From([.. all.Where(s => s != study)]);
        return 2 * StandardNormal.Cdf(-Math.Abs(study.LogMedian - others.Mean) / Math.Sqrt((others.Sd * others.Sd) + study.Variance));
    }

    /// <summary>A measurement as it would be on a wing of another area and load.</summary>
    private static MeasuredSensitivity Moved(MeasuredSensitivity m, double? areaM2, double suspendedKg)
    {
        if (m.WingAreaM2 is not double own || areaM2 is not double wanted)
            return m with { LogSd = Math.Sqrt((m.LogSd * m.LogSd) + (UnknownSizeLogSd * UnknownSizeLogSd)) };
        double area = Math.Log(wanted / own), loading = Math.Log(suspendedKg / m.SuspendedKg) - area;
        double spread = ExponentSd * ExponentSd * ((area * area) + (loading * loading));
        return m with { LogMedian = m.LogMedian + (AreaExponent * area) + (LoadingExponent * loading), LogSd = Math.Sqrt((m.LogSd * m.LogSd) + spread) };
    }

    /// <summary>One wing.</summary>
    private sealed record Study(long Job, string WingId, double LogMedian, double Variance)
    {
        /// <summary>Several measurements of one wing: their mean, with the model error that they share left whole.</summary>
        public static Study Of(MeasuredSensitivity[] measured)
        {
            const double model = TrimPosterior.ModelErrorLogSd * TrimPosterior.ModelErrorLogSd;
            double weights = 0, sum = 0;
            foreach (MeasuredSensitivity m in measured)
            {
                double weight = 1 / Math.Max((m.LogSd * m.LogSd) - model, 1e-4);
                weights += weight;
                sum += weight * m.LogMedian;
            }
            return measured.Length == 1
                ? new(measured[0].Job, measured[0].WingId, measured[0].LogMedian, measured[0].LogSd * measured[0].LogSd)
                : new(measured.Min(m => m.Job), measured[0].WingId, sum / weights, (1 / weights) + model);
        }
    }

    /// <summary>Distribution of the next wing.</summary>
    private sealed record Prediction(double Mean, double Sd, double BetweenSd)
    {
        public static Prediction From(IReadOnlyList<Study> studies)
        {
            RandomEffectsFit fit = RandomEffects.PauleMandel([.. studies.Select(s => s.LogMedian)], [.. studies.Select(s => s.Variance)]);
            double error = Math.Max(fit.HartungKnappStandardError ?? double.PositiveInfinity, fit.Mean.StandardError);
            double sd = Math.Sqrt(fit.BetweenVariance + (error * error));
            double widen = StudentT.TwoSidedFactor(0.95, Math.Max(1, studies.Count - 2)) / StandardNormal.Quantile(0.975);
            return new(fit.Mean.Value, widen * sd, Math.Sqrt(fit.BetweenVariance));
        }
    }
}
