using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceDistributionTests
{
    [Theory] // NIST/SEMATECH e-Handbook of Statistical Methods, 1.3.6.7.2, critical values of t, upper tail 0.025
    [InlineData(1, 12.706)]
    [InlineData(2, 4.303)]
    [InlineData(5, 2.571)]
    [InlineData(10, 2.228)]
    [InlineData(30, 2.042)]
    [InlineData(100, 1.984)]
    [InlineData(double.PositiveInfinity, 1.960)]
    public void Critical_values_of_t_are_those_of_the_table(double degrees, double table) =>
        Assert.Equal(table, Math.Round(StudentT.TwoSidedFactor(0.95, degrees), 3));

    [Theory]
    [InlineData(0.6)]
    [InlineData(0.9)]
    [InlineData(0.975)]
    [InlineData(0.999999)]
    [InlineData(1e-9)]
    public void Closed_forms_of_t_with_one_two_and_four_degrees_of_freedom_are_met(double p)
    {
        // One: cot(π(1 − p)). Two: (2p − 1) √(2/(4p(1 − p))). Four: 2 √(cos(⅓ arccos √α)/√α − 1), α = 4p(1 − p) (W. T. Shaw, J. Comput. Finance 9 (2006) 37).
        double alpha = 4 * p * (1 - p);
        double sign = p < 0.5 ? -1 : 1;
        Accuracy.AgreesTo(12, sign / Math.Tan(Math.PI * Math.Min(p, 1 - p)), StudentT.Quantile(p, 1));
        Accuracy.AgreesTo(12, ((2 * p) - 1) * Math.Sqrt(2 / alpha), StudentT.Quantile(p, 2));
        double root = Math.Sqrt(alpha);
        Accuracy.AgreesTo(11, sign * 2 * Math.Sqrt((Math.Cos(Math.Acos(root) / 3) / root) - 1), StudentT.Quantile(p, 4));
    }

    [Theory]
    [InlineData(0.7)]
    [InlineData(3)]
    [InlineData(9.37)]
    [InlineData(250)]
    [InlineData(1e6)]
    public void The_t_quantile_undoes_the_t_probability(double degrees)
    {
        foreach (double p in new[] { 1e-6, 0.005, 0.3, 0.5, 0.8, 0.9995 })
            Accuracy.AgreesTo(10, p, StudentT.Cdf(StudentT.Quantile(p, degrees), degrees));
    }

    [Fact]
    public void Small_tails_of_t_keep_their_digits()
    {
        // Two degrees of freedom: P(T < −t) = ½(1 − t/√(2 + t²)) = 1/(s (s + t)), s = √(2 + t²).
        double s = Math.Sqrt(2 + 1e8);
        Accuracy.AgreesTo(12, 2 / (s * (s + 1e4)) / 2, StudentT.Cdf(-1e4, 2));
        Accuracy.AgreesTo(12, 2 / (s * (s + 1e4)), StudentT.TwoSidedP(1e4, 2));
    }

    [Theory] // Abramowitz & Stegun (1964), table 26.6 and the usual two-sided points
    [InlineData(0.975, 1.959963984540054)]
    [InlineData(0.995, 2.575829303548901)]
    [InlineData(0.5, 0)]
    [InlineData(0.0013498980316300933, -3)]
    public void Normal_quantiles_are_the_known_ones(double p, double z)
    {
        Accuracy.AgreesTo(13, z, StandardNormal.Quantile(p));
        Accuracy.AgreesTo(13, p, StandardNormal.Cdf(z));
    }

    [Theory] // NIST/SEMATECH e-Handbook, 1.3.6.7.4, critical values of chi-square, upper tail 0.05
    [InlineData(1, 3.841)]
    [InlineData(2, 5.991)]
    [InlineData(10, 18.307)]
    [InlineData(100, 124.342)]
    public void Critical_values_of_chi_square_are_those_of_the_table(double degrees, double table) =>
        Assert.Equal(table, Math.Round(ChiSquare.Quantile(0.95, degrees), 3));

    [Theory]
    [InlineData(1e-8)]
    [InlineData(0.2)]
    [InlineData(0.99)]
    public void Chi_square_with_two_degrees_of_freedom_is_an_exponential(double p)
    {
        Accuracy.AgreesTo(11, -2 * Probability.Log1P(-p), ChiSquare.Quantile(p, 2));
        Accuracy.AgreesTo(12, Math.Exp(-30), ChiSquare.UpperTail(60, 2));
    }

    [Fact]
    public void The_logarithm_near_one_keeps_its_digits()
    {
        Accuracy.AgreesTo(15, -1.000000005e-8, Probability.Log1P(-1e-8)); // by hand: x − x²/2 + …
        Accuracy.AgreesTo(15, Math.Log(3), Probability.Log1P(2));
        Assert.Equal(0, Probability.Log1P(0));
    }

    [Fact]
    public void Chi_square_with_one_degree_of_freedom_is_a_squared_normal() =>
        Accuracy.AgreesTo(11, Math.Pow(1.959963984540054, 2), ChiSquare.Quantile(0.95, 1));

    [Fact]
    public void Probabilities_outside_the_open_unit_interval_are_refused()
    {
        ArgumentOutOfRangeException error = Assert.Throws<ArgumentOutOfRangeException>(() => StudentT.Quantile(1, 5));
        Assert.StartsWith("must be above 0 and below 1 (Parameter 'probability')", error.Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentOutOfRangeException>(() => StudentT.Quantile(double.NaN, 5));
        Assert.Throws<ArgumentOutOfRangeException>(() => StudentT.Cdf(1, double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => ChiSquare.Quantile(0.5, 0));
    }
}
