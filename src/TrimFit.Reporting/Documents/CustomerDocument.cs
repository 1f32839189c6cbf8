using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>The customer's page: one side of A4.</summary>
internal static class CustomerDocument
{
    public static ReportDocument Build(CustomerPage page, Words words, Numbers numbers)
    {
        CustomerWords c = words.Customer;
        var document = new DocumentBuilder(words);
        document.Fields([new(c.Machine, page.Machine), new(c.Customer, page.Customer), new(c.Wing, page.Wing), new(c.Date, page.Date)]);
        Part(document, c.Told, page.Complaint);
        document.Heading(c.Checked);
        document.Checks(page.Checks.IsDefaultOrEmpty ? c.UsualChecks.Select(t => new CheckItem(t)) : page.Checks);
        Part(document, c.Measured, page.Measured);
        Part(document, c.Changed, page.Changed);
        if (!page.Readings.IsDefaultOrEmpty)
            document.Table([new(c.Reading, false), new(c.Before), new(c.After)], page.Readings.Select(r => (IReadOnlyList<string>)[r.Name, r.Before ?? "", r.After ?? ""]));
        if (page.LeftOver is string left)
            document.Heading(c.LeftAndNormal).Paragraph(left);
        document.Heading(c.FirstFlight).Steps(c.FirstFlightSteps);
        document.Heading(c.ComeBack).List(c.ComeBackWhen);
        document.Signatures([page.SignedBy is string signed ? $"{c.SignedWorkshop}: {signed}" : c.SignedWorkshop, c.SignedCustomer]);
        CautionPlaces places = CautionPlaces.ComplaintSheet | (page.PartMoved ? CautionPlaces.AnyAdjustment : 0) | (page.SpacingChanged ? CautionPlaces.SpacingChange : 0);
        document.Cautions(Cautions.For(places), numbers);
        return document.Build(c.Title, "");
    }

    /// <summary>What a flight's result can fill in; the rest stays open.</summary>
    public static CustomerPage Of(FitReport report, Words words, Numbers numbers)
    {
        TrimAnalysis a = report.Analysis;
        FitAnswer answer = FitAnswer.Of(a);
        AdjustmentReport? first = answer.Adjustment;
        bool balanced = a.Verdict.Code == VerdictCode.Balanced;
        CustomerWords c = words.Customer;
        return new()
        {
            Machine = a.Rig.Name,
            Date = report.Import.Diagnostics.Sampling.Start is DateTimeOffset start ? start.ToString("yyyy-MM-dd", System.Globalization.CultureInfo.InvariantCulture) : null,
            Measured = c.MeasuredPull(answer, numbers),
            Changed = c.Change(first, balanced, first is null ? "" : words.PartShort(first.Kind), numbers),
            Readings = first is null ? [] : [.. Readings(a, first, words, numbers)],
            LeftOver = first is null ? null : c.LeftOver(first.TurnLeftAt.FirstOrDefault(t => t.Setting == PowerSetting.Off)?.RateRadPerSec, numbers),
            PartMoved = first is not null,
            SpacingChanged = first?.Kind == AdjustmentKind.CarabinerOneSide,
        };
    }

    private static IEnumerable<CustomerReading> Readings(TrimAnalysis a, AdjustmentReport first, Words words, Numbers numbers)
    {
        CustomerWords c = words.Customer;
        if (first.Kind is AdjustmentKind.CarabinerPair or AdjustmentKind.CarabinerOneSide or AdjustmentKind.BarSpacer)
        {
            yield return new(c.Carabiner(left: true), words.Lateral(a.Rig.Carabiners.LeftM.Value, numbers), null);
            yield return new(c.Carabiner(left: false), words.Lateral(a.Rig.Carabiners.RightM.Value, numbers), null);
        }
        else if (first.Kind is AdjustmentKind.HarnessFront or AdjustmentKind.HarnessFrontRear)
        {
            yield return new(c.HangPoints(front: true), words.Lateral(a.Rig.HangPoints.FrontOffsetM.Value, numbers), null);
            if (first.Kind == AdjustmentKind.HarnessFrontRear)
                yield return new(c.HangPoints(front: false), words.Lateral(a.Rig.HangPoints.RearOffsetM.Value, numbers), null);
        }
        else
        {
            yield return new(c.OtherPart(first.Kind, words.PartShort(first.Kind)), null, null);
        }
        // Only what somebody read: the statics' own figures are no readings.
        yield return new(c.Scale(left: true), a.Rig.HangCheck is RigHangCheck check ? numbers.Mass(check.LeftKg.Value) : null, null);
        yield return new(c.Scale(left: false), a.Rig.HangCheck is RigHangCheck other ? numbers.Mass(other.RightKg.Value) : null, null);
    }

    private static void Part(DocumentBuilder document, string heading, string? text)
    {
        document.Heading(heading);
        if (text is null)
            document.Lines(2);
        else
            document.Paragraph(text);
    }
}
