using Microsoft.Playwright;

[assembly: AssemblyFixture(typeof(TrimFit.BrowserTests.Browser))]

namespace TrimFit.BrowserTests;

/// <summary>One headless Chromium for all tests; where there is none, the tests are skipped and say so.</summary>
public sealed class Browser : IAsyncLifetime
{
    private static readonly string[] _places = ["/usr/bin/chromium", "/usr/bin/chromium-browser", "/usr/bin/google-chrome"];

    private IPlaywright? _playwright;
    private IBrowser? _browser;

    /// <summary>Starts the browser.</summary>
    public async ValueTask InitializeAsync()
    {
        if (_places.FirstOrDefault(File.Exists) is not string path)
            return;
        _playwright = await Playwright.CreateAsync();
        _browser = await _playwright.Chromium.LaunchAsync(new()
        {
            ExecutablePath = path,
            Args = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync"],
        });
    }

    /// <summary>A fresh context with nothing kept from another test.</summary>
    public async Task<IBrowserContext> Context(BrowserNewContextOptions? options = null)
    {
        Assert.SkipWhen(_browser is null, "chromium is missing: apt-get install chromium");
        return await _browser!.NewContextAsync(options ?? new() { AcceptDownloads = true });
    }

    /// <summary>Ends the browser.</summary>
    public async ValueTask DisposeAsync()
    {
        if (_browser is not null)
            await _browser.DisposeAsync();
        _playwright?.Dispose();
    }
}
