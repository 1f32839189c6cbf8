using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class LeastSquaresTests
{
    [Fact]
    public void A_column_that_repeats_earlier_ones_is_left_out_and_named()
    {
        double[] design = [1, 1, 1, 1, 0, 1, 2, 3, 5, 5 + 0.3, 5 + 0.6, 5 + 0.9]; // the third is 5 + 0.3 times the second
        LeastSquaresFit fit = LeastSquares.Fit(design, [1, 3, 5, 7], 3);
        Assert.Equal([2], fit.ColumnsLeftOut);
        Assert.Equal(2, fit.Rank);
        Assert.Equal(2, fit.DegreesOfFreedom);
        Assert.Equal([1.0, 2.0, 0.0], fit.Coefficients.Select(c => Math.Round(c, 12)));
        Assert.Equal(0, fit.Covariance(2, 2));
    }

    [Fact]
    public void A_column_of_zeros_is_left_out()
    {
        LeastSquaresFit fit = LeastSquares.Fit([0, 0, 0, 1, 1, 1], [1, 2, 3], 2);
        Assert.Equal([0], fit.ColumnsLeftOut);
        Assert.Equal(2, fit.Coefficients[1], 14);
    }

    [Fact]
    public void Fewer_rows_than_columns_is_an_answer()
    {
        LeastSquaresFit fit = LeastSquares.Fit([1, 1, 0, 1, 0, 1], [2, 5], 3);
        Assert.Equal(2, fit.Rank);
        Assert.Equal(0, fit.DegreesOfFreedom);
        Assert.Equal(0, fit.ResidualScale);
        LeastSquaresFit empty = LeastSquares.Fit([], [], 2);
        Assert.Equal(0, empty.Rank);
        Assert.Equal([0, 1], empty.ColumnsLeftOut);
        Assert.Equal(1, empty.Condition);
    }

    [Fact]
    public void A_weight_of_three_is_the_row_three_times_for_the_coefficients()
    {
        double[] x = [0, 1, 2, 5, 7], y = [1, 0, 4, 3, 9], w = [1, 3, 1, 2, 1];
        int[] rows = [0, 1, 1, 1, 2, 3, 3, 4];
        LeastSquaresFit weighted = LeastSquares.Fit([1, 1, 1, 1, 1, .. x], y, 2, w);
        LeastSquaresFit repeated = LeastSquares.Fit([.. rows.Select(_ => 1.0), .. rows.Select(i => x[i])], [.. rows.Select(i => y[i])], 2);
        Accuracy.AgreesTo(13, repeated.Coefficients[0], weighted.Coefficients[0]);
        Accuracy.AgreesTo(13, repeated.Coefficients[1], weighted.Coefficients[1]);
        Accuracy.AgreesTo(13, repeated.ResidualSumOfSquares, weighted.ResidualSumOfSquares);
        Accuracy.AgreesTo(13, repeated.InverseCross[3], weighted.InverseCross[3]);
        Accuracy.AgreesTo(12, y[3] - weighted.Coefficients[0] - (weighted.Coefficients[1] * x[3]), weighted.Residuals[3]);
    }

    [Fact]
    public void Rows_of_weight_zero_do_not_count()
    {
        LeastSquaresFit fit = LeastSquares.Fit([1, 1, 1, 1], [1, 2, 3, 1e9], 1, [1, 1, 1, 0]);
        Assert.Equal(2, fit.Coefficients[0], 14);
        Assert.Equal(2, fit.DegreesOfFreedom);
        Assert.Equal(1e9 - 2, fit.Residuals[3]);
    }

    [Fact]
    public void Unix_seconds_as_predictor_keep_the_slope()
    {
        // y = 3 + 0.25 s exactly, s seconds after 1,700,000,000: the slope survives an offset of 1.7e9.
        double[] seconds = [.. Enumerable.Range(0, 600).Select(i => 1_700_000_000.0 + i)];
        double[] y = [.. Enumerable.Range(0, 600).Select(i => 3 + (0.25 * i))];
        LeastSquaresFit fit = LeastSquares.Fit([.. y.Select(_ => 1.0), .. seconds], y, 2);
        Accuracy.AgreesTo(12, 0.25, fit.Coefficients[1]);
    }

    [Fact]
    public void The_condition_number_is_that_of_two_columns_at_an_angle()
    {
        // Two unit columns at angle φ have singular values √(1 ± cos φ).
        const double angle = 0.01;
        LeastSquaresFit fit = LeastSquares.Fit([1, 0, 0, 1e6 * Math.Cos(angle), 1e6 * Math.Sin(angle), 0], [1, 2, 3], 2);
        Accuracy.AgreesTo(9, 1 / Math.Tan(angle / 2), fit.Condition);
    }

    [Fact]
    public void Residuals_stand_square_on_every_column_and_scale_carries_through() =>
        Gen.Select(Gen.Double[-10, 10].Array[24], Gen.Double[-10, 10].Array[8], Gen.Double[0.001, 1000], Gen.Double[0.001, 1000]).Sample((design, y, stretch, gain) =>
        {
            LeastSquaresFit fit = LeastSquares.Fit(design, y, 3);
            for (int j = 0; j < 3; j++)
                Assert.InRange(Math.Abs(Enumerable.Range(0, 8).Sum(i => design[(8 * j) + i] * fit.Residuals[i])), 0, 1e-10);
            if (fit.Rank < 3 || fit.Condition > 1e4)
                return;
            double[] scaled = [.. design.Select((v, k) => k < 8 ? v * stretch : v)];
            LeastSquaresFit other = LeastSquares.Fit(scaled, [.. y.Select(v => gain * v)], 3);
            double size = fit.Coefficients.Max(Math.Abs) + 1e-6;
            Assert.InRange(Math.Abs((other.Coefficients[0] * stretch / gain) - fit.Coefficients[0]), 0, 1e-9 * size);
            Assert.InRange(Math.Abs((other.Coefficients[2] / gain) - fit.Coefficients[2]), 0, 1e-9 * size);
        });

    [Fact]
    public void Wrong_shapes_and_values_are_named()
    {
        Assert.Equal("has 5 values, expected 3 rows × 2 columns (Parameter 'design')", Assert.Throws<ArgumentException>(() => LeastSquares.Fit([1, 2, 3, 4, 5], [1, 2, 3], 2)).Message);
        Assert.Equal("row 1 of column 1 is NaN: must be finite (Parameter 'design')", Assert.Throws<ArgumentException>(() => LeastSquares.Fit([1, 1, 3, double.NaN], [1, 2], 2)).Message);
        Assert.Equal("row 0 is Infinity: must be finite (Parameter 'y')", Assert.Throws<ArgumentException>(() => LeastSquares.Fit([1, 1], [double.PositiveInfinity, 2], 1)).Message);
        Assert.Equal("row 1 is -1: must be finite and not negative (Parameter 'weights')", Assert.Throws<ArgumentException>(() => LeastSquares.Fit([1, 1], [1, 2], 1, [1, -1])).Message);
    }
}
