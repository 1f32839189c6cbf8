using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceEquivalenceTests
{
    // Two groups of 15 (first and last rows), two variables: statsmodels test_tost.py, values there from R packages.
    private static readonly double[] _first1 = [2.84, 2.51, 2.41, 2.95, 3.14, 3.79, 4.14, 3.85, 3.02, 3.45, 5.37, 3.81, 4.19, 3.16, 3.84];
    private static readonly double[] _second1 = [2.60, 2.82, 2.18, 3.46, 4.01, 3.04, 3.47, 4.06, 2.91, 3.59, 4.51, 3.16, 3.86, 3.31, 3.02];
    private static readonly double[] _first2 = [4.00, 3.26, 4.14, 3.42, 3.25, 4.34, 4.97, 4.31, 3.11, 3.41, 5.02, 4.21, 4.59, 5.30, 4.32];
    private static readonly double[] _second2 = [3.76, 3.66, 3.65, 3.60, 3.48, 2.87, 3.24, 3.92, 3.99, 4.21, 4.21, 3.31, 3.61, 2.97, 2.73];

    [Fact]
    public void A_pooled_difference_inside_the_margins_is_shown_equal()
    {
        MeanDifference difference = MeanDifference.Pooled(_first1, _second1);
        Accuracy.AgreesTo(11, 0.1646666666666667, difference.Value);
        Accuracy.AgreesTo(11, 0.2531625991083628, difference.StandardError);
        EquivalenceResult result = EquivalenceTest.TwoOneSided(difference, -0.6, 0.6);
        Accuracy.AgreesTo(10, 3.0204566921, result.LowerT);
        Accuracy.AgreesTo(10, -1.71957996508, result.UpperT);
        Accuracy.AgreesTo(10, 0.04827315100761467, result.PValue);
        Accuracy.AgreesTo(10, -0.2659960620757337, result.Interval.Lower);
        Accuracy.AgreesTo(10, 0.595329395409067, result.Interval.Upper);
        Assert.Equal(0.90, result.Interval.Level, 14);
        Assert.True(result.Equivalent);
    }

    [Fact]
    public void Welch_and_paired_forms_agree_with_R()
    {
        MeanDifference welch = MeanDifference.Welch(_first1, _second1);
        Accuracy.AgreesTo(11, 26.7484787582315, welch.DegreesOfFreedom);
        Accuracy.AgreesTo(10, 0.04853083976236974, EquivalenceTest.TwoOneSided(welch, -0.6, 0.6).PValue);
        MeanDifference paired = MeanDifference.Paired(_first1, _second1);
        Accuracy.AgreesTo(11, 0.1357514067862445, paired.StandardError);
        Accuracy.AgreesTo(10, 0.003166881489265175, EquivalenceTest.TwoOneSided(paired, -0.6, 0.6).PValue);
    }

    [Fact]
    public void A_difference_near_the_margin_is_not_shown_equal()
    {
        EquivalenceResult pooled = EquivalenceTest.TwoOneSided(MeanDifference.Pooled(_first2, _second2), -0.6, 0.6);
        Accuracy.AgreesTo(10, 0.43169347692374, pooled.PValue);
        Assert.False(pooled.Equivalent);
        EquivalenceResult welch = EquivalenceTest.TwoOneSided(MeanDifference.Welch(_first2, _second2), -0.6, 0.6);
        Accuracy.AgreesTo(10, 0.4317936812594803, welch.PValue);
        Accuracy.AgreesTo(10, 0.194916250699966, welch.Interval.Lower);
    }

    [Fact]
    public void Equivalence_is_shown_exactly_when_the_interval_lies_inside_the_margins() =>
        Gen.Select(Gen.Double[-1, 1], Gen.Double[0.01, 1], Gen.Double[1, 50]).Sample((value, error, degrees) =>
        {
            EquivalenceResult result = EquivalenceTest.TwoOneSided(new(value, error, degrees), -0.6, 0.6);
            if (Math.Abs(result.PValue - 0.05) > 1e-9)
                Assert.Equal(result.Interval.Lower > -0.6 && result.Interval.Upper < 0.6, result.Equivalent);
        });

    [Fact]
    public void Margins_in_the_wrong_order_are_refused() =>
        Assert.StartsWith(
            "must be above the lower margin (Parameter 'upperMargin')",
            Assert.Throws<ArgumentOutOfRangeException>(() => EquivalenceTest.TwoOneSided(new(0, 1, 5), 0.6, -0.6)).Message,
            StringComparison.Ordinal);
}
