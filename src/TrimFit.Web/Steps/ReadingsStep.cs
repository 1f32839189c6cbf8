using System.Collections.Immutable;
using System.Text.Json;
using Microsoft.AspNetCore.Builder;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Figures;
using TrimFit.Reporting.Wording;
using TrimFit.Web.Flights;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>The machine: a form of its readings, each with its drawing, and the machine drawn to scale as it is typed.</summary>
internal static class ReadingsStep
{
    public const string Path = "/readings";

    private static readonly (string Table, GroundDrawing[] Drawings)[] _groups =
    [
        ("machine", []), ("mass", [GroundDrawing.PowerUnitOnScales]), ("carabiners", [GroundDrawing.CarabinersFromAbove]),
        ("hang_points", [GroundDrawing.FrontHangPoints, GroundDrawing.RearHangPoints]),
        ("propeller", [GroundDrawing.Rotation, GroundDrawing.PropellerHub, GroundDrawing.ThrustLineDepth, GroundDrawing.HangBack]),
        ("hang_check", [GroundDrawing.HangCheck]), ("brakes", []), ("wing", []),
    ];

    public static void Map(WebApplication app, Desk desk)
    {
        desk.Get(app, Path, visit => ShowAsync(visit, visit.Session.Rig, []));
        desk.Post(app, Path, Path, SaveAsync);
        desk.Post(app, Path + "/check", Path, CheckAsync);
        desk.Post(app, Path + "/file", Path, OpenAsync);
        desk.Get(app, Path + "/rig.toml", visit => visit.FileAsync(visit.Session.Rig.Text, "application/toml", "rig.toml"));
        desk.Get(app, Path + "/statics", StaticsAsync);
        foreach (SheetKind kind in Enum.GetValues<SheetKind>())
        {
            desk.Get(app, SheetPath(kind), visit => visit.Session.Rig.Rig is Rig rig ? visit.DocumentAsync(GroundPage.Sheet(kind, rig, visit.Session.Style)) : visit.GoAsync(Path));
        }
    }

    public static string SheetPath(SheetKind kind) => "/sheet/" + Snake.Of(kind.ToString()).Replace('_', '-');

    private static async Task SaveAsync(Visit visit)
    {
        (RigDraft draft, ImmutableArray<RigFault> typed) = Typed(visit);
        visit.Session.Rig = draft;
        if (typed.IsEmpty && draft.Rig is not null)
            await visit.GoAsync(Path);
        else
            await ShowAsync(visit, draft, typed);
    }

    /// <summary>What is typed, judged and drawn, without being kept.</summary>
    private static async Task CheckAsync(Visit visit)
    {
        (RigDraft draft, ImmutableArray<RigFault> typed) = Typed(visit);
        RigFault[] faults = [.. typed, .. draft.Faults.Where(f => !typed.Any(t => t.Field == f.Field && f.Field is not null))];
        var json = new RigCheckJson([.. faults.Where(f => f.Field is not null).Select(f => new RigFaultJson(f.Field!, f.Message))],
            Drawing(visit, draft), [.. faults.Where(f => f.Field is null).Select(f => f.Message)]);
        visit.Http.Response.ContentType = "application/json";
        await JsonSerializer.SerializeAsync(visit.Http.Response.Body, json, WebJson.Default.RigCheckJson, visit.Gone);
    }

    private static (RigDraft Draft, ImmutableArray<RigFault> Faults) Typed(Visit visit)
    {
        RigDraft before = visit.Session.Rig;
        var values = RigField.All.Where(f => visit.Http.Request.Form.ContainsKey(f.Name)).ToDictionary(f => f.Name, f => visit.Field(f.Name));
        try
        {
            string text = RigForm.Write(before.Name, before.Text, values, out ImmutableArray<RigFault> faults);
            return (RigDraft.FromText(before.Name, text), faults);
        }
        catch (LogFormatException e)
        {
            return (before, [new(null, e.Message)]);
        }
    }

    private static async Task OpenAsync(Visit visit)
    {
        try
        {
            Upload upload = await Uploads.TakeAsync(visit.Http.Request.Form.Files.Where(f => f.FileName.EndsWith(".toml", StringComparison.OrdinalIgnoreCase)), visit.Session, visit.Desk.Sessions, visit.Desk.Options, visit.Gone);
            if (upload.Rig is not RigDraft draft)
                throw LogFormatException.At("upload", null, null, "no rig file", "a file such as rig.toml", "Choose the rig file, or type the readings.");
            _ = RigForm.Values(draft.Name, draft.Text); // a file that is no TOML cannot become a form
            visit.Session.Rig = draft;
        }
        catch (LogFormatException e)
        {
            await ShowAsync(visit, visit.Session.Rig, [], e.Message);
            return;
        }
        await ShowAsync(visit, visit.Session.Rig, []);
    }

    private static Task StaticsAsync(Visit visit)
    {
        if (visit.Session.Rig.Rig is not Rig rig)
            return visit.GoAsync(Path);
        var report = new RigSheetReport { Rig = rig, Statics = RigReporter.Of(rig), RigFile = visit.Session.Rig.Source, Provenance = visit.Desk.Provenance };
        return visit.PageAsync(visit.Web.L.Statics, Path, DocumentSlice.Create(ReportDocuments.Rig(report, visit.Session.Style, figures: true)));
    }

    private static Task ShowAsync(Visit visit, RigDraft draft, ImmutableArray<RigFault> typed, string problem = "")
    {
        WebContext web = visit.Web;
        IReadOnlyDictionary<string, string> values;
        try
        {
            values = RigForm.Values(draft.Name, draft.Text);
        }
        catch (LogFormatException e)
        {
            (values, problem) = (new Dictionary<string, string>(), e.Message);
        }
        bool fresh = draft.IsEmpty && typed.IsEmpty; // nothing typed yet is no fault
        var groups = _groups.Select((g, i) => new FieldGroup(web.Words.Web.RigGroup(g.Table), [.. g.Drawings.Select(d => GroundDrawings.Draw(d, web.Words.Ground))],
            [.. RigField.All.Where(f => f.Table == g.Table || (i == 0 && f.Table.Length == 0)).Select(f => Field(f))])).ToArray();
        return visit.PageAsync(web.L.StepReadings, Path, ReadingsSlice.Create(new ReadingsView(web, groups, Drawing(visit, draft),
            fresh ? [] : [.. typed.Concat(draft.Faults).Where(f => f.Field is null).Select(f => f.Message)],
            draft.Rig is not null, [.. Enum.GetValues<SheetKind>().Select(k => (SheetPath(k), GroundReports.Title(k)))])), problem);

        FieldView Field(RigField field)
        {
            RigFault? fault = fresh ? null : typed.FirstOrDefault(f => f.Field == field.Name) ?? draft.Faults.FirstOrDefault(f => f.Field == field.Name);
            string value = typed.Any(f => f.Field == field.Name) ? visit.Field(field.Name) : values.GetValueOrDefault(field.Name, "");
            return new(field.Name, web.Words.Web.RigField(field.Name) is { Length: > 0 } own ? own : GroundReports.Reading(field.Name), value,
                field.IsNumber ? web.Words.Web.Range(field.Min!.Value, field.Max!.Value, field.Unit) : "", fault?.Message ?? "", field.Needed, field.IsNumber,
                [.. field.Words.Select(w => (w, web.Words.Web.RigWord(w)))]);
        }
    }

    /// <summary>The machine to scale; a hint in words while it cannot be drawn.</summary>
    private static string Drawing(Visit visit, RigDraft draft) => draft.Rig is Rig rig
        ? RigDrawing.Draw(rig, RigReporter.Of(rig), null, visit.Words, visit.Web.Numbers)
        : "";
}
