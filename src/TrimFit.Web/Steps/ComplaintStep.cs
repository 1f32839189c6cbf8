using System.Globalization;
using Microsoft.AspNetCore.Builder;
using TrimFit.Core.Ground;
using TrimFit.Core.Workshop;
using TrimFit.Jobs;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;
using TrimFit.Reporting.Wording.Web;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>What the pilot tells, and the simple causes to look for first.</summary>
internal static class ComplaintStep
{
    public const string Path = "/complaint", ChecksPath = "/checks";

    public static void Map(WebApplication app, Desk desk)
    {
        desk.Get(app, Path, visit => visit.PageAsync(visit.Web.L.StepComplaint, Path, ComplaintSlice.Create(new ComplaintView(visit.Web, Questions(visit)))));
        desk.Post(app, Path, Path, visit =>
        {
            visit.Session.Complaint = new()
            {
                Side = One<PullSide>(visit, "side"),
                When = Many<PullWhen>(visit, "when").Aggregate(PullWhen.None, (all, one) => all | one),
                Since = One<PullSince>(visit, "since"),
                Changed = [.. Many<ChangedPart>(visit, "changed")],
                OtherWing = One<OtherWing>(visit, "other-wing"),
            };
            return visit.GoAsync(ChecksPath);
        });
        desk.Get(app, ChecksPath, ShowChecksAsync);
        desk.Post(app, ChecksPath, ChecksPath, WriteChecksAsync);
        desk.Get(app, ChecksPath + "/sheet", visit => visit.DocumentAsync(GroundPage.Checks(Report(visit), visit.Session.Style)));
    }

    /// <summary>The checks; without a complaint in the customary order, so that the step stands alone.</summary>
    private static ChecksReport Report(Visit visit)
    {
        Complaint complaint = visit.Session.Complaint ?? new();
        return new() { Complaint = complaint, Checks = CheckOrder.Of(complaint), Provenance = visit.Desk.Provenance };
    }

    private static Task ShowChecksAsync(Visit visit) => ShowChecksAsync(visit, "");

    private static Task ShowChecksAsync(Visit visit, string problem, string notice = "")
    {
        WebContext web = visit.Web;
        ChecksReport report = Report(visit);
        ReportDocument document = GroundReports.Document(report, visit.Session.Style);
        var rest = new ReportDocument(document.Language, document.Title, document.Subtitle, [.. document.Blocks.Skip(1)]);
        string job = visit.Session.Job is long number && visit.Desk.HasBook ? web.Words.Web.JobName(number, "", "") : "";
        CheckRowView[] rows =
        [
            .. report.Checks.Select(c => new CheckRowView(Snake.Of(c.Cause.ToString()), web.Words.Ground.Cause(c.Cause), web.Words.Ground.UnitToWrite(c.Cause, web.Numbers),
                web.Words.Web.OutcomeOf(web.Words.Ground.Cause(c.Cause)), web.Words.Web.NumberOf(web.Words.Ground.Cause(c.Cause)), web.Words.Web.NoteOf(web.Words.Ground.Cause(c.Cause)))),
        ];
        return visit.PageAsync(web.L.StepChecks, ChecksPath, ChecksSlice.Create(new ChecksView(web, document.Blocks[0], rest, job, rows,
            [.. Enum.GetValues<CheckOutcome>().Select(o => (Snake.Of(o.ToString()), web.Words.Jobs.OutcomeOf(o)))])), problem, notice);
    }

    private static async Task WriteChecksAsync(Visit visit)
    {
        if (visit.Session.Job is not long job || !visit.Desk.HasBook)
        {
            await visit.GoAsync(ChecksPath);
            return;
        }
        var records = new List<CheckRecord>();
        foreach (OrderedCheck check in Report(visit).Checks)
        {
            string code = Snake.Of(check.Cause.ToString()), outcome = visit.Field("outcome." + code), value = visit.Field("value." + code);
            if (outcome.Length == 0)
                continue;
            double? number = null;
            if (value.Length > 0)
            {
                if (!double.TryParse(value, NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double parsed) || !double.IsFinite(parsed))
                {
                    await ShowChecksAsync(visit, visit.Words.Web.NoNumber(visit.Words.Ground.Cause(check.Cause), value));
                    return;
                }
                number = parsed;
            }
            records.Add(new CheckRecord
            {
                Number = 0,
                Made = default,
                Code = code,
                Outcome = Enum.GetValues<CheckOutcome>().FirstOrDefault(o => Snake.Of(o.ToString()) == outcome),
                Value = number,
                Unit = number is null ? "" : visit.Words.Ground.UnitToWrite(check.Cause, Numbers.Invariant),
                Note = visit.Field("note." + code),
                By = visit.Field("by"),
            });
        }
        try
        {
            if (records.Count > 0)
            {
                using JobBook book = visit.Desk.Book(BookAccess.Write);
                book.AddChecks(job, records, visit.Desk.Now);
            }
        }
        catch (JobBookException e)
        {
            await ShowChecksAsync(visit, e.Message);
            return;
        }
        await visit.GoAsync(BookStep.PathOf(job));
    }

    private static QuestionView[] Questions(Visit visit)
    {
        WebWords words = visit.Words.Web;
        Complaint? told = visit.Session.Complaint;
        return
        [
            new("side", words.Question(nameof(PullSide)), false, Choices<PullSide>(words, v => v == (told?.Side ?? PullSide.Unknown))),
            new("when", words.Question(nameof(PullWhen)), true, [.. Choices<PullWhen>(words, v => v != 0 && told?.When.HasFlag(v) == true).Where(c => c.Value != "none")]),
            new("since", words.Question(nameof(PullSince)), false, Choices<PullSince>(words, v => v == (told?.Since ?? PullSince.Unknown))),
            new("changed", words.Question(nameof(ChangedPart)), true, Choices<ChangedPart>(words, v => told?.Changed.Contains(v) == true)),
            new("other-wing", words.Question(nameof(OtherWing)), false, Choices<OtherWing>(words, v => v == (told?.OtherWing ?? OtherWing.NotTried))),
        ];
    }

    private static ChoiceView[] Choices<T>(WebWords words, Func<T, bool> chosen) where T : struct, Enum =>
        [.. Enum.GetValues<T>().Select(v => new ChoiceView(Snake.Of(v.ToString()), words.Choice(typeof(T).Name, Snake.Of(v.ToString())), chosen(v)))];

    private static T One<T>(Visit visit, string name) where T : struct, Enum => Many<T>(visit, name).FirstOrDefault();

    private static IEnumerable<T> Many<T>(Visit visit, string name) where T : struct, Enum =>
        visit.Http.Request.Form[name].SelectMany(text => Enum.GetValues<T>().Where(v => Snake.Of(v.ToString()) == text)).Distinct();
}
