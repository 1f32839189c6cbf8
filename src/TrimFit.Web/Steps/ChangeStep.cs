using System.Collections.Immutable;
using System.Globalization;
using Microsoft.AspNetCore.Builder;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;
using TrimFit.Reporting.Wording.Web;
using TrimFit.Web.Flights;
using TrimFit.Web.Templates;

namespace TrimFit.Web.Steps;

/// <summary>What to move, and whether the hang check shows that it went the way it should.</summary>
internal static class ChangeStep
{
    public const string Path = "/change";

    /// <summary>Hangs after a change that the expected readings count on.</summary>
    private const double UsualHangs = 3;

    public static void Map(WebApplication app, Desk desk)
    {
        desk.Get(app, Path, visit => ShowAsync(visit));
        desk.Post(app, Path, Path, JudgeAsync);
    }

    private static Task ShowAsync(Visit visit, string problem = "")
    {
        WebContext web = visit.Web;
        Answer? answer = visit.Session.Answer;
        ImmutableArray<Core.Analysis.AdjustmentReport> ways = answer?.Report.Analysis.Adjustments ?? [];
        Rig? rig = visit.Session.Rig.Rig;
        string part = visit.Http.Request.HasFormContentType ? visit.Field("part") : ways.IsEmpty ? "" : Snake.Of(ways[0].Kind.ToString());
        Adjustment[] moves = rig is null ? [] : [.. Adjustment.All.Where(a => a.AppliesTo(rig) && a.Move is not null)];
        string Typed(string name) => visit.Http.Request.HasFormContentType ? visit.Field(name) : "";
        var cautions = new DocumentBuilder(web.Words).Cautions(Cautions.For(CautionPlaces.HangCheckSheet | Cautions.PlacesOf(moves.Select(m => m.Kind))), web.Numbers).Build("", "");
        return visit.PageAsync(web.L.StepChange, Path, ChangeSlice.Create(new ChangeView(web)
        {
            Instructions = answer is null ? [] : [.. ways.Select(w => (web.Words.PartShort(w.Kind), web.Words.FirstStep(w, answer.Report.Analysis.Rig, web.Numbers)))],
            HasRig = rig is not null,
            HasHangCheck = rig?.HangCheck is not null,
            Parts = [.. moves.Select(m => (Snake.Of(m.Kind.ToString()), $"{web.Words.PartShort(m.Kind)} ({Unit(m)})", Snake.Of(m.Kind.ToString()) == part))],
            Travel = Typed("travel"),
            Left = Typed("left"),
            Right = Typed("right"),
            Proof = visit.Session.GroundProof is HangChangeReport proof ? GroundReports.Document(proof, visit.Session.Style) : null,
            Cautions = cautions,
        }), problem);
    }

    private static async Task JudgeAsync(Visit visit)
    {
        if (visit.Session.Rig.Rig is not Rig { HangCheck: not null } rig)
        {
            await ShowAsync(visit);
            return;
        }
        WebWords words = visit.Words.Web;
        Adjustment? adjustment = Adjustment.All.FirstOrDefault(a => a.Move is not null && a.AppliesTo(rig) && Snake.Of(a.Kind.ToString()) == visit.Field("part"));
        if (adjustment is null)
        {
            await ShowAsync(visit, visit.Web.L.ChoosePart);
            return;
        }
        if (!double.TryParse(visit.Field("travel").Replace('−', '-'), NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double told) || !double.IsFinite(told))
        {
            await ShowAsync(visit, words.NoNumber(visit.Web.L.HowFar, visit.Field("travel")));
            return;
        }
        double travel = told / PerSi(adjustment.Unit);
        try
        {
            string name = visit.Session.Rig.Name, text = visit.Session.Rig.Text;
            var readings = new GroundReadings();
            Take(readings, "hang_check.left_kg", visit.Field("left"));
            Take(readings, "hang_check.right_kg", visit.Field("right"));
            string written = RigFileEditor.Write(name, text, readings);
            Rig after = RigFileReader.Read(name, written);
            HangChangeReport report = Judge(rig, after, adjustment, travel, readings, visit.Desk.Provenance)
                ?? throw new LogFormatException(words.HangCheckCannotShow(visit.Words.PartShort(adjustment.Kind)));
            visit.Session.GroundProof = report;
            if (visit.Field("write") == "1")
                visit.Session.Rig = RigDraft.FromText(name, written);
        }
        catch (LogFormatException e)
        {
            await ShowAsync(visit, e.Message);
            return;
        }
        await visit.GoAsync(Path);
    }

    /// <summary>The judgement of <c>rig --moved</c>; null for a part that a hang check cannot show.</summary>
    private static HangChangeReport? Judge(Rig rig, Rig after, Adjustment adjustment, double travel, GroundReadings readings, Provenance provenance)
    {
        (double change, double sd, double spacing) = RigHang.Expected(rig, adjustment, travel);
        if (change == 0)
            return null;
        HangCheckResult before = RigHang.Of(rig)!;
        RigHangCheck now = after.HangCheck!;
        Reading left = rig.Carabiners.LeftM, right = rig.Carabiners.RightM;
        HangCheckResult then = RigHang.Of(rig, now.CarabinerSpacingM is null
            ? now with { CarabinerSpacingM = Reading.Measured(spacing, Math.Sqrt(Square(left.StandardDeviation) + Square(right.StandardDeviation))) } : now);
        double expectedSd = Math.Sqrt(Square(before.StandardError) + (Square(before.SeatingSdM) / UsualHangs) + Square(sd));
        return new HangChangeReport
        {
            Adjustment = adjustment,
            Travel = travel,
            Change = HangChange.Judge(before, then, change, sd),
            Expected = HangCheck.Expected(before.SumKg + (adjustment.Unit == TravelUnit.Kilogram ? Math.Abs(travel) : 0), before.OffsetM + change, spacing),
            ExpectedPlusMinusKg = StandardNormal.Quantile(0.975) * expectedSd * before.SumKg / spacing,
            // The file's tape is that of before the change, so only what the new readings say about themselves counts.
            Faults =
            [
                .. EntryChecks.Of(after, null, readings.Repeats).Where(f => f.Code is GroundFaultCode.FactorTen or GroundFaultCode.FactorTenInRepeats
                    or GroundFaultCode.ScalesSwappedByLean || (f.Code == GroundFaultCode.WeightMissing && adjustment.Unit != TravelUnit.Kilogram)),
            ],
            Provenance = provenance,
        };
    }

    private static void Take(GroundReadings readings, string key, string text)
    {
        string repeats = string.Join(',', text.Split([' ', ';'], StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries));
        if (readings.TrySet(MeasuredKey.Find(key)!, repeats) is string fault)
            throw new LogFormatException(fault);
    }

    private static string Unit(Adjustment adjustment) => adjustment.Unit switch { TravelUnit.Radian => "deg", TravelUnit.Kilogram => "kg", _ => "mm" };

    private static double PerSi(TravelUnit unit) => unit switch { TravelUnit.Radian => 180 / Math.PI, TravelUnit.Kilogram => 1, _ => 1000 };

    private static double Square(double x) => x * x;
}
