using TrimFit.Core.Comparing;
using TrimFit.Import;
using TrimFit.Import.Flights;

namespace TrimFit.Tests.Comparing;

public class FlightListTests
{
    [Fact]
    public void A_list_gives_logs_rig_sheet_and_setting_of_each_flight()
    {
        FlightList list = FlightListReader.Read("trial.toml", """
            schema = "trimfit-flights/1"
            rig = "machine.toml"
            changed = "geometry"
            [[flight]]
            logs = "one.csv"
            setup = "as delivered"
            [[flight]]
            logs = ["gps.igc", "engine.csv"]
            rig = "moved-rig.toml"
            sheet = "two-sheet.toml"
            """);
        Assert.Equal(ChangedPart.Geometry, list.Changed);
        Assert.Equal(("machine.toml", null, "as delivered"), (list.Flights[0].Rig, list.Flights[0].Sheet, list.Flights[0].Setup));
        Assert.Equal(["gps.igc", "engine.csv"], list.Flights[1].Logs);
        Assert.Equal(("moved-rig.toml", "two-sheet.toml", "moved-rig"), (list.Flights[1].Rig, list.Flights[1].Sheet, list.Flights[1].Setup));
    }

    [Fact]
    public void Every_fault_is_named_with_its_line_and_what_to_do()
    {
        LogFormatException e = Assert.Throws<LogFormatException>(() => FlightListReader.Read("trial.toml", """
            changed = "wings"
            [[flight]]
            logs = 3
            setap = "a"
            [[flight]]
            rig = "r.toml"
            """));
        Assert.Equal("""
            trial.toml(1): found "wings" for changed, expected "geometry", "wing", "brake_lines", "trimmers", "harness", "propeller" or "ballast". Write changed = "wing" if that is what it is.
            trial.toml(2): found a flight without rig, expected the rig file it was flown with. Write rig = "rig.toml" below [[flight]], or once at the top for all flights.
            trial.toml(3): found 3 for logs, expected a file name or a list of file names. Write logs = "flight.csv", or logs = ["gps.igc", "engine.csv"].
            trial.toml(4): unknown key "setap" in [[flight]]; did you mean "setup"?
            trial.toml(5): found a flight without logs, expected at least one log. Write logs = "flight.csv", or logs = ["gps.igc", "engine.csv"].
            """.ReplaceLineEndings("\n"), e.Message);
    }

    [Fact]
    public void A_sealed_order_opens_as_it_was_drawn_and_cannot_be_read_or_changed()
    {
        var seen = new HashSet<string>();
        for (int i = 0; i < 40; i++)
        {
            SealedOrder order = SealedOrder.Draw("front hole", "rear hole");
            Assert.Equal(4, order.Setups.Length);
            Assert.Equal((order.Setups[0], order.Setups[1]), (order.Setups[3], order.Setups[2])); // A-B-B-A
            string text = order.ToText();
            Assert.DoesNotContain("hole", text, StringComparison.Ordinal);
            SealedOrder opened = SealedOrder.Open("order.toml", text);
            Assert.Equal(order.Setups, opened.Setups);
            Assert.Equal(order.Commitment, opened.Commitment);
            Assert.Contains($"commitment = \"{order.Commitment}", text, StringComparison.Ordinal);
            seen.Add(order.Setups[0]);
        }
        Assert.Equal(2, seen.Count); // both orders are drawn; one alone once in 2^39
    }

    [Fact]
    public void A_sealed_order_that_was_changed_is_refused()
    {
        string text = SealedOrder.Draw("A", "B").ToText();
        int at = text.IndexOf("closed = \"", StringComparison.Ordinal) + 10;
        string changed = text[..at] + (text[at] == '0' ? '1' : '0') + text[(at + 1)..];
        LogFormatException e = Assert.Throws<LogFormatException>(() => SealedOrder.Open("order.toml", changed));
        Assert.Equal("order.toml(5): found an order that does not match its commitment, expected the file as it was sealed. Use the file that was written with the card; a changed one proves nothing.", e.Message);
        Assert.Throws<LogFormatException>(() => SealedOrder.Open("order.toml", "salt = \"zz\""));
        Assert.Throws<ArgumentException>(() => SealedOrder.Draw("A", "A"));
    }
}
