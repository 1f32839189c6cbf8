using System.Collections.Immutable;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Ground;

public class EntryCheckTests
{
    private static readonly Dictionary<string, ImmutableArray<double>> _none = [];

    /// <summary>Riser carabiners 25 mm left of the middle: the CG hangs 25 mm right of theirs.</summary>
    private static Rig Offset(RigHangCheck? check = null) => HangCheckTests.Machine(left: -0.240, right: 0.190, check: check);

    private static RigHangCheck Hang(double offsetM, double kg = 118)
    {
        HangReading r = HangCheck.Expected(kg, offsetM, 0.430);
        return HangCheckTests.Check(r.LeftKg, r.RightKg);
    }

    private static GroundFaultCode[] Codes(Rig rig) => [.. EntryChecks.Of(rig, null, _none).Select(f => f.Code)];

    [Fact]
    public void A_hang_check_that_agrees_with_the_tape_is_not_doubted() => Assert.Empty(Codes(Offset(Hang(0.022))));

    [Fact]
    public void Swapped_scales_show_the_mirror_image_of_the_tape() => Assert.Equal([GroundFaultCode.ScalesSwappedByGeometry], Codes(Offset(Hang(-0.025))));

    [Fact]
    public void Swapped_scales_are_found_by_leaning_right_whatever_the_tape_says()
    {
        RigHangCheck straight = Hang(0.001) with { LeanRight = new(52, 66) }, swapped = Hang(0.001) with { LeanRight = new(66, 52) };
        Assert.Empty(Codes(HangCheckTests.Machine(check: straight)));
        Assert.Equal([GroundFaultCode.ScalesSwappedByLean], Codes(HangCheckTests.Machine(check: swapped)));
    }

    [Fact]
    public void Scales_and_tape_that_disagree_otherwise_are_named_as_that() => Assert.Equal([GroundFaultCode.HangAgainstGeometry], Codes(Offset(Hang(0.060))));

    [Fact]
    public void Swapped_sides_are_the_earlier_places_exchanged()
    {
        Rig earlier = Offset(), swapped = HangCheckTests.Machine(left: -0.190, right: 0.240), moved = HangCheckTests.Machine(left: -0.250, right: 0.180);
        Assert.Equal([GroundFaultCode.SidesSwapped], EntryChecks.Of(swapped, earlier, _none).Select(f => f.Code));
        Assert.Empty(EntryChecks.Of(moved, earlier, _none));
        Assert.Empty(EntryChecks.Of(Offset(), Offset(), _none));
    }

    [Theory]
    [InlineData(5.9, 59, "hang_check.left_kg")]
    [InlineData(590, 59, "hang_check.left_kg")]
    [InlineData(59, 5.9, "hang_check.right_kg")]
    public void One_scale_off_by_ten_is_named_by_the_mass_it_misses(double left, double right, string key)
    {
        GroundFault fault = Assert.Single(EntryChecks.Of(HangCheckTests.Machine(check: HangCheckTests.Check(left, right)), null, _none));
        Assert.Equal(GroundFaultCode.FactorTen, fault.Code);
        Assert.Equal(key, fault.Key);
        Accuracy.AgreesTo(9, 59, fault.Values[1]);
    }

    [Fact]
    public void Feet_on_the_ground_are_missing_weight() => Assert.Equal([GroundFaultCode.WeightMissing], Codes(HangCheckTests.Machine(check: HangCheckTests.Check(50, 50))));

    [Theory]
    [InlineData("hang_check.left_kg", new[] { 56.3, 5.61, 56.5 }, 2, 56.1)]
    [InlineData("carabiners.left_mm", new[] { -215.0, -214, -2150 }, 3, -215)]
    [InlineData("thrust_test.pull_kg", new[] { 610, 61.0, 60.5 }, 1, 61)]
    public void One_repeat_off_by_ten_is_named_with_what_it_would_be(string key, double[] values, int number, double corrected)
    {
        GroundFault fault = Assert.Single(EntryChecks.Of(HangCheckTests.Machine(), null, new Dictionary<string, ImmutableArray<double>> { [key] = [.. values] }));
        Assert.Equal(GroundFaultCode.FactorTenInRepeats, fault.Code);
        Assert.Equal(number, (int)fault.Values[0]);
        Accuracy.AgreesTo(9, corrected, fault.Values[2]);
    }

    [Theory]
    [InlineData("hang_points.front_left_mm", new[] { 1.0, 10, 1 })] // around the centre line there is no ratio
    [InlineData("hang_check.left_kg", new[] { 56.3, 56.1, 57.5 })]
    [InlineData("hang_check.left_kg", new[] { 56.3, 5.63 })] // two readings do not say which
    public void Scatter_is_not_called_a_slip(string key, double[] values) =>
        Assert.Empty(EntryChecks.Of(HangCheckTests.Machine(), null, new Dictionary<string, ImmutableArray<double>> { [key] = [.. values] }));

    [Theory]
    [InlineData(PropellerDrive.Belt, PropellerRotation.Clockwise, true, true)]
    [InlineData(PropellerDrive.Belt, PropellerRotation.CounterClockwise, true, false)]
    [InlineData(PropellerDrive.Direct, PropellerRotation.CounterClockwise, true, false)]
    [InlineData(PropellerDrive.Gear, PropellerRotation.CounterClockwise, true, true)]
    [InlineData(PropellerDrive.Gear, PropellerRotation.Clockwise, true, false)]
    [InlineData(PropellerDrive.Gear, PropellerRotation.Clockwise, false, true)] // idler or planets
    [InlineData(PropellerDrive.Clutch, PropellerRotation.CounterClockwise, true, true)] // a clutch says nothing
    public void A_rotation_against_belt_or_gear_is_named(PropellerDrive drive, PropellerRotation propeller, bool reverses, bool right)
    {
        Rig rig = HangCheckTests.Machine();
        rig = rig with { Propeller = rig.Propeller with { Drive = drive, Rotation = propeller, CrankRotation = PropellerRotation.Clockwise, GearReverses = reverses } };
        Assert.Equal(right ? [] : [GroundFaultCode.RotationAgainstDrive], Codes(rig));
    }

    [Fact]
    public void Counted_turns_and_written_reduction_must_agree()
    {
        Rig rig = HangCheckTests.Machine();
        Assert.Equal([GroundFaultCode.ReductionAgainstCount], Codes(rig with { Propeller = rig.Propeller with { CountedReduction = 2.67, GivenReduction = 3.2 } }));
        Assert.Empty(Codes(rig with { Propeller = rig.Propeller with { CountedReduction = 2.67, GivenReduction = 2.68 } }));
    }

    [Fact]
    public void The_power_units_scales_must_carry_its_mass()
    {
        static Dictionary<string, ImmutableArray<double>> Scales(double left, double right) => new() { ["weighing.power_unit_left_kg"] = [left], ["weighing.power_unit_right_kg"] = [right] };
        Assert.Empty(EntryChecks.Of(HangCheckTests.Machine(), null, Scales(15.2, 14.8)));
        Assert.Equal([GroundFaultCode.PowerUnitWeight], EntryChecks.Of(HangCheckTests.Machine(), null, Scales(10, 10)).Select(f => f.Code));
        GroundFault slip = Assert.Single(EntryChecks.Of(HangCheckTests.Machine(), null, Scales(1.52, 14.8)));
        Assert.Equal((GroundFaultCode.FactorTen, "weighing.power_unit_left_kg"), (slip.Code, slip.Key));
    }
}
