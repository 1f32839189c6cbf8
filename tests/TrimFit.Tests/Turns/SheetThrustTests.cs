using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Tests.Reporting;

namespace TrimFit.Tests.Turns;

public class SheetThrustTests
{
    private static FoundLeg Leg(PowerSetting power, double start, double end) => new()
    {
        Leg = new() { Start = SheetTime.FromSeconds(start), End = SheetTime.FromSeconds(end), Kind = SheetLegKind.HandsOff, Power = power },
        StatedStartSec = start,
        StatedEndSec = end,
        StartSec = start,
        EndSec = end,
    };

    /// <summary>Climbs of 2.4, 0.2 and −1.8 m/s at full, level and idle.</summary>
    private static FlightLog Climbing()
    {
        double[] time = [.. Enumerable.Range(0, 180).Select(i => (double)i)];
        double[] altitude = new double[180];
        for (int i = 1; i < 180; i++)
            altitude[i] = altitude[i - 1] + (i <= 60 ? 2.4 : i <= 120 ? 0.2 : -1.8);
        return FlightLog.Create(time, [new(ChannelRole.Altitude, altitude)]);
    }

    [Fact]
    public void Level_flight_lies_between_idle_and_full_as_its_climb_does()
    {
        FoundLeg[] legs = [Leg(PowerSetting.Full, 10, 50), Leg(PowerSetting.Cruise, 70, 110), Leg(PowerSetting.Idle, 130, 170)];
        (double[] fraction, double level, bool byClimb) = SheetThrust.Of(Climbing(), ReportFixture.Rig(), legs)!.Value;
        Assert.True(byClimb);
        Accuracy.AgreesTo(9, 0.05 + (0.95 * (0.2 + 1.8) / (2.4 + 1.8)), level); // by hand; idle is taken as 5 % of full thrust
        Assert.Equal((1.0, level, 0.05), (fraction[30], fraction[90], fraction[150]));
        Assert.Equal(double.NaN, fraction[60]);
    }

    [Fact]
    public void A_clutch_gives_no_thrust_at_idle_and_without_altitude_level_flight_is_the_usual_share()
    {
        FoundLeg[] legs = [Leg(PowerSetting.Full, 10, 50), Leg(PowerSetting.Cruise, 70, 110), Leg(PowerSetting.Idle, 130, 170)];
        Rig clutch = ReportFixture.Rig() with { Propeller = ReportFixture.Rig().Propeller with { Drive = PropellerDrive.Clutch } };
        Accuracy.AgreesTo(9, 2.0 / 4.2, SheetThrust.Of(Climbing(), clutch, legs)!.Value.Level);
        FlightLog flat = FlightLog.Create(Climbing().TimeSec, [new(ChannelRole.GroundSpeed, new double[180])]);
        (_, double level, bool byClimb) = SheetThrust.Of(flat, clutch, legs)!.Value;
        Assert.Equal((0.6, false), (level, byClimb));
    }

    [Fact]
    public void One_power_alone_says_nothing_and_a_logged_throttle_comes_first()
    {
        Assert.Null(SheetThrust.Of(Climbing(), ReportFixture.Rig(), [Leg(PowerSetting.Full, 10, 50)]));
        FoundLeg[] legs = [Leg(PowerSetting.Full, 10, 50), Leg(PowerSetting.Idle, 130, 170)];
        Propulsion propulsion = Propulsion.Of(ReportFixture.Rig());
        Assert.Equal(FindingCode.ThrustFromSheet, ThrustSource.Of(Climbing(), ReportFixture.Rig(), propulsion, legs).Findings[0].Code);
        FlightLog throttled = Climbing().WithChannel(ChannelRole.Throttle, [.. Enumerable.Repeat(0.5, 180)]);
        Assert.Equal(FindingCode.ThrottleTakenAsThrust, ThrustSource.Of(throttled, ReportFixture.Rig(), propulsion, legs).Findings[0].Code);
    }
}
