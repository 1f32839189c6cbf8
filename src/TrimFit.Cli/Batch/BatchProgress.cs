using System.Diagnostics;

namespace TrimFit.Cli.Batch;

/// <summary>How far a batch is, on standard error: one line that moves on a terminal, a line now and then in a file.</summary>
internal sealed class BatchProgress(int total, int before, TextWriter error, bool terminal)
{
    private readonly Stopwatch _time = Stopwatch.StartNew();
    private readonly Lock _lock = new();
    private int _done, _unreadable;
    private double _next = terminal ? 0.5 : 10;

    /// <summary>One more flight has its row.</summary>
    public void Add(int exitCode)
    {
        lock (_lock)
        {
            _done++;
            _unreadable += exitCode is ExitCode.Input or ExitCode.Fault ? 1 : 0;
            double elapsed = _time.Elapsed.TotalSeconds;
            bool last = before + _done == total;
            if (elapsed < _next && !(last && _next > 10))
                return;
            _next = elapsed + (terminal ? 0.5 : 10);
            double rate = _done / elapsed;
            string text = FormattableString.Invariant(
                $"{before + _done} of {total} flights, {_unreadable} unreadable, {rate:F1} per s, {TimeSpan.FromSeconds(Math.Ceiling((total - before - _done) / rate)):c} left");
            if (terminal)
                error.Write($"\r{text}   {(last ? "\n" : "")}");
            else
                error.WriteLine(text);
        }
    }
}
