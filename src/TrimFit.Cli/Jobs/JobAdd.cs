using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;
using TrimFit.Import;
using TrimFit.Import.Places;
using TrimFit.Jobs;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Jobs;

namespace TrimFit.Cli;

/// <summary>What <c>job add</c> was given.</summary>
internal sealed record AddRequest
{
    public required string[] Logs { get; init; }
    public required string? Sheet { get; init; }
    public required string? Rig { get; init; }
    public required int? Setup { get; init; }
    public required string WingId { get; init; }
    public required bool ForgetPlace { get; init; }
    public required bool WithMemory { get; init; }
}

/// <summary><c>job add</c>: the analysis of <c>fit</c> on what is then kept.</summary>
internal static class JobAdd
{
    public static int Run(JobChoices choices, long number, AddRequest request, TextWriter output)
    {
        if (request.Rig is not null && request.Setup is not null)
            throw new CommandLineException("job add: --rig and --setup both say how the machine was. Give one of them.");
        ImmutableArray<KeptFile> logs = KeptFlight.Logs(request.Logs);
        KeptFile? sheet = request.Sheet is null ? null : InputFiles.SheetBytes(request.Sheet);
        KeptFile? newRig = request.Rig is null ? null : JobWork.RigFile(request.Rig).File;
        using JobBook book = choices.Open(BookAccess.Write);
        JobRecord job = book.Job(number);
        SetupRecord? setup = request.Setup is int wanted
            ? job.Setups.FirstOrDefault(s => s.Number == wanted) ?? throw new JobBookException($"Job {Text(number)} has no setup {Text(wanted)}. \"trimfit job show {Text(number)}\" shows those it has.")
            : newRig is null ? JobWork.CurrentSetup(job) : null;
        KeptFile rigFile = newRig ?? JobWork.RigOf(book, setup!);
        Rig rig = JobWork.ReadRig(rigFile);

        FlightImport import = Read(logs, request.ForgetPlace ? null : sheet, rig, choices.Common.Columns, choices.Common);
        if (request.ForgetPlace)
        {
            // What is kept is what is analysed: the flight is read again from the log that has no coordinates.
            logs = [new KeptFile(InputRecord.LogWithoutPlace, LogWithoutPlace.FileName, LogWithoutPlace.Write(import.Flight))];
            import = Read(logs, sheet, rig, [], choices.Common);
        }
        string wingId = request.WingId.Length > 0 ? request.WingId : job.WingId;
        ShopMemory? memory = request.WithMemory ? MemoryFor(book, number, rig) : null;
        TrimAnalysis analysis = TrimAnalysis.Run(import.Flight, rig, choices.Common.TrimOptions with { ShopMemory = memory }, import.Legs.AsSpan());
        var report = new FitReport
        {
            Analysis = analysis,
            Import = import,
            RigFile = Source(rigFile),
            SheetFile = sheet is null ? null : Source(sheet),
            Provenance = ProgramVersion.Provenance,
        };
        string json = ReportJson.Fit(report);
        ImmutableArray<KeptFile> inputs = sheet is null ? logs : [.. logs, sheet];
        var result = new NewResult
        {
            Record = RecordOf(analysis, OptionWords(choices.Common, memory), number, wingId),
            Json = Encoding.UTF8.GetBytes(json),
            Inputs = [.. inputs, rigFile],
        };
        DateTimeOffset now = JobChoices.Now;
        FlightRecord kept = book.AddFlight(number, new NewFlight
        {
            Setup = setup?.Number ?? 0,
            NewRig = newRig,
            Flown = import.Flight.StartUtc is DateTimeOffset start ? start.AddTicks(-(start.Ticks % TimeSpan.TicksPerMillisecond)) : null,
            WingId = request.WingId,
            Inputs = inputs,
            Result = result,
        }, now);
        string acknowledged = JobReportText.Kept(new JobEvent.Flown(kept), number, choices.Common.Style);
        if (choices.Common.Json == "-")
            choices.Error.Write("trimfit: " + acknowledged);
        else
            output.Write(acknowledged);
        output.Flush(); // what is said to be kept is kept, whatever happens to this program from here on
        OutputFiles.Deliver(choices.Common, output,
            () => choices.Common.Quiet ? ReportText.FitBrief(report, choices.Common.Style) : ReportText.Fit(report, choices.Common.Style),
            () => json, () => ReportPage.Fit(report, choices.Common.Style), () => ReportMarkdown.Fit(report, choices.Common.Style));
        return FitCommand.CodeOf(analysis);
    }

    /// <summary>What the workshop's other jobs say about this machine's wing.</summary>
    public static ShopMemory? MemoryFor(JobBook book, long job, Rig rig) =>
        ShopMemory.Of(book.Sensitivities().Where(s => s.Job != job), rig.Wing.AreaM2, rig.Mass.PilotKg.Value + rig.Mass.PassengerKg.Value
            + rig.Mass.PowerUnitKg.Value + rig.Mass.FuelKg.Value + rig.Mass.WheelsKg.Value);

    /// <summary>The summary of a result, as the book keeps it beside the JSON.</summary>
    public static ResultRecord RecordOf(TrimAnalysis analysis, string options, long job, string wingId) => new()
    {
        Number = 0,
        Made = default,
        Kind = ResultRecord.FitKind,
        Flight = 0,
        ProgramVersion = ProgramVersion.Provenance.ProgramVersion,
        Options = options,
        Sha256 = "",
        Verdict = CommandWords.Of(analysis.Verdict.Code),
        Strength = CommandWords.Of(analysis.Verdict.Strength),
        RateRadPerSec = analysis.Pull.AtBalance.RateRadPerSec,
        RateInterval95 = analysis.Pull.AtBalance.Interval95,
        Sensitivities = [.. Records(MeasuredSensitivity.From(analysis, job, wingId))],
    };

    /// <summary>What a result measured, as the book keeps it.</summary>
    public static IEnumerable<SensitivityRecord> Records(IEnumerable<MeasuredSensitivity> measured) => measured.Select(m => new SensitivityRecord
    {
        Source = m.Source,
        LogMedian = m.LogMedian,
        LogSd = m.LogSd,
        WingAreaM2 = m.WingAreaM2,
        SuspendedKg = m.SuspendedKg,
    });

    /// <summary>Stands between the words of two options: names of columns may hold anything else.</summary>
    public const char OptionSeparator = '\n';

    /// <summary>The choices as the words of the command line, so that a result can be made again.</summary>
    public static string OptionWords(CommonChoices choices, ShopMemory? memory)
    {
        CultureInfo plain = CultureInfo.InvariantCulture;
        string balance = choices.Balance.Kind == BalanceThrustKind.Newtons ? choices.Balance.Newtons.ToString("R", plain) : CommandWords.Of(choices.Balance.Kind);
        var words = new StringBuilder().Append(plain, $"--balance-thrust {balance}{OptionSeparator}--tolerance {Math.Round(choices.Tolerance.DegPerSec, 9)}{OptionSeparator}--seed {choices.TrimOptions.Seed}");
        foreach (ColumnRule rule in choices.Columns)
            words.Append(plain, $"{OptionSeparator}--column {ChannelRoles.NameOf(rule.Role)}={rule.Name}{(rule.Unit is null ? "" : ":" + rule.Unit)}");
        if (memory is not null)
            words.Append(plain, $"{OptionSeparator}shop_memory: {memory.Wings} wings, log_median {memory.LogMedian:R}, log_sd {memory.LogSd:R}");
        return words.ToString();
    }

    internal static SourceFile Source(KeptFile file) => new(file.Name, Convert.ToHexStringLower(System.Security.Cryptography.SHA256.HashData(file.Bytes.Span)));

    /// <summary>Reads a flight that is kept or about to be. A log without its place names its columns itself.</summary>
    public static FlightImport Read(ImmutableArray<KeptFile> logs, KeptFile? sheet, Rig rig, ImmutableArray<ColumnRule> told, CommonChoices choices)
    {
        // The command line speaks before the rig file: a role named there is not looked up again.
        ImmutableArray<ColumnRule> columns = logs.Any(l => l.Role == InputRecord.LogWithoutPlace) ? []
            : [.. told, .. rig.Log.Columns.Where(r => !told.Any(c => c.Role == r.Role))];
        return KeptFlight.Read(logs, sheet, new ImportOptions { Columns = columns, Strict = choices.Strict, Progress = choices.Quiet ? null : ReadingProgress.ForTerminal() });
    }

    private static string Text(long number) => number.ToString(CultureInfo.InvariantCulture);
}
