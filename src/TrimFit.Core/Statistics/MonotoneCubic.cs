namespace TrimFit.Core.Statistics;

/// <summary>A smooth curve through points that rises and falls only where they do.</summary>
/// <remarks>F. N. Fritsch &amp; R. E. Carlson, SIAM J. Numer. Anal. 17 (1980) 238: mean of neighbouring secants as slope at a point, 0 at a turning point, shortened
/// where α² + β² &gt; 9. Outside the points the curve keeps its end values.</remarks>
public sealed class MonotoneCubic
{
    private readonly double[] _x, _y, _slopes;

    private MonotoneCubic(double[] x, double[] y, double[] slopes) => (_x, _y, _slopes) = (x, y, slopes);

    /// <summary>The curve through points; one point gives a constant.</summary>
    /// <param name="x">At least one value, finite and strictly increasing.</param>
    /// <param name="y">As many values, finite.</param>
    /// <exception cref="ArgumentException">Lengths differ, there is no point, or a value is not allowed.</exception>
    public static MonotoneCubic Through(ReadOnlySpan<double> x, ReadOnlySpan<double> y)
    {
        Guard.SameLength(x, y);
        Guard.StrictlyIncreasing(x);
        Selection.CheckColumn(y, nameof(y));
        int n = x.Length;
        double[] secants = new double[Math.Max(0, n - 1)];
        double[] slopes = new double[n];
        for (int i = 0; i < n - 1; i++)
            secants[i] = (y[i + 1] - y[i]) / (x[i + 1] - x[i]);
        for (int i = 0; i < n && n > 1; i++)
        {
            double left = secants[Math.Max(0, i - 1)], right = secants[Math.Min(n - 2, i)];
            slopes[i] = left == 0 || right == 0 || left > 0 != right > 0 ? 0 : (left / 2) + (right / 2);
        }
        for (int i = 0; i < n - 1; i++)
        {
            if (secants[i] == 0)
                continue; // both slopes are 0 already
            double alpha = slopes[i] / secants[i], beta = slopes[i + 1] / secants[i];
            double length = double.Hypot(alpha, beta);
            if (length > 3)
            {
                slopes[i] = 3 / length * alpha * secants[i];
                slopes[i + 1] = 3 / length * beta * secants[i];
            }
        }
        return new(x.ToArray(), y.ToArray(), slopes);
    }

    /// <summary>Value at a place; the end value outside the points.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The place is not a number.</exception>
    public double At(double x)
    {
        int i = Interval(x);
        if (i < 0)
            return _y[0];
        if (i >= _x.Length - 1)
            return _y[^1];
        double h = _x[i + 1] - _x[i];
        double t = (x - _x[i]) / h, s = 1 - t;
        double cubic = (s * s * (((1 + (2 * t)) * _y[i]) + (t * h * _slopes[i]))) + (t * t * (((1 + (2 * s)) * _y[i + 1]) - (s * h * _slopes[i + 1])));
        return Math.Clamp(cubic, Math.Min(_y[i], _y[i + 1]), Math.Max(_y[i], _y[i + 1])); // holds already but for the last digit
    }

    /// <summary>Slope at a place; 0 outside the points.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The place is not a number.</exception>
    public double SlopeAt(double x)
    {
        int i = Interval(x);
        if (i < 0 || x > _x[^1] || _x.Length == 1)
            return 0;
        if (i >= _x.Length - 1)
            return _slopes[^1];
        double h = _x[i + 1] - _x[i];
        double t = (x - _x[i]) / h, s = 1 - t;
        return (6 * s * t * (_y[i + 1] - _y[i]) / h) + (s * (1 - (3 * t)) * _slopes[i]) + (t * ((3 * t) - 2) * _slopes[i + 1]);
    }

    private int Interval(double x)
    {
        if (double.IsNaN(x))
            throw new ArgumentOutOfRangeException(nameof(x), x, "must be a number");
        int found = Array.BinarySearch(_x, x);
        return found >= 0 ? found : ~found - 1;
    }
}
