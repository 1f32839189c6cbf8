using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceSmallToolsTests
{
    [Theory] // exact sums of binomial terms in rational arithmetic (Python fractions)
    [InlineData(2000, 0.95, 0.99, 1874, 1924)]
    [InlineData(200, 0.95, 0.99, 181, 197)]
    [InlineData(10, 0.5, 0.95, 2, 8)]
    [InlineData(200, 0.05, 0.99, 3, 19)]
    public void Binomial_bands_are_exact(int trials, double p, double level, int lowest, int highest) =>
        Assert.Equal((lowest, highest), BinomialBand.Counts(trials, p, level));

    [Fact]
    public void Clopper_and_Pearson_intervals_meet_their_closed_forms()
    {
        // 0 of n: upper end 1 − (α/2)^(1/n); n of n mirrored.
        Accuracy.AgreesTo(12, 1 - Math.Pow(0.025, 1.0 / 30), BinomialBand.ClopperPearson(0, 30, 0.95).Upper);
        Accuracy.AgreesTo(12, Math.Pow(0.025, 1.0 / 30), BinomialBand.ClopperPearson(30, 30, 0.95).Lower);
        Assert.Equal(0, BinomialBand.ClopperPearson(0, 30, 0.95).Lower);
        Assert.Equal(1, BinomialBand.ClopperPearson(30, 30, 0.95).Upper);
        // One success of two: lower end 1 − √(1 − α/2), by hand from 1 − (1 − p)² = α/2.
        Accuracy.AgreesTo(12, 1 - Math.Sqrt(0.975), BinomialBand.ClopperPearson(1, 2, 0.95).Lower);
    }

    [Fact]
    public void F_tails_meet_the_t_distribution() // F(1, ν) is t(ν) squared
    {
        Accuracy.AgreesTo(5, 0.05, FisherF.UpperTail(2.228139 * 2.228139, 1, 10)); // t table, 10 degrees of freedom
        Accuracy.AgreesTo(12, StudentT.TwoSidedP(1.3, 7), FisherF.UpperTail(1.69, 1, 7));
    }

    [Fact]
    public void A_monotone_curve_stays_monotone_and_goes_through_its_points() =>
        Gen.Select(Gen.Double[0.01, 5].Array[2, 12], Gen.Double[0, 5].Array[12]).Sample((steps, rises) =>
        {
            double[] x = new double[steps.Length], y = new double[steps.Length];
            for (int i = 1; i < x.Length; i++)
                (x[i], y[i]) = (x[i - 1] + steps[i], y[i - 1] + rises[i]);
            MonotoneCubic curve = MonotoneCubic.Through(x, y);
            double last = y[0];
            for (int k = 0; k <= 500; k++)
            {
                double value = curve.At(x[^1] * k / 500);
                Assert.True(value >= last - (1e-13 * (1 + Math.Abs(last))));
                last = value;
                Assert.True(curve.SlopeAt(x[^1] * k / 500) >= -1e-12);
            }
            for (int i = 0; i < x.Length; i++)
                Assert.Equal(y[i], curve.At(x[i]));
        });

    [Fact]
    public void The_data_of_Fritsch_and_Carlson_are_joined_without_overshoot()
    {
        // Fritsch & Carlson, SIAM J. Numer. Anal. 17 (1980) 238, "RPN 14" data, on which an ordinary cubic spline runs negative and above 1.
        double[] x = [7.99, 8.09, 8.19, 8.7, 9.2, 10, 12, 15, 20];
        double[] y = [0, 2.76429e-5, 4.37498e-2, 0.169183, 0.469428, 0.943740, 0.998636, 0.999919, 0.999994];
        MonotoneCubic curve = MonotoneCubic.Through(x, y);
        for (int i = 0; i + 1 < x.Length; i++)
        {
            for (int k = 0; k <= 20; k++)
                Assert.InRange(curve.At(x[i] + ((x[i + 1] - x[i]) * k / 20)), y[i], y[i + 1]);
        }
        // Slopes by hand from the algorithm: at 8.7 the mean of the secants 0.245948 and 0.600490; from 10 on every interval shortens the
        // slopes it shares with the next: 0.310169 → 0.08226 at 10, 0.0139378 → 0.003698 at 12, 2.2133e-4 → 7.664e-5 → 4.416e-5 at 15.
        Accuracy.AgreesTo(4, 0.423219, curve.SlopeAt(8.7));
        Accuracy.AgreesTo(3.5, 4.416e-5, curve.SlopeAt(15));
    }

    [Fact]
    public void Straight_points_give_a_straight_curve_that_ends_level()
    {
        MonotoneCubic curve = MonotoneCubic.Through([0, 1, 4], [2, 5, 14]);
        Assert.Equal(2 + (3 * 2.7), curve.At(2.7), 12);
        Assert.Equal(3, curve.SlopeAt(4), 12);
        Assert.Equal(2, curve.At(-1));
        Assert.Equal(14, curve.At(9));
        Assert.Equal(0, curve.SlopeAt(9));
        Assert.Equal(7, MonotoneCubic.Through([3], [7]).At(100));
        Assert.Throws<ArgumentOutOfRangeException>(() => curve.At(double.NaN));
    }

    [Fact]
    public void The_exponential_meets_its_closed_forms()
    {
        MatrixExponential two = new(2);
        double[] e = new double[4];
        two.Compute([0, 1, -1, 0], 0.7, e); // a turn by 0.7
        AgreeAll(14, [Math.Cos(0.7), Math.Sin(0.7), -Math.Sin(0.7), Math.Cos(0.7)], e);
        two.Compute([0, 1, 0, 0], 3, e); // nilpotent
        Assert.Equal([1, 3, 0, 1], e.Select(v => Math.Round(v, 13)));
        two.Compute([-1, 0, 0, -50], 2, e); // diagonal, widely spread
        Accuracy.AgreesTo(12, Math.Exp(-2), e[0]);
        Assert.Equal(Math.Exp(-100), e[3], 1e-15);
        // Moler & Van Loan, SIAM Rev. 20 (1978) 801, example [[−49, 24], [−64, 31]]: −0.735759, 0.551819, −1.471518, 1.103638.
        two.Compute([-49, 24, -64, 31], 1, e);
        double[] printed = [-0.735759, 0.551819, -1.471518, 1.103638];
        for (int i = 0; i < 4; i++)
            Assert.Equal(printed[i], e[i], 6);
        // The same exactly: eigenvalues −1 and −17.
        double p = Math.Exp(-1), q = Math.Exp(-17);
        AgreeAll(11, [(-2 * p) + (3 * q), (1.5 * p) - (1.5 * q), (-4 * p) + (4 * q), (3 * p) - (2 * q)], e);
    }

    [Fact]
    public void Exponentials_of_one_matrix_multiply() => Gen.Select(Gen.Double[-3, 3].Array[9], Gen.Double[0, 1], Gen.Double[0, 1]).Sample((a, s, t) =>
    {
        MatrixExponential exponential = new(3);
        double[] es = new double[9], et = new double[9], both = new double[9], product = new double[9];
        exponential.Compute(a, s, es);
        exponential.Compute(a, t, et);
        exponential.Compute(a, s + t, both);
        SmallMatrix.Multiply(es, et, product, 3);
        double size = es.Max(Math.Abs) * et.Max(Math.Abs) * 3;
        for (int i = 0; i < 9; i++)
            Assert.InRange(Math.Abs(both[i] - product[i]), 0, 1e-12 * size);
    });

    [Theory]
    [InlineData(0.05, 2)]
    [InlineData(3, 0.4)]
    [InlineData(500, 0.5)] // a step of a thousand time constants
    public void A_first_order_disturbance_discretises_as_on_paper(double step, double tau)
    {
        // dw/dt = −w/τ + noise of density q: Φ = e^(−t/τ), Q_d = q τ/2 (1 − e^(−2t/τ)).
        double[] phi = new double[1], noise = new double[1];
        new VanLoan(1).Discretize([-1 / tau], [0.3], step, phi, noise);
        Assert.Equal(Math.Exp(-step / tau), phi[0], 1e-14);
        Accuracy.AgreesTo(13, 0.3 * tau / 2 * (1 - Math.Exp(-2 * step / tau)), noise[0]);
    }

    [Fact]
    public void An_integrated_noise_discretises_as_on_paper()
    {
        // dx/dt = v, dv = noise of density q: Q_d = q [[t³/3, t²/2], [t²/2, t]].
        double[] phi = new double[4], noise = new double[4];
        new VanLoan(2).Discretize([0, 1, 0, 0], [0, 0, 0, 2], 0.3, phi, noise);
        AgreeAll(14, [1, 0.3, 0, 1], phi);
        AgreeAll(13, [2 * 0.027 / 3, 2 * 0.09 / 2, 2 * 0.09 / 2, 0.6], noise);
    }

    [Fact]
    public void Two_steps_make_one_long_one() => Gen.Select(Gen.Double[-2, 2].Array[9], Gen.Double[-1, 1].Array[9], Gen.Double[0.01, 1.5]).Sample((a, root, t) =>
    {
        double[] q = new double[9];
        SmallMatrix.MultiplyTransposed(root, root, q, 3);
        VanLoan vanLoan = new(3);
        double[] phi = new double[9], noise = new double[9], longPhi = new double[9], longNoise = new double[9], work = new double[9], moved = new double[9];
        vanLoan.Discretize(a, q, t, phi, noise);
        vanLoan.Discretize(a, q, 2 * t, longPhi, longNoise);
        SmallMatrix.Multiply(phi, noise, work, 3);
        SmallMatrix.MultiplyTransposed(work, phi, moved, 3);
        double size = 1e-300 + longNoise.Max(Math.Abs);
        for (int i = 0; i < 9; i++)
            Assert.InRange(Math.Abs(noise[i] + moved[i] - longNoise[i]), 0, 1e-10 * size);
    });

    [Fact]
    public void A_step_of_no_length_changes_nothing()
    {
        double[] phi = new double[4], noise = new double[4];
        new VanLoan(2).Discretize([-1, 2, 0, -3], [1, 0, 0, 1], 0, phi, noise);
        Assert.Equal([1, 0, 0, 1], phi);
        Assert.Equal([0, 0, 0, 0], noise.Select(v => v + 0.0));
    }

    [Fact]
    public void A_matrix_that_is_not_finite_is_refused() =>
        Assert.Equal(
            "column 1 adds up to NaN: must be finite (Parameter 'matrix')",
            Assert.Throws<ArgumentException>(() => new MatrixExponential(2).Compute([0, double.NaN, 0, 0], 1, new double[4])).Message);

    private static void AgreeAll(double digits, double[] expected, double[] actual)
    {
        for (int i = 0; i < expected.Length; i++)
            Assert.Equal(expected[i], actual[i], Math.Pow(10, -digits) * Math.Max(1, Math.Abs(expected[i])));
    }
}
