using System.Diagnostics;
using System.Text.RegularExpressions;
using Deque.AxeCore.Commons;
using Deque.AxeCore.Playwright;
using Microsoft.Playwright;
using TrimFit.EndToEndTests;

namespace TrimFit.BrowserTests;

public sealed partial class PageTests(ReportPages pages) : IClassFixture<ReportPages>
{
    private const int PhoneWidth = 390, PaperWidth = 794; // A4 at 96 px to the inch

    private static readonly string _measure = Measure();

    public static TheoryData<string, int> PagesAndWidths => [.. ReportPages.Names.SelectMany(n => new[] { (n, PhoneWidth), (n, PaperWidth) })];

    public static TheoryData<string> AllPages => [.. ReportPages.Names];

    [Theory]
    [MemberData(nameof(PagesAndWidths))]
    public async Task No_label_overlaps_another_or_leaves_its_box(string name, int width)
    {
        await using IBrowserContext context = await pages.Open(width);
        IPage page = await Show(context, name);
        string[] faults = await page.EvaluateAsync<string[]>(_measure);
        Assert.Equal([], faults);
    }

    [Fact]
    public async Task The_measure_sees_overlapping_and_escaping_labels()
    {
        await using IBrowserContext context = await pages.Open(PhoneWidth);
        IPage page = await context.NewPageAsync();
        await page.SetContentAsync("<main><p style='width:900px'>wide</p><figure><svg viewBox='0 0 100 100' width='300' height='300'>"
            + "<text x='10' y='50'>one label</text><text x='12' y='52'>another</text><text x='90' y='20'>leaves its picture</text></svg></figure></main>");
        string[] faults = await page.EvaluateAsync<string[]>(_measure);
        Assert.Contains(faults, f => f.StartsWith("beyond the edge", StringComparison.Ordinal));
        Assert.Contains(faults, f => f.StartsWith("labels overlap", StringComparison.Ordinal));
        Assert.Contains(faults, f => f.StartsWith("label leaves its picture", StringComparison.Ordinal));
    }

    [Theory]
    [MemberData(nameof(AllPages))]
    public async Task Nothing_is_asked_from_outside_the_file_and_nothing_is_complained_of(string name)
    {
        await using IBrowserContext context = await pages.Open(PaperWidth);
        IPage page = await context.NewPageAsync();
        var asked = new List<string>();
        var said = new List<string>();
        page.Request += (_, r) => asked.Add(r.Url);
        page.Console += (_, m) => said.Add(m.Text);
        page.PageError += (_, m) => said.Add(m);
        await page.GotoAsync(new Uri(pages[name]).AbsoluteUri);
        string own = new Uri(pages[name]).AbsoluteUri;
        Assert.Equal([own], asked.Where(a => !a.StartsWith("data:", StringComparison.Ordinal)));
        Assert.Empty(said);
    }

    [Theory]
    [MemberData(nameof(AllPages))]
    public async Task Axe_finds_no_serious_fault(string name)
    {
        await using IBrowserContext context = await pages.Open(PaperWidth, bypassPolicy: true); // axe is a script; the page's policy allows none
        IPage page = await Show(context, name);
        AxeResult result = await page.RunAxe();
        Assert.NotEmpty(result.Passes);
        Assert.Equal([], result.Violations.Where(v => v.Impact is "serious" or "critical").Select(v => $"{v.Id}: {v.Help}: {v.Nodes[0].Html}"));
    }

    [Fact]
    public async Task Without_the_pages_font_on_the_machine_the_text_is_still_there()
    {
        using var folder = new TemporaryFolder();
        // One font of another design: a browser without a single font cannot start to draw one that a page brings.
        Directory.CreateDirectory(folder["none"]);
        File.Copy(Tools.OtherFont, Path.Combine(folder["none"], "other.ttf"));
        string settings = folder.Write("fonts.conf", $"<?xml version=\"1.0\"?><!DOCTYPE fontconfig SYSTEM \"fonts.dtd\"><fontconfig><dir>{folder["none"]}</dir><cachedir>{folder["cache"]}</cachedir></fontconfig>");
        Assert.NotEqual("", pages["uncorrected.html"]);
        await using IBrowser bare = await pages.Launch(Tools.Chromium, settings);
        foreach (string name in new[] { "uncorrected.html", "uncorrected-customer.html", "imperial.html" })
        {
            await using IBrowserContext without = await bare.NewContextAsync(ReportPages.Options(PaperWidth, false)), with = await pages.Open(PaperWidth);
            const string Widths = "async () => { await Promise.all([...document.fonts].map(f => f.load())); await new Promise(r => setTimeout(r, 300));"
                + " return [...document.querySelectorAll('h2, td.n, text')].filter(e => e.textContent.trim().length > 0)"
                + ".map(e => { const r = document.createRange(); r.selectNodeContents(e); return r.getBoundingClientRect().width; }); }";
            double[] wanted = await (await Show(with, name)).EvaluateAsync<double[]>(Widths), found = await (await Show(without, name)).EvaluateAsync<double[]>(Widths);
            Assert.Contains(wanted, w => w > 100);
            Assert.Equal(wanted.Length, found.Length);
            // Only what does not wrap. Other settings of fonts round the letters' widths otherwise; missing letters would be boxes of another width or nothing.
            Assert.Equal([], wanted.Zip(found).Where(w => Math.Abs(w.First - w.Second) > 2 + (0.08 * w.First)));
        }
    }

    [Fact]
    public async Task Every_report_draws_a_picture_at_both_widths_in_colour_and_in_grey()
    {
        string? kept = Environment.GetEnvironmentVariable("TRIMFIT_PICTURES"); // a folder to look at them in
        Assert.SkipWhen(kept is null, "pictures of every report are drawn when TRIMFIT_PICTURES names a folder for them");
        foreach (string flight in ReportPages.Flights)
        {
            foreach (int width in new[] { PhoneWidth, PaperWidth })
            {
                await using IBrowserContext context = await pages.Open(width);
                IPage page = await Show(context, flight + ".html");
                byte[] colour = await page.ScreenshotAsync(new() { FullPage = true });
                await page.AddStyleTagAsync(new() { Content = "html { filter: grayscale(1); }" });
                byte[] grey = await page.ScreenshotAsync(new() { FullPage = true });
                Assert.InRange(colour.Length, 50_000, 5_000_000);
                Assert.NotEqual(colour, grey);
                if (kept is null)
                    continue;
                await File.WriteAllBytesAsync(Path.Combine(kept, FormattableString.Invariant($"{flight}-{width}.png")), colour, TestContext.Current.CancellationToken);
                await File.WriteAllBytesAsync(Path.Combine(kept, FormattableString.Invariant($"{flight}-{width}-grey.png")), grey, TestContext.Current.CancellationToken);
            }
        }
        if (kept is not null)
            await KeepForTheReadme(kept);
    }

    /// <summary>The two pictures of the README: the first screen, and the pull over power.</summary>
    private async Task KeepForTheReadme(string folder)
    {
        await using IBrowserContext context = await pages.Open(PaperWidth);
        IPage page = await Show(context, "uncorrected.html");
        await page.ScreenshotAsync(new() { Path = Path.Combine(folder, "report-first-screen.png"), Clip = new() { X = 0, Y = 0, Width = PaperWidth, Height = 1130 } });
        await page.Locator("figure").Filter(new() { Has = page.Locator("#turn-t") }).ScreenshotAsync(new() { Path = Path.Combine(folder, "report-turn-rate.png") });
    }

    [Fact]
    public async Task The_customers_page_is_one_side_of_paper()
    {
        foreach (string flight in ReportPages.Flights)
        {
            await using IBrowserContext context = await pages.Open(PaperWidth);
            IPage page = await Show(context, flight + "-customer.html");
            byte[] pdf = await page.PdfAsync(new() { PreferCSSPageSize = true });
            Assert.Equal(1, PdfPage().Count(System.Text.Encoding.Latin1.GetString(pdf)));
        }
    }

    [Fact]
    public void The_HTML_is_valid()
    {
        string jar = Tools.Vnu, java = Tools.Java;
        (int code, string said) = Vnu(java, jar, [.. ReportPages.Names.Select(n => pages[n])]);
        Assert.Equal((0, ""), (code, said.Trim()));
        using var folder = new TemporaryFolder(); // and the checker can say no
        (code, said) = Vnu(java, jar, [folder.Write("bad.html", "<!DOCTYPE html><html lang=en><title>x</title><p><table><p>")]);
        Assert.NotEqual(0, code);
        Assert.NotEqual("", said);
    }

    private static (int Code, string Said) Vnu(string java, string jar, string[] files)
    {
        var start = new ProcessStartInfo(java) { RedirectStandardError = true };
        foreach (string arg in (string[])["-jar", jar, .. files])
            start.ArgumentList.Add(arg);
        using Process process = Process.Start(start)!;
        string said = process.StandardError.ReadToEnd();
        process.WaitForExit();
        // What the machine tells java by its environment is no message of the checker.
        return (process.ExitCode, string.Join('\n', said.Split('\n').Where(l => !l.StartsWith("Picked up ", StringComparison.Ordinal))));
    }

    private async Task<IPage> Show(IBrowserContext context, string name)
    {
        IPage page = await context.NewPageAsync();
        await page.GotoAsync(new Uri(pages[name]).AbsoluteUri);
        await page.EvaluateAsync("() => document.fonts.ready.then(() => true)");
        return page;
    }

    private static string Measure()
    {
        using var reader = new StreamReader(typeof(PageTests).Assembly.GetManifestResourceStream("Measure.js")!);
        return reader.ReadToEnd();
    }

    [GeneratedRegex("/Type\\s*/Page\\b(?!s)")]
    private static partial Regex PdfPage();
}
