using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Import.Flights;
using TrimFit.Pages;
using TrimFit.Reporting;

namespace TrimFit.Cli;

/// <summary>What <c>compare</c> was asked for on the command line.</summary>
internal sealed record CompareRequest
{
    public string? List { get; init; }
    public ImmutableArray<string> Before { get; init; } = [];
    public string? BeforeRig { get; init; }
    public string? BeforeSheet { get; init; }
    public ImmutableArray<string> After { get; init; } = [];
    public string? AfterRig { get; init; }
    public string? AfterSheet { get; init; }
    public ChangedPart? Changed { get; init; }
    public FlightScatter Scatter { get; init; } = FlightScatter.Usual;
}

internal static class CompareCommand
{
    private sealed record Flight(ImmutableArray<string> Logs, string Rig, string? Sheet, string Setup);

    public static int Run(CompareRequest request, CommonChoices choices, TextWriter output, TextWriter error)
    {
        (ImmutableArray<Flight> flights, ChangedPart? changed, OpenedOrder? order) = Flights(request);
        var fits = ImmutableArray.CreateBuilder<FitReport>();
        var compared = ImmutableArray.CreateBuilder<ComparedFlight>();
        var rigs = new Dictionary<string, (Rig Rig, SourceFile File)>();
        foreach (Flight flight in flights)
        {
            if (!rigs.TryGetValue(flight.Rig, out (Rig Rig, SourceFile File) machine))
                rigs[flight.Rig] = machine = InputFiles.Rig(flight.Rig);
            FitReport fit = FitCommand.Fit(flight.Logs, machine, flight.Sheet, choices);
            FlightSheet? sheet = flight.Sheet is null ? null : InputFiles.Sheet(flight.Sheet).Sheet;
            fits.Add(fit);
            compared.Add(new()
            {
                Name = string.Join(" + ", flight.Logs.Select(Path.GetFileName)),
                Setup = flight.Setup,
                Analysis = fit.Analysis,
                Sheet = sheet,
                Date = sheet?.Date ?? (fit.Import.Diagnostics.Sampling.Start is DateTimeOffset start ? DateOnly.FromDateTime(start.Date) : null),
            });
        }
        FlightComparison comparison = FlightComparison.Run(compared.ToImmutable(), new()
        {
            Trim = choices.TrimOptions,
            Changed = request.Changed ?? changed,
            Scatter = request.Scatter,
        });
        var report = new CompareReport { Comparison = comparison, Flights = fits.ToImmutable(), Order = order, Provenance = ProgramVersion.Provenance };
        OutputFiles.Deliver(choices, output,
            () => choices.Quiet ? ReportText.CompareBrief(report, choices.Style) : ReportText.Compare(report, choices.Style),
            () => ReportJson.Compare(report), () => ReportPage.Compare(report, choices.Style), () => ReportMarkdown.Compare(report, choices.Style));
        int code = CodeOf(comparison);
        if (code != ExitCode.Done && !choices.Quiet)
            error.WriteLine("trimfit: the data cannot answer the whole question (exit 4); what could be found is in the result.");
        return code;
    }

    /// <summary>No clear change is an answer only where equality was shown; one setting is one when its pull is known.</summary>
    public static int CodeOf(FlightComparison comparison) => comparison switch
    {
        { Setups.IsEmpty: true } => ExitCode.NoAnswer,
        { Verdict: null, Setups.Length: 1, Flights: [_, ..] } when comparison.Flights.All(f => f.Setup == comparison.Setups[0].Name) => ExitCode.Done,
        { Verdict: null } => ExitCode.NoAnswer, // of the settings asked for, only one could tell
        { Verdict: { Code: ComparisonVerdictCode.NoClearChange, ShownEqual: false } } => ExitCode.NoAnswer,
        _ => ExitCode.Done,
    };

    private static (ImmutableArray<Flight> Flights, ChangedPart? Changed, OpenedOrder? Order) Flights(CompareRequest request)
    {
        bool pair = !request.Before.IsEmpty || !request.After.IsEmpty || request.BeforeRig is not null || request.AfterRig is not null
            || request.BeforeSheet is not null || request.AfterSheet is not null;
        if (request.List is string path)
        {
            if (pair)
                throw new CommandLineException($"found \"{path}\" beside --before or --after, expected one of the two. Put the flights into the list, or leave it out.");
            return Listed(path);
        }
        if (request.Before.IsEmpty || request.After.IsEmpty || request.BeforeRig is null)
            throw new CommandLineException("compare needs a list of flights, or --before LOG --before-rig RIG --after LOG --after-rig RIG. Try: trimfit compare --help");
        return (
            [
                new(request.Before, request.BeforeRig, request.BeforeSheet, "before"),
                new(request.After, request.AfterRig ?? request.BeforeRig, request.AfterSheet, "after"),
            ], null, null);
    }

    private static (ImmutableArray<Flight> Flights, ChangedPart? Changed, OpenedOrder? Order) Listed(string path)
    {
        FlightList list = FlightListReader.Read(path, InputFiles.Text(path));
        string name = Path.GetFileName(path), folder = Path.GetDirectoryName(path) ?? "";
        string Beside(string file) => Path.Join(folder, file) is var joined && Path.IsPathRooted(file) ? file : joined;
        OpenedOrder? order = null;
        if (list.SealedOrder is string sealedFile)
        {
            (string text, SourceFile source) = InputFiles.TextWithSource(Beside(sealedFile));
            SealedOrder opened = SealedOrder.Open(sealedFile, text);
            order = new(source, opened.Setups, opened.Commitment);
            if (list.Flights.Length > opened.Setups.Length)
                throw LogFormatException.At(name, list.Flights[opened.Setups.Length].Line, null, $"{list.Flights.Length} flights", $"at most the {opened.Setups.Length} of the sealed order", "Leave out what was not part of the trial.");
        }
        var flights = ImmutableArray.CreateBuilder<Flight>();
        for (int i = 0; i < list.Flights.Length; i++)
        {
            ListedFlight f = list.Flights[i];
            string setup = order?.Setups[i] ?? f.Setup!;
            string? rig = order is null ? f.Rig : list.SetupRigs.GetValueOrDefault(setup);
            if (rig is null)
                throw LogFormatException.At(name, f.Line, null, "no rig file for a setting of the sealed order", "one for each setting in [setups]", "Write the setting's word, as it was sealed, and its rig file below [setups].");
            flights.Add(new([.. f.Logs.Select(Beside)], Beside(rig), f.Sheet is string sheet ? Beside(sheet) : null, setup));
        }
        return (flights.ToImmutable(), list.Changed, order);
    }
}
