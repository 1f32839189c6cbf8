using TrimFit.Core.Ground;
using TrimFit.Core.Rigging;
using TrimFit.Core.Workshop;
using TrimFit.Reporting.Documents;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Jobs;

/// <summary>The job book as people read it: text for the terminal and Markdown, and the sentences of its actions.</summary>
public static class JobReportText
{
    /// <summary>A job for the terminal.</summary>
    public static string Job(JobReport report, ReportStyle style) => TextRenderer.Render(JobDocuments.Job(report, style));

    /// <summary>A job as Markdown.</summary>
    public static string JobMarkdown(JobReport report, ReportStyle style) => MarkdownRenderer.Render(JobDocuments.Job(report, style));

    /// <summary>The list for the terminal.</summary>
    public static string List(JobListReport report, ReportStyle style) => TextRenderer.Render(JobDocuments.List(report, style.Words, new Numbers(style)));

    /// <summary>Histories for the terminal.</summary>
    public static string History(JobHistoryReport report, ReportStyle style) => TextRenderer.Render(JobDocuments.History(report, style.Words, new Numbers(style)));

    /// <summary>The shop's memory for the terminal.</summary>
    public static string Memory(ShopMemoryReport report, ReportStyle style) => TextRenderer.Render(JobDocuments.Memory(report, style.Words, new Numbers(style)));

    /// <summary>What was kept after an action, as one line.</summary>
    public static string Kept(JobEvent what, long job, ReportStyle style) => Line(style.Words.Jobs.Kept(what, job, new Numbers(style)));

    /// <summary>Asks for readings again.</summary>
    public static string AskAgain(AdjustmentKind kind, MovedPart moved, double? recommended, ReportStyle style) => style.Words.Jobs.AskAgain(kind, moved, recommended, new Numbers(style));

    /// <summary>What two hang checks say; without them, that they are missing.</summary>
    public static string HangChange(HangChangeResult? result, AdjustmentKind kind, ReportStyle style) =>
        Line(result is null ? style.Words.Jobs.NoHangChange : style.Words.Ground.Change(result, style.Words.PartShort(kind), new Numbers(style)));

    /// <summary>What comes after an adjustment, with the cautions of one.</summary>
    public static string AfterAdjustment(AdjustmentKind kind, ReportStyle style)
    {
        var numbers = new Numbers(style);
        return Line(style.Words.Jobs.AfterAdjustment)
            + string.Concat(Cautions.For(Cautions.PlacesOf([kind])).Select(c => Line("! " + style.Words.Caution(c, numbers))));
    }

    /// <summary>Where the book is.</summary>
    public static string BookAt(string path, ReportStyle? style = null) => Line(Of(style).Jobs.BookAt(path));

    /// <summary>An export.</summary>
    public static string Exported(long job, string file, long bytes, ReportStyle style) => Line(style.Words.Jobs.Exported(job, file, bytes, new Numbers(style)));

    /// <summary>An import.</summary>
    public static string Imported(long job, long numberThere, ReportStyle? style = null) => Line(Of(style).Jobs.Imported(job, numberThere));

    /// <summary>A delete.</summary>
    public static string Deleted(long job, int flights, int files, bool roomGivenBack, ReportStyle? style = null) => Line(Of(style).Jobs.Deleted(job, flights, files, roomGivenBack));

    /// <summary>Asks before a delete.</summary>
    public static string AskDelete(JobRecord job, ReportStyle? style = null) => Of(style).Jobs.AskDelete(job);

    private static Words Of(ReportStyle? style) => style?.Words ?? Words.English;

    private static string Line(string text) => TextRenderer.Safe(text) + "\n";
}
