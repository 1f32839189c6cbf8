using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceQuantileTests
{
    [Fact]
    public void The_copper_values_have_the_published_median_and_deviation()
    {
        // Analytical Methods Committee, Analyst 114 (1989) 1693; median 3.385 and scaled MAD 0.526323 with R MASS (chem), factor 1.4826.
        Assert.Equal(3.385, Median.Of(Copper.Values), 12);
        Accuracy.AgreesTo(5.5, 0.526323, NormalConsistentMad.Of(Copper.Values));
    }

    [Theory] // R: quantile(c(1, 2, 4, 7, 11), p), default type 7, by hand 1 + 4p
    [InlineData(0, 1)]
    [InlineData(0.1, 1.4)]
    [InlineData(0.25, 2)]
    [InlineData(0.5, 4)]
    [InlineData(0.9, 9.4)]
    [InlineData(1, 11)]
    public void Type_7_interpolates_between_neighbours(double p, double expected) =>
        Assert.Equal(expected, QuantileType7.Of([7, 1, 11, 4, 2], p), 12);

    [Fact]
    public void Selection_finds_what_sorting_finds() => Gen.Select(Gen.Int[0, 20].Array[1, 200], Gen.Double[0, 1]).Sample((values, p) =>
    {
        double[] column = [.. values.Select(v => (double)v)]; // many ties
        double[] sorted = [.. column.Order()];
        double position = p * (sorted.Length - 1);
        int below = (int)Math.Floor(position);
        double expected = below + 1 < sorted.Length ? sorted[below] + ((position - below) * (sorted[below + 1] - sorted[below])) : sorted[below];
        Assert.Equal(expected, QuantileType7.Of(column, p), 12);
    });

    [Fact]
    public void Whole_number_weights_are_repeats() => Gen.Select(Gen.Select(Gen.Int[-50, 50], Gen.Int[0, 4]).Array[1, 300], Gen.Int[0, 20]).Where(t => t.Item1.Any(v => v.Item2 > 0)).Sample((pairs, twentieth) =>
    {
        double[] repeated = [.. pairs.SelectMany(v => Enumerable.Repeat((double)v.Item1, v.Item2))];
        Span<double> three = stackalloc double[3]; // together with others, which sort other parts of the column
        WeightedQuantile.Of([.. pairs.Select(v => (double)v.Item1)], [.. pairs.Select(v => (double)v.Item2)], [0.9, twentieth / 20.0, 0.025], three);
        double weighted = three[1];
        // Type 2 of Hyndman & Fan, written out on the repeats: mean of the neighbours where n p is whole.
        double[] sorted = [.. repeated.Order()];
        int whole = twentieth * sorted.Length;
        double expected = whole % 20 == 0
            ? (sorted[Math.Max(0, (whole / 20) - 1)] + sorted[Math.Min(sorted.Length - 1, whole / 20)]) / 2
            : sorted[whole / 20];
        Assert.Equal(expected, weighted, 12);
    });

    [Fact]
    public void Shift_and_scale_carry_through() => Gen.Select(Gen.Double[-5, 5].Array[1, 50], Gen.Double[-100, 100], Gen.Double[0.1, 10]).Sample((values, shift, scale) =>
    {
        double[] moved = [.. values.Select(v => shift + (scale * v))];
        Assert.Equal(shift + (scale * Median.Of(values)), Median.Of(moved), 9);
        Assert.Equal(scale * NormalConsistentMad.Of(values), NormalConsistentMad.Of(moved), 9);
    });

    [Fact]
    public void An_empty_column_has_no_quantile_and_says_so()
    {
        ArgumentException error = Assert.Throws<ArgumentException>(() => Median.Of([]));
        Assert.Equal("is empty: an empty column has no quantile (Parameter 'values')", error.Message);
        error = Assert.Throws<ArgumentException>(() => WeightedQuantile.Of([1, 2], [0, 0], 0.5));
        Assert.Equal("add up to 0: must be above 0 and finite (Parameter 'weights')", error.Message);
    }

    [Fact]
    public void The_callers_column_keeps_its_order()
    {
        double[] values = [3, 1, 2];
        Median.Of(values);
        NormalConsistentMad.Of(values);
        Assert.Equal([3, 1, 2], values);
    }

    [Fact]
    public void Equal_weights_are_worth_all_samples_and_one_heavy_weight_is_worth_one()
    {
        Assert.Equal(4, EffectiveSamples.Kish([2, 2, 2, 2]), 12);
        Assert.Equal(1, EffectiveSamples.Kish([1e-300, 1]), 12);
        Assert.Equal(1.8, EffectiveSamples.Kish([1, 2]), 12); // (1 + 2)²/(1 + 4)
        Assert.Equal(2, EffectiveSamples.Kish([1e-200, 1e-200]), 12);
        Assert.Equal(0, EffectiveSamples.Kish([0, 0]));
    }
}
