using System.Collections.Immutable;
using System.Globalization;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Import;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;
using TrimFit.Web.Flights;
using TrimFit.Web.Sessions;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>Before and after: did the change work?</summary>
internal static class ProofStep
{
    public const string Path = "/proof";

    public static void Map(WebApplication app, Desk desk)
    {
        desk.Get(app, Path, visit => ShowAsync(visit));
        desk.Post(app, Path, Path, CompareAnswersAsync);
        desk.Post(app, Path + "/files", Path, CompareFilesAsync);
        desk.Get(app, Path + "/print", visit => With(visit, r => visit.DocumentAsync(ReportPage.Compare(r, visit.Session.Style))));
        desk.Get(app, Path + "/report.html", visit => With(visit, r => visit.DocumentAsync(ReportPage.Compare(r, visit.Session.Style), "trimfit-compare.html")));
        desk.Get(app, Path + "/result.json", visit => With(visit, r => visit.FileAsync(ReportJson.Compare(r), "application/json", "trimfit-compare.json")));
    }

    private static Task With(Visit visit, Func<CompareReport, Task> show) => visit.Session.Comparison is CompareReport report ? show(report) : visit.GoAsync(Path);

    private static Task ShowAsync(Visit visit, string problem = "")
    {
        WebContext web = visit.Web;
        Session session = visit.Session;
        string Number(int? n) => n is int number ? number.ToString(CultureInfo.InvariantCulture) : "";
        return visit.PageAsync(web.L.StepProof, Path, ProofSlice.Create(new ProofView(web)
        {
            Answers = [.. session.Answers.Select(a => (Number(a.Number), web.Words.Web.AnswerName(a.Number, a.Name)))],
            Before = Number(session.Answers.Length > 1 ? session.Answers[^2].Number : null),
            After = Number(session.Answers.Length > 1 ? session.Answers[^1].Number : null),
            Changed = [("", web.L.AsRigFilesSay), .. Enum.GetValues<ChangedPart>().Select(c => (Snake.Of(c.ToString()), web.Words.Web.Choice(nameof(ChangedPart), Snake.Of(c.ToString()))))],
            Document = session.Comparison is CompareReport report ? ReportDocuments.Compare(report, session.Style, figures: true) : null,
        }), problem);
    }

    private static async Task CompareAnswersAsync(Visit visit)
    {
        Answer? Chosen(string name) => visit.Session.Answers.FirstOrDefault(a => a.Number.ToString(CultureInfo.InvariantCulture) == visit.Field(name));
        if (Chosen("before") is not Answer before || Chosen("after") is not Answer after || before == after)
        {
            await ShowAsync(visit, visit.Web.L.ChooseTwoFlights);
            return;
        }
        ChangedPart? changed = Changed(visit);
        visit.Session.Comparison = await visit.Desk.Work.RunAsync(visit.Session.Progress, 0, () => Compare(before, after, changed, visit), visit.Gone);
        await EndAsync(visit);
    }

    private static async Task CompareFilesAsync(Visit visit)
    {
        Session session = visit.Session;
        List<StoredFile> stored = [];
        try
        {
            IFormFileCollection files = visit.Http.Request.Form.Files;
            Upload first = await Uploads.TakeAsync(files.GetFiles("before"), session, visit.Desk.Sessions, visit.Desk.Options, visit.Gone);
            stored.AddRange(first.Logs);
            Upload second = await Uploads.TakeAsync(files.GetFiles("after"), session, visit.Desk.Sessions, visit.Desk.Options, visit.Gone);
            stored.AddRange(second.Logs);
            RigDraft? rig = first.Rig ?? (session.Rig.Rig is null ? null : session.Rig);
            if (first.Logs.IsEmpty || second.Logs.IsEmpty || rig?.Rig is null || (second.Rig ?? rig).Rig is null)
            {
                await ShowAsync(visit, visit.Web.L.NeedsTwoFlights);
                return;
            }
            ChangedPart? changed = Changed(visit);
            TrimOptions options = FlightStep.OptionsOf("", "");
            visit.Session.Comparison = await visit.Desk.Work.RunAsync(session.Progress, stored.Sum(s => s.Bytes), () =>
            {
                Answer before = Fit(first, rig, 1), after = Fit(second, second.Rig ?? rig, 2);
                return Compare(before, after, changed, visit);

                Answer Fit(Upload upload, RigDraft machine, int number) => FlightWork.Fit(new DroppedFlight { Logs = upload.Logs, Sheet = upload.Sheet },
                    machine, options, number, visit.Desk.Provenance, session.Progress, visit.Gone);
            }, visit.Gone);
        }
        catch (LogFormatException e)
        {
            await ShowAsync(visit, e.Message);
            return;
        }
        finally
        {
            foreach (StoredFile file in stored)
                File.Delete(file.Path);
        }
        await EndAsync(visit);
    }

    private static Task EndAsync(Visit visit) => visit.Desk.Stopping ? ShowAsync(visit) : visit.GoAsync(Path);

    /// <summary>The comparison as <c>compare</c> makes it.</summary>
    private static CompareReport Compare(Answer before, Answer after, ChangedPart? changed, Visit visit)
    {
        visit.Session.Progress.Set("comparing", -1);
        ImmutableArray<ComparedFlight> flights = [Compared(before, "before"), Compared(after, "after")];
        return new CompareReport
        {
            Comparison = FlightComparison.Run(flights, new() { Trim = after.Report.Analysis.Options, Changed = changed }),
            Flights = [before.Report, after.Report],
            Provenance = visit.Desk.Provenance,
        };

        static ComparedFlight Compared(Answer answer, string setup) => new()
        {
            Name = string.Join(" + ", answer.Report.Import.Diagnostics.Files.Select(f => f.Name)),
            Setup = setup,
            Analysis = answer.Report.Analysis,
            Sheet = answer.Sheet,
            Date = answer.Sheet?.Date ?? (answer.Report.Import.Diagnostics.Sampling.Start is DateTimeOffset start ? DateOnly.FromDateTime(start.Date) : null),
        };
    }

    private static ChangedPart? Changed(Visit visit)
    {
        string told = visit.Field("changed");
        return told.Length == 0 ? null : Enum.GetValues<ChangedPart>().Where(c => Snake.Of(c.ToString()) == told).Cast<ChangedPart?>().FirstOrDefault();
    }
}
