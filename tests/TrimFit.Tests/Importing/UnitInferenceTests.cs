using System.Globalization;
using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Importing;

/// <summary>Units that nobody wrote are taken from the data only where these decide, and then it is said.</summary>
public class UnitInferenceTests
{
    private const double Knot = 1852 / 3600.0, Mile = 1609.344 / 3600.0, Degree = Math.PI / 180;

    /// <summary>A flight at 10 m/s over ground that turns right at 6 deg/s for a while, straight, then left: 1 Hz positions, 5 Hz rows.</summary>
    private static string Flight(string names, Func<double, double, double, string> cells, bool positions = true)
    {
        var text = new StringBuilder($"time_s,{(positions ? "lat,lon," : "")}{names}\n");
        double north = 0, east = 0, course = 0;
        for (int i = 0; i < 1000; i++)
        {
            double t = i * 0.2;
            double rate = t < 80 ? 6 * Degree : t < 110 ? 0 : -6 * Degree;
            if (positions)
            {
                double latitude = 45 + north / 6371008.8 / Degree, longitude = 7 + east / 6371008.8 / Math.Cos(45 * Degree) / Degree;
                text.Append(CultureInfo.InvariantCulture, $"{t:F1},{(i % 5 == 0 ? latitude.ToString("F7", CultureInfo.InvariantCulture) : "")},{(i % 5 == 0 ? longitude.ToString("F7", CultureInfo.InvariantCulture) : "")},{cells(t, rate, course)}\n");
            }
            else
            {
                text.Append(CultureInfo.InvariantCulture, $"{t:F1},{cells(t, rate, course)}\n");
            }
            (double sin, double cos) = Math.SinCos(course + rate * 0.1);
            north += 2 * cos;
            east += 2 * sin;
            course += rate * 0.2;
        }
        return text.ToString();
    }

    private static string Number(double value) => value.ToString("F4", CultureInfo.InvariantCulture);

    [Theory]
    [InlineData("m/s", 1)]
    [InlineData("km/h", 1 / 3.6)]
    [InlineData("kt", Knot)]
    [InlineData("mph", Mile)]
    public void A_speed_without_a_unit_is_compared_with_the_positions(string unit, double metersPerSecond)
    {
        // The speed over ground varies by a fifth, so that it can be compared; the positions move at 10 m/s times the same.
        var text = new StringBuilder("time_s,lat,lon,speed\n");
        double north = 0;
        for (int i = 0; i < 300; i++)
        {
            double speed = 10 + 2 * Math.Sin(i / 20.0);
            text.Append(CultureInfo.InvariantCulture, $"{i},{45 + north / 6371008.8 / Degree:F7},7,{speed / metersPerSecond:F3}\n");
            north += speed;
        }
        FlightImport import = Logs.Read(text.ToString());
        Assert.Equal(unit, import.Column("speed").Unit);
        Assert.Equal("name; unit inferred from the data", import.Column("speed").Basis);
        Assert.Equal(10, import.Flight[ChannelRole.GroundSpeed][0], 0.001);
        Assert.Contains(import.Diagnostics.Warnings, w => w.Code == "unit_inferred" && w.Message.StartsWith($"log.csv: column \"speed\" (ground_speed) has no unit; {unit} is taken, since it is ", StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("deg/s", Degree, 1)]
    [InlineData("rad/s", 1, 1)]
    [InlineData("deg/s", Degree, -1)] // upside down: the unit is told all the same, the sign is another question
    [InlineData("rad/s", 1, -1)]
    public void A_yaw_rate_without_a_unit_is_compared_with_the_turning_of_the_course(string unit, double factor, int sign)
    {
        FlightImport import = Logs.Read(Flight("gyro_z", (_, rate, _) => Number(sign * rate / factor)));
        Assert.Equal(unit, import.Column("gyro_z").Unit);
        Assert.Equal(sign * 6 * Degree, import.Flight[ChannelRole.GyroZ][100], 1e-4);
    }

    [Fact]
    public void A_yaw_rate_without_a_unit_and_without_a_course_is_asked_for()
    {
        FlightImport import = Logs.Read(Flight("gyro_z,rpm", (t, rate, _) => $"{Number(rate)},{Number(3000 + t)}", positions: false));
        Assert.Null(import.Column("gyro_z").Role);
        Assert.Equal([new Notice("unit_unknown", "log.csv: column \"gyro_z\" (gyro_z) has no unit and the data do not decide it; not used. Say it: --column gyro_z=gyro_z:deg/s (or another of deg/s, rad/s).")],
            import.Diagnostics.Warnings);
    }

    [Fact]
    public void A_yaw_rate_too_large_for_radians_is_in_degrees()
    {
        FlightImport import = Logs.Read(Flight("gyro_z,rpm", (t, rate, _) => $"{Number(rate / Degree * 4)},{Number(3000 + t)}", positions: false));
        Assert.Equal("deg/s", import.Column("gyro_z").Unit);
        Assert.Contains(new Notice("unit_inferred", "log.csv: column \"gyro_z\" (gyro_z) has no unit; deg/s is taken, since its numbers are too large for radians per second. To say another: --column gyro_z=gyro_z:UNIT."),
            import.Diagnostics.Warnings);
    }

    public static TheoryData<string, double, double, string, double> Throttles => new()
    {
        { "fraction", 0.0, 1.0, "0-1", 0.5 },
        { "percent", 0, 100, "%", 0.5 },
        { "stick", -1024, 1024, "-1024..1024", 0.5 },
        { "stick in percent", -100, 100, "-100..100", 0.5 },
        { "stick of one", -1, 1, "-1..1", 0.5 },
        { "servo pulse", 1000, 2000, "1000..2000", 0.5 },
    };

    [Theory]
    [MemberData(nameof(Throttles))]
    public void A_throttle_without_a_unit_is_told_by_its_range(string kind, double low, double high, string unit, double middle)
    {
        Assert.NotEmpty(kind);
        FlightImport import = Logs.Read(Flight("throttle,rpm", (t, _, _) => $"{Number(low + (high - low) * Math.Min(1, t / 100))},3000", positions: false));
        Assert.Equal(unit, import.Column("throttle").Unit);
        Assert.Equal(middle, import.Flight[ChannelRole.Throttle][250], 1e-6); // row 250 is at 50 s, half-way
        Assert.Equal(1, import.Flight[ChannelRole.Throttle][999], 1e-9);
    }

    [Fact]
    public void A_throttle_in_counts_of_a_sensor_is_asked_for_and_can_be_told_as_a_range()
    {
        string text = Flight("throttle,rpm", (t, _, _) => $"{Number(Math.Round(180 + t * 3))},3000", positions: false);
        Assert.Null(Logs.Read(text).Column("throttle").Role);
        FlightImport told = Logs.Read(text, new ColumnRule(ChannelRole.Throttle, "throttle", "180..780"));
        Assert.Equal(0.25, told.Flight[ChannelRole.Throttle][250], 1e-9); // 330 of 180 to 780
    }

    [Theory]
    [InlineData("m/s2", 9.80665)]
    [InlineData("g", 1)]
    [InlineData("mg", 1000)]
    public void Accelerations_without_a_unit_are_told_by_gravity(string unit, double gravity)
    {
        FlightImport import = Logs.Read(Flight("acc_x,acc_y,acc_z", (_, _, _) => $"{Number(0.6 * gravity)},0.0,{Number(0.8 * gravity)}", positions: false));
        Assert.Equal(unit, import.Column("acc_x").Unit);
        Assert.Equal(unit, import.Column("acc_y").Unit);
        Assert.Equal(unit, import.Column("acc_z").Unit);
        Assert.Equal(0.8 * 9.80665, import.Flight[ChannelRole.AccelerationZ][7], 1e-3);
    }

    [Theory]
    [InlineData("Pa", 1)]
    [InlineData("hPa", 100)]
    [InlineData("kPa", 1000)]
    public void A_pressure_without_a_unit_is_that_of_the_air(string unit, double pascals)
    {
        FlightImport import = Logs.Read(Flight("pressure", (t, _, _) => Number((95000 - t) / pascals), positions: false));
        Assert.Equal(unit, import.Column("pressure").Unit);
        Assert.Equal(95000, import.Flight[ChannelRole.Pressure][0], 0.1);
    }

    [Theory]
    [InlineData("deg", 1 / Degree)]
    [InlineData("rad", 1)]
    public void A_course_without_a_unit_is_told_by_its_full_turn(string unit, double perRadian)
    {
        FlightImport import = Logs.Read(Flight("course", (_, _, course) => Number((course % (2 * Math.PI) + 2 * Math.PI) % (2 * Math.PI) * perRadian), positions: false));
        Assert.Equal(unit, import.Column("course").Unit);
        Assert.Equal(60 * Degree, import.Flight[ChannelRole.GroundCourse][50], 1e-3); // 10 s at 6 deg/s
    }

    [Fact]
    public void Brakes_without_a_unit_stay_as_they_are_unless_they_are_fractions()
    {
        FlightImport counts = Logs.Read(Flight("brake_left,brake_right", (t, _, _) => $"{Number(t % 40)},0", positions: false));
        Assert.Equal(ControlUnit.Count, counts.Flight.BrakeUnit);
        Assert.Equal(10, counts.Flight[ChannelRole.BrakeLeft][50], 1e-9);
        Assert.Contains(new Notice("control_without_unit", "log.csv: column \"brake_left\" has no unit; its numbers are used as they are. To say one: --column brake_left=brake_left:% or :mm."), counts.Diagnostics.Warnings);
        FlightImport fractions = Logs.Read(Flight("brake_left,brake_right", (t, _, _) => $"{Number(t % 40 / 40)},0.5", positions: false));
        Assert.Equal(ControlUnit.Fraction, fractions.Flight.BrakeUnit);
    }

    [Fact]
    public void Positions_in_ten_millionths_of_a_degree_are_told_by_their_size()
    {
        FlightImport import = Logs.Read("time_s,lat,lon,rpm\n0,451234567,71234567,1\n1,451234577,71234567,1\n2,451234587,71234567,1\n");
        Assert.Equal("1e-7 deg", import.Column("lat").Unit);
        Accuracy.AgreesTo(12, 45.1234567 * Degree, import.Flight[ChannelRole.Latitude][0]);
        Accuracy.AgreesTo(12, 7.1234567 * Degree, import.Flight[ChannelRole.Longitude][0]);
    }

    [Fact]
    public void Positions_at_zero_zero_are_no_fix()
    {
        FlightImport import = Logs.Read("time_s,lat,lon,rpm\n0,0,0,1\n1,45.1,7.1,1\n2,45.1,7.1,1\n");
        Assert.True(double.IsNaN(import.Flight[ChannelRole.Latitude][0]));
        Assert.Contains(new Notice("no_fix", "log.csv: 1 positions are 0, 0, which receivers write without a fix; they count as missing."), import.Diagnostics.Warnings);
    }

    [Fact]
    public void A_number_for_nothing_is_one_only_far_outside_the_rest()
    {
        FlightImport import = Logs.Read("time_s,rpm,altitude_m\n0,9999,300\n1,9000,9999\n2,9500,301\n");
        Assert.Equal(9999 / 60.0, import.Flight[ChannelRole.Rpm][0], 1e-9); // among 9000 and 9500
        Assert.True(double.IsNaN(import.Flight[ChannelRole.Altitude][1]));
        Assert.Equal(1, import.Column("altitude_m").Missing);
        Assert.Contains(new Notice("no_value_number", "log.csv: column \"altitude_m\": 9999 stands for no value in 1 rows; it lies far outside everything else in the column."), import.Diagnostics.Warnings);
    }

    [Fact]
    public void A_name_with_a_unit_of_another_kind_is_asked_for_unless_the_unit_tells_the_role()
    {
        FlightImport import = Logs.Read("time_s,yaw (deg/s),brake left (bar),alt (sheep)\n0,1,2,3\n1,1,2,3\n");
        Assert.Equal(ChannelRole.YawRate, import.Column("yaw (deg/s)").Role);
        Assert.Equal(
        [
            new("unit_does_not_fit", "log.csv: column \"brake left (bar)\" has the name of brake_left, but bar is no unit of it; not used. To use it: --column brake_left=brake left:UNIT."),
            new("unit_not_known", "log.csv: column \"alt (sheep)\" has the name of altitude, but \"sheep\" is no unit known here; not used. To use it: --column altitude=alt:UNIT."),
        ], import.Diagnostics.Warnings);
    }

    [Fact]
    public void Several_columns_of_one_role_are_named_with_the_one_that_is_used()
    {
        FlightImport import = Logs.Read("time_s,GPS altitude (m),alt (m),rpm\n0,100,200,1\n1,100,200,1\n");
        Assert.Equal(200, import.Flight[ChannelRole.Altitude][0]);
        Assert.Equal([new Notice("several_columns", "log.csv: \"alt (m)\", \"GPS altitude (m)\" all have the name of altitude; \"alt (m)\" is used. To choose: --column altitude=NAME.")], import.Diagnostics.Warnings);
    }

    [Theory]
    [InlineData("de-DE")]
    [InlineData("tr-TR")]
    [InlineData("ar-SA")]
    public void The_machines_culture_changes_nothing(string culture)
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            CultureInfo.CurrentCulture = CultureInfo.InvariantCulture;
            string text = Flight("GYRO_Z,SPEED,Titel", (t, rate, _) => $"{Number(rate)},{Number(36 + t / 100)},x");
            FlightImport plain = Logs.Read(text);
            CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo(culture);
            FlightImport here = Logs.Read(text);
            Assert.Equal(plain.Diagnostics.Files[0].Columns, here.Diagnostics.Files[0].Columns);
            Assert.Equal(plain.Diagnostics.Warnings, here.Diagnostics.Warnings);
            Assert.Equal(plain.Flight[ChannelRole.GyroZ].ToArray(), here.Flight[ChannelRole.GyroZ].ToArray());
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    [Theory]
    [InlineData("yaw rate [deg/s]", "deg/s")]
    [InlineData("yaw_rate (°/s)", "deg/s")]
    [InlineData("YawRate{rad/s}", "rad/s")]
    [InlineData("yaw rate, deg/s", "deg/s")]
    [InlineData("yaw_rate_dps", "deg/s")]
    [InlineData("yaw_rate_deg_s", "deg/s")]
    [InlineData("yawRateRadS", "rad/s")]
    [InlineData("Yaw Rate in deg/s", "deg/s")]
    [InlineData("Gierrate [Grad/s]", "deg/s")]
    public void The_unit_of_a_header_is_found_however_it_is_attached(string header, string unit)
    {
        FlightImport import = Logs.Read($"time_s;{header}\n0;1.5\n1;2.5\n");
        Assert.Equal(unit, import.Column(header).Unit);
        Assert.Equal(ChannelRole.YawRate, import.Column(header).Role);
    }
}
