using System.CommandLine;

namespace TrimFit.Cli;

/// <summary>The verb <c>job checks</c>, with or without a job book.</summary>
internal static class JobCommands
{
    public static Command Checks(TextWriter output, TextWriter error)
    {
        var side = new Option<string?>("--side") { Description = "Which way it pulls: left, right or changing.", HelpName = "SIDE" };
        var when = new Option<string[]>("--when") { Description = "When: launch, full_power, level, engine_off, accelerator; with commas or given more than once.", HelpName = "WHEN" };
        var since = new Option<string?>("--since") { Description = "Since when: always, gradually, suddenly or after_change.", HelpName = "SINCE" };
        var changed = new Option<string[]>("--changed") { Description = "What was changed before: geometry, wing, brake_lines, trimmers, harness, propeller, ballast; with commas or given more than once.", HelpName = "WHAT" };
        var other = new Option<string?>("--other-wing") { Description = "Another wing on this machine: not_tried, same_pull, no_pull or other_way.", HelpName = "PULL" };
        var ask = new Option<bool>("--ask") { Description = "Ask for the complaint on standard input; so does a terminal when nothing is told." };
        var common = new CommonOptions();
        var command = new Command("checks", "The checks of simple causes in the order the complaint suggests, each with a number to write beside it.") { side, when, since, changed, other, ask };
        common.AddForPeople(command);
        command.SetAction(parsed =>
        {
            var told = new ComplaintWords(parsed.GetValue(side), parsed.GetValue(when) ?? [], parsed.GetValue(since), parsed.GetValue(changed) ?? [], parsed.GetValue(other));
            return ChecksCommand.Run(told, parsed.GetValue(ask), common.Choices(parsed), output, error);
        });
        return command;
    }
}
