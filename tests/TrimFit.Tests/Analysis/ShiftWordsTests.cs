using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Reporting.Wording;

namespace TrimFit.Tests.Analysis;

/// <summary>What people read about sources in conflict, riser twist and the next check.</summary>
public class ShiftWordsTests
{
    private static string Say(FindingCode code, params ReadOnlySpan<double> values) => Words.English.Finding(Finding.Of(code, values), Numbers.Invariant);

    [Fact]
    public void A_slope_the_torque_cannot_explain_points_to_the_thrust_line_first() => Assert.Equal(
        "The growth of the pull with power is 2.1 times what the torque explains (p = 0.012): look at the thrust line before moving anything, then at power, propeller speed and masses in the rig file.",
        Say(FindingCode.SensitivityConflict, 0.012, 2.1));

    [Fact]
    public void Two_sources_in_conflict_are_both_named() => Assert.Equal(
        "Two sources of the sensitivity contradict each other: the ballast leg gives 0.30 times what the torque gives (p = 0.004). Check side and size of what was shifted before moving anything.",
        Say(FindingCode.SourcesConflict, 1, 2, 0.3, 0.004));

    [Fact]
    public void An_unbounded_ratio_is_said_to_be_one() => Assert.Equal(
        "The turn by the pair of flights cannot be told from no turn, so by itself it puts no bound on the shift. Shift more, or fly longer legs.",
        Say(FindingCode.RatioUnbounded, 3));

    [Theory]
    [InlineData(FindingCode.TwistByCarabiners, "At full power moving the riser carabiners brings the twist ratio to 0.82, moving the harness hang points to 0.14: the thrust line passes near the height of the riser carabiners, so what twists is how far beside their middle the thrust pulls. Moving the riser carabiners takes them away from the thrust line; moving the harness hang points leaves both where they are.")]
    [InlineData(FindingCode.TwistByHarness, "At full power moving the harness hang points brings the twist ratio to 0.14, moving the riser carabiners to 0.82: the thrust line passes near the height of the CG, so what twists is how far beside the CG the thrust pulls. Moving the harness hang points takes the CG away from the thrust line; moving the riser carabiners leaves the two together.")]
    public void Why_one_way_twists_more_is_told_in_two_sentences(FindingCode code, string text)
    {
        Assert.Equal(text, Say(code, 0.82, 0.14));
        Assert.Equal(2, text.Split(". ").Length);
    }

    [Theory]
    [InlineData(NextCheck.Rotation, "stand behind the machine and see which way the propeller turns, looking the way it flies.")]
    [InlineData(NextCheck.BrakeColumns, "see which brake column of the log moves when the right brake is pulled.")]
    [InlineData(NextCheck.HandsOffLegs, "fly again with a flight sheet that marks the hands-off legs, or log the brakes.")]
    [InlineData(NextCheck.HangCheck, "the hang check, two scales under the riser carabiners, which shows where the weight sits.")]
    [InlineData(NextCheck.ThrustLine, "measure how far beside the middle between the riser carabiners the thrust line passes.")]
    [InlineData(NextCheck.Depths, "measure how deep the thrust line and the CG hang below the riser carabiners.")]
    [InlineData(NextCheck.HangBack, "measure the hang-back of the thrust axis in the hang test.")]
    [InlineData(NextCheck.Torque, "find the engine's power and the propeller's speed at full power.")]
    [InlineData(NextCheck.MoreLegs, "fly more legs at idle, level flight and full power, in turn.")]
    [InlineData(NextCheck.KnownShift, "fly the first step and fit again, or fly a ballast leg to each side.")]
    public void The_next_check_is_one_plain_instruction(NextCheck check, string text) =>
        Assert.Equal("The cheapest check that could overturn this answer: " + text, Say(FindingCode.NextCheck, (int)check, 0.4));

    [Fact]
    public void A_part_that_is_not_offered_is_named() => Assert.Equal(
        "Not offered, because its effect may go either way: engine turned in plan.", Say(FindingCode.EffectSignUnknown, (int)AdjustmentKind.EngineCant));
}
