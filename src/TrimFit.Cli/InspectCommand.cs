using TrimFit.Core.Logs;
using TrimFit.Core.Turns;
using TrimFit.Pages;
using TrimFit.Reporting;

namespace TrimFit.Cli;

internal static class InspectCommand
{
    public static int Run(IReadOnlyList<string> logs, CommonChoices choices, TextWriter output)
    {
        FlightImport import = InputFiles.Flight(logs, choices);
        SensorReport sensors = SensorReport.Of(import.Flight);
        var report = new InspectReport
        {
            Import = import,
            Wind = sensors.Wind,
            Gyro = sensors.Gyro,
            Findings = sensors.Findings,
            Provenance = ProgramVersion.Provenance,
        };
        OutputFiles.Deliver(choices, output,
            () => choices.Quiet ? ReportText.InspectBrief(report, choices.Style) : ReportText.Inspect(report, choices.Style),
            () => ReportJson.Inspect(report), () => ReportPage.Inspect(report, choices.Style), () => ReportMarkdown.Inspect(report, choices.Style));
        return ExitCode.Done;
    }
}
