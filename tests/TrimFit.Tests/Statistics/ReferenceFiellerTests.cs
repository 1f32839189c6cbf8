using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceFiellerTests
{
    // Graybill & Iyer, Regression Analysis (1994), pp. 431-434, as in the tests and vignette of R package investr.
    private static readonly double[] _crystalTime = [2, 4, 6, 8, 10, 12, 14, 16, 18, 20, 22, 24, 26, 28];
    private static readonly double[] _crystalWeight = [0.08, 1.12, 4.43, 4.98, 4.92, 7.18, 5.57, 8.4, 8.81, 10.81, 11.16, 10.12, 13.12, 15.04];
    private static readonly double[] _chamberDial = [0, 10, 20, 30, 40, 50, 60, 70, 80, 90, 100];
    private static readonly double[] _chamberTemperature = [206.36, 225.52, 252.18, 289.33, 318.11, 349.49, 383.03, 410.7, 444.4, 469.14, 501.16];
    private static readonly double[] _thermometerTrue = [96, 98, 100, 102, 104, 106, 108, 110];
    private static readonly double[] _thermometerReading = [95.71, 98.16, 99.52, 102.09, 103.79, 106.18, 108.14, 110.21];

    // Greenwell & Schubert Kabban, The R Journal 6(1) (2014) 90: arsenic, four measurements at each of eight actual contents.
    private static readonly double[] _arsenic =
    [
        0.17, 0.25, 0.01, 0.12, 1.25, 0.86, 1.25, 1.1, 2.01, 2.03, 2.14, 1.74, 3.18, 2.99, 3.23, 3.37,
        3.91, 3.9, 3.61, 4.27, 4.88, 5.33, 4.96, 4.98, 6.09, 6.17, 6.07, 5.97, 6.67, 7.02, 7.14, 7.3,
    ];

    [Fact]
    public void The_time_at_which_the_mean_crystal_reaches_a_weight_is_the_published_one()
    {
        LeastSquaresFit fit = Line(_crystalTime, _crystalWeight);
        FiellerSet set = Fieller.InverseRegression(fit, 5, 0.90); // published 9.93 [8.65, 11.05]
        Check(set, 9.92905788876, 8.65025910278, 11.0478965165);
        Accuracy.AgreesTo(10, 0.0155273320354, set.G!.Value);
        Accuracy.AgreesTo(10, 0.665899809233, set.DeltaStandardError!.Value);
        Check(Fieller.InverseRegression(fit, 8, 0.95), 15.8881952327, 14.6589587043, 17.1596321189);
    }

    [Fact]
    public void The_dial_at_which_the_chamber_reaches_a_temperature_is_the_published_one() => // published 66.5 [65.07, 68.03]
        Check(Fieller.InverseRegression(Line(_chamberDial, _chamberTemperature), 400, 0.99), 66.5200432069, 65.0708935303, 68.0258324997);

    [Fact]
    public void One_new_reading_is_calibrated_as_published()
    {
        LeastSquaresFit fit = Line(_thermometerTrue, _thermometerReading);
        Check(Fieller.InverseRegression(fit, 104, 0.95, 1), 103.994915646, 103.404051142, 104.589459385); // published 103.995 [103.4, 104.6]
        Check(Fieller.InverseRegression(fit, 100, 0.90, 1), 100.112318003, 99.6294028953, 100.588503132); // published 100.1 [99.63, 100.59]
        LeastSquaresFit arsenic = Line([.. Enumerable.Range(0, 32).Select(i => (double)(i / 4))], _arsenic);
        Check(Fieller.InverseRegression(arsenic, 3, 0.90, 1), 2.93144906138, 2.6035372735, 3.25865794092); // published 2.9314 [2.6035, 3.2587]
    }

    [Fact]
    public void Ratios_of_two_means_agree_with_the_formula_of_Hauschke()
    {
        // Hauschke (1999), data of R package mratios: rat weights, dosed over control; enzyme activity, treated over control.
        double[] control = [519.8, 535.7, 491.7, 508.7, 565.5, 485.8, 520.7, 507.5, 428.9, 466];
        double[] dosed = [465, 492.2, 466.3, 555.5, 528.1, 483.8, 502.8, 468.1, 519.2, 500.2];
        Check(RatioOfMeans(dosed, control, 0.90), 0.990239150746, 0.939372738278, 1.04383148169);
        double[] untreated = [1.33, 1.78, 1.53, 1.95, 1.83, 1.47, 1.87, 1.55, 2.58, 2.17, 1.97, 1.62, 2.25, 3.53, 2.92, 1.78, 2.22, 2.55, 2.75];
        double[] treated = [1.53, 1.75, 2.12, 2.83, 2.58, 2.37, 2.92, 2.08, 3.01, 2.67, 2.06, 2.25, 3.08, 2.01, 1.58];
        Check(RatioOfMeans(treated, untreated, 0.90), 1.11300546448, 0.963046751693, 1.28601483107);
        Check(RatioOfMeans(treated, untreated, 0.95), 1.11300546448, 0.934887055057, 1.32461098932);
    }

    [Fact]
    public void A_denominator_that_may_be_zero_gives_no_interval()
    {
        // Numerator 3 ± 1, denominator 1 ± 1, t = 1.96: b² < t²v_b, and the numerator excludes 0: everything outside a gap around 0.
        FiellerSet set = Fieller.Ratio(new(3, 1), new(1, 1), 0, double.PositiveInfinity, 0.95);
        Assert.Equal(FiellerKind.Outside, set.Kind);
        Assert.Null(set.Interval);
        Assert.Null(set.DeltaStandardError);
        Assert.True(set.Contains(3) && set.Contains(-1e9) && !set.Contains(0));
        // By hand: t² = 3.841459; roots of −2.841459θ² − 6θ + 5.158541: −2.76757 and 0.65598.
        Accuracy.AgreesTo(4.5, 0.65598, set.Gap!.Value.Upper);
        Accuracy.AgreesTo(4.5, -2.76757, set.Gap.Value.Lower);
    }

    [Fact]
    public void Two_estimates_that_may_both_be_zero_say_nothing()
    {
        FiellerSet set = Fieller.Ratio(new(0.5, 1), new(0.5, 1), 0, 12, 0.95);
        Assert.Equal(FiellerKind.Everything, set.Kind);
        Assert.Null(set.Interval);
        Assert.Null(set.Gap);
        Assert.Equal(1, set.Ratio);
        Assert.True(set.Contains(-1e12));
        FiellerSet zero = Fieller.Ratio(new(0.5, 1), new(0, 1), 0, 12, 0.95);
        Assert.Null(zero.Ratio);
        Assert.Null(zero.G);
    }

    [Fact]
    public void The_set_holds_exactly_the_ratios_that_are_not_rejected() =>
        Gen.Select(Gen.Double[-5, 5], Gen.Double[-5, 5], Gen.Double[0.1, 3], Gen.Double[0.1, 3], Gen.Double[-0.9, 0.9], Gen.Double[-8, 8]).Sample((a, b, sa, sb, correlation, theta) =>
        {
            double covariance = correlation * sa * sb;
            FiellerSet set = Fieller.Ratio(new(a, sa), new(b, sb), covariance, 9, 0.95);
            double t = Math.Abs(a - (theta * b)) / Math.Sqrt((sa * sa) - (2 * theta * covariance) + (theta * theta * sb * sb));
            double limit = 2.2621571628; // t table, 9 degrees of freedom, 0.975
            if (Math.Abs(t - limit) > 1e-6)
                Assert.Equal(t < limit, set.Contains(theta));
        });

    private static LeastSquaresFit Line(double[] x, double[] y) => LeastSquares.Fit([.. x.Select(_ => 1.0), .. x], y, 2);

    private static FiellerSet RatioOfMeans(double[] numerator, double[] denominator, double level)
    {
        MeanDifference pooled = MeanDifference.Pooled(numerator, denominator);
        double scale = pooled.StandardError / Math.Sqrt((1.0 / numerator.Length) + (1.0 / denominator.Length));
        return Fieller.Ratio(
            new(SampleMoments.Mean(numerator), scale / Math.Sqrt(numerator.Length)),
            new(SampleMoments.Mean(denominator), scale / Math.Sqrt(denominator.Length)),
            0,
            pooled.DegreesOfFreedom,
            level);
    }

    private static void Check(FiellerSet set, double ratio, double lower, double upper)
    {
        Assert.Equal(FiellerKind.Interval, set.Kind);
        Accuracy.AgreesTo(10, ratio, set.Ratio!.Value);
        Accuracy.AgreesTo(10, lower, set.Interval!.Value.Lower);
        Accuracy.AgreesTo(10, upper, set.Interval.Value.Upper);
    }
}
