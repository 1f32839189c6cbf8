using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Figures;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>The report of one flight: answer, what to do, numbers, data, assumptions, warnings, cautions, in this order.</summary>
internal static class FitDocument
{
    public static ReportDocument Build(FitReport report, Words words, Numbers numbers, bool figures)
    {
        TrimAnalysis a = report.Analysis;
        Labels labels = words.Labels;
        ControlUnit brake = report.Import.Flight.BrakeUnit;
        var document = new DocumentBuilder(words);
        FitAnswer answer = FitAnswer.Of(a);

        document.Answer(words.Answer(answer, numbers));
        // Strength is about moving something; where nothing needs to be moved it would only confuse.
        document.Paragraph(words.Verdict(a.Verdict.Code) + (a.Verdict.Code == VerdictCode.Balanced ? "" : " " + words.Strength(a.Verdict.Strength)));
        if (a.Verdict.Code == VerdictCode.ConstantPull)
            document.Instruction(words.Report.CausesBeforeParts);
        WhatToDo(document, a, answer, numbers, figures);
        if (figures)
            Cautioned(document, a, numbers); // on the first screen; in a terminal the end is what people see
        if (figures)
            TurnPicture(document, a, numbers);
        if (report.CardOutcome is Core.Planning.CardOutcome card)
            document.Heading(words.Card.OutcomeTitle).Paragraph(words.Card.Outcome(card, numbers)).Paragraph(words.Card.NextLegs(card, numbers));
        Pull(document, a, brake, numbers);
        if (figures)
        {
            document.Heading(labels.FlightPlot);
            document.Figure(FlightPlot.Draw(a, brake, words, numbers), a.Signals.Count == 0 ? ""
                : words.FlightPlotDescription(a.Signals.TimeSec[^1] - a.Signals.TimeSec[0], numbers));
            Residuals(document, a, numbers);
        }
        Adjustments(document, a, numbers, figures);
        if (figures)
            RigPictures(document, a, numbers);
        Model(document, a, brake, report.Import.Flight.TrimmerUnit, numbers);
        if (figures)
            CovarianceTable(document, a, brake, report.Import.Flight.TrimmerUnit, numbers);
        Sensitivity(document, a.Sensitivity, numbers);
        document.Heading(labels.TwistNow);
        RigTables.At(document, a.RigReport, numbers);
        document.Heading(words.Report.ProveWrongTitle);
        document.List(words.Report.ProveWrong(a, answer, words, numbers));
        Data(document, report, numbers);
        if (figures)
            WindPicture(document, a, numbers);
        AssumptionTable(document, a.Assumptions, numbers);
        document.Heading(labels.Warnings);
        document.List([
            .. report.Import.Diagnostics.Warnings.Select(n => words.Said(n.Message, numbers)),
            .. a.RigReport.GroundFaults.Select(f => words.Ground.Fault(f, numbers)),
            .. a.Warnings.Where(f => !a.Verdict.Reasons.Any(r => r.Code == f.Code)).Select(f => words.Finding(f, numbers))]); // reasons stand above
        if (figures)
        {
            Provenance(document, report);
            TrackPicture(document, report.Import.Flight, numbers);
        }
        else
        {
            Cautioned(document, a, numbers);
        }
        return document.Build($"{labels.ReportTitle}: {a.Rig.Name}", string.Join(", ", report.Import.Diagnostics.Files.Select(f => f.Name)));
    }

    private static void Cautioned(DocumentBuilder document, TrimAnalysis a, Numbers numbers) => document.Cautions(Cautions.Of(a), numbers);

    private static void TurnPicture(DocumentBuilder document, TrimAnalysis a, Numbers numbers)
    {
        string shown = $"{document.Words.Report.PullFinding(a.Pull, numbers)} {document.Words.TurnPlotDescription(a.Fit.Points.Length, a.Fit[TurnCoefficient.Thrust] is not null)}";
        document.Heading(document.Words.Labels.TurnPlot);
        document.Figure(TurnPlot.Draw(a, shown, document.Words, numbers), shown);
    }

    private static void Residuals(DocumentBuilder document, TrimAnalysis a, Numbers numbers)
    {
        IReadOnlyList<(TurnPoint Point, double RadPerSec)> residuals = ResidualPlot.Residuals(a.Fit);
        if (residuals.Count == 0)
            return;
        double rms = Math.Sqrt(residuals.Average(r => r.RadPerSec * r.RadPerSec));
        string shown = document.Words.Report.ResidualDescription(rms, residuals.Count, numbers);
        document.Heading(document.Words.Report.ResidualsTitle);
        document.Figure(ResidualPlot.Draw(a, shown, document.Words, numbers), shown);
    }

    private static void RigPictures(DocumentBuilder document, TrimAnalysis a, Numbers numbers)
    {
        Words words = document.Words;
        AdjustmentReport? best = FitAnswer.Best(a);
        document.Heading(words.Labels.Drawing);
        document.Figure(RigDrawing.Draw(a.Rig, a.RigReport, best, words, numbers), words.DrawingDescription(best is not null) + " " + words.Labels.DrawingNote, FigureKind.Drawing);
        if (BehindDrawing.Forces(a.Rig, a.RigReport, best, words, numbers) is (string Svg, string Description) forces)
        {
            document.Heading(words.Report.ForcesTitle);
            document.Figure(forces.Svg, forces.Description + (best is null ? "" : $" ({words.Report.NowAndAfter}, {words.PartShort(best.Kind)})"), FigureKind.Drawing);
        }
    }

    private static void WindPicture(DocumentBuilder document, TrimAnalysis a, Numbers numbers)
    {
        string shown = document.Words.Report.WindDescription(document.Words.Wind(a.Signals.Wind, numbers));
        document.Heading(document.Words.Report.WindTitle);
        document.Figure(GroundPlots.Wind(a.Signals, shown, document.Words, numbers), shown, FigureKind.Drawing);
    }

    private static void TrackPicture(DocumentBuilder document, FlightLog flight, Numbers numbers)
    {
        Words words = document.Words;
        if (GroundPlots.Track(flight, m => words.Report.TrackDescription(m, numbers), words, numbers) is (string Svg, double LengthM) track)
            document.Heading(words.Report.TrackTitle).Figure(track.Svg, words.Report.TrackDescription(track.LengthM, numbers), FigureKind.Drawing);
    }

    private static void Provenance(DocumentBuilder document, FitReport report)
    {
        Labels l = document.Words.Labels;
        ReportWords w = document.Words.Report;
        document.Heading(w.ProvenanceTitle);
        List<IReadOnlyList<string>> rows = [.. report.Import.Diagnostics.Files.Select(f => (IReadOnlyList<string>)[l.File, f.Name, f.Sha256])];
        rows.Add([w.RigFile, report.RigFile.Name, report.RigFile.Sha256]);
        if (report.SheetFile is SourceFile sheet)
            rows.Add([w.SheetFile, sheet.Name, sheet.Sha256]);
        document.Table([new(l.Source, false), new(l.File, false), new(w.Sha256, false)], rows);
        document.Paragraph(w.Carried(report.Carried));
    }

    private static void CovarianceTable(DocumentBuilder document, TrimAnalysis a, ControlUnit brake, ControlUnit trimmer, Numbers numbers)
    {
        Words words = document.Words;
        int n = a.Fit.Coefficients.Length;
        int[] known = [.. Enumerable.Range(0, n).Where(i => a.Fit.Coefficients[i].Estimate is not null)];
        if (known.Length == 0)
            return;
        double[] scale = [.. a.Fit.Coefficients.Select(c => double.RadiansToDegrees(1) / FitFacts.ShownPerSi(c.Name, brake, trimmer))];
        document.Heading(words.Report.CovarianceTitle).Paragraph(words.Report.CovarianceNote);
        document.Table([new(words.Labels.Coefficient, false), .. known.Select(i => new TableColumn(words.Coefficient(a.Fit.Coefficients[i].Name)))],
            known.Select(i => (IReadOnlyList<string>)[words.Coefficient(a.Fit.Coefficients[i].Name),
                .. known.Select(j => numbers.Significant(a.Fit.Covariance[(i * n) + j] * scale[i] * scale[j], 3))]));
    }

    private static void WhatToDo(DocumentBuilder document, TrimAnalysis a, FitAnswer answer, Numbers numbers, bool figures)
    {
        if (answer.Adjustment is AdjustmentReport best)
            document.Heading(document.Words.Labels.WhatToDo).Instruction(document.Words.FirstStep(best, a.Rig, numbers));
        if (figures)
            ActionPicture(document, a, answer, numbers);
        if (a.Shift is ShiftReport shift && answer.Kind == AnswerKind.Travel)
            document.Paragraph(document.Words.Shift(shift, numbers));
        document.Heading(document.Words.Labels.WhatIsMissing);
        document.List(a.Verdict.Reasons.Where(f => f != answer.Reason).Select(f => document.Words.Finding(f, numbers))); // that one is in the answer
        if (figures && a.Verdict.Code == VerdictCode.Insufficient)
            document.Heading(document.Words.Report.FlyAgain).Steps(document.Words.Report.LegsToFly);
    }

    private static void ActionPicture(DocumentBuilder document, TrimAnalysis a, FitAnswer answer, Numbers numbers)
    {
        Words words = document.Words;
        AdjustmentReport? first = answer.Adjustment;
        string travel = first is null ? "" : words.Report.ToYourSide(numbers.Travel(first.FirstStep, first.Unit), first.FirstStep);
        string shown = words.Report.BehindDescription(first, first is null ? "" : words.PartShort(first.Kind), travel, numbers);
        document.Heading(first is null ? words.Report.BehindAsItIsTitle : words.Report.BehindTitle);
        document.Figure(BehindDrawing.Action(a.Rig, a.RigReport, first, a.Verdict.Code == VerdictCode.Balanced, shown, words, numbers), shown, FigureKind.Drawing);
    }

    private static void Pull(DocumentBuilder document, TrimAnalysis a, ControlUnit brake, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        bool newtons = a.Pull.At.Any(p => p.ThrustN is not null);
        bool held = a.Pull.At.Any(p => p.HeldBrake is not null);
        document.Heading(l.PullOverPower);
        List<TableColumn> columns = [new(l.Power, false)];
        if (newtons)
            columns.Add(new($"{l.Thrust} {numbers.ForceUnit}"));
        columns.AddRange([new(l.ThrustFraction), new(l.TurnRate), new(l.Range95)]);
        if (held)
            columns.Add(new($"{l.HeldBrake} {words.UnitName(ControlUnits.Name(brake))}"));
        document.Table(columns, a.Pull.At.Select(p =>
        {
            List<string> row = [words.Setting(p.Setting)];
            if (newtons)
                row.Add(p.ThrustN is double n ? numbers.ForceNumber(n) : "-");
            row.Add(numbers.PercentNumber(p.ThrustFraction));
            row.Add(p.RateRadPerSec is double r ? numbers.RateNumber(r) : "-");
            row.Add(p.Interval95 is ConfidenceInterval i ? numbers.RateRange(i, l.To) : "-");
            if (held)
                row.Add(p.HeldBrake is double b ? HeldBrake(b * ControlUnits.ShownPerSi(brake), words, numbers) : "-");
            return (IReadOnlyList<string>)row;
        }));
        document.Paragraph(words.CruiseBasis(a.Pull.CruiseBasis)
            + (a.Pull.SmallestDetectableRadPerSec is double s ? " " + words.SmallestDetectable(s, numbers) : ""));
    }

    private static string HeldBrake(double shown, Words words, Numbers numbers)
    {
        string size = numbers.Significant(Math.Abs(shown), Math.Abs(shown) < 10 ? 1 : 2);
        return shown == 0 ? size : $"{size} {words.Side(shown)}";
    }

    private static void Adjustments(DocumentBuilder document, TrimAnalysis a, Numbers numbers, bool figures)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        document.Heading(l.WaysToMakeIt);
        document.Table(
            [new(l.PartToMove, false), new(l.Travel), new(l.Range95), new(l.Settable), new(l.FirstStep),
                new($"{l.HangCheckLeft} {numbers.MassUnit}"), new($"{l.HangCheckRight} {numbers.MassUnit}")],
            a.Adjustments.Select(x => (IReadOnlyList<string>)[
                words.PartShort(x.Kind), words.Travel(x.Travel, x.Unit, numbers), TravelRange(x, words, numbers),
                words.Travel(x.Rounded, x.Unit, numbers), words.Travel(x.FirstStep, x.Unit, numbers),
                numbers.MassNumber(x.HangCheckLeftKg), numbers.MassNumber(x.HangCheckRightKg)]));
        if (a.Adjustments.IsEmpty)
            return;
        document.Paragraph(l.FirstStepNote);
        document.Heading(l.TurnLeftAfter);
        PowerSetting[] settings = [.. a.Adjustments[0].TurnLeftAt.Select(t => t.Setting)];
        document.Table([new(l.PartToMove, false), .. settings.Select(s => new TableColumn(words.Setting(s)))],
            a.Adjustments.Select(x => (IReadOnlyList<string>)[words.PartShort(x.Kind), .. settings.Select(s =>
                x.TurnLeftAt.FirstOrDefault(t => t.Setting == s)?.RateRadPerSec is double r ? numbers.RateNumber(r) : "-")]));
        document.Paragraph(l.TurnLeftNote);
        if (figures)
        {
            string shown = words.Report.TurnLeftDescription(words.PartShort(a.Adjustments[0].Kind),
                a.Adjustments[0].TurnLeftAt.FirstOrDefault(t => t.Setting == PowerSetting.Full)?.RateRadPerSec, numbers);
            document.Figure(TurnLeftPlot.Draw(a, shown, words, numbers), shown);
        }
        document.Heading(l.WhatElseChanges);
        document.Table(
            [new(l.PartToMove, false), new(l.ThrustLine), new(l.TwistRatio), new(l.TwistUpTo), new(l.TwistToward, false),
                new($"{l.RiserLoadLeft} {numbers.ForceUnit}"), new($"{l.RiserLoadRight} {numbers.ForceUnit}"), new(l.Limit, false)],
            a.Adjustments.Select(x => (IReadOnlyList<string>)[
                words.PartShort(x.Kind), words.Lateral(x.ThrustLineOffsetM, numbers),
                x.TwistRatio is double q ? numbers.Plain(q, 2) : "-", x.TwistRatioHigh95 is double u ? numbers.Plain(u, 2) : "-",
                words.Twist(x.TwistDirection),
                x.RiserLoadLeftN is double left ? numbers.ForceNumber(left) : "-", x.RiserLoadRightN is double right ? numbers.ForceNumber(right) : "-",
                x.WithinLimits switch { true => l.LimitInside, false => l.LimitBeyond, null => l.LimitNotGiven }]));
        document.List(a.Adjustments.SelectMany(x => x.Notes.Where(n => n.Code != FindingCode.LimitNotGiven) // the table says that already
            .Select(n => $"{words.PartShort(x.Kind)}: {words.Finding(n, numbers, x.Unit)}")));
    }

    private static string TravelRange(AdjustmentReport a, Words words, Numbers numbers)
    {
        ConfidenceInterval interval = a.Interval95;
        if (!interval.ExcludesZero)
            return words.Travel(interval.Lower, a.Unit, numbers) + words.Labels.To + words.Travel(interval.Upper, a.Unit, numbers);
        (double near, double far) = interval.Lower > 0 ? (interval.Lower, interval.Upper) : (interval.Upper, interval.Lower);
        return numbers.TravelNumber(Math.Abs(near), a.Unit) + words.Labels.To + numbers.TravelNumber(Math.Abs(far), a.Unit);
    }

    private static void Model(DocumentBuilder document, TrimAnalysis a, ControlUnit brake, ControlUnit trimmer, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        document.Heading(l.Model);
        document.Table([new(l.Coefficient, false), new(l.Value), new(l.Range95), new(l.Unit, false), new(l.Reason, false)],
            a.Fit.Coefficients.Select(c =>
            {
                double scale = c.Name switch
                {
                    TurnCoefficient.BrakeDifference => 1 / ControlUnits.ShownPerSi(brake),
                    TurnCoefficient.TrimmerDifference => 1 / ControlUnits.ShownPerSi(trimmer),
                    TurnCoefficient.CgShift => 1 / ControlUnits.ShownPerSi(ControlUnit.Meter),
                    _ => 1,
                };
                string Show(double? rad) => rad is double v && double.IsFinite(v) ? numbers.Significant(double.RadiansToDegrees(v) * scale, 3) : "-";
                ConfidenceInterval? i = c.Estimate is Estimate e ? a.Fit.Interval95(e) : null;
                return (IReadOnlyList<string>)[words.Coefficient(c.Name), Show(c.Estimate?.Value),
                    i is ConfidenceInterval k ? Show(k.Lower) + l.To + Show(k.Upper) : "-",
                    words.UnitName(FitFacts.UnitOf(c.Name, a.Fit.ThrustBasis, brake, trimmer)), words.Said(c.Reason, numbers)];
            }));
        List<string> items = [$"{l.Method}: {words.Method(a.Fit.Method)}"];
        if (a.Fit.LagSec is double lag)
            items.Add($"{l.Lag}: {numbers.Plain(lag, 2)} s");
        if (a.Fit.DisturbanceRmsRadPerSec is double rms)
            items.Add($"{l.SlowDisturbance}: {numbers.Plain(double.RadiansToDegrees(rms), 2)} {numbers.RateUnit}" + (a.Fit.DisturbanceTauSec is double tau ? $", {numbers.Plain(tau, 1)} s" : ""));
        items.Add($"{l.EffectiveSamples}: {Finite(a.Fit.EffectiveSamples, numbers, 2, l)}");
        items.Add($"{l.Condition}: {Finite(a.Fit.Condition, numbers, 3, l)}");
        items.Add(words.CrossCheck(FitFacts.CrossCheckAgrees(a)));
        document.List(items);
    }

    private static string Finite(double value, Numbers numbers, int digits, Labels l) => double.IsFinite(value) ? numbers.Significant(value, digits) : l.NotKnown;

    internal static void Sensitivity(DocumentBuilder document, SensitivityReport s, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        document.Heading(l.Sensitivity);
        string Range(ConfidenceInterval i) => numbers.SensitivityNumber(i.Lower) + l.To + numbers.SensitivityNumber(i.Upper);
        List<IReadOnlyList<string>> rows = [.. s.Sources.Select(x => (IReadOnlyList<string>)
            [words.SensitivitySource(x.Kind), numbers.SensitivityNumber(x.RadPerSecPerM), Range(x.Interval95), x.Used ? l.Yes : l.No])];
        if (s.RadPerSecPerM is double value)
            rows.Add([l.Together, numbers.SensitivityNumber(value), s.Interval95 is ConfidenceInterval i ? Range(i) : "-", ""]);
        document.Table([new(l.Source, false), new(numbers.SensitivityUnit), new(l.Range95), new(l.Used, false)], rows);
        List<string> items = [$"{l.YawRatio}: {numbers.Plain(s.YawRatio, 2)} ({numbers.Plain(s.YawRatioInterval95.Lower, 2)}{l.To}{numbers.Plain(s.YawRatioInterval95.Upper, 2)})"];
        if (s.PriorPredictiveP is double p)
            items.Add($"{l.PriorPredictive}: {numbers.Plain(p, 3)}");
        items.Add($"{l.EffectiveDraws}: {Finite(s.EffectiveSamples, numbers, 3, l)}");
        document.List(items);
    }

    private static void Data(DocumentBuilder document, FitReport report, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        document.Heading(l.Data);
        document.Paragraph(words.InspectAnswer(report.Import.Diagnostics, numbers));
        document.List(DataTables.Facts(report.Import.Diagnostics, report.Analysis.Signals.Wind, report.Analysis.Gyro, words, numbers));
        DataTables.Files(document, report.Import.Diagnostics, numbers);
        DataTables.Columns(document, report.Import.Diagnostics, numbers, usedOnly: true);
        document.Heading(l.SpansLeftOut);
        document.Table([new(l.From), new(l.Until), new(l.Reason, false)], report.Analysis.Fit.SpansLeftOut.Select(s => (IReadOnlyList<string>)
            [numbers.Plain(s.StartSec, 1), numbers.Plain(s.EndSec, 1), words.Said(s.Reason, numbers)]));
        document.Paragraph($"{l.ProgramVersion} {report.Provenance.ProgramVersion}.");
    }

    /// <summary>Values that nobody measured.</summary>
    public static void AssumptionTable(DocumentBuilder document, ImmutableArray<Assumption> assumptions, Numbers numbers)
    {
        Words words = document.Words;
        Labels l = words.Labels;
        document.Heading(l.Assumptions);
        if (assumptions.IsDefaultOrEmpty)
            return;
        document.Paragraph(l.AssumptionsNote);
        document.Table([new(l.Assumption, false), new(l.Value), new(l.Range95), new(l.Unit, false)], assumptions.Select(x =>
        {
            bool length = x.Unit == "mm" && numbers.Imperial;
            string Show(double v) => length ? numbers.LengthNumber(v / 1000) : numbers.Significant(v, 3);
            return (IReadOnlyList<string>)[words.Assumption(x.Name), Show(x.Value), x.Low95 < x.High95 ? Show(x.Low95) + l.To + Show(x.High95) : "-",
                length ? numbers.LengthUnit : x.Unit == "1" ? "" : words.UnitName(x.Unit)];
        }));
    }
}
