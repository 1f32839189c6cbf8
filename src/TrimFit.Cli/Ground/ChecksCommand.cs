using System.Collections.Immutable;
using TrimFit.Core.Ground;
using TrimFit.Pages;
using TrimFit.Reporting;

namespace TrimFit.Cli;

/// <summary>The complaint as words of the command line.</summary>
internal sealed record ComplaintWords(string? Side, string[] When, string? Since, string[] Changed, string? OtherWing)
{
    public bool IsEmpty => Side is null && When.Length == 0 && Since is null && Changed.Length == 0 && OtherWing is null;

    /// <exception cref="CommandLineException">A word is none of those it may be.</exception>
    public Complaint Complaint() => new()
    {
        Side = Side is null ? PullSide.Unknown : CommandWords.Parse("--side", Side, PullSide.Unknown),
        When = Parts(When).Aggregate(PullWhen.None, (all, word) => all | CommandWords.Parse("--when", word, PullWhen.None)),
        Since = Since is null ? PullSince.Unknown : CommandWords.Parse("--since", Since, PullSince.Unknown),
        Changed = [.. Parts(Changed).Select(word => CommandWords.Parse<ChangedPart>("--changed", word)).Distinct()],
        OtherWing = OtherWing is null ? Core.Ground.OtherWing.NotTried : CommandWords.Parse<OtherWing>("--other-wing", OtherWing),
    };

    private static IEnumerable<string> Parts(string[] texts) => texts.SelectMany(t => t.Split(',', StringSplitOptions.TrimEntries | StringSplitOptions.RemoveEmptyEntries));
}

internal static class ChecksCommand
{
    public static int Run(ComplaintWords told, bool ask, CommonChoices choices, TextWriter output, TextWriter error)
    {
        if (ask || (told.IsEmpty && !Console.IsInputRedirected))
            told = Ask(Console.In, error, choices.Style);
        Complaint complaint = told.Complaint();
        var report = new ChecksReport { Complaint = complaint, Checks = CheckOrder.Of(complaint), Provenance = ProgramVersion.Provenance };
        OutputFiles.Deliver(choices, output, () => choices.Quiet ? GroundReports.ChecksBrief(report, choices.Style) : GroundReports.ChecksText(report, choices.Style), () => GroundReports.ChecksJson(report),
            () => GroundPage.Checks(report, choices.Style), () => GroundReports.ChecksMarkdown(report, choices.Style));
        return ExitCode.Done;
    }

    private static ComplaintWords Ask(TextReader input, TextWriter prompts, ReportStyle style)
    {
        ImmutableArray<string> questions = GroundReports.ComplaintQuestions(style);
        string?[] answers = new string?[questions.Length];
        for (int i = 0; i < answers.Length; i++)
        {
            prompts.Write(questions[i] + ": ");
            string? line = input.ReadLine()?.Trim();
            answers[i] = string.IsNullOrEmpty(line) ? null : line;
        }
        prompts.WriteLine();
        return new(answers[0], answers[1] is string w ? [w] : [], answers[2], answers[3] is string c ? [c] : [], answers[4]);
    }
}
