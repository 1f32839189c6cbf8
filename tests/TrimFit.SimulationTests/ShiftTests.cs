using TrimFit.Core.Rigging;

namespace TrimFit.SimulationTests;

/// <summary>A small part of the study from pull to millimetres, sized so that a right program passes: with true coverage of 95 %, fewer than
/// 32 of 40 intervals hold the truth once in 2,000 draws. The seeds are fixed; the full study is `shift` (DEVELOPERS.md, "Shift coverage").</summary>
public class ShiftTests
{
    private const int Flights = 40;
    private const ulong FirstSeed = 50_001;
    private static readonly KeptFits _kept = new(null);

    private static readonly Lazy<ShiftStudy.FlightOutcome[]> _flown = new(() =>
    {
        var outcomes = new ShiftStudy.FlightOutcome?[Flights];
        Parallel.For(0, Flights, i => outcomes[i] = ShiftStudy.One(FirstSeed + (ulong)i, _kept));
        return [.. outcomes.OfType<ShiftStudy.FlightOutcome>()];
    });

    [Fact]
    public void The_shifts_interval_holds_the_true_shift_with_every_source_of_the_sensitivity()
    {
        ShiftStudy.FlightOutcome[] flown = _flown.Value;
        Assert.Equal(Flights, flown.Length);
        for (int i = 0; i < flown[0].Shifts.Length; i++)
        {
            int covered = flown.Count(f => f.Shifts[i].Covers);
            Assert.True(covered >= 32, $"{covered} of {Flights} with source {i}");
        }
        Assert.True(flown.Count(f => f.PullCovers) >= 32);
    }

    [Fact]
    public void Travels_hold_the_null_of_the_simulator_and_a_first_step_makes_the_turn_smaller_and_keeps_its_side()
    {
        ShiftStudy.TravelOutcome[] travels = [.. _flown.Value.SelectMany(f => f.Travels)];
        foreach (AdjustmentKind kind in ShiftStudy.Kinds)
        {
            ShiftStudy.TravelOutcome[] some = [.. travels.Where(t => t.Kind == kind)];
            Assert.True(some.Length >= 20, $"{some.Length} travels of {kind}");
            Assert.True(some.Average(t => t.Covers ? 1.0 : 0.0) >= 0.8, $"{kind}");
        }
        ShiftStudy.TravelOutcome[] steps = [.. travels.Where(t => t.FirstStepHelps is not null && t.Stated)];
        Assert.True(steps.Length >= 50, $"{steps.Length} first steps");
        Assert.True(steps.Average(t => t.FirstStepHelps == true ? 1.0 : 0.0) >= 0.9, $"{100 * steps.Average(t => t.FirstStepHelps == true ? 1.0 : 0.0)} %");
    }

    [Theory]
    [InlineData(EnteredWrong.Rotation)]
    [InlineData(EnteredWrong.GyroSign)]
    [InlineData(EnteredWrong.Brakes)]
    public void What_is_entered_the_wrong_way_round_is_named_and_no_travel_adds_to_the_pull(object wrong)
    {
        var outcomes = new ShiftStudy.WrongOutcome[12];
        Parallel.For(0, outcomes.Length, i => outcomes[i] = ShiftStudy.Wrong(FirstSeed + (ulong)i, (EnteredWrong)wrong, _kept));
        Assert.DoesNotContain(outcomes, o => o.AddsToPull);
        ShiftStudy.WrongOutcome[] eligible = [.. outcomes.Where(o => o.Eligible)];
        Assert.True(eligible.Length >= 4, $"{eligible.Length} flights could show it");
        Assert.True(eligible.Count(o => !o.Named) <= 2); // 95 % named: three of twelve unnamed once in 50 draws
    }
}
