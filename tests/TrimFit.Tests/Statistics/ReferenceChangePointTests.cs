using CsCheck;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Statistics;

public class ReferenceChangePointTests
{
    [Fact]
    public void The_Nile_breaks_where_strucchange_says()
    {
        double[] volume = ReferenceData.Read("nile.csv")["volume"];
        // Zeileis, Kleiber, Krämer & Hornik, Comput. Stat. Data Anal. 44 (2003) 109; R strucchange breakpoints(Nile ~ 1), 15 years at least in a segment, printed to whole numbers.
        (int[] Breaks, double Rss)[] table = [([], 2835157), ([28], 1597457), ([28, 83], 1552924), ([28, 68, 83], 1538097), ([28, 45, 68, 83], 1507888)];
        foreach ((int[] breaks, double rss) in table)
        {
            int[] found = ChangePoints.WithBreaks(volume, breaks.Length, 15)!;
            Assert.Equal(breaks, found);
            Assert.Equal(rss, Math.Round(ChangePoints.Cost(volume, found)));
        }
        Assert.Equal(1659994, Math.Round(ChangePoints.Cost(volume, ChangePoints.WithBreaks(volume, 5, 15)!)));
        Assert.Equal(1597457.194, ChangePoints.Cost(volume, [28]), 0.0006);
    }

    [Theory]
    [InlineData(1e5, new[] { 28 }, 1697457.194)]
    [InlineData(5e4, new[] { 6, 7, 10, 19, 28, 37, 40, 45, 47, 83, 95 }, 1366837.639)]
    public void Penalised_breaks_of_the_Nile_are_those_of_a_separate_program(double penalty, int[] breaks, double cost)
    {
        double[] volume = ReferenceData.Read("nile.csv")["volume"];
        int[] found = ChangePoints.Pelt(volume, penalty);
        Assert.Equal(breaks, found);
        Assert.Equal(cost - (found.Length * penalty), ChangePoints.Cost(volume, found), 0.0006);
        Assert.Equal(breaks, ChangePoints.OptimalPartitioning(volume, penalty));
    }

    [Fact]
    public void Pruning_never_changes_the_answer() => // Killick, Fearnhead & Eckley (2012): PELT is exact
        Gen.Select(Gen.Double[-10, 10].Array[0, 60], Gen.Double[0, 200], Gen.Int[1, 6]).Sample((values, penalty, minimum) =>
        {
            int[] pruned = ChangePoints.Pelt(values, penalty, minimum), full = ChangePoints.OptimalPartitioning(values, penalty, minimum);
            // Costs, not places: breaks of equal cost tie.
            double Total(int[] breaks) => values.Length == 0 ? 0 : ChangePoints.Cost(values, breaks) + (penalty * breaks.Length);
            Assert.Equal(Total(full), Total(pruned), 1e-9 * (1 + values.Sum(v => v * v)));
            int start = 0;
            foreach (int end in (int[])[.. full, values.Length])
            {
                Assert.True(full.Length == 0 || end - start >= minimum);
                start = end;
            }
        });

    [Fact]
    public void Shifted_and_scaled_values_break_in_the_same_places() => Gen.Select(Gen.Int[0, 1000], Gen.Double[-1e6, 1e6], Gen.Double[0.01, 100]).Sample((seed, shift, scale) =>
    {
        SeededRandom random = new((ulong)seed);
        double[] values = [.. Enumerable.Range(0, 60).Select(i => (i < 25 ? 0 : i < 40 ? 3 : -2) + (0.5 * random.NextNormal()))];
        double[] moved = [.. values.Select(v => shift + (scale * v))];
        Assert.Equal(ChangePoints.Pelt(values, 5), ChangePoints.Pelt(moved, 5 * scale * scale));
    });

    [Fact]
    public void A_column_too_short_for_its_breaks_says_so()
    {
        Assert.Null(ChangePoints.WithBreaks([1, 2, 3], 1, 2));
        Assert.Empty(ChangePoints.Pelt([1, 2, 3], 0.1, 2));
        Assert.Empty(ChangePoints.Pelt([], 1));
    }
}
