using TrimFit.Reporting.Figures;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>The report of <c>inspect</c>.</summary>
internal static class InspectDocument
{
    public static ReportDocument Build(InspectReport report, Words words, Numbers numbers)
    {
        Labels l = words.Labels;
        var document = new DocumentBuilder(words);
        document.Answer(words.InspectAnswer(report.Import.Diagnostics, numbers));
        document.List(DataTables.Facts(report.Import.Diagnostics, report.Wind, report.Gyro, words, numbers));
        document.Heading(l.File);
        DataTables.Files(document, report.Import.Diagnostics, numbers);
        DataTables.Columns(document, report.Import.Diagnostics, numbers, usedOnly: false);
        document.Heading(l.Warnings);
        document.List([.. report.Import.Diagnostics.Warnings.Select(n => words.Said(n.Message, numbers)), .. report.Findings.Select(f => words.Finding(f, numbers))]);
        document.Cautions(Cautions.For(CautionPlaces.Everywhere), numbers);
        return document.Build(l.InspectTitle, string.Join(", ", report.Import.Diagnostics.Files.Select(f => f.Name)));
    }
}

/// <summary>The report of <c>rig</c>.</summary>
internal static class RigDocument
{
    public static ReportDocument Build(RigSheetReport report, Words words, Numbers numbers, bool figures)
    {
        Labels l = words.Labels;
        var document = new DocumentBuilder(words);
        document.Answer(words.RigAnswer(report.Statics, report.Rig, numbers));
        if (figures)
        {
            document.Heading(l.Drawing);
            document.Figure(RigDrawing.Draw(report.Rig, report.Statics, null, words, numbers), words.DrawingDescription(after: false) + " " + l.DrawingNote, FigureKind.Drawing);
        }
        document.Heading(l.Masses);
        RigTables.Masses(document, report.Statics, numbers);
        document.Heading(l.TwistNow);
        RigTables.At(document, report.Statics, numbers);
        RigTables.Adjustments(document, report.Statics, numbers);
        FitDocument.AssumptionTable(document, report.Rig.Assumptions(), numbers);
        if (report.Statics.HangCheck is not null)
        {
            document.Heading(words.Ground.Labels.HangCheck);
            document.Paragraph(words.Ground.HangCheck(report.Statics.HangCheck, report.Statics.Tape, numbers));
        }
        document.Heading(l.Warnings);
        document.List([.. report.Statics.GroundFaults.Select(f => words.Ground.Fault(f, numbers)), .. report.Statics.Findings.Select(f => words.Finding(f, numbers))]);
        document.Cautions(Cautions.For(Cautions.PlacesOf(report.Statics.Adjustments.Select(a => a.Kind))), numbers);
        return document.Build($"{l.RigTitle}: {report.Rig.Name}", report.RigFile.Name);
    }
}
