using Microsoft.AspNetCore.Builder;
using Microsoft.Extensions.Hosting;

namespace TrimFit.Web;

/// <summary>A server that answers.</summary>
public sealed class RunningServer : IAsyncDisposable
{
    private readonly WebApplication _app;

    internal RunningServer(WebApplication app, Uri address) => (_app, Address) = (app, address);

    /// <summary>Where it answers.</summary>
    public Uri Address { get; }

    /// <summary>Services, for tests.</summary>
    internal IServiceProvider Services => _app.Services;

    /// <summary>Ends when the program is asked to stop (Ctrl+C, SIGTERM) and what ran has been finished.</summary>
    public Task WaitAsync() => _app.WaitForShutdownAsync();

    /// <summary>Takes no new requests and finishes those that run.</summary>
    public Task StopAsync() => _app.StopAsync();

    /// <inheritdoc/>
    public ValueTask DisposeAsync() => _app.DisposeAsync();
}
