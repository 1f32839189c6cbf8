namespace TrimFit.Core.Statistics;

/// <summary>A difference of two means with its standard error.</summary>
/// <param name="Value">First mean less second.</param>
/// <param name="StandardError">Its standard error.</param>
/// <param name="DegreesOfFreedom">Degrees of freedom of the standard error.</param>
public readonly record struct MeanDifference(double Value, double StandardError, double DegreesOfFreedom)
{
    /// <summary>Two independent samples of equal variance (Student).</summary>
    /// <param name="first">At least two values, finite.</param>
    /// <param name="second">At least two values, finite.</param>
    /// <exception cref="ArgumentException">A sample has fewer than two values or one is not finite.</exception>
    public static MeanDifference Pooled(ReadOnlySpan<double> first, ReadOnlySpan<double> second)
    {
        double degrees = first.Length + second.Length - 2;
        double variance = (((first.Length - 1) * SampleMoments.Variance(first)) + ((second.Length - 1) * SampleMoments.Variance(second))) / degrees;
        return new(SampleMoments.Mean(first) - SampleMoments.Mean(second), Math.Sqrt(variance * ((1.0 / first.Length) + (1.0 / second.Length))), degrees);
    }

    /// <summary>Two independent samples of any variances (B. L. Welch, Biometrika 34 (1947) 28).</summary>
    /// <remarks>Two samples without any spread have standard error 0 and n₁ + n₂ − 2 degrees of freedom.</remarks>
    /// <inheritdoc cref="Pooled"/>
    public static MeanDifference Welch(ReadOnlySpan<double> first, ReadOnlySpan<double> second)
    {
        double a = SampleMoments.Variance(first) / first.Length, b = SampleMoments.Variance(second) / second.Length;
        double degrees = a + b > 0
            ? (a + b) * (a + b) / ((a * a / (first.Length - 1)) + (b * b / (second.Length - 1)))
            : first.Length + second.Length - 2;
        return new(SampleMoments.Mean(first) - SampleMoments.Mean(second), Math.Sqrt(a + b), degrees);
    }

    /// <summary>Pairs: the mean of first less second.</summary>
    /// <param name="first">At least two values, finite.</param>
    /// <param name="second">As many, each belonging to the one of <paramref name="first"/> at its place.</param>
    /// <exception cref="ArgumentException">Lengths differ, there are fewer than two pairs, or a value is not finite.</exception>
    public static MeanDifference Paired(ReadOnlySpan<double> first, ReadOnlySpan<double> second)
    {
        Guard.SameLength(first, second);
        double[] differences = new double[first.Length];
        for (int i = 0; i < differences.Length; i++)
            differences[i] = first[i] - second[i];
        return new(SampleMoments.Mean(differences), SampleMoments.StandardDeviation(differences) / Math.Sqrt(differences.Length), differences.Length - 1);
    }
}
