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
        (Rig rig, SourceFile rigFile) = InputFiles.Rig(rigPath);
        (FlightSheet Sheet, SourceFile File)? sheet = sheetPath is null ? null : InputFiles.Sheet(sheetPath);
        CardPromise? promise = cardPath is null ? null : InputFiles.Card(cardPath);
        FlightImport import = InputFiles.Flight(logs, choices, rig.Log);
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
        TrimAnalysis analysis = TrimAnalysis.Run(import.Flight, rig, choices.TrimOptions, import.Legs.AsSpan());
        var report = new FitReport { Analysis = analysis, Import = import, RigFile = rigFile, SheetFile = sheet?.File, CardOutcome = promise is null ? null : CardOutcome.Of(promise, analysis), Provenance = ProgramVersion.Provenance };
        OutputFiles.Deliver(choices, output,
            () => choices.Quiet ? ReportText.FitBrief(report, choices.Style) : ReportText.Fit(report, choices.Style),
            () => ReportJson.Fit(report), () => ReportPage.Fit(report, choices.Style), () => ReportMarkdown.Fit(report, choices.Style));
        if (Answered(analysis))
            return ExitCode.Done;
        if (!choices.Quiet)
            error.WriteLine("trimfit: the data cannot answer the whole question (exit 4); what could be found is in the result.");
        return ExitCode.NoAnswer;
    }

    /// <summary>Balanced needs no travel; every other verdict is an answer only with one.</summary>
    private static bool Answered(TrimAnalysis analysis) => analysis.Verdict.Code switch
    {
        VerdictCode.Insufficient => false,
        VerdictCode.Balanced => true,
        _ => analysis.Verdict.TravelGiven,
    };
}
