using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Core.Comparing;

/// <summary>The flights of all settings in one likelihood: coefficients per setting, one constant pull per flight that scatters, its standard deviation
/// integrated out.</summary>
/// <remarks>b_i ~ N(θ_setting(i) + u_i (1, 0, 0), V_i), u_i ~ N(0, σ²). For each σ of its prior θ is generalised least squares, and σ is weighted by the
/// restricted likelihood. Three flights or more of a setting: random effects by DerSimonian and Laird with the interval of Hartung and
/// Knapp, factor not below 1, for each quantity by itself.</remarks>
internal sealed class PooledFlights
{
    /// <summary>From this many flights a setting's own flights tell the scatter.</summary>
    public const int FewestForRandomEffects = 3;

    private const int Nodes = 32;

    /// <summary>Equal slices of a t distribution or a normal where two quantities are combined by their quantiles.</summary>
    private const int Slices = 100;

    private readonly FlightEstimate[] _flights;
    private readonly int[][] _ofSetup;
    private readonly double[] _sd, _weight;
    private readonly double[][][] _theta;      // by σ, setting
    private readonly double[][][] _covariance; // by σ, setting
    private readonly bool _known;

    public PooledFlights(FlightEstimate[] flights, int[][] ofSetup, FlightScatter scatter)
    {
        (_flights, _ofSetup, _known) = (flights, ofSetup, scatter.IsKnown);
        bool all = !_known && ofSetup.All(s => s.Length >= FewestForRandomEffects);
        _sd = [.. scatter.Nodes(all ? 1 : Nodes)];
        _weight = new double[_sd.Length];
        _theta = new double[_sd.Length][][];
        _covariance = new double[_sd.Length][][];
        for (int g = 0; g < _sd.Length; g++)
        {
            _theta[g] = new double[ofSetup.Length][];
            _covariance[g] = new double[ofSetup.Length][];
            double logLikelihood = 0;
            for (int s = 0; s < ofSetup.Length; s++)
            {
                (_theta[g][s], _covariance[g][s], double part) = Pool(ofSetup[s], _sd[g]);
                logLikelihood += part;
            }
            _weight[g] = logLikelihood;
        }
        double largest = _weight.Max();
        for (int g = 0; g < _weight.Length; g++)
            _weight[g] = Math.Exp(_weight[g] - largest);
        double total = _weight.Sum();
        for (int g = 0; g < _weight.Length; g++)
            _weight[g] /= total;
    }

    /// <summary>A linear quantity of one setting, by value of σ.</summary>
    public sealed record Quantity(PullDistribution.Part[] ByNode);

    public PoolingMethod MethodOf(int setup) =>
        !_known && _ofSetup[setup].Length >= FewestForRandomEffects ? PoolingMethod.RandomEffects : PoolingMethod.AssumedScatter;

    /// <summary>row · coefficients of a setting.</summary>
    /// <param name="setup">The setting.</param>
    /// <param name="row">Three weights over (1, x, x²).</param>
    /// <param name="extraVariance">Variance that comes on top, such as from not knowing the thrust of level flight.</param>
    public Quantity Of(int setup, ReadOnlySpan<double> row, double extraVariance = 0)
    {
        var parts = new PullDistribution.Part[_sd.Length];
        if (MethodOf(setup) == PoolingMethod.RandomEffects)
        {
            int[] flights = _ofSetup[setup];
            double[] values = new double[flights.Length], variances = new double[flights.Length];
            for (int i = 0; i < flights.Length; i++)
                (values[i], variances[i]) = (Dot(row, _flights[flights[i]].Coefficients), Form(row, _flights[flights[i]].Covariance));
            Array.Fill(parts, Effects(values, variances, extraVariance));
        }
        else
        {
            for (int g = 0; g < parts.Length; g++)
                parts[g] = new(1, Dot(row, _theta[g][setup]), Math.Sqrt(Form(row, _covariance[g][setup]) + extraVariance), double.PositiveInfinity);
        }
        return new(parts);
    }

    /// <summary>The brakes' coefficient of a setting, which has no scatter of its own; null when none of its flights has it.</summary>
    public Quantity? BrakeOf(int setup)
    {
        Estimate[] found = [.. _ofSetup[setup].Select(i => _flights[i].Brake).OfType<Estimate>()];
        if (found.Length == 0)
            return null;
        double[] values = [.. found.Select(e => e.Value)], variances = [.. found.Select(e => e.StandardError * e.StandardError)];
        PullDistribution.Part part;
        if (!_known && found.Length >= FewestForRandomEffects)
        {
            part = Effects(values, variances, 0);
        }
        else
        {
            Estimate mean = RandomEffects.DerSimonianLaird(values, variances).FixedMean;
            part = new(1, mean.Value, mean.StandardError, double.PositiveInfinity);
        }
        var parts = new PullDistribution.Part[_sd.Length];
        Array.Fill(parts, part);
        return new(parts);
    }

    private static PullDistribution.Part Effects(double[] values, double[] variances, double extraVariance)
    {
        RandomEffectsFit fit = RandomEffects.DerSimonianLaird(values, variances);
        double error = Math.Max(fit.HartungKnappStandardError!.Value, fit.Mean.StandardError);
        return new(1, fit.Mean.Value, Math.Sqrt((error * error) + extraVariance), values.Length - 1);
    }

    /// <summary>The quantity with σ integrated out.</summary>
    public PullDistribution Distribution(Quantity quantity) => new([.. quantity.ByNode.Select((p, g) => p with { Weight = _weight[g] })]);

    /// <summary>First less second, independent given σ.</summary>
    public PullDistribution Difference(Quantity first, Quantity second)
    {
        var parts = ImmutableArray.CreateBuilder<PullDistribution.Part>();
        for (int g = 0; g < _weight.Length; g++)
        {
            PullDistribution.Part a = first.ByNode[g], b = second.ByNode[g];
            if (double.IsPositiveInfinity(a.DegreesOfFreedom) && double.IsPositiveInfinity(b.DegreesOfFreedom))
            {
                parts.Add(new(_weight[g], a.Mean - b.Mean, Math.Sqrt((a.Scale * a.Scale) + (b.Scale * b.Scale)), double.PositiveInfinity));
                continue;
            }
            // A t and a normal, or two t: the second, or the one that is a t, in equal slices.
            bool sliceSecond = !double.IsPositiveInfinity(b.DegreesOfFreedom);
            PullDistribution.Part sliced = sliceSecond ? b : a, kept = sliceSecond ? a : b;
            for (int i = 0; i < Slices; i++)
            {
                double at = sliced.Quantile((i + 0.5) / Slices);
                parts.Add(new(_weight[g] / Slices, sliceSecond ? kept.Mean - at : at - kept.Mean, kept.Scale, kept.DegreesOfFreedom));
            }
        }
        return new(parts.ToImmutable());
    }

    /// <summary>Interval of |first| − |second|, independent given σ.</summary>
    public ConfidenceInterval SizeDifference(Quantity first, Quantity second, double level)
    {
        double[][] sizes = [.. second.ByNode.Select(p => Enumerable.Range(0, Slices / 2).Select(i => Math.Abs(p.Quantile((i + 0.5) / (Slices / 2)))).ToArray())];
        double Cdf(double d)
        {
            double sum = 0;
            for (int g = 0; g < _weight.Length; g++)
            {
                foreach (double size in sizes[g])
                {
                    double reach = d + size; // |first| at most this
                    if (reach > 0)
                        sum += _weight[g] / sizes[g].Length * (first.ByNode[g].Cdf(reach) - first.ByNode[g].Cdf(-reach));
                }
            }
            return sum;
        }
        double centre = Math.Abs(Distribution(first).Mean) - Math.Abs(Distribution(second).Mean);
        double scale = first.ByNode.Concat(second.ByNode).Max(p => p.Scale);
        return new(PullDistribution.Solve(Cdf, (1 - level) / 2, centre, scale), PullDistribution.Solve(Cdf, (1 + level) / 2, centre, scale), level);
    }

    /// <summary>Coefficients of a setting with their covariance at the mean of σ's variance, for a posterior that wants one normal.</summary>
    public (double[] Coefficients, double[] Covariance) Normal(int setup, bool withScatter)
    {
        double[] mean = new double[3], covariance = new double[9];
        for (int g = 0; g < _weight.Length; g++)
        {
            for (int i = 0; i < 3; i++)
                mean[i] += _weight[g] * _theta[g][setup][i];
        }
        if (!withScatter)
            return (mean, Pool(_ofSetup[setup], 0).Covariance);
        for (int g = 0; g < _weight.Length; g++)
        {
            for (int i = 0; i < 9; i++)
                covariance[i] += _weight[g] * _covariance[g][setup][i];
        }
        // The constant's share of the 95 % interval counts, tails and all: a normal with that half-width.
        double wanted = Distribution(Of(setup, [1, 0, 0])).StandardError;
        covariance[0] = Math.Max(covariance[0], wanted * wanted);
        return (mean, covariance);
    }

    /// <summary>What is known of σ.</summary>
    public ScatterReport Report(FlightScatter prior)
    {
        double Quantile(double p)
        {
            double sum = 0;
            for (int g = 0; g < _sd.Length; g++)
            {
                sum += _weight[g];
                if (sum >= p)
                    return _sd[g];
            }
            return _sd[^1];
        }
        return new(prior, Quantile(0.5), new(Quantile(0.025), Quantile(0.975), 0.95), !prior.IsKnown && _ofSetup.Any(s => s.Length > 1));
    }

    private (double[] Theta, double[] Covariance, double LogLikelihood) Pool(int[] flights, double sd)
    {
        double[] information = new double[9], score = new double[3];
        double log = 0, squares = 0;
        foreach (int i in flights)
        {
            double[] factor = [.. _flights[i].Covariance];
            factor[0] += sd * sd;
            Factor(factor);
            log -= LogRoot(factor);
            double[] weight = SmallCholesky.Inverse(factor, 3);
            double[] b = _flights[i].Coefficients;
            for (int r = 0; r < 3; r++)
            {
                for (int c = 0; c < 3; c++)
                {
                    information[(r * 3) + c] += weight[(r * 3) + c];
                    score[r] += weight[(r * 3) + c] * b[c];
                    squares += b[r] * weight[(r * 3) + c] * b[c];
                }
            }
        }
        Factor(information);
        log -= LogRoot(information);
        double[] theta = [.. score];
        SmallCholesky.Solve(information, 3, theta);
        double[] covariance = SmallCholesky.Inverse(information, 3);
        return (theta, covariance, flights.Length == 1 ? 0 : log - (0.5 * (squares - Dot(score, theta)))); // one flight says nothing about scatter
    }

    private static void Factor(double[] matrix)
    {
        if (!SmallCholesky.Factor(matrix, 3))
            throw new ArgumentException("a flight's covariance is not positive definite", nameof(matrix));
    }

    /// <summary>Half the logarithm of the determinant, from the factor.</summary>
    private static double LogRoot(double[] factor) => Math.Log(factor[0]) + Math.Log(factor[4]) + Math.Log(factor[8]);

    internal static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b) => (a[0] * b[0]) + (a[1] * b[1]) + (a[2] * b[2]);

    internal static double Form(ReadOnlySpan<double> row, ReadOnlySpan<double> matrix)
    {
        double sum = 0;
        for (int i = 0; i < 3; i++)
        {
            for (int j = 0; j < 3; j++)
                sum += row[i] * matrix[(i * 3) + j] * row[j];
        }
        return Math.Max(0, sum);
    }
}
