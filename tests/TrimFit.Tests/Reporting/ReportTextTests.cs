using TrimFit.Core.Analysis;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;

namespace TrimFit.Tests.Reporting;

public class ReportTextTests
{
    [Fact]
    public void The_answer_comes_first_and_the_cautions_last()
    {
        string[] lines = ReportText.Fit(ReportFixture.Report(), new()).TrimEnd('\n').Split('\n');
        Assert.Equal("In level flight it turns right at 2.1 deg/s; moving both harness hang points, front and rear, 14 mm", lines[0]);
        Assert.Equal("to your left (9 to 20) would null it.", lines[1]);
        int cautions = Array.IndexOf(lines, "Cautions");
        Assert.True(cautions > 0);
        Assert.All(lines[(cautions + 1)..], line => Assert.Matches("^(! |  )", line));
        Assert.Equal(7, lines[(cautions + 1)..].Count(line => line.StartsWith("! ", StringComparison.Ordinal)));
    }

    [Fact]
    public void Every_part_of_the_result_has_its_heading_in_a_fixed_order()
    {
        string[] headings = ["What to do", "Pull over power", "Ways to null it (choose one)", "Turn left over after the rounded travel, deg/s",
            "What else each way changes, at full thrust after the whole travel", "Turn model", "Sensitivity: turn rate per shift of the CG",
            "Riser twist and loads as the machine is now", "What would prove this wrong", "What was read", "Columns", "Spans left out", "Assumptions", "Warnings", "Cautions"];
        string[] lines = ReportText.Fit(ReportFixture.Report(), new()).Split('\n');
        Assert.Equal(headings, lines.Where((line, i) => i > 0 && lines[i - 1].Length == 0 && line.Length > 0));
    }

    [Fact]
    public void A_table_is_flush_and_its_numbers_stand_right() => Assert.Equal(
        "\nPull\n                 turn\n  power         deg/s\n  ------------  -----\n  off             0.4\n  level flight   -1.1\n",
        TextRenderer.Render(new("en", "", "",
        [
            new HeadingBlock("Pull"),
            new TableBlock([new("power", false), new("turn deg/s")], [["off", "0.4"], ["level flight", "-1.1"]]),
        ])));

    [Fact]
    public void Names_from_files_cannot_steer_the_terminal()
    {
        string text = ReportText.Inspect(ReportFixture.Inspection(ReportFixture.Import("a\u001b[2Jb\r\n.csv", "c\u202Ed")), new());
        Assert.DoesNotContain('\u001b', text);
        Assert.DoesNotContain('\r', text);
        Assert.DoesNotContain('\u202E', text);
        Assert.Contains("a [2Jb  .csv", text, StringComparison.Ordinal);
    }

    [Fact]
    public void The_brief_form_is_the_answer_and_the_caution_for_everywhere()
    {
        string[] lines = ReportText.FitBrief(ReportFixture.Report(), new()).TrimEnd('\n').Split('\n');
        Assert.Equal(2, lines.Length);
        Assert.Equal("In level flight it turns right at 2.1 deg/s; moving both harness hang points, front and rear, 14 mm to your left (9 to 20) would null it.", lines[0]);
        Assert.StartsWith("TrimFit estimates from a log. It approves nothing.", lines[1], StringComparison.Ordinal);
    }

    [Fact]
    public void A_reason_said_in_the_answer_is_not_said_again()
    {
        Finding reason = Finding.Of(FindingCode.NoThrust);
        string text = ReportText.Fit(ReportFixture.Report(ReportFixture.Result(VerdictCode.Insufficient, VerdictStrength.None, null, adjustments: [], reasons: [reason]) with { Warnings = [reason] }), new())
            .Replace('\n', ' ');
        Assert.Single(System.Text.RegularExpressions.Regex.Matches(text, "The log says nothing about thrust"));
    }

    [Fact]
    public void Inspect_says_what_was_read_in_one_sentence() => Assert.StartsWith(
        "1 file, 1003 rows (2 rows left out), 1 min 40 s at 10.0 Hz, 1 gap.\n- 2025-05-17 08:00:00 UTC\n"
        + "- Wind: 3.0 m/s from 0 deg, airspeed 11.0 m/s, from 360 deg of directions flown.\n"
        + "- Gyro: zero not known, sign REVERSED against the GPS, scale -1.02.\n- Gap of 3.0 s after 40.0 s.\n"
        + "- demo.csv: 2 rows left out, first in line 17: the row is torn\n",
        ReportText.Inspect(ReportFixture.Inspection(), new()), StringComparison.Ordinal);

    [Fact]
    public void Rig_says_where_the_weight_sits_and_what_the_torque_needs() => Assert.StartsWith(
        "The CG sits 2 mm right of the middle between the riser carabiners; balancing the propeller's torque\nin level flight takes 29 mm right.\n",
        ReportText.Rig(ReportFixture.Sheet(), new()), StringComparison.Ordinal);

    [Fact]
    public void Markdown_keeps_names_from_files_as_text()
    {
        string text = ReportMarkdown.Fit(ReportFixture.Report(import: ReportFixture.Import("<img src=x>|a_b*.csv")), new());
        Assert.Contains("&lt;img src=x&gt;\\|a\\_b\\*.csv", text, StringComparison.Ordinal);
        Assert.DoesNotContain("<img", text, StringComparison.Ordinal);
        Assert.StartsWith("# Turn trim report: Demo machine\n", text, StringComparison.Ordinal);
    }
}
