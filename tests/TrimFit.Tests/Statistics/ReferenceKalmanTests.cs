using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceKalmanTests
{
    private const double Irregular = 15099, Level = 1469.1; // Durbin & Koopman, Time Series Analysis by State Space Methods, 2nd ed. (2012), section 2.10

    [Fact]
    public void The_Nile_level_is_filtered_and_smoothed_as_in_the_book()
    {
        (KalmanFilter filter, RtsSmoother smoother, List<double[]> steps, _) = Nile();
        // Durbin & Koopman (2012), chapter 2 (local level, diffuse start: a₂ = y₁ = 1120, P₂ = 16568.1); digits by a separate program.
        // Rows: year, prediction and variance, filtered and variance, smoothed and variance.
        double[][] table =
        [
            [1872, 1120, 16568.1, 1140.92783993482, 7899.73637939691, 1110.85766462181, 3242.93007322472],
            [1873, 1140.92783993482, 9368.83637939691, 1072.79852952744, 5781.46993870002, 1105.26556731239, 2818.94217005321],
            [1874, 1072.79852952744, 7250.56993870002, 1117.30895456391, 4898.3651947085, 1113.51560159702, 2591.16797556315],
            [1899, 1133.12629124212, 5501.25820695018, 1037.22232551607, 4032.15808424754, 950.930086740027, 2326.75691724435],
            [1920, 859.297960419945, 5501.25794180905, 849.070566204278, 4032.15794180878, 834.763259103751, 2326.75686981419],
            [1969, 858.125765551206, 5501.25794180848, 819.637266300493, 4032.15794180848, 804.049595666245, 3242.93007322472],
            [1970, 819.637266300493, 5501.25794180848, 798.370292608364, 4032.15794180848, 798.370292608364, 4032.15794180848],
        ];
        smoother.Smooth();
        foreach (double[] row in table)
        {
            int t = (int)row[0] - 1871;
            for (int k = 0; k < 4; k++)
                Accuracy.AgreesTo(11, row[k + 1], steps[t][k]);
            Accuracy.AgreesTo(11, row[5], smoother.State(t)[0]);
            Accuracy.AgreesTo(11, row[6], smoother.Covariance(t)[0]);
        }
        Accuracy.AgreesTo(11, 1111.66831913, smoother.State(0)[0]);
        Accuracy.AgreesTo(11, -632.545625116, filter.LogLikelihood);
        Assert.Equal(100, filter.Measurements);
    }

    [Fact]
    public void The_likelihood_is_highest_at_the_published_variances()
    {
        // statsmodels test_mlemodel.py: maximum at 15098.52 and 1469.18, likelihood −632.5456.
        double at = LogLikelihood(15098.52, 1469.18);
        Assert.True(at > LogLikelihood(15098.52 * 1.01, 1469.18) && at > LogLikelihood(15098.52 * 0.99, 1469.18));
        Assert.True(at > LogLikelihood(15098.52, 1469.18 * 1.01) && at > LogLikelihood(15098.52, 1469.18 * 0.99));
    }

    [Fact]
    public void Diagnostics_of_the_Nile_innovations_are_those_of_the_book()
    {
        (_, _, _, List<double> standardized) = Nile();
        // Durbin & Koopman (2012), p. 40: Ljung-Box(9) 8.84, skewness −0.03, kurtosis 3.09, heteroskedasticity H(33) 0.61.
        double[] e = [.. standardized];
        Assert.Equal(8.84, ResidualTests.LjungBox(e, 9).Value, 0.01);
        double mean = SampleMoments.Mean(e), m2 = e.Average(v => (v - mean) * (v - mean));
        Assert.Equal(-0.03, e.Average(v => Math.Pow(v - mean, 3)) / Math.Pow(m2, 1.5), 0.01);
        Assert.Equal(3.09, e.Average(v => Math.Pow(v - mean, 4)) / (m2 * m2), 0.01);
        Assert.Equal(0.61, e.TakeLast(33).Sum(v => v * v) / e.Take(33).Sum(v => v * v), 0.01);
    }

    [Fact]
    public void A_filter_of_constant_states_is_least_squares_for_any_order_of_measurements() =>
        Gen.Select(Gen.Double[-5, 5].Array[9], Gen.Double[-5, 5].Array[9], Gen.Int[0, 1000]).Sample((x, y, seed) =>
        {
            double[] design = [.. x.Select(_ => 1.0), .. x];
            LeastSquaresFit fit = LeastSquares.Fit(design, y, 2);
            if (fit.Rank < 2 || fit.Condition > 100)
                return;
            int[] order = [.. Enumerable.Range(0, 9)];
            SeededRandom random = new((ulong)seed);
            for (int i = 8; i > 0; i--)
            {
                int j = random.NextInt32(i + 1);
                (order[i], order[j]) = (order[j], order[i]);
            }
            if (Math.Abs(x[order[0]] - x[order[1]]) < 0.1)
                return; // two nearly equal x at the start cost a diffuse filter half of its digits
            KalmanFilter filter = new(2);
            filter.Start([0, 0], [0, 0, 0, 0], [true, true]);
            foreach (int i in order)
                filter.Update([1, x[i]], y[i], 0.25);
            Assert.False(filter.IsDiffuse);
            for (int j = 0; j < 2; j++)
            {
                Assert.Equal(fit.Coefficients[j], filter.State[j], 1e-7);
                Assert.Equal(0.25 * fit.InverseCross[3 * j], filter.Covariance[3 * j], 1e-7);
            }
            // The diffuse likelihood is that of the residual contrasts: Σv²/F = RSS/σ², and the determinants add up to |X'X|.
            double determinant = Math.Log((9 * x.Sum(v => v * v)) - (x.Sum() * x.Sum()));
            double expected = -0.5 * ((7 * Math.Log(2 * Math.PI * 0.25)) + determinant + (fit.ResidualSumOfSquares / 0.25));
            Assert.Equal(expected, filter.LogLikelihood, 1e-6);
        });

    [Fact]
    public void Two_measurements_of_the_same_unknown_leave_the_other_one_unknown()
    {
        KalmanFilter filter = new(2);
        filter.Start([0, 0], [0, 0, 0, 0], [true, true]);
        Assert.True(filter.Update([1, 0], 3, 1).Diffuse);
        Assert.False(filter.Update([1, 0], 5, 1).Diffuse);
        Assert.True(filter.IsDiffuse);
        Assert.Equal(4, filter.State[0], 12); // mean of 3 and 5
        Assert.Equal(0.5, filter.Covariance[0], 12);
        Assert.Throws<InvalidOperationException>(() => new RtsSmoother(2).Filtered(filter));
    }

    [Fact]
    public void Smoothing_a_known_constant_is_the_same_at_every_time()
    {
        // A state without noise: every smoothed state is the final estimate, also for a second state that is known exactly.
        KalmanFilter filter = new(2);
        RtsSmoother smoother = new(2);
        filter.Start([0, 7], [100, 0, 0, 0]);
        double[] readings = [1, 4, 2, 3];
        for (int t = 0; t < 4; t++)
        {
            if (t > 0)
            {
                filter.Predict([1, 0, 0, 1], [0, 0, 0, 0]);
                smoother.Predicted(filter, [1, 0, 0, 1]);
            }
            filter.Update([1, 1], readings[t] + 7, 1);
            smoother.Filtered(filter);
        }
        smoother.Smooth();
        for (int t = 0; t < 4; t++)
        {
            Assert.Equal(10 / 4.01, smoother.State(t)[0], 12); // by hand: Σy/(n + 1/100)
            Assert.Equal(1 / 4.01, smoother.Covariance(t)[0], 12);
            Assert.Equal(7, smoother.State(t)[1], 12);
        }
    }

    [Fact]
    public void A_missing_measurement_is_bridged()
    {
        // Random walk seen at times 0 and 2 without error: the smoothed middle is the mean, its variance half a step's.
        KalmanFilter filter = new(1);
        RtsSmoother smoother = new(1);
        filter.Start([0], [0], [true]);
        filter.Update([1], 2, 0);
        smoother.Filtered(filter);
        for (int t = 1; t <= 2; t++)
        {
            filter.Predict([1], [4]);
            smoother.Predicted(filter, [1]);
            if (t == 2)
                filter.Update([1], 8, 0);
            smoother.Filtered(filter);
        }
        smoother.Smooth();
        Assert.Equal(5, smoother.State(1)[0], 12);
        Assert.Equal(2, smoother.Covariance(1)[0], 12);
    }

    private static (KalmanFilter Filter, RtsSmoother Smoother, List<double[]> Steps, List<double> Standardized) Nile(double irregular = Irregular, double level = Level)
    {
        double[] volume = ReferenceData.Read("nile.csv")["volume"];
        KalmanFilter filter = new(1);
        RtsSmoother smoother = new(1);
        filter.Start([0], [0], [true]);
        List<double[]> steps = [];
        List<double> standardized = [];
        for (int t = 0; t < volume.Length; t++)
        {
            if (t > 0)
            {
                filter.Predict([1], [level]);
                smoother.Predicted(filter, [1]);
            }
            (double prediction, double variance) = (filter.State[0], filter.Covariance[0]);
            Innovation innovation = filter.Update([1], volume[t], irregular);
            if (!innovation.Diffuse)
                standardized.Add(innovation.Value / Math.Sqrt(innovation.Variance));
            smoother.Filtered(filter);
            steps.Add([prediction, variance, filter.State[0], filter.Covariance[0]]);
        }
        return (filter, smoother, steps, standardized);
    }

    private static double LogLikelihood(double irregular, double level) => Nile(irregular, level).Filter.LogLikelihood;
}
