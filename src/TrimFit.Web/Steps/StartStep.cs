using System.Text.Json;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using TrimFit.Reporting;
using TrimFit.Web.Sessions;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>The first page, units, and how far running work is.</summary>
internal static class StartStep
{
    public static void Map(WebApplication app, Desk desk)
    {
        desk.Get(app, "/", visit => visit.PageAsync(visit.Web.L.StartTitle, "/", StartSlice.Create(visit.Web)));
        desk.Post(app, "/units", "/", visit =>
        {
            visit.Session.Style = visit.Session.Style with { Units = visit.Field("units") == "imperial" ? UnitSystem.Imperial : UnitSystem.Metric };
            string back = visit.Field("back");
            // Only an address of this page: anything with a second slash or a backslash in front could be another site's.
            return visit.GoAsync(back.StartsWith('/') && !back.StartsWith("//", StringComparison.Ordinal) && !back.Contains('\\', StringComparison.Ordinal) && !back.Any(char.IsControl) ? back : "/");
        });
        app.MapGet("/progress", (RequestDelegate)(context =>
        {
            WorkProgress? progress = desk.Sessions.Existing(context)?.Progress;
            string phase = progress?.Phase ?? "";
            double share = progress?.Share ?? 0;
            context.Response.ContentType = "application/json";
            return JsonSerializer.SerializeAsync(context.Response.Body,
                new ProgressJson(phase, Reporting.Wording.Words.English.Web.Phase(phase), share >= 0 ? share : null), WebJson.Default.ProgressJson, context.RequestAborted);
        }));
    }
}
