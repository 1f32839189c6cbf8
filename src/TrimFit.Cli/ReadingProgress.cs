using System.Diagnostics;

namespace TrimFit.Cli;

/// <summary>Says on standard error how far a long log has been read; nothing for logs that are read at once, and nothing into a file or pipe.</summary>
internal sealed class ReadingProgress
{
    private const double QuietSec = 1, EverySec = 0.2;

    private readonly Stopwatch _time = Stopwatch.StartNew();
    private double _next = QuietSec;

    private ReadingProgress()
    {
    }

    /// <summary>A progress that writes to a terminal, or null when standard error is not one.</summary>
    public static Action<double>? ForTerminal() => Console.IsErrorRedirected ? null : new ReadingProgress().Show;

    private void Show(double share)
    {
        double elapsed = _time.Elapsed.TotalSeconds;
        if (elapsed < _next)
            return;
        _next = elapsed + EverySec;
        bool done = share >= 1;
        Console.Error.Write(done ? "\r                    \r" : FormattableString.Invariant($"\rreading {100 * share,3:F0} %"));
    }
}
