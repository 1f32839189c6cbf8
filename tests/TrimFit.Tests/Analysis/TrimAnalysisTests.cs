using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Tests.Analysis;

public class TrimAnalysisTests
{
    private static TrimAnalysis Analyse(MadeUpFlight flight, Rig? rig = null, TrimOptions? options = null) =>
        TrimAnalysis.Run(flight.Fly(), rig ?? MadeUpFlight.Rig(), options ?? new());

    /// <summary>Within twice the half-width of the 95 % interval: a right program misses this once in 10,000 flights (coverage has its own study).</summary>
    private static void AssertNear(double degPerSec, PullAtSetting pull) =>
        Assert.InRange(pull.RateRadPerSec!.Value, double.DegreesToRadians(degPerSec) - (2 * pull.Interval95!.Value.HalfWidth),
            double.DegreesToRadians(degPerSec) + (2 * pull.Interval95.Value.HalfWidth));

    /// <summary>A clockwise propeller rolls the frame left, so an uncorrected machine turns left, more with power.</summary>
    private static MadeUpFlight Uncorrected => new() { ConstantDegPerSec = 0.1, PowerDegPerSec = -4 };

    [Fact]
    public void An_uncorrected_machine_has_a_power_pull_and_every_travel_acts_against_it()
    {
        TrimAnalysis result = Analyse(Uncorrected);
        Assert.True(result.Verdict.Code is VerdictCode.PowerPull or VerdictCode.Both);
        PullAtSetting cruise = result.Pull.At[2];
        AssertNear(0.1 - (4 * 0.6), cruise);
        Assert.True(result.Shift!.CgShiftM > 0); // pulls left: the CG goes right
        Assert.NotEmpty(result.Adjustments);
        foreach (AdjustmentReport adjustment in result.Adjustments)
        {
            bool carabiners = adjustment.Kind is AdjustmentKind.CarabinerPair or AdjustmentKind.CarabinerOneSide or AdjustmentKind.BarSpacer;
            if (adjustment.Kind != AdjustmentKind.EngineCant) // its sign follows from roll and yaw together
                Assert.Equal(carabiners ? -1 : 1, Math.Sign(adjustment.Travel)); // riser carabiners left, or the rest right
            double cap = adjustment.Unit == TravelUnit.Meter ? 0.015 : double.PositiveInfinity;
            Assert.True(Math.Abs(adjustment.FirstStep) <= Math.Min(cap, Math.Abs(adjustment.Travel) / 2) + 1e-12);
            Assert.True(Math.Abs(adjustment.TurnLeftAt[2].RateRadPerSec!.Value) < Math.Abs(cruise.RateRadPerSec!.Value) / 4);
        }
    }

    [Fact]
    public void Level_flight_thrust_is_where_this_flight_neither_climbed_nor_sank()
    {
        TrimAnalysis result = Analyse(Uncorrected);
        Assert.Equal(CruiseBasis.ZeroClimb, result.Pull.CruiseBasis);
        Assert.InRange(result.Pull.At[2].ThrustFraction, 0.57, 0.63);
    }

    [Fact]
    public void Without_an_altitude_level_flight_is_60_percent_and_said_to_be_assumed()
    {
        TrimAnalysis result = Analyse(Uncorrected with { Altitude = false });
        Assert.Equal(0.6, result.Pull.At[2].ThrustFraction);
        Assert.Contains(result.Warnings, w => w.Code == FindingCode.CruiseAssumed);
        Assert.Contains(result.Assumptions, a => a.Name == "cruise_thrust_percent");
    }

    [Fact]
    public void A_balanced_machine_is_balanced_and_nothing_is_moved()
    {
        TrimAnalysis result = Analyse(new MadeUpFlight { NoiseDegPerSec = 0.3 });
        Assert.Equal(VerdictCode.Balanced, result.Verdict.Code);
        Assert.Empty(result.Adjustments);
    }

    [Fact]
    public void A_propeller_entered_the_wrong_way_round_is_a_conflict_and_gives_no_travel()
    {
        TrimAnalysis result = Analyse(Uncorrected, MadeUpFlight.Rig(PropellerRotation.CounterClockwise));
        Assert.Equal(VerdictCode.Insufficient, result.Verdict.Code);
        Assert.Equal(FindingCode.RotationConflict, result.Verdict.Reasons[0].Code);
        Assert.Equal(VerdictStrength.None, result.Verdict.Strength);
        Assert.Empty(result.Adjustments);
        Assert.Null(result.Shift);
        Assert.True(result.Sensitivity.Conflict);
    }

    [Fact]
    public void Brakes_entered_the_wrong_way_round_are_asked_about_and_not_used()
    {
        TrimAnalysis result = Analyse(Uncorrected with { BrakeSign = -1 });
        Assert.Equal(VerdictCode.Insufficient, result.Verdict.Code);
        Assert.Contains(result.Verdict.Reasons, r => r.Code == FindingCode.BrakeSignReversed);
        Assert.Empty(result.Adjustments);
    }

    [Theory]
    [InlineData(-1, 1)]
    [InlineData(1, 57.29577951308232)] // deg/s under a rad/s name
    public void A_gyro_upside_down_or_in_the_wrong_unit_is_mended_by_the_GPS_and_said(double sign, double unit)
    {
        TrimAnalysis right = Analyse(Uncorrected), wrong = Analyse(Uncorrected with { GyroSign = sign, GyroUnit = unit });
        Assert.Equal(right.Pull.At[2].RateRadPerSec!.Value, wrong.Pull.At[2].RateRadPerSec!.Value, 3);
        Assert.Contains(wrong.Warnings, w => w.Code == (sign < 0 ? FindingCode.GyroSignReversed : FindingCode.GyroUnitCorrected));
    }

    [Fact]
    public void A_flight_at_one_throttle_cannot_tell()
    {
        TrimAnalysis result = Analyse(Uncorrected with { Powers = [0.6, 0.62, 0.6, 0.61, 0.6, 0.6, 0.62, 0.6] });
        Assert.Equal(VerdictCode.Insufficient, result.Verdict.Code);
        Assert.Contains(result.Verdict.Reasons, r => r.Code == FindingCode.ThrustRangeTooSmall);
        Assert.Null(result.Fit[TurnCoefficient.Thrust]);
        Assert.All(result.Fit.Coefficients.Where(c => c.Estimate is null), c => Assert.NotEqual("", c.Reason));
    }

    [Fact]
    public void Without_steering_or_declared_hands_off_there_is_no_travel_and_never_balanced()
    {
        foreach (double power in (double[])[0, -4])
        {
            TrimAnalysis result = Analyse(new MadeUpFlight { PowerDegPerSec = power, Brakes = false });
            Assert.NotEqual(VerdictCode.Balanced, result.Verdict.Code);
            Assert.NotEqual(VerdictCode.OverCompensated, result.Verdict.Code);
            Assert.Empty(result.Adjustments);
            Assert.Equal(VerdictStrength.None, result.Verdict.Strength);
            Assert.Contains(result.Verdict.Reasons, r => r.Code == FindingCode.NoSteeringNoHandsOff);
        }
    }

    [Fact]
    public void A_gyro_alone_leaves_the_constant_open()
    {
        TrimAnalysis result = Analyse(Uncorrected with { Gps = false });
        Assert.Null(result.Fit[TurnCoefficient.Constant]);
        Assert.Equal(VerdictCode.Insufficient, result.Verdict.Code);
    }

    [Fact]
    public void A_GPS_alone_gives_the_pull_within_its_interval()
    {
        TrimAnalysis result = Analyse(Uncorrected with { Gyro = false });
        AssertNear(0.1 - (4 * 0.6), result.Pull.At[2]);
    }

    [Fact]
    public void A_contra_rotating_pair_claims_no_pull_from_torque()
    {
        TrimAnalysis result = Analyse(Uncorrected, MadeUpFlight.Rig(PropellerRotation.ContraRotating));
        Assert.Contains(result.Warnings, w => w.Code == FindingCode.ContraRotating);
        Assert.DoesNotContain(result.Sensitivity.Sources, s => s.Kind == "torque");
    }

    [Fact]
    public void A_balance_thrust_that_was_not_flown_is_refused()
    {
        TrimAnalysis result = Analyse(
            Uncorrected with { Powers = [0, 0.3, 0.5, 0.3, 0, 0.5, 0.3, 0, 0.5, 0.3, 0, 0.5] }, options: new() { BalanceThrust = BalanceThrust.Full });
        Assert.Equal(VerdictCode.Insufficient, result.Verdict.Code);
        Assert.Contains(result.Verdict.Reasons, r => r.Code == FindingCode.BalanceThrustNotFlown);
    }

    [Fact]
    public void The_even_compromise_leaves_the_smallest_worst_turn()
    {
        TrimAnalysis even = Analyse(Uncorrected, options: new() { BalanceThrust = BalanceThrust.Even });
        double idle = even.Shift!.TurnLeftAt[1].RateRadPerSec!.Value, full = even.Shift.TurnLeftAt[3].RateRadPerSec!.Value;
        Assert.Equal(0, idle + full, 2); // equal and opposite within 0.005 rad/s
        Assert.True(idle * full < 0);
    }

    [Fact]
    public void The_same_flight_and_seed_give_the_same_numbers_and_another_seed_moves_them_little()
    {
        TrimAnalysis first = Analyse(Uncorrected), again = Analyse(Uncorrected), other = Analyse(Uncorrected, options: new() { Seed = 99 });
        Assert.Equal(first.Shift!.CgShiftM, again.Shift!.CgShiftM);
        double width = first.Shift.Interval95.HalfWidth;
        Assert.True(Math.Abs(first.Shift.CgShiftM - other.Shift!.CgShiftM) < 0.1 * width);
        Assert.True(first.Sensitivity.EffectiveSamples > 500);
    }

    [Fact]
    public void A_mirrored_flight_gives_the_mirrored_answer()
    {
        TrimAnalysis right = Analyse(Uncorrected);
        FlightLog log = Uncorrected.Fly();
        var mirrored = FlightLog.Create(log.TimeSec, new Dictionary<ChannelRole, double[]>
        {
            [ChannelRole.Rpm] = log[ChannelRole.Rpm].ToArray(),
            [ChannelRole.Altitude] = log[ChannelRole.Altitude].ToArray(),
            [ChannelRole.YawRate] = [.. log[ChannelRole.YawRate].ToArray().Select(r => -r)],
            [ChannelRole.VelocityNorth] = log[ChannelRole.VelocityNorth].ToArray(),
            [ChannelRole.VelocityEast] = [.. log[ChannelRole.VelocityEast].ToArray().Select(v => -v)],
            [ChannelRole.BrakeLeft] = log[ChannelRole.BrakeRight].ToArray(),
            [ChannelRole.BrakeRight] = log[ChannelRole.BrakeLeft].ToArray(),
        });
        TrimAnalysis left = TrimAnalysis.Run(mirrored, MadeUpFlight.Rig(PropellerRotation.CounterClockwise), new());
        for (int i = 0; i < 3; i++)
        {
            Estimate a = right.Fit.Coefficients[i].Estimate!.Value, b = left.Fit.Coefficients[i].Estimate!.Value;
            Assert.True(Math.Abs(a.Value + b.Value) < 1e-6 * a.StandardError, right.Fit.Coefficients[i].Name);
        }
    }
}
