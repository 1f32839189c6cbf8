using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>Draws of everything the answer depends on, weighted by how well each explains the flight's growth of turn with thrust.</summary>
/// <remarks>Importance sampling of model page section 3: each draw has a rig, a yaw ratio and a sensitivity from their priors; its weight is
/// the likelihood of the fitted (thrust, thrust_squared). Sensitivity enters through a = S · model error, drawn from half its prior, half the
/// likelihood's own normal in a, and weighted by prior × likelihood over that mixture. Then the constant comes from its conditional.</remarks>
internal sealed class TrimPosterior
{
    /// <summary>Prior of the sensitivity: 0.09 deg/s per mm, times or over 3 at 95 % (model page section 3).</summary>
    public static readonly double PriorMedian = double.DegreesToRadians(0.09) * 1000;
    public static readonly double PriorLogSd = Math.Log(3) / 1.96;

    /// <summary>Prior of the yaw ratio: median 1.5, 0.5 to 4.5 at 95 % (model page section 1).</summary>
    private const double YawRatioMedian = 1.5;
    private static readonly double _yawRatioLogSd = Math.Log(3) / 1.96;

    /// <summary>Model error of every source but the user's, log-sd (model page section 3).</summary>
    private const double ModelErrorLogSd = 0.25;

    /// <summary>Gates of the torque source (model page section 3).</summary>
    private const double SameSignShare = 0.975, PositiveShare = 0.995, LargestLogSd = 0.5;

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
    }

    public RigValues[] Rigs { get; }
    public double[] Sensitivity { get; }
    public double[] YawRatio { get; }
    /// <summary>Coefficients of each draw over x = T/T_full, rad/s.</summary>
    public double[] Constant { get; }
    public double[] Slope { get; }
    public double[] Curvature { get; }
    public double[] Weight { get; }
    public required SensitivityReport Report { get; init; }
    public required ImmutableArray<Finding> Findings { get; init; }
    /// <summary>Share of draws in which the rig predicts a slope to the right.</summary>
    public required double PredictsRightShare { get; init; }
    public required bool TorqueUsed { get; init; }
    public int Count => Weight.Length;

    /// <summary>Turn rate of a draw at a fraction of full thrust, brakes even, rad/s.</summary>
    public double RateAt(int draw, double fraction) => Constant[draw] + (Slope[draw] * fraction) + (Curvature[draw] * fraction * fraction);

    public static TrimPosterior Draw(Rig rig, RigSpread spread, TurnFit fit, double fullThrust, TrimOptions options)
    {
        int count = options.Draws;
        var random = new SeededRandom(options.Seed);
        Coefficients c = Coefficients.From(fit, fullThrust);
        double userLogSd = 0, userMedian = 0;
        if (rig.Wing.SensitivityRadPerSecPerM is Reading user)
        {
            userMedian = user.Value;
            userLogSd = Math.Max(user.StandardDeviation / user.Value, 0.02);
        }
        // The user's value and the prior are both log-normal: their product is too.
        (double logMedian, double logSd) = Combine(Math.Log(PriorMedian), PriorLogSd, userMedian, userLogSd);

        var g1 = new double[count];
        var g2 = new double[count];
        var rigs = new RigValues[count];
        var yaw = new double[count];
        for (int k = 0; k < count; k++)
        {
            rigs[k] = spread.Draw(random);
            yaw[k] = YawRatioMedian * Math.Exp(_yawRatioLogSd * random.NextNormal());
            (g1[k], g2[k]) = Growth(rigs[k], yaw[k]);
        }
        double right = g1.Count(g => g > 0) / (double)count;

        // Torque by itself: S = slope / growth, both drawn.
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
        double[] logs = [.. alone.Where(s => s > 0).Select(s => Math.Log(s))];
        double torqueLogSd = logs.Length > 1 ? (QuantileType7.Of(logs, 0.975) - QuantileType7.Of(logs, 0.025)) / (2 * 1.96) : double.PositiveInfinity;
        bool plausible = spread.Propulsion.Plausible && rig.Propeller.RotationSign != 0;
        int gate = !c.SlopeKnown || !plausible ? 0
            : sameSlope < SameSignShare * count || sameGrowth < SameSignShare ? 1
            : positive < PositiveShare * count ? 2
            : !(torqueLogSd < LargestLogSd) ? 3 : 4;
        bool torque = gate == 4;

        var weight = new double[count];
        var sensitivity = new double[count];
        var slopes = new double[count];
        var curvatures = new double[count];
        var constants = new double[count];
        double combinedSd = Math.Sqrt((logSd * logSd) + (ModelErrorLogSd * ModelErrorLogSd));
        double shrink = logSd * logSd / (combinedSd * combinedSd);
        double predictiveBelow = 0;
        double curvatureBelow = 0;
        for (int k = 0; k < count; k++)
        {
            if (torque)
            {
                (double best, double sd) = c.BestFactor(g1[k], g2[k]);
                double wide = 1.2 * sd; // heavier than the likelihood, so that weights stay bounded
                bool mix = best > 0;
                double a = mix && random.NextDouble() < 0.5 ? best + (wide * random.NextNormal()) : Math.Exp(logMedian + (combinedSd * random.NextNormal()));
                if (!(a > 0))
                {
                    weight[k] = 0;
                    sensitivity[k] = Math.Exp(logMedian);
                    slopes[k] = c.Slope;
                    curvatures[k] = c.Curvature;
                    constants[k] = c.Constant;
                    continue;
                }
                double prior = LogNormalDensity(a, logMedian, combinedSd);
                double proposal = mix ? (0.5 * prior) + (0.5 * NormalDensity(a, best, wide)) : prior;
                weight[k] = prior * c.Likelihood(a * g1[k], a * g2[k]) / proposal;
                // a = S times the model error: S given a, both log-normal.
                double logS = logMedian + (shrink * (Math.Log(a) - logMedian)) + (logSd * Math.Sqrt(1 - shrink) * random.NextNormal());
                sensitivity[k] = Math.Exp(logS);
                slopes[k] = a * g1[k];
                curvatures[k] = a * g2[k];
                constants[k] = c.ConstantGiven(slopes[k], curvatures[k], random.NextNormal());
            }
            else
            {
                weight[k] = 1;
                sensitivity[k] = Math.Exp(logMedian + (logSd * random.NextNormal()));
                (constants[k], slopes[k], curvatures[k]) = c.Draw(random);
            }
            double predicted = Math.Exp(logMedian + (combinedSd * random.NextNormal()));
            (double noiseSlope, double noiseCurvature) = c.Noise(random);
            if ((predicted * g1[k]) + noiseSlope <= c.Slope)
                predictiveBelow++;
            if ((predicted * g2[k]) + noiseCurvature <= c.Curvature)
                curvatureBelow++;
        }
        double p = Math.Min(1, 2 * Math.Min(TwoSided(predictiveBelow / count), TwoSided(curvatureBelow / count))); // two looks: Bonferroni
        double effective = EffectiveSamples.Kish(weight);
        bool enough = !torque || effective > 50;
        var findings = ImmutableArray.CreateBuilder<Finding>();
        if (c.SlopeKnown && plausible && !torque)
            findings.Add(Finding.Of(FindingCode.TorqueNotUsed, gate));
        bool conflict = torque && p < ConflictP;
        if (conflict)
            findings.Add(Finding.Of(FindingCode.SensitivityConflict, p));

        var sources = ImmutableArray.CreateBuilder<SensitivitySource>();
        sources.Add(LogNormalSource("prior", Math.Log(PriorMedian), PriorLogSd, used: true));
        if (userMedian > 0)
            sources.Add(LogNormalSource("user", Math.Log(userMedian), userLogSd, used: true));
        if (c.SlopeKnown && plausible && logs.Length > count / 2)
        {
            sources.Add(new("torque", QuantileType7.Of(alone, 0.5),
                new ConfidenceInterval(QuantileType7.Of(alone, 0.025), QuantileType7.Of(alone, 0.975), 0.95), torque));
        }
        var posterior = new TrimPosterior(count)
        {
            PredictsRightShare = right,
            TorqueUsed = torque,
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
        return posterior;
    }

    /// <summary>95 % interval of a weighted sample.</summary>
    public static ConfidenceInterval Interval95(double[] values, double[] weights) =>
        new(WeightedQuantile.Of(values, weights, 0.025), WeightedQuantile.Of(values, weights, 0.975), 0.95);

    /// <summary>Growth of the turning offset over x = T/T_full: linear and quadratic part of a parabola through 0, half and full thrust.</summary>
    /// <remarks>x comes from rpm or throttle, so the draw's own full thrust belongs to x = 1 whatever the scale of the fit's newtons.</remarks>
    private static (double Linear, double Quadratic) Growth(in RigValues rig, double yawRatio)
    {
        double at0 = RigStatics.TurningOffset(rig, 0, yawRatio);
        double half = RigStatics.TurningOffset(rig, rig.FullThrustN / 2, yawRatio) - at0;
        double full = RigStatics.TurningOffset(rig, rig.FullThrustN, yawRatio) - at0;
        return ((4 * half) - full, (2 * full) - (4 * half));
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

    /// <summary>The fit's coefficients over x = T/T_full, with a covariance widened so that a normal has the t interval's width.</summary>
    private sealed class Coefficients
    {
        private double _c00, _c01, _c02, _c11, _c12, _c22;
        private double _i11, _i12, _i22;

        private Coefficients()
        {
        }

        public double Constant { get; private init; }
        /// <summary>Per full thrust.</summary>
        public double Slope { get; private init; }
        public double Curvature { get; private init; }
        public bool SlopeKnown { get; private init; }
        public double SlopeSd => Math.Sqrt(_c11);

        public static Coefficients From(TurnFit fit, double fullThrust)
        {
            bool known = fit[TurnCoefficient.Constant] is not null && fit[TurnCoefficient.Thrust] is not null;
            int n = fit.Coefficients.Length;
            double unit = fullThrust, square = fullThrust * fullThrust;
            double widen = StudentT.Quantile(0.975, fit.DegreesOfFreedom) / 1.959963984540054;
            widen *= widen;
            var c = new Coefficients
            {
                Constant = fit[TurnCoefficient.Constant]?.Value ?? 0,
                Slope = (fit[TurnCoefficient.Thrust]?.Value ?? 0) * unit,
                Curvature = (fit[TurnCoefficient.ThrustSquared]?.Value ?? 0) * square,
                SlopeKnown = known,
                _c00 = fit.Covariance[0] * widen,
                _c01 = fit.Covariance[1] * unit * widen,
                _c02 = fit.Covariance[2] * square * widen,
                _c11 = fit.Covariance[n + 1] * unit * unit * widen,
                _c12 = fit.Covariance[n + 2] * unit * square * widen,
                _c22 = fit.Covariance[(2 * n) + 2] * square * square * widen,
            };
            double tiny = 1e-12 + (1e-9 * c._c11); // a curvature that was not fitted has no variance; keep the inverse finite
            double a = c._c11 + tiny, b = c._c12, d = c._c22 + tiny, determinant = (a * d) - (b * b);
            if (!(determinant > 1e-12 * a * d))
            {
                b *= 0.999;
                determinant = (a * d) - (b * b);
            }
            (c._i11, c._i12, c._i22) = (d / determinant, -b / determinant, a / determinant);
            return c;
        }

        /// <summary>Best factor a for (slope, curvature) = a (g1, g2), and its standard deviation.</summary>
        public (double Best, double Sd) BestFactor(double g1, double g2)
        {
            double information = (g1 * g1 * _i11) + (2 * g1 * g2 * _i12) + (g2 * g2 * _i22);
            double score = (g1 * ((_i11 * Slope) + (_i12 * Curvature))) + (g2 * ((_i12 * Slope) + (_i22 * Curvature)));
            return information > 0 ? (score / information, 1 / Math.Sqrt(information)) : (0, double.PositiveInfinity);
        }

        public double Likelihood(double slope, double curvature)
        {
            double d1 = Slope - slope, d2 = Curvature - curvature;
            return Math.Exp(-0.5 * ((d1 * d1 * _i11) + (2 * d1 * d2 * _i12) + (d2 * d2 * _i22)));
        }

        /// <summary>The constant from its conditional given slope and curvature per full thrust.</summary>
        public double ConstantGiven(double slope, double curvature, double standardNormal)
        {
            double w1 = (_c01 * _i11) + (_c02 * _i12), w2 = (_c01 * _i12) + (_c02 * _i22);
            double variance = Math.Max(0, _c00 - ((w1 * _c01) + (w2 * _c02)));
            return Constant + (w1 * (slope - Slope)) + (w2 * (curvature - Curvature)) + (Math.Sqrt(variance) * standardNormal);
        }

        public (double Slope, double Curvature) Noise(SeededRandom random)
        {
            double sd1 = Math.Sqrt(_c11), z1 = random.NextNormal(), z2 = random.NextNormal();
            double b = sd1 > 0 ? _c12 / sd1 : 0;
            return (sd1 * z1, (b * z1) + (Math.Sqrt(Math.Max(0, _c22 - (b * b))) * z2));
        }

        public (double Constant, double Slope, double Curvature) Draw(SeededRandom random)
        {
            (double slope, double curvature) = Noise(random);
            slope += Slope;
            curvature += Curvature;
            return (ConstantGiven(slope, curvature, random.NextNormal()), slope, curvature);
        }
    }
}
