using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Reporting;

namespace TrimFit.Cli;

internal static class InspectCommand
{
    public static int Run(IReadOnlyList<string> logs, CommonChoices choices, TextWriter output)
    {
        FlightImport import = InputFiles.Flight(logs, choices);
        TurnSignals signals = TurnSignals.From(import.Flight, _noRig);
        var report = new InspectReport { Import = import, Wind = signals.Wind, Gyro = signals.Gyro, Provenance = ProgramVersion.Provenance };
        OutputFiles.Deliver(choices, output,
            () => choices.Quiet ? ReportText.InspectBrief(report, choices.Style) : ReportText.Inspect(report, choices.Style),
            () => ReportJson.Inspect(report), () => ReportPage.Inspect(report, choices.Style), () => ReportMarkdown.Inspect(report, choices.Style));
        return ExitCode.Done;
    }

    // Wind and gyro are found the same way as for a fit, which wants a rig; nothing of it enters wind or gyro, and nothing else is shown.
    private static readonly Rig _noRig = new()
    {
        Mass = new() { PilotKg = Reading.Assumed(80), PowerUnitKg = Reading.Assumed(30) },
        Propeller = new() { Rotation = PropellerRotation.ContraRotating },
        Carabiners = new() { LeftM = Reading.Assumed(-0.2), RightM = Reading.Assumed(0.2) },
    };
}
