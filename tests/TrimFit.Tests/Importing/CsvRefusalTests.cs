using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;

namespace TrimFit.Tests.Importing;

/// <summary>A file that cannot be read gives one message: where, what was found, what was expected, what to do.</summary>
public class CsvRefusalTests
{
    private const string Good = "time_s,yaw_rate_dps\n0,1\n1,2\n2,3\n";

    public static TheoryData<string, string, string> Malformed => new()
    {
        { "empty", "", "log.csv: found an empty file, expected a flight log. Copy the log from the logger again." },
        { "blank lines only", "\n \n\r\n", "log.csv: found an empty file, expected a flight log. Copy the log from the logger again." },
        { "header only", "time_s,yaw_rate_dps\n", "log.csv(1): found a header without rows under it, expected rows of numbers. The logger recorded nothing; copy the log again or take another flight." },
        { "prose", "Dear diary,\ntoday I flew over the bay and it was calm.\nThe motor ran well.\n", "log.csv(1): found rows without numbers, expected a header and rows of numbers. Export the log as CSV with the logger's own program." },
        { "prose without a comma", "Today I flew over the bay.\nThe motor ran well.\n", "log.csv(1): found text without columns, expected a header and rows of numbers, separated by commas, semicolons, tabs or pipes. Export the log as CSV with the logger's own program." },
        { "markup", "<!DOCTYPE html>\n<html><head><title>Log in</title></head>\n<body>Session ended</body></html>\n", "log.csv(1): found text without columns, expected a header and rows of numbers, separated by commas, semicolons, tabs or pipes. Export the log as CSV with the logger's own program." },
        { "one column", "yaw_rate_dps\n1\n2\n3\n", "log.csv(1): found text without columns, expected a header and rows of numbers, separated by commas, semicolons, tabs or pipes. Export the log as CSV with the logger's own program." },
        { "no time", "yaw_rate_dps,rpm\n1,6000\n2,6100\n", "log.csv(1): found no column for the time; the header has yaw_rate_dps, rpm, expected a column with the time of each row. Name it: --column time=NAME:s." },
        { "nothing known", "time_s,foo,bar\n0,1,2\n1,2,3\n", "log.csv(1): found no column that is known beside the time; the header has time_s, foo, bar, expected columns such as yaw_rate, throttle, rpm, latitude. Name them: --column ROLE=NAME:UNIT." },
        { "no header", "0,1,2\n1,2,3\n2,3,4\n", "log.csv(1): found 3 columns without a header, expected a header, or names for the columns. Say what they are: --column time=\"column 1\":s --column yaw_rate=\"column 2\":deg/s and so on." },
        { "one row", "time_s,yaw_rate_dps\n0,1\n", "log.csv(2): found 1 usable of 1 rows, expected at least two rows. Correct the file, or say with --column what its columns are." },
        { "no row with a time", "time_s,yaw_rate_dps,rpm\n,1,5\n,2,5\n,3,6\n", "log.csv(1): found no column for the time; the header has time_s, yaw_rate_dps, rpm, expected a column with the time of each row. Name it: --column time=NAME:s." },
        { "no usable row", "time_s,yaw_rate_dps\n5,1\n4,2\n3,3\n2,4\n", "log.csv(2): found 1 usable of 4 rows (3 × time runs back, first in line 3), expected at least two rows. Correct the file, or say with --column what its columns are." },
    };

    [Theory]
    [MemberData(nameof(Malformed))]
    public void A_file_that_is_no_log_is_refused_in_one_sentence(string kind, string text, string message)
    {
        Assert.NotEmpty(kind);
        Assert.Equal(message, Logs.Refusal(text));
    }

    public static TheoryData<string, string, string> Strict => new()
    {
        { "text for a number", "time_s,yaw_rate_dps\n0,1\n1,left\n2,3\n", "log.csv(3, yaw_rate_dps): found \"left\", expected a number. Correct the cell. Without --strict the row is left out." },
        { "decimal point among decimal commas", "time_s;yaw_rate_dps\n0,5;1,5\n1,5;2.5\n2,5;3,5\n", "log.csv(3, yaw_rate_dps): found \"2.5\", expected a number with a decimal comma, as elsewhere in this file. Correct the cell. Without --strict the row is left out." },
        { "grouped thousands", "time_s,rpm\n0.5,\"6,000\"\n1.5,5900.5\n2.5,5900.5\n", "log.csv(2, rpm): found \"6,000\", expected a number with a decimal point, as elsewhere in this file. Correct the cell. Without --strict the row is left out." },
        { "too few cells", "time_s,yaw_rate_dps,rpm\n0,1,2\n1,2,3\n2,3,4\n3,4,5\n4,5,6\n5,6\n", "log.csv(7): found 2 cells, expected 3 cells, as in the header. Complete the row or delete it. Without --strict the row is left out." },
        { "too many cells", "time_s,yaw_rate_dps\n0,1\n1,2,5\n2,3\n", "log.csv(3): found 3 cells, expected 2 cells, as in the header. Correct the row (a decimal comma perhaps) or delete it. Without --strict the row is left out." },
        { "no time in a row", "time_s,yaw_rate_dps\n0,1\n,2\n2,3\n", "log.csv(3, time_s): found no time, expected the time of the row. Give the row its time or delete it. Without --strict the row is left out." },
        { "time not readable", "time,yaw_rate_dps\n10:00:00,1\n10:61:00,2\n10:00:02,3\n", "log.csv(3, time): found \"10:61:00\", expected a time as in the other rows. Correct the cell. Without --strict the row is left out." },
        { "time runs back", "time_s,yaw_rate_dps\n0,1\n3,2\n1,3\n4,4\n", "log.csv(4): found a step back from 3.00 s to 1.00 s, expected a time after that of the row before. Split the log there if this was a restart. Without --strict the row is left out." },
        { "time repeats", "time_s,yaw_rate_dps\n0,1\n1,2\n1,3\n4,4\n5,5\n", "log.csv(4): found the time of the row before, expected a later time. Delete one of the rows. Without --strict the row is left out." },
        { "quote in a cell", "time_s,yaw_rate_dps\n0,1\n1,2\"\n2,3\n", "log.csv(3): found a quote where none belongs, expected quotes around a whole cell or none. Correct the quotes in the file. Without --strict the row is left out." },
        { "position not readable", "time_s,gps\n0,45.1 7.1\n1,north of the bay\n2,45.1 7.2\n", "log.csv(3, gps): found \"north of the bay\", expected latitude and longitude in degrees. Correct the cell. Without --strict the row is left out." },
    };

    [Theory]
    [MemberData(nameof(Strict))]
    public void Under_strict_the_first_row_that_would_be_left_out_is_named(string kind, string text, string message)
    {
        Assert.NotEmpty(kind);
        Assert.Equal(message, Logs.Refusal(text, strict: true));
        FlightImport lenient = Logs.Read(text);
        InputFile file = lenient.Diagnostics.Files[0];
        Assert.Equal(1, file.LeftOut.Sum(l => l.Rows));
        Assert.Equal(file.RowsRead, lenient.Flight.Count + 1);
        Assert.Contains(lenient.Diagnostics.Warnings, w => w.Code == "rows_left_out" && w.Message.EndsWith("Row left out.", StringComparison.Ordinal) || w.Message.Contains("Row left out. Split", StringComparison.Ordinal));
    }

    [Fact]
    public void Bytes_that_are_no_text_are_refused()
    {
        byte[] bytes = new byte[4096];
        for (int i = 0; i < bytes.Length; i++)
            bytes[i] = (byte)(i * 37 % 251);
        Assert.Equal("log.csv(1): found bytes that are no text, expected a flight log as text (CSV). Export the log as CSV with the logger's own program.",
            Assert.Throws<LogFormatException>(() => Logs.ReadBytes(bytes)).Message);
    }

    [Fact]
    public void A_told_column_that_is_not_there_is_refused_with_the_names_there_are() => Assert.Equal(
        "log.csv(1): found no column \"gz\" for yaw_rate, expected one of time_s, yaw_rate_dps. Name it as the header does: --column yaw_rate=NAME.",
        Logs.Refusal(Good, rules: new ColumnRule(ChannelRole.YawRate, "gz", "deg/s")));

    [Fact]
    public void A_told_unit_that_does_not_fit_the_role_is_refused() => Assert.Equal(
        "log.csv(1, yaw_rate_dps): found the unit \"km/h\" for yaw_rate, expected a unit such as deg/s, rad/s. Write --column yaw_rate=yaw_rate_dps:UNIT.",
        Logs.Refusal(Good, rules: new ColumnRule(ChannelRole.YawRate, "yaw_rate_dps", "km/h")));

    [Fact]
    public void A_quote_that_is_never_closed_costs_its_row_and_no_other()
    {
        var text = new StringBuilder("time_s,yaw_rate_dps,note\n");
        for (int i = 0; i < 500; i++)
            text.Append(System.Globalization.CultureInfo.InvariantCulture, $"{i},{i % 7},{(i == 450 ? "\"open" : "ok")}\n");
        FlightImport import = Logs.Read(text.ToString());
        Assert.Equal(499, import.Flight.Count);
        Assert.Equal(500, import.Diagnostics.Files[0].RowsRead);
        Assert.Equal([new RowsLeftOut("broken quotes", 1, 452)], import.Diagnostics.Files[0].LeftOut);
    }

    [Fact]
    public void The_message_does_not_show_more_of_a_cell_than_is_needed_to_find_it()
    {
        FlightImport import = Logs.Read("time_s,yaw_rate_dps\n0,1\n1,a very long remark of the pilot about the weather\n2,3\n");
        Assert.Contains(new Notice("rows_left_out", "log.csv(3, yaw_rate_dps): \"a very long remark of th…\" is not a number. Row left out."), import.Diagnostics.Warnings);
    }
}
