using TrimFit.Web.Sessions;

namespace TrimFit.Web.Flights;

/// <summary>Lets few flights be worked on at once, so that many browsers slow each other down but never fill the memory.</summary>
internal sealed class WorkGate : IDisposable
{
    /// <summary>Bytes of logs worked on at once; one log may be larger and then runs alone.</summary>
    private const long MostBytes = 64L << 20;

    /// <summary>Requests that may wait; beyond it the page says to come back.</summary>
    private const int MostWaiting = 200;

    private readonly SemaphoreSlim _places = new(Math.Max(1, Environment.ProcessorCount));
    private readonly SemaphoreSlim _large = new(1);
    private int _waiting;

    /// <summary>Does the work on a thread of its own when a place is free.</summary>
    /// <param name="progress">Says that it waits.</param>
    /// <param name="bytes">Size of the logs.</param>
    /// <param name="work">The work.</param>
    /// <param name="cancel">The browser went away.</param>
    /// <exception cref="BusyException">Too many wait already.</exception>
    public async Task<T> RunAsync<T>(WorkProgress progress, long bytes, Func<T> work, CancellationToken cancel)
    {
        if (Interlocked.Increment(ref _waiting) > MostWaiting)
        {
            Interlocked.Decrement(ref _waiting);
            throw new BusyException();
        }
        bool large = bytes > MostBytes / Math.Max(1, Environment.ProcessorCount);
        try
        {
            progress.Set("waiting", -1);
            if (large)
                await _large.WaitAsync(cancel);
            try
            {
                await _places.WaitAsync(cancel);
                try
                {
                    // Not cancelled once it runs: an answer that is being made is finished, also when the program is asked to stop.
                    return await Task.Run(work, CancellationToken.None);
                }
                finally
                {
                    _places.Release();
                }
            }
            finally
            {
                if (large)
                    _large.Release();
            }
        }
        finally
        {
            Interlocked.Decrement(ref _waiting);
            progress.Set("", 0);
        }
    }

    public void Dispose()
    {
        _places.Dispose();
        _large.Dispose();
    }
}

/// <summary>Too much work waits already.</summary>
internal sealed class BusyException : Exception;
