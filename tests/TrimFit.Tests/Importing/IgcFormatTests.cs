using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Import;
using TrimFit.Import.Tracks;

namespace TrimFit.Tests.Importing;

public class IgcFormatTests
{
    private static readonly IgcLogFormat _igc = new();

    // Record and numbers: FAI/IGC Technical Specification for GNSS Flight Recorders, appendix A.
    private const string Fix = "B1101355206343N00006198WA0058700558";

    [Fact]
    public void A_fix_is_read_as_the_specification_writes_it()
    {
        LogTable table = _igc.Read("a.igc", "HFDTE160701\r\n" + Fix + "\r\n");
        Assert.Equal(new DateTimeOffset(2001, 7, 16, 11, 1, 35, TimeSpan.Zero), table.Origin!.Value.AddSeconds(table.TimeSec[0]));
        Accuracy.AgreesTo(12, 52.105716666666667 * Math.PI / 180, table.Columns[ChannelRole.Latitude][0]);
        Accuracy.AgreesTo(12, -0.1033 * Math.PI / 180, table.Columns[ChannelRole.Longitude][0]);
        Assert.Equal(558, table.Columns[ChannelRole.Altitude][0]);
        Assert.True(table.IsUtc);
    }

    [Fact]
    public void A_fix_south_and_east_without_a_valid_position_keeps_its_pressure_only()
    {
        LogTable table = _igc.Read("a.igc", "HFDTE160701\n" + Fix + "\nB1101365206343S00006198EV-001200000\n");
        Assert.True(double.IsNaN(table.Columns[ChannelRole.Latitude][1]));
        // ICAO standard atmosphere: 101325 Pa at 0 m; by its lapse formula 101469.2 Pa at -12 m.
        Accuracy.AgreesTo(6, 101_325 * Math.Pow(1 + (0.0065 * 12 / 288.15), 5.25588), table.Columns[ChannelRole.Pressure][1]);
        Assert.Equal([new Notice("igc_fix_not_valid", "a.igc: 1 of 2 fixes are marked V (no three-dimensional position); their positions are not used.")], table.Warnings);
    }

    [Fact]
    public void A_fix_south_and_east_has_the_signs_of_its_sides()
    {
        LogTable table = _igc.Read("a.igc", "HFDTE160701\nB1101365206343S00006198EA-001200100\n");
        Accuracy.AgreesTo(12, -52.105716666666667 * Math.PI / 180, table.Columns[ChannelRole.Latitude][0]);
        Accuracy.AgreesTo(12, 0.1033 * Math.PI / 180, table.Columns[ChannelRole.Longitude][0]);
    }

    [Theory]
    [InlineData("HFDTE160701")]
    [InlineData("HFDTEDATE:160701,01")]
    [InlineData("HFDTEDATE: 160701")]
    public void Both_forms_of_the_date_are_read(string header) =>
        Assert.Equal(new DateTimeOffset(2001, 7, 16, 0, 0, 0, TimeSpan.Zero), _igc.Read("a.igc", header + "\n" + Fix).Origin);

    [Fact]
    public void The_I_record_places_engine_noise_as_a_fraction_of_999()
    {
        // I record form: specification's example I023638FXA3940SIU, here with ENL instead of SIU.
        LogTable table = _igc.Read("a.igc", "HFDTE160701\nI023638FXA3941ENL\n" + Fix + "035450\n" + Fix.Replace("110135", "110136", StringComparison.Ordinal) + "035999\n");
        Assert.Equal([450 / 999.0, 1], table.Columns[ChannelRole.EngineNoise]);
        Assert.Equal(new ColumnUse("FXA", null, "", "", 0), table.File.Columns[4]);
        Assert.Equal(new ColumnUse("ENL", ChannelRole.EngineNoise, "of 999", "IGC I record", 0), table.File.Columns[5]);
    }

    [Fact]
    public void Further_decimals_of_position_and_time_are_added()
    {
        LogTable table = _igc.Read("a.igc", "HFDTE160701\nI033637LAD3839LOD4041TDS\n" + Fix + "501225\n");
        Accuracy.AgreesTo(13, (52 + (6.3435 / 60)) * Math.PI / 180, table.Columns[ChannelRole.Latitude][0]);
        Accuracy.AgreesTo(13, -(6.19812 / 60) * Math.PI / 180, table.Columns[ChannelRole.Longitude][0]);
        Accuracy.AgreesTo(13, (11 * 3600) + 60 + 35.25, table.TimeSec[0]);
    }

    [Fact]
    public void Time_goes_on_over_midnight()
    {
        LogTable table = _igc.Read("a.igc", "HFDTE160701\n" + Fix.Replace("110135", "235959", StringComparison.Ordinal) + "\n" + Fix.Replace("110135", "000001", StringComparison.Ordinal));
        Assert.Equal([86_399, 86_401], table.TimeSec);
    }

    [Fact]
    public void Without_a_date_the_times_of_day_are_used_and_that_is_said()
    {
        LogTable table = _igc.Read("a.igc", Fix);
        Assert.Equal(ClockKind.TimeOfDay, table.Clock);
        Assert.Null(table.Origin);
        Assert.Equal([new Notice("igc_no_date", "a.igc gives no date (HFDTE line); only its times of day are used.")], table.Warnings);
    }

    [Fact]
    public void Rows_that_cannot_be_used_are_counted_by_reason_with_their_first_line()
    {
        LogTable table = _igc.Read("a.igc", string.Join('\n', "AXYZ", "HFDTE160701", Fix, Fix, Fix.Replace("110135", "110130", StringComparison.Ordinal), "B110137", Fix.Replace("110135", "116135", StringComparison.Ordinal),
            Fix.Replace("N", "X", StringComparison.Ordinal), Fix.Replace("00587", "0o587", StringComparison.Ordinal), "\0\0\0", Fix.Replace("110135", "110140", StringComparison.Ordinal)));
        Assert.Equal(9, table.File.RowsRead);
        Assert.Equal(2, table.TimeSec.Length);
        Assert.Equal([new("time repeats", 1, 4), new("time runs back", 1, 5), new("fix cut short", 1, 6), new("fix without a time", 1, 7), new("fix with a position that is none", 1, 8),
            new("fix with an altitude that is none", 1, 9), new RowsLeftOut("not an IGC record", 1, 10)], table.File.LeftOut);
    }

    [Fact]
    public void Under_strict_a_row_left_out_is_an_error() =>
        Assert.Equal("a.igc(3): found a row that must be left out (fix cut short), expected every row to be usable under --strict. Correct the file or run without --strict.",
            _igc.Refusal("a.igc", "HFDTE160701\n" + Fix + "\nB1101", new() { Strict = true }));

    [Theory]
    [InlineData("HFDTE160701\nB1101\n", "a.igc: found an IGC file without a usable fix, expected lines such as B1101355206343N00006198WA0058700558. Copy the file from the recorder again; it may have been cut short.")]
    [InlineData("HFDTE160701\n", "a.igc: found an IGC file without a fix, expected lines such as B1101355206343N00006198WA0058700558. Copy the file from the recorder again; it may have been cut short.")]
    public void A_file_without_a_fix_gives_one_clear_message(string text, string message) => Assert.Equal(message, _igc.Refusal("a.igc", text));

    [Fact]
    public void Names_and_registrations_reach_no_result_and_no_message()
    {
        LogTable table = _igc.Read("a.igc", "AXYZSECRETDEVICE\nHFPLTPILOTINCHARGE:Secret Person\nHFGIDGLIDERID:SECRET\nLXYZSecret note\nHFDTE160701\n" + Fix + "\nB11\n");
        string everything = string.Join('\n', table.Warnings) + table.File + string.Join('\n', table.File.Columns) + string.Join('\n', table.File.LeftOut);
        Assert.DoesNotContain("secret", everything, StringComparison.OrdinalIgnoreCase);
    }

    [Fact]
    public void A_recorders_speed_in_the_wrong_unit_is_set_aside_and_said()
    {
        var text = new StringBuilder("HFDTE160701\nI013638GSP\n");
        for (int i = 0; i < 60; i++) // 0.006 minutes of latitude a second: 11.1 m/s = 40 km/h, written as knots: 22
            text.Append(FormattableString.Invariant($"B1101{i:00}52{6343 + (6 * i):00000}N00006198WA0058700558022\n"));
        LogTable table = _igc.Read("a.igc", text.ToString());
        Assert.False(table.Columns.ContainsKey(ChannelRole.GroundSpeed));
        Notice notice = Assert.Single(table.Warnings);
        Assert.Equal("a.igc: the recorder's ground speed (GSP) is 0.55 times the speed between its positions; it is not used.", notice.Message);
    }

    [Theory]
    [InlineData("AXYZ\r\nHFDTE160701\r\n", true)]
    [InlineData(Fix, true)]
    [InlineData("time,Brake L (mm)\n1,2\n", false)]
    [InlineData("$GPRMC,123519,A", false)]
    [InlineData("", false)]
    public void Igc_is_recognised_by_its_records(string head, bool expected) => Assert.Equal(expected, _igc.Recognises(head));

    [Fact]
    public void No_damage_gives_another_exception_or_loses_a_row_unsaid()
    {
        var text = new StringBuilder("AXYZ\r\nHFDTE160701\r\nI023638FXA3941ENL\r\n");
        for (int i = 0; i < 50; i++)
            text.Append(FormattableString.Invariant($"B1101{i:00}52{6343 + (6 * i):00000}N00006198WA0058700558035{10 * i:000}\r\n"));
        (int read, int refused) = ImportText.Damage(_igc, "a.igc", Encoding.Latin1.GetBytes(text.ToString()), 1000, 7);
        Assert.True(read > 500 && refused > 5, $"{read} read, {refused} refused");
    }

    [Fact]
    public void A_real_recording_is_read_completely()
    {
        string? folder = RepositoryRoot.SharedFolder("real-logs");
        if (folder is null)
            Assert.Skip("The folder of real logs is not beside the repository.");
        LogTable table = _igc.Read(LogSource.FromFile(Path.Combine(folder, "napret.igc")), new());
        // Counts from the samples' README: 5380 fixes, 1 Hz, 5379 s, 3 April 2016.
        Assert.Equal(5380, table.File.RowsRead);
        Assert.Empty(table.File.LeftOut);
        Assert.Equal(5379, table.TimeSec[^1] - table.TimeSec[0]);
        Assert.Equal(new DateTimeOffset(2016, 4, 3, 0, 0, 0, TimeSpan.Zero), table.Origin);
    }
}
