using TrimFit.Core.Statistics;

namespace TrimFit.SimulationTests;

/// <summary>A small part of the studies of cards, fixed seeds and sized so that a right program passes; the full ones are `card` and `sheet`
/// (DEVELOPERS.md, "Test card").</summary>
public class CardTests
{
    private const ulong FirstSeed = 70_001;

    [Fact]
    public void Flights_of_a_card_give_the_interval_that_it_predicted_and_a_narrower_one_than_an_even_spread()
    {
        const int Flights = 24;
        var outcomes = new CardStudy.Outcome?[Flights];
        Parallel.For(0, Flights, i => outcomes[i] = CardStudy.One(FirstSeed + (ulong)i));
        CardStudy.Outcome[] flown = [.. outcomes.OfType<CardStudy.Outcome>()];
        Assert.True(flown.Length >= 20, $"{flown.Length} cards flown");
        // Single ratios scatter by a third: the median of 24 by 8 %, so that a right median of 0.95 to 1.05 leaves these once in some hundred draws.
        Assert.InRange(CardStudy.Median(flown.Select(o => o.PullRatio)), 0.75, 1.3);
        Assert.InRange(CardStudy.Median(flown.Select(o => o.ShiftRatio).OfType<double>()), 0.75, 1.35);
        Assert.True(CardStudy.Median(flown.Select(o => o.EvenHalfWidth / o.HalfWidth)) > 0.97);
        (int lowest, _) = BinomialBand.Counts(flown.Length, 0.9, 0.999); // whole machines are covered a little less often than stated
        Assert.True(flown.Count(o => o.Covers) >= lowest);
        Assert.True(flown.Select(o => string.Join(' ', o.Plan.Legs.Select(l => $"{l.Kind}{l.Power}{l.Seconds}"))).Distinct().Count() >= 2);
    }

    [Fact]
    public void A_GPS_alone_with_the_cards_sheet_gives_the_pull_inside_its_interval_with_marks_five_seconds_off()
    {
        const int Flights = 24;
        var outcomes = new SheetStudy.Outcome?[Flights];
        Parallel.For(0, Flights, i => outcomes[i] = SheetStudy.One(FirstSeed + (ulong)i, 8));
        SheetStudy.Outcome[] flown = [.. outcomes.OfType<SheetStudy.Outcome>()];
        Assert.True(flown.Length >= 20, $"{flown.Length} flights with a pull");
        (int lowest, _) = BinomialBand.Counts(flown.Length, 0.95, 0.99);
        Assert.True(flown.Count(o => o.Covers) >= lowest, $"{flown.Count(o => o.Covers)} of {flown.Length}");
    }
}
