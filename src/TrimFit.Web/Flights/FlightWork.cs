using System.Collections.Immutable;
using System.Security.Cryptography;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Import;
using TrimFit.Import.Sheets;
using TrimFit.Reporting;
using TrimFit.Web.Sessions;

namespace TrimFit.Web.Flights;

/// <summary>From dropped files to what was recognised, and on to the answer: the calls of <c>inspect</c> and <c>fit</c>.</summary>
internal static class FlightWork
{
    /// <summary>Reads the files and says what was recognised. A file that cannot be read becomes a problem, not a fault.</summary>
    public static DroppedFlight Recognise(DroppedFlight flight, LoggerMemory memory, WorkProgress progress, CancellationToken cancel)
    {
        progress.Set("reading", 0);
        try
        {
            IReadOnlyList<LogSource> sources = Uploads.Sources(flight.Logs);
            ImmutableArray<LogPreview> previews = [.. sources.Select(s => LogPreview.Of(s))];
            flight = flight with { Previews = previews };
            if (flight.Rules.IsEmpty && memory.Recall(LoggerMemory.KeyOf(previews)) is { IsEmpty: false } remembered)
                flight = flight with { Rules = remembered, RulesRemembered = true };
            FlightImport import = Read(sources, flight, rig: null, progress, cancel);
            return flight with { Recognised = new(import.Diagnostics, SensorReport.Of(import.Flight)), Problem = "" };
        }
        catch (LogFormatException e)
        {
            return flight with { Recognised = null, Problem = e.Message };
        }
    }

    /// <summary>Works the flight out.</summary>
    /// <exception cref="LogFormatException">A file cannot be read.</exception>
    public static Answer Fit(DroppedFlight flight, RigDraft draft, TrimOptions options, int number, Provenance provenance, WorkProgress progress, CancellationToken cancel)
    {
        Rig rig = draft.Rig ?? throw new InvalidOperationException("a flight needs a machine without faults");
        progress.Set("reading", 0);
        FlightImport import = Read(Uploads.Sources(flight.Logs), flight, rig.Log, progress, cancel);
        FlightSheet? sheet = flight.Sheet is (string sheetName, byte[] bytes) ? FlightSheetReader.Read(sheetName, Uploads.Utf8(sheetName, bytes)) : null;
        if (sheet is not null)
        {
            SheetedFlight sheeted = SheetLegs.Apply(import.Flight, sheet);
            import = import with
            {
                Flight = sheeted.Flight,
                Legs = sheeted.Legs,
                Diagnostics = import.Diagnostics with { Warnings = [.. import.Diagnostics.Warnings, .. sheeted.Warnings] },
            };
        }
        progress.Set("measuring", -1);
        TrimAnalysis analysis = TrimAnalysis.Run(import.Flight, rig, options, import.Legs.AsSpan());
        var report = new FitReport
        {
            Analysis = analysis,
            Import = import,
            RigFile = draft.Source,
            SheetFile = flight.Sheet is (string name, byte[] content) ? new(name, Convert.ToHexStringLower(SHA256.HashData(content))) : null,
            Provenance = provenance,
        };
        return new Answer { Number = number, Report = report, Json = ReportJson.Fit(report), WhatIf = new WhatIf(analysis), Rig = draft, Sheet = sheet };
    }

    private static FlightImport Read(IReadOnlyList<LogSource> sources, DroppedFlight flight, LogSettings? rig, WorkProgress progress, CancellationToken cancel)
    {
        // What was said on the page comes before the rig file: a role named there is not looked up again.
        ImmutableArray<ColumnRule> fromRig = rig is null ? [] : [.. rig.Columns.Where(r => !flight.Rules.Any(c => c.Role == r.Role))];
        return FlightReader.Read(sources, new ImportOptions
        {
            Columns = [.. flight.Rules, .. fromRig],
            Progress = share =>
            {
                cancel.ThrowIfCancellationRequested();
                progress.Set("reading", share);
            },
        });
    }
}
