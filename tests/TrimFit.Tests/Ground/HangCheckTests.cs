using CsCheck;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Ground;

public class HangCheckTests
{
    internal static Rig Machine(double pilotKg = 88, double unitKg = 30, double left = -0.215, double right = 0.215, RigHangCheck? check = null) => new()
    {
        Mass = new() { PilotKg = Reading.Measured(pilotKg, 0.25), PowerUnitKg = Reading.Measured(unitKg, 0.25) },
        Propeller = new() { Rotation = PropellerRotation.Clockwise, StaticThrustN = Reading.Measured(600), ShaftPowerW = 14000, DiameterM = 1.25 },
        Carabiners = new() { LeftM = Reading.Measured(left, 0.001), RightM = Reading.Measured(right, 0.001) },
        HangCheck = check,
    };

    internal static RigHangCheck Check(double left, double right, double spacing = 0.430, params ReadOnlySpan<HangReading> hangs) => new()
    {
        LeftKg = Reading.Measured(left, 0.1),
        RightKg = Reading.Measured(right, 0.1),
        CarabinerSpacingM = Reading.Measured(spacing, 0.0025),
        Hangs = [.. hangs],
    };

    [Fact]
    public void Scales_5_49_kilograms_apart_at_430_millimetres_under_118_show_10_millimetres_right()
    {
        // By hand: e = 430 × 5.49/(2 × 118) = 10.003 mm.
        HangCheckResult hang = HangCheck.Measure([new(56.255, 61.745)], 0.430, 0, 88.0 / 118);
        Accuracy.AgreesTo(4, 0.0100030, hang.OffsetM);
        Accuracy.AgreesTo(4, 0.0100030, RigHang.Of(Machine(check: Check(56.255, 61.745)))!.OffsetM);
        Accuracy.AgreesTo(4, 0.0100030, new RigSpread(Machine(check: Check(56.255, 61.745))).Nominal.CgOffsetM);
        Accuracy.AgreesTo(4, 0.0100030, RigReporter.Of(Machine(check: Check(56.255, 61.745))).CgOffsetM);
    }

    [Fact]
    public void Three_hangs_by_hand()
    {
        // e_i = 0.4 (R − L)/(2 × 100) = 2 mm/kg × 2, 5, 8 kg = 4, 10, 16 mm; mean 10, squares 72 mm². Pilot share 0.8: prior sd 3.6 mm with 8 degrees.
        // Seat variance (8 × 12.96 + 72)/10 = 17.568 mm²; over 3 hangs 5.856. Scales: 2 × √2 × 0.2 = 0.5656854 mm, squared 0.32. Sum 6.176.
        HangCheckResult hang = HangCheck.Measure([new(49, 51), new(47.5, 52.5), new(46, 54)], 0.400, 0, 0.8);
        Accuracy.AgreesTo(10, 0.010, hang.OffsetM);
        Accuracy.AgreesTo(6, Math.Sqrt(6.176) / 1000, hang.StandardError);
        Accuracy.AgreesTo(6, Math.Sqrt(17.568) / 1000, hang.SeatingSdM);
        Accuracy.AgreesTo(6, 10 * Math.Pow(6.176 / 5.856, 2), hang.DegreesOfFreedom);
        Assert.Equal(10, hang.SeatingDegreesOfFreedom);
    }

    [Fact]
    public void Hangs_that_scatter_more_than_pilots_do_speak_for_themselves()
    {
        // e_i = 2 mm/kg × −10, 0, 10 kg = −20, 0, 20 mm: squares 800 mm², variance 400 mm² against 12.96 of the usual pilot.
        HangCheckResult hang = HangCheck.Measure([new(55, 45), new(50, 50), new(45, 55)], 0.400, 0, 0.8);
        Assert.True(hang.ScattersMore);
        Accuracy.AgreesTo(9, 0.020, hang.SeatingSdM);
        Assert.Equal(2, hang.SeatingDegreesOfFreedom);
        Assert.False(HangCheck.Measure([new(49, 51), new(47.5, 52.5), new(46, 54)], 0.400, 0, 0.8).ScattersMore);
    }

    [Fact]
    public void Exchanging_the_scales_takes_their_difference_out()
    {
        // The left scale shows 4 kg too much wherever it hangs; true halves are 50 and 50.
        HangReading normal = new(54, 50), exchanged = new(50, 54, Exchanged: true);
        HangCheckResult hang = HangCheck.Measure([normal, exchanged], 0.4, 0, 0.8);
        Accuracy.AgreesTo(12, 1, 1 + hang.OffsetM); // 0 by symmetry
        HangCheckResult alone = HangCheck.Measure([normal], 0.4, 0, 0.8);
        Assert.True(alone.OffsetM < -0.007);
    }

    [Fact]
    public void Left_and_right_are_mirror_images() => Gen.Select(Gen.Double[30, 90], Gen.Double[30, 90], Gen.Double[30, 90], Gen.Double[30, 90]).Sample((a, b, c, d) =>
    {
        HangCheckResult one = HangCheck.Measure([new(a, b), new(c, d)], 0.43, 0.002, 0.7), other = HangCheck.Measure([new(b, a), new(d, c)], 0.43, 0.002, 0.7);
        return Math.Abs(one.OffsetM + other.OffsetM) < 1e-15 && Math.Abs(one.StandardError - other.StandardError) < 1e-15;
    });

    [Fact]
    public void Expected_readings_are_the_hang_check_read_backwards() => Gen.Select(Gen.Double[60, 160], Gen.Double[-0.05, 0.05], Gen.Double[0.3, 0.6]).Sample((kg, e, s) =>
    {
        HangReading expected = HangCheck.Expected(kg, e, s);
        return Math.Abs(expected.OffsetM(s) - e) < 1e-12 && Math.Abs(expected.SumKg - kg) < 1e-9;
    });

    [Fact]
    public void Draws_of_a_rig_scatter_by_the_hang_checks_error_and_one_more_seating()
    {
        Rig rig = Machine(check: Check(56.255, 61.745, 0.430, new(56.3, 61.7), new(56.2, 61.8), new(56.26, 61.74)));
        HangCheckResult hang = RigHang.Of(rig)!;
        var spread = new RigSpread(rig);
        var random = new SeededRandom(3);
        double[] e = [.. Enumerable.Range(0, 4000).Select(_ => spread.Draw(random).CgOffsetM)];
        double mean = e.Average(), sd = Math.Sqrt(e.Sum(x => (x - mean) * (x - mean)) / (e.Length - 1));
        Assert.InRange(mean - hang.OffsetM, -0.0003, 0.0003); // four standard errors of the mean
        Assert.InRange(sd / hang.NextFlightSdM, 0.95, 1.05);
        Assert.True(hang.NextFlightSdM > hang.StandardError);
    }

    [Fact]
    public void A_wider_hang_check_widens_the_travels_effect_and_a_known_front_share_narrows_a_spacers()
    {
        // bar_spacer: change of e per mm is −(1 − f m_p/m); with f ± 0.15 (2 sd) its spread is m_p/m × 0.075 of the travel.
        Adjustment spacer = Adjustment.All.Single(a => a.Kind == AdjustmentKind.BarSpacer);
        Rig unknown = Machine(), known = Machine() with { HangPoints = new() { FrontShare = Reading.Measured(0.8, 0.005) } };
        (double change, double sd, _) = RigHang.Expected(unknown, spacer, 0.020);
        (double same, double narrow, _) = RigHang.Expected(known, spacer, 0.020);
        Accuracy.AgreesTo(9, -0.020 * (1 - (0.8 * 88 / 118)), change);
        Accuracy.AgreesTo(9, change, same);
        Assert.InRange(sd / (0.020 * 88 / 118 * 0.075), 0.9, 1.1);
        Assert.InRange(narrow / (0.020 * 88 / 118 * 0.005), 0.9, 1.1);
    }

    [Fact]
    public void A_spacer_on_one_side_widens_the_spacing_of_the_expected_readings()
    {
        (double change, _, double spacing) = RigHang.Expected(Machine(), Adjustment.All.Single(a => a.Kind == AdjustmentKind.CarabinerOneSide), 0.020);
        Accuracy.AgreesTo(9, -0.010, change);
        Accuracy.AgreesTo(9, 0.450, spacing);
    }

    [Fact]
    public void No_hang_or_empty_scales_are_refused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => HangCheck.Measure([], 0.4, 0, 0.8));
        Assert.Throws<ArgumentOutOfRangeException>(() => HangCheck.Measure([new(0, 0)], 0.4, 0, 0.8));
        Assert.Throws<ArgumentOutOfRangeException>(() => HangCheck.Measure([new(double.NaN, 50)], 0.4, 0, 0.8));
    }
}
