using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Import;
using TrimFit.Import.Sheets;

namespace TrimFit.Tests.Importing;

public class SheetFileTests
{
    private const string Whole = """
        schema = "trimfit-flight/1"
        date = 2026-05-17
        wing_trim = "neutral"
        accelerator = 25
        fuel_start_kg = 8.5
        fuel_end_kg = 5.1
        ground_altitude_m = 120
        notes = "calm"
        [[leg]]
        start = 10:21:30
        end = "10:22:10"
        kind = "hands_off"
        power = "level"
        [[leg]]
        start = 95
        end = 130.5
        kind = "brake_step"
        throttle_percent = 60
        brake_left = 0
        brake_right = 150
        [[leg]]
        marker = 3
        kind = "ballast"
        power = "off"
        ballast_kg = 2
        ballast_arm_mm = -300
        [[leg]]
        start = { marker = 5 }
        end = { marker = 7 }
        kind = "other"
        """;

    private const string OneLeg = "[[leg]]\nstart = 10:21:30\nend = 10:22:10\nkind = \"held\"\n";

    [Fact]
    public void Every_key_arrives_in_SI_units()
    {
        FlightSheet sheet = FlightSheetReader.Read("sheet.toml", Whole);
        Assert.Equal(new DateOnly(2026, 5, 17), sheet.Date);
        Assert.Equal("neutral", sheet.WingTrim);
        Assert.Equal(0.25, sheet.Accelerator);
        Assert.Equal(8.5, sheet.FuelStartKg);
        Assert.Equal(5.1, sheet.FuelEndKg);
        Assert.Equal(120, sheet.GroundAltitudeM);
        Assert.Equal("calm", sheet.Notes);
        Assert.Equal(
            [
                new() { Start = SheetTime.FromClock(new(10, 21, 30)), End = SheetTime.FromClock(new(10, 22, 10)), Kind = SheetLegKind.HandsOff, Power = PowerSetting.Cruise, Line = 9 },
                new() { Start = SheetTime.FromSeconds(95), End = SheetTime.FromSeconds(130.5), Kind = SheetLegKind.BrakeStep, ThrottleFraction = 0.6, BrakeLeftM = 0, BrakeRightM = 0.15, Line = 14 },
                new() { Start = SheetTime.FromMarker(3), End = SheetTime.FromMarker(4), Kind = SheetLegKind.Ballast, Power = PowerSetting.Off, BallastKg = 2, BallastArmM = -0.3, Line = 21 },
                new SheetLeg { Start = SheetTime.FromMarker(5), End = SheetTime.FromMarker(7), Kind = SheetLegKind.Other, Line = 27 },
            ],
            sheet.Legs);
    }

    [Fact]
    public void A_sheet_without_legs_is_a_sheet() => Assert.Empty(FlightSheetReader.Read("sheet.toml", "notes = \"nothing done\"").Legs);

    [Fact]
    public void A_clock_leg_may_run_over_midnight() =>
        Assert.Equal(SheetTime.FromClock(new(0, 0, 20)), FlightSheetReader.Read("s.toml", "[[leg]]\nstart = 23:59:50\nend = 00:00:20\nkind = \"held\"").Legs[0].End);

    public static TheoryData<string, string, string> Faults() => new()
    {
        { "kind = \"held\"\n", "", "s.toml(1): found a leg without kind, expected what the pilot did. Write kind = \"hands_off\", \"held\", \"brake_step\", \"weight_shift\", \"ballast\" or \"other\"." },
        { "\"held\"", "\"handsoff\"", "s.toml(4): found \"handsoff\" for kind, expected \"hands_off\", \"held\", \"brake_step\", \"weight_shift\", \"ballast\" or \"other\". Write kind = \"hands_off\" if that is what it is." },
        { "10:22:10", "10:21:10", "s.toml(3): found an end that does not follow the start, expected a later end. Correct start or end." },
        { "10:22:10", "95", "s.toml(3): found start and end in different kinds of time, expected the same kind. Give both as clock times, both in seconds, or both as marks." },
        { "10:22:10", "2026-05-17", "s.toml(3): found 2026-05-17 for end, expected a clock time, seconds or a mark. Write end = 10:21:30, end = 95 or end = { marker = 3 }." },
        { "10:22:10", "-5", "s.toml(3): found -5 for end, expected a number from 0 to 1000000 s. Give seconds since the start of the log, or a clock time such as 10:21:30." },
        { "end = 10:22:10\n", "", "s.toml(1): found a leg without end, expected both start and end, or a marker. Write start = 10:21:30 and end = 10:22:10, or seconds of the log, or marker = 3." },
        { "end = 10:22:10\n", "marker = 3\n", "s.toml(3): found marker beside start or end, expected one of the two. Leave marker out, or start and end." },
        { "10:22:10", "{ mark = 3 }", "s.toml(3): unknown key \"mark\" in [end]; did you mean \"marker\"?\ns.toml(3): found a table without marker for end, expected a mark. Write end = { marker = 3 }." },
        { "10:22:10", "{ marker = 2.5 }", "s.toml(3): found 2.5 for marker, expected a whole number. Give the number of the mark." },
        { "\"held\"", "\"hands_off\"\nbrake_right = 40", "s.toml(5): found a pulled brake on a hands_off leg, expected no brake. Write kind = \"held\" or \"brake_step\"." },
        { "\"held\"", "\"brake_step\"", "s.toml(1): found a brake_step leg without brake_left and brake_right, expected how far a brake was pulled, mm. Add the brake that was pulled." },
        { "\"held\"", "\"ballast\"\nballast_kg = 2", "s.toml(1): found a ballast leg without ballast_arm_mm, expected mass and place of the ballast. Add both ballast_kg and ballast_arm_mm." },
        { "\"held\"", "\"held\"\npower = \"cruise\"", "s.toml(5): found \"cruise\" for power, expected \"off\", \"idle\", \"level\" or \"full\". Write power = \"off\" if that is what it is." },
        { "\"held\"", "\"held\"\npower = \"full\"\nthrottle_percent = 100", "s.toml(6): found throttle_percent beside power, expected one of the two. Leave power out when the throttle is known." },
        { "\"held\"", "\"held\"\nthrotle_percent = 100", "s.toml(5): unknown key \"throtle_percent\" in [[leg]]; did you mean \"throttle_percent\"?" },
        { "[[leg]]", "date = \"17.05.2026\"\n[[leg]]", "s.toml(1): found \"17.05.2026\" for date, expected year, month and day. Write date = 2026-05-17." },
        { "[[leg]]", "fuel_start_kg = 5\nfuel_end_kg = 8\n[[leg]]", "s.toml(2): found 8 kg after landing and 5 kg at take-off, expected fuel that does not grow. Swap the two if they were mixed up." },
        { "[[leg]]", "schema = \"trimfit-rig/1\"\n[[leg]]", "s.toml(1): found \"trimfit-rig/1\" for schema, expected \"trimfit-flight/1\". Write schema = \"trimfit-flight/1\", or check that this is the right file." },
        { "[[leg]]", "[leg]", "s.toml(1): found a table for leg, expected a table for each leg. Write a line [[leg]] before the keys of each leg." },
        { "[[leg]]", "[[legs]]", "s.toml(1): unknown table [legs]; did you mean [leg]?" },
    };

    [Theory]
    [MemberData(nameof(Faults))]
    public void A_fault_is_named_with_its_line_and_what_to_do(string good, string bad, string message)
    {
        Assert.Contains(good, OneLeg, StringComparison.Ordinal);
        Assert.Equal(message, Assert.Throws<LogFormatException>(() => FlightSheetReader.Read("folder/s.toml", OneLeg.Replace(good, bad, StringComparison.Ordinal))).Message);
    }

    [Fact]
    public void No_cut_and_no_changed_byte_of_a_good_sheet_gives_another_exception()
    {
        var random = new Random(20260517);
        int refused = 0;
        for (int i = 0; i < 1000; i++)
        {
            char[] text = Whole.ToCharArray();
            if (i % 2 == 0)
                text = text[..random.Next(text.Length)];
            for (int k = random.Next(4); k > 0 && text.Length > 0; k--)
                text[random.Next(text.Length)] = (char)random.Next(128);
            try
            {
                FlightSheetReader.Read("s.toml", new string(text));
            }
            catch (LogFormatException e)
            {
                refused++;
                Assert.StartsWith("s.toml", e.Message, StringComparison.Ordinal);
            }
        }
        Assert.InRange(refused, 400, 1000);
    }
}
