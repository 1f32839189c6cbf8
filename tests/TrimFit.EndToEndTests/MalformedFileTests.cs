namespace TrimFit.EndToEndTests;

/// <summary>One malformed file of each kind: one clear message, whole, and exit 3.</summary>
public class MalformedFileTests
{
    public static TheoryData<string, string, string> Logs => new()
    {
        {
            "short.igc", "AXXX001\nHFDTE030416\nB1101355206343N00006198WA005\n",
            "short.igc: found an IGC file without a usable fix, expected lines such as B1101355206343N00006198WA0058700558. Copy the file from the recorder again; it may have been cut short."
        },
        {
            "broken.gpx", "<?xml version=\"1.0\"?>\n<gpx version=\"1.1\" creator=\"x\" xmlns=\"http://www.topografix.com/GPX/1/1\"><trk><trkseg><trkpt lat=\"1\" lon=\"2\"></trkseg>",
            "broken.gpx(2): found XML that breaks off or is damaged, expected a GPX track. Export the track again."
        },
        {
            "sums.nmea", "$GPRMC,123519,A,4807.038,N,01131.000,E,022.4,084.4,230394,003.1,W*00\n$GPRMC,123520,A,4807.038,N,01131.000,E,022.4,084.4,230394,003.1,W*01\n",
            "sums.nmea: found an NMEA file without a usable fix in 2 rows, expected RMC or GGA sentences with a position and a checksum. Record again under open sky, with RMC and GGA switched on."
        },
        {
            "notime.csv", "a,b\n1,2\n3,4\n",
            "notime.csv(1): found no column for the time; the header has a, b, expected a column with the time of each row. Name it: --column time=NAME:s."
        },
        {
            "empty.csv", "",
            "empty.csv: found an empty file, expected a flight log. Copy the log from the logger again."
        },
        {
            "header.csv", "time_s,rpm\n",
            "header.csv(1): found a header without rows under it, expected rows of numbers. The logger recorded nothing; copy the log again or take another flight."
        },
        {
            "broken.zip", "PK\u0003\u0004rubbish",
            "broken.zip: found a damaged zip, expected a zip that opens. Copy it again or unpack it and give the files."
        },
    };

    [Theory]
    [MemberData(nameof(Logs))]
    public void A_malformed_log_ends_with_3_and_its_message(string name, string content, string message)
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "inspect", folder.Write(name, content));
        Assert.Equal(3, run.ExitCode);
        Assert.Equal(message + "\n", run.Error);
        Assert.Equal("", run.Output);
    }

    [Fact]
    public void A_malformed_sheet_ends_with_3_and_a_line_for_each_fault()
    {
        using var folder = new TemporaryFolder();
        string sheet = folder.Write("sheet.toml", "schema = \"trimfit-flight/1\"\n[[leg]]\nstart = 5\nend = 2\nkind = \"handsoff\"\n");
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", BuiltProgram.Sample("uncorrected.csv"), "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--sheet", sheet);
        Assert.Equal(3, run.ExitCode);
        Assert.Equal("sheet.toml(4): found an end that does not follow the start, expected a later end. Correct start or end.\n"
            + "sheet.toml(5): found \"handsoff\" for kind, expected \"hands_off\", \"held\", \"brake_step\", \"weight_shift\", \"ballast\" or \"other\". Write kind = \"hands_off\" if that is what it is.\n", run.Error);
    }

    [Fact]
    public void A_malformed_rig_ends_with_3_and_a_line_for_each_fault()
    {
        using var folder = new TemporaryFolder();
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "rig", folder.Write("rig.toml", "[mass]\npilot_kg = -3\npower_unit_kg = 30\n[propeller]\nrotation = \"clockwise\"\n[carabiners]\nleft_mm = -200\nright_mm = -190\n"));
        Assert.Equal(3, run.ExitCode);
        string[] lines = run.Error.TrimEnd('\n').Split('\n');
        Assert.Equal(2, lines.Length);
        Assert.Equal("rig.toml(2): found -3 for pilot_kg, expected a number from 30 to 250 kg. Masses are in kilograms and never negative.", lines[0]);
        Assert.StartsWith("rig.toml(8): found -190 for right_mm", lines[1], StringComparison.Ordinal);
    }
}
