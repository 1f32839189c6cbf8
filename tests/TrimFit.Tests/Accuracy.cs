namespace TrimFit.Tests;

/// <summary>Agreement of numbers, counted in digits.</summary>
internal static class Accuracy
{
    /// <summary>Asserts that −log₁₀ of the relative error (of the absolute error when zero is expected) is at least <paramref name="digits"/>.</summary>
    public static void AgreesTo(double digits, double expected, double actual)
    {
        double error = Math.Abs(actual - expected) / (expected == 0 ? 1 : Math.Abs(expected)); // 0 has no relative error
        double agreed = error == 0 ? 17 : -Math.Log10(error);
        Assert.True(agreed >= digits, FormattableString.Invariant($"expected {expected:R}, found {actual:R}: {agreed:F2} digits agree, {digits} wanted"));
    }
}
