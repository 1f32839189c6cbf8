using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

/// <summary>NIST Statistical Reference Datasets, linear least squares: National Institute of Standards and Technology, Statistical Engineering
/// Division, Statistical Reference Datasets; certified values from the header of each set. Observations in Data/Statistics.</summary>
public class ReferenceNistLinearTests
{
    [Fact]
    public void Norris_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_norris.csv");
        double[] design = Polynomial(data, 1);
        // NIST StRD "Norris", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [-0.262323073774029, 1.00211681802045];
        double[] deviations = [0.232818234301152, 0.429796848199937e-3];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(12, estimates, [.. fit.Coefficients]);
        Agree(12, deviations, [.. Enumerable.Range(0, estimates.Length).Select(j => fit[j].StandardError)]);
        Accuracy.AgreesTo(11.5, 0.884796396144373, fit.ResidualScale);
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void Pontius_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_pontius.csv");
        double[] design = Polynomial(data, 2);
        // NIST StRD "Pontius", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [0.673565789473684e-3, 0.732059160401003e-6, -0.316081871345029e-14];
        double[] deviations = [0.107938612033077e-3, 0.157817399981659e-9, 0.486652849992036e-16];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(11, estimates, [.. fit.Coefficients]);
        Agree(11, deviations, [.. Enumerable.Range(0, estimates.Length).Select(j => fit[j].StandardError)]);
        Accuracy.AgreesTo(11, 0.205177424076185e-3, fit.ResidualScale);
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void NoInt1_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_noint1.csv");
        double[] design = data["x"];
        // NIST StRD "NoInt1", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [2.07438016528926];
        double[] deviations = [0.165289256198347e-1];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(14, estimates, [.. fit.Coefficients]);
        Agree(14, deviations, [.. Enumerable.Range(0, estimates.Length).Select(j => fit[j].StandardError)]);
        Accuracy.AgreesTo(14, 3.56753034006338, fit.ResidualScale);
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void NoInt2_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_noint2.csv");
        double[] design = data["x"];
        // NIST StRD "NoInt2", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [0.727272727272727];
        double[] deviations = [0.420827318078432e-1];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(14, estimates, [.. fit.Coefficients]);
        Agree(14, deviations, [.. Enumerable.Range(0, estimates.Length).Select(j => fit[j].StandardError)]);
        Accuracy.AgreesTo(14, 0.369274472937998, fit.ResidualScale);
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void Longley_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_longley.csv");
        double[] design = data.DesignWithIntercept("x1", "x2", "x3", "x4", "x5", "x6");
        // NIST StRD "Longley", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [-3482258.63459582, 15.0618722713733, -0.358191792925910e-1, -2.02022980381683, -1.03322686717359, -0.511041056535807e-1,
            1829.15146461355];
        double[] deviations = [890420.383607373, 84.9149257747669, 0.334910077722432e-1, 0.488399681651699, 0.214274163161675, 0.226073200069370,
            455.478499142212];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(12, estimates, [.. fit.Coefficients]);
        Agree(12, deviations, [.. Enumerable.Range(0, estimates.Length).Select(j => fit[j].StandardError)]);
        Accuracy.AgreesTo(12, 304.854073561965, fit.ResidualScale);
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void Wampler1_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_wampler1.csv");
        double[] design = Polynomial(data, 5);
        // NIST StRD "Wampler1", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(13, estimates, [.. fit.Coefficients]);
        Assert.InRange(fit.ResidualScale, 0, 1e-9); // certified 0: the data lie on the curve
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void Wampler2_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_wampler2.csv");
        double[] design = Polynomial(data, 5);
        // NIST StRD "Wampler2", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [1.00000000000000, 0.100000000000000, 0.100000000000000e-1, 0.100000000000000e-2, 0.100000000000000e-3, 0.100000000000000e-4];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(13, estimates, [.. fit.Coefficients]);
        Assert.InRange(fit.ResidualScale, 0, 1e-9); // certified 0: the data lie on the curve
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void Wampler3_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_wampler3.csv");
        double[] design = Polynomial(data, 5);
        // NIST StRD "Wampler3", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000];
        double[] deviations = [2152.32624678170, 2363.55173469681, 779.343524331583, 101.475507550350, 5.64566512170752, 0.112324854679312];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(13, estimates, [.. fit.Coefficients]);
        Agree(12, deviations, [.. Enumerable.Range(0, estimates.Length).Select(j => fit[j].StandardError)]);
        Accuracy.AgreesTo(12, 2360.14502379268, fit.ResidualScale);
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void Wampler4_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_wampler4.csv");
        double[] design = Polynomial(data, 5);
        // NIST StRD "Wampler4", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000];
        double[] deviations = [215232.624678170, 236355.173469681, 77934.3524331583, 10147.5507550350, 564.566512170752, 11.2324854679312];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(12, estimates, [.. fit.Coefficients]);
        Agree(12, deviations, [.. Enumerable.Range(0, estimates.Length).Select(j => fit[j].StandardError)]);
        Accuracy.AgreesTo(12, 236014.502379268, fit.ResidualScale);
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void Wampler5_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_wampler5.csv");
        double[] design = Polynomial(data, 5);
        // NIST StRD "Wampler5", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000, 1.00000000000000];
        double[] deviations = [21523262.4678170, 23635517.3469681, 7793435.24331583, 1014755.07550350, 56456.6512170752, 1123.24854679312];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(10, estimates, [.. fit.Coefficients]);
        Agree(12, deviations, [.. Enumerable.Range(0, estimates.Length).Select(j => fit[j].StandardError)]);
        Accuracy.AgreesTo(12, 23601450.2379268, fit.ResidualScale);
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void Filip_comes_out_as_certified()
    {
        ReferenceData data = ReferenceData.Read("nist_filip.csv");
        double[] design = Polynomial(data, 10);
        // NIST StRD "Filip", certified estimates, standard deviations and residual standard deviation.
        double[] estimates = [-1467.48961422980, -2772.17959193342, -2316.37108160893, -1127.97394098372, -354.478233703349, -75.1242017393757,
            -10.8753180355343, -1.06221498588947, -0.670191154593408e-1, -0.246781078275479e-2, -0.402962525080404e-4];
        double[] deviations = [298.084530995537, 559.779865474950, 466.477572127796, 227.204274477751, 71.6478660875927, 15.2897178747400, 2.23691159816033,
            0.221624321934227, 0.142363763154724e-1, 0.535617408889821e-3, 0.896632837373868e-5];
        LeastSquaresFit fit = LeastSquares.Fit(design, data["y"], estimates.Length);
        Agree(7.5, estimates, [.. fit.Coefficients]); // what rounding the powers of x to doubles leaves
        // The same data with the powers rounded to doubles, solved in rational arithmetic (Python fractions): the refined fit has all its digits.
        double[] rounded = [-1467.4896406575194, -2772.1796428402326, -2316.371125105109, -1127.9739626931669, -354.47824071352113, -75.12420326988537,
            -10.875318264388822, -1.0622150090377793, -0.06701911697559873, -0.002467810840851823, -4.029625349722285e-05];
        Agree(13, rounded, [.. fit.Coefficients]);
        Agree(7, deviations, [.. Enumerable.Range(0, estimates.Length).Select(j => fit[j].StandardError)]);
        Accuracy.AgreesTo(9, 0.334801051324544e-2, fit.ResidualScale);
        Assert.Equal(estimates.Length, fit.Rank);
    }

    [Fact]
    public void Filip_defeats_the_normal_equations()
    {
        ReferenceData data = ReferenceData.Read("nist_filip.csv");
        double[] design = Polynomial(data, 10);
        const int p = 11;
        int n = data["y"].Length;
        double[] normal = new double[p * p], right = new double[p];
        for (int a = 0; a < p; a++)
        {
            for (int b = 0; b < p; b++)
                normal[(a * p) + b] = Enumerable.Range(0, n).Sum(i => design[(a * n) + i] * design[(b * n) + i]);
            right[a] = Enumerable.Range(0, n).Sum(i => design[(a * n) + i] * data["y"][i]);
        }
        bool solved = SmallMatrix.SolvePositive(normal, right, p);
        // NIST StRD "Filip", B0: certified -1467.48961422980.
        Assert.False(solved && Math.Abs((right[0] / -1467.48961422980) - 1) < 0.01, "the normal equations found Filip's B0 to 1 %: the test of the QR says nothing then");
    }

    private static double[] Polynomial(ReferenceData data, int degree)
    {
        double[] x = data["x"];
        List<double> design = [.. Enumerable.Repeat(1.0, x.Length)];
        for (int k = 1; k <= degree; k++)
            design.AddRange(x.Select(value => Power(value, k)));
        return [.. design];
    }

    // Correctly rounded to within a few ulp: repeated products lose a bit a step, and Filip sees every bit.
    private static double Power(double value, int exponent)
    {
        DoubleDoublePower power = new(value);
        for (int k = 1; k < exponent; k++)
            power = power.Times(value);
        return power.High;
    }

    private static void Agree(double digits, double[] expected, double[] actual)
    {
        Assert.Equal(expected.Length, actual.Length);
        for (int i = 0; i < expected.Length; i++)
            Accuracy.AgreesTo(digits, expected[i], actual[i]);
    }

    private readonly record struct DoubleDoublePower(double High, double Low = 0)
    {
        public DoubleDoublePower Times(double factor)
        {
            double product = High * factor;
            double error = Math.FusedMultiplyAdd(High, factor, -product) + (Low * factor);
            double high = product + error;
            return new(high, error - (high - product));
        }
    }
}
