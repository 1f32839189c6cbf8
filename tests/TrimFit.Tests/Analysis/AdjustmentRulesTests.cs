using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Wording;

namespace TrimFit.Tests.Analysis;

/// <summary>Which travel may be named, how riser twist ranks it, and what a rig without harness or offset still gets.</summary>
public class AdjustmentRulesTests
{
    private static readonly MadeUpFlight _flight = new() { ConstantDegPerSec = 0.1, PowerDegPerSec = -4 };

    private static TrimAnalysis Analyse(Rig rig, TrimOptions? options = null)
    {
        TurnSignals signals = TurnSignals.From(_flight.Fly(), rig);
        return TrimAnalysis.Run(signals, SensitivitySourcesTests.FitOf(signals, (0.1, 0.05), (-4, 0.2)), rig, options ?? new());
    }

    [Fact]
    public void A_travel_beyond_the_rigs_limits_is_shown_but_never_the_one_recommended()
    {
        Rig free = MadeUpFlight.Rig();
        AdjustmentKind first = FitAnswer.Best(Analyse(free))!.Kind;
        TrimAnalysis limited = Analyse(free with { Limits = free.Limits.Add(first, new AdjustmentLimit(-0.002, 0.002, null)) });
        AdjustmentReport beyond = limited.Adjustments.Single(a => a.Kind == first);
        Assert.False(beyond.WithinLimits);
        Assert.Contains(beyond.Notes, n => n.Code == FindingCode.BeyondLimit);
        Assert.NotEqual(first, FitAnswer.Best(limited)!.Kind);
        Assert.True(FitAnswer.Best(limited)!.WithinLimits is null); // no limit given for this one, and its notes say so
        Assert.Contains(FitAnswer.Best(limited)!.Notes, n => n.Code == FindingCode.LimitNotGiven);
    }

    [Fact]
    public void With_every_travel_beyond_its_limit_only_the_direction_is_given_and_the_limit_is_the_reason()
    {
        Rig tight = MadeUpFlight.Rig() with
        {
            Limits = Adjustment.All.ToImmutableDictionary(a => a.Kind, _ => new AdjustmentLimit(-0.0005, 0.0005, null)),
        };
        TrimAnalysis result = Analyse(tight);
        Assert.NotEmpty(result.Adjustments);
        Assert.All(result.Adjustments, a => Assert.False(a.WithinLimits));
        Assert.Null(FitAnswer.Best(result));
        var answer = FitAnswer.Of(result);
        Assert.Equal(AnswerKind.Direction, answer.Kind);
        Assert.Equal(FindingCode.BeyondLimit, answer.Reason!.Code);
    }

    [Fact]
    public void Wheels_get_no_harness_adjustment_and_symmetric_bars_without_an_offset_are_a_valid_rig()
    {
        AdjustmentKind[] onWheels = [.. Analyse(MadeUpFlight.Rig() with { Kind = MachineKind.Wheels }).Adjustments.Select(a => a.Kind)];
        Assert.DoesNotContain(AdjustmentKind.HarnessFront, onWheels);
        Assert.DoesNotContain(AdjustmentKind.HarnessFrontRear, onWheels);
        Assert.DoesNotContain(AdjustmentKind.BarSpacer, onWheels);
        Assert.Contains(AdjustmentKind.CarabinerPair, onWheels);
        Rig symmetric = MadeUpFlight.Rig();
        Assert.Equal(0, new RigSpread(symmetric).Nominal.CgOffsetM);
        Assert.NotEmpty(Analyse(symmetric).Adjustments);
    }

    [Fact]
    public void A_passenger_fuel_and_wheels_count_in_the_weight_that_a_shift_has_to_work_with()
    {
        Rig solo = MadeUpFlight.Rig();
        Rig tandem = solo with
        {
            Seats = 2,
            Mass = solo.Mass with { PassengerKg = Reading.Measured(70), FuelKg = Reading.Measured(8), WheelsKg = Reading.Measured(20) },
        };
        // By hand: 88 + 70 + 30 + 8 + 20 = 216 kg; pilot and passenger hang from the harness, 158/216 = 0.731481 of the whole.
        RigValues values = new RigSpread(tandem).Nominal;
        Assert.Equal(216, values.SuspendedKg);
        Accuracy.AgreesTo(9, 158.0 / 216, Adjustment.All.Single(a => a.Kind == AdjustmentKind.HarnessFrontRear).CgOffsetPerTravel(values));
    }

    [Theory]
    [InlineData(0.0, FindingCode.TwistByCarabiners)]
    [InlineData(0.40, FindingCode.TwistByHarness)]
    public void With_a_strong_engine_the_travel_away_from_the_thrust_line_twists_and_the_report_says_why(double thrustDepth, FindingCode why)
    {
        // 900 N, 35 N·m/rad, 118 kg, hang-back 0, everything measured, nulled at full power.
        Rig rig = new()
        {
            Mass = new()
            {
                PilotKg = Reading.Measured(88),
                PowerUnitKg = Reading.Measured(30),
                PostureM = Reading.Measured(0),
                CgDepthM = Reading.Measured(0.40),
                PowerUnitLateralM = Reading.Measured(0),
            },
            Carabiners = new() { LeftM = Reading.Measured(-0.22), RightM = Reading.Measured(0.22) },
            HangPoints = new() { FrontShare = Reading.Measured(0.8), FrontOffsetM = Reading.Measured(0), RearOffsetM = Reading.Measured(0) },
            Propeller = new()
            {
                Rotation = PropellerRotation.Clockwise,
                DiameterM = 1.4,
                ShaftPowerW = 20_000,
                PowerRelativeSd = 0.02,
                FullPowerRevPerSec = 55,
                StaticThrustN = Reading.Measured(900, 9),
                ThrustLineM = Reading.Measured(0),
                ThrustLineDepthM = Reading.Measured(thrustDepth),
                HangBackRad = Reading.Measured(0),
            },
            Wing = new()
            {
                MassKg = Reading.Measured(6),
                LineLengthM = Reading.Measured(7),
                YawStiffnessNmPerRad = Reading.Measured(35, 1),
                SensitivityRadPerSecPerM = Reading.Measured(double.DegreesToRadians(90), double.DegreesToRadians(2)),
            },
        };
        TurnSignals signals = TurnSignals.From(_flight.Fly(), rig);
        RigValues values = new RigSpread(rig).Nominal;
        double pull = double.RadiansToDegrees(RigStatics.TurningOffset(values, 900, 1.5) * double.DegreesToRadians(90) * 1000) / 1000;
        TurnFit fit = SensitivitySourcesTests.FitOf(signals, (0, 0.02), (pull, 0.05));
        var posterior = TrimPosterior.Draw(rig, new RigSpread(rig), fit, signals, new(), SensitivitySources.Prior);
        Array.Fill(posterior.YawRatio, 1.5); // measured too
        PowerLevels levels = PowerLevels.Of(signals, fit, BalanceThrust.Full);
        ImmutableArray<AdjustmentReport> adjustments = ShiftSolver.Adjustments(rig, new RigSpread(rig), posterior, levels, signals, fit, false, out _);
        AdjustmentReport carabiners = adjustments.Single(a => a.Kind == AdjustmentKind.CarabinerPair), harness = adjustments.Single(a => a.Kind == AdjustmentKind.HarnessFrontRear);
        (AdjustmentReport worse, AdjustmentReport better) = why == FindingCode.TwistByCarabiners ? (carabiners, harness) : (harness, carabiners);
        Assert.True(worse.TwistRatio >= 3 * better.TwistRatio, $"{carabiners.TwistRatio} by carabiners, {harness.TwistRatio} by harness");
        Assert.Equal(why == FindingCode.TwistByCarabiners, worse.TwistRatioHigh95 >= SafetyFigures.TwistWarningRatio);
        Assert.True(better.TwistRatioHigh95 < SafetyFigures.TwistWarningRatio);
        Assert.Equal(why, ShiftSolver.WhyTwist(adjustments)!.Code);
    }

    [Fact]
    public void The_cheapest_check_of_a_contradicted_rotation_is_to_stand_behind_the_machine()
    {
        TrimAnalysis result = Analyse(MadeUpFlight.Rig(PropellerRotation.CounterClockwise));
        Assert.Equal(FindingCode.RotationConflict, result.Verdict.Reasons[0].Code);
        Finding check = result.Warnings.Single(w => w.Code == FindingCode.NextCheck);
        Assert.Equal((int)NextCheck.Rotation, check.Values[0]);
        Assert.Equal(1, check.Values[1]);
    }

    [Fact]
    public void Without_a_hang_check_and_with_a_seat_nobody_measured_the_cheapest_check_is_the_hang_check()
    {
        Rig rig = MadeUpFlight.Rig();
        rig = rig with
        {
            Mass = rig.Mass with { PostureM = Reading.Assumed(0, 0.03) },
            Wing = new() { SensitivityRadPerSecPerM = Reading.Measured(double.DegreesToRadians(90), double.DegreesToRadians(2)) },
        };
        TrimAnalysis result = Analyse(rig);
        Finding check = result.Warnings.Single(w => w.Code == FindingCode.NextCheck);
        Assert.Equal(NextCheck.HangCheck, (NextCheck)(int)check.Values[0]);
        Assert.InRange(check.Values[1], 0.15, 1);
    }
}
