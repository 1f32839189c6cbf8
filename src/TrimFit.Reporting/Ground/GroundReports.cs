using System.Collections.Immutable;
using System.Text.Encodings.Web;
using System.Text.Json;
using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Json;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting;

/// <summary>The ground work in every form: checks, sheets, the proof of a change, and single sentences for the terminal.</summary>
public static class GroundReports
{
    private static readonly GroundJsonContext _context = new(new JsonSerializerOptions(GroundJsonContext.Default.Options) { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping });

    /// <summary>Checks for the terminal.</summary>
    public static string ChecksText(ChecksReport report, ReportStyle style) => TextRenderer.Render(Document(report, style));

    /// <summary>The first sentence of the checks with their order in one line and the caution that stands everywhere.</summary>
    public static string ChecksBrief(ChecksReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return Brief($"{style.Words.Ground.ChecksAnswer(report.Complaint)} {string.Join("; ", report.Checks.Select(c => style.Words.Ground.Cause(c.Cause)))}.", style);
    }

    /// <summary>The verdict on a change in one sentence with the caution that stands everywhere.</summary>
    public static string ChangeBrief(HangChangeReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return Brief(style.Words.Ground.Change(report.Change, style.Words.PartShort(report.Adjustment.Kind), new Numbers(style)), style);
    }

    /// <summary>Checks as Markdown.</summary>
    public static string ChecksMarkdown(ChecksReport report, ReportStyle style) => MarkdownRenderer.Render(Document(report, style));

    /// <summary>Checks as JSON, schema <c>trimfit-checks/1</c>.</summary>
    public static string ChecksJson(ChecksReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        GroundWords g = Words.English.Ground;
        Complaint c = report.Complaint;
        return JsonSerializer.Serialize(new ChecksJson
        {
            ProgramVersion = report.Provenance.ProgramVersion,
            Complaint = new(Snake.Of(c.Side.ToString()), [.. Enum.GetValues<PullWhen>().Where(w => w != PullWhen.None && c.When.HasFlag(w)).Select(w => Snake.Of(w.ToString()))],
                Snake.Of(c.Since.ToString()), [.. c.Changed.Select(x => Snake.Of(x.ToString()))], Snake.Of(c.OtherWing.ToString())),
            Checks =
            [
                .. report.Checks.Select(x => new CheckJson(Snake.Of(x.Cause.ToString()), g.Cause(x.Cause), g.NumberToWrite(x.Cause), g.UnitToWrite(x.Cause, Numbers.Invariant),
                    [.. x.Reasons.Select(r => Snake.Of(r.ToString()))], null)),
            ],
            Cautions = ReportJson.CautionList(Wording.Cautions.For(CautionPlaces.ComplaintSheet)),
        }, _context.ChecksJson) + "\n";
    }

    /// <summary>The proof of a change for the terminal.</summary>
    public static string ChangeText(HangChangeReport report, ReportStyle style) => TextRenderer.Render(Document(report, style));

    /// <summary>The proof of a change as Markdown.</summary>
    public static string ChangeMarkdown(HangChangeReport report, ReportStyle style) => MarkdownRenderer.Render(Document(report, style));

    /// <summary>The proof of a change as JSON, schema <c>trimfit-hang-change/1</c>.</summary>
    public static string ChangeJson(HangChangeReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        const double MmPerM = 1000;
        HangChangeResult c = report.Change;
        (string unit, double scale) = report.Adjustment.Unit switch
        {
            TravelUnit.Radian => ("deg", 180 / Math.PI),
            TravelUnit.Kilogram => ("kg", 1),
            _ => ("mm", MmPerM),
        };
        return JsonSerializer.Serialize(new HangChangeJson
        {
            ProgramVersion = report.Provenance.ProgramVersion,
            Kind = Snake.Of(report.Adjustment.Kind.ToString()),
            Travel = ReportJson.Number(report.Travel, scale),
            Unit = unit,
            Verdict = Snake.Of(c.Verdict.ToString()),
            ExpectedMm = ReportJson.Number(c.ExpectedChangeM, MmPerM),
            MeasuredMm = ReportJson.Number(c.MeasuredChangeM, MmPerM),
            Low95 = ReportJson.Number(c.Interval95.Lower, MmPerM),
            High95 = ReportJson.Number(c.Interval95.Upper, MmPerM),
            LogLikelihoodRatio = ReportJson.Number(c.LogLikelihoodRatio),
            HangsAfter = c.HangsAfter,
            HangsEach = c.HangsEach,
            Expected = new(ReportJson.Number(report.Expected.LeftKg), ReportJson.Number(report.Expected.RightKg)),
            Sentence = Words.English.Ground.Change(c, Words.English.PartShort(report.Adjustment.Kind), Numbers.Invariant),
            Warnings = Faults(report.Faults),
            Cautions = ReportJson.CautionList(ChangeCautions(report)),
        }, _context.HangChangeJson) + "\n";
    }

    /// <summary>One fault as a sentence.</summary>
    public static string Sentence(GroundFault fault, ReportStyle style) => style.Words.Ground.Fault(fault, new Numbers(style));

    /// <summary>What a reading is and how it is taken; the name is <c>table.key</c> of the rig file.</summary>
    public static string Reading(string name, ReportStyle? style = null) => WordsOf(style).Reading(name);

    /// <summary>Title of a sheet.</summary>
    public static string Title(SheetKind kind, ReportStyle? style = null) => WordsOf(style).SheetTitle(kind);

    /// <summary>What an empty answer means.</summary>
    public static string SkipHint(ReportStyle? style = null) => WordsOf(style).Labels.SkipHint;

    /// <summary>What a yes-or-no question asks for.</summary>
    public static string YesNo(ReportStyle? style = null) => WordsOf(style).Labels.YesNo;

    /// <summary>Questions of the complaint: side, when, since, changed, other wing.</summary>
    public static ImmutableArray<string> ComplaintQuestions(ReportStyle? style = null) => [.. Enum.GetValues<ComplaintQuestion>().Select(WordsOf(style).Question)];

    /// <summary>What was written into the rig file.</summary>
    public static string Written(string file, int readings, ReportStyle? style = null) => WordsOf(style).Written(file, readings);

    /// <summary>The hang check in one paragraph.</summary>
    public static string HangCheck(HangCheckResult hang, LateralGeometry? tape, ReportStyle style) => style.Words.Ground.HangCheck(hang, tape, new Numbers(style));

    internal static MessageJson[] Faults(ImmutableArray<GroundFault> faults) =>
        [.. faults.Select(f => new MessageJson(Snake.Of(f.Code.ToString()), Words.English.Ground.Fault(f, Numbers.Invariant)))];

    internal static HangResultJson? Measured(RigReport report)
    {
        const double MmPerM = 1000;
        return report.HangCheck is not HangCheckResult hang ? null : new()
        {
            OffsetMm = ReportJson.Number(hang.OffsetM, MmPerM),
            Low95 = ReportJson.Number(hang.Interval95.Lower, MmPerM),
            High95 = ReportJson.Number(hang.Interval95.Upper, MmPerM),
            Hangs = hang.Hangs.Length,
            BothScalesKg = ReportJson.Number(hang.SumKg),
            SeatingSdMm = ReportJson.Number(hang.SeatingSdM, MmPerM),
            TapeMm = ReportJson.Number(report.Tape?.OffsetM, MmPerM),
            TapePlusMinusMm = ReportJson.Number(1.96 * report.Tape?.StandardDeviation, MmPerM),
        };
    }

    /// <summary>A sheet to print and fill in, for a machine.</summary>
    /// <param name="kind">Which.</param>
    /// <param name="rig">The machine: its name, what its file says now, and the readings to expect.</param>
    /// <param name="style">Units and culture.</param>
    public static ReportDocument Sheet(SheetKind kind, Rig rig, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(rig);
        ArgumentNullException.ThrowIfNull(style);
        return SheetDocument.Build(kind, rig, style.Words, new Numbers(style));
    }

    /// <summary>The checks of a complaint as a document.</summary>
    public static ReportDocument Document(ChecksReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        return ChecksDocument.Build(report, style.Words, new Numbers(style));
    }

    /// <summary>The proof of a change as a document.</summary>
    public static ReportDocument Document(HangChangeReport report, ReportStyle style)
    {
        ArgumentNullException.ThrowIfNull(report);
        ArgumentNullException.ThrowIfNull(style);
        Words words = style.Words;
        var numbers = new Numbers(style);
        var document = new DocumentBuilder(words);
        document.Answer(words.Ground.Change(report.Change, words.PartShort(report.Adjustment.Kind), numbers));
        document.Paragraph($"{words.Ground.Labels.Expected}: {words.Ground.Expected(report.Expected, report.ExpectedPlusMinusKg, numbers)}.");
        document.Heading(words.Ground.Labels.EntryFaults);
        document.List(report.Faults.Select(f => words.Ground.Fault(f, numbers)));
        document.Cautions(ChangeCautions(report), numbers);
        return document.Build(words.Ground.Labels.HangCheck, words.PartShort(report.Adjustment.Kind));
    }

    private static string Brief(string sentence, ReportStyle style) => sentence + "\n" + style.Words.Caution(CautionCode.Estimate, new Numbers(style)) + "\n";

    private static GroundWords WordsOf(ReportStyle? style) => (style?.Words ?? Words.English).Ground;

    private static IEnumerable<CautionCode> ChangeCautions(HangChangeReport report) =>
        Wording.Cautions.For(CautionPlaces.HangCheckSheet | Wording.Cautions.PlacesOf([report.Adjustment.Kind]));
}
