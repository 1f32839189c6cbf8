namespace TrimFit.Core.Statistics;

/// <summary>Fits a circle to points: the algebraic fits of Kåsa, Pratt and Taubin, and the fit of least squared distance.</summary>
/// <remarks>
/// All four give <see langword="null"/> when the points do not tell a circle: fewer than three points of positive weight, all in one place, or on
/// one line (to 1e-12 of the squared spread). Columns are finite and equally long; weights, where given, are finite and not negative.
/// On short arcs Kåsa's circle comes out too small; Pratt's and Taubin's do not (Al-Sharadqah &amp; Chernov, "Error analysis for circle fitting
/// algorithms", Electron. J. Stat. 3 (2009) 886).
/// </remarks>
public static class CircleFit
{
    // Below this share of the squared total spread the area of the scatter is rounding: products of moments carry some 1e-16 each.
    private const double CollinearTolerance = 1e-12;

    // A Newton step on the characteristic polynomial below this share is rounding.
    private const double RootTolerance = 1e-15;

    // A geometric step below this share of the radius is rounding.
    private const double SettledStep = 1e-14;

    // Below this the sum of squares, good to some 1e-16 of itself, no longer tells better from worse: then steps go on while they shrink.
    private const double SmallStep = 1e-7;

    private const int MaximumSteps = 200;

    /// <summary>Kåsa's fit: least squares of (x−a)²+(y−b)²−R². I. Kåsa, IEEE Trans. Instrum. Meas. 25 (1976) 8.</summary>
    /// <param name="x">First coordinates.</param>
    /// <param name="y">Second coordinates.</param>
    /// <param name="weights">Weight of each point; empty for equal weights.</param>
    /// <exception cref="ArgumentException">Lengths differ, a value is not finite, or a weight is negative.</exception>
    public static Circle? Kasa(ReadOnlySpan<double> x, ReadOnlySpan<double> y, ReadOnlySpan<double> weights = default) =>
        Moments.TryFrom(x, y, weights, out Moments m) ? m.CircleAt(0, m.Z) : null;

    /// <summary>Pratt's fit: Kåsa's objective over the squared gradient, radius free. V. Pratt, Computer Graphics 21 (1987) 145; Newton's
    /// method on the characteristic polynomial as in Chernov, "Circular and Linear Regression" (2010), section 5.7.</summary>
    /// <inheritdoc cref="Kasa"/>
    public static Circle? Pratt(ReadOnlySpan<double> x, ReadOnlySpan<double> y, ReadOnlySpan<double> weights = default)
    {
        if (!Moments.TryFrom(x, y, weights, out Moments m))
            return null;
        // Coefficients A0 + A1 η + A2 η² + 4 η⁴ of Chernov's form.
        double excess = m.Zz - (m.Z * m.Z);
        double a2 = (4 * m.Covariance) - (3 * m.Z * m.Z) - m.Zz;
        double a1 = (m.Zz * m.Z) + (4 * m.Covariance * m.Z) - (m.Xz * m.Xz) - (m.Yz * m.Yz) - (m.Z * m.Z * m.Z);
        double a0 = (m.Xz * m.Xz * m.Yy) + (m.Yz * m.Yz * m.Xx) - (excess * m.Covariance) - (2 * m.Xz * m.Yz * m.Xy);
        double eta = SmallestRoot(a0, a1, a2, 0, 4);
        return m.CircleAt(eta, m.Z + (2 * eta));
    }

    /// <summary>Taubin's fit: Kåsa's objective over the mean squared gradient. G. Taubin, IEEE Trans. PAMI 13 (1991) 1115; Newton's method
    /// on the characteristic polynomial as in Chernov (2010), section 5.10.</summary>
    /// <inheritdoc cref="Kasa"/>
    public static Circle? Taubin(ReadOnlySpan<double> x, ReadOnlySpan<double> y, ReadOnlySpan<double> weights = default)
    {
        if (!Moments.TryFrom(x, y, weights, out Moments m))
            return null;
        double excess = m.Zz - (m.Z * m.Z);
        double a3 = 4 * m.Z;
        double a2 = (-3 * m.Z * m.Z) - m.Zz;
        double a1 = (excess * m.Z) + (4 * m.Covariance * m.Z) - (m.Xz * m.Xz) - (m.Yz * m.Yz);
        double a0 = (m.Xz * m.Xz * m.Yy) + (m.Yz * m.Yz * m.Xx) - (excess * m.Covariance) - (2 * m.Xz * m.Yz * m.Xy);
        double eta = SmallestRoot(a0, a1, a2, a3, 0);
        return m.CircleAt(eta, m.Z);
    }

    /// <summary>The circle of least (weighted) squared distance; see <see cref="GeometricFit"/>.</summary>
    /// <inheritdoc cref="Kasa"/>
    public static Circle? Geometric(ReadOnlySpan<double> x, ReadOnlySpan<double> y, ReadOnlySpan<double> weights = default) =>
        GeometricFit(x, y, weights)?.Circle;

    /// <summary>The circle of least (weighted) squared distance, with errors: damped Gauss-Newton steps from Taubin's circle.</summary>
    /// <remarks>Gander, Golub &amp; Strebel, "Least-squares fitting of circles and ellipses", BIT 34 (1994) 558. The minimum found is the one
    /// nearest Taubin's circle.</remarks>
    /// <inheritdoc cref="Kasa"/>
    public static GeometricCircleFit? GeometricFit(ReadOnlySpan<double> x, ReadOnlySpan<double> y, ReadOnlySpan<double> weights = default)
    {
        if (Taubin(x, y, weights) is not Circle start)
            return null;
        // Coordinates from Taubin's centre, so that rounding of a far origin does not keep the steps from settling.
        (double originX, double originY) = (start.CenterX, start.CenterY);
        Circle circle = new(0, 0, start.Radius);
        Span<double> normal = stackalloc double[9];
        Span<double> gradient = stackalloc double[3];
        Span<double> damped = stackalloc double[9];
        Span<double> step = stackalloc double[3];
        Span<double> trialNormal = stackalloc double[9];
        Span<double> trialGradient = stackalloc double[3];
        double sum = Linearize(circle, originX, originY, x, y, weights, normal, gradient);
        double damping = 1e-3; // Levenberg's start: small against a scaled diagonal of order one
        double lastStep = double.PositiveInfinity;
        int iterations = 0;
        bool converged = false;
        while (!converged && iterations < MaximumSteps)
        {
            iterations++;
            normal.CopyTo(damped);
            for (int i = 0; i < 3; i++)
                damped[4 * i] *= 1 + damping;
            gradient.CopyTo(step);
            if (!SmallMatrix.SolvePositive(damped, step, 3))
                return null;
            Circle trial = new(circle.CenterX + step[0], circle.CenterY + step[1], circle.Radius + step[2]);
            double size = Math.Sqrt((step[0] * step[0]) + (step[1] * step[1]) + (step[2] * step[2])) / circle.Radius;
            double trialSum = trial.Radius > 0 ? Linearize(trial, originX, originY, x, y, weights, trialNormal, trialGradient) : double.PositiveInfinity;
            if (trialSum <= sum || (size < SmallStep && size < lastStep))
            {
                converged = size < SettledStep;
                (circle, sum, lastStep) = (trial, trialSum, size);
                trialNormal.CopyTo(normal);
                trialGradient.CopyTo(gradient);
                damping /= 10;
            }
            else
            {
                converged = size < SmallStep;
                damping *= 10;
            }
        }
        if (!double.IsFinite(circle.Radius))
            return null;
        int degrees = 0;
        for (int i = 0; i < x.Length; i++)
            degrees += weights.IsEmpty || weights[i] > 0 ? 1 : 0;
        degrees -= 3;
        double variance = degrees > 0 ? sum / degrees : 0;
        double[] covariance = new double[9];
        if (!SmallMatrix.InvertPositive(normal, covariance, 3))
            return null;
        for (int i = 0; i < 9; i++)
            covariance[i] *= variance;
        return new GeometricCircleFit
        {
            Circle = new Circle(originX + circle.CenterX, originY + circle.CenterY, circle.Radius),
            SumOfSquares = sum,
            DegreesOfFreedom = degrees,
            ResidualScale = Math.Sqrt(variance),
            Covariance = [.. covariance],
            Convergence = new Convergence(converged, iterations, double.IsFinite(lastStep) ? lastStep : 0),
        };
    }

    // Sum of squared distances, normal matrix JᵀWJ and right side −JᵀW d of the Gauss-Newton step.
    private static double Linearize(
        Circle c,
        double originX,
        double originY,
        ReadOnlySpan<double> x,
        ReadOnlySpan<double> y,
        ReadOnlySpan<double> weights,
        Span<double> normal,
        Span<double> right)
    {
        double sum = 0, uu = 0, uv = 0, vv = 0, u1 = 0, v1 = 0, w1 = 0, ud = 0, vd = 0, d1 = 0;
        for (int i = 0; i < x.Length; i++)
        {
            double w = weights.IsEmpty ? 1 : weights[i];
            double dx = x[i] - originX - c.CenterX, dy = y[i] - originY - c.CenterY;
            double r = Math.Sqrt((dx * dx) + (dy * dy));
            double u = r > 0 ? dx / r : 0, v = r > 0 ? dy / r : 0; // a point in the centre pulls no way
            double d = r - c.Radius;
            sum += w * d * d;
            uu += w * u * u;
            uv += w * u * v;
            vv += w * v * v;
            u1 += w * u;
            v1 += w * v;
            w1 += w;
            ud += w * u * d;
            vd += w * v * d;
            d1 += w * d;
        }
        (normal[0], normal[1], normal[2]) = (uu, uv, u1);
        (normal[3], normal[4], normal[5]) = (uv, vv, v1);
        (normal[6], normal[7], normal[8]) = (u1, v1, w1);
        (right[0], right[1], right[2]) = (ud, vd, d1);
        return sum;
    }

    // Newton from 0 climbs to the smallest positive root without overshooting, because the polynomial is convex there (Chernov 2010, 5.7).
    private static double SmallestRoot(double a0, double a1, double a2, double a3, double a4)
    {
        double eta = 0;
        double value = double.PositiveInfinity;
        for (int i = 0; i < MaximumSteps; i++)
        {
            double next = a0 + (eta * (a1 + (eta * (a2 + (eta * (a3 + (eta * a4)))))));
            if (!(Math.Abs(next) < Math.Abs(value)))
                break; // rounding reached
            value = next;
            double slope = a1 + (eta * ((2 * a2) + (eta * ((3 * a3) + (eta * 4 * a4)))));
            if (slope == 0)
                break;
            double moved = eta - (value / slope);
            if (!(moved >= 0))
                return 0; // points on a circle without scatter: the root is 0
            bool settled = Math.Abs(moved - eta) <= RootTolerance * Math.Abs(moved);
            eta = moved;
            if (settled)
                break;
        }
        return eta;
    }

    // Moments about the centroid, in units of the root mean square distance from it, so that the polynomial's coefficients are of order one.
    private readonly record struct Moments(
        double MeanX, double MeanY, double Unit, double Xx, double Yy, double Xy, double Xz, double Yz, double Zz)
    {
        public double Z => Xx + Yy;

        public double Covariance => (Xx * Yy) - (Xy * Xy);

        public static bool TryFrom(ReadOnlySpan<double> x, ReadOnlySpan<double> y, ReadOnlySpan<double> weights, out Moments moments)
        {
            Guard.SameLength(x, y);
            if (!weights.IsEmpty)
                Guard.SameLength(x, weights);
            moments = default;
            double total = 0, meanX = 0, meanY = 0;
            int used = 0;
            for (int i = 0; i < x.Length; i++)
            {
                double w = weights.IsEmpty ? 1 : weights[i];
                if (!double.IsFinite(x[i]) || !double.IsFinite(y[i]) || !(w >= 0) || !double.IsFinite(w))
                {
                    throw new ArgumentException(
                        FormattableString.Invariant($"point {i} is ({x[i]}, {y[i]}) with weight {w}: must be finite, the weight not negative"), nameof(x));
                }
                if (w > 0)
                    used++;
                total += w;
                if (total > 0)
                {
                    meanX += (x[i] - meanX) * (w / total);
                    meanY += (y[i] - meanY) * (w / total);
                }
            }
            if (used < 3)
                return false;
            double spread = 0;
            for (int i = 0; i < x.Length; i++)
            {
                double w = weights.IsEmpty ? 1 : weights[i];
                double dx = x[i] - meanX, dy = y[i] - meanY;
                spread += w / total * ((dx * dx) + (dy * dy));
            }
            double unit = Math.Sqrt(spread);
            if (!(unit > 0) || !double.IsFinite(unit))
                return false;
            double xx = 0, yy = 0, xy = 0, xz = 0, yz = 0, zz = 0;
            for (int i = 0; i < x.Length; i++)
            {
                double w = (weights.IsEmpty ? 1 : weights[i]) / total;
                double dx = (x[i] - meanX) / unit, dy = (y[i] - meanY) / unit;
                double z = (dx * dx) + (dy * dy);
                xx += w * dx * dx;
                yy += w * dy * dy;
                xy += w * dx * dy;
                xz += w * dx * z;
                yz += w * dy * z;
                zz += w * z * z;
            }
            moments = new Moments(meanX, meanY, unit, xx, yy, xy, xz, yz, zz);
            return moments.Covariance > CollinearTolerance * moments.Z * moments.Z;
        }

        // Centre from the shifted moments; the squared radius is |centre|² plus a term that depends on the fit.
        public Circle? CircleAt(double eta, double radiusTerm)
        {
            double determinant = (eta * eta) - (eta * Z) + Covariance;
            double cx = ((Xz * (Yy - eta)) - (Yz * Xy)) / determinant / 2;
            double cy = ((Yz * (Xx - eta)) - (Xz * Xy)) / determinant / 2;
            double radius = Math.Sqrt((cx * cx) + (cy * cy) + radiusTerm);
            Circle circle = new(MeanX + (Unit * cx), MeanY + (Unit * cy), Unit * radius);
            return double.IsFinite(circle.CenterX) && double.IsFinite(circle.CenterY) && double.IsFinite(circle.Radius) ? circle : null;
        }
    }
}
