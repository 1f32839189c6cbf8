using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceRobustTests
{
    private const double RoundedMadFactor = 1 / 0.6745; // what R MASS uses for its median absolute residual

    [Fact]
    public void Stack_loss_agrees_with_MASS_for_Hubers_loss()
    {
        // Brownlee (1965); R MASS rlm, k = 1.345, MAD about 0, acc = 1e-12.
        RobustFit fit = StackLoss(new() { MadFactor = RoundedMadFactor, Tolerance = 1e-13 });
        Assert.True(fit.Convergence.Converged);
        Agree(9, [-41.026485373295, 0.829385770254, 0.926059415549, -0.127846317965], fit);
        Accuracy.AgreesTo(9, 2.44048904599, fit.ResidualScale);
        Accuracy.AgreesTo(8.5, 0.78579661253, fit.Weights[2]);
        Accuracy.AgreesTo(8.5, 0.504855924898, fit.Weights[3]);
        Accuracy.AgreesTo(8.5, 0.368083781778, fit.Weights[20]);
        Assert.Equal(3, fit.Weights.Count(w => w < 1));
        // Standard errors as printed at the looser stopping rule 1e-4 (statsmodels fixture results_rlm.py, from R): four digits in common.
        double[] errors = [9.807347196, 0.111180346, 0.303408095, 0.128852585];
        for (int j = 0; j < 4; j++)
            Accuracy.AgreesTo(3.5, errors[j], fit[j].StandardError);
    }

    [Fact]
    public void Stack_loss_agrees_with_MASS_for_the_bisquare()
    {
        // As above, psi.bisquare, c = 4.685.
        RobustFit fit = StackLoss(new() { Loss = RobustLoss.TukeyBisquare, MadFactor = RoundedMadFactor, Tolerance = 1e-13 });
        Assert.True(fit.Convergence.Converged);
        Agree(8.5, [-42.285321536491, 0.927558992802, 0.65071119839, -0.112333123036], fit);
        Accuracy.AgreesTo(8.5, 2.28185331457, fit.ResidualScale);
        Accuracy.AgreesTo(7, 0.0022178553166, fit.Weights[20]);
        double[] errors = [9.531385661491, 0.108051926238, 0.294870724088, 0.125226899561];
        for (int j = 0; j < 4; j++)
            Accuracy.AgreesTo(8, errors[j], fit[j].StandardError);
    }

    [Fact]
    public void Copper_location_agrees_with_MASS()
    {
        // Analytical Methods Committee (1989); R MASS huber (k = 1.5, scale kept at the MAD) and hubers (Proposal 2), both stopped at 1e-6 of the scale.
        double[] ones = [.. Copper.Values.Select(_ => 1.0)];
        RobustFit kept = RobustRegression.Fit(ones, Copper.Values, 1, new() { HuberConstant = 1.5, Scale = RobustScale.Fixed, FixedScale = NormalConsistentMad.Of(Copper.Values) });
        Accuracy.AgreesTo(6, 3.20672412964, kept.Coefficients[0]);
        RobustFit proposal = RobustRegression.Fit(ones, Copper.Values, 1, new() { HuberConstant = 1.5, Scale = RobustScale.HuberProposal2 });
        Accuracy.AgreesTo(6, 3.20549780345, proposal.Coefficients[0]);
        Accuracy.AgreesTo(5.5, 0.673652040343, proposal.ResidualScale);
    }

    [Fact]
    public void A_very_large_constant_gives_least_squares() => Gen.Select(Gen.Double[-5, 5].Array[12], Gen.Double[-5, 5].Array[12]).Sample((x, y) =>
    {
        double[] design = [.. x.Select(_ => 1.0), .. x];
        LeastSquaresFit plain = LeastSquares.Fit(design, y, 2);
        RobustFit robust = RobustRegression.Fit(design, y, 2, new() { HuberConstant = 1e6 });
        Assert.Equal(plain.Coefficients[0], robust.Coefficients[0], 9);
        Assert.Equal(plain.Coefficients[1], robust.Coefficients[1], 9);
    });

    [Theory]
    [InlineData(RobustLoss.Huber)]
    [InlineData(RobustLoss.TukeyBisquare)]
    public void Shift_and_scale_of_the_observations_carry_through(RobustLoss loss)
    {
        ReferenceData data = ReferenceData.Read("stack_loss.csv");
        RobustOptions options = new() { Loss = loss, Tolerance = 1e-13 };
        RobustFit before = StackLoss(options);
        Gen.Select(Gen.Double[-100, 100], Gen.Double[0.01, 100], Gen.Double[-3, 3]).Sample((shift, scale, slope) =>
        {
            double[] y = [.. data["loss"].Zip(data["air_flow"], (l, a) => shift + (scale * l) + (slope * a))];
            RobustFit after = RobustRegression.Fit(data.DesignWithIntercept("air_flow", "water_temperature", "acid"), y, 4, options);
            double size = Math.Abs(shift) + (50 * scale) + Math.Abs(slope);
            Assert.InRange(Math.Abs(after.Coefficients[0] - (shift + (scale * before.Coefficients[0]))), 0, 1e-7 * size);
            Assert.InRange(Math.Abs(after.Coefficients[1] - (slope + (scale * before.Coefficients[1]))), 0, 1e-7 * size);
            Assert.InRange(Math.Abs(after.ResidualScale - (scale * before.ResidualScale)), 0, 1e-7 * size);
        });
    }

    [Fact]
    public void The_bisquare_from_a_least_median_start_forgets_forty_percent_of_wild_rows() =>
        Gen.Select(Gen.Int[0, 100_000], Gen.Double[-1000, 1000], Gen.Double[-50, 50]).Sample((seed, place, slope) =>
        {
            SeededRandom random = new((ulong)seed);
            double[] x = [.. Enumerable.Range(0, 60).Select(i => i / 6.0)];
            double[] y = [.. x.Select((v, i) => i % 5 < 2 ? place + (slope * v) + (20 * random.NextNormal()) : 2 + (0.5 * v) + (0.1 * random.NextNormal()))];
            RobustFit fit = RobustRegression.Fit([.. x.Select(_ => 1.0), .. x], y, 2, new() { Loss = RobustLoss.TukeyBisquare, Start = RobustStart.LeastMedian });
            Assert.True(fit.Convergence.Converged);
            Assert.Equal(2, fit.Coefficients[0], 0.3); // 36 good rows of 0.1: standard error 0.03
            Assert.Equal(0.5, fit.Coefficients[1], 0.06);
        }, iter: 30);

    [Fact]
    public void Huber_s_fit_bounds_a_few_wild_rows_and_the_bisquare_forgets_them()
    {
        SeededRandom random = new(99);
        double[] x = [.. Enumerable.Range(0, 60).Select(i => i / 6.0)];
        double[] y = [.. x.Select((v, i) => i % 10 == 3 ? 500 : 2 + (0.5 * v) + (0.1 * random.NextNormal()))];
        double[] design = [.. x.Select(_ => 1.0), .. x];
        RobustFit huber = RobustRegression.Fit(design, y, 2), bisquare = RobustRegression.Fit(design, y, 2, new() { Loss = RobustLoss.TukeyBisquare });
        Assert.True(huber.Convergence.Converged && bisquare.Convergence.Converged);
        Assert.Equal(2, huber.Coefficients[0], 0.3);
        Assert.Equal(2, bisquare.Coefficients[0], 0.1);
        Assert.Equal(6, bisquare.Weights.Count(w => w == 0));
        Assert.True(Math.Abs(LeastSquares.Fit(design, y, 2).Coefficients[0] - 2) > 20); // least squares is pulled away: the test would notice
    }

    [Fact]
    public void Rows_met_exactly_give_scale_zero_and_settle()
    {
        double[] x = [0, 1, 2, 3, 4, 5, 6];
        RobustFit fit = RobustRegression.Fit([.. x.Select(_ => 1.0), .. x], [.. x.Select(v => 1 + (2 * v))], 2);
        Assert.True(fit.Convergence.Converged);
        Assert.Equal(1, fit.Coefficients[0], 12);
        Assert.All(fit.Covariance, c => Assert.True(double.IsFinite(c)));
    }

    [Fact]
    public void An_iteration_cut_short_says_so()
    {
        RobustFit fit = StackLoss(new() { MaximumIterations = 2 });
        Assert.False(fit.Convergence.Converged);
        Assert.Equal(2, fit.Convergence.Iterations);
        Assert.True(fit.Convergence.LastStep > 1e-10);
    }

    private static RobustFit StackLoss(RobustOptions options)
    {
        ReferenceData data = ReferenceData.Read("stack_loss.csv");
        return RobustRegression.Fit(data.DesignWithIntercept("air_flow", "water_temperature", "acid"), data["loss"], 4, options);
    }

    private static void Agree(double digits, double[] expected, RobustFit fit)
    {
        for (int j = 0; j < expected.Length; j++)
            Accuracy.AgreesTo(digits, expected[j], fit.Coefficients[j]);
    }
}
