using TrimFit.Core.Ground;

namespace TrimFit.Tests.Ground;

public class CheckOrderTests
{
    private static SimpleCause[] Order(Complaint complaint) => [.. CheckOrder.Of(complaint).Select(c => c.Cause)];

    [Fact]
    public void Every_check_stands_once_whatever_is_told()
    {
        foreach (PullWhen when in new[] { PullWhen.None, PullWhen.EngineOff, PullWhen.FullPower | PullWhen.Level, (PullWhen)31 })
        {
            foreach (PullSince since in Enum.GetValues<PullSince>())
            {
                SimpleCause[] order = Order(new() { When = when, Since = since, Changed = [ChangedPart.Harness], OtherWing = OtherWing.SamePull });
                Assert.Equal(Enum.GetValues<SimpleCause>(), order.Order());
                Assert.All(CheckOrder.Of(new() { When = when, Since = since }), c => Assert.NotEmpty(c.Reasons));
            }
        }
    }

    [Fact]
    public void Without_answers_brake_lines_come_first() => Assert.Equal([SimpleCause.BrakeLines, SimpleCause.Trimmers], Order(new()).Take(2));

    [Fact]
    public void A_pull_with_power_only_points_to_the_machine_and_one_with_the_engine_off_to_wing_and_pilot()
    {
        Assert.Equal(SimpleCause.SuspensionBarPivots, Order(new() { When = PullWhen.FullPower | PullWhen.Level })[0]);
        Assert.Equal(SimpleCause.BrakeLines, Order(new() { When = PullWhen.EngineOff | PullWhen.FullPower })[0]);
    }

    [Fact]
    public void What_was_changed_and_what_came_suddenly_go_first()
    {
        Assert.Equal(SimpleCause.Trimmers, Order(new() { When = PullWhen.FullPower, Changed = [ChangedPart.Trimmers] })[0]);
        Assert.Contains(Order(new() { Since = PullSince.Suddenly })[0], new[] { SimpleCause.SuspensionBarPivots, SimpleCause.EngineMounts, SimpleCause.Risers, SimpleCause.Trimmers });
        Assert.Equal(SimpleCause.AcceleratorLines, Order(new() { When = PullWhen.Accelerator })[0]);
    }

    [Fact]
    public void Another_wing_that_pulls_alike_acquits_the_wing()
    {
        SimpleCause[] same = Order(new() { OtherWing = OtherWing.SamePull }), gone = Order(new() { OtherWing = OtherWing.NoPull, When = PullWhen.FullPower });
        Assert.True(Array.IndexOf(same, SimpleCause.BrakeLines) > Array.IndexOf(same, SimpleCause.Harness));
        Assert.Equal(SimpleCause.BrakeLines, gone[0]);
    }
}
