using System.Diagnostics;
using System.Net.Sockets;
using System.Text.Json;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.DataProtection;
using Microsoft.AspNetCore.Hosting;
using Microsoft.AspNetCore.Hosting.Server;
using Microsoft.AspNetCore.Hosting.Server.Features;
using Microsoft.AspNetCore.Http;
using Microsoft.AspNetCore.Http.Features;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;
using TrimFit.Web.Flights;
using TrimFit.Web.Safety;
using TrimFit.Web.Sessions;
using TrimFit.Web.Steps;

namespace TrimFit.Web;

/// <summary>The local web page as a server.</summary>
public static class TrimFitServer
{
    /// <summary>Room for the form around an upload.</summary>
    private const long FormBytes = 1 << 20;

    /// <summary>Connections at once.</summary>
    private const int MostConnections = 500;

    /// <summary>Starts the server.</summary>
    /// <param name="options">How.</param>
    /// <param name="faults">Where a fault of the program is told: its kind only, never data of a flight; null for nowhere.</param>
    /// <param name="cancel">Gives up starting.</param>
    /// <exception cref="IOException">The port is taken or the address is none of this machine's.</exception>
    public static async Task<RunningServer> StartAsync(WebOptions options, TextWriter? faults = null, CancellationToken cancel = default)
    {
        ArgumentNullException.ThrowIfNull(options);
        if (!options.IsLocal && string.IsNullOrEmpty(options.Token))
            throw new ArgumentException("another address than this machine's own needs a token", nameof(options));
        try
        {
            return await StartAsync(options, options.Port ?? WebOptions.UsualPort, faults, cancel);
        }
        catch (IOException e) when (options.Port is null && e.InnerException is Microsoft.AspNetCore.Connections.AddressInUseException)
        {
            return await StartAsync(options, 0, faults, cancel);
        }
    }

    private static async Task<RunningServer> StartAsync(WebOptions options, int port, TextWriter? faults, CancellationToken cancel)
    {
        WebApplication app = Build(options, port, faults);
        try
        {
            await app.StartAsync(cancel);
        }
        catch (Exception e)
        {
            await app.DisposeAsync();
            if (e is SocketException)
                throw new IOException(e.Message, e);
            throw;
        }
        string address = app.Services.GetRequiredService<IServer>().Features.Get<IServerAddressesFeature>()!.Addresses.First();
        return new RunningServer(app, new Uri(address));
    }

    private static WebApplication Build(WebOptions options, int port, TextWriter? faults)
    {
        WebApplicationBuilder builder = WebApplication.CreateSlimBuilder(new WebApplicationOptions { ContentRootPath = AppContext.BaseDirectory, EnvironmentName = Environments.Production });
        builder.Logging.ClearProviders(); // requests carry file names, and faults cells of a flight: neither is anybody's log
        builder.WebHost.UseSetting(WebHostDefaults.ServerUrlsKey, ""); // the port is this program's choice, whatever the environment says
        builder.WebHost.ConfigureKestrel(kestrel =>
        {
            kestrel.AddServerHeader = false;
            kestrel.Limits.MaxRequestBodySize = options.MostUploadBytes + FormBytes;
            kestrel.Limits.MaxConcurrentConnections = MostConnections;
            kestrel.Limits.MaxRequestHeadersTotalSize = 16 * 1024;
            kestrel.Listen(options.Address, port);
        });
        IServiceCollection services = builder.Services;
        services.Configure<FormOptions>(form =>
        {
            form.MultipartBodyLengthLimit = options.MostUploadBytes + FormBytes;
            form.MemoryBufferThreshold = 32 * 1024; // what is larger goes to the disk as it comes
            form.ValueCountLimit = 4000;
            form.KeyLengthLimit = 256;
            form.ValueLengthLimit = 64 * 1024;
        });
        services.Configure<HostOptions>(host => host.ShutdownTimeout = options.StopWait);
        services.AddAntiforgery(forms =>
        {
            forms.Cookie.Name = "trimfit-form";
            forms.Cookie.HttpOnly = true;
            forms.Cookie.SameSite = SameSiteMode.Strict;
            forms.FormFieldName = WebContext.TokenName;
            forms.HeaderName = "X-Form-Token";
            forms.SuppressXFrameOptionsHeader = true; // the content policy says it
        });
        services.AddSingleton<IDataProtectionProvider, EphemeralDataProtectionProvider>(); // no keys in the user's profile
        services.AddSingleton(options);
        services.AddSingleton(TimeProvider.System);
        services.AddSingleton<SessionStore>();
        services.AddHostedService(provider => provider.GetRequiredService<SessionStore>());
        services.AddSingleton<WorkGate>();
        services.AddSingleton(new LoggerMemory(options.LoggersPath));
        services.AddSingleton<Desk>();

        WebApplication app = builder.Build();
        app.UseSecurityHeaders();
        app.UseFaultPages(faults);
        app.UseHostCheck(options);
        app.MapGet("/health", (RequestDelegate)(context =>
        {
            context.Response.ContentType = "application/json";
            return JsonSerializer.SerializeAsync(context.Response.Body, new HealthJson("ok", options.ProgramVersion), WebJson.Default.HealthJson, context.RequestAborted);
        }));
        if (options.Token is string token)
            app.UseWhen(context => context.Request.Path != "/health", branch => branch.UseTokenGate(token));
        app.UseFormGuard();
        app.UseRouting();
        WebAssets.Map(app);
        Desk desk = app.Services.GetRequiredService<Desk>();
        StartStep.Map(app, desk);
        ComplaintStep.Map(app, desk);
        ReadingsStep.Map(app, desk);
        FlightStep.Map(app, desk);
        CardStep.Map(app, desk);
        AnswerStep.Map(app, desk);
        ChangeStep.Map(app, desk);
        ProofStep.Map(app, desk);
        if (options.BookPath is not null)
            BookStep.Map(app, desk);
        app.MapFallback((RequestDelegate)(context => desk.PlainAsync(context, StatusCodes.Status404NotFound)));
        return app;
    }

    /// <summary>Opens the address in the person's browser; a machine without one is no fault.</summary>
    /// <param name="address">What to open.</param>
    public static void OpenBrowser(Uri address)
    {
        ArgumentNullException.ThrowIfNull(address);
        try
        {
            using Process? browser = Process.Start(new ProcessStartInfo(address.ToString()) { UseShellExecute = true, RedirectStandardError = false });
        }
        catch (Exception e) when (e is System.ComponentModel.Win32Exception or InvalidOperationException or PlatformNotSupportedException or IOException)
        {
            return;
        }
    }
}
