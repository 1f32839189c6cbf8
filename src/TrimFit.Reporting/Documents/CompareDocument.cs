using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Logs;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Figures;
using TrimFit.Reporting.Wording;
using TrimFit.Reporting.Wording.Comparing;

namespace TrimFit.Reporting.Documents;

/// <summary>The report of <c>compare</c>: did it work, what comes next, and what to doubt.</summary>
internal static class CompareDocument
{
    public static ReportDocument Build(CompareReport report, Words words, Numbers numbers, bool figures)
    {
        FlightComparison c = report.Comparison;
        CompareWords w = words.Comparing;
        CompareHeads h = w.Heads;
        var document = new DocumentBuilder(words);
        document.Answer(w.Answer(c, numbers));
        document.Paragraph(w.Verdict(c, numbers));
        if (report.Order is OpenedOrder order)
            document.Paragraph(w.Order(order, order.Setups.Length == c.Flights.Length));
        document.Heading(h.BeforeAfter);
        if (c.Setups.Length > 1)
            Changes(document, c, numbers);
        else
            Settings(document, c, numbers);
        document.Paragraph(w.Removed(c, numbers));
        if (c.Attribution is { Of: not AttributedPull.AtBalance }) // of the pull where it is to be nulled the share stands above
            document.Paragraph(w.Attribution(c.Attribution, numbers));
        document.Paragraph(w.Trend(c, numbers));
        if (figures)
        {
            document.Heading(h.PowerPlot);
            if (c.Setups.Length > 1)
                document.Figure(ComparePlots.OverPower(c, words, numbers), w.PowerPlotDescription(c));
            document.Heading(h.History);
            document.Figure(ComparePlots.History(c, words, numbers), w.HistoryDescription(c));
        }
        Next(document, c, numbers);
        document.Heading(h.Noticed);
        document.List(c.Notices.Select(n => w.Notice(n, numbers)));
        if (c.Setups.Length > 2)
        {
            document.Heading(h.Settings);
            Settings(document, c, numbers);
        }
        document.Heading(h.Flights);
        Flights(document, report, numbers);
        if (c.Scatter is ScatterReport scatter)
            document.Paragraph(w.Scatter(scatter, numbers));
        Coefficients(document, c, report, numbers);
        if (c.Next is TrimAnalysis next)
            FitDocument.Sensitivity(document, next.Sensitivity, numbers);
        document.Heading(words.Labels.Warnings);
        document.List([
            .. report.Flights.SelectMany((f, i) => f.Import.Diagnostics.Warnings.Select(n => $"{c.Flights[i].Name}: {words.Said(n.Message, numbers)}")),
            .. c.Next is TrimAnalysis a ? a.Warnings.Where(f => !a.Verdict.Reasons.Any(r => r.Code == f.Code)).Select(f => words.Finding(f, numbers)).Distinct() : []]);
        document.Paragraph($"{words.Labels.ProgramVersion} {report.Provenance.ProgramVersion}.");
        document.Cautions(c.Next is TrimAnalysis last ? Cautions.Of(last) : Cautions.For(CautionPlaces.Everywhere), numbers);
        string subject = c.Flights[^1].Analysis.Rig.Name;
        return document.Build($"{w.Title}: {subject}", string.Join(", ", report.Flights.SelectMany(f => f.Import.Diagnostics.Files.Select(x => x.Name))));
    }

    private static void Changes(DocumentBuilder document, FlightComparison c, Numbers numbers)
    {
        Labels l = document.Words.Labels;
        CompareHeads h = document.Words.Comparing.Heads;
        bool newtons = c.ThrustBasis == ThrustBasis.Newton;
        List<TableColumn> columns = [new(l.Power, false)];
        if (newtons)
            columns.Add(new($"{l.Thrust} {numbers.ForceUnit}"));
        columns.AddRange([new($"{h.Before} {numbers.RateUnit}"), new(l.Range95), new($"{h.After} {numbers.RateUnit}"), new(l.Range95), new($"{h.Change} {numbers.RateUnit}"), new(l.Range95), new(h.Inside, false)]);
        document.Table(columns, c.Changes.Select(x =>
        {
            List<string> row = [document.Words.Setting(x.Setting)];
            if (newtons)
                row.Add(x.After.ThrustN is double n ? numbers.ForceNumber(n) : "-");
            row.AddRange([
                numbers.RateNumber(x.Before.Rate.Mean), numbers.RateRange(x.Before.Interval95, l.To), numbers.RateNumber(x.After.Rate.Mean),
                numbers.RateRange(x.After.Interval95, l.To), numbers.RateNumber(x.Change.Mean), numbers.RateRange(x.Interval95, l.To),
                document.Words.Comparing.Inside(x.After, c.Options.Trim.Tolerance.RadPerSec)]);
            return (IReadOnlyList<string>)row;
        }));
    }

    private static void Settings(DocumentBuilder document, FlightComparison c, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        CompareHeads h = words.Comparing.Heads;
        document.Table(
            [new(h.Setting, false), new(l.CgOffset), .. c.Setups.IsEmpty ? [] : c.Setups[0].At.Select(p => new TableColumn(words.Setting(p.Setting))), new(l.Range95), new(h.HowPooled, false)],
            c.Setups.Select(s => (IReadOnlyList<string>)[
                s.Name, words.Lateral(s.CgOffsetM, numbers), .. s.At.Select(p => numbers.RateNumber(p.Rate.Mean)), numbers.RateRange(s.AtBalance.Interval95, l.To), words.Comparing.Method(s.Method)]));
    }

    private static void Next(DocumentBuilder document, FlightComparison c, Numbers numbers)
    {
        if (c.Next is not TrimAnalysis next)
            return;
        Words words = document.Words;
        FitAnswer answer = FitAnswer.Of(next);
        document.Heading(words.Comparing.Heads.Next);
        if (c.Verdict?.Code != ComparisonVerdictCode.Fixed && answer.Adjustment is AdjustmentReport best)
            document.Instruction(words.FirstStep(best, next.Rig, numbers));
        document.Paragraph(words.Answer(answer, numbers) + (next.Verdict.Code is VerdictCode.Balanced or VerdictCode.Insufficient ? "" : " " + words.Comparing.Strength(next.Verdict.Strength)));
        if (next.Shift is ShiftReport shift && answer.Kind == AnswerKind.Travel)
            document.Paragraph(words.Shift(shift, numbers));
        if (c.Setups.Length > 1)
            document.Paragraph(words.Comparing.NextNote(c.PairUsed));
        document.List(next.Verdict.Reasons.Where(f => f != answer.Reason).Select(f => words.Finding(f, numbers)));
    }

    private static void Flights(DocumentBuilder document, CompareReport report, Numbers numbers)
    {
        FlightComparison c = report.Comparison;
        Labels l = document.Words.Labels;
        CompareHeads h = document.Words.Comparing.Heads;
        document.Table(
            [new(h.Flight, false), new(h.Setting, false), new(h.Day, false), new(h.PullInLevelFlight), new(l.Range95), new(l.SuspendedMass)],
            c.Flights.Select((f, i) =>
            {
                (double Value, double Half)? pull = ComparePlots.Of(f, i, c);
                return (IReadOnlyList<string>)[
                    $"{numbers.Integer(i + 1)} {f.Name}", f.Setup, f.Date?.ToString("yyyy-MM-dd", System.Globalization.CultureInfo.InvariantCulture) ?? "-",
                    pull is { } p ? numbers.RateNumber(p.Value) : "-",
                    pull is { } q ? numbers.RateRange(new ConfidenceInterval(q.Value - q.Half, q.Value + q.Half, 0.95), l.To) : "-",
                    numbers.Mass(f.Analysis.RigReport.SuspendedKg)];
            }));
    }

    private static void Coefficients(DocumentBuilder document, FlightComparison c, CompareReport report, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        CompareHeads h = words.Comparing.Heads;
        ControlUnit brake = report.Flights[^1].Import.Flight.BrakeUnit;
        if (report.Flights.Any(f => f.Import.Flight.BrakeUnit != brake) && c.Coefficients.Any(x => x.Name == TurnCoefficient.BrakeDifference))
            brake = ControlUnit.Count;
        document.Heading(h.Coefficients);
        document.Table([new(l.Coefficient, false), new(h.Before), new(h.After), new(h.Change), new(l.Range95), new(l.Unit, false)],
            c.Coefficients.Select(x =>
            {
                double scale = x.Name == TurnCoefficient.BrakeDifference ? 1 / ControlUnits.ShownPerSi(brake) : 1;
                string Show(double rad) => numbers.Significant(double.RadiansToDegrees(rad) * scale, 3);
                ConfidenceInterval i = x.Change.Interval(0.95);
                return (IReadOnlyList<string>)[words.Coefficient(x.Name), Show(x.Before.Mean), Show(x.After.Mean), Show(x.Change.Mean), Show(i.Lower) + l.To + Show(i.Upper),
                    words.UnitName(FitFacts.UnitOf(x.Name, c.ThrustBasis, brake, brake))];
            }));
    }
}
