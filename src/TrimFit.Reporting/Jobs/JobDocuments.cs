using System.Globalization;
using TrimFit.Core.Statistics;
using TrimFit.Core.Workshop;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Jobs;

/// <summary>Job, list, history and memory as documents.</summary>
public static class JobDocuments
{
    /// <summary>A job.</summary>
    /// <param name="report">The job.</param>
    /// <param name="style">Units and culture.</param>
    public static ReportDocument Job(JobReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return Job(report, style.Words, new Numbers(style));
    }

    /// <summary>What a job can fill into the page a workshop hands over.</summary>
    /// <param name="report">The job with the readings before and after.</param>
    /// <param name="style">Units and culture.</param>
    public static CustomerPage CustomerOf(JobCustomerReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        var numbers = new Numbers(style);
        JobRecord job = report.Job;
        JobWords w = style.Words.Jobs;
        ResultRecord[] fits = [.. job.Results.Where(r => r.Kind == ResultRecord.FitKind)];
        SignatureRecord? signature = job.IsSigned ? job.Signatures[^1] : null; // an older one is not for the machine as it is now
        return new()
        {
            Machine = job.Machine,
            Customer = job.Customer.Length > 0 ? job.Customer : null,
            Wing = WingOf(job) is { Length: > 0 } wing ? wing : null,
            Date = signature is null ? null : Date(signature.Date),
            Complaint = job.Complaint,
            Checks = [.. job.Checks.Select(c => new CheckItem(w.CheckLine(c, numbers), c.Outcome != CheckOutcome.NotDone))],
            Measured = fits.Length == 0 ? null : w.Measured(fits[0], fits.Length > 1 ? fits[^1] : null, numbers),
            Changed = job.Adjustments.IsEmpty ? null : w.Changed(job.Adjustments, numbers),
            Readings =
            [
                .. report.Before.Select(b => new CustomerReading(w.ReadingName(b.Key), w.ReadingValue(b, numbers),
                    report.After.FirstOrDefault(a => a.Key == b.Key) is ReadingRecord after ? w.ReadingValue(after, numbers) : null)),
            ],
            PartMoved = !job.Adjustments.IsEmpty,
            SpacingChanged = job.Adjustments.Any(a => a.Kind == Core.Rigging.AdjustmentKind.CarabinerOneSide),
            SignedBy = signature is null ? null : w.SignedAs(signature),
        };
    }

    internal static ReportDocument Job(JobReport report, Words words, Numbers numbers)
    {
        JobRecord job = report.Job;
        JobWords w = words.Jobs;
        Labels l = words.Labels;
        var document = new DocumentBuilder(words);
        document.Answer(w.Answer(job, numbers));
        document.Table([new(l.Quantity, false), new(l.Value, false)],
            new (string Name, string Text)[] { (w.Machine, job.Machine), (w.Customer, job.Customer), (w.Wing, WingOf(job)), (w.Complaint, job.Complaint), (w.Opened, Date(job.Opened)) }
                .Where(r => r.Text.Length > 0).Select(r => (IReadOnlyList<string>)[r.Name, r.Text]));
        document.Heading(w.Checks);
        document.Table([new(w.Date, false), new(w.Check, false), new(w.Outcome, false), new(w.Found), new(w.By, false), new(w.Notes, false)],
            job.Checks.Select(c => (IReadOnlyList<string>)[Date(c.Made), w.CheckName(c.Code), w.OutcomeOf(c.Outcome), c.Value is double v ? numbers.Tick(v) + " " + c.Unit : "", c.By, c.Note]));
        document.Heading(w.Setups);
        document.Table([new(w.Setup), new(w.Date, false), new(w.What, false), new(w.RigFile, false)],
            job.Setups.Select(s => (IReadOnlyList<string>)[numbers.Integer(s.Number), Date(s.Made), Join(w.SetupOrigin(s), s.Note), $"{s.RigName} {Short(s.RigSha256)}"]));
        document.Heading(w.Flights);
        document.Table([new(w.Flight), new(w.Date, false), new(w.Setup), new(w.Files, false)],
            job.Flights.Select(f => (IReadOnlyList<string>)
                [numbers.Integer(f.Number), Date(f.Flown ?? f.Added), numbers.Integer(f.Setup), string.Join(", ", f.Inputs.Select(i => $"{i.Name} ({w.Role(i.Role)}, {Short(i.Sha256)})"))]));
        document.Heading(w.Results);
        document.Table([new(w.Flight), new(w.Turn), new(l.Range95), new(w.Verdict, false), new(l.ProgramVersion, false)],
            job.Results.Select(r => (IReadOnlyList<string>)
                [numbers.Integer(r.Flight), Rate(r.RateRadPerSec, numbers), Range(r.RateInterval95, words, numbers), w.VerdictWord(r.Verdict), r.ProgramVersion]));
        document.Heading(w.Adjustments);
        document.Table([new(w.Date, false), new(l.PartToMove, false), new(l.Travel), new(w.Recommended), new(w.Readings, false), new(w.By, false)],
            job.Adjustments.Select(a => (IReadOnlyList<string>)
            [
                Date(a.Made), words.PartShort(a.Kind), words.Travel(a.Travel, FitFacts.UnitOf(a.Kind), numbers),
                a.Recommended is double d ? words.Travel(d, FitFacts.UnitOf(a.Kind), numbers) : "", Readings(a.Readings, w, numbers), a.By,
            ]));
        document.Heading(w.Notes);
        document.List(job.Notes.Select(n => $"{Date(n.Made)}: {n.Text}"));
        document.Heading(w.Signatures);
        document.Table([new(w.Date, false), new(w.SignedBy, false), new(w.Setup), new(w.Readings, false), new(w.Notes, false)],
            job.Signatures.Select(s => (IReadOnlyList<string>)[Date(s.Date), s.Name, numbers.Integer(s.Setup), Readings(s.Readings, w, numbers), s.Note]));
        if (!job.Signatures.IsEmpty)
            document.Paragraph(w.SignatureIsTheirs);
        document.Cautions(Cautions.For(CautionPlaces.ComplaintSheet | CautionPlaces.HangCheckSheet | Cautions.PlacesOf(job.Adjustments.Select(a => a.Kind))), numbers);
        return document.Build(w.JobTitle(job.Number), job.Machine);
    }

    internal static ReportDocument List(JobListReport report, Words words, Numbers numbers)
    {
        JobWords w = words.Jobs;
        var document = new DocumentBuilder(words);
        document.Answer(w.ListAnswer(report.Jobs.Length, report.Jobs.Sum(j => j.Flights), report.BookBytes, numbers));
        document.Table([new(w.Job), new(w.Opened, false), new(w.Machine, false), new(w.Customer, false), new(w.Wing, false), new(w.Flights), new(w.Turn), new(w.Verdict, false), new(w.State, false)],
            report.Jobs.Select(j => (IReadOnlyList<string>)
            [
                numbers.Integer(j.Number), Date(j.Opened), Cut(j.Machine), Cut(j.Customer), Cut(j.Wing), numbers.Integer(j.Flights), Rate(j.RateRadPerSec, numbers),
                j.Verdict is string v ? w.VerdictWord(v) : "", j.IsSigned ? w.Signed : w.Unsigned,
            ]));
        return document.Build(w.ListTitle, "");
    }

    internal static ReportDocument History(JobHistoryReport report, Words words, Numbers numbers)
    {
        JobWords w = words.Jobs;
        var document = new DocumentBuilder(words);
        foreach (JobRecord job in report.Jobs)
        {
            if (report.Jobs[0] == job)
                document.Answer(w.Answer(job, numbers));
            else
                document.Heading(w.Answer(job, numbers));
            document.Table([new(w.Time, false), new(w.What, false)],
                JobEvent.Of(job).Select(e => (IReadOnlyList<string>)[e.At.ToString("yyyy-MM-dd HH:mm", CultureInfo.InvariantCulture), w.Event(e, numbers)]));
        }
        document.Cautions(Cautions.For(CautionPlaces.Everywhere), numbers);
        return document.Build(w.HistoryTitle, "");
    }

    internal static ReportDocument Memory(ShopMemoryReport report, Words words, Numbers numbers)
    {
        JobWords w = words.Jobs;
        Labels l = words.Labels;
        var document = new DocumentBuilder(words);
        document.Answer(w.Memory(report.Memory, report.Measured.Length, numbers));
        document.Table([new(w.Job), new(w.Wing, false), new("m²"), new(numbers.MassUnit), new(l.Source, false), new(numbers.SensitivityUnit), new(l.Range95)],
            report.Measured.Select(m =>
            {
                var interval = new ConfidenceInterval(Math.Exp(m.LogMedian - (1.96 * m.LogSd)), Math.Exp(m.LogMedian + (1.96 * m.LogSd)), 0.95);
                return (IReadOnlyList<string>)
                [
                    numbers.Integer(m.Job), m.WingId, m.WingAreaM2 is double a ? numbers.Plain(a, 1) : "", numbers.MassNumber(m.SuspendedKg), words.SensitivitySource(m.Source),
                    numbers.SensitivityNumber(Math.Exp(m.LogMedian)), numbers.SensitivityNumber(interval.Lower) + l.To + numbers.SensitivityNumber(interval.Upper),
                ];
            }));
        document.List((report.Memory?.SetAside ?? []).Select(s => w.SetAside(s, numbers)));
        document.Cautions(Cautions.For(CautionPlaces.Everywhere), numbers);
        return document.Build(w.MemoryTitle, "");
    }

    internal static string Date(DateTimeOffset time) => time.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture);

    internal static string Date(DateOnly date) => date.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture);

    internal static string Short(string sha256) => sha256[..8];

    internal static string WingOf(JobRecord job) => Join(job.Wing, job.WingId);

    private static string Rate(double? rate, Numbers numbers) => rate is double r ? numbers.RateNumber(r) : "";

    private static string Range(ConfidenceInterval? interval, Words words, Numbers numbers) => interval is ConfidenceInterval i ? numbers.RateRange(i, words.Labels.To) : "";

    internal static string Readings(IEnumerable<ReadingRecord> readings, JobWords words, Numbers numbers) => string.Join(", ", readings.Select(r => words.Reading(r, numbers)));

    private static string Join(params string[] parts) => string.Join("; ", parts.Where(p => p.Length > 0));

    private static string Cut(string text) => text.Length <= 28 ? text : text[..27] + "…";
}
