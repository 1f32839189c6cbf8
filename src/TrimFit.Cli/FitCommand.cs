using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Carrying;
using TrimFit.Reporting.Documents;

namespace TrimFit.Cli;

internal static class FitCommand
{
    public static int Run(IReadOnlyList<string> logs, string? rigPath, string? sheetPath, string? cardPath, string? customerPath, bool forgetPlace, CommonChoices choices, TextWriter output, TextWriter error)
    {
        FitInputs inputs = FitInputs.Read(logs, rigPath, sheetPath, forgetPlace, choices);
        FitReport report = Fit(inputs.Import, (inputs.Rig, FitInputs.Source(inputs.RigFile)),
            inputs.Sheet is FlightSheet sheet ? (sheet, FitInputs.Source(inputs.SheetFile!)) : null, cardPath is null ? null : InputFiles.Card(cardPath), inputs.Options);
        OutputFiles.Deliver(choices, output,
            () => choices.Quiet ? ReportText.FitBrief(report, choices.Style) : ReportText.Fit(report, choices.Style),
            () => ReportJson.Fit(report),
            () => ReportPage.Fit(report with { Carried = inputs.Carriable }, choices.Style, inputs.Pack(ReportJson.Fit(report))),
            () => ReportMarkdown.Fit(report, choices.Style));
        if (customerPath is not null)
            WriteCustomerPage(customerPath, report, choices);
        if (inputs.FromReport)
            SayWhetherItAgrees(inputs, report, error);
        int code = CodeOf(report.Analysis);
        if (code != ExitCode.Done && !choices.Quiet)
            error.WriteLine("trimfit: the data cannot answer the whole question (exit 4); what could be found is in the result.");
        return code;
    }

    /// <summary>One flight from its files to its result.</summary>
    public static FitReport Fit(IReadOnlyList<string> logs, (Rig Rig, SourceFile File) machine, string? sheetPath, CommonChoices choices) =>
        Fit(InputFiles.Flight(logs, choices, machine.Rig.Log), machine, sheetPath is null ? null : InputFiles.Sheet(sheetPath), null, choices.TrimOptions);

    private static FitReport Fit(FlightImport import, (Rig Rig, SourceFile File) machine, (FlightSheet Sheet, SourceFile File)? sheet, CardPromise? promise, TrimOptions options)
    {
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
        TrimAnalysis analysis = TrimAnalysis.Run(import.Flight, machine.Rig, options, import.Legs.AsSpan());
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

    private static void WriteCustomerPage(string path, FitReport report, CommonChoices choices)
    {
        ReportDocument document = ReportDocuments.Customer(ReportDocuments.CustomerOf(report, choices.Style), choices.Style);
        bool markdown = Path.GetExtension(path).Equals(".md", StringComparison.OrdinalIgnoreCase);
        OutputFiles.Write("--customer", path, markdown ? ReportMarkdown.Of(document) : Page.Render(document, new() { Compact = true }));
    }

    /// <summary>Says it on standard error: the result itself is on standard output as for any log.</summary>
    private static void SayWhetherItAgrees(FitInputs inputs, FitReport report, TextWriter error)
    {
        if (inputs.Before is not string before)
        {
            error.WriteLine("trimfit: run again from the report with something overruled, so its result is not compared.");
            return;
        }
        ResultComparison comparison = ResultComparison.Of(before, ReportJson.Fit(report));
        string tolerance = FormattableString.Invariant($"{ResultComparison.RelativeTolerance * 100} %");
        if (comparison.Agrees)
        {
            error.WriteLine($"trimfit: run again from the report; this version agrees with it (every number within {tolerance}).");
            return;
        }
        error.WriteLine($"trimfit: run again from the report; this version DIFFERS from it in {comparison.Differences.Length.ToString(System.Globalization.CultureInfo.InvariantCulture)} places (numbers by more than {tolerance}), first:");
        foreach (string difference in comparison.Differences.Take(8))
            error.WriteLine("trimfit:   " + difference);
    }

    /// <summary>Exit code of a result: balanced needs no travel, every other verdict is an answer only with one.</summary>
    public static int CodeOf(TrimAnalysis analysis) => analysis.Verdict.Code switch
    {
        VerdictCode.Insufficient => ExitCode.NoAnswer,
        VerdictCode.Balanced => ExitCode.Done,
        _ => analysis.Verdict.TravelGiven ? ExitCode.Done : ExitCode.NoAnswer,
    };
}
