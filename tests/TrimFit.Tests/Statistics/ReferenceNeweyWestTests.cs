using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceNeweyWestTests
{
    private static readonly string[] _regressors = ["product", "interest"];

    [Fact]
    public void Macro_growth_agrees_with_three_other_programs()
    {
        ReferenceData data = ReferenceData.Read("macro_growth.csv");
        double[] design = data.DesignWithIntercept(_regressors);
        LeastSquaresFit fit = LeastSquares.Fit(design, data["investment"], 3);
        // Coefficients: R lm. HAC, lag 4 and 10: R sandwich NeweyWest(prewhite = FALSE), Stata ivreg2 bw(5) and newey, gretl; HC1: Stata vce(robust).
        // All from the fixtures results_macro_ols_robust.py and test_glsar_gretl.py of statsmodels.
        Agree(12, [-9.48167277465485, 4.3742216647032, -0.613996969478989], [.. fit.Coefficients]);
        Agree(11, [1.1770944273439, 0.32878742225811, 0.29361854972141], Errors(NeweyWest.Covariance(design, fit.Residuals.AsSpan(), 3, 4)));
        Agree(11, [1.1859338087713, 0.33125644884286, 0.29582347593197], Errors(NeweyWest.Covariance(design, fit.Residuals.AsSpan(), 3, 4, SmallSample.DegreesOfFreedom)));
        Agree(
            11,
            [1.385551290884014, -0.3133096102522685, -0.0597207976835705, -0.3133096102522685, 0.1081011690351306, 0.000389440793564336, -0.0597207976835705, 0.000389440793564339, 0.0862118527405036],
            NeweyWest.Covariance(design, fit.Residuals.AsSpan(), 3, 4));
        Agree(
            10.5,
            [1.257386180080192, -0.2871560199899846, -0.03958300024627573, -0.2871560199899846, 0.1049107028987101, 0.0003896205316866944, -0.03958300024627573, 0.0003896205316866944, 0.0985539340694839],
            NeweyWest.Covariance(design, fit.Residuals.AsSpan(), 3, 10));
        Agree(11, [1.3690593206013, 0.32355452428856, 0.32772840315987], Errors(SandwichCovariance.HeteroskedasticityConsistent(design, fit.Residuals.AsSpan(), 3, SmallSample.DegreesOfFreedom)));
    }

    [Fact]
    public void Nineteen_years_of_investment_agree_with_sandwich()
    {
        ReferenceData data = ReferenceData.Read("greene_investment.csv");
        double[] design = data.DesignWithIntercept(_regressors);
        LeastSquaresFit fit = LeastSquares.Fit(design, data["investment"], 3);
        // Greene, Econometric Analysis, 2nd ed. (1993), Table 15.1; R sandwich 3.0-2: NeweyWest(lag = 4, prewhite = FALSE), vcovHC HC0 and HC1, bwNeweyWest.
        Agree(11, [-12.533600590911943, 0.169136454182171, -1.001438013423436], [.. fit.Coefficients]);
        Agree(11, [18.958298131796866, 0.0167507858601934, 3.3423753526828115], Errors(NeweyWest.Covariance(design, fit.Residuals.AsSpan(), 3, 4)));
        Agree(
            11,
            [426.80776831423503, -0.36996622292877185, -4.856066675184219, -0.36996622292877185, 0.000333199231984187, -0.00636016828614154, -4.856066675184219, -0.00636016828614154, 13.266124185388085],
            NeweyWest.Covariance(design, fit.Residuals.AsSpan(), 3, 4, SmallSample.DegreesOfFreedom));
        Agree(11, [18.74615740282376, 0.017511901554828818, 3.5946550588058646], Errors(SandwichCovariance.HeteroskedasticityConsistent(design, fit.Residuals.AsSpan(), 3)));
        Agree(11, [20.428151424654136, 0.019083152296683, 3.917184534555506], Errors(SandwichCovariance.HeteroskedasticityConsistent(design, fit.Residuals.AsSpan(), 3, SmallSample.DegreesOfFreedom)));
        Accuracy.AgreesTo(11, 1.4203054138242, NeweyWest.Bandwidth(design, fit.Residuals.AsSpan(), 3));
    }

    [Fact]
    public void Ten_clusters_agree_with_Stata()
    {
        ReferenceData data = ReferenceData.Read("grunfeld.csv");
        double[] design = data.DesignWithIntercept("value", "capital");
        int[] firms = [.. data["firm"].Select(f => (int)f)];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["invest"], 3);
        // Grunfeld (1958), 10 firms × 20 years; Stata regress, vce(cluster) and ivreg2 cluster(): statsmodels fixture results_grunfeld_ols_robust_cluster.py.
        // The source's data are single precision, so seven to eight digits are theirs.
        Agree(8, [-42.714369016733, 0.11556215606596, 0.23067848754982], [.. fit.Coefficients]);
        Accuracy.AgreesTo(7, 1755850.432294737, fit.ResidualSumOfSquares);
        Agree(7, [20.425202580078, 0.01589433647768, 0.08496711097464], Errors(SandwichCovariance.Clustered(design, fit.Residuals.AsSpan(), 3, firms)));
        Agree(7, [19.27943055305, 0.01500272788516, 0.08020079648691], Errors(SandwichCovariance.Clustered(design, fit.Residuals.AsSpan(), 3, firms, SmallSample.None)));
    }

    [Fact]
    public void Products_never_cross_a_gap()
    {
        // By hand: design of ones, residuals 1, 2, −3, 1 (n = 4, (X'X)⁻¹ = ¼), lag 1, weight ½.
        double[] ones = [1, 1, 1, 1];
        double[] residuals = [1, 2, -3, 1];
        // One segment: 15 + 2·½·(2 − 6 − 3) = 8, over 16. Split after the second row: 15 + (2 − 3) = 14, over 16.
        Assert.Equal(8.0 / 16, NeweyWest.Covariance(ones, residuals, 1, 1)[0]);
        Assert.Equal(14.0 / 16, NeweyWest.Covariance(ones, residuals, 1, 1, SmallSample.None, [7, 7, 8, 8])[0]);
    }

    [Fact]
    public void A_lag_beyond_the_rows_adds_nothing_and_stays_finite() =>
        Assert.True(double.IsFinite(NeweyWest.Covariance([1, 1, 1], [1, -2, 1], 1, 50)[0]));

    [Theory] // ⌊4 (n/100)^(2/9)⌋ by hand: 4 at 100; 4·2^(2/9) = 4.666; 4·10^(2/9) = 6.672; 4·0.19^(2/9) = 2.766
    [InlineData(0, 0)]
    [InlineData(19, 2)]
    [InlineData(100, 4)]
    [InlineData(200, 4)]
    [InlineData(1000, 6)]
    public void The_automatic_lag_follows_its_rule(int rows, int lag) => Assert.Equal(lag, NeweyWest.AutomaticLag(rows));

    [Fact]
    public void A_column_left_out_gets_no_variance()
    {
        double[] design = [1, 1, 1, 1, 2, 2, 2, 2, 0, 1, 3, 4];
        double[] covariance = NeweyWest.Covariance(design, [1, -1, 0.5, -0.5], 3, 1);
        Assert.Equal(0, covariance[4]);
        Assert.True(covariance[0] > 0 && covariance[8] > 0);
    }

    private static double[] Errors(double[] covariance) => [.. Enumerable.Range(0, 3).Select(j => Math.Sqrt(covariance[4 * j]))];

    private static void Agree(double digits, double[] expected, double[] actual)
    {
        Assert.Equal(expected.Length, actual.Length);
        for (int i = 0; i < expected.Length; i++)
            Accuracy.AgreesTo(digits, expected[i], actual[i]);
    }
}
