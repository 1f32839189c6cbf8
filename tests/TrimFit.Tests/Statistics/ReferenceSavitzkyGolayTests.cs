using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceSavitzkyGolayTests
{
    // Savitzky & Golay, Anal. Chem. 36 (1964) 1627, with the corrections of Steinier, Termonia & Deltour, Anal. Chem. 44 (1972) 1906; exact integers over a denominator.
    // Second derivatives: the printed tables fit y, so their weights are those of the quadratic's coefficient doubled, as here.
    [Theory]
    [InlineData(5, 2, 0, 35, new[] { -3, 12, 17, 12, -3 })]
    [InlineData(5, 3, 0, 35, new[] { -3, 12, 17, 12, -3 })]
    [InlineData(7, 2, 0, 21, new[] { -2, 3, 6, 7, 6, 3, -2 })]
    [InlineData(9, 3, 0, 231, new[] { -21, 14, 39, 54, 59, 54, 39, 14, -21 })]
    [InlineData(11, 2, 0, 429, new[] { -36, 9, 44, 69, 84, 89, 84, 69, 44, 9, -36 })]
    [InlineData(5, 4, 0, 1, new[] { 0, 0, 1, 0, 0 })]
    [InlineData(7, 4, 0, 231, new[] { 5, -30, 75, 131, 75, -30, 5 })]
    [InlineData(9, 5, 0, 429, new[] { 15, -55, 30, 135, 179, 135, 30, -55, 15 })]
    [InlineData(11, 4, 0, 429, new[] { 18, -45, -10, 60, 120, 143, 120, 60, -10, -45, 18 })]
    [InlineData(5, 1, 1, 10, new[] { -2, -1, 0, 1, 2 })]
    [InlineData(7, 2, 1, 28, new[] { -3, -2, -1, 0, 1, 2, 3 })]
    [InlineData(11, 2, 1, 110, new[] { -5, -4, -3, -2, -1, 0, 1, 2, 3, 4, 5 })]
    [InlineData(5, 3, 1, 12, new[] { 1, -8, 0, 8, -1 })]
    [InlineData(7, 4, 1, 252, new[] { 22, -67, -58, 0, 58, 67, -22 })]
    [InlineData(9, 3, 1, 1188, new[] { 86, -142, -193, -126, 0, 126, 193, 142, -86 })]
    [InlineData(11, 4, 1, 5148, new[] { 300, -294, -532, -503, -296, 0, 296, 503, 532, 294, -300 })]
    [InlineData(5, 2, 2, 7, new[] { 2, -1, -2, -1, 2 })]
    [InlineData(7, 3, 2, 42, new[] { 5, 0, -3, -4, -3, 0, 5 })]
    [InlineData(9, 2, 2, 462, new[] { 28, 7, -8, -17, -20, -17, -8, 7, 28 })]
    [InlineData(5, 4, 2, 12, new[] { -1, 16, -30, 16, -1 })]
    [InlineData(7, 5, 2, 132, new[] { -13, 67, -19, -70, -19, 67, -13 })]
    [InlineData(11, 4, 2, 1716, new[] { -90, 174, 146, 1, -136, -190, -136, 1, 146, 174, -90 })]
    public void Weights_are_those_of_the_tables(int points, int degree, int derivative, int denominator, int[] table)
    {
        ReadOnlySpan<double> weights = new SavitzkyGolay(points, degree, derivative).CentralWeights;
        Assert.Equal(table.Length, weights.Length);
        for (int i = 0; i < table.Length; i++)
            Assert.Equal(table[i], weights[i] * denominator, 1e-10 * denominator);
    }

    [Fact]
    public void A_polynomial_comes_through_unchanged_to_the_last_sample() =>
        Gen.Select(Gen.Double[-2, 2].Array[4], Gen.Int[0, 2], Gen.Double[0.05, 2]).Sample((c, derivative, spacing) =>
        {
            SavitzkyGolay filter = new(7, 3, derivative);
            double[] values = [.. Enumerable.Range(0, 20).Select(i => Polynomial(c, i * spacing, 0))];
            double[] filtered = new double[20];
            filter.Apply(values, spacing, filtered);
            double size = (values.Max(Math.Abs) + 1) / Math.Pow(spacing, derivative);
            for (int i = 0; i < 20; i++)
                Assert.InRange(Math.Abs(filtered[i] - Polynomial(c, i * spacing, derivative)), 0, 1e-11 * size);
        });

    [Fact]
    public void Wrong_windows_are_refused()
    {
        Assert.StartsWith("must be odd and at least 3 (Parameter 'points')", Assert.Throws<ArgumentOutOfRangeException>(() => new SavitzkyGolay(6, 2)).Message, StringComparison.Ordinal);
        Assert.StartsWith("must be from 0 to the degree (Parameter 'derivative')", Assert.Throws<ArgumentOutOfRangeException>(() => new SavitzkyGolay(5, 1, 2)).Message, StringComparison.Ordinal);
        Assert.Equal(
            "has 3 samples, expected at least the window's 5 (Parameter 'values')",
            Assert.Throws<ArgumentException>(() => new SavitzkyGolay(5, 2).Apply([1, 2, 3], 1, new double[3])).Message);
    }

    private static double Polynomial(double[] c, double x, int derivative) => derivative switch
    {
        0 => c[0] + (x * (c[1] + (x * (c[2] + (x * c[3]))))),
        1 => c[1] + (x * ((2 * c[2]) + (x * 3 * c[3]))),
        _ => (2 * c[2]) + (6 * c[3] * x),
    };
}
