using TrimFit.Core.Analysis;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Tests.Planning;

public class CardPlannerTests
{
    public static TheoryData<string> Plans => ["plain", "phone", "ballast"];

    private static CardPlan Of(string name) => name switch { "phone" => CardFixture.Phone, "ballast" => CardFixture.Ballast, _ => CardFixture.Plan };

    [Theory]
    [MemberData(nameof(Plans))]
    public void No_leg_goes_below_the_floor_even_with_more_sink_and_less_climb_than_expected(string name)
    {
        CardPlan plan = Of(name);
        double height = plan.StartHeightM;
        Assert.True(height >= plan.Options.FloorM);
        foreach (CardLeg leg in plan.Legs)
        {
            // By hand: level flight holds its height less a tenth of the sink, idle and off sink by a fifth more, full climbs by a fifth less.
            double share = leg.Power switch { PowerSetting.Off => 0, PowerSetting.Idle => 0.07, PowerSetting.Cruise => 0.4, _ => 1.0 };
            double climb = 2.2 * ((share / 0.4) - 1);
            climb = leg.Power == PowerSetting.Cruise ? -0.1 * 2.2 * 1.2 : climb < 0 ? 1.2 * climb : 0.8 * climb;
            height += climb * leg.Seconds;
            Assert.True(height >= plan.Options.FloorM - 1e-6, $"leg {leg.Number} ends at {height:F1} m");
        }
    }

    [Theory]
    [MemberData(nameof(Plans))]
    public void Every_second_run_flies_the_first_one_backwards_on_the_reciprocal_heading_with_sides_exchanged(string name)
    {
        List<CardLeg>[] runs = Runs(Of(name));
        Assert.Equal(0, runs.Length % 2);
        for (int r = 0; r < runs.Length; r += 2)
        {
            CardLeg[] there = [.. runs[r].Where(l => l.Kind != CardLegKind.Hold)], back = [.. runs[r + 1].Where(l => l.Kind != CardLegKind.Hold).Reverse()];
            Assert.Equal(there.Select(l => (l.Kind, l.Power, l.Seconds)), back.Select(l => (l.Kind, l.Power, l.Seconds)));
            Assert.Equal(there.Select(l => (l.BrakeLeft, l.BrakeRight, l.BallastArmM)), back.Select(l => (l.BrakeRight, l.BrakeLeft, -l.BallastArmM)));
            Assert.Equal(Math.PI, Math.Abs(Math.IEEERemainder(back[0].HeadingRad - there[0].HeadingRad, Math.Tau)), 1e-9);
        }
    }

    [Theory]
    [MemberData(nameof(Plans))]
    public void Legs_follow_each_other_fill_the_minutes_and_measure_only_after_a_hold(string name)
    {
        CardPlan plan = Of(name);
        Assert.True(plan.Seconds <= 60 * plan.Options.Minutes!.Value && plan.Seconds > 45 * plan.Options.Minutes.Value, $"{plan.Seconds} s");
        for (int i = 0; i < plan.Legs.Length; i++)
        {
            CardLeg leg = plan.Legs[i];
            Assert.Equal(i + 1, leg.Number);
            Assert.Equal(i == 0 ? 0 : plan.Legs[i - 1].EndSec, leg.StartSec);
            if (leg.Kind is not (CardLegKind.Hold or CardLegKind.Turn))
                Assert.Equal(CardLegKind.Hold, plan.Legs[i - 1].Kind);
            Assert.True(leg.BrakeLeft <= 0.15 && leg.BrakeRight <= 0.15); // no further than a brake step
        }
        Assert.Contains(plan.Legs, l => l.Kind == CardLegKind.HandsOff && l.Power == PowerSetting.Full);
        Assert.Contains(plan.Legs, l => l.Kind == CardLegKind.HandsOff && l.Power is PowerSetting.Idle or PowerSetting.Off);
    }

    [Fact]
    public void Brake_steps_are_flown_only_where_brakes_are_logged_ballast_only_where_there_is_some_and_the_engine_runs_unless_asked()
    {
        Assert.Contains(CardFixture.Plan.Legs, l => l.Kind is CardLegKind.BrakeStep or CardLegKind.Circle);
        Assert.DoesNotContain(CardFixture.Phone.Legs, l => l.Kind is CardLegKind.BrakeStep or CardLegKind.Circle);
        Assert.Contains(CardFixture.Ballast.Legs, l => l.Kind == CardLegKind.Ballast);
        Assert.DoesNotContain(CardFixture.Plan.Legs, l => l.Kind == CardLegKind.Ballast || l.Power == PowerSetting.Off);
        Assert.DoesNotContain(CardFixture.Phone.Legs, l => l.Power == PowerSetting.Off);
    }

    [Fact]
    public void Other_rigs_and_other_noise_give_other_cards()
    {
        var options = new CardOptions { PullStdErrorRadPerSec = CardFixture.Rad(0.35), Draws = 3 };
        CardPlan calm = CardPlanner.Plan(CardFixture.Rig, options, CardFixture.Prior(0.6));
        CardPlan rough = CardPlanner.Plan(CardFixture.Rig, options, CardFixture.Prior(1.5));
        Assert.True(calm.Reaches);
        Assert.True(rough.Reaches);
        Assert.True(rough.Seconds > 1.5 * calm.Seconds, $"{rough.Seconds} s against {calm.Seconds} s"); // variance goes with the square of the noise

        Rig heavy = CardFixture.Rig with { Mass = CardFixture.Rig.Mass with { PilotKg = Reading.Measured(120) }, Wing = new() { TrimSpeedMPerSec = 9.5, GlideSinkMPerSec = 2.6 } };
        CardPlan other = CardPlanner.Plan(heavy, new CardOptions { Minutes = 6, Draws = 3 });
        CardPlan same = CardPlanner.Plan(CardFixture.Rig, new CardOptions { Minutes = 6, Draws = 3 });
        Assert.NotEqual(same.StartHeightM, other.StartHeightM);
        Assert.NotEqual(same.Machine.Level, other.Machine.Level);
    }

    [Fact]
    public void A_strong_pull_or_a_brake_held_far_down_gets_no_card()
    {
        CardPlan strong = CardPlanner.Plan(CardFixture.Rig, new CardOptions(), CardFixture.Prior(pullDegPerSec: -6.1) with { HeldBrake = 0.1 });
        Assert.Equal(CardRefusal.StrongPull, strong.Refusal);
        Assert.Empty(strong.Legs);
        CardPlan held = CardPlanner.Plan(CardFixture.Rig, new CardOptions(), CardFixture.Prior() with { HeldBrake = -0.16 });
        Assert.Equal(CardRefusal.HeldBrake, held.Refusal);
        Assert.Null(CardPlanner.Plan(CardFixture.Rig, new CardOptions { Minutes = 3, Draws = 3 }, CardFixture.Prior(pullDegPerSec: 5.9) with { HeldBrake = 0.149 }).Refusal);
    }

    [Fact]
    public void A_width_that_the_sensitivity_makes_unreachable_is_refused_with_the_least_reachable_one()
    {
        CardPlan plan = CardPlanner.Plan(CardFixture.Rig, new CardOptions { ShiftHalfWidthM = 0.004, Draws = 3 }, CardFixture.Prior(pullDegPerSec: 4));
        Assert.Equal(CardRefusal.WidthUnreachable, plan.Refusal);
        Assert.Empty(plan.Legs);
        Assert.True(plan.LeastReachable > 0.004);
        Assert.True(plan.LeastReachable >= 0.9 * plan.Prediction!.SensitivityFloorM); // time does not better the sensitivity
    }

    [Fact]
    public void A_planned_card_says_more_of_level_flight_than_an_even_spread_of_the_same_minutes()
    {
        var options = new CardOptions { Minutes = 6 };
        CardMachine machine = CardFixture.Plan.Machine;
        var design = new CardDesign(machine, options);
        CardInformation card = CardInformation.Of(CardFlight.Draw(CardFixture.Plan.Legs, machine, new(1)), machine.Noise, machine.Slope)!;
        CardLayout even = design.Even(CardFixture.Plan.Seconds / 60);
        Assert.InRange(even.Seconds, CardFixture.Plan.Seconds - 25, CardFixture.Plan.Seconds);
        CardInformation habit = design.Information(even)!;
        Assert.True(card.PullVariance(machine.Balance) < habit.PullVariance(machine.Balance));
    }

    /// <summary>The best linear unbiased estimate of the mean of a stationary first-order Markov process (rms σ, correlation time τ) seen without noise over a
    /// time T weights the two ends with 1 and the inside with 1/τ; its variance is 2σ²/(2 + T/τ). Worked out by hand from the process's inverse covariance
    /// (Grenander 1950, "Stochastic processes and statistical inference", Arkiv för Matematik 1:195, has the estimate).</summary>
    [Theory]
    [InlineData(8, 300)]
    [InlineData(15, 240)]
    public void The_information_of_a_hands_off_flight_is_that_of_the_mean_of_the_disturbance(double tau, double seconds)
    {
        NoiseParameters noise = new()
        {
            Order = ResponseOrder.First,
            LagSec = 0.3,
            DisturbanceRms = CardFixture.Rad(1),
            DisturbanceTauSec = tau,
            QuickDisturbance = 0,
            GyroNoise = 1e-5,
            HeadingNoise = 1e-5,
            GustRms = 1e-6,
            GustTauSec = 5,
        };
        CardMachine machine = CardFixture.Plan.Machine with { Logger = CardLogger.Full, Noise = noise, HeadingRowsPerSec = 5, Constant = 0, Slope = 0, Curvature = 0 };
        CardLeg[] legs = [new() { Number = 1, Kind = CardLegKind.HandsOff, Power = PowerSetting.Cruise, StartSec = 0, Seconds = seconds, HeadingRad = 0 }];
        CardInformation information = CardInformation.Of(CardFlight.Draw(legs, machine, new(3)), noise, 0)!;
        double expected = CardFixture.Rad(1) * Math.Sqrt(2 / (2 + (seconds / tau)));
        Assert.InRange(Math.Sqrt(information.PullVariance(machine.Level)) / expected, 0.97, 1.05);
    }

    [Fact]
    public void The_prediction_is_what_a_drawn_flight_of_the_card_gives()
    {
        CardPrediction p = CardFixture.Plan.Prediction!;
        Accuracy.AgreesTo(9, p.PullHalfWidthRadPerSec, p.KnownNoiseStdErrorRadPerSec * p.Inflation * p.TFactor);
        Assert.InRange(p.Inflation, 0.7, 2);
        Assert.InRange(p.TFactor, 1.96, 2.8); // Student's t from 4 degrees of freedom up
        int n = p.Coefficients.Length;
        Assert.Equal(n * n, p.Covariance.Length);
        Assert.All(Enumerable.Range(0, n), i => Assert.True(p.Covariance[(i * n) + i] > 0));
        Assert.True(p.ShiftHalfWidthM > p.SensitivityFloorM);
    }

    [Fact]
    public void A_leg_more_never_makes_the_range_wider_and_the_ballast_leg_is_what_narrows_the_shift_of_a_strong_pull()
    {
        TurnSignals signals = CardFlight.Draw(CardFixture.Plan.Legs, CardFixture.Plan.Machine with { Constant = CardFixture.Rad(1), Slope = CardFixture.Rad(8) }, new(5));
        TrimAnalysis analysis = TrimAnalysis.Run(signals, new FilterErrorEstimator().Estimate(signals), CardFixture.Rig, new TrimOptions { Draws = 2000 });
        var legs = NextLeg.Of(analysis);
        Assert.Equal(6, legs.Length);
        Assert.All(legs, l => Assert.InRange(l.PullFactor, 0.5, 1.0005));
        Assert.Equal(CardLegKind.Ballast, legs[0].Kind);
        Assert.True(legs[0].ShiftFactor < 0.9, $"{legs[0].ShiftFactor}");
    }

    private static List<CardLeg>[] Runs(CardPlan plan)
    {
        var runs = new List<List<CardLeg>> { new() };
        foreach (CardLeg leg in plan.Legs)
        {
            if (leg.Kind == CardLegKind.Turn)
                runs.Add([]);
            else
                runs[^1].Add(leg);
        }
        return [.. runs];
    }
}
