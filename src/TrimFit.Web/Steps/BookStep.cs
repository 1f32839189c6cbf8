using System.Collections.Immutable;
using System.Globalization;
using Microsoft.AspNetCore.Builder;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;
using TrimFit.Import;
using TrimFit.Jobs;
using TrimFit.Pages;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Jobs;
using TrimFit.Reporting.Wording;
using TrimFit.Web.Flights;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>The job book: one for everybody who uses this machine's page, unlike the sessions.</summary>
internal static class BookStep
{
    public const string Path = "/book";

    public static string PathOf(long job) => $"{Path}/{job.ToString(CultureInfo.InvariantCulture)}";

    public static void Map(WebApplication app, Desk desk)
    {
        desk.Get(app, Path, visit => ShowAsync(visit));
        desk.Post(app, Path, Path, OpenAsync);
        desk.Get(app, Path + "/{job:long}", visit => WithJob(visit, BookAccess.Read, (book, job) => ShowJobAsync(visit, book.Job(job))));
        desk.Get(app, Path + "/{job:long}/print", visit => WithJob(visit, BookAccess.Read, (book, job) =>
            visit.DocumentAsync(JobPage.Job(new() { Job = book.Job(job), Provenance = visit.Desk.Provenance }, visit.Session.Style))));
        desk.Get(app, Path + "/{job:long}/job.zip", visit => WithJob(visit, BookAccess.Read, (book, job) =>
        {
            using var zip = new MemoryStream();
            JobZip.Write(book.Bundle(job), zip);
            visit.Http.Response.ContentType = "application/zip";
            visit.Http.Response.Headers.ContentDisposition = $"attachment; filename=job-{job.ToString(CultureInfo.InvariantCulture)}.zip";
            return visit.Http.Response.Body.WriteAsync(zip.ToArray(), visit.Gone).AsTask();
        }));
        desk.Post(app, Path + "/{job:long}/note", Path, visit => WithJob(visit, BookAccess.Write, (book, job) =>
        {
            if (visit.Field("note").Length > 0)
                book.AddNote(job, visit.Field("note"), visit.Desk.Now);
            return visit.GoAsync(PathOf(job));
        }));
        desk.Post(app, Path + "/{job:long}/setup", Path, visit => WithJob(visit, BookAccess.Write, (book, job) =>
        {
            if (visit.Session.Rig.Rig is not null)
                book.AddSetup(job, new KeptFile(InputRecord.Rig, visit.Session.Rig.Name, visit.Session.Rig.Bytes), "", visit.Desk.Now);
            return visit.GoAsync(PathOf(job));
        }));
        desk.Post(app, Path + "/{job:long}/use", Path, visit => WithJob(visit, BookAccess.Read, (book, job) =>
        {
            if (book.Job(job).CurrentSetup is SetupRecord setup)
                visit.Session.Rig = RigDraft.FromBytes(setup.RigName, book.Content(setup.RigSha256));
            visit.Session.Job = job;
            return visit.GoAsync(ReadingsStep.Path);
        }));
        desk.Post(app, Path + "/{job:long}/sign", Path, visit => WithJob(visit, BookAccess.Write, (book, job) =>
        {
            if (visit.Field("name") is { Length: > 0 } name && book.Job(job).CurrentSetup is SetupRecord setup)
            {
                Rig rig = RigDraft.FromBytes(setup.RigName, book.Content(setup.RigSha256)).Rig ?? throw new JobBookException(visit.Web.L.SetupHasFaults);
                book.AddSignature(job, new SignatureRecord { Made = default, Name = name, Date = DateOnly.FromDateTime(visit.Desk.Now.ToLocalTime().Date), Setup = setup.Number, Readings = Readings(rig) }, visit.Desk.Now);
            }
            return visit.GoAsync(PathOf(job));
        }));
    }

    private static Task ShowAsync(Visit visit, string problem = "")
    {
        WebContext web = visit.Web;
        JobWords w = web.Words.Jobs;
        ImmutableArray<JobSummary> jobs = [];
        try
        {
            if (visit.Desk.HasBook)
            {
                using JobBook book = visit.Desk.Book(BookAccess.Read);
                jobs = book.List();
            }
        }
        catch (JobBookException e)
        {
            problem = e.Message;
        }
        return visit.PageAsync(web.L.StepBook, Path, BookSlice.Create(new BookView(web)
        {
            Heads = [w.Job, w.Opened, w.Machine, w.Customer, w.Wing, w.Flights, w.Verdict, w.State],
            Jobs =
            [
                .. jobs.Reverse().Take(500).Select(j => (PathOf(j.Number), (IReadOnlyList<string>)
                    [web.Numbers.Integer(j.Number), j.Opened.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture), j.Machine, j.Customer, j.Wing, web.Numbers.Integer(j.Flights),
                        j.Verdict is string v ? w.VerdictWord(v) : "", j.IsSigned ? w.Signed : w.Unsigned], j.Number == visit.Session.Job)),
            ],
            Machine = visit.Session.Rig.Rig?.Name ?? "",
        }), problem);
    }

    private static async Task OpenAsync(Visit visit)
    {
        string machine = visit.Field("machine"), complaint = visit.Field("complaint");
        if (machine.Length == 0 || complaint.Length == 0)
        {
            await ShowAsync(visit, visit.Web.L.NeedsMachineAndComplaint);
            return;
        }
        try
        {
            using JobBook book = visit.Desk.Book(BookAccess.Create);
            RigDraft draft = visit.Session.Rig;
            JobRecord job = book.AddJob(new JobRecord
            {
                Number = 0,
                Uid = "",
                Opened = default,
                Complaint = complaint,
                Machine = machine,
                Customer = visit.Field("customer"),
                Wing = visit.Field("wing"),
                WingId = visit.Field("wing-id"),
            }, draft.Rig is null ? null : new KeptFile(InputRecord.Rig, draft.Name, draft.Bytes), visit.Desk.Now);
            visit.Session.Job = job.Number;
            await visit.GoAsync(PathOf(job.Number));
        }
        catch (JobBookException e)
        {
            await ShowAsync(visit, e.Message);
        }
    }

    private static Task ShowJobAsync(Visit visit, JobRecord job)
    {
        visit.Session.Job = job.Number;
        ReportDocument document = JobDocuments.Job(new JobReport { Job = job, Provenance = visit.Desk.Provenance }, visit.Session.Style);
        return visit.PageAsync(document.Title, Path, JobSlice.Create(new JobView(visit.Web, PathOf(job.Number), document, visit.Session.Rig.Rig is not null, job.CurrentSetup is not null)));
    }

    private static async Task WithJob(Visit visit, BookAccess access, Func<JobBook, long, Task> show)
    {
        long job = long.Parse((string)visit.Http.Request.RouteValues["job"]!, NumberStyles.None, CultureInfo.InvariantCulture);
        try
        {
            using JobBook book = visit.Desk.Book(access);
            await show(book, job);
        }
        catch (Exception e) when (e is JobBookException or LogFormatException)
        {
            await ShowAsync(visit, e.Message);
        }
    }

    /// <summary>Places and scales that a technician signs for: what the rig file measured.</summary>
    private static ImmutableArray<ReadingRecord> Readings(Rig rig)
    {
        const double MmPerM = 1000;
        var readings = ImmutableArray.CreateBuilder<ReadingRecord>();
        Add("carabiners.left_mm", rig.Carabiners.LeftM, MmPerM);
        Add("carabiners.right_mm", rig.Carabiners.RightM, MmPerM);
        Add("hang_points.front_offset_mm", rig.HangPoints.FrontOffsetM, MmPerM);
        Add("hang_points.rear_offset_mm", rig.HangPoints.RearOffsetM, MmPerM);
        Add("propeller.thrust_line_mm", rig.Propeller.ThrustLineM, MmPerM);
        if (rig.HangCheck is RigHangCheck check)
        {
            Add("hang_check.left_kg", check.LeftKg, 1);
            Add("hang_check.right_kg", check.RightKg, 1);
        }
        return readings.ToImmutable();

        void Add(string key, Reading reading, double scale)
        {
            if (reading.Source == ReadingSource.Measured)
                readings.Add(new(key, Math.Round(reading.Value * scale, 6)));
        }
    }
}
