using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;
using TrimFit.Jobs;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Jobs;

namespace TrimFit.Cli;

/// <summary><c>job compare</c>: the flights of a job by their setups, from the bytes that the book keeps.</summary>
internal static class JobCompare
{
    public static int Run(JobChoices choices, long number, string? flightsText, ChangedPart? changed, FlightScatter scatter, TextWriter output)
    {
        using JobBook book = choices.Open(BookAccess.Write);
        JobRecord job = book.Job(number);
        ImmutableArray<FlightRecord> flights = Chosen(job, flightsText);
        if (flights.Select(f => f.Setup).Distinct().Count() < 2)
            throw new CommandLineException($"job compare: the flights of job {Text(number)} have one setup. Write the change down (trimfit job adjust), fly again and add that flight.");
        TrimOptions trim = choices.Common.TrimOptions;
        var fits = ImmutableArray.CreateBuilder<FitReport>();
        var compared = ImmutableArray.CreateBuilder<ComparedFlight>();
        var inputs = ImmutableArray.CreateBuilder<KeptFile>();
        foreach (FlightRecord flight in flights)
        {
            SetupRecord setup = job.Setups.Single(s => s.Number == flight.Setup);
            KeptFile rigFile = JobWork.RigOf(book, setup);
            ImmutableArray<KeptFile> kept = [.. flight.Inputs.Select(i => new KeptFile(i.Role, i.Name, book.Content(i.Sha256)))];
            KeptFile? sheet = kept.FirstOrDefault(k => k.Role == InputRecord.Sheet);
            Rig rig = JobWork.ReadRig(rigFile);
            FlightImport import = JobAdd.Read([.. kept.Where(k => k.Role != InputRecord.Sheet)], sheet, rig, ColumnsOf(job, flight), choices.Common);
            TrimAnalysis analysis = TrimAnalysis.Run(import.Flight, rig, trim, import.Legs.AsSpan());
            fits.Add(new()
            {
                Analysis = analysis,
                Import = import,
                RigFile = JobAdd.Source(rigFile),
                SheetFile = sheet is null ? null : JobAdd.Source(sheet),
                Provenance = ProgramVersion.Provenance,
            });
            FlightSheet? read = sheet is null ? null : KeptFlight.ReadSheet(sheet);
            compared.Add(new()
            {
                Name = string.Join(" + ", kept.Where(k => k.Role != InputRecord.Sheet).Select(k => k.Name)),
                Setup = $"setup {Text(flight.Setup)}",
                Analysis = analysis,
                Sheet = read,
                Date = read?.Date ?? (flight.Flown is DateTimeOffset flown ? DateOnly.FromDateTime(flown.Date) : null),
            });
            string before = flight.Setup == flights[^1].Setup ? "" : InputRecord.Before;
            inputs.AddRange(kept.Append(rigFile).Select(k => k with { Role = before + k.Role }));
        }
        ShopMemory? memory = JobAdd.MemoryFor(book, number, fits[^1].Analysis.Rig);
        FlightComparison comparison = FlightComparison.Run(compared.ToImmutable(), new()
        {
            Trim = trim with { ShopMemory = memory },
            Changed = changed ?? ChangedBy(job, flights),
            Scatter = scatter,
        });
        var report = new CompareReport { Comparison = comparison, Flights = fits.ToImmutable(), Provenance = ProgramVersion.Provenance };
        string json = ReportJson.Compare(report);
        TrimAnalysis? next = comparison.Next;
        ResultRecord result = book.AddResult(number, new NewResult
        {
            Json = Encoding.UTF8.GetBytes(json),
            Inputs = inputs.ToImmutable(),
            Record = new()
            {
                Number = 0,
                Made = default,
                Kind = ResultRecord.CompareKind,
                Flight = flights[^1].Number,
                ProgramVersion = ProgramVersion.Provenance.ProgramVersion,
                Options = JobAdd.OptionWords(choices.Common, memory),
                Sha256 = "",
                Verdict = comparison.Verdict is ComparisonVerdict v ? CommandWords.Of(v.Code) : CommandWords.Of(VerdictCode.Insufficient),
                Strength = CommandWords.Of(next?.Verdict.Strength ?? VerdictStrength.None),
                RateRadPerSec = next?.Pull.AtBalance.RateRadPerSec,
                RateInterval95 = next?.Pull.AtBalance.Interval95,
                Sensitivities = next is null ? [] : [.. JobAdd.Records(MeasuredSensitivity.From(next, number, job.WingId).Where(m => m.Source == "pair"))],
            },
        }, JobChoices.Now);
        if (choices.Common.Json == "-")
            choices.Error.Write("trimfit: " + JobReportText.Kept(new JobEvent.Found(result), number, choices.Common.Style));
        else
            output.Write(JobReportText.Kept(new JobEvent.Found(result), number, choices.Common.Style));
        output.Flush();
        OutputFiles.Deliver(choices.Common, output,
            () => choices.Common.Quiet ? ReportText.CompareBrief(report, choices.Common.Style) : ReportText.Compare(report, choices.Common.Style),
            () => json, () => ReportPage.Compare(report, choices.Common.Style), () => ReportMarkdown.Compare(report, choices.Common.Style));
        return CompareCommand.CodeOf(comparison);
    }

    /// <summary>What was changed by the adjustments between the first and the last flight, when they say one thing.</summary>
    private static ChangedPart? ChangedBy(JobRecord job, ImmutableArray<FlightRecord> flights)
    {
        int first = flights.Min(f => f.Setup), last = flights.Max(f => f.Setup);
        ChangedPart[] parts = [.. job.Adjustments.Where(a => a.FromSetup >= first && a.ToSetup <= last).Select(a => a.Kind switch
        {
            AdjustmentKind.Trimmer => ChangedPart.Trimmers,
            AdjustmentKind.BrakeLine => ChangedPart.BrakeLines,
            AdjustmentKind.Ballast => ChangedPart.Ballast,
            _ => ChangedPart.Geometry,
        }).Distinct()];
        return parts.Length == 1 ? parts[0] : null;
    }

    private static ImmutableArray<FlightRecord> Chosen(JobRecord job, string? text)
    {
        if (text is null)
            return job.Flights;
        var flights = ImmutableArray.CreateBuilder<FlightRecord>();
        foreach (string part in text.Split(',', StringSplitOptions.TrimEntries))
        {
            flights.Add(int.TryParse(part, NumberStyles.None, CultureInfo.InvariantCulture, out int number) && job.Flights.FirstOrDefault(f => f.Number == number) is FlightRecord flight
                ? flight : throw new CommandLineException($"--flights: found \"{part}\", expected numbers of this job's flights with a comma between, such as 1,2."));
        }
        return flights.ToImmutable();
    }

    /// <summary>Columns that were named when the flight was added: its log cannot be read without them.</summary>
    private static ImmutableArray<ColumnRule> ColumnsOf(JobRecord job, FlightRecord flight)
    {
        const string Option = "--column ";
        string options = job.Results.First(r => r.Kind == ResultRecord.FitKind && r.Flight == flight.Number).Options;
        return [.. options.Split(JobAdd.OptionSeparator).Where(o => o.StartsWith(Option, StringComparison.Ordinal)).Select(o => CommonOptions.Column(o[Option.Length..]))];
    }

    private static string Text(long number) => number.ToString(CultureInfo.InvariantCulture);
}
