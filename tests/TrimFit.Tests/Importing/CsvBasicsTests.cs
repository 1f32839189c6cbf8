using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Importing;

public class CsvBasicsTests
{
    private const double Degree = Math.PI / 180;

    [Fact]
    public void Units_are_read_from_the_header_in_the_ways_people_write_them()
    {
        FlightImport import = Logs.Read("time_s,gyro_z_dps,Speed [km/h],Brake L (mm),Brake R (mm),rpm\n0.0,90,36,100,0,6000\n0.1,45,18,50,25,3000\n");
        Accuracy.AgreesTo(12, 90 * Degree, import.Flight[ChannelRole.GyroZ][0]);
        Accuracy.AgreesTo(12, 10, import.Flight[ChannelRole.GroundSpeed][0]);
        Accuracy.AgreesTo(12, 0.1, import.Flight[ChannelRole.BrakeLeft][0]);
        Accuracy.AgreesTo(12, 0.025, import.Flight[ChannelRole.BrakeRight][1]);
        Accuracy.AgreesTo(12, 100, import.Flight[ChannelRole.Rpm][0]); // 6000 rpm are 100 rev/s
        Assert.Equal(ControlUnit.Meter, import.Flight.BrakeUnit);
    }

    [Fact]
    public void A_decimal_comma_in_a_file_of_decimal_points_leaves_the_row_out_and_says_so()
    {
        FlightImport import = Logs.Read("time_s;gz [deg/s]\n0.0;1.25\n0.1;1,5\n0.2;1.75\n");
        Assert.Equal(2, import.Flight.Count);
        Assert.Equal([1.25 * Degree, 1.75 * Degree], import.Flight[ChannelRole.GyroZ].ToArray());
        Assert.Equal(3, import.Diagnostics.Files[0].RowsRead);
        Assert.Equal([new RowsLeftOut("number not with a decimal point in gz [deg/s]", 1, 3)], import.Diagnostics.Files[0].LeftOut);
        Assert.Contains(new Notice("rows_left_out", "log.csv(3, gz [deg/s]): \"1,5\" is not a number here: this file has decimal points elsewhere. Row left out."), import.Diagnostics.Warnings);
    }

    [Fact]
    public void Under_strict_a_row_left_out_is_a_refusal() => Assert.Equal(
        "log.csv(3, gz [deg/s]): found \"1,5\", expected a number with a decimal point, as elsewhere in this file. Correct the cell. Without --strict the row is left out.",
        Logs.Refusal("time_s;gz [deg/s]\n0.0;1.25\n0.1;1,5\n0.2;1.75\n", strict: true));

    [Fact]
    public void The_persons_word_overrules_name_and_header()
    {
        FlightImport import = Logs.Read("time_s,gyro_z_dps,other\n0,90,2\n1,45,1\n", new ColumnRule(ChannelRole.GyroZ, "other", "rad/s"));
        Assert.Equal([2.0, 1.0], import.Flight[ChannelRole.GyroZ].ToArray());
        Assert.Null(import.Column("gyro_z_dps").Role);
        Assert.Equal(new ColumnUse("other", ChannelRole.GyroZ, "rad/s", "told; unit told", 0), import.Column("other"));
    }
}
