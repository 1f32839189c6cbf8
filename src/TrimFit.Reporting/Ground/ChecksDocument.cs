using TrimFit.Core.Ground;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>The complaint and the checks it suggests, as a sheet to fill in.</summary>
internal static class ChecksDocument
{
    /// <summary>Room for a number to be written by hand.</summary>
    internal const string Room = "________";

    public static ReportDocument Build(ChecksReport report, Words words, Numbers numbers)
    {
        GroundWords g = words.Ground;
        GroundLabels l = g.Labels;
        var document = new DocumentBuilder(words);
        document.Answer(g.ChecksAnswer(report.Complaint));
        document.Heading(l.Told);
        document.List(g.Told(report.Complaint));
        document.Heading(l.Checks);
        document.Table([new(l.Check, false), new(l.WriteDown, false), new(l.Why, false)],
            report.Checks.Select((c, i) => (IReadOnlyList<string>)[$"{numbers.Integer(i + 1)}. {g.Cause(c.Cause)}", Field(c.Cause, g, numbers), string.Join(", ", c.Reasons.Select(g.Reason))]));
        document.Paragraph(l.MendFirst);
        document.Heading(l.HowTo);
        document.Steps(report.Checks.Select(c => $"{Capital(g.Cause(c.Cause))}: {g.LookFor(c.Cause)} {l.WriteDown}: {g.NumberToWrite(c.Cause)}. {l.IfItStays}: {g.IfItStays(c.Cause)}."));
        document.Paragraph(l.ThenMeasure);
        document.Cautions(Wording.Cautions.For(CautionPlaces.ComplaintSheet), numbers);
        return document.Build(l.ChecksTitle, $"{l.Machine} {Room}{Room}   {l.DateAndName} {Room}{Room}");
    }

    /// <summary>As many places to write as the number has parts.</summary>
    private static string Field(SimpleCause cause, GroundWords g, Numbers numbers) =>
        string.Join("  ", g.NumberToWrite(cause).Split(',').Select(_ => Room)) + " " + g.UnitToWrite(cause, numbers);

    private static string Capital(string text) => char.ToUpperInvariant(text[0]) + text[1..];
}
