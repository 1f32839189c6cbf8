using System.Collections.Immutable;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Pages;
using TrimFit.Reporting;

namespace TrimFit.Cli;

/// <summary>Readings into the rig file, and the proof of a change by the hang check.</summary>
internal static class MeasureCommand
{
    /// <summary>Hangs after a change that the expected readings count on.</summary>
    private const double UsualHangs = 3;

    private const string NothingWritten = "nothing was written. Read again, or write it --even-so.";

    /// <summary>Writes the readings into the rig file.</summary>
    /// <exception cref="LogFormatException">The readings contradict each other, or the file cannot take them; nothing is written.</exception>
    public static int Write(string path, MeasureChoices choices, CommonChoices common, TextWriter output, TextWriter error)
    {
        string name = Path.GetFileName(path), text = InputFiles.Text(path);
        Rig earlier = RigFileReader.Read(path, text);
        GroundReadings readings = Readings(choices, common, error, only: null);
        if (!choices.EvenSo) // before the file's ranges speak: a slip by ten should be called that
            Refuse(name, EntryChecks.OfRepeats(readings.Repeats), common, NothingWritten);
        string written = RigFileEditor.Write(path, text, readings);
        Rig rig = RigFileReader.Read(path, written);
        ImmutableArray<GroundFault> faults = EntryChecks.Of(rig, earlier, readings.Repeats);
        if (!choices.EvenSo)
            Refuse(name, faults, common, NothingWritten);
        OutputFiles.Write("--measure", path, written);
        foreach (GroundFault fault in faults)
            error.WriteLine($"{name}: {GroundReports.Sentence(fault, common.Style)}");
        output.WriteLine(GroundReports.Written(name, readings.Keys.Count(), common.Style));
        return ExitCode.Done;
    }

    /// <summary>Compares the hang check of the rig file with one after a change.</summary>
    public static int Compare(string path, MeasureChoices choices, CommonChoices common, TextWriter output, TextWriter error)
    {
        string name = Path.GetFileName(path), text = InputFiles.Text(path);
        Rig rig = RigFileReader.Read(path, text);
        if (rig.HangCheck is null)
            throw LogFormatException.At(name, null, null, "no [hang_check]", "the hang check before the change", $"Hang before anything is moved and write it with trimfit rig {name} --measure.");
        (Adjustment adjustment, double travel) = choices.Moved!.Value;
        if (!adjustment.AppliesTo(rig))
            throw new CommandLineException($"--moved: this machine has no {CommandWords.Of(adjustment.Kind)}.");
        GroundReadings readings = Readings(choices, common, error, MeasureGroup.HangCheck);
        Rig after = RigFileReader.Read(path, RigFileEditor.Write(path, text, readings));
        // The file's tape is that of before the change, so only what the new readings say about themselves counts.
        ImmutableArray<GroundFault> faults =
        [
            .. EntryChecks.Of(after, null, readings.Repeats).Where(f => f.Code is GroundFaultCode.FactorTen or GroundFaultCode.FactorTenInRepeats
                or GroundFaultCode.ScalesSwappedByLean or GroundFaultCode.WeightMissing),
        ];
        if (adjustment.Unit == TravelUnit.Kilogram)
            faults = faults.RemoveAll(f => f.Code == GroundFaultCode.WeightMissing);
        if (!choices.EvenSo)
            Refuse(name, faults, common, "nothing was compared. Read again, or compare it --even-so.");

        (double change, double sd, double spacing) = RigHang.Expected(rig, adjustment, travel);
        if (change == 0)
            throw new CommandLineException($"--moved: {CommandWords.Of(adjustment.Kind)} does not move the CG under the wing, so a hang check cannot show it.");
        HangCheckResult before = RigHang.Of(rig)!;
        RigHangCheck now = after.HangCheck!;
        Reading left = rig.Carabiners.LeftM, right = rig.Carabiners.RightM;
        HangCheckResult then = RigHang.Of(rig, now.CarabinerSpacingM is null
            ? now with { CarabinerSpacingM = Reading.Measured(spacing, Math.Sqrt(Square(left.StandardDeviation) + Square(right.StandardDeviation))) } : now);
        double expectedSd = Math.Sqrt(Square(before.StandardError) + (Square(before.SeatingSdM) / UsualHangs) + Square(sd));
        var report = new HangChangeReport
        {
            Adjustment = adjustment,
            Travel = travel,
            Change = HangChange.Judge(before, then, change, sd),
            Expected = HangCheck.Expected(before.SumKg + (adjustment.Unit == TravelUnit.Kilogram ? Math.Abs(travel) : 0), before.OffsetM + change, spacing),
            ExpectedPlusMinusKg = StandardNormal.Quantile(0.975) * expectedSd * before.SumKg / spacing,
            Faults = faults,
            Provenance = ProgramVersion.Provenance,
        };
        OutputFiles.Deliver(common, output, () => common.Quiet ? GroundReports.ChangeBrief(report, common.Style) : GroundReports.ChangeText(report, common.Style), () => GroundReports.ChangeJson(report),
            () => GroundPage.Change(report, common.Style), () => GroundReports.ChangeMarkdown(report, common.Style));
        return report.Change.Verdict == HangChangeVerdict.Confirmed ? ExitCode.Done : ExitCode.NoAnswer;
    }

    /// <summary>Writes the sheets that were asked for.</summary>
    public static void Sheets(Rig rig, MeasureChoices choices, CommonChoices common)
    {
        foreach ((SheetKind kind, string path) in choices.Sheets)
            OutputFiles.Write("--sheet", path, GroundPage.Sheet(kind, rig, common.Style));
    }

    private static GroundReadings Readings(MeasureChoices choices, CommonChoices common, TextWriter error, MeasureGroup? only)
    {
        GroundReadings readings = choices.Readings;
        bool ask = choices.ReadingsFile == "-" || (choices.ReadingsFile is null && readings.IsEmpty && !Console.IsInputRedirected);
        if (choices.ReadingsFile is string file && file != "-")
        {
            var all = new GroundReadings();
            all.AddFile(file, InputFiles.Text(file));
            all.Add(readings); // what the command line says goes before the file
            readings = all;
        }
        if (ask)
            MeasureDialogue.Ask(readings, Console.In, error, common.Style, only);
        if (readings.IsEmpty)
            throw new CommandLineException("no reading: give --reading NAME=V,V,V, --readings FILE, or answer the questions on a terminal.");
        return readings;
    }

    private static void Refuse(string name, ImmutableArray<GroundFault> faults, CommonChoices common, string ending)
    {
        if (!faults.IsEmpty)
            throw new LogFormatException(string.Join('\n', [.. faults.Select(f => $"{name}: {GroundReports.Sentence(f, common.Style)}"), $"{name}: {ending}"]));
    }

    private static double Square(double x) => x * x;
}
