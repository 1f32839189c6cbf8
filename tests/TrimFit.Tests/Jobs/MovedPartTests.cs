using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;

namespace TrimFit.Tests.Jobs;

public class MovedPartTests
{
    private static Rig Rig(double left = -220, double right = 220, double front = 0, double rear = 0, double unit = 0, double line = 2, double? step = null)
    {
        Rig rig = new()
        {
            Mass = new() { PilotKg = Reading.Measured(88), PowerUnitKg = Reading.Measured(30), PowerUnitLateralM = Reading.Measured(unit / 1000) },
            Propeller = new() { Rotation = PropellerRotation.Clockwise, ThrustLineM = Reading.Measured(line / 1000) },
            Carabiners = new() { LeftM = Reading.Measured(left / 1000), RightM = Reading.Measured(right / 1000) },
            HangPoints = new() { FrontOffsetM = Reading.Measured(front / 1000), RearOffsetM = Reading.Measured(rear / 1000) },
        };
        return step is double s ? rig with { Limits = rig.Limits.Add(AdjustmentKind.CarabinerPair, new(null, null, s / 1000)) } : rig;
    }

    [Theory]
    [InlineData(-227, 213, -7, 0)]    // both went 7 mm left
    [InlineData(-213, 227, 7, 0)]     // both went 7 mm right
    [InlineData(-227, 214, -6.5, 0.5)] // not quite alike
    [InlineData(-227, 220, -3.5, 3.5)] // only one went: that is no move of the pair
    [InlineData(-227, 227, 0, 7)]     // a sign was lost: the readings fit no travel at all
    public void The_travel_of_the_pair_is_what_the_readings_say(double left, double right, double travel, double misfit)
    {
        MovedPart moved = MovedPart.Between(AdjustmentKind.CarabinerPair, Rig(), Rig(left, right))!;
        Assert.Equal(travel, moved.Travel * 1000, 1e-9);
        Assert.Equal(misfit, moved.Misfit * 1000, 1e-9);
        Assert.Equal(0.001, moved.Step);
    }

    [Fact]
    public void A_spacer_moves_the_carabiner_of_its_side()
    {
        Assert.Equal(0.010, MovedPart.Between(AdjustmentKind.CarabinerOneSide, Rig(), Rig(right: 230))!.Travel, 1e-12);
        Assert.Equal(-0.010, MovedPart.Between(AdjustmentKind.CarabinerOneSide, Rig(), Rig(left: -230))!.Travel, 1e-12);
        Assert.Equal(0, MovedPart.Between(AdjustmentKind.CarabinerOneSide, Rig(), Rig(left: -230))!.Misfit, 1e-12);
        Assert.True(MovedPart.Between(AdjustmentKind.CarabinerOneSide, Rig(), Rig(right: 210))!.Misfit > 0.005); // a spacer never carries inwards
    }

    [Fact]
    public void Parts_that_move_together_must_be_read_together()
    {
        Assert.Equal(0, MovedPart.Between(AdjustmentKind.BarSpacer, Rig(), Rig(left: -210, right: 230, front: 10))!.Misfit, 1e-12);
        Assert.True(MovedPart.Between(AdjustmentKind.BarSpacer, Rig(), Rig(left: -210, right: 230))!.Misfit > 0.005); // the front harness hang points were forgotten
        Assert.Equal(0.005, MovedPart.Between(AdjustmentKind.HarnessFront, Rig(), Rig(front: 5))!.Travel, 1e-12);
        Assert.Equal(0.005, MovedPart.Between(AdjustmentKind.HarnessFrontRear, Rig(), Rig(front: 5, rear: 5))!.Travel, 1e-12);
        Assert.Equal(0.005, MovedPart.Between(AdjustmentKind.PowerUnit, Rig(), Rig(unit: 5, line: 7))!.Travel, 1e-12);
    }

    [Fact]
    public void The_step_is_the_rigs_where_it_gives_one_and_controls_have_no_place_in_a_rig()
    {
        Assert.Equal(0.005, MovedPart.Between(AdjustmentKind.CarabinerPair, Rig(step: 5), Rig(-225, 215))!.Step);
        Assert.Null(MovedPart.Between(AdjustmentKind.BrakeLine, Rig(), Rig()));
        Assert.Null(MovedPart.Between(AdjustmentKind.Ballast, Rig(), Rig()));
    }
}
