using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;

namespace TrimFit.Tests.Importing;

/// <summary>Two logs of ordinary loggers. Expected facts come from the README beside them and from counting in the files with a separate script.</summary>
public class RealCsvLogTests
{
    private const double Degree = Math.PI / 180;

    [Fact]
    public void A_telemetry_log_is_read_completely_with_its_rate_and_pauses()
    {
        FlightImport import = FlightReader.Read([LogSource.FromFile(Logs.RealLog("CRSF-2021-08-29.csv"))]);
        InputFile file = import.Diagnostics.Files[0];
        Assert.Equal(3686, file.RowsRead); // README: 3686 rows x 37 columns
        Assert.Equal(37, file.Columns.Length);
        Assert.Empty(file.LeftOut);
        Assert.Equal(3686, import.Flight.Count);
        Assert.Equal("CSV, comma, decimal point, UTF-8", file.Format);
        SamplingSummary sampling = import.Diagnostics.Sampling;
        Assert.Equal(new DateTimeOffset(2021, 8, 29, 15, 42, 59, 200, TimeSpan.Zero), sampling.Start);
        Accuracy.AgreesTo(9, 2123.28, sampling.DurationSec); // by script: last stamp minus first
        Accuracy.AgreesTo(9, 2, sampling.RateHz);            // README: usually 0.5 s steps
        Assert.Equal([2.66, 9.51, 46.93, 219.59], sampling.Gaps.Select(g => Math.Round(g.DurationSec, 6))); // by script; README: largest 219.6
    }

    [Fact]
    public void A_telemetry_log_tells_roles_and_units_by_its_header()
    {
        FlightImport import = FlightReader.Read([LogSource.FromFile(Logs.RealLog("CRSF-2021-08-29.csv"))]);
        Assert.Equal(
            ["Date: date", "Time: time", "Roll(rad): roll rad", "Yaw(rad): heading rad", "RxBt(V): voltage V", "Curr(A): current A", "GPS: position deg",
             "GSpd(kmh): ground_speed km/h", "Hdg(@): ground_course deg", "Alt(m): altitude m", "Thr: throttle -1024..1024"],
            import.Diagnostics.Files[0].Columns.Where(c => c.Role is not null).Select(c => $"{c.Name}: {ChannelRoles.NameOf(c.Role!.Value)} {c.Unit}".TrimEnd()));
        Accuracy.AgreesTo(12, 31.166881 * Degree, import.Flight[ChannelRole.Latitude][0]);   // first row of the file
        Accuracy.AgreesTo(12, 121.356245 * Degree, import.Flight[ChannelRole.Longitude][0]);
        Accuracy.AgreesTo(12, 84.9 / 3.6, Max(import.Flight[ChannelRole.GroundSpeed]));      // largest GSpd, by script
        Accuracy.AgreesTo(12, (532 + 1024) / 2048.0, Max(import.Flight[ChannelRole.Throttle])); // largest Thr, by script
    }

    [Fact]
    public void A_course_that_ran_over_in_16_bits_is_put_right_as_its_readme_says()
    {
        FlightImport import = FlightReader.Read([LogSource.FromFile(Logs.RealLog("CRSF-2021-08-29.csv"))]);
        int rows = 0, negative = 0, line = 0;
        foreach (string text in File.ReadLines(Logs.RealLog("CRSF-2021-08-29.csv")))
        {
            if (line++ == 0)
                continue;
            double h = double.Parse(text.Split(',')[22], System.Globalization.CultureInfo.InvariantCulture);
            double course = (h < 0 ? h + 65.536 : h) * 10; // README: the wrapped 16-bit number
            Assert.Equal(course * Degree, import.Flight[ChannelRole.GroundCourse][rows++], 1e-12);
            negative += h < 0 ? 1 : 0;
        }
        Assert.True(negative > 100, "the log must hold numbers that ran over");
    }

    [Fact]
    public void A_log_without_units_asks_for_those_it_cannot_tell()
    {
        FlightImport import = FlightReader.Read([LogSource.FromFile(Logs.RealLog("kite-v3-20191008_0019.csv"))]);
        Assert.Equal(1308, import.Diagnostics.Files[0].RowsRead); // README: 1308 rows x 51 columns, 10 Hz, 130.7 s
        Assert.Equal(51, import.Diagnostics.Files[0].Columns.Length);
        Assert.Equal(1308, import.Flight.Count);
        Accuracy.AgreesTo(9, 130.7, import.Diagnostics.Sampling.DurationSec);
        Accuracy.AgreesTo(9, 10, import.Diagnostics.Sampling.RateHz);
        Assert.Empty(import.Diagnostics.Sampling.Gaps);
        Assert.Contains(new Notice("unit_unknown", "kite-v3-20191008_0019.csv: column \"kite_1_yaw_rate\" (yaw_rate) has no unit and the data do not decide it; not used. "
            + "Say it: --column yaw_rate=kite_1_yaw_rate:deg/s (or another of deg/s, rad/s)."), import.Diagnostics.Warnings);
    }

    [Fact]
    public void Told_columns_and_the_turning_velocity_decide_what_a_log_without_units_means()
    {
        FlightImport import = FlightReader.Read([LogSource.FromFile(Logs.RealLog("kite-v3-20191008_0019.csv"))], new ImportOptions
        {
            Columns =
            [
                new ColumnRule(ChannelRole.VelocityNorth, "kite_1_vx", "m/s"),
                new ColumnRule(ChannelRole.VelocityEast, "kite_1_vy", "m/s"),
                new ColumnRule(ChannelRole.BrakeDifference, "kite_actual_steering", "%"),
                new ColumnRule(ChannelRole.Airspeed, "airspeed_apparent_windspeed", "m/s"),
                new ColumnRule(ChannelRole.Heading, "kite_1_yaw", "deg"),
            ],
        });
        Assert.Equal("rad/s", import.Column("kite_1_yaw_rate").Unit); // README: rad/s, though the angles beside it are degrees
        Assert.Equal("name; unit inferred from the data", import.Column("kite_1_yaw_rate").Basis);
        Assert.Equal(15, import.Column("kite_1_yaw_rate").Missing);   // README: 15 rows with the literal nan
        Accuracy.AgreesTo(12, 0.93687, import.Flight[ChannelRole.YawRate][0]);
        Accuracy.AgreesTo(12, -0.34968414306640604, import.Flight[ChannelRole.BrakeDifference][0]);
        Assert.Equal(ControlUnit.Fraction, import.Flight.BrakeUnit);
    }

    private static double Max(ReadOnlySpan<double> values)
    {
        double max = double.NegativeInfinity;
        foreach (double v in values)
            max = Math.Max(max, v);
        return max;
    }
}
