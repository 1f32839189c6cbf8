using TrimFit.Core.Ground;

namespace TrimFit.Tests.Ground;

public class HangChangeTests
{
    /// <summary>Three hangs around e, half a millimetre apart.</summary>
    private static HangCheckResult At(double offsetM, int hangs = 3)
    {
        HangReading[] readings = [.. Enumerable.Range(0, hangs).Select(i => HangCheck.Expected(118, offsetM + (0.0005 * (i % 3 - 1)), 0.430))];
        return HangCheck.Measure([.. readings], 0.430, 0.002, 88.0 / 118);
    }

    [Theory]
    [InlineData(0.015, 0.015, HangChangeVerdict.Confirmed)]
    [InlineData(-0.015, -0.014, HangChangeVerdict.Confirmed)]
    [InlineData(0.015, -0.015, HangChangeVerdict.WrongWay)]
    [InlineData(-0.020, 0.018, HangChangeVerdict.WrongWay)]
    [InlineData(0.015, 0.040, HangChangeVerdict.OtherSize)]
    [InlineData(0.015, 0.000, HangChangeVerdict.CannotTell)]
    [InlineData(0.003, 0.003, HangChangeVerdict.CannotTell)]
    public void A_change_gets_its_verdict(double expected, double measured, HangChangeVerdict verdict)
    {
        HangChangeResult change = HangChange.Judge(At(0.004), At(0.004 + measured), expected);
        Assert.Equal(verdict, change.Verdict);
        Assert.InRange(change.MeasuredChangeM - measured, -0.001, 0.001);
    }

    [Fact]
    public void The_ratio_is_that_of_two_Student_densities()
    {
        // Independent: densities of the t distribution themselves.
        HangCheckResult before = At(0), after = At(0.006);
        HangChangeResult change = HangChange.Judge(before, after, 0.010);
        double seat = ((before.SeatingDegreesOfFreedom * before.SeatingSdM * before.SeatingSdM) + after.OwnSquares) / (before.SeatingDegreesOfFreedom + 2);
        double bySeat = 2 * seat / 3, variance = bySeat + before.OtherVariance + after.OtherVariance, degrees = (before.SeatingDegreesOfFreedom + 2) * Math.Pow(variance / bySeat, 2);
        double sd = Math.Sqrt(variance), d = change.MeasuredChangeM;
        double ratio = TrimFit.Core.Statistics.StudentT.Density((d - 0.010) / sd, degrees) / TrimFit.Core.Statistics.StudentT.Density((d + 0.010) / sd, degrees);
        Accuracy.AgreesTo(8, Math.Log(ratio), change.LogLikelihoodRatio);
    }

    [Fact]
    public void The_advised_number_of_hangs_grows_as_the_change_shrinks_and_ends_where_none_helps()
    {
        HangChangeResult small = HangChange.Judge(At(0), At(0.003), 0.006), smaller = HangChange.Judge(At(0), At(0.002), 0.0045), least = HangChange.Judge(At(0), At(0), 0.001);
        Assert.Equal(HangChangeVerdict.CannotTell, small.Verdict);
        Assert.NotNull(small.HangsEach);
        Assert.True(smaller.HangsEach is null || smaller.HangsEach > small.HangsEach);
        Assert.True(small.HangsAfter is null || small.HangsAfter >= small.HangsEach); // repeating only one side helps less
        Assert.Null(least.HangsAfter);
        Assert.Null(least.HangsEach);
    }

    [Fact]
    public void No_change_to_expect_is_refused() => Assert.Throws<ArgumentOutOfRangeException>(() => HangChange.Judge(At(0), At(0), 0));
}
