using Microsoft.Playwright;

namespace TrimFit.BrowserTests.Web;

/// <summary>The program and a browser in front of it; what the browser complains of is collected.</summary>
public sealed class WebBrowser : IAsyncLifetime
{
    private IPlaywright? _playwright;
    private IBrowser? _browser;

    public WebProgram Program { get; } = new();

    public async ValueTask InitializeAsync()
    {
        string chromium = Tools.Chromium;
        await Program.InitializeAsync();
        _playwright = await Playwright.CreateAsync();
        _browser = await _playwright.Chromium.LaunchAsync(new()
        {
            ExecutablePath = chromium,
            Args = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync"],
        });
    }

    /// <summary>A fresh browser of a width, such as 390 for a phone.</summary>
    public async Task<IPage> Page(int width, List<string> said, int height = 844)
    {
        IBrowserContext context = await _browser!.NewContextAsync(new() { BaseURL = Program.Address.ToString(), ViewportSize = new() { Width = width, Height = height }, AcceptDownloads = true });
        context.SetDefaultTimeout(120_000); // machines that build beside the tests are slow
        IPage page = await context.NewPageAsync();
        page.Console += (_, m) =>
        {
            if (m.Type is "error" or "warning" && !m.Text.Contains("422", StringComparison.Ordinal)) // the status of a page that says what is wrong
                said.Add(m.Text);
        };
        page.PageError += (_, m) => said.Add(m);
        page.Request += (_, r) =>
        {
            if (!r.Url.StartsWith(Program.Address.ToString(), StringComparison.Ordinal) && !r.Url.StartsWith("data:", StringComparison.Ordinal))
                said.Add("asked outside: " + r.Url);
        };
        return page;
    }

    /// <summary>A picture to be looked at, where TRIMFIT_SCREENSHOTS names a folder.</summary>
    public static async Task Picture(IPage page, string name)
    {
        if (Environment.GetEnvironmentVariable("TRIMFIT_SCREENSHOTS") is { Length: > 0 } folder)
            await page.ScreenshotAsync(new() { Path = Path.Combine(folder, $"{name}-{page.ViewportSize!.Width}.png"), FullPage = true });
    }

    public async ValueTask DisposeAsync()
    {
        if (_browser is not null)
            await _browser.DisposeAsync();
        _playwright?.Dispose();
        await Program.DisposeAsync();
    }
}
