namespace TrimFit.Core.Turns.FilterError;

/// <summary>Covariance of the coefficients, and what else the information says.</summary>
internal sealed class FitCovariance
{
    /// <summary>Covariance of β, row by row, uncertainty of the noise parameters included, raised to the sandwich where that is larger.</summary>
    public required double[] Matrix { get; init; }

    public required double DegreesOfFreedom { get; init; }

    /// <summary>Stationary variance of the disturbance over the variance of the turn at mean thrust.</summary>
    public required double EffectiveSamples { get; init; }

    /// <summary>Condition number of the information on constant, thrust, brake and trimmer, each column scaled to one.</summary>
    public required double Condition { get; init; }

    /// <summary>Variance of each β over what it would have if it were alone.</summary>
    public required double[] Inflation { get; init; }

    public static FitCovariance Of(FlightColumns flight, AugmentedFilter filter, SearchResult? search, double disturbanceRms, double meanThrust, ReadOnlySpan<double> doubt)
    {
        int k = flight.Coefficients;
        double[] conditional = filter.ConditionalCovariance();
        double[] covariance = [.. conditional];
        int q = search?.Theta.Length ?? 0;
        double[] thetaCovariance = [];
        if (search is not null)
        {
            double[] factor = [.. search.Information];
            if (SmallCholesky.Factor(factor, q))
            {
                thetaCovariance = SmallCholesky.Inverse(factor, q);
                for (int a = 0; a < k; a++)
                {
                    for (int b = 0; b < k; b++)
                    {
                        double sum = 0;
                        for (int i = 0; i < q; i++)
                        {
                            for (int j = 0; j < q; j++)
                                sum += search.CoefficientSlopes[i][a] * thetaCovariance[(i * q) + j] * search.CoefficientSlopes[j][b];
                        }
                        covariance[(a * k) + b] += sum;
                    }
                }
            }
        }

        double[] sandwich = Sandwich(flight, filter, search, conditional, thetaCovariance);
        // Contrasts in which the two are compared: the turn at mean thrust, the slope there, and the rest one by one. In the raw
        // coefficients constant and slope are so correlated that a ratio of their variances says little about either question.
        double[] toContrast = Identity(k);
        int constant = flight.IndexOf(ColumnKind.Constant), slope = flight.IndexOf(ColumnKind.Thrust), curve = flight.IndexOf(ColumnKind.ThrustSquared);
        double[] back = Identity(k);
        if (slope >= 0)
        {
            toContrast[(constant * k) + slope] = meanThrust;
            toContrast[(constant * k) + curve] = meanThrust * meanThrust;
            toContrast[(slope * k) + curve] = 2 * meanThrust;
            back[(constant * k) + slope] = -meanThrust;
            back[(constant * k) + curve] = meanThrust * meanThrust;
            back[(slope * k) + curve] = -2 * meanThrust;
        }
        double[] likelihoodContrast = Conjugate(toContrast, covariance, k);
        double[] sandwichContrast = Conjugate(toContrast, sandwich, k);

        int turnColumns = 0;
        foreach (ColumnKind kind in flight.Kinds)
        {
            if (kind is ColumnKind.Constant or ColumnKind.Thrust or ColumnKind.Brake or ColumnKind.Trimmer or ColumnKind.CgShift)
                turnColumns++;
        }
        double pullVariance = likelihoodContrast[(constant * k) + constant];
        double effective = Math.Clamp(disturbanceRms * disturbanceRms / pullVariance, 1, flight.Measurements);
        double freedom = Math.Max(4, effective - turnColumns);
        double[] raise = new double[k];
        for (int a = 0; a < k; a++)
        {
            double likelihood = likelihoodContrast[(a * k) + a];
            double other = sandwichContrast[(a * k) + a];
            raise[a] = other > likelihood && likelihood > 0 ? Math.Sqrt(other / likelihood) : 1;
        }
        for (int a = 0; a < k; a++)
        {
            for (int b = 0; b < k; b++)
                likelihoodContrast[(a * k) + b] *= raise[a] * raise[b];
        }

        double[] information = filter.Information();
        double[] inflation = new double[k];
        for (int a = 0; a < k; a++)
            inflation[a] = conditional[(a * k) + a] * (information[(a * k) + a] + filter.PriorPrecision(a));
        double[] matrix = Conjugate(back, likelihoodContrast, k);
        for (int a = 0; a < doubt.Length; a++)
        {
            for (int b = 0; b < doubt.Length; b++)
                matrix[(a * k) + b] += doubt[a] * doubt[b];
        }
        return new FitCovariance
        {
            Matrix = matrix,
            DegreesOfFreedom = freedom,
            EffectiveSamples = effective,
            Condition = ConditionOf(flight, conditional),
            Inflation = inflation,
        };
    }

    /// <summary>Covariance from the scatter of the blocks' own pulls on β: right also when the disturbance is not a first-order Markov one.</summary>
    private static double[] Sandwich(FlightColumns flight, AugmentedFilter filter, SearchResult? search, double[] conditional, double[] thetaCovariance)
    {
        int k = flight.Coefficients, q = thetaCovariance.Length > 0 ? search!.Theta.Length : 0, blocks = flight.Blocks;
        double[] scores = new double[blocks * (k + q)];
        int m = 0;
        for (int i = 0; i < flight.Count; i++)
        {
            for (int bit = 1; bit <= FlightColumns.Compass; bit <<= 1)
            {
                if ((flight.Flags[i] & bit) == 0)
                    continue;
                ReadOnlySpan<double> row = filter.Row(m);
                double z = filter.Standardised[m];
                Span<double> score = scores.AsSpan(flight.Block[i] * (k + q), k + q);
                for (int j = 0; j < k; j++)
                    score[j] -= row[j + 1] * z;
                for (int j = 0; j < q; j++)
                    score[k + j] -= (z * search!.InnovationSlopes[j][m]) + (search.LogVarianceSlopes[j][m] * (1 - (z * z)) / 2);
                m++;
            }
        }
        double[] sandwich = new double[k * k];
        double[] influence = new double[k];
        double[] thetaStep = new double[q];
        for (int b = 0; b < blocks; b++)
        {
            ReadOnlySpan<double> score = scores.AsSpan(b * (k + q), k + q);
            for (int j = 0; j < q; j++)
            {
                thetaStep[j] = 0;
                for (int l = 0; l < q; l++)
                    thetaStep[j] += thetaCovariance[(j * q) + l] * score[k + l];
            }
            for (int a = 0; a < k; a++)
            {
                double sum = 0;
                for (int j = 0; j < k; j++)
                    sum += conditional[(a * k) + j] * score[j];
                for (int j = 0; j < q; j++)
                    sum += search!.CoefficientSlopes[j][a] * thetaStep[j];
                influence[a] = sum;
            }
            for (int a = 0; a < k; a++)
            {
                for (int c = 0; c < k; c++)
                    sandwich[(a * k) + c] += influence[a] * influence[c];
            }
        }
        // What the priors bring is not in any block: their own error, carried to β.
        for (int a = 0; a < k; a++)
        {
            for (int c = 0; c < k; c++)
            {
                double sum = 0;
                for (int j = 0; j < k; j++)
                    sum += conditional[(a * k) + j] * filter.PriorPrecision(j) * conditional[(c * k) + j];
                sandwich[(a * k) + c] += sum;
            }
        }
        return sandwich;
    }

    private static double ConditionOf(FlightColumns flight, double[] conditional)
    {
        int k = flight.Coefficients;
        int[] turn = [.. Enumerable.Range(0, k).Where(j => flight.Kinds[j] is ColumnKind.Constant or ColumnKind.Thrust or ColumnKind.Brake or ColumnKind.Trimmer or ColumnKind.CgShift)];
        var correlation = MathNet.Numerics.LinearAlgebra.Matrix<double>.Build.Dense(turn.Length, turn.Length, (i, j) =>
            conditional[(turn[i] * k) + turn[j]] / Math.Sqrt(conditional[(turn[i] * k) + turn[i]] * conditional[(turn[j] * k) + turn[j]]));
        double[] values = [.. correlation.Evd(MathNet.Numerics.LinearAlgebra.Symmetricity.Symmetric).EigenValues.Select(v => v.Real).Order()];
        return values[0] > 0 ? Math.Sqrt(values[^1] / values[0]) : double.PositiveInfinity;
    }

    private static double[] Identity(int n)
    {
        double[] identity = new double[n * n];
        for (int i = 0; i < n; i++)
            identity[(i * n) + i] = 1;
        return identity;
    }

    /// <summary>T M T'.</summary>
    private static double[] Conjugate(double[] t, double[] matrix, int n)
    {
        double[] half = new double[n * n], result = new double[n * n];
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                for (int l = 0; l < n; l++)
                    half[(i * n) + j] += t[(i * n) + l] * matrix[(l * n) + j];
            }
        }
        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                for (int l = 0; l < n; l++)
                    result[(i * n) + j] += half[(i * n) + l] * t[(j * n) + l];
            }
        }
        return result;
    }
}
