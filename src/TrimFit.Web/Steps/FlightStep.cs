using System.Globalization;
using Microsoft.AspNetCore.Builder;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Units;
using TrimFit.Import;
using TrimFit.Jobs;
using TrimFit.Reporting.Wording.Web;
using TrimFit.Web.Flights;
using TrimFit.Web.Sessions;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>Drop files, see what was recognised, mend it, work it out.</summary>
internal static class FlightStep
{
    public const string Path = "/flight";

    /// <summary>Answers that a session keeps.</summary>
    private const int MostAnswers = 8;

    public static void Map(WebApplication app, Desk desk)
    {
        desk.Get(app, Path, visit => ShowAsync(visit));
        desk.Post(app, Path + "/files", Path, TakeAsync);
        desk.Post(app, Path + "/columns", Path, MendAsync);
        desk.Post(app, Path + "/run", Path, RunAsync);
    }

    private static async Task TakeAsync(Visit visit)
    {
        Session session = visit.Session;
        try
        {
            await DropAsync(visit, visit.Http.Request.Form.Files.GetFiles("files"));
        }
        catch (LogFormatException e)
        {
            await ShowAsync(visit, e.Message);
            return;
        }
        bool straight = visit.Field("straight") == "1" && session.Flight is { Recognised: not null } && session.Rig.Rig is not null;
        if (straight)
            await RunAsync(visit);
        else
            await visit.GoAsync(Path);
    }

    /// <summary>Takes files in and looks what they are. A rig file or a sheet alone changes nothing else.</summary>
    private static async Task DropAsync(Visit visit, IEnumerable<Microsoft.AspNetCore.Http.IFormFile> files)
    {
        Session session = visit.Session;
        Upload upload = await Uploads.TakeAsync(files, session, visit.Desk.Sessions, visit.Desk.Options, visit.Gone);
        if (upload.Rig is not null)
            session.Rig = upload.Rig;
        if (upload.Logs.IsEmpty)
        {
            if (upload.Sheet is not null && session.Flight is { HasFiles: true } waiting)
                session.Flight = waiting with { Sheet = upload.Sheet };
            return;
        }
        foreach (StoredFile old in session.Flight?.Logs ?? [])
            File.Delete(old.Path);
        var dropped = new DroppedFlight { Logs = upload.Logs, Sheet = upload.Sheet };
        session.Flight = dropped;
        session.Flight = await RecogniseAsync(visit, dropped);
    }

    private static Task<DroppedFlight> RecogniseAsync(Visit visit, DroppedFlight flight) => visit.Desk.Work.RunAsync(visit.Session.Progress, flight.StoredBytes,
        () => FlightWork.Recognise(flight, visit.Desk.Loggers, visit.Session.Progress, visit.Gone), visit.Gone);

    private static async Task MendAsync(Visit visit)
    {
        if (visit.Session.Flight is not { HasFiles: true } flight)
        {
            await visit.GoAsync(Path);
            return;
        }
        var rules = new List<ColumnRule>();
        for (int f = 0; f < flight.Previews.Length; f++)
        {
            InputFile? file = FileOf(flight, f);
            for (int c = 0; c < flight.Previews[f].Columns.Length; c++)
            {
                string key = Key(f, c), name = flight.Previews[f].Columns[c], role = visit.Field("role." + key), unit = visit.Field("unit." + key);
                ColumnUse? now = file?.Columns.FirstOrDefault(u => u.Name == name);
                bool told = flight.Rules.Any(r => r.Name == name);
                bool same = role == RoleOf(now) && unit == (now?.Unit ?? "");
                if (role.Length == 0 || (same && !told) || !ChannelRoles.TryParse(role, out ChannelRole channel))
                    continue;
                if (unit.Length > 0 && !(LogUnits.TryParse(unit, out LogUnit known) && LogUnits.Fits(channel, known)))
                {
                    await ShowAsync(visit, visit.Words.Web.UnitDoesNotFit(Uploads.SafeName(unit), name, role, LogUnits.NamesFor(channel)));
                    return;
                }
                rules.Add(new(channel, name, unit.Length > 0 ? unit : null));
            }
        }
        if (rules.GroupBy(r => r.Role).FirstOrDefault(g => g.Count() > 1) is IGrouping<ChannelRole, ColumnRule> twice)
        {
            await ShowAsync(visit, visit.Words.Web.RoleTwice(ChannelRoles.NameOf(twice.Key), [.. twice.Select(r => r.Name)]));
            return;
        }
        DroppedFlight mended = await RecogniseAsync(visit, flight with { Rules = [.. rules], RulesRemembered = false });
        visit.Session.Flight = mended;
        if (mended.Recognised is not null)
            visit.Desk.Loggers.Remember(LoggerMemory.KeyOf(mended.Previews), mended.Rules);
        await visit.GoAsync(Path);
    }

    private static async Task RunAsync(Visit visit)
    {
        Session session = visit.Session;
        if (session.Flight is not { HasFiles: true, Recognised: not null } flight || session.Rig.Rig is null)
        {
            await visit.GoAsync(Path);
            return;
        }
        long? job = long.TryParse(visit.Field("job"), NumberStyles.None, CultureInfo.InvariantCulture, out long wanted) ? wanted : null;
        TrimOptions options;
        Answer answer;
        try
        {
            options = OptionsOf(visit.Field("balance"), visit.Field("tolerance"));
            int number = session.Answers.IsEmpty ? 1 : session.Answers[^1].Number + 1;
            answer = await visit.Desk.Work.RunAsync(session.Progress, flight.StoredBytes,
                () => FlightWork.Fit(flight, session.Rig, options, number, visit.Desk.Provenance, session.Progress, visit.Gone), visit.Gone);
            if (job is long open)
                answer = JobFlights.Keep(visit.Desk, open, flight, answer, visit.Field("place") == "forget");
        }
        catch (Exception e) when (e is LogFormatException or JobBookException)
        {
            await ShowAsync(visit, e.Message);
            return;
        }
        session.Job = job ?? session.Job;
        session.Answers = [.. session.Answers.Append(answer).TakeLast(MostAnswers)];
        session.CurrentAnswer = answer.Number;
        session.Flight = flight with { HasFiles = false };
        foreach (StoredFile log in flight.Logs)
            File.Delete(log.Path);
        visit.Desk.Sessions.KeepWithinMemory(session);
        if (visit.Desk.Stopping)
            await AnswerStep.ShowAsync(visit);
        else
            await visit.GoAsync(AnswerStep.Path);
    }

    /// <exception cref="LogFormatException">A choice is none of those it may be.</exception>
    internal static TrimOptions OptionsOf(string balance, string tolerance)
    {
        double degPerSec = 1;
        if (tolerance.Length > 0 && !(double.TryParse(tolerance, NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out degPerSec) && degPerSec > 0 && degPerSec <= 20))
            throw LogFormatException.At("tolerance", null, null, $"\"{Uploads.SafeName(tolerance)}\"", "a turn rate above 0 and up to 20 deg/s", "Write a number such as 1.5.");
        return new()
        {
            BalanceThrust = balance switch { "full" => BalanceThrust.Full, "even" => BalanceThrust.Even, _ => BalanceThrust.Cruise },
            Tolerance = AngularRate.FromDegPerSec(degPerSec),
        };
    }

    internal static Task ShowAsync(Visit visit, string problem = "")
    {
        WebContext web = visit.Web;
        WebWords words = web.Words.Web;
        DroppedFlight? flight = visit.Session.Flight;
        var lines = new List<string>();
        if (flight is not null)
        {
            lines.AddRange(flight.Recognised is RecognisedFlight seen ? words.Recognised(seen.Diagnostics, web.Words, web.Numbers) : [flight.Problem]);
            if (flight.Sheet is (string sheet, _))
                lines.Add(words.SheetTaken(sheet));
            if (flight.RulesRemembered)
                lines.Add(words.RulesRemembered(flight.Rules));
        }
        Rig? rig = visit.Session.Rig.Rig;
        var view = new FlightView(web)
        {
            Flight = flight,
            Lines = lines,
            Warnings = flight?.Recognised is RecognisedFlight r ? [.. r.Diagnostics.Warnings.Select(w => w.Message), .. r.Sensors.Findings.Select(f => web.Words.Finding(f, web.Numbers))] : [],
            Columns = flight is null ? [] : [.. Columns(flight, words)],
            Roles = [.. ChannelRoles.Names],
            Units = [.. Enum.GetValues<ChannelRole>().SelectMany(LogUnits.NamesFor).Distinct()],
            MachineLines = visit.Session.Rig.IsEmpty ? [web.L.NoMachine] : rig is null ? [words.MachineWithFaults(visit.Session.Rig.Faults.Length)] : [words.Machine(rig.Name, visit.Session.Rig.Name)],
            Balances = [("cruise", web.L.InLevelFlight), ("full", web.L.AtFullPower), ("even", web.L.EvenOverPower)],
            Jobs = Jobs(visit),
            CanMend = flight?.HasFiles == true,
            CanRun = flight is { HasFiles: true, Recognised: not null } && rig is not null,
        };
        return visit.PageAsync(web.L.StepFlight, Path, FlightSlice.Create(view), problem);
    }

    private static IReadOnlyList<(string, string, bool)> Jobs(Visit visit)
    {
        if (!visit.Desk.HasBook)
            return [];
        try
        {
            using JobBook book = visit.Desk.Book(BookAccess.Read);
            return [.. book.List().Reverse().Take(50).Select(j => (j.Number.ToString(CultureInfo.InvariantCulture), visit.Words.Web.JobName(j.Number, j.Machine, j.Customer), j.Number == visit.Session.Job))];
        }
        catch (JobBookException)
        {
            return []; // the book's own page says what is wrong with it
        }
    }

    private static IEnumerable<ColumnView> Columns(DroppedFlight flight, WebWords words)
    {
        for (int f = 0; f < flight.Previews.Length; f++)
        {
            LogPreview preview = flight.Previews[f];
            InputFile? file = FileOf(flight, f);
            for (int c = 0; c < preview.Columns.Length; c++)
            {
                string name = preview.Columns[c];
                ColumnUse? use = file?.Columns.FirstOrDefault(u => u.Name == name);
                ColumnRule? told = flight.Rules.FirstOrDefault(r => r.Name == name);
                string role = use is null && told is not null ? ChannelRoles.NameOf(told.Role) : RoleOf(use);
                int column = c;
                yield return new(Key(f, c), flight.Previews.Length > 1 ? file?.Name ?? "" : "", name, role, use?.Unit ?? told?.Unit ?? "", use?.Basis ?? "",
                    [.. preview.Rows.Where(r => r.Length > column && r[column].Length > 0).Select(r => r[column])], words.RoleOfColumn(name), words.UnitOfColumn(name));
            }
        }
    }

    private static InputFile? FileOf(DroppedFlight flight, int preview) =>
        flight.Recognised?.Diagnostics.Files is { } files && files.Length == flight.Previews.Length ? files[preview]
        : flight.Recognised?.Diagnostics.Files.FirstOrDefault(file => flight.Previews[preview].Columns.All(c => file.Columns.Any(u => u.Name == c)));

    private static string RoleOf(ColumnUse? use) => use?.Role is ChannelRole role ? ChannelRoles.NameOf(role) : "";

    private static string Key(int file, int column) => string.Create(CultureInfo.InvariantCulture, $"{file}.{column}");
}
