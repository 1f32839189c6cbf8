using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

/// <summary>NIST Statistical Reference Datasets, univariate summary statistics: certified mean, standard deviation and lag-1 autocorrelation.</summary>
public class ReferenceNistUnivariateTests
{
    [Theory]
    [InlineData("nist_lew.csv", 200, -177.435000000000, 277.332168044316, -0.307304800605679)] // NIST StRD "Lew"
    [InlineData("nist_lottery.csv", 218, 518.958715596330, 291.699727470969, -0.120948622967393)] // NIST StRD "Lottery"
    [InlineData("nist_mavro.csv", 50, 2.00185600000000, 0.000429123454003053, 0.937989183438248)] // NIST StRD "Mavro"
    [InlineData("nist_michelso.csv", 100, 299.852400000000, 0.0790105478190518, 0.535199668621283)] // NIST StRD "Michelso"
    public void Observed_sets_come_out_as_certified(string file, int count, double mean, double deviation, double autocorrelation)
    {
        double[] y = ReferenceData.Read(file)["y"];
        Assert.Equal(count, y.Length);
        Accuracy.AgreesTo(14, mean, SampleMoments.Mean(y));
        Accuracy.AgreesTo(12, deviation, SampleMoments.StandardDeviation(y));
        Accuracy.AgreesTo(12, autocorrelation, SampleMoments.Autocorrelation(y, 1));
    }

    [Theory] // NIST StRD "NumAcc2", "NumAcc3", "NumAcc4": c, then c − 0.1 and c + 0.1 in turn, 1001 values; s = 0.1, r1 = −0.999 exactly
    [InlineData(1.2, 1.1, 1.3, 14)]
    [InlineData(1000000.2, 1000000.1, 1000000.3, 8)] // the digits left in storage: 0.1 beside 1e6
    [InlineData(10000000.2, 10000000.1, 10000000.3, 7)]
    public void Constructed_sets_keep_the_digits_their_storage_leaves(double first, double low, double high, double digits)
    {
        double[] y = new double[1001];
        y[0] = first;
        for (int i = 1; i < y.Length; i++)
            y[i] = i % 2 == 1 ? low : high;
        Accuracy.AgreesTo(15, first, SampleMoments.Mean(y));
        Accuracy.AgreesTo(digits, 0.1, SampleMoments.StandardDeviation(y));
        Accuracy.AgreesTo(digits, -0.999, SampleMoments.Autocorrelation(y, 1));
    }

    [Fact]
    public void Three_large_neighbours_are_exact()
    {
        double[] y = [10000001, 10000003, 10000002]; // NIST StRD "NumAcc1": mean 10000002, s 1, r1 −0.5, all exact
        Assert.Equal(10000002, SampleMoments.Mean(y));
        Assert.Equal(1, SampleMoments.StandardDeviation(y));
        Assert.Equal(-0.5, SampleMoments.Autocorrelation(y, 1));
    }

    [Fact]
    public void A_constant_column_has_no_autocorrelation() => Assert.Equal(0, SampleMoments.Autocorrelation([0.1, 0.1, 0.1], 1));

    [Fact]
    public void One_value_has_no_variance_and_says_so()
    {
        ArgumentException error = Assert.Throws<ArgumentException>(() => SampleMoments.Variance([1.0]));
        Assert.Equal("has one value: a variance needs two (Parameter 'values')", error.Message);
    }
}
