namespace TrimFit.Cli;

/// <summary>Says on standard error how far the planning of a card is; nothing into a file or pipe.</summary>
internal sealed class PlanningProgress : IProgress<double>
{
    private PlanningProgress()
    {
    }

    /// <summary>A progress that writes to a terminal, or null when standard error is not one.</summary>
    public static IProgress<double>? ForTerminal() => Console.IsErrorRedirected ? null : new PlanningProgress();

    public void Report(double value) =>
        Console.Error.Write(value >= 1 ? "\r                    \r" : FormattableString.Invariant($"\rplanning {100 * value,3:F0} %"));
}
