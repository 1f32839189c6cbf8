using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>Draws of everything the answer depends on, weighted by how well each explains what the flight shows.</summary>
/// <remarks>Importance sampling (DEVELOPERS.md, "Sensitivity"): each draw has a rig, a yaw ratio and turn coefficients. Each source j of the
/// sensitivity (torque through the fitted growth, a ballast leg, another flight) sees a_j = S times its own model error; a_j is drawn half from
/// its prior and half from the likelihood's own normal, and weighted by prior × likelihood over that mixture. The a's together are log-normal
/// around S, so S comes from its exact conditional. With torque the constant comes from its conditional on slope and curvature.</remarks>
internal sealed class TrimPosterior
{
    /// <summary>Prior of the sensitivity: 0.09 deg/s per mm, times or over 3 at 95 % (model page section 3).</summary>
    public static readonly double PriorMedian = double.DegreesToRadians(0.09) * 1000;
    public static readonly double PriorLogSd = Math.Log(3) / 1.96;

    /// <summary>Prior of the yaw ratio: median 1.5, 0.5 to 4.5 at 95 % (model page section 1).</summary>
    private const double YawRatioMedian = 1.5;
    private static readonly double _yawRatioLogSd = Math.Log(3) / 1.96;

    /// <summary>Model error of every source but the user's, log-sd (model page section 3).</summary>
    internal const double ModelErrorLogSd = 0.25;

    /// <summary>Gates of the torque source (model page section 3).</summary>
    private const double SameSignShare = 0.975, PositiveShare = 0.995, LargestLogSd = 0.5;

    /// <summary>Fewer effective draws than this make no interval.</summary>
    private const double FewestEffective = 50;

    /// <summary>Below this many effective draws the posterior is drawn again with more.</summary>
    private const double WantedEffective = 200;
    private const int MoreDraws = 5;

    /// <summary>A prior-predictive p below this is a conflict (model page section 3).</summary>
    private const double ConflictP = 0.05;

    private TrimPosterior(int count)
    {
        Rigs = new RigValues[count];
        Sensitivity = new double[count];
        YawRatio = new double[count];
        Constant = new double[count];
        Slope = new double[count];
        Curvature = new double[count];
        Weight = new double[count];
        BalanceError = new double[count];
        Leans = new KnownLeans(Rigs, YawRatio);
    }

    public RigValues[] Rigs { get; }
    public double[] Sensitivity { get; }
    public double[] YawRatio { get; }
    /// <summary>Coefficients of each draw over x = T/T_full, rad/s.</summary>
    public double[] Constant { get; }
    public double[] Slope { get; }
    public double[] Curvature { get; }
    public double[] Weight { get; }
    /// <summary>Hang-back and riser load of each draw, solved once for each thrust.</summary>
    public KnownLeans Leans { get; }
    /// <summary>Standard normal of each draw for the thrust of level flight.</summary>
    public double[] BalanceError { get; }
    public required SensitivityReport Report { get; init; }
    public required ImmutableArray<Finding> Findings { get; init; }
    /// <summary>Share of draws in which the rig predicts a slope to the right.</summary>
    public required double PredictsRightShare { get; init; }
    public required bool TorqueUsed { get; init; }
    /// <summary>Whether a ballast leg or another flight took part.</summary>
    public required bool DirectUsed { get; init; }
    public int Count => Weight.Length;

    /// <summary>The balance thrust of a draw, fraction of full: level flight is known to its standard error only.</summary>
    public double BalanceOf(int draw, PowerLevels levels) => Math.Max(0, levels.Balance + (levels.BalanceStdError * BalanceError[draw]));

    /// <summary>Turn rate of a draw at a fraction of full thrust, brakes even, rad/s.</summary>
    public double RateAt(int draw, double fraction) => Constant[draw] + (Slope[draw] * fraction) + (Curvature[draw] * fraction * fraction);

    /// <summary>Draws the posterior.</summary>
    /// <param name="rig">The rig.</param>
    /// <param name="spread">Its spreads.</param>
    /// <param name="fit">The turn model of the flight.</param>
    /// <param name="signals">The flight: full thrust, and the thrust of ballast legs.</param>
    /// <param name="options">Draws, seed, other flights.</param>
    /// <param name="allowed">Sources that may enter.</param>
    public static TrimPosterior Draw(
        Rig rig, RigSpread spread, TurnFit fit, TurnSignals signals, TrimOptions options, SensitivitySources allowed = SensitivitySources.All)
    {
        TrimPosterior posterior = Once(rig, spread, fit, signals, options, allowed);
        // Sources that agree only in a corner of the priors leave few draws with weight; more of them cost time, too few cost the interval's ends.
        return posterior.Report.EffectiveSamples < WantedEffective
            ? Once(rig, spread, fit, signals, options with { Draws = MoreDraws * options.Draws }, allowed)
            : posterior;
    }

    private static TrimPosterior Once(Rig rig, RigSpread spread, TurnFit fit, TurnSignals signals, TrimOptions options, SensitivitySources allowed)
    {
        int count = options.Draws;
        var random = new SeededRandom(options.Seed);
        var c = new FitDraws(fit, signals.FullThrust);
        List<SensitivityEvidence> direct = SensitivityEvidence.Of(c, signals, options, allowed);
        double userLogSd = 0, userMedian = 0;
        if (rig.Wing.SensitivityRadPerSecPerM is Reading user)
        {
            userMedian = user.Value;
            userLogSd = Math.Max(user.StandardDeviation / user.Value, 0.02);
        }
        // The user's value and the prior are both log-normal: their product is too.
        (double logMedian, double logSd) = Combine(Math.Log(PriorMedian), PriorLogSd, userMedian, userLogSd);

        var parabola = new FlownParabola(signals);
        var g1 = new double[count];
        var g2 = new double[count];
        var rigs = new RigValues[count];
        var yaw = new double[count];
        for (int k = 0; k < count; k++)
        {
            rigs[k] = spread.Draw(random);
            yaw[k] = YawRatioMedian * Math.Exp(_yawRatioLogSd * random.NextNormal());
            (g1[k], g2[k]) = parabola.Of(rigs[k], yaw[k]);
        }
        double right = g1.Count(g => g > 0) / (double)count;

        // Each source by itself: S = what was measured / what a unit of S would do, both drawn.
        var alone = new double[count];
        int sameSlope = 0, positive = 0;
        double slopeSign = Math.Sign(c.Slope);
        for (int k = 0; k < count; k++)
        {
            double slope = c.Slope + (c.SlopeSd * random.NextNormal());
            if (Math.Sign(slope) == slopeSign)
                sameSlope++;
            alone[k] = slope / g1[k] * Math.Exp(ModelErrorLogSd * random.NextNormal());
            if (alone[k] > 0)
                positive++;
        }
        double sameGrowth = Math.Max(right, 1 - right);
        SourceAlone torqueAlone = SourceAlone.Of("torque", alone);
        bool plausible = spread.Propulsion.Plausible && rig.Propeller.RotationSign != 0;
        int gate = !c.SlopeKnown || !plausible ? 0
            : sameSlope < SameSignShare * count || sameGrowth < SameSignShare ? 1
            : positive < PositiveShare * count ? 2
            : !(torqueAlone.LogSd < LargestLogSd) ? 3 : 4;
        bool torque = gate == 4 && allowed.HasFlag(SensitivitySources.Torque);
        var directAlone = new List<SourceAlone>();
        foreach (SensitivityEvidence evidence in direct)
        {
            var values = new double[count];
            for (int k = 0; k < count; k++)
            {
                (double constant, double slope, double curvature) = c.Draw(random);
                (double best, double sd, _) = evidence.Best(rigs[k], yaw[k], constant, slope, curvature, k);
                values[k] = (best + (double.IsFinite(sd) ? sd * random.NextNormal() : 0)) * Math.Exp(ModelErrorLogSd * random.NextNormal());
            }
            directAlone.Add(SourceAlone.Of(evidence.Kind, values));
        }

        // The workshop's memory is log-normal, so with its model error it joins the prior, unless this flight's own evidence speaks against it.
        ShopMemory? memory = allowed.HasFlag(SensitivitySources.Memory) ? options.ShopMemory : null;
        MemoryConflict? against = memory is null ? null : MemoryConflict.Of(memory, userMedian, userLogSd, torque ? torqueAlone : null, directAlone, ConflictP);
        (double ownLogMedian, double ownLogSd) = (logMedian, logSd);
        if (memory is not null && against is null)
            (logMedian, logSd) = Combine(logMedian, logSd, memory.RadPerSecPerM, Math.Sqrt((memory.LogSd * memory.LogSd) + (ModelErrorLogSd * ModelErrorLogSd)));

        var logWeight = new double[count];
        var sensitivity = new double[count];
        var slopes = new double[count];
        var curvatures = new double[count];
        var constants = new double[count];
        var balanceError = new double[count];
        double combinedSd = Math.Sqrt((logSd * logSd) + (ModelErrorLogSd * ModelErrorLogSd));
        double predictiveBelow = 0, curvatureBelow = 0;
        Span<double> logs = stackalloc double[direct.Count + 1];
        for (int k = 0; k < count; k++)
        {
            int used = 0;
            logWeight[k] = 0;
            if (torque)
            {
                (double best, double sd) = c.BestFactor(g1[k], g2[k]);
                double a = DrawFactor(best, sd, out double logProposal);
                slopes[k] = a * g1[k];
                curvatures[k] = a * g2[k];
                constants[k] = c.ConstantGiven(slopes[k], curvatures[k], random.NextNormal());
                if (a > 0)
                {
                    logWeight[k] += c.LogLikelihood(slopes[k], curvatures[k]) - logProposal;
                    logs[used++] = Math.Log(a);
                }
                else
                {
                    logWeight[k] = double.NegativeInfinity;
                }
            }
            else
            {
                (constants[k], slopes[k], curvatures[k]) = c.Draw(random);
            }
            foreach (SensitivityEvidence evidence in direct)
            {
                (double best, double sd, double peak) = evidence.Best(rigs[k], yaw[k], constants[k], slopes[k], curvatures[k], k);
                double a = DrawFactor(best, sd, out double logProposal);
                if (a > 0 && double.IsFinite(logWeight[k]))
                {
                    double z = double.IsFinite(sd) ? (a - best) / sd : 0;
                    logWeight[k] += peak - (0.5 * z * z) - logProposal;
                    logs[used++] = Math.Log(a);
                }
                else
                {
                    logWeight[k] = double.NegativeInfinity;
                }
            }
            if (!double.IsFinite(logWeight[k]))
                used = 0;
            logWeight[k] += LogPriorOf(logs[..used], logMedian, logSd);
            // S given the a's: precisions add.
            double precision = (1 / (logSd * logSd)) + (used / (ModelErrorLogSd * ModelErrorLogSd));
            double mean = logMedian / (logSd * logSd);
            for (int i = 0; i < used; i++)
                mean += logs[i] / (ModelErrorLogSd * ModelErrorLogSd);
            sensitivity[k] = Math.Exp((mean / precision) + (random.NextNormal() / Math.Sqrt(precision)));
            balanceError[k] = random.NextNormal();

            double predicted = Math.Exp(logMedian + (combinedSd * random.NextNormal()));
            (double noiseSlope, double noiseCurvature) = c.Noise(random);
            if ((predicted * g1[k]) + noiseSlope <= c.Slope)
                predictiveBelow++;
            if ((predicted * g2[k] * c.CurvatureShrink) + noiseCurvature <= c.Curvature)
                curvatureBelow++;

            // Half from the prior, half from the likelihood's own normal; wider than it, so that weights stay bounded.
            double DrawFactor(double best, double sd, out double logProposal)
            {
                double wide = 1.2 * sd;
                bool mix = best > 0 && double.IsFinite(wide);
                double a = mix && random.NextDouble() < 0.5 ? best + (wide * random.NextNormal()) : Math.Exp(logMedian + (combinedSd * random.NextNormal()));
                logProposal = 0;
                if (a > 0)
                {
                    double prior = LogNormalDensity(a, logMedian, combinedSd);
                    logProposal = Math.Log(mix ? (0.5 * prior) + (0.5 * NormalDensity(a, best, wide)) : prior);
                }
                return a;
            }
        }
        double[] weight = Normalised(logWeight);
        double p = Math.Min(1, 2 * Math.Min(TwoSided(predictiveBelow / count), TwoSided(curvatureBelow / count))); // two looks: Bonferroni
        double effective = EffectiveSamples.Kish(weight);
        bool enough = (!torque && direct.Count == 0) || effective > FewestEffective;
        var findings = ImmutableArray.CreateBuilder<Finding>();
        if (c.SlopeKnown && plausible && !torque && allowed.HasFlag(SensitivitySources.Torque))
            findings.Add(Finding.Of(FindingCode.TorqueNotUsed, gate));
        bool conflict = torque && p < ConflictP;
        if (conflict)
            findings.Add(Finding.Of(FindingCode.SensitivityConflict, p, c.Slope / (Math.Exp(logMedian) * QuantileType7.Of(g1, 0.5))));
        if (against is not null)
            findings.Add(Finding.Of(FindingCode.ShopMemoryConflict, SourceAlone.IndexOf(against.Kind), against.Ratio, against.P));
        var settled = new SourceAlone("prior", Math.Exp(ownLogMedian), ownLogSd, 1, new ConfidenceInterval());
        SourceAlone[] together = [settled, .. torque ? [torqueAlone] : Array.Empty<SourceAlone>(), .. directAlone];
        foreach ((SourceAlone first, SourceAlone second, double clash) in SourceAlone.Clashes(together, ConflictP))
        {
            conflict = true;
            findings.Add(Finding.Of(FindingCode.SourcesConflict, SourceAlone.IndexOf(first.Kind), SourceAlone.IndexOf(second.Kind), second.Median / first.Median, clash));
        }

        var sources = ImmutableArray.CreateBuilder<SensitivitySource>();
        sources.Add(LogNormalSource("prior", Math.Log(PriorMedian), PriorLogSd, used: true));
        if (userMedian > 0)
            sources.Add(LogNormalSource("user", Math.Log(userMedian), userLogSd, used: true));
        if (memory is not null)
            sources.Add(new(ShopMemory.Kind, memory.RadPerSecPerM, memory.Interval95, against is null));
        if (c.SlopeKnown && plausible && positive > count / 2)
            sources.Add(new("torque", torqueAlone.Median, torqueAlone.Interval95, torque));
        sources.AddRange(directAlone.Select(d => new SensitivitySource(d.Kind, d.Median, d.Interval95, true)));
        var posterior = new TrimPosterior(count)
        {
            PredictsRightShare = right,
            TorqueUsed = torque,
            DirectUsed = direct.Count > 0,
            Findings = findings.ToImmutable(),
            Report = new SensitivityReport
            {
                RadPerSecPerM = enough ? WeightedQuantile.Of(sensitivity, weight, 0.5) : null,
                Interval95 = enough ? Interval95(sensitivity, weight) : null,
                Sources = sources.ToImmutable(),
                Conflict = conflict,
                EffectiveSamples = effective,
                PriorPredictiveP = torque ? p : null,
                YawRatio = WeightedQuantile.Of(yaw, weight, 0.5),
                YawRatioInterval95 = Interval95(yaw, weight),
            },
        };
        rigs.CopyTo(posterior.Rigs, 0);
        sensitivity.CopyTo(posterior.Sensitivity, 0);
        yaw.CopyTo(posterior.YawRatio, 0);
        constants.CopyTo(posterior.Constant, 0);
        slopes.CopyTo(posterior.Slope, 0);
        curvatures.CopyTo(posterior.Curvature, 0);
        weight.CopyTo(posterior.Weight, 0);
        balanceError.CopyTo(posterior.BalanceError, 0);
        return posterior;
    }

    /// <summary>Logarithm of the joint prior density of the a's: log a_j = log S + its model error, S log-normal.</summary>
    private static double LogPriorOf(ReadOnlySpan<double> logs, double logMedian, double logSd)
    {
        double sum = 0, squares = 0, jacobian = 0, tau = ModelErrorLogSd * ModelErrorLogSd;
        foreach (double log in logs)
        {
            double d = log - logMedian;
            sum += d;
            squares += d * d;
            jacobian += log;
        }
        return (-0.5 * (squares - (sum * sum / (logs.Length + (tau / (logSd * logSd))))) / tau) - jacobian;
    }

    /// <summary>Weights from their logarithms, the largest 1; all alike when none is finite.</summary>
    private static double[] Normalised(double[] logWeight)
    {
        double largest = logWeight.Max();
        return double.IsFinite(largest) ? [.. logWeight.Select(w => Math.Exp(w - largest))] : [.. logWeight.Select(_ => 1.0)];
    }

    /// <summary>95 % interval of a weighted sample.</summary>
    public static ConfidenceInterval Interval95(double[] values, double[] weights) => MedianAndInterval95(values, weights).Interval;

    /// <summary>Median and 95 % interval of weighted draws.</summary>
    public static (double Median, ConfidenceInterval Interval) MedianAndInterval95(double[] values, double[] weights)
    {
        Span<double> quantiles = stackalloc double[3];
        WeightedQuantile.Of(values, weights, [0.025, 0.5, 0.975], quantiles);
        return (quantiles[1], new ConfidenceInterval(quantiles[0], quantiles[2], 0.95));
    }

    private static (double LogMedian, double LogSd) Combine(double logPrior, double priorSd, double userMedian, double userSd)
    {
        if (!(userMedian > 0))
            return (logPrior, priorSd);
        double wp = 1 / (priorSd * priorSd), wu = 1 / (userSd * userSd);
        return (((wp * logPrior) + (wu * Math.Log(userMedian))) / (wp + wu), 1 / Math.Sqrt(wp + wu));
    }

    private static SensitivitySource LogNormalSource(string kind, double logMedian, double logSd, bool used) =>
        new(kind, Math.Exp(logMedian), new(Math.Exp(logMedian - (1.96 * logSd)), Math.Exp(logMedian + (1.96 * logSd)), 0.95), used);

    private static double NormalDensity(double x, double mean, double sd) =>
        Math.Exp(-0.5 * (x - mean) * (x - mean) / (sd * sd)) / (sd * Math.Sqrt(2 * Math.PI));

    private static double LogNormalDensity(double x, double logMean, double logSd)
    {
        double z = (Math.Log(x) - logMean) / logSd;
        return Math.Exp(-0.5 * z * z) / (x * logSd * Math.Sqrt(2 * Math.PI));
    }

    private static double TwoSided(double below) => 2 * Math.Min(below, 1 - below);
}
