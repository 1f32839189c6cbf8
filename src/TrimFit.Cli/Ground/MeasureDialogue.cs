using System.Collections.Immutable;
using TrimFit.Core.Ground;
using TrimFit.Import.Rigs;
using TrimFit.Reporting;

namespace TrimFit.Cli;

/// <summary>Asks for readings, one line each; an empty line skips one. A reading that cannot be right is asked for again.</summary>
internal static class MeasureDialogue
{
    private static readonly (MeasureGroup Group, SheetKind Sheet)[] _groups =
    [
        (MeasureGroup.Tape, SheetKind.Measuring), (MeasureGroup.HangCheck, SheetKind.HangCheck), (MeasureGroup.Weighing, SheetKind.Weighing),
        (MeasureGroup.Rotation, SheetKind.Rotation), (MeasureGroup.Thrust, SheetKind.Thrust),
    ];

    public static void Ask(GroundReadings readings, TextReader input, TextWriter prompts, ReportStyle style, MeasureGroup? only = null)
    {
        prompts.WriteLine(GroundReports.SkipHint(style));
        foreach ((MeasureGroup group, SheetKind sheet) in _groups.Where(g => only is null || g.Group == only))
        {
            prompts.WriteLine();
            prompts.Write(only is null ? $"{GroundReports.Title(sheet, style)} {GroundReports.YesNo(style)} " : GroundReports.Title(sheet, style) + "\n");
            if (only is null && input.ReadLine() is not ("y" or "Y" or "yes" or "j" or "J" or "ja"))
                continue;
            foreach (MeasuredKey key in MeasuredKey.All.Where(k => k.Group == group))
            {
                if (!AskOne(key, readings, input, prompts, style))
                    return; // the input ended
            }
        }
        prompts.WriteLine();
    }

    private static bool AskOne(MeasuredKey key, GroundReadings readings, TextReader input, TextWriter prompts, ReportStyle style)
    {
        while (true)
        {
            prompts.Write(GroundReports.Reading(key.Name, style) + (key.Repeats > 1 ? ", a,b,c: " : ": "));
            if (input.ReadLine() is not string line)
                return false;
            if (line.Trim().Length == 0)
                return true;
            var trial = new GroundReadings();
            string? fault = trial.TrySet(key, line);
            if (fault is null && trial.Repeats.GetValueOrDefault(key.Name) is { IsDefault: false } values)
                fault = Doubt(key, values, style);
            if (fault is null)
            {
                _ = readings.TrySet(key, line);
                return true;
            }
            prompts.WriteLine(fault);
        }
    }

    private static string? Doubt(MeasuredKey key, ImmutableArray<double> values, ReportStyle style)
    {
        bool lateral = key.Key is "left_mm" or "right_mm";
        if (lateral && values.Any(v => key.Key == "left_mm" ? v >= 0 : v <= 0))
            return $"found {string.Join(", ", values)} for {key.Name}, expected {(key.Key == "left_mm" ? "negative" : "positive")} numbers: left of the centre line is negative.";
        return key.Unit is "mm" or "kg" && FactorTen.Find(values.AsSpan(), key.Unit == "mm" ? 15 : 0) is (int index, double corrected)
            ? GroundReports.Sentence(new(GroundFaultCode.FactorTenInRepeats, key.Name, index + 1, values[index], corrected), style)
            : null;
    }
}
