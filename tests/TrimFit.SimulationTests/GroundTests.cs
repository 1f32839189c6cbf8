using TrimFit.Core.Ground;
using TrimFit.Core.Statistics;

namespace TrimFit.SimulationTests;

/// <summary>Hang checks at their full size (no flights, so they are quick). Fixed seeds; the table is `ground` (DEVELOPERS.md, "Ground checks").</summary>
public class GroundTests
{
    private const int Cases = 2000;

    [Theory]
    [InlineData(3, false)]
    [InlineData(6, true)]
    public void The_interval_of_e_holds_the_truth_as_often_as_it_says(int hangs, bool exchange)
    {
        (int lowest, int highest) = BinomialBand.Counts(Cases, 0.95, 0.99); // 1874 to 1924 of 2000
        (int covered, _) = new GroundStudy(Hangs: hangs, Exchange: exchange).Coverage(Cases, 1);
        Assert.InRange(covered, lowest, highest);
    }

    [Fact]
    public void One_hang_alone_is_covered_at_least_as_often_as_it_says() =>
        Assert.True(new GroundStudy(Hangs: 1).Coverage(Cases, 1).Covered >= BinomialBand.Counts(Cases, 0.95, 0.99).Lowest);

    [Fact]
    public void A_change_made_the_wrong_way_is_never_confirmed()
    {
        // A likelihood ratio of 1000 is passed under the mirror image at most once in 10,000 with one look, so 0 of 200 holds 98 times of 100 or oftener.
        Dictionary<HangChangeVerdict, int> verdicts = new GroundStudy().TravelVerdicts(200, 11, 0.005, 0.030, wrongWay: true);
        Assert.Equal(0, verdicts[HangChangeVerdict.Confirmed]);
        Assert.Equal(0, verdicts[HangChangeVerdict.OtherSize]); // which says "right way"
        Assert.Equal(200, verdicts[HangChangeVerdict.WrongWay] + verdicts[HangChangeVerdict.CannotTell]);
    }

    [Fact]
    public void A_wrong_way_of_15_millimetres_and_more_is_always_named() =>
        Assert.Equal(200, new GroundStudy().Verdicts(200, 12, 0.015, 0.040, wrongWay: true)[HangChangeVerdict.WrongWay]);

    [Fact]
    public void A_right_change_of_15_millimetres_and_more_is_confirmed_and_never_called_wrong()
    {
        Dictionary<HangChangeVerdict, int> verdicts = new GroundStudy().Verdicts(200, 12, 0.015, 0.040, wrongWay: false);
        Assert.Equal(0, verdicts[HangChangeVerdict.WrongWay]);
        Assert.True(verdicts[HangChangeVerdict.Confirmed] >= 170, $"{verdicts[HangChangeVerdict.Confirmed]} of 200"); // 95 % of sizes are to be inside, 85 % has room for chance
    }
}
