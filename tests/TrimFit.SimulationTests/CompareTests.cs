using TrimFit.Core.Statistics;

namespace TrimFit.SimulationTests;

/// <summary>A small part of the study of before and after, sized so that a right program passes; seeds are fixed, the bounds are 99.9 % binomial. The full study is
/// `compare` (DEVELOPERS.md, "Before and after").</summary>
public class CompareTests
{
    private const int Pairs = 20, Machines = 10;
    private const ulong FirstSeed = 70_001;
    private const double Level = 0.998; // 0.1 % each side

    private static readonly KeptFits _kept = new(null);

    private static readonly Lazy<CompareStudy.PairOutcome[]> _pairs = new(() => Many(Pairs, seed => CompareStudy.Pair(seed, _kept)));

    private static readonly Lazy<CompareStudy.SwapOutcome[]> _swaps = new(() => Many(Machines, seed => CompareStudy.Swap(seed, _kept)));

    [Fact]
    public void A_pull_left_at_the_tolerance_is_hardly_ever_called_fixed_and_one_within_a_quarter_mostly_is()
    {
        CompareStudy.PairOutcome[] all = _pairs.Value;
        Assert.Equal(Pairs, all.Length);
        int most = BinomialBand.Counts(Pairs, 0.05, Level).Highest;
        Assert.True(all.Count(o => o.FixedAtTolerance) <= most, $"{all.Count(o => o.FixedAtTolerance)} with one flight after");
        Assert.True(all.Count(o => o.FixedAtToleranceOfTwo) <= most, $"{all.Count(o => o.FixedAtToleranceOfTwo)} with two flights after");
        Assert.True(all.Count(o => o.FixedWithinOfTwo) > Pairs / 2, $"{all.Count(o => o.FixedWithinOfTwo)} of {Pairs} with two flights after");
    }

    [Fact]
    public void Intervals_of_change_sensitivity_and_shift_hold_the_truth_and_two_flights_are_narrower_than_one()
    {
        CompareStudy.PairOutcome[] all = _pairs.Value;
        int least = BinomialBand.Counts(Pairs, 0.95, Level).Lowest;
        Assert.True(all.Count(o => o.ChangeCovers) >= least, $"change: {all.Count(o => o.ChangeCovers)}");
        Assert.True(all.Count(o => o.SensitivityCovers == true) >= least, $"sensitivity: {all.Count(o => o.SensitivityCovers == true)}");
        Assert.True(all.Count(o => o.ShiftCovers) >= least, $"shift: {all.Count(o => o.ShiftCovers)}");
        static double Median(IEnumerable<double> values) => QuantileType7.Of([.. values], 0.5);
        Assert.True(Median(all.Select(o => o.Together)) < Median(all.Select(o => o.AfterAlone)));
        Assert.True(Median(all.Select(o => o.Together)) < Median(all.Select(o => o.BeforeAlone)));
    }

    [Fact]
    public void The_same_card_flown_twice_narrows_the_pull_by_about_three_tenths()
    {
        CompareStudy.Halves[] all = Many(Machines, seed => CompareStudy.Repeat(seed, _kept));
        double one = QuantileType7.Of([.. all.SelectMany(o => new[] { o.One, o.Other })], 0.5), both = QuantileType7.Of([.. all.Select(o => o.Both)], 0.5);
        Assert.InRange(both / one, 0.55, 0.85); // 1/sqrt 2 = 0.71 with the scatter of a median of ten
    }

    [Fact]
    public void A_swap_of_wings_and_what_else_was_changed_are_told()
    {
        CompareStudy.SwapOutcome[] all = _swaps.Value;
        CompareStudy.SwapOutcome[] known = [.. all.Where(o => o.ShareCovers is not null)];
        Assert.True(known.Length >= Machines / 2, $"{known.Length} shares");
        Assert.True(known.Count(o => o.ShareCovers == true) >= BinomialBand.Counts(known.Length, 0.95, Level).Lowest);
        Assert.All(all, o => Assert.True(o.MassNoticed));
        Assert.True(all.Count(o => o.LineNoticed) > all.Count(o => o.LineFalselyNoticed), $"noticed {all.Count(o => o.LineNoticed)}, without cause {all.Count(o => o.LineFalselyNoticed)}");
        Assert.True(all.Count(o => o.LineNoticed) >= Machines / 2, $"tightened line noticed {all.Count(o => o.LineNoticed)} times");
    }

    private static T[] Many<T>(int count, Func<ulong, T?> one)
        where T : class
    {
        var outcomes = new T?[count];
        Parallel.For(0, count, i => outcomes[i] = one(FirstSeed + (ulong)i));
        return [.. outcomes.OfType<T>()];
    }
}
