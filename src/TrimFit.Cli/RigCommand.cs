using TrimFit.Core.Rigging;
using TrimFit.Pages;
using TrimFit.Reporting;

namespace TrimFit.Cli;

internal static class RigCommand
{
    public static int Run(string path, MeasureChoices ground, CommonChoices choices, TextWriter output, TextWriter error)
    {
        if (ground.Measure)
            return MeasureCommand.Write(path, ground, choices, output, error);
        if (ground.Moved is not null)
            return MeasureCommand.Compare(path, ground, choices, output, error);
        (Rig rig, SourceFile file) = InputFiles.Rig(path);
        MeasureCommand.Sheets(rig, ground, choices);
        var report = new RigSheetReport { Rig = rig, Statics = RigReporter.Of(rig, choices.Seed ?? 1), RigFile = file, Provenance = ProgramVersion.Provenance };
        OutputFiles.Deliver(choices, output,
            () => choices.Quiet ? ReportText.RigBrief(report, choices.Style) : ReportText.Rig(report, choices.Style),
            () => ReportJson.Rig(report), () => ReportPage.Rig(report, choices.Style), () => ReportMarkdown.Rig(report, choices.Style));
        return ExitCode.Done;
    }
}
