using TrimFit.Core.Rigging;
using TrimFit.Pages;
using TrimFit.Reporting;

namespace TrimFit.Cli;

internal static class RigCommand
{
    public static int Run(string path, CommonChoices choices, TextWriter output)
    {
        (Rig rig, SourceFile file) = InputFiles.Rig(path);
        var report = new RigSheetReport { Rig = rig, Statics = RigReporter.Of(rig, choices.Seed ?? 1), RigFile = file, Provenance = ProgramVersion.Provenance };
        OutputFiles.Deliver(choices, output,
            () => choices.Quiet ? ReportText.RigBrief(report, choices.Style) : ReportText.Rig(report, choices.Style),
            () => ReportJson.Rig(report), () => ReportPage.Rig(report, choices.Style), () => ReportMarkdown.Rig(report, choices.Style));
        return ExitCode.Done;
    }
}
