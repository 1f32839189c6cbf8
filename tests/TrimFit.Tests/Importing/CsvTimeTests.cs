using System.Globalization;
using System.Text;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Importing;

public class CsvTimeTests
{
    [Fact]
    public void Stamps_coarser_than_the_sampling_are_spread_and_it_is_said()
    {
        var text = new StringBuilder("time,yaw_rate_dps\n");
        for (int i = 7; i < 57; i++) // 10 Hz, the record begins and ends within a second
            text.Append(CultureInfo.InvariantCulture, $"10:00:{i / 10:00},{i}\n");
        FlightImport import = Logs.Read(text.ToString());
        Assert.Equal(50, import.Flight.Count);
        for (int i = 0; i < 50; i++)
            Assert.Equal(36000 + ((i + 7) / 10.0), import.Flight.StartTimeOfDay!.Value.TotalSeconds + import.Flight.TimeSec[i], 1e-6);
        Assert.Contains(new Notice("coarse_time", "log.csv(3): the time stamps are coarser than the sampling (about 10 rows share each); rows with the same stamp are spread evenly over its step."),
            import.Diagnostics.Warnings);
        Accuracy.AgreesTo(6, 10, import.Diagnostics.Sampling.RateHz);
    }

    [Fact]
    public void A_coarse_date_beside_a_fine_counter_gives_the_date_and_the_counter_gives_the_steps()
    {
        var text = new StringBuilder("datetime,millis,yaw_rate_dps\n");
        for (int i = 0; i < 100; i++)
        {
            double second = 12.35 + i * 0.1; // the counter runs at 10 Hz, the clock shows whole seconds
            text.Append(CultureInfo.InvariantCulture, $"2026-05-12 10:00:{(int)second:00},{5000 + i * 100 + i % 3},{i}\n");
        }
        FlightImport import = Logs.Read(text.ToString());
        for (int i = 0; i < 100; i++)
            Assert.Equal(i * 0.1 + i % 3 * 0.001, import.Flight.TimeSec[i], 1e-9);
        Assert.Contains(new Notice("two_clocks", "log.csv: the stamps of column \"datetime\" are coarser than the sampling; they give the start, and column \"millis\" gives the steps."),
            import.Diagnostics.Warnings);
        // The clock shows 13 for the first time in row 7, at 13.05: so it is known to 0.05 s.
        Assert.Equal(12.35, (import.Flight.StartUtc!.Value - new DateTimeOffset(2026, 5, 12, 10, 0, 0, TimeSpan.Zero)).TotalSeconds, 0.053);
    }

    [Fact]
    public void A_clock_that_begins_again_under_a_repeated_header_goes_on_after_a_pause()
    {
        FlightImport import = Logs.Read("time_s,yaw_rate_dps\n0,1\n1,2\n2,3\ntime_s,yaw_rate_dps\n0,4\n1,5\n");
        Assert.Equal([0.0, 1, 2, 62, 63], import.Flight.TimeSec.ToArray());
        Assert.Equal(5, import.Diagnostics.Files[0].RowsRead);
        Assert.Empty(import.Diagnostics.Files[0].LeftOut);
        Assert.Contains(new Notice("clock_restarted", "log.csv(6): the logger's clock begins again here. The rows from here on are placed 60 s after the ones before; how long the real pause was is not known."),
            import.Diagnostics.Warnings);
    }

    [Fact]
    public void A_repeated_header_under_a_running_clock_is_passed_over()
    {
        FlightImport import = Logs.Read("time_s,yaw_rate_dps\n0,1\n1,2\ntime_s,yaw_rate_dps\n5,4\n6,5\n");
        Assert.Equal([0.0, 1, 5, 6], import.Flight.TimeSec.ToArray());
        Assert.Equal(4, import.Diagnostics.Files[0].RowsRead);
        Assert.DoesNotContain(import.Diagnostics.Warnings, w => w.Code == "clock_restarted");
    }

    [Fact]
    public void Rows_whose_time_runs_back_are_counted_until_the_clock_has_caught_up()
    {
        FlightImport import = Logs.Read("time_s,yaw_rate_dps\n90.2,1\n91.4,2\n90.6,3\n91.0,4\n91.4,5\n91.8,6\n");
        Assert.Equal(3, import.Flight.Count);
        Assert.Equal(6, import.Diagnostics.Files[0].RowsRead);
        Assert.Equal([new RowsLeftOut("time runs back", 2, 4), new RowsLeftOut("time repeats", 1, 6)], import.Diagnostics.Files[0].LeftOut);
        Assert.Contains(new Notice("rows_left_out", "log.csv(4): time runs back from 91.40 s to 90.60 s. 2 rows left out for this, lines 4 to 5. Split the log there if this was a restart."),
            import.Diagnostics.Warnings);
    }

    [Fact]
    public void Dates_that_can_be_read_both_ways_are_asked_for_and_only_the_time_of_day_is_used()
    {
        const string text = "Date,Time,yaw_rate_dps\n03/04/2026,10:00:00,1\n03/04/2026,10:00:01,2\n";
        FlightImport import = Logs.Read(text);
        Assert.Null(import.Flight.StartUtc);
        Assert.Contains(new Notice("date_order_unknown", "log.csv: the dates of column \"Date\" can be read as day/month and as month/day; only the time of day is used. To say which: --column date=Date:dmy or :mdy."),
            import.Diagnostics.Warnings);
        Assert.Equal(new DateTimeOffset(2026, 4, 3, 10, 0, 0, TimeSpan.Zero), Logs.Read(text, new ColumnRule(ChannelRole.Date, "Date", "dmy")).Flight.StartUtc);
        Assert.Equal(new DateTimeOffset(2026, 3, 4, 10, 0, 0, TimeSpan.Zero), Logs.Read(text, new ColumnRule(ChannelRole.Date, "Date", "mdy")).Flight.StartUtc);
    }

    public static TheoryData<string, string> Stamps => new()
    {
        { "2026-05-12T10:11:12.5Z", "2026-05-12T10:11:12.5000000+00:00" },
        { "2026-05-12T10:11:12.5+02:00", "2026-05-12T08:11:12.5000000+00:00" },
        { "2026-05-12T10:11:12.5+0200", "2026-05-12T08:11:12.5000000+00:00" },
        { "2026-05-12 10:11:12.5 UTC", "2026-05-12T10:11:12.5000000+00:00" },
        { "2026-05-12 10:11:12.5", "2026-05-12T10:11:12.5000000+00:00" },
        { "2026/05/12 10:11:12.5", "2026-05-12T10:11:12.5000000+00:00" },
        { "20260512T101112.5Z", "2026-05-12T10:11:12.5000000+00:00" },
        { "20260512 10:11:12.5", "2026-05-12T10:11:12.5000000+00:00" },
        { "22.05.2026 10:11:12.5", "2026-05-22T10:11:12.5000000+00:00" },
        { "2.5.26 10:11:12.5", "2026-05-02T10:11:12.5000000+00:00" },
        { "22/05/2026 10:11:12.5", "2026-05-22T10:11:12.5000000+00:00" },
        { "05/22/2026 10:11:12.5 PM", "2026-05-22T22:11:12.5000000+00:00" },
        { "05/22/2026 12:11:12.5 AM", "2026-05-22T00:11:12.5000000+00:00" },
        { "12-May-2026 10:11:12.5", "2026-05-12T10:11:12.5000000+00:00" },
        { "May 12, 2026 10:11:12.5", "2026-05-12T10:11:12.5000000+00:00" },
        { "10:11:12.5 12.05.2026", "" },
        { "1778580672.5", "2026-05-12T10:11:12.5000000+00:00" },
        { "1778580672500", "2026-05-12T10:11:12.5000000+00:00" },
    };

    [Theory]
    [MemberData(nameof(Stamps))]
    public void A_stamp_is_read_as_the_moment_it_names_or_not_at_all(string stamp, string moment)
    {
        // Expected moments: read by eye; 1778580672 = 20585 days (2026-05-12) of 86400 s and 36672 s, by hand.
        string text = $"timestamp;yaw_rate_dps\n{stamp};1\n{stamp.Replace("12.5", "13.5", StringComparison.Ordinal).Replace("72.5", "73.5", StringComparison.Ordinal).Replace("72500", "73500", StringComparison.Ordinal)};2\n";
        if (moment.Length == 0)
        {
            Assert.StartsWith("log.csv(1): found rows without numbers", Logs.Refusal(text), StringComparison.Ordinal);
            return;
        }
        FlightImport import = Logs.Read(text);
        Assert.Equal(moment, import.Flight.StartUtc!.Value.ToString("O", CultureInfo.InvariantCulture));
        Assert.Equal([0.0, 1.0], import.Flight.TimeSec.ToArray());
    }

    [Theory]
    [InlineData(60, "s")]       // a minute apart in 10 rows: a quarter of an hour
    [InlineData(1000, "ms")]
    [InlineData(1000000, "us")]
    public void A_counter_without_a_unit_is_read_so_that_the_record_is_as_long_as_a_flight(int step, string unit)
    {
        var text = new StringBuilder("time,yaw_rate_dps\n");
        for (int i = 0; i < 60; i++)
            text.Append(CultureInfo.InvariantCulture, $"{(long)i * step},{i}\n");
        FlightImport import = Logs.Read(text.ToString());
        Assert.Equal(unit, import.Column("time").Unit);
        Assert.Contains(new Notice("time_unit_inferred", $"log.csv: column \"time\" has no unit; its numbers are taken as {unit}, which makes the record as long as a flight. To say another: --column time=time:UNIT."),
            import.Diagnostics.Warnings);
    }

    [Fact]
    public void A_time_in_nanoseconds_keeps_its_last_digit()
    {
        FlightImport import = Logs.Read("timestamp,yaw_rate_dps\n1778580000123456789,1\n1778580000123456790,2\n");
        Assert.Equal(1e-9, import.Flight.TimeSec[1], 1e-16);
    }

    [Fact]
    public void A_pause_is_more_than_five_steps_and_two_seconds()
    {
        FlightImport import = Logs.Read("time_s,yaw_rate_dps\n0,1\n0.1,1\n0.2,1\n2.1,1\n2.2,1\n4.3,1\n4.4,1\n");
        TimeGap gap = Assert.Single(import.Diagnostics.Sampling.Gaps); // 1.9 s is none, 2.1 s is one
        Assert.Equal(2.2, gap.StartSec, 1e-12);
        Assert.Equal(2.1, gap.DurationSec, 1e-12);
    }

    [Fact]
    public void Columns_of_several_rates_keep_their_blanks_and_the_fastest_gives_the_rate()
    {
        var text = new StringBuilder("time_s,yaw_rate_dps,rpm\n");
        for (int i = 0; i < 100; i++)
            text.Append(CultureInfo.InvariantCulture, $"{i / 50.0},{i},{(i % 10 == 0 ? "6000" : "")}\n");
        FlightImport import = Logs.Read(text.ToString());
        Accuracy.AgreesTo(9, 50, import.Diagnostics.Sampling.RateHz);
        Assert.Equal(90, import.Column("rpm").Missing);
        Assert.Equal(10, import.Flight[ChannelRole.Rpm].ToArray().Count(double.IsFinite));
    }
}
