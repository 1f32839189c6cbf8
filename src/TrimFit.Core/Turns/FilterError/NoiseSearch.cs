using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns.FilterError;

/// <summary>Where a search ended, with the slopes that the covariance needs.</summary>
internal sealed class SearchResult
{
    public required double[] Theta { get; init; }
    public required NoiseParameters Noise { get; init; }

    /// <summary>Minus the log-likelihood, and the prior's penalty on it.</summary>
    public required double MinusLogLikelihood { get; init; }
    public required double Penalty { get; init; }
    public required Convergence Convergence { get; init; }

    /// <summary>Information on the log-parameters, β profiled out, prior included.</summary>
    public required double[] Information { get; init; }

    /// <summary>dβ/dθ: a row of coefficients for each log-parameter.</summary>
    public required double[][] CoefficientSlopes { get; init; }

    /// <summary>d(innovation)/dθ over its standard deviation, and d(log variance)/dθ, for each log-parameter and measurement.</summary>
    public required double[][] InnovationSlopes { get; init; }
    public required double[][] LogVarianceSlopes { get; init; }
    public required int Evaluations { get; init; }

    public double Objective => MinusLogLikelihood + Penalty;
}

/// <summary>Maximum likelihood over the log-parameters by Fisher scoring with Levenberg-Marquardt damping.</summary>
/// <remarks>The information of Gaussian innovations, Σ (½ ∂lnF ∂lnF' + ∂ν ∂ν'/F), needs first derivatives only (Gupta and Mehra 1974,
/// "Computational aspects of maximum likelihood estimation", IEEE Trans. Automatic Control 19:774, doi 10.1109/TAC.1974.1100714; Klein and
/// Morelli 2006, "Aircraft System Identification", ch. 6). They are taken by forward differences of the whole filter, which also give
/// dβ/dθ. Scoring settles in about 8 steps where a quasi-Newton search needs 25.</remarks>
internal sealed class NoiseSearch
{
    private const double Difference = 1e-4; // in the logarithm: the slope's error is half of it times the curvature, far below a standard error
    /// <summary>Log-likelihood still to be gained at which a search may end: 1/16 of a standard error of the best-known combination.</summary>
    public const double Settled = 2e-3;

    /// <summary>The same for a search that only prepares another: a third of a standard error.</summary>
    public const double Rough = 5e-2;

    /// <summary>The same for a search that only finds which measurements are outliers: one standard error.</summary>
    public const double Coarse = 0.5;

    private const double LargestStep = 1.2; // in the logarithm, times 3.3

    private readonly AugmentedFilter _filter;
    private readonly ParameterLayout _layout;
    private readonly int _measurements;
    private readonly int _coefficients;

    public NoiseSearch(AugmentedFilter filter, ParameterLayout layout, int measurements, int coefficients)
    {
        _filter = filter;
        _layout = layout;
        _measurements = measurements;
        _coefficients = coefficients;
    }

    public double Evaluate(double[] theta) => _filter.Run(_layout.FromVector(theta)) + _layout.PriorPenalty(theta);

    public SearchResult From(double[] start, int mostIterations, double goodEnough = Settled)
    {
        int q = _layout.Count, m = _measurements;
        double[] theta = [.. start];
        _layout.Clamp(theta);
        double objective = Evaluate(theta);
        int evaluations = 1, iterations = 0;
        double damping = 1e-3, lastStep = double.PositiveInfinity;
        bool converged = false;
        double[][] innovation = Table(q, m), logVariance = Table(q, m), slopes = Table(q, _coefficients);
        double[] baseZ = new double[m], baseF = new double[m], baseBeta = new double[_coefficients];
        double[] information = new double[q * q], gradient = new double[q], step = new double[q], trial = new double[q], system = new double[q * q];
        bool fresh = true; // whether the filter holds the run at theta
        while (true)
        {
            if (!fresh)
            {
                Evaluate(theta);
                evaluations++;
            }
            _filter.Standardised.CopyTo(baseZ);
            _filter.Variances.CopyTo(baseF);
            _filter.Coefficients.CopyTo(baseBeta, 0);
            for (int i = 0; i < q; i++)
            {
                theta.CopyTo(trial, 0);
                trial[i] += Difference;
                double there = Evaluate(trial);
                evaluations++;
                gradient[i] = (there - objective) / Difference;
                ReadOnlySpan<double> z = _filter.Standardised, variance = _filter.Variances;
                double[] dz = innovation[i], df = logVariance[i];
                for (int j = 0; j < m; j++)
                {
                    double ratio = variance[j] / baseF[j];
                    dz[j] = ((z[j] * Math.Sqrt(ratio)) - baseZ[j]) / Difference;
                    df[j] = (ratio - 1) / Difference;
                }
                for (int j = 0; j < _coefficients; j++)
                    slopes[i][j] = (_filter.Coefficients[j] - baseBeta[j]) / Difference;
            }
            fresh = false;
            for (int a = 0; a < q; a++)
            {
                for (int b = a; b < q; b++)
                {
                    double sum = a == b ? _layout.PriorInformation(a) : 0;
                    double[] za = innovation[a], zb = innovation[b], fa = logVariance[a], fb = logVariance[b];
                    double dots = 0, logs = 0;
                    for (int j = 0; j < m; j++)
                    {
                        dots += za[j] * zb[j];
                        logs += fa[j] * fb[j];
                    }
                    information[(a * q) + b] = information[(b * q) + a] = sum + dots + (logs / 2);
                }
            }
            iterations++;
            bool improved = false;
            double gain = 0;
            for (int attempt = 0; attempt < 8; attempt++)
            {
                information.CopyTo(system, 0);
                for (int i = 0; i < q; i++)
                {
                    system[(i * q) + i] *= 1 + damping;
                    step[i] = -gradient[i];
                }
                if (!SmallCholesky.Factor(system, q))
                {
                    damping = Math.Max(damping * 10, 1e-3);
                    continue;
                }
                SmallCholesky.Solve(system, q, step);
                gain = 0;
                double largest = 0;
                for (int i = 0; i < q; i++)
                {
                    gain -= step[i] * gradient[i] / 2;
                    largest = Math.Max(largest, Math.Abs(step[i]));
                }
                if (gain < goodEnough && damping <= 0.1)
                {
                    converged = true;
                    lastStep = largest;
                    break;
                }
                double shrink = largest > LargestStep ? LargestStep / largest : 1;
                for (int i = 0; i < q; i++)
                    trial[i] = theta[i] + (shrink * step[i]);
                _layout.Clamp(trial);
                double there = Evaluate(trial);
                evaluations++;
                if (there < objective)
                {
                    lastStep = largest * shrink;
                    objective = there;
                    trial.CopyTo(theta, 0);
                    damping = Math.Max(damping / 10, 1e-4);
                    improved = true;
                    fresh = true;
                    break;
                }
                damping = Math.Max(damping * 8, 1e-2);
            }
            if (converged || !improved || iterations >= mostIterations)
                break;
        }
        // The filter is left at the solution, so that covariance and innovations belong to it.
        double value = _filter.Run(_layout.FromVector(theta));
        return new SearchResult
        {
            Theta = theta,
            Noise = _layout.FromVector(theta),
            MinusLogLikelihood = value,
            Penalty = _layout.PriorPenalty(theta),
            Convergence = new(converged, iterations, lastStep),
            Information = information,
            CoefficientSlopes = slopes,
            InnovationSlopes = innovation,
            LogVarianceSlopes = logVariance,
            Evaluations = evaluations + 1,
        };
    }

    private static double[][] Table(int rows, int columns)
    {
        double[][] table = new double[rows][];
        for (int i = 0; i < rows; i++)
            table[i] = new double[columns];
        return table;
    }
}
