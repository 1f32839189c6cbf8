using System.Collections.Immutable;
using TrimFit.Core.Logs;
using TrimFit.Simulation;

namespace TrimFit.Tests.Simulation;

public class RandomScenarioTests
{
    [Fact]
    public void Every_drawn_machine_flies_and_its_travels_are_known()
    {
        for (ulong seed = 0; seed < 30; seed++)
        {
            Scenario s = RandomScenarios.Draw(seed, seed % 2 == 0 ? TurnResponse.FirstOrder : TurnResponse.SecondOrder);
            FlightTruth truth = FlightTruth.Of(s);
            Assert.Equal(4, truth.Pull.Length);
            Assert.All(truth.Pull, p => Assert.True(double.IsFinite(p.RateRadPerSec)));
            Assert.True(truth.LevelThrustN < 0.9 * truth.FullThrustN, "level flight is within the engine's power");
            if (truth.NullShiftM is double shift)
                Assert.Equal(0, SteadyTurn.Rate(s.WithCgShift(shift), truth.LevelThrustN), 1e-9);
        }
    }

    [Fact]
    public void A_draw_is_the_same_for_the_same_seed()
    {
        Scenario first = RandomScenarios.Draw(11);
        Assert.Equal(first with { Legs = [] }, RandomScenarios.Draw(11) with { Legs = [] });
        Assert.NotEqual(first with { Legs = [] }, RandomScenarios.Draw(12) with { Legs = [] });
    }

    [Fact]
    public void A_good_card_visits_every_power_on_opposed_headings_and_steps_both_brakes()
    {
        ImmutableArray<FlightLeg> legs = TestCards.Alternating();
        foreach (LegPower power in Enum.GetValues<LegPower>())
            Assert.Equal(4, legs.Count(l => l.Control == LegControl.HandsOff && l.Power == power));
        Assert.Equal(8, legs.Count(l => l.BrakeLeftM > 0));
        Assert.Equal(8, legs.Count(l => l.BrakeRightM > 0));
        double[] headings = [.. legs.Where(l => l.Control == LegControl.HoldHeading).Select(l => l.HeadingRad!.Value).Distinct()];
        Assert.Equal([0, Math.PI, Math.PI / 2, 1.5 * Math.PI], headings);
    }

    [Fact]
    public void Left_hand_circuits_never_turn_right_on_purpose()
    {
        ImmutableArray<FlightLeg> legs = TestCards.LeftHandCircuits();
        Assert.Equal(16, legs.Count(l => l.Control == LegControl.Turn));
        Assert.DoesNotContain(legs, l => l.TurnRad > 0);
        SimulatedFlight flight = FlightSimulator.Fly(new Scenario { Legs = legs });
        double turned = 0;
        foreach (double rate in flight.Log[ChannelRole.YawRate])
            turned += double.IsNaN(rate) ? 0 : (rate - flight.Scenario.Sensors.GyroBiasRadPerSec) / 10;
        Assert.InRange(turned / Math.Tau, -4.6, -3.4); // four circuits
    }

    [Theory]
    [InlineData(true, 2)]
    [InlineData(false, 0)]
    public void A_held_flight_has_brake_steps_only_when_wanted(bool wanted, int steps)
    {
        ImmutableArray<FlightLeg> legs = TestCards.HeldThroughout(wanted);
        Assert.Equal(steps, legs.Count(l => l.Control == LegControl.Brakes));
        Assert.Equal(16, legs.Count(l => l.Control == LegControl.HoldHeading));
        Assert.DoesNotContain(legs, l => l.Control == LegControl.HandsOff);
    }

    [Fact]
    public void A_throttle_never_moved_stays_where_it_is()
    {
        SimulatedFlight flight = FlightSimulator.Fly(new Scenario { Legs = TestCards.ThrottleNeverMoved(0.48) });
        foreach (double throttle in flight.Log[ChannelRole.Throttle])
            Assert.True(double.IsNaN(throttle) || throttle == 0.48);
    }
}
