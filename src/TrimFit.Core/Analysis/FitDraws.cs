using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Core.Analysis;

/// <summary>A fit's coefficients over x = T/T_full, with a covariance widened so that a normal has the t interval's width.</summary>
internal sealed class FitDraws
{
    /// <summary>Share of the curvature's information that its shrinkage prior may be credited with: all of it would leave none from the data.</summary>
    private const double MostPriorShare = 0.95;

    private readonly double _c00, _c01, _c02, _c11, _c12, _c22, _priorPrecision;
    private readonly double _i11, _i12, _i22;
    private readonly double[] _onCgShift = new double[3];

    public FitDraws(TurnFit fit, double fullThrust)
    {
        SlopeKnown = fit[TurnCoefficient.Constant] is not null && fit[TurnCoefficient.Thrust] is not null;
        int n = fit.Coefficients.Length;
        double unit = fullThrust, square = fullThrust * fullThrust;
        double widen = StudentT.Quantile(0.975, fit.DegreesOfFreedom) / StandardNormal.Quantile(0.975);
        widen *= widen;
        Constant = fit[TurnCoefficient.Constant]?.Value ?? 0;
        Slope = (fit[TurnCoefficient.Thrust]?.Value ?? 0) * unit;
        Curvature = (fit[TurnCoefficient.ThrustSquared]?.Value ?? 0) * square;
        _c00 = fit.Covariance[0] * widen;
        _c01 = fit.Covariance[1] * unit * widen;
        _c02 = fit.Covariance[2] * square * widen;
        _c11 = fit.Covariance[n + 1] * unit * unit * widen;
        _c12 = fit.Covariance[n + 2] * unit * square * widen;
        _c22 = fit.Covariance[(2 * n) + 2] * square * square * widen;
        double tiny = 1e-12 + (1e-9 * _c11); // a curvature that was not fitted has no variance; keep the inverse finite
        double a = _c11 + tiny, b = _c12, d = _c22 + tiny, determinant = (a * d) - (b * b);
        if (!(determinant > 1e-12 * a * d))
        {
            b *= 0.999;
            determinant = (a * d) - (b * b);
        }
        (_i11, _i12, _i22) = (d / determinant, -b / determinant, a / determinant);
        if (SlopeKnown && fit.Method == FilterErrorEstimator.MethodName && fit[TurnCoefficient.ThrustSquared] is not null)
        {
            // The fit shrank the curvature by a prior; what the flight itself says is the fit without that prior.
            double priorSd = new FilterErrorOptions().CurvaturePriorSd(Slope, _c11);
            _priorPrecision = Math.Min(1 / (priorSd * priorSd), MostPriorShare / d);
        }
        CurvatureShrink = 1 - (_priorPrecision * _c22);

        int at = -1;
        for (int i = 0; i < n; i++)
        {
            if (fit.Coefficients[i].Name == TurnCoefficient.CgShift && fit.Coefficients[i].Estimate is not null)
                at = i;
        }
        if (at < 0 || !SlopeKnown)
            return;
        CgShift = fit.Coefficients[at].Estimate!.Value.Value;
        double[] cross = [fit.Covariance[at * n] * widen, fit.Covariance[(at * n) + 1] * unit * widen, fit.Covariance[(at * n) + 2] * square * widen];
        double own = fit.Covariance[(at * n) + at] * widen;
        CgShiftSd = Math.Sqrt(own);
        double[] all = [_c00 + tiny, _c01, _c02, _c01, _c11 + tiny, _c12, _c02, _c12, _c22 + tiny];
        double explained = 0;
        if (SmallCovariance.TryInvert(all, 3) is double[] inverse)
        {
            for (int i = 0; i < 3; i++)
            {
                for (int j = 0; j < 3; j++)
                    _onCgShift[i] += inverse[(i * 3) + j] * cross[j];
                explained += _onCgShift[i] * cross[i];
            }
        }
        CgShiftVarianceGiven = Math.Max(own - explained, 1e-6 * own);
    }

    public double Constant { get; }
    /// <summary>Per full thrust.</summary>
    public double Slope { get; }
    public double Curvature { get; }
    public bool SlopeKnown { get; }
    public double SlopeSd => Math.Sqrt(_c11);
    /// <summary>What is left of a curvature once the fit has shrunk it.</summary>
    public double CurvatureShrink { get; }
    /// <summary>Turn per known CG shift, (rad/s)/m; null when no such leg was flown.</summary>
    public double? CgShift { get; }
    public double CgShiftSd { get; }
    public double CgShiftVarianceGiven { get; }

    /// <summary>Best factor a for (slope, curvature) = a (g1, g2), and its standard deviation.</summary>
    public (double Best, double Sd) BestFactor(double g1, double g2)
    {
        double information = (g1 * g1 * _i11) + (2 * g1 * g2 * _i12) + (g2 * g2 * (_i22 - _priorPrecision));
        double score = (g1 * ((_i11 * Slope) + (_i12 * Curvature))) + (g2 * ((_i12 * Slope) + (_i22 * Curvature)));
        return information > 0 ? (score / information, 1 / Math.Sqrt(information)) : (0, double.PositiveInfinity);
    }

    /// <summary>Logarithm of the likelihood of slope and curvature, up to a constant.</summary>
    public double LogLikelihood(double slope, double curvature)
    {
        double d1 = Slope - slope, d2 = Curvature - curvature;
        return -0.5 * ((d1 * d1 * _i11) + (2 * d1 * d2 * _i12) + (d2 * d2 * _i22) - (_priorPrecision * curvature * curvature));
    }

    /// <summary>The constant from its conditional given slope and curvature per full thrust.</summary>
    public double ConstantGiven(double slope, double curvature, double standardNormal)
    {
        double w1 = (_c01 * _i11) + (_c02 * _i12), w2 = (_c01 * _i12) + (_c02 * _i22);
        double variance = Math.Max(0, _c00 - ((w1 * _c01) + (w2 * _c02)));
        return Constant + (w1 * (slope - Slope)) + (w2 * (curvature - Curvature)) + (Math.Sqrt(variance) * standardNormal);
    }

    /// <summary>Turn per known CG shift given the other coefficients.</summary>
    public double CgShiftGiven(double constant, double slope, double curvature) =>
        CgShift!.Value + (_onCgShift[0] * (constant - Constant)) + (_onCgShift[1] * (slope - Slope)) + (_onCgShift[2] * (curvature - Curvature));

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
