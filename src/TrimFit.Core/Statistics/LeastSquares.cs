using System.Collections.Immutable;

namespace TrimFit.Core.Statistics;

/// <summary>Linear least squares by Householder QR with scaled columns and iterative refinement.</summary>
/// <remarks>The refinement solves the augmented system for coefficients and residuals together, with its residuals in doubled precision:
/// Å. Björck, "Iterative refinement of linear least squares solutions I", BIT 7 (1967) 257. NIST's Filip, which defeats the normal
/// equations, comes out to the digits the rounding of its powers of x leaves.</remarks>
public static class LeastSquares
{
    // A refinement step below this share of the coefficients is the rounding of the coefficients themselves.
    private const double SettledStep = 2.3e-16;

    /// <summary>Fits y by the columns of a design, all rows alike.</summary>
    /// <inheritdoc cref="Fit(ReadOnlySpan{double}, ReadOnlySpan{double}, int, ReadOnlySpan{double}, LeastSquaresOptions?)"/>
    public static LeastSquaresFit Fit(ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> y, int columns, LeastSquaresOptions? options = null) =>
        Fit(designColumnMajor, y, columns, [], options);

    /// <summary>Fits y by the columns of a design with weights: minimises Σ wᵢ (yᵢ − xᵢb)².</summary>
    /// <param name="designColumnMajor">n×p design, column after column; finite. An intercept is a column of ones.</param>
    /// <param name="y">n observations; finite.</param>
    /// <param name="columns">p, at least 1.</param>
    /// <param name="weights">n weights, finite and not negative, 0 leaves a row out; empty for equal weights.</param>
    /// <param name="options">Choices; null for the defaults.</param>
    /// <returns>The fit. A design without full rank, even an empty one, is an answer: see <see cref="LeastSquaresFit.ColumnsLeftOut"/>.</returns>
    /// <exception cref="ArgumentException">Lengths do not match, or a value is not finite, or a weight is negative.</exception>
    public static LeastSquaresFit Fit(
        ReadOnlySpan<double> designColumnMajor, ReadOnlySpan<double> y, int columns, ReadOnlySpan<double> weights, LeastSquaresOptions? options = null)
    {
        options ??= new LeastSquaresOptions();
        int n = y.Length, p = columns;
        CheckShape(designColumnMajor, y, columns, weights);
        double[] design = designColumnMajor.ToArray();
        double[] target = y.ToArray();
        int rowsUsed = WeighRows(design, target, p, weights);
        double[] factored = (double[])design.Clone();
        HouseholderQr qr = HouseholderQr.Factor(factored, n, p, options.RankTolerance);
        for (int j = 0; j < p; j++)
        {
            Span<double> column = design.AsSpan(j * n, n);
            for (int i = 0; i < n; i++)
                column[i] *= qr.Scale[j];
        }
        double[] scaled = new double[qr.Rank];
        double[] residuals = new double[n];
        Convergence convergence = Solve(qr, design, target, scaled, residuals, options.RefinementSteps);
        double[] coefficients = new double[p];
        for (int k = 0; k < qr.Rank; k++)
            coefficients[qr.Used[k]] = scaled[k] * qr.Scale[qr.Used[k]];
        DoubleDouble sum = default;
        for (int i = 0; i < n; i++)
            sum.AddProduct(residuals[i], residuals[i]);
        if (!weights.IsEmpty)
        {
            for (int i = 0; i < n; i++)
            {
                DoubleDouble r = default;
                r.Add(y[i]);
                for (int j = 0; j < p; j++)
                    r.AddProduct(-designColumnMajor[(j * n) + i], coefficients[j]);
                residuals[i] = r.Value;
            }
        }
        int degrees = Math.Max(0, rowsUsed - qr.Rank);
        return new LeastSquaresFit
        {
            Coefficients = [.. coefficients],
            Residuals = ImmutableArray.Create(residuals),
            InverseCross = [.. qr.InverseCross(p)],
            ResidualSumOfSquares = sum.Value,
            ResidualScale = degrees > 0 ? Math.Sqrt(sum.Value / degrees) : 0,
            DegreesOfFreedom = degrees,
            Condition = qr.Condition(),
            Rank = qr.Rank,
            ColumnsLeftOut = [.. qr.LeftOut],
            Convergence = convergence,
            Options = options,
        };
    }

    internal static void CheckShape(ReadOnlySpan<double> design, ReadOnlySpan<double> y, int columns, ReadOnlySpan<double> weights)
    {
        if (columns < 1)
            throw new ArgumentOutOfRangeException(nameof(columns), columns, "must be at least 1");
        if (design.Length != (long)y.Length * columns)
            throw new ArgumentException(FormattableString.Invariant($"has {design.Length} values, expected {y.Length} rows × {columns} columns"), nameof(design));
        if (!weights.IsEmpty)
            Guard.SameLength(y, weights);
        for (int i = 0; i < design.Length; i++)
        {
            if (!double.IsFinite(design[i]))
                throw new ArgumentException(FormattableString.Invariant($"row {i % y.Length} of column {i / y.Length} is {design[i]}: must be finite"), nameof(design));
        }
        for (int i = 0; i < y.Length; i++)
        {
            if (!double.IsFinite(y[i]))
                throw new ArgumentException(FormattableString.Invariant($"row {i} is {y[i]}: must be finite"), nameof(y));
            if (!weights.IsEmpty && !(weights[i] >= 0 && double.IsFinite(weights[i])))
                throw new ArgumentException(FormattableString.Invariant($"row {i} is {weights[i]}: must be finite and not negative"), nameof(weights));
        }
    }

    /// <summary>Multiplies the rows by the roots of their weights.</summary>
    /// <returns>Rows of positive weight.</returns>
    internal static int WeighRows(Span<double> design, Span<double> target, int columns, ReadOnlySpan<double> weights)
    {
        int n = target.Length;
        if (weights.IsEmpty)
            return n;
        int used = 0;
        for (int i = 0; i < n; i++)
        {
            double root = Math.Sqrt(weights[i]);
            used += root > 0 ? 1 : 0;
            target[i] *= root;
            for (int j = 0; j < columns; j++)
                design[(j * n) + i] *= root;
        }
        return used;
    }

    // Corrections to (residuals r, coefficients b) from f = y − r − Xb and g = −Xᵀr: with w = Qᵀf, h = R⁻ᵀg,
    // δb = R⁻¹(w₁ − h) and δr = Q (h, w₂). The first step, from zero, is the plain QR solution.
    private static Convergence Solve(
        HouseholderQr qr, ReadOnlySpan<double> design, ReadOnlySpan<double> target, Span<double> coefficients, Span<double> residuals, int refinements)
    {
        int n = target.Length, p = qr.Rank;
        double[] f = new double[n];
        double[] h = new double[p];
        double[] step = new double[p];
        double last = 0, previous = double.PositiveInfinity;
        int done = 0;
        for (int iteration = 0; iteration <= refinements; iteration++)
        {
            if (iteration == 0)
                target.CopyTo(f); // from zero the residuals of the system are y and 0
            else
                Residuals(qr, design, target, coefficients, residuals, f, h);
            qr.SolveTransposed(h);
            qr.ApplyTransposed(f);
            for (int k = 0; k < p; k++)
            {
                step[k] = f[k] - h[k];
                f[k] = h[k];
            }
            qr.SolveUpper(step);
            qr.Apply(f);
            double size = 0, length = 0;
            for (int k = 0; k < p; k++)
                size = Math.Max(size, Math.Abs(step[k]));
            if (iteration > 0 && !(size < previous / 2))
                break; // rounding reached: a step that no longer shrinks does not help
            for (int k = 0; k < p; k++)
            {
                coefficients[k] += step[k];
                length = Math.Max(length, Math.Abs(coefficients[k]));
            }
            for (int i = 0; i < n; i++)
                residuals[i] += f[i];
            previous = iteration == 0 ? double.PositiveInfinity : size;
            last = iteration == 0 || length == 0 ? 0 : size / length;
            done = iteration;
            if (iteration > 0 && last <= SettledStep)
                break;
        }
        return new Convergence(last <= 1e-10, done, last); // ten digits: what an interval of a flight can ever use
    }

    private static void Residuals(
        HouseholderQr qr,
        ReadOnlySpan<double> design,
        ReadOnlySpan<double> target,
        ReadOnlySpan<double> coefficients,
        ReadOnlySpan<double> residuals,
        Span<double> f,
        Span<double> h)
    {
        int n = target.Length, p = qr.Rank;
        for (int i = 0; i < n; i++)
        {
            DoubleDouble sum = default;
            sum.Add(target[i]);
            sum.Add(-residuals[i]);
            for (int k = 0; k < p; k++)
                sum.AddProduct(-design[(qr.Used[k] * n) + i], coefficients[k]);
            f[i] = sum.Value;
        }
        for (int k = 0; k < p; k++)
        {
            ReadOnlySpan<double> column = design.Slice(qr.Used[k] * n, n);
            DoubleDouble sum = default;
            for (int i = 0; i < n; i++)
                sum.AddProduct(-column[i], residuals[i]);
            h[k] = sum.Value;
        }
    }
}
