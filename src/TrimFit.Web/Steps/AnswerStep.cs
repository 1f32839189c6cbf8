using System.Collections.Immutable;
using System.Globalization;
using Microsoft.AspNetCore.Builder;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Pages;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Figures;
using TrimFit.Reporting.Wording;
using TrimFit.Web.Flights;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>The answer: the report of <c>fit</c>, its files, and "what if I move this".</summary>
internal static class AnswerStep
{
    public const string Path = "/answer";

    private const string MovePath = Path + "/move";

    public static void Map(WebApplication app, Desk desk)
    {
        desk.Get(app, Path, ShowAsync);
        desk.Get(app, Path + "/report.html", visit => With(visit, a => visit.DocumentAsync(ReportPage.Fit(a.Report, visit.Session.Style), FileName(a, ".html"))));
        desk.Get(app, Path + "/print", visit => With(visit, a => visit.DocumentAsync(ReportPage.Fit(a.Report, visit.Session.Style))));
        desk.Get(app, Path + "/customer", visit => With(visit, a => visit.DocumentAsync(Page.Render(ReportDocuments.Customer(ReportDocuments.CustomerOf(a.Report, visit.Session.Style), visit.Session.Style), new() { Compact = true }))));
        desk.Get(app, Path + "/result.json", visit => With(visit, a => visit.FileAsync(a.Json, "application/json", FileName(a, ".json"))));
        desk.Get(app, MovePath, visit => With(visit, a => MoveAsync(visit, a)));
    }

    internal static Task ShowAsync(Visit visit)
    {
        WebContext web = visit.Web;
        if (int.TryParse(visit.Query("flight"), NumberStyles.None, CultureInfo.InvariantCulture, out int wanted))
            visit.Session.CurrentAnswer = wanted;
        if (visit.Session.Answer is not Answer answer)
            return visit.MessageAsync(web.L.StepAnswer, Path, web.L.NoAnswerYet, FlightStep.Path, web.L.StepFlight);
        ReportDocument document = ReportDocuments.Fit(answer.Report, visit.Session.Style, figures: true);
        var links = new List<(string, string, bool)>();
        if (!answer.Report.Analysis.Adjustments.IsEmpty)
        {
            links.Add((MovePath, web.L.WhatIfIMove, false));
            links.Add((ChangeStep.Path, web.L.MakeChange, false));
        }
        links.Add((CardStep.Path, web.L.CardTitle, false));
        links.Add((Path + "/print", web.L.Print, false));
        links.Add((Path + "/customer", web.L.CustomerPage, false));
        links.Add((Path + "/report.html", web.L.SaveReport, true));
        links.Add((Path + "/result.json", web.L.SaveJson, true));
        if (answer.Kept is (long job, int))
            links.Add((BookStep.PathOf(job), web.L.KeptInJob, false));
        (string, string, bool)[] others = visit.Session.Answers.Length < 2 ? [] :
            [.. visit.Session.Answers.Select(a => ($"{Path}?flight={a.Number.ToString(CultureInfo.InvariantCulture)}", visit.Words.Web.AnswerName(a.Number, a.Name), a.Number == answer.Number))];
        var rest = new ReportDocument(document.Language, document.Title, document.Subtitle, [.. document.Blocks.Skip(1)]);
        return visit.PageAsync(visit.Words.Web.AnswerTitle(answer.Name), Path, AnswerSlice.Create(new AnswerView(web, document.Blocks[0], rest, links, others)));
    }

    private static async Task MoveAsync(Visit visit, Answer answer)
    {
        WebContext web = visit.Web;
        ImmutableArray<AdjustmentReport> ways = answer.Report.Analysis.Adjustments;
        if (ways.IsEmpty)
        {
            await visit.MessageAsync(web.L.WhatIfIMove, MovePath, web.L.NoTravelGiven, Path, web.L.StepAnswer);
            return;
        }
        string asked = visit.Query("part");
        AdjustmentReport way = ways.FirstOrDefault(w => Snake.Of(w.Kind.ToString()) == asked) ?? ways[0];
        WhatIfRow[] rows = await visit.Desk.Work.RunAsync(visit.Session.Progress, 0, () => RowsOf(answer.WhatIf, way.Kind), visit.Gone);
        WhatIfView shown = WhatIfView.Of(way, rows, web.Words, web.Numbers);
        int start = Math.Max(0, Array.FindIndex(rows, r => r.Travel == way.FirstStep));
        var cautions = new DocumentBuilder(web.Words).Cautions(Cautions.For(Cautions.PlacesOf([way.Kind])), web.Numbers).Build("", "");
        await visit.PageAsync(web.L.WhatIfIMove, MovePath, MoveSlice.Create(new MoveView(web)
        {
            Parts = [.. ways.Select(w => ($"{MovePath}?part={Snake.Of(w.Kind.ToString())}", web.Words.PartShort(w.Kind), w.Kind == way.Kind))],
            Heads = shown.Heads,
            Rows = [.. rows.Select((r, i) => new MoveRow(r.Travel.ToString("R", CultureInfo.InvariantCulture), r.Travel == way.FirstStep ? "first" : r.Travel == way.Rounded ? "null" : r.WithinLimits == false ? "beyond" : "", shown.Cells[i]))],
            SliderLabel = web.Words.Web.TravelOf(web.Words.PartShort(way.Kind)),
            FirstStep = web.Words.FirstStep(way, answer.Report.Analysis.Rig, web.Numbers),
            Start = start.ToString(CultureInfo.InvariantCulture),
            Last = (rows.Length - 1).ToString(CultureInfo.InvariantCulture),
            Figure = WhatIfPlot.Draw(way, rows, web.Words, web.Numbers),
            FigureCaption = web.Words.Web.WhatIfPlotCaption,
            Cautions = cautions,
        }));
    }

    /// <summary>Every position of the slider.</summary>
    internal static WhatIfRow[] RowsOf(WhatIf whatIf, AdjustmentKind kind) => [.. whatIf.Travels(kind).Select(travel => whatIf.After(kind, travel))];

    private static Task With(Visit visit, Func<Answer, Task> show) => visit.Session.Answer is Answer answer ? show(answer) : visit.GoAsync(Path);

    private static string FileName(Answer answer, string ending)
    {
        string plain = new([.. System.IO.Path.GetFileNameWithoutExtension(answer.Report.Import.Diagnostics.Files[0].Name).Select(c => char.IsAsciiLetterOrDigit(c) || c is '-' or '_' ? c : '-').Take(60)]);
        return "trimfit-" + plain + ending;
    }
}
