using CsCheck;
using TrimFit.Core.Turns;

namespace TrimFit.Tests.Turns;

public class ReferenceTurnGeometryTests
{
    private const double Knot = 1852.0 / 3600; // m/s, exact
    private const double Foot = 0.3048; // m, exact

    [Theory] // FAA-H-8083-25, chapter 5, "Rate of Turn" and "Radius of Turn": bank, knots, deg/s, ft. The handbook's constants 1091 and 11.26 are rounded: 0.4 %
    [InlineData(30, 120, 5.25, 2215)]
    [InlineData(30, 240, 2.62, 8861)]
    public void Handbook_turns_come_out_within_the_handbooks_rounding(double bank, double knots, double rate, double radius)
    {
        double b = double.DegreesToRadians(bank), v = knots * Knot;
        Assert.InRange(double.RadiansToDegrees(TurnGeometry.RateRadPerSec(b, v)) / rate, 0.996, 1.004);
        Assert.InRange(TurnGeometry.RadiusM(b, v)!.Value / Foot / radius, 0.996, 1.004);
    }

    [Fact]
    public void Exact_units_give_the_exact_rate_and_radius()
    {
        // By arithmetic with g = 9.80665: 1092.2067 tan 30°/120 = 5.25488 deg/s; 120²/(11.29428 tan 30°) = 2208.33 ft.
        double bank = double.DegreesToRadians(30);
        Accuracy.AgreesTo(5.5, 5.25488, double.RadiansToDegrees(TurnGeometry.RateRadPerSec(bank, 120 * Knot)));
        Accuracy.AgreesTo(5.5, 2208.33, TurnGeometry.RadiusM(bank, 120 * Knot)!.Value / Foot);
    }

    [Fact]
    public void The_same_rate_at_twice_the_speed_needs_49_degrees() // FAA-H-8083-25, chapter 5, as above
    {
        double bank = double.RadiansToDegrees(TurnGeometry.BankRad(double.DegreesToRadians(5.25), 240 * Knot));
        Assert.Equal(49, Math.Round(bank));
    }

    [Fact]
    public void A_standard_rate_turn_banks_as_the_rule_says()
    {
        // Encyclopedia article "Standard rate turn": φ = atan(V[kt]/364) at 3 deg/s, 18.2426° at 120 kt; constant 364.069 with exact units.
        double bank = double.RadiansToDegrees(TurnGeometry.BankRad(double.DegreesToRadians(3), 120 * Knot));
        Accuracy.AgreesTo(5, 18.2426, bank);
        Assert.InRange(bank, 18, 19.1); // rule of thumb V/10 + 7 = 19
    }

    [Fact]
    public void A_paraglider_at_20_degrees_turns_in_11_and_a_half_seconds_on_12_meters()
    {
        // Pagen, The Art of Paragliding (2001): 20° bank, radius about 12 m, a full turn in about 11.5 s: 6.556 m/s along the circle.
        double speed = 2 * Math.PI * 12 / 11.5;
        double bank = double.DegreesToRadians(20);
        Assert.InRange(TurnGeometry.RadiusM(bank, speed)!.Value / 12, 0.98, 1.02);
        Assert.InRange(2 * Math.PI / TurnGeometry.RateRadPerSec(bank, speed) / 11.5, 0.98, 1.02);
    }

    [Theory] // Pilot's Handbook load factor chart; exact: 2/√3, √2, 2
    [InlineData(30, 1.1547005383792515)]
    [InlineData(45, 1.4142135623730951)]
    [InlineData(60, 2.0)]
    public void Load_factors_are_those_of_the_chart(double bank, double factor)
    {
        Accuracy.AgreesTo(14, factor, TurnGeometry.LoadFactor(double.DegreesToRadians(bank)));
        Accuracy.AgreesTo(14, factor, TurnGeometry.LoadFactor(-double.DegreesToRadians(bank)));
    }

    [Fact]
    public void Left_and_right_are_treated_alike_and_speed_is_rate_times_radius() => Gen.Select(Gen.Double[0.001, 1.5], Gen.Double[3, 60]).Sample((bank, speed) =>
    {
        double right = TurnGeometry.RateRadPerSec(bank, speed);
        Assert.True(right > 0);
        Assert.Equal(-right, TurnGeometry.RateRadPerSec(-bank, speed));
        Accuracy.AgreesTo(12, speed, right * TurnGeometry.RadiusM(-bank, speed)!.Value);
        Accuracy.AgreesTo(12, bank, TurnGeometry.BankRad(right, speed));
    });

    [Fact]
    public void Straight_flight_has_no_radius()
    {
        Assert.Null(TurnGeometry.RadiusM(0, 10));
        Assert.Equal(0, TurnGeometry.RateRadPerSec(0, 10));
    }
}
