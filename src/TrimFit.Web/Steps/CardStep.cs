using System.Globalization;
using Microsoft.AspNetCore.Builder;
using TrimFit.Core.Planning;
using TrimFit.Import;
using TrimFit.Import.Results;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Web.Flights;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>The test card: what to fly so that the answer gets as sharp as wanted.</summary>
internal static class CardStep
{
    public const string Path = "/flight/card";

    public static void Map(WebApplication app, Desk desk)
    {
        desk.Get(app, Path, visit => ShowAsync(visit));
        desk.Post(app, Path, Path, PlanAsync);
        desk.Get(app, Path + "/print", visit => With(visit, r => visit.DocumentAsync(Page.Render(ReportDocuments.Card(r, visit.Session.Style), new() { Compact = true }))));
        desk.Get(app, Path + "/speaking.html", visit => With(visit, r => visit.DocumentAsync(SpeakingCard.Page(r, visit.Session.Style), "speaking-card.html")));
        desk.Get(app, Path + "/sheet.toml", visit => With(visit, r => visit.FileAsync(CardSheetText.Empty(r), "application/toml", "flight-sheet.toml")));
    }

    private static Task With(Visit visit, Func<CardReport, Task> show) =>
        visit.Session.Card is CardReport { Plan.Refusal: null } report ? show(report) : visit.GoAsync(Path);

    private static async Task PlanAsync(Visit visit)
    {
        if (visit.Session.Rig is not { Rig: not null } draft)
        {
            await visit.GoAsync(Path);
            return;
        }
        try
        {
            var options = new CardOptions
            {
                ShiftHalfWidthM = Number(visit, "width", 0.1, 500) / 1000,
                Minutes = Number(visit, "minutes", CardOptions.FewestMinutes, CardOptions.MostMinutes),
                FloorM = Number(visit, "floor", CardOptions.LeastFloorM, 3000) ?? CardOptions.LeastFloorM,
                Logger = visit.Field("logger") switch { "full" => CardLogger.Full, "phone" => CardLogger.Phone, "gps" => CardLogger.Gps, _ => null },
                EngineOffLegs = visit.Field("engine-off") == "1",
            };
            // The last answer of the same machine tells noise, pull and powers.
            Answer? last = visit.Session.Answer is Answer answer && answer.Rig.Source.Sha256 == draft.Source.Sha256 ? answer : null;
            visit.Session.Card = await visit.Desk.Work.RunAsync(visit.Session.Progress, 0, () =>
            {
                visit.Session.Progress.Set("planning", -1);
                PriorFlight? prior = last is null ? null : FitResultReader.Read("result.json", last.Json, draft.Rig.BrakeFullTravelM);
                return new CardReport { Plan = CardPlanner.Plan(draft.Rig, options, prior), Rig = draft.Rig, RigFile = draft.Source, Provenance = visit.Desk.Provenance };
            }, visit.Gone);
        }
        catch (LogFormatException e)
        {
            await ShowAsync(visit, e.Message);
            return;
        }
        if (visit.Desk.Stopping)
            await ShowAsync(visit);
        else
            await visit.GoAsync(Path);
    }

    private static Task ShowAsync(Visit visit, string problem = "")
    {
        WebContext web = visit.Web;
        bool form = visit.Http.Request.HasFormContentType;
        string Typed(string name) => form ? visit.Field(name) : "";
        return visit.PageAsync(web.L.CardTitle, Path, CardSlice.Create(new CardView(web)
        {
            HasRig = visit.Session.Rig.Rig is not null,
            Width = Typed("width"),
            Minutes = Typed("minutes"),
            Floor = form ? Typed("floor") : CardOptions.LeastFloorM.ToString(CultureInfo.InvariantCulture),
            EngineOff = Typed("engine-off") == "1",
            Loggers = [.. new[] { ("full", web.L.CardLoggerFull), ("phone", web.L.CardLoggerPhone), ("gps", web.L.CardLoggerGps) }.Select(((string Value, string Name) l) => (l.Value, l.Name, l.Value == Typed("logger")))],
            HasCard = visit.Session.Card is { Plan.Refusal: null },
            Document = visit.Session.Card is CardReport report ? ReportDocuments.Card(report, visit.Session.Style) : null,
        }), problem);
    }

    /// <exception cref="LogFormatException">The text is no number or lies outside.</exception>
    private static double? Number(Visit visit, string field, double least, double most)
    {
        string text = visit.Field(field);
        if (text.Length == 0)
            return null;
        return double.TryParse(text, NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double value) && value >= least && value <= most
            ? value
            : throw LogFormatException.At(field, null, null, $"\"{Uploads.SafeName(text)}\"", FormattableString.Invariant($"a number from {least} to {most}"), "Write it with a decimal point.");
    }
}
