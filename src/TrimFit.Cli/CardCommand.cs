using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Import.Flights;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Reporting.Documents;

namespace TrimFit.Cli;

internal static class CardCommand
{
    public static int Run(CardChoices card, CommonChoices choices, TextWriter output, TextWriter error)
    {
        (Rig rig, SourceFile rigFile) = InputFiles.Rig(card.RigPath);
        (PriorFlight Flight, SourceFile File)? prior = card.FromPath is null ? null : InputFiles.Prior(card.FromPath, rig);
        CardPlan plan = CardPlanner.Plan(rig, card.Options, prior?.Flight, choices.Quiet ? null : PlanningProgress.ForTerminal());
        SealedOrder? order = card.BlindPath is null || plan.Refusal is not null ? null : SealedOrder.Draw("A", "B");
        var report = new CardReport { Plan = plan, Rig = rig, RigFile = rigFile, FromFile = prior?.File, BlindCommitment = order?.Commitment, Provenance = ProgramVersion.Provenance };
        if (plan.Refusal is null)
        {
            if (card.SheetPath is string sheet)
                OutputFiles.Write("--sheet", sheet, CardSheetText.Empty(report, choices.Style));
            if (card.SpeakingPath is string speaking)
                OutputFiles.Write("--speaking", speaking, SpeakingCard.Page(report, choices.Style));
            if (order is not null)
            {
                OutputFiles.Write("--blind", card.BlindPath!, order.ToText());
                OutputFiles.Write("--blind", Path.ChangeExtension(card.BlindPath!, null) + "-helper.txt", ReportText.HelperSlip(order.Setups, order.Commitment, choices.Style));
            }
        }
        // Small print, so that an ordinary card fits on one side.
        OutputFiles.Deliver(choices, output,
            () => choices.Quiet ? ReportText.CardBrief(report, choices.Style) : ReportText.Card(report, choices.Style),
            () => ReportJson.Card(report), () => Page.Render(ReportDocuments.Card(report, choices.Style), new() { Compact = true }), () => ReportMarkdown.Card(report, choices.Style));
        if (plan.Refusal is null)
            return ExitCode.Done;
        if (!choices.Quiet)
            error.WriteLine("trimfit: no card can be given (exit 4); the reason is in the result.");
        return ExitCode.NoAnswer;
    }
}
