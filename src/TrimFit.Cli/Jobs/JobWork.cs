using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using TrimFit.Core.Analysis;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Jobs;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Jobs;

namespace TrimFit.Cli;

/// <summary>Verbs of <c>job</c> that only read and write the book.</summary>
internal static class JobWork
{
    public static int Open(JobChoices choices, JobRecord job, string? rigPath, string? note, TextWriter output)
    {
        KeptFile? rig = rigPath is null ? null : RigFile(rigPath).File;
        using JobBook book = choices.Open(BookAccess.Create);
        JobRecord kept = book.AddJob(job, rig, JobChoices.Now);
        if (note is not null)
            book.AddNote(kept.Number, note, JobChoices.Now);
        output.Write(choices.Common.Json == "-" ? JobText.Write(book.Job(kept.Number)) : JobReportText.Kept(new JobEvent.Opened(kept), kept.Number, choices.Common.Style));
        return ExitCode.Done;
    }

    public static int Measure(JobChoices choices, long number, string? rigPath, string[] readings, bool evenSo, string? note, TextWriter output)
    {
        if (rigPath is null && readings.Length == 0)
            throw new CommandLineException("job measure: nothing was measured. Give --rig RIG, or --reading KEY=VALUE.");
        KeptFile? given = rigPath is null ? null : RigFile(rigPath).File;
        using JobBook book = choices.Open(BookAccess.Write);
        JobRecord job = book.Job(number);
        KeptFile rig = given ?? RigOf(book, CurrentSetup(job));
        if (readings.Length > 0)
        {
            Rig before = ReadRig(rig);
            rig = WithReadings(rig, readings);
            if (!evenSo)
                RefuseContradictions(rig.Name, ReadRig(rig), before, readings, choices.Common.Style, "Read again, or write it down --even-so.");
        }
        SetupRecord setup = book.AddSetup(number, rig, note ?? "", JobChoices.Now);
        output.Write(choices.Common.Json == "-" ? JobText.Write(book.Job(number)) : JobReportText.Kept(new JobEvent.Measured(setup), number, choices.Common.Style));
        return ExitCode.Done;
    }

    public static int Show(JobChoices choices, long number, string? customerPath, TextWriter output)
    {
        if (customerPath is not null && Path.GetExtension(customerPath).ToUpperInvariant() is not (".HTML" or ".HTM" or ".MD"))
            throw new CommandLineException($"--customer: found \"{customerPath}\", expected a name that ends in .html or .md.");
        using JobBook book = choices.Open(BookAccess.Read);
        var report = new JobReport { Job = book.Job(number), Provenance = ProgramVersion.Provenance };
        if (customerPath is not null)
        {
            ImmutableArray<ReadingRecord> Readings(SetupRecord? setup) => setup is null ? [] : RigReadings.Of(ReadRig(RigOf(book, setup)));
            JobRecord job = report.Job;
            // The machine as it came: its last setup before anything was moved.
            SetupRecord? came = job.Adjustments.IsEmpty ? job.CurrentSetup : job.Setups.Single(s => s.Number == job.Adjustments[0].FromSetup);
            ReportDocument page = ReportDocuments.Customer(
                JobDocuments.CustomerOf(new JobCustomerReport { Job = job, Before = Readings(came), After = Readings(job.CurrentSetup) }, choices.Common.Style), choices.Common.Style);
            OutputFiles.Write("--customer", customerPath, Path.GetExtension(customerPath).Equals(".md", StringComparison.OrdinalIgnoreCase) ? ReportMarkdown.Of(page) : Page.Render(page, new() { Compact = true }));
        }
        OutputFiles.Deliver(choices.Common, output, () => JobReportText.Job(report, choices.Common.Style), () => JobText.Write(report.Job),
            () => JobPage.Job(report, choices.Common.Style), () => JobReportText.JobMarkdown(report, choices.Common.Style));
        return ExitCode.Done;
    }

    public static int List(JobChoices choices, bool unsignedOnly, string having, TextWriter output)
    {
        using JobBook book = choices.Open(BookAccess.Read);
        ImmutableArray<JobSummary> jobs =
        [
            .. book.List().Where(j => !(unsignedOnly && j.IsSigned)
                && (having.Length == 0 || new[] { j.Machine, j.Customer, j.Wing, j.Complaint }.Any(t => t.Contains(having, StringComparison.OrdinalIgnoreCase)))),
        ];
        var report = new JobListReport { Jobs = jobs, BookBytes = book.SizeOnDisk(), Provenance = ProgramVersion.Provenance };
        Deliver(choices, output, () => JobReportText.List(report, choices.Common.Style), () => JobListText.Write(jobs, report.BookBytes));
        return ExitCode.Done;
    }

    public static int History(JobChoices choices, long? number, string? wingId, bool memory, TextWriter output)
    {
        if (new[] { number is not null, wingId is not null, memory }.Count(x => x) != 1)
            throw new CommandLineException("job history: give one of a job's number, --wing-id TEXT or --memory.");
        using JobBook book = choices.Open(BookAccess.Read);
        if (memory)
        {
            ImmutableArray<MeasuredSensitivity> measured = book.Sensitivities();
            var shop = new ShopMemoryReport { Measured = measured, Memory = ShopMemory.Of(measured, null, ShopMemoryFacts.UsualKg), Provenance = ProgramVersion.Provenance };
            if (choices.Common.Json is not null)
                throw new CommandLineException("job history --memory: there is no JSON of it; the measurements are in \"job show JOB --json -\".");
            output.Write(JobReportText.Memory(shop, choices.Common.Style));
            return ExitCode.Done;
        }
        ImmutableArray<long> numbers = number is long one ? [one] : book.JobsOfWing(wingId!);
        if (numbers.IsEmpty)
            throw new CommandLineException($"job history: no job has a wing \"{wingId}\". \"trimfit job list\" shows the wings.");
        var report = new JobHistoryReport { Jobs = [.. numbers.Select(book.Job)], Provenance = ProgramVersion.Provenance };
        Deliver(choices, output, () => JobReportText.History(report, choices.Common.Style), () => string.Concat(report.Jobs.Select(JobText.Write)));
        return ExitCode.Done;
    }

    public static int Sign(JobChoices choices, long number, string name, string? dateText, string[] readingTexts, string? note, TextWriter output)
    {
        if (name.Trim().Length == 0)
            throw new CommandLineException("--name: found nothing, expected the name of the technician who signs.");
        DateOnly date = dateText is null ? DateOnly.FromDateTime(TimeProvider.System.GetLocalNow().Date)
            : DateOnly.TryParseExact(dateText, "yyyy-MM-dd", CultureInfo.InvariantCulture, DateTimeStyles.None, out DateOnly told) ? told
            : throw new CommandLineException($"--date: found \"{dateText}\", expected a date such as 2026-05-17.");
        using JobBook book = choices.Open(BookAccess.Write);
        JobRecord job = book.Job(number);
        SetupRecord setup = CurrentSetup(job);
        ImmutableArray<ReadingRecord> readings = readingTexts.Length > 0 ? [.. readingTexts.SelectMany(Records)] : RigReadings.Of(ReadRig(RigOf(book, setup)));
        SignatureRecord signature = book.AddSignature(number, new SignatureRecord
        {
            Made = default,
            Name = name.Trim(),
            Date = date,
            Setup = setup.Number,
            Readings = readings,
            Note = note ?? "",
        }, JobChoices.Now);
        output.Write(choices.Common.Json == "-" ? JobText.Write(book.Job(number)) : JobReportText.Kept(new JobEvent.SignedOff(signature), number, choices.Common.Style));
        return ExitCode.Done;
    }

    /// <summary>The machine as it is now.</summary>
    public static SetupRecord CurrentSetup(JobRecord job) => job.CurrentSetup
        ?? throw new JobBookException($"Job {job.Number.ToString(CultureInfo.InvariantCulture)} has no setup yet. \"trimfit job measure {job.Number.ToString(CultureInfo.InvariantCulture)} --rig RIG\" writes one down.");

    /// <summary>A rig file from disk, read and checked.</summary>
    public static (Rig Rig, KeptFile File) RigFile(string path)
    {
        (Rig rig, _) = InputFiles.Rig(path);
        return (rig, new KeptFile(InputRecord.Rig, Path.GetFileName(path), File.ReadAllBytes(path)));
    }

    /// <summary>The rig file of a setup, from the book.</summary>
    public static KeptFile RigOf(JobBook book, SetupRecord setup) => new(InputRecord.Rig, setup.RigName, book.Content(setup.RigSha256));

    /// <summary>The rig in a kept file.</summary>
    public static Rig ReadRig(KeptFile file) => RigFileReader.Read(file.Name, Encoding.UTF8.GetString(file.Bytes.Span));

    /// <summary>A rig file with readings written into it, read again so that a contradiction is found at once.</summary>
    public static KeptFile WithReadings(KeptFile rig, IEnumerable<string> readings)
    {
        string written = RigFileEditor.Write(rig.Name, Encoding.UTF8.GetString(rig.Bytes.Span), Taken(readings));
        RigFileReader.Read(rig.Name, written);
        return rig with { Bytes = Encoding.UTF8.GetBytes(written) };
    }

    /// <summary>Readings as the book keeps them: one number each, the mean of repeats.</summary>
    public static IEnumerable<ReadingRecord> Records(string text) => Taken([text]).Repeats.Select(r => new ReadingRecord(r.Key, r.Value.Average()));

    /// <summary>Readings that contradict each other or the machine.</summary>
    /// <exception cref="LogFormatException">They do; the message has a line for each.</exception>
    public static void RefuseContradictions(string name, Rig rig, Rig before, IEnumerable<string> readings, ReportStyle style, string remedy)
    {
        ImmutableArray<GroundFault> faults = EntryChecks.Of(rig, before, Taken(readings).Repeats);
        if (!faults.IsEmpty)
            throw new LogFormatException(string.Join('\n', faults.Select(f => $"{name}: {GroundReports.Sentence(f, style)}")) + $"\n{name}: nothing was written down. {remedy}");
    }

    private static GroundReadings Taken(IEnumerable<string> readings)
    {
        var taken = new GroundReadings();
        foreach (string text in readings)
        {
            (MeasuredKey key, string value) = Key(text);
            if (taken.TrySet(key, value) is string fault)
                throw new CommandLineException($"--reading: {fault}");
        }
        return taken;
    }

    private static (MeasuredKey Key, string Value) Key(string text)
    {
        int equals = text.IndexOf('=', StringComparison.Ordinal);
        if (equals <= 0)
            throw new CommandLineException($"--reading: found \"{text}\", expected KEY=VALUE such as carabiners.left_mm=-227.");
        return MeasuredKey.Find(text[..equals].Trim()) is MeasuredKey key
            ? (key, text[(equals + 1)..])
            : throw new CommandLineException($"--reading: \"{text[..equals].Trim()}\" is no reading; those are {string.Join(", ", MeasuredKey.All.Select(k => k.Name))}.");
    }

    /// <summary>An answer in one form; reports are for <c>show</c>.</summary>
    private static void Deliver(JobChoices choices, TextWriter output, Func<string> text, Func<string> json) =>
        OutputFiles.Deliver(choices.Common, output, text, json, text, text);
}
