using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceSerialCorrelationTests
{
    [Fact]
    public void Tests_of_macro_growth_residuals_agree_with_R()
    {
        ReferenceData data = ReferenceData.Read("macro_growth.csv");
        double[] design = data.DesignWithIntercept("product", "interest");
        double[] residuals = [.. LeastSquares.Fit(design, data["investment"], 3).Residuals];
        // R lmtest dwtest, bgtest, bptest and Box.test; statsmodels test_diagnostic.py.
        Accuracy.AgreesTo(12, 2.213805016982909, ResidualTests.DurbinWatson(residuals));
        Agree(4.771042651230007, 4, 0.3116067133066697, ResidualTests.BreuschGodfrey(design, residuals, 3, 4));
        Agree(1.179280833676792, 4, 0.321197487261203, ResidualTests.BreuschGodfreyF(design, residuals, 3, 4));
        Agree(5.23587172795227, 4, 0.263940335284713, ResidualTests.LjungBox(residuals, 4));
        Agree(5.12462932741681, 4, 0.2747471266820692, ResidualTests.BoxPierce(residuals, 4));
        Agree(0.709924388395087, 2, 0.701199952134347, ResidualTests.Koenker(design, residuals, 3));
    }

    [Fact]
    public void Investment_residuals_show_their_memory()
    {
        ReferenceData data = ReferenceData.Read("greene_investment.csv");
        double[] design = data.DesignWithIntercept("product", "interest");
        double[] residuals = [.. LeastSquares.Fit(design, data["investment"], 3).Residuals];
        // Greene (1993), Table 15.1; R lmtest dwtest and bgtest.
        Accuracy.AgreesTo(11, 1.321512398266, ResidualTests.DurbinWatson(residuals));
        Agree(12.06967729065, 4, 0.016840578955, ResidualTests.BreuschGodfrey(design, residuals, 3, 4));
    }

    [Fact]
    public void Ice_cream_agrees_with_the_printed_and_the_recomputed_estimates()
    {
        ReferenceData data = ReferenceData.Read("ice_cream.csv");
        double[] design = data.DesignWithIntercept("price", "income", "temp");
        LeastSquaresFit plain = LeastSquares.Fit(design, data["cons"], 4);
        // Hildreth & Lu (1960). Verbeek, A Guide to Modern Econometrics (2004), chapter 4, prints 0.197, −1.044, 0.00331, 0.00345, DW 1.0212 and
        // 0.157, −0.892, 0.00320, 0.00356, DW 1.5486, ρ 0.401; further digits by R (orcutt, prais, lmtest).
        AgreeAll(11, [0.1973150719475884, -1.0444139919380102, 0.00330776043966697, 0.00345842973870577], [.. plain.Coefficients]);
        Accuracy.AgreesTo(11, 1.02116971071922, ResidualTests.DurbinWatson(plain.Residuals.AsSpan()));
        Agree(4.237063546388, 1, 0.0395505172708, ResidualTests.BreuschGodfrey(design, plain.Residuals.AsSpan(), 4, 1));

        Ar1Fit twoSteps = Ar1Regression.CochraneOrcutt(design, data["cons"], 4, new() { MaximumIterations = 1 });
        Accuracy.AgreesTo(11, 0.400632552644881, twoSteps.Rho);
        AgreeAll(11, [0.15698948741147964, -0.8922715041674022, 0.00320407873153129, 0.00355858193539669], [.. twoSteps.Coefficients]);
        AgreeAll(11, [0.28960171917420824, 0.8108406144546162, 0.001545600146282725, 0.000554539877971832], Errors(twoSteps));
        Accuracy.AgreesTo(11, 1.54863450837514, twoSteps.DurbinWatson);
        Assert.Equal(25, twoSteps.DegreesOfFreedom);

        Ar1Fit settled = Ar1Regression.CochraneOrcutt(design, data["cons"], 4, new() { Tolerance = 1e-13 });
        Assert.True(settled.Convergence.Converged);
        Accuracy.AgreesTo(9, 0.400925672903738, settled.Rho);
        AgreeAll(9, [0.1571477152657412, -0.8923956483344259, 0.00320273703669247, 0.00355838919000932], [.. settled.Coefficients]);
        Accuracy.AgreesTo(9, 0.0254519033727248, settled.ResidualSumOfSquares);

        Ar1Fit kept = Ar1Regression.PraisWinsten(design, data["cons"], 4, new() { MaximumIterations = 1 });
        AgreeAll(11, [0.33742688172707486, -1.1761310135633956, 0.00220313471776181, 0.00331087573766143], [.. kept.Coefficients]);
        Accuracy.AgreesTo(11, 1.45976038406677, kept.DurbinWatson);
    }

    [Fact]
    public void The_rule_for_rho_decides_where_ice_cream_settles()
    {
        ReferenceData data = ReferenceData.Read("ice_cream.csv");
        double[] design = data.DesignWithIntercept("price", "income", "temp");
        // Two fixed points on the same data, one for each rule (R prais and a separate program).
        Ar1Fit byAutocorrelation = Ar1Regression.PraisWinsten(design, data["cons"], 4, new() { Rule = RhoRule.Autocorrelation, Tolerance = 1e-13 });
        Ar1Fit byRegression = Ar1Regression.PraisWinsten(design, data["cons"], 4, new() { Rule = RhoRule.Regression, Tolerance = 1e-13, MaximumIterations = 2000 });
        Accuracy.AgreesTo(8, 0.407443725641653, byAutocorrelation.Rho);
        AgreeAll(7, [0.3404977228725309, -1.1761193945951225, 0.00217025022733836, 0.00330669882276228], [.. byAutocorrelation.Coefficients]);
        Accuracy.AgreesTo(7, 0.800228832260135, byRegression.Rho);
        AgreeAll(6, [0.5870065057602577, -1.0488522638393674, -0.000802258240340143, 0.002954047654234026], [.. byRegression.Coefficients]);
    }

    [Fact]
    public void Macro_growth_agrees_with_Stata_for_Cochrane_Orcutt()
    {
        ReferenceData data = ReferenceData.Read("macro_growth.csv");
        Ar1Fit fit = Ar1Regression.CochraneOrcutt(data.DesignWithIntercept("product", "interest"), data["investment"], 3, new() { Rule = RhoRule.Autocorrelation });
        // Stata prais, corc rhotype(tscorr), stopped at 1e-6: statsmodels fixture macro_gr_corc_stata.py. Settled ρ by a separate program.
        Accuracy.AgreesTo(9, -0.10807441887072596, fit.Rho);
        AgreeAll(6, [-9.509886614971, 4.3704012379033, -0.5792713864578], [.. fit.Coefficients]);
        AgreeAll(6, [0.99049648344574, 0.20815070994319, 0.26801792119756], Errors(fit));
        Accuracy.AgreesTo(8, 22530.89582866539, fit.ResidualSumOfSquares);
        Accuracy.AgreesTo(8, 1.993977855026291, fit.DurbinWatson);
    }

    [Fact]
    public void Barium_agrees_with_the_textbook_for_Prais_Winsten()
    {
        ReferenceData data = ReferenceData.Read("barium.csv");
        Ar1Fit fit = Ar1Regression.PraisWinsten(data.DesignWithIntercept("lchempi", "lgas", "lrtwex", "befile6", "affile6", "afdec6"), data["lchnimp"], 7);
        // Krupp & Pollard (1996). Wooldridge, Introductory Econometrics, Table 12.1: −37.08, 2.94, 1.05, 1.13, −.016, −.033, −.577, ρ .293; digits by R prais.
        Accuracy.AgreesTo(8, 0.293213887870696, fit.Rho);
        AgreeAll(7, [-37.07582644208033, 2.9409634288490456, 1.0462987426041084, 1.1327744281843264, -0.016478176269131, -0.0331577829723109, -0.5768112424735942], [.. fit.Coefficients]);
        AgreeAll(7, [22.778432695562923, 0.632838119892099, 0.97734113298688, 0.506656418207956, 0.319379697649053, 0.321809472624457, 0.341986018974848], Errors(fit));
        Accuracy.AgreesTo(8, 0.573328285644609, fit.ResidualScale);
    }

    [Fact]
    public void A_gap_starts_a_new_run()
    {
        // By hand: e = 1, −1, 2, 2 split in the middle: DW (4 + 0)/10; ρ by regression (−1 + 4)/(1 + 4), by autocorrelation 3/10.
        double[] residuals = [1, -1, 2, 2];
        int[] segments = [0, 0, 1, 1];
        Assert.Equal(0.4, ResidualTests.DurbinWatson(residuals, segments), 14);
        Assert.Equal(1.3, ResidualTests.DurbinWatson(residuals), 14); // (4 + 9 + 0)/10
        Assert.Equal(0.6, Ar1Regression.Rho(residuals, RhoRule.Regression, segments), 14);
        Assert.Equal(0.3, Ar1Regression.Rho(residuals, RhoRule.Autocorrelation, segments), 14);
        Ar1Fit dropped = Ar1Regression.CochraneOrcutt([1, 1, 1, 1, 1, 1], [1, 2, 4, 1, 2, 5], 1, segments: [0, 0, 0, 1, 1, 1]);
        Ar1Fit kept = Ar1Regression.PraisWinsten([1, 1, 1, 1, 1, 1], [1, 2, 4, 1, 2, 5], 1, segments: [0, 0, 0, 1, 1, 1]);
        Assert.Equal(3, dropped.DegreesOfFreedom); // 6 rows less 2 first ones less 1
        Assert.Equal(5, kept.DegreesOfFreedom);
    }

    [Fact]
    public void Residuals_that_are_all_zero_show_nothing()
    {
        double[] ones = [1, 1, 1, 1, 1, 1], zeros = new double[6];
        Assert.Equal(2, ResidualTests.DurbinWatson(zeros));
        Assert.Equal(new TestStatistic(0, 2, 1), ResidualTests.BreuschGodfrey(ones, zeros, 1, 2));
        Assert.Equal(new TestStatistic(0, 2, 1), ResidualTests.LjungBox(zeros, 2));
        Assert.Equal(new TestStatistic(0, 0, 1), ResidualTests.Koenker(ones, zeros, 1));
    }

    private static void Agree(double value, int degrees, double p, TestStatistic found)
    {
        Accuracy.AgreesTo(9, value, found.Value);
        Assert.Equal(degrees, found.DegreesOfFreedom);
        Accuracy.AgreesTo(9, p, found.PValue);
    }

    private static double[] Errors(Ar1Fit fit) => [.. Enumerable.Range(0, fit.Coefficients.Length).Select(j => fit[j].StandardError)];

    private static void AgreeAll(double digits, double[] expected, double[] actual)
    {
        Assert.Equal(expected.Length, actual.Length);
        for (int i = 0; i < expected.Length; i++)
            Accuracy.AgreesTo(digits, expected[i], actual[i]);
    }
}
