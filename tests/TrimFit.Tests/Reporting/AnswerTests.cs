using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Reporting;
using TrimFit.Reporting.Wording;
using static TrimFit.Tests.Reporting.ReportFixture;

namespace TrimFit.Tests.Reporting;

public class AnswerTests
{
    [Fact]
    public void A_pull_with_a_travel_names_side_rate_part_direction_and_range() => Assert.Equal(
        "In level flight it turns right at 2.1 deg/s; moving both harness hang points, front and rear, 14 mm to your left (9 to 20) would null it.",
        Answer(Result()));

    [Theory]
    [InlineData(AdjustmentKind.CarabinerPair, 0.014, 0.009, 0.020, TravelUnit.Meter, "moving both riser carabiners 14 mm to your right (9 to 20)")]
    [InlineData(AdjustmentKind.CarabinerOneSide, 0.014, 0.009, 0.020, TravelUnit.Meter, "moving the right riser carabiner alone 14 mm to your right (9 to 20)")]
    [InlineData(AdjustmentKind.BarSpacer, -0.037, -0.127, -0.015, TravelUnit.Meter, "moving both suspension bars with their front harness hang points 37 mm to your left (15 to 127)")]
    [InlineData(AdjustmentKind.HarnessFront, -0.024, -0.049, -0.011, TravelUnit.Meter, "moving the front harness hang points 24 mm to your left (11 to 49)")]
    [InlineData(AdjustmentKind.PowerUnit, 0.030, 0.010, 0.060, TravelUnit.Meter, "moving the power unit 30 mm to your right (10 to 60)")]
    [InlineData(AdjustmentKind.EngineCant, 0.0349065850398866, 0.0174532925199433, 0.0523598775598299, TravelUnit.Radian, "turning the engine's thrust axis 2.0 deg (1.0 to 3.0) in plan so that it pushes more to your right")]
    [InlineData(AdjustmentKind.Ballast, -2.5, -4, -1, TravelUnit.Kilogram, "hanging 2.5 kg of ballast (1.0 to 4.0) at the left riser carabiner")]
    [InlineData(AdjustmentKind.Trimmer, 0.008, 0.004, 0.012, TravelUnit.Meter, "setting the right trimmer 8 mm (4 to 12) further than the other, counted as in the log")]
    [InlineData(AdjustmentKind.BrakeLine, -0.008, -0.012, -0.004, TravelUnit.Meter, "making the left brake line 8 mm (4 to 12) shorter than the other")]
    public void Each_part_has_its_own_instruction(AdjustmentKind kind, double travel, double low, double high, TravelUnit unit, string expected) =>
        Assert.Equal($"In level flight it turns right at 2.1 deg/s; {expected} would null it.", Answer(Result(adjustments: [Adjustment(kind, travel, low, high, unit)])));

    [Fact]
    public void A_range_over_zero_names_both_sides() => Assert.Equal(
        "In level flight it turns right at 2.1 deg/s; moving both riser carabiners 4 mm to your right (2 to your left up to 10 to your right) would null it.",
        Answer(Result(adjustments: [Adjustment(AdjustmentKind.CarabinerPair, 0.004, -0.002, 0.010)])));

    [Fact]
    public void A_balanced_flight_needs_nothing() => Assert.Equal(
        "In level flight it turns left at 0.3 deg/s (-0.7 to 0.1; right is positive): that is balanced within 1.0 deg/s. Nothing needs to be moved.",
        Answer(Result(VerdictCode.Balanced, degPerSec: -0.3, adjustments: [])));

    [Fact]
    public void Without_a_travel_the_direction_and_the_reason_are_said() => Assert.Equal(
        "At full power it turns right at 2.1 deg/s (1.7 to 2.5; right is positive), but how far to move a part cannot be said. "
        + "Neither the brakes nor hands-off spans are in the log: intended turns look like a pull and a held course hides it. Log the brakes, or mark hands-off spans in a flight sheet.",
        Answer(Result(VerdictCode.PowerPull, VerdictStrength.None, adjustments: [], reasons: [Finding.Of(FindingCode.NoSteeringNoHandsOff)], balance: BalanceThrust.Full)));

    [Fact]
    public void A_pull_that_may_go_either_way_is_not_given_a_side() => Assert.Equal(
        "At 300 N of thrust it turns right at 1.0 deg/s, but anything from -2.0 to 4.0 (right is positive) fits this flight, so not even the side is certain. "
        + "The pull is known to within 3.0 deg/s and must be known to within 2.0 deg/s. Fly more legs, in calmer air.",
        Answer(Result(VerdictCode.Insufficient, VerdictStrength.None, 1.0, 3.0, [], [Finding.Of(FindingCode.PullTooUncertain, Deg(3), Deg(2))], BalanceThrust.At(300))));

    [Fact]
    public void Without_a_rate_the_missing_thing_is_named() => Assert.Equal(
        "This flight cannot tell how hard the machine turns. The pull's growth with power cannot be told: thrust stayed between 52 and 55 % of full. Fly 20 s each at idle and full power.",
        Answer(Result(VerdictCode.Insufficient, VerdictStrength.None, null, adjustments: [], reasons: [Finding.Of(FindingCode.ThrustRangeTooSmall, 0.52, 0.55)])));

    [Fact]
    public void A_slope_against_the_rig_asks_for_the_rotation_first() => Assert.Equal(
        "In level flight it turns right at 2.1 deg/s, which contradicts the rig file, so nothing may be moved yet. "
        + "The pull grows to the right with power, but the rig file predicts the other side in 97 % of what is possible. Check first the propeller's rotation "
        + "(stand behind, look the way it flies), then the signs of gyro and steering, then the thrust line.",
        Answer(Result(VerdictCode.Insufficient, VerdictStrength.None, adjustments: [], reasons: [Finding.Of(FindingCode.TooLittleSteadyFlight, 10, 60), Finding.Of(FindingCode.RotationConflict, 1, 0.97)])));

    [Fact]
    public void A_refused_way_is_passed_over()
    {
        AdjustmentReport refused = Adjustment(AdjustmentKind.CarabinerPair) with { Notes = [Finding.Of(FindingCode.TwistRefused, 1.3)] };
        Assert.Equal("In level flight it turns right at 2.1 deg/s; moving the front harness hang points 14 mm to your left (9 to 20) would null it.",
            Answer(Result(adjustments: [refused, Adjustment(AdjustmentKind.HarnessFront)])));
        Assert.Equal("In level flight it turns right at 2.1 deg/s (1.7 to 2.5; right is positive), but how far to move a part cannot be said. "
            + "Refused: the twist ratio may reach 1.30; above 1 nothing holds the frame against riser twist.", Answer(Result(adjustments: [refused])));
    }

    [Fact]
    public void Strength_none_never_gives_millimetres() =>
        Assert.DoesNotContain("mm", Answer(Result(strength: VerdictStrength.None)), StringComparison.Ordinal);

    [Fact]
    public void A_pull_of_nothing_has_no_side() => Assert.StartsWith("In level flight it flies straight (",
        Answer(Result(VerdictCode.Balanced, degPerSec: 0.01, adjustments: [])), StringComparison.Ordinal);

    [Fact]
    public void The_first_step_gives_part_direction_reference_line_readings_and_hang_check() => Assert.Equal(
        "First step: move both harness hang points, front and rear, 7 mm to your left. Measured from the frame's centre line, as the seated pilot sees it: "
        + "the middle of the front pair from 3 mm right to 4 mm left, the middle of the rear pair from 0 mm to 7 mm left. "
        + "The hang check must then show 60.2 kg on the left scale and 57.8 kg on the right one. Then fly again and fit again.",
        Words.English.FirstStep(Adjustment(), Rig(), Numbers.Invariant));

    [Fact]
    public void Carabiners_move_from_their_own_readings() => Assert.Equal(
        "First step: move both riser carabiners 5 mm to your right. Measured from the frame's centre line, as the seated pilot sees it: "
        + "the left one from 215 mm left to 210 mm left, the right one from 215 mm right to 220 mm right. "
        + "The hang check must then show 60.2 kg on the left scale and 57.8 kg on the right one. Then fly again and fit again.",
        Words.English.FirstStep(Adjustment(AdjustmentKind.CarabinerPair, 0.010, 0.005, 0.015), Rig(), Numbers.Invariant));

    [Theory]
    [InlineData(2.4, "on the right one, each within 4.0 kg; against a hang check before the step the right scale must gain 2.4 kg on the left one. Then")]
    [InlineData(-2.4, "on the right one, each within 4.0 kg; against a hang check before the step the left scale must gain 2.4 kg on the right one. Then")]
    [InlineData(0.0, "on the right one, each within 4.0 kg. Then")]
    public void The_readings_to_expect_come_with_their_range_and_with_what_must_change(double difference, string words) => Assert.Contains(words,
        Words.English.FirstStep(Adjustment() with { HangCheckPlusMinusKg = 4, HangCheckDifferenceKg = difference }, Rig(), Numbers.Invariant), StringComparison.Ordinal);

    [Fact]
    public void A_step_too_small_to_set_is_not_asked_for() => Assert.Equal("The first step is smaller than can be set; leave the machine as it is.",
        Words.English.FirstStep(Adjustment(firstStep: 0.0003), Rig(), Numbers.Invariant));

    [Fact]
    public void Imperial_units_reach_the_sentence() => Assert.Equal( // 14, 9 and 20 mm over 25.4
        "In level flight it turns right at 2.1 deg/s; moving both harness hang points, front and rear, 0.55 in to your left (0.35 to 0.79) would null it.",
        Words.English.Answer(FitAnswer.Of(Result()), new Numbers(new() { Units = UnitSystem.Imperial })));

    private static string Answer(TrimAnalysis analysis) => Words.English.Answer(FitAnswer.Of(analysis), Numbers.Invariant);
}
