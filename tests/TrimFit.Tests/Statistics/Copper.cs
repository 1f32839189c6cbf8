namespace TrimFit.Tests.Statistics;

/// <summary>24 determinations of copper in wholemeal flour, µg/g: Analytical Methods Committee, Analyst 114 (1989) 1693 (R MASS, <c>chem</c>).</summary>
internal static class Copper
{
    public static double[] Values { get; } =
    [
        2.9, 3.1, 3.4, 3.4, 3.7, 3.7, 2.8, 2.5, 2.4, 2.4, 2.7, 2.2, 5.28, 3.37, 3.03, 3.03, 28.95, 3.77, 3.4, 2.2, 3.5, 3.6, 3.7, 3.7,
    ];
}
