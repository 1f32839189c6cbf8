namespace TrimFit.Core.Statistics;

/// <summary>Fieller's confidence set for a ratio: the values θ at which numerator − θ·denominator does not differ from 0.</summary>
/// <remarks>E. C. Fieller, J. R. Stat. Soc. B 16 (1954) 175. The shift that nulls a pull is such a ratio; where the slope is not told apart from 0 the set is
/// unbounded, and any interval in its place would be wrong.</remarks>
public static class Fieller
{
    /// <summary>Set for a ratio of two estimates with a joint normal (or t) error.</summary>
    /// <param name="numerator">Numerator and its standard error.</param>
    /// <param name="denominator">Denominator and its standard error.</param>
    /// <param name="covariance">Covariance of the two.</param>
    /// <param name="degreesOfFreedom">Degrees of freedom of the standard errors; infinity when they are known.</param>
    /// <param name="level">Such as 0.95.</param>
    /// <exception cref="ArgumentOutOfRangeException">A value is not finite, a standard error negative, or the level not inside (0, 1).</exception>
    public static FiellerSet Ratio(Estimate numerator, Estimate denominator, double covariance, double degreesOfFreedom, double level)
    {
        double a = Guard.Finite(numerator.Value, nameof(numerator)), b = Guard.Finite(denominator.Value, nameof(denominator));
        double va = Square(Guard.NotNegative(numerator.StandardError, nameof(numerator)));
        double vb = Square(Guard.NotNegative(denominator.StandardError, nameof(denominator)));
        Guard.Finite(covariance);
        double t = StudentT.TwoSidedFactor(level, degreesOfFreedom);
        // (b² − t² v_b) θ² − 2 (ab − t² v_ab) θ + (a² − t² v_a) ≤ 0
        double qa = (b * b) - (t * t * vb);
        double qb = (a * b) - (t * t * covariance);
        double qc = (a * a) - (t * t * va);
        double discriminant = (qb * qb) - (qa * qc);
        double? ratio = b == 0 ? null : a / b;
        double? g = b == 0 ? null : t * t * vb / (b * b);
        if (qa > 0)
        {
            double root = Math.Sqrt(Math.Max(0, discriminant)); // an interval always holds the ratio itself, so a negative one is rounding
            double far = qb >= 0 ? (qb + root) / qa : (qb - root) / qa; // the root without cancellation; the other from the product of roots
            double near = far == 0 ? 0 : qc / qa / far;
            double theta = a / b;
            double variance = Math.Max(0, va - (2 * theta * covariance) + (theta * theta * vb));
            return new FiellerSet
            {
                Kind = FiellerKind.Interval,
                Ratio = ratio,
                Interval = new ConfidenceInterval(Math.Min(near, far), Math.Max(near, far), level),
                Level = level,
                G = g,
                DeltaStandardError = Math.Sqrt(variance) / Math.Abs(b),
            };
        }
        if (qa < 0 && discriminant > 0)
        {
            double root = Math.Sqrt(discriminant);
            double far = qb >= 0 ? (qb + root) / qa : (qb - root) / qa;
            double near = far == 0 ? 0 : qc / qa / far;
            return new FiellerSet
            {
                Kind = FiellerKind.Outside,
                Ratio = ratio,
                Gap = new ConfidenceInterval(Math.Min(near, far), Math.Max(near, far), level),
                Level = level,
                G = g,
            };
        }
        return new FiellerSet { Kind = FiellerKind.Everything, Ratio = ratio, Level = level, G = g };
    }

    /// <summary>Set for the x at which a fitted line b₀ + b₁x reaches a response.</summary>
    /// <param name="line">A fit of two columns: ones, then x.</param>
    /// <param name="response">The response wanted.</param>
    /// <param name="level">Such as 0.95.</param>
    /// <param name="newReadings">0 when the mean response is to be met; otherwise the number of new readings whose mean <paramref name="response"/> is (calibration).</param>
    /// <exception cref="ArgumentException">The fit has not two used columns or no degree of freedom.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The response is not finite, the count negative, or the level not inside (0, 1).</exception>
    public static FiellerSet InverseRegression(LeastSquaresFit line, double response, double level, int newReadings = 0)
    {
        if (line.Coefficients.Length != 2 || line.Rank != 2 || line.DegreesOfFreedom == 0)
            throw new ArgumentException("needs a line fitted to at least three rows with two different x", nameof(line));
        ArgumentOutOfRangeException.ThrowIfNegative(newReadings);
        double reading = newReadings > 0 ? line.ResidualScale * line.ResidualScale / newReadings : 0;
        Estimate numerator = new(Guard.Finite(response) - line.Coefficients[0], Math.Sqrt(line.Covariance(0, 0) + reading));
        return Ratio(numerator, line[1], -line.Covariance(0, 1), line.DegreesOfFreedom, level);
    }

    private static double Square(double value) => value * value;
}
