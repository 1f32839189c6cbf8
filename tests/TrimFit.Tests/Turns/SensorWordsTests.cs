using TrimFit.Core.Analysis;
using TrimFit.Reporting;
using TrimFit.Reporting.Wording;

namespace TrimFit.Tests.Turns;

/// <summary>What people read of each sensor finding, whole.</summary>
public class SensorWordsTests
{
    [Theory]
    [InlineData(FindingCode.GyroScaleOff, "The gyro shows 5.00 times the turn of the GPS track, which is no unit of a turn rate. It was calibrated by the GPS. Check the unit of its yaw rate.", 5.0, 1.0)]
    [InlineData(FindingCode.GyroScaleCorrected, "The gyro shows 82 % (± 2) of the turn of the GPS track, as one mounted 35.0 deg off the vertical would; its readings were divided by that.", 0.819, 0.01, 0.6109)]
    [InlineData(FindingCode.GyroDelayed, "The gyro is 0.80 s (± 0.06) behind the GPS; it was moved by that.", 0.8, 0.03)]
    [InlineData(FindingCode.GpsDelayed, "The GPS is 0.60 s (± 0.06) behind the gyro; it was moved by that.", 0.6, 0.03)]
    [InlineData(FindingCode.GyroLevelled, "The gyro's three axes were levelled by gravity; its z axis stands 90.0 deg from the vertical on average.", 1.5708)]
    [InlineData(FindingCode.GyroAxisFromGps, "The log has no gravity to level the gyro's three axes; the axis of the turn was found from the GPS track, to within 2.2 deg.", 0.02)]
    [InlineData(FindingCode.GyroAxisAssumed, "Neither gravity nor GPS nor compass show how the gyro lies; its y axis is taken to point up. Give gyro_orientation in the rig file, or log the accelerometer.", 1.0, -1.0)]
    [InlineData(FindingCode.GyroSlipped, "The logger moved by 57.3 deg at 430 s; the gyro was levelled anew from there.", 430.0, 1.0, 1.0)]
    [InlineData(FindingCode.GyroSlipped, "The logger moved by 57.3 deg at 430 s; only the longest stretch without a move was used. Log GPS positions, or let it rest for 30 s before the start.", 430.0, 1.0, 0.0)]
    [InlineData(FindingCode.GyroLoose, "The logger was loose: 12 moves in flight, and its attitude strays by 28.6 deg. Its gyro was set aside; strap it to the frame.", 12.0, 0.5)]
    [InlineData(FindingCode.BrakesAgainstTurn, "In 97 % of 44 s of clear turns the wing turns away from the pulled brake: the brake columns may be swapped, or the wing reverses. Check which column is which.", 44.0, 0.97)]
    [InlineData(FindingCode.GpsOutliers, "GPS fixes that jump as no wing can fly were left out: 12 of 3000.", 12.0, 3000.0)]
    [InlineData(FindingCode.GpsFrozen, "The GPS repeated its last fix 2 times in flight, for 14 s in all; the repeats were left out.", 2.0, 14.0)]
    [InlineData(FindingCode.ThrottleAgainstRpm, "Throttle and rpm do not rise together (rank correlation -0.91); thrust was taken from the rpm. Check the throttle column.", -0.91)]
    [InlineData(FindingCode.TimeJitter, "Time stamps are uneven: 25 % of the gyro's steps are off by more than half of the usual 100 ms. They were used as logged.", 0.1, 0.25)]
    [InlineData(FindingCode.ThrustFromPower, "Thrust was taken from power to the two-thirds, with full power at 16.3 kW, the largest in the log.", 16300.0, 1.0)]
    [InlineData(FindingCode.CurrentTakenAsPower, "The log has a current without a voltage; it was taken as power at constant voltage, with full power at 300 A. Log the voltage too.", 300.0)]
    [InlineData(FindingCode.ThrustFromMotorCurrent, "Thrust was taken as proportional to motor current, with full power at 240 A, the largest in the log.", 240.0)]
    [InlineData(FindingCode.ClutchEngageAssumed, "The speed at which the clutch engages is not in the rig file; 2250 rpm stands in, a quarter above the idle of the log. Give clutch_engage_rpm.", 37.5)]
    [InlineData(FindingCode.ThrustFromClimb, "The log says nothing about the engine, so thrust was taken from climb and glide sink, each reading good to 78 N. Log rpm or throttle.", 40.0)]
    [InlineData(FindingCode.ThrustScaleByClimb, "By its climb the machine has 0.80 (± 0.06) times the thrust of the rig file; 0.75 is what momentum theory leaves of a static thrust in flight. The rig file's thrust was used.", 0.8, 0.03, 0.748, 1.0)]
    [InlineData(FindingCode.FullThrustByClimb, "The rig file gives no thrust; by its climb the machine has 520 N (± 39 N) in flight at full power. Pull it on a scale and give static_thrust_n.", 520.0, 20.0)]
    public void A_finding_is_a_whole_sentence_with_its_numbers(FindingCode code, string sentence, params double[] values) =>
        Assert.Equal(sentence, Words.English.Finding(Finding.Of(code, values), new Numbers(new ReportStyle())));
}
