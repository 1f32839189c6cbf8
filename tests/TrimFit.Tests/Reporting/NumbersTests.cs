using System.Globalization;
using TrimFit.Core.Rigging;
using TrimFit.Reporting;
using TrimFit.Reporting.Wording;

namespace TrimFit.Tests.Reporting;

public class NumbersTests
{
    [Fact]
    public void Imperial_units_follow_the_international_agreement_of_1959()
    {
        var imperial = new Numbers(new() { Units = UnitSystem.Imperial });
        Assert.Equal("1.00 in", imperial.Length(0.0254)); // 25.4 mm, exact
        Assert.Equal("10.0 lb", imperial.Mass(4.5359237)); // 0.45359237 kg, exact
        Assert.Equal("100 lbf", imperial.Force(444.82216152605)); // 4.4482216152605 N, exact
        Assert.Equal("10.0 mph", imperial.Speed(4.4704)); // 0.44704 m/s, exact
        Assert.Equal("10.0 lbf ft", imperial.Moment(13.5581794833140)); // 1.3558179483314004 N m
        Assert.Equal("1.27", imperial.SensitivityNumber(double.DegreesToRadians(50))); // 50 deg/s per m over 39.37 in
    }

    [Fact]
    public void A_culture_changes_the_decimal_mark_and_nothing_else()
    {
        var german = new Numbers(new() { Culture = CultureInfo.GetCultureInfo("de-DE") });
        Assert.Equal("-2,1 deg/s", german.Rate(double.DegreesToRadians(-2.1)));
        Assert.Equal("1234567,0", german.Plain(1234567, 1));
        Assert.Equal("0,5", german.Tick(0.5));
        var arabic = new Numbers(new() { Culture = CultureInfo.GetCultureInfo("ar-SA") });
        Assert.Equal("-", arabic.Plain(-2, 0)[..1]); // no direction mark before the sign: columns would break
    }

    [Theory]
    [InlineData(-0.04, "0.0")]
    [InlineData(-0.05, "-0.1")]
    [InlineData(0.05, "0.1")]
    [InlineData(2.25, "2.3")]
    public void Small_negative_numbers_never_read_as_minus_zero(double value, string expected) => Assert.Equal(expected, Numbers.Invariant.Plain(value, 1));

    [Theory]
    [InlineData(0.0717654, 3, "0.0718")]
    [InlineData(2980, 3, "2980")]
    [InlineData(10, 3, "10.0")]
    [InlineData(-0.00606, 2, "-0.0061")]
    [InlineData(3.56e-9, 2, "3.6E-09")]
    [InlineData(0, 3, "0")]
    public void Significant_digits_hold_over_all_sizes(double value, int digits, string expected) => Assert.Equal(expected, Numbers.Invariant.Significant(value, digits));

    [Theory]
    [InlineData(3.25, "3.3 s")]
    [InlineData(42, "42 s")]
    [InlineData(661, "11 min 1 s")]
    public void Durations_read_as_a_pilot_says_them(double sec, string expected) => Assert.Equal(expected, Numbers.Invariant.Duration(sec));

    [Fact]
    public void A_travel_is_shown_in_the_unit_its_part_is_set_in()
    {
        Assert.Equal("14 mm", Numbers.Invariant.Travel(-0.014, TravelUnit.Meter));
        Assert.Equal("2.0 deg", Numbers.Invariant.Travel(double.DegreesToRadians(2), TravelUnit.Radian));
        Assert.Equal("1.5 kg", Numbers.Invariant.Travel(1.5, TravelUnit.Kilogram));
    }
}
