using TrimFit.Core.Statistics;

namespace TrimFit.SimulationTests;

/// <summary>The shop's memory in small; `memory` runs it in full (DEVELOPERS.md, "The shop's memory").</summary>
public class MemoryTests
{
    private const int Shops = 600;

    public static TheoryData<int, double> Cells => new() { { 4, 0.2 }, { 4, 0.35 }, { 9, 0.0 }, { 9, 0.2 }, { 9, 0.35 }, { 20, 0.2 }, { 20, 0.35 } };

    /// <summary>Fixed seeds. Only too few is a fault: with few wings, or wings that hardly differ, the prior of the spread makes the interval wide.</summary>
    [Theory]
    [MemberData(nameof(Cells))]
    public void What_the_next_wing_measures_lies_in_the_prediction(int wings, double between)
    {
        MemoryStudy.Shop[] shops = [.. Enumerable.Range(0, Shops).Select(i => MemoryStudy.Draw(1000 + (ulong)i, wings, between, scales: true))];
        int covered = shops.Count(s => s.CoversMeasured);
        Assert.True(covered >= BinomialBand.Counts(Shops, 0.95, 0.99).Lowest, $"{covered} of {Shops}"); // at least 555
        Assert.InRange(shops.Sum(s => s.OthersSetAside), 0, 0.05 * Shops); // a wing like the others is set aside in at most 5 % of shops
    }

    [Fact]
    public void A_wing_that_turns_eight_times_as_much_is_set_aside_and_the_next_one_is_covered_all_the_same()
    {
        MemoryStudy.Shop[] shops = [.. Enumerable.Range(0, Shops).Select(i => MemoryStudy.Draw(1000 + (ulong)i, MemoryStudy.WingsBefore, 0.2, scales: true, odd: 8))];
        Assert.True(shops.Count(s => s.OddSetAside == true) >= 0.75 * Shops, $"{shops.Count(s => s.OddSetAside == true)} of {Shops}");
        Assert.True(shops.Count(s => s.CoversMeasured) >= BinomialBand.Counts(Shops, 0.95, 0.99).Lowest);
    }

    [Fact]
    public void The_tenth_customers_shift_is_narrower_and_holds_the_true_one()
    {
        const int Customers = 12;
        var kept = new KeptFits(null);
        ShiftFlight[] flights = [.. Enumerable.Range(0, MemoryStudy.WingsBefore + Customers).Select(i => ShiftFlight.Fly(500 + (ulong)i, kept))];
        MemoryStudy.Customer[] customers = [.. Enumerable.Range(MemoryStudy.WingsBefore, Customers)
            .Select(i => MemoryStudy.Next(flights[(i - MemoryStudy.WingsBefore)..i], flights[i])).OfType<MemoryStudy.Customer>()];
        Assert.True(customers.Length >= 10, $"{customers.Length} customers");
        Assert.True(customers.Count(c => c.CoversWith) >= BinomialBand.Counts(customers.Length, 0.95, 0.99).Lowest, $"{customers.Count(c => c.CoversWith)} of {customers.Length}");
        double ratio = QuantileType7.Of([.. customers.Select(c => c.HalfWidthWith / c.HalfWidthAlone)], 0.5);
        Assert.True(ratio < 0.9, $"{ratio}");
    }
}
