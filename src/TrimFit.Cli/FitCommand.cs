using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Pages;
using TrimFit.Reporting;

namespace TrimFit.Cli;

internal static class FitCommand
{
    public static int Run(IReadOnlyList<string> logs, string rigPath, string? sheetPath, string? cardPath, CommonChoices choices, TextWriter output, TextWriter error)
    {
        FitReport report = Fit(logs, InputFiles.Rig(rigPath), sheetPath, cardPath, choices);
        OutputFiles.Deliver(choices, output,
            () => choices.Quiet ? ReportText.FitBrief(report, choices.Style) : ReportText.Fit(report, choices.Style),
            () => ReportJson.Fit(report), () => ReportPage.Fit(report, choices.Style), () => ReportMarkdown.Fit(report, choices.Style));
        int code = CodeOf(report.Analysis);
        if (code != ExitCode.Done && !choices.Quiet)
            error.WriteLine("trimfit: the data cannot answer the whole question (exit 4); what could be found is in the result.");
        return code;
    }

    /// <summary>One flight from its files to its result.</summary>
    public static FitReport Fit(IReadOnlyList<string> logs, (Rig Rig, SourceFile File) machine, string? sheetPath, string? cardPath, CommonChoices choices)
    {
        (FlightSheet Sheet, SourceFile File)? sheet = sheetPath is null ? null : InputFiles.Sheet(sheetPath);
        CardPromise? promise = cardPath is null ? null : InputFiles.Card(cardPath);
        FlightImport import = InputFiles.Flight(logs, choices, machine.Rig.Log);
        if (sheet is (FlightSheet Sheet, SourceFile) given)
        {
            SheetedFlight sheeted = SheetLegs.Apply(import.Flight, given.Sheet);
            import = import with
            {
                Flight = sheeted.Flight,
                Legs = sheeted.Legs,
                Diagnostics = import.Diagnostics with { Warnings = [.. import.Diagnostics.Warnings, .. sheeted.Warnings] },
            };
        }
        TrimAnalysis analysis = TrimAnalysis.Run(import.Flight, machine.Rig, choices.TrimOptions, import.Legs.AsSpan());
        return new FitReport
        {
            Analysis = analysis,
            Import = import,
            RigFile = machine.File,
            SheetFile = sheet?.File,
            CardOutcome = promise is null ? null : CardOutcome.Of(promise, analysis),
            Provenance = ProgramVersion.Provenance,
        };
    }

    /// <summary>Exit code of a result: balanced needs no travel, every other verdict is an answer only with one.</summary>
    public static int CodeOf(TrimAnalysis analysis) => analysis.Verdict.Code switch
    {
        VerdictCode.Insufficient => ExitCode.NoAnswer,
        VerdictCode.Balanced => ExitCode.Done,
        _ => analysis.Verdict.TravelGiven ? ExitCode.Done : ExitCode.NoAnswer,
    };
}
