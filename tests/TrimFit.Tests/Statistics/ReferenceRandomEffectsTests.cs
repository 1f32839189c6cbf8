using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceRandomEffectsTests
{
    // Kacker, Metrologia 41 (2004) 132, Table 1.
    private static readonly double[] _kackerEstimates = [61.0, 61.4, 62.21, 62.3, 62.34, 62.6, 62.7, 62.84, 65.9];
    private static readonly double[] _kackerVariances = [0.2025, 1.21, 0.09, 0.2025, 0.3844, 0.5625, 0.0676, 0.0225, 1.8225];

    [Fact]
    public void Thirteen_vaccine_trials_agree_with_metafor()
    {
        ReferenceData data = ReferenceData.Read("bcg.csv");
        RandomEffectsFit fit = RandomEffects.DerSimonianLaird(data["log_risk_ratio"], data["variance"]);
        // Colditz et al. (1994); R metafor 3.8, rma(method = "DL" / "PM", test = "z" / "knha").
        Accuracy.AgreesTo(10, 152.233008082, fit.Heterogeneity.Value);
        Assert.Equal(12, fit.Heterogeneity.DegreesOfFreedom);
        Accuracy.AgreesTo(11, 0.308760262862, fit.BetweenVariance);
        Check(11, -0.714117222073, 0.178742089535, fit.Mean);
        Check(11, -0.430285163654, 0.0404987517109, fit.FixedMean);
        Accuracy.AgreesTo(9, 0.9211734685, fit.BetweenShare);
        Accuracy.AgreesTo(11, 0.180696628336, fit.HartungKnappStandardError!.Value);
        Check(10, -1.064445280084, -0.363789164062, fit.NormalInterval(0.95));
        Check(10, -1.107821354168, -0.320413089978, fit.HartungKnappInterval(0.95, neverNarrower: false)!.Value);
        Check(8, -1.85815375, 0.42991931, fit.PredictionInterval(0.95));
        RandomEffectsFit paule = RandomEffects.PauleMandel(data["log_risk_ratio"], data["variance"]);
        // metafor stops at 0.31809, within its 1e-4; the root of Q(τ²) = 12 by halving in 40-digit arithmetic (Python decimal) is
        Accuracy.AgreesTo(12, 0.318068452205023, paule.BetweenVariance);
        Check(12, -0.714968153493444, 0.180892191537623, paule.Mean);
        Accuracy.AgreesTo(4, 0.318093711863, paule.BetweenVariance);
    }

    [Fact]
    public void Nine_laboratories_agree_with_metafor_and_the_published_table()
    {
        RandomEffectsFit fit = RandomEffects.DerSimonianLaird(_kackerEstimates, _kackerVariances);
        // statsmodels fixture results_meta.py (from metafor); Kacker prints the Paule-Mandel τ as 0.8399.
        Accuracy.AgreesTo(11, 0.288049246973751, fit.BetweenVariance);
        Check(11, 62.3901386044504, 0.245749668040304, fit.Mean);
        Accuracy.AgreesTo(11, 24.801897741835, fit.Heterogeneity.Value);
        Accuracy.AgreesTo(11, 0.67744403741711, fit.BetweenShare);
        Accuracy.AgreesTo(11, 0.29477605699879, fit.HartungKnappStandardError!.Value);
        Check(11, 61.9084781058787, 62.8717991030221, fit.NormalInterval(0.95));
        RandomEffectsFit paule = RandomEffects.PauleMandel(_kackerEstimates, _kackerVariances);
        Accuracy.AgreesTo(9, 0.705395309224248, paule.BetweenVariance);
        Assert.Equal(0.8399, Math.Sqrt(paule.BetweenVariance), 4);
        Check(9, 62.4076199113286, 0.338030602684471, paule.Mean);
    }

    [Fact]
    public void Studies_that_agree_too_well_do_not_narrow_the_interval_when_told_so()
    {
        RandomEffectsFit fit = RandomEffects.DerSimonianLaird([1.0, 1.001, 0.999], [0.04, 0.04, 0.04]);
        Assert.Equal(0, fit.BetweenVariance);
        double plain = fit.HartungKnappInterval(0.95, neverNarrower: false)!.Value.HalfWidth;
        double kept = fit.HartungKnappInterval(0.95)!.Value.HalfWidth;
        Accuracy.AgreesTo(4, 4.30265 * Math.Sqrt(0.04 / 3), kept); // t table, 2 degrees of freedom, times the plain standard error
        Assert.True(plain < kept / 100);
    }

    [Fact]
    public void One_study_is_itself_and_has_no_spread()
    {
        RandomEffectsFit fit = RandomEffects.PauleMandel([2.5], [0.09]);
        Check(14, 2.5, 0.3, fit.Mean);
        Assert.Equal(0, fit.BetweenVariance);
        Assert.Null(fit.HartungKnappStandardError);
        Assert.Null(fit.HartungKnappInterval(0.95));
    }

    [Fact]
    public void Order_shift_and_scale_of_studies_carry_through() => Gen.Select(Gen.Select(Gen.Double[-3, 3], Gen.Double[0.05, 2]).Array[2, 8], Gen.Double[-100, 100], Gen.Double[0.1, 10]).Sample((studies, shift, scale) =>
    {
        double[] y = [.. studies.Select(s => s.Item1)], v = [.. studies.Select(s => s.Item2)];
        double[] moved = [.. y.Reverse().Select(e => shift + (scale * e))], stretched = [.. v.Reverse().Select(e => scale * scale * e)];
        RandomEffectsFit before = RandomEffects.DerSimonianLaird(y, v), after = RandomEffects.DerSimonianLaird(moved, stretched);
        Assert.Equal(shift + (scale * before.Mean.Value), after.Mean.Value, 9);
        Assert.Equal(scale * before.Mean.StandardError, after.Mean.StandardError, 9);
        Assert.Equal(scale * scale * before.BetweenVariance, after.BetweenVariance, 8);
    });

    [Fact]
    public void A_variance_of_zero_is_refused() =>
        Assert.StartsWith("must be above 0 (Parameter 'variances')", Assert.Throws<ArgumentOutOfRangeException>(() => RandomEffects.DerSimonianLaird([1, 2], [0.1, 0])).Message, StringComparison.Ordinal);

    private static void Check(double digits, double value, double error, Estimate found)
    {
        Accuracy.AgreesTo(digits, value, found.Value);
        Accuracy.AgreesTo(digits, error, found.StandardError);
    }

    private static void Check(double digits, double lower, double upper, ConfidenceInterval found)
    {
        Accuracy.AgreesTo(digits, lower, found.Lower);
        Accuracy.AgreesTo(digits, upper, found.Upper);
    }
}
