using System.Runtime.CompilerServices;

namespace TrimFit.Core;

/// <summary>Checks of arguments, written so that NaN fails them.</summary>
public static class Guard
{
    /// <summary>Returns <paramref name="value"/> when it is finite.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is NaN or infinite.</exception>
    public static double Finite(double value, [CallerArgumentExpression(nameof(value))] string? name = null) =>
        double.IsFinite(value) ? value : throw new ArgumentOutOfRangeException(name, value, "must be finite");

    /// <summary>Returns <paramref name="value"/> when it is finite and above zero.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is NaN, infinite, zero or negative.</exception>
    public static double Positive(double value, [CallerArgumentExpression(nameof(value))] string? name = null) =>
        value > 0 && double.IsFinite(value) ? value : throw new ArgumentOutOfRangeException(name, value, "must be above 0");

    /// <summary>Returns <paramref name="value"/> when it is finite and not negative.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is NaN, infinite or negative.</exception>
    public static double NotNegative(double value, [CallerArgumentExpression(nameof(value))] string? name = null) =>
        value >= 0 && double.IsFinite(value) ? value : throw new ArgumentOutOfRangeException(name, value, "must not be negative");

    /// <summary>Checks that two columns have the same number of rows.</summary>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void SameLength(ReadOnlySpan<double> first, ReadOnlySpan<double> second, [CallerArgumentExpression(nameof(second))] string? name = null)
    {
        if (first.Length != second.Length)
            throw new ArgumentException(FormattableString.Invariant($"has {second.Length} rows, expected {first.Length}"), name);
    }

    /// <summary>Checks that every value is finite and larger than the one before it.</summary>
    /// <exception cref="ArgumentException">A value is not finite, repeats or runs back.</exception>
    public static void StrictlyIncreasing(ReadOnlySpan<double> values, [CallerArgumentExpression(nameof(values))] string? name = null)
    {
        for (int i = 0; i < values.Length; i++)
        {
            if (!double.IsFinite(values[i]) || (i > 0 && !(values[i] > values[i - 1])))
                throw new ArgumentException(FormattableString.Invariant($"value {i} is {values[i]}: must be finite and increase"), name);
        }
    }
}
