namespace TrimFit.Core.Statistics;

/// <summary>Householder factorisation X = QR of a column-major design whose columns are scaled by powers of two; a column that is a
/// combination of earlier ones is passed over.</summary>
/// <remarks>Golub &amp; Van Loan, "Matrix Computations", section 5.2. Scaling by a power of two is exact.</remarks>
internal sealed class HouseholderQr
{
    private readonly int _rows;
    private readonly double[] _a; // reflectors below, R on and above the diagonal of the used columns
    private readonly double[] _beta;
    private readonly double[] _diagonal;

    private HouseholderQr(int rows, double[] a, double[] beta, double[] diagonal, int[] used, int[] leftOut, double[] scale)
    {
        _rows = rows;
        _a = a;
        _beta = beta;
        _diagonal = diagonal;
        Used = used;
        LeftOut = leftOut;
        Scale = scale;
    }

    public int[] Used { get; }

    public int[] LeftOut { get; }

    /// <summary>Power of two each column was multiplied by.</summary>
    public double[] Scale { get; }

    public int Rank => Used.Length;

    /// <summary>Factors a column-major design, which is overwritten and kept.</summary>
    public static HouseholderQr Factor(double[] design, int rows, int columns, double rankTolerance)
    {
        double[] scale = new double[columns];
        List<int> used = [];
        List<int> leftOut = [];
        double[] beta = new double[columns];
        double[] diagonal = new double[columns];
        for (int j = 0; j < columns; j++)
        {
            Span<double> column = design.AsSpan(j * rows, rows);
            double length = Length(column);
            scale[j] = length > 0 ? Math.ScaleB(1, -Math.ILogB(length) - 1) : 1;
            for (int i = 0; i < rows; i++)
                column[i] *= scale[j];
            length *= scale[j];
            for (int k = 0; k < used.Count; k++)
                Reflect(design.AsSpan((used[k] * rows) + k, rows - k), beta[k], column[k..]);
            int r = used.Count;
            double rest = r < rows ? Length(column[r..]) : 0;
            if (!(rest > rankTolerance * length))
            {
                leftOut.Add(j);
                continue;
            }
            Span<double> v = column[r..];
            double alpha = v[0] > 0 ? -rest : rest;
            beta[r] = 1 / (rest * (rest + Math.Abs(v[0])));
            v[0] -= alpha;
            diagonal[r] = alpha;
            used.Add(j);
        }
        return new HouseholderQr(rows, design, beta, diagonal, [.. used], [.. leftOut], scale);
    }

    /// <summary>Replaces a column by Qᵀ times it.</summary>
    public void ApplyTransposed(Span<double> b)
    {
        for (int k = 0; k < Rank; k++)
            Reflect(Reflector(k), _beta[k], b[k..]);
    }

    /// <summary>Replaces a column by Q times it.</summary>
    public void Apply(Span<double> b)
    {
        for (int k = Rank - 1; k >= 0; k--)
            Reflect(Reflector(k), _beta[k], b[k..]);
    }

    /// <summary>Element of R; row not above column, both counted over the used columns.</summary>
    public double R(int row, int column) => row == column ? _diagonal[row] : _a[(Used[column] * _rows) + row];

    /// <summary>Solves R x = b in place over the first <see cref="Rank"/> values.</summary>
    public void SolveUpper(Span<double> b)
    {
        for (int i = Rank - 1; i >= 0; i--)
        {
            double value = b[i];
            for (int k = i + 1; k < Rank; k++)
                value -= R(i, k) * b[k];
            b[i] = value / _diagonal[i];
        }
    }

    /// <summary>Solves Rᵀ x = b in place.</summary>
    public void SolveTransposed(Span<double> b)
    {
        for (int i = 0; i < Rank; i++)
        {
            double value = b[i];
            for (int k = 0; k < i; k++)
                value -= R(k, i) * b[k];
            b[i] = value / _diagonal[i];
        }
    }

    /// <summary>(XᵀX)⁻¹ over all columns in the units of the design, rows of columns left out 0.</summary>
    public double[] InverseCross(int columns)
    {
        int p = Rank;
        double[] inverse = new double[p * p]; // R⁻¹, column by column
        for (int j = 0; j < p; j++)
        {
            Span<double> column = inverse.AsSpan(j * p, p);
            column[j] = 1;
            SolveUpper(column);
        }
        double[] result = new double[columns * columns];
        for (int i = 0; i < p; i++)
        {
            for (int j = i; j < p; j++)
            {
                double sum = 0;
                for (int k = j; k < p; k++)
                    sum += inverse[(k * p) + i] * inverse[(k * p) + j];
                sum *= Scale[Used[i]] * Scale[Used[j]];
                result[(Used[i] * columns) + Used[j]] = sum;
                result[(Used[j] * columns) + Used[i]] = sum;
            }
        }
        return result;
    }

    /// <summary>Ratio of the largest to the smallest singular value of R with its columns scaled to length 1, by one-sided Jacobi rotations.</summary>
    public double Condition()
    {
        int p = Rank;
        if (p == 0)
            return 1;
        double[] u = new double[p * p]; // columns of R
        for (int j = 0; j < p; j++)
        {
            for (int i = 0; i <= j; i++)
                u[(j * p) + i] = R(i, j);
            double length = Length(u.AsSpan(j * p, p));
            for (int i = 0; i <= j; i++)
                u[(j * p) + i] /= length;
        }
        for (int sweep = 0; sweep < 60; sweep++) // some ten sweeps settle any matrix met here; 60 bounds it
        {
            bool rotated = false;
            for (int a = 0; a < p - 1; a++)
            {
                for (int b = a + 1; b < p; b++)
                    rotated |= Rotate(u.AsSpan(a * p, p), u.AsSpan(b * p, p));
            }
            if (!rotated)
                break;
        }
        double largest = 0, smallest = double.PositiveInfinity;
        for (int j = 0; j < p; j++)
        {
            double length = Length(u.AsSpan(j * p, p));
            largest = Math.Max(largest, length);
            smallest = Math.Min(smallest, length);
        }
        return largest / smallest;
    }

    private static bool Rotate(Span<double> x, Span<double> y)
    {
        double xx = 0, yy = 0, xy = 0;
        for (int i = 0; i < x.Length; i++)
        {
            xx += x[i] * x[i];
            yy += y[i] * y[i];
            xy += x[i] * y[i];
        }
        if (!(Math.Abs(xy) > 1e-15 * Math.Sqrt(xx * yy)))
            return false;
        double zeta = (yy - xx) / (2 * xy);
        double t = (zeta < 0 ? -1 : 1) / (Math.Abs(zeta) + Math.Sqrt(1 + (zeta * zeta)));
        double c = 1 / Math.Sqrt(1 + (t * t));
        double s = c * t;
        for (int i = 0; i < x.Length; i++)
            (x[i], y[i]) = ((c * x[i]) - (s * y[i]), (s * x[i]) + (c * y[i]));
        return true;
    }

    private Span<double> Reflector(int k) => _a.AsSpan((Used[k] * _rows) + k, _rows - k);

    private static void Reflect(ReadOnlySpan<double> v, double beta, Span<double> b)
    {
        double dot = 0;
        for (int i = 0; i < v.Length; i++)
            dot += v[i] * b[i];
        dot *= beta;
        for (int i = 0; i < v.Length; i++)
            b[i] -= dot * v[i];
    }

    private static double Length(ReadOnlySpan<double> values)
    {
        double largest = 0;
        foreach (double value in values)
            largest = Math.Max(largest, Math.Abs(value));
        if (!(largest > 0))
            return 0;
        double unit = Math.ScaleB(1, Math.ILogB(largest));
        double sum = 0;
        foreach (double value in values)
            sum += value / unit * (value / unit);
        return unit * Math.Sqrt(sum);
    }
}
