using TrimFit.Core.Planning;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Documents;

/// <summary>A test card: on the first side short card, needs, what to do before, rules and cautions; on the second every leg and the precision.</summary>
internal static class CardDocument
{
    public static ReportDocument Build(CardReport report, Words words, Numbers numbers)
    {
        CardPlan plan = report.Plan;
        CardWords w = words.Card;
        var document = new DocumentBuilder(words);
        document.Answer(w.Answer(plan, numbers));
        if (!plan.Legs.IsEmpty)
        {
            // One side of paper to fly by, the other to learn from.
            document.Paragraph(w.Reaches(plan, numbers));
            document.Heading(w.ShortTitle);
            document.Steps(Runs(plan).Select(run => w.Run(run[0].HeadingRad, run.Where(l => l.Kind != CardLegKind.Hold), report.Rig, numbers)));
            document.Paragraph(w.ShortNote(plan, numbers));
            if (report.BlindCommitment is string commitment)
            {
                document.Heading(w.BlindTitle);
                document.List(w.Blind(commitment));
            }
            document.Heading(w.NeedsTitle);
            document.Fields(w.Needs(plan, report.Rig, numbers).Select(n => new FieldItem(n.Name, n.Value)));
            document.Heading(w.BeforeTitle);
            document.Checks(w.Before(plan, report.Rig, numbers).Select(t => new CheckItem(t)));
            document.Heading(w.RulesTitle);
            document.List(w.Rules(plan, numbers));
        }
        document.Cautions(CautionsOf(plan), numbers);
        if (!plan.Legs.IsEmpty)
        {
            document.PageBreak();
            document.Heading(w.LegsTitle);
            document.Table([new(w.Do, false), new(w.Number), new(w.Time), new(w.Heading, false), new(w.Seconds), new(w.Height)], Rows(report, w, numbers));
            document.Heading(w.PrecisionTitle);
            document.List(w.Precision(plan, numbers));
        }
        return document.Build($"{w.Title}: {report.Rig.Name}", report.FromFile is SourceFile from ? $"{report.RigFile.Name}, {from.Name}" : report.RigFile.Name);
    }

    /// <summary>The cautions of a card; those of ballast when a leg has some.</summary>
    public static IEnumerable<CautionCode> CautionsOf(CardPlan plan) =>
        Cautions.For(CautionPlaces.Card | (plan.Legs.Any(l => l.Kind == CardLegKind.Ballast) ? CautionPlaces.Ballast : CautionPlaces.None));

    /// <summary>The legs of each run, without the turns between.</summary>
    private static IEnumerable<List<CardLeg>> Runs(CardPlan plan)
    {
        var run = new List<CardLeg>();
        foreach (CardLeg leg in plan.Legs)
        {
            if (leg.Kind == CardLegKind.Turn)
            {
                if (run.Count > 0)
                    yield return run;
                run = [];
            }
            else
            {
                run.Add(leg);
            }
        }
        if (run.Count > 0)
            yield return run;
    }

    /// <summary>One row for each measuring leg with the hold before it, and one for each turn.</summary>
    private static IEnumerable<IReadOnlyList<string>> Rows(CardReport report, CardWords w, Numbers numbers)
    {
        CardPlan plan = report.Plan;
        CardLeg? hold = null;
        for (int i = 0; i < plan.Legs.Length; i++)
        {
            CardLeg leg = plan.Legs[i];
            if (leg.Kind == CardLegKind.Hold && i + 1 < plan.Legs.Length)
            {
                hold = leg;
                continue;
            }
            double height = plan.StartHeightM + plan.CautiousHeights[i];
            yield return
            [
                w.Leg(leg, hold, report.Rig, numbers),
                hold is null ? numbers.Integer(leg.Number) : numbers.Integer(hold.Number) + ", " + numbers.Integer(leg.Number),
                Clock((hold ?? leg).StartSec, numbers),
                leg.Kind == CardLegKind.Turn ? "" : w.HeadingName(leg.HeadingRad),
                hold is null ? numbers.Plain(leg.Seconds, 0) : numbers.Plain(hold.Seconds, 0) + " + " + numbers.Plain(leg.Seconds, 0),
                numbers.Height(height),
            ];
            hold = null;
        }
    }

    /// <summary>Minutes and seconds since the start, as a stop watch shows them.</summary>
    private static string Clock(double sec, Numbers numbers)
    {
        int whole = (int)Math.Round(sec);
        return numbers.Integer(whole / 60) + ":" + (whole % 60 < 10 ? "0" : "") + numbers.Integer(whole % 60);
    }
}
