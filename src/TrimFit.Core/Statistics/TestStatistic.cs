namespace TrimFit.Core.Statistics;

/// <summary>A test statistic with its reference distribution's tail.</summary>
/// <param name="Value">The statistic.</param>
/// <param name="DegreesOfFreedom">Degrees of freedom of its distribution under the null hypothesis.</param>
/// <param name="PValue">Probability of a value at least this large under the null hypothesis.</param>
public readonly record struct TestStatistic(double Value, int DegreesOfFreedom, double PValue)
{
    internal static TestStatistic ChiSquared(double value, int degrees) =>
        new(value, degrees, degrees > 0 ? ChiSquare.UpperTail(value, degrees) : 1);
}
