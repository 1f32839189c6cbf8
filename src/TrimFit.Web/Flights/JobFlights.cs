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
using TrimFit.Reporting;
using TrimFit.Reporting.Wording;
using TrimFit.Web.Steps;

namespace TrimFit.Web.Flights;

/// <summary>A worked-out flight on its way into the job book, as <c>job add</c> keeps it.</summary>
internal static class JobFlights
{
    /// <summary>Keeps the flight; with <paramref name="forgetPlace"/> the log loses its positions first and is worked out again from what is kept.</summary>
    /// <exception cref="JobBookException">The book refuses.</exception>
    /// <exception cref="LogFormatException">The log without positions cannot be read.</exception>
    public static Answer Keep(Desk desk, long number, DroppedFlight flight, Answer answer, bool forgetPlace)
    {
        ImmutableArray<KeptFile> logs = [.. flight.Logs.Select(l => new KeptFile(InputRecord.Log, l.Name, File.ReadAllBytes(l.Path)))];
        KeptFile? sheet = flight.Sheet is (string sheetName, byte[] bytes) ? new(InputRecord.Sheet, sheetName, bytes) : null;
        var rig = new KeptFile(InputRecord.Rig, answer.Rig.Name, answer.Rig.Bytes);
        if (forgetPlace && LogWithoutPlace.HasPlace(answer.Report.Import.Flight))
        {
            byte[] placeless = LogWithoutPlace.Write(answer.Report.Import.Flight);
            logs = [new KeptFile(InputRecord.LogWithoutPlace, LogWithoutPlace.FileName, placeless)];
            FlightImport import = FlightReader.Read([LogSource.FromBytes(LogWithoutPlace.FileName, placeless)]);
            if (answer.Sheet is FlightSheet told)
            {
                SheetedFlight sheeted = SheetLegs.Apply(import.Flight, told);
                import = import with { Flight = sheeted.Flight, Legs = sheeted.Legs, Diagnostics = import.Diagnostics with { Warnings = [.. import.Diagnostics.Warnings, .. sheeted.Warnings] } };
            }
            TrimAnalysis again = TrimAnalysis.Run(import.Flight, answer.Rig.Rig!, answer.Report.Analysis.Options, import.Legs.AsSpan());
            FitReport report = answer.Report with { Analysis = again, Import = import };
            answer = answer with { Report = report, Json = ReportJson.Fit(report), WhatIf = new WhatIf(again) };
        }
        using JobBook book = desk.Book(BookAccess.Write);
        JobRecord job = book.Job(number);
        string rigHash = answer.Rig.Source.Sha256;
        SetupRecord? setup = job.Setups.LastOrDefault(s => s.RigSha256 == rigHash);
        ImmutableArray<KeptFile> inputs = sheet is null ? logs : [.. logs, sheet];
        TrimAnalysis analysis = answer.Report.Analysis;
        FlightRecord kept = book.AddFlight(number, new NewFlight
        {
            Setup = setup?.Number ?? 0,
            NewRig = setup is null ? rig : null,
            Flown = answer.Report.Import.Flight.StartUtc is DateTimeOffset start ? start.AddTicks(-(start.Ticks % TimeSpan.TicksPerMillisecond)) : null,
            Inputs = inputs,
            Result = new NewResult
            {
                Record = new ResultRecord
                {
                    Number = 0,
                    Made = default,
                    Kind = ResultRecord.FitKind,
                    Flight = 0,
                    ProgramVersion = desk.Provenance.ProgramVersion,
                    Options = OptionWords(analysis.Options, logs[0].Role == InputRecord.Log ? flight.Rules : []),
                    Sha256 = "",
                    Verdict = Snake.Of(analysis.Verdict.Code.ToString()),
                    Strength = Snake.Of(analysis.Verdict.Strength.ToString()),
                    RateRadPerSec = analysis.Pull.AtBalance.RateRadPerSec,
                    RateInterval95 = analysis.Pull.AtBalance.Interval95,
                    Sensitivities =
                    [
                        .. MeasuredSensitivity.From(analysis, number, job.WingId).Select(m => new SensitivityRecord
                        {
                            Source = m.Source, LogMedian = m.LogMedian, LogSd = m.LogSd, WingAreaM2 = m.WingAreaM2, SuspendedKg = m.SuspendedKg,
                        }),
                    ],
                },
                Json = Encoding.UTF8.GetBytes(answer.Json),
                Inputs = [.. inputs, rig],
            },
        }, desk.Now);
        return answer with { Kept = (number, kept.Number) };
    }

    /// <summary>The choices as the words of the command line, so that a result can be made again.</summary>
    private static string OptionWords(TrimOptions options, ImmutableArray<ColumnRule> rules)
    {
        CultureInfo plain = CultureInfo.InvariantCulture;
        var words = new StringBuilder().Append(plain, $"--balance-thrust {Snake.Of(options.BalanceThrust.Kind.ToString())} --tolerance {Math.Round(options.Tolerance.DegPerSec, 9)} --seed {options.Seed}");
        foreach (ColumnRule rule in rules)
            words.Append(plain, $" --column {ChannelRoles.NameOf(rule.Role)}={rule.Name}{(rule.Unit is null ? "" : ":" + rule.Unit)}");
        return words.ToString();
    }
}
