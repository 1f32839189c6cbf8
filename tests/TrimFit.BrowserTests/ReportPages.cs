using Microsoft.Playwright;
using TrimFit.EndToEndTests;

namespace TrimFit.BrowserTests;

/// <summary>The reports of the bundled flights, written by the program once for all tests, and a browser to look at them.</summary>
public sealed class ReportPages : IAsyncLifetime
{
    /// <summary>One flight for each kind of answer.</summary>
    public static readonly string[] Flights = ["uncorrected", "balanced", "over-compensated", "constant-pull", "flat-throttle"];

    private readonly TemporaryFolder _folder = new();
    private IPlaywright? _playwright;

    internal IBrowser Browser { get; private set; } = null!;

    /// <summary>Why there are no pages; null when there are.</summary>
    internal Exception? Missing { get; private set; }

    internal string this[string page] => Missing is null ? _folder[page] : throw Missing;

    public async ValueTask InitializeAsync()
    {
        string chromium;
        try
        {
            chromium = Tools.Chromium;
        }
        catch (Exception e) // told by each test that asks for a page
        {
            Missing = e;
            return;
        }
        foreach (string flight in Flights)
        {
            BuiltProgram.Outcome run = BuiltProgram.Run(null, "fit", BuiltProgram.Sample(flight + ".csv"), "--rig", BuiltProgram.Sample(flight + "-rig.toml"), "--sheet",
                BuiltProgram.Sample(flight + "-sheet.toml"), "--quiet", "--report", _folder[flight + ".html"], "--customer", _folder[flight + "-customer.html"]);
            Assert.True(run.ExitCode is 0 or 4, run.Error);
        }
        Assert.Equal(0, BuiltProgram.Run(null, "fit", BuiltProgram.Sample("uncorrected.csv"), "--rig", BuiltProgram.Sample("uncorrected-rig.toml"),
            "--quiet", "--units", "imperial", "--culture", "de-DE", "--report", _folder["imperial.html"]).ExitCode);
        Assert.Equal(0, BuiltProgram.Run(null, "rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--report", _folder["rig.html"]).ExitCode);
        Assert.Equal(0, BuiltProgram.Run(null, "inspect", BuiltProgram.Sample("uncorrected.csv"), "--report", _folder["inspect.html"]).ExitCode);
        _playwright = await Playwright.CreateAsync();
        Browser = await Launch(chromium, null);
    }

    /// <summary>A browser; with a folder of settings of its own for fonts when one is given.</summary>
    internal async Task<IBrowser> Launch(string chromium, string? fontSettings)
    {
        var options = new BrowserTypeLaunchOptions
        {
            ExecutablePath = chromium,
            Args = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync"],
        };
        if (fontSettings is not null)
            options.Env = Environment.GetEnvironmentVariables().Cast<System.Collections.DictionaryEntry>().Select(e => KeyValuePair.Create((string)e.Key, (string)e.Value!))
                .Append(KeyValuePair.Create("FONTCONFIG_FILE", fontSettings)).GroupBy(e => e.Key).Select(g => g.Last());
        return await _playwright!.Chromium.LaunchAsync(options);
    }

    /// <summary>A window of a width; the pages' own policy may be set aside for a checker's script.</summary>
    internal Task<IBrowserContext> Open(int width, bool bypassPolicy = false) => Missing is null ? Browser.NewContextAsync(Options(width, bypassPolicy)) : throw Missing;

    internal static BrowserNewContextOptions Options(int width, bool bypassPolicy) => new() { ViewportSize = new() { Width = width, Height = 1123 }, BypassCSP = bypassPolicy };

    /// <summary>Every page a test can look at.</summary>
    public static IEnumerable<string> Names => [.. Flights.SelectMany(f => new[] { f + ".html", f + "-customer.html" }), "imperial.html", "rig.html", "inspect.html"];

    public async ValueTask DisposeAsync()
    {
        if (Browser is not null)
            await Browser.DisposeAsync();
        _playwright?.Dispose();
        _folder.Dispose();
    }
}
