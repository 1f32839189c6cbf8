using Microsoft.Playwright;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Import.Sheets;
using TrimFit.Pages;
using TrimFit.Reporting;

namespace TrimFit.BrowserTests;

/// <summary>The speaking card driven with a clock of our own: speech is recorded with the time it was asked for.</summary>
public sealed class SpeakingCardTests(Browser browser) : IDisposable
{
    private const string Begin = "2026-05-17T10:20:00";

    /// <summary>Records what is spoken instead of speaking it; a beep is recorded as such.</summary>
    private const string RecordSpeech = """
        window.spoken = JSON.parse(sessionStorage.getItem('spoken') || '[]');
        const note = what => { window.spoken.push([Date.now(), what]); sessionStorage.setItem('spoken', JSON.stringify(window.spoken)); };
        window.SpeechSynthesisUtterance = function (text) { this.text = text; };
        Object.defineProperty(window, 'speechSynthesis', { value: { speaking: false, cancel() {}, speak(u) { note(u.text); this.speaking = true; } } });
        """;

    private const string Silent = """
        window.beeps = [];
        delete window.speechSynthesis;
        Object.defineProperty(window, 'speechSynthesis', { value: undefined });
        window.SpeechSynthesisUtterance = undefined;
        window.AudioContext = class {
          constructor() { this.currentTime = 0; this.state = 'running'; this.destination = {}; }
          createOscillator() { return { frequency: {}, connect(x) { return x; }, start() { window.beeps.push(Date.now()); }, stop() {} }; }
          createGain() { return { gain: {}, connect(x) { return x; } }; }
        };
        """;

    private readonly string _folder = Directory.CreateTempSubdirectory("trimfit-card-").FullName;

    private static readonly Lazy<CardReport> _report = new(() =>
    {
        Rig rig = new()
        {
            Name = "Demo machine",
            Mass = new() { PilotKg = Reading.Measured(88), PowerUnitKg = Reading.Measured(30) },
            Propeller = new() { Rotation = PropellerRotation.Clockwise, StaticThrustN = Reading.Measured(600), ShaftPowerW = 14000, DiameterM = 1.25 },
            Carabiners = new() { LeftM = Reading.Measured(-0.215), RightM = Reading.Measured(0.215) },
            BrakeFullTravelM = 0.6,
            Wing = new() { TrimSpeedMPerSec = 11, GlideSinkMPerSec = 2.2 },
        };
        CardPlan plan = CardPlanner.Plan(rig, new CardOptions { Minutes = 4, Draws = 3 });
        return new() { Plan = plan, Rig = rig, RigFile = new("demo.toml", "00"), Provenance = new("1.0.0-test") };
    });

    private static CardPlan Plan => _report.Value.Plan;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public async Task The_card_says_the_right_words_at_the_right_times_and_saves_a_sheet_that_reads()
    {
        IPage page = await Open(RecordSpeech);
        Assert.True(await page.Locator("#start").IsDisabledAsync()); // cautions first
        Assert.Contains("Look out.", await page.Locator("#cautions").InnerTextAsync());
        await page.Locator("#read").CheckAsync();
        await page.Locator("#start").ClickAsync();
        double start = await page.EvaluateAsync<double>("state.startMs");
        await Run(page, Plan.Seconds + 12);
        List<(double Sec, string Words)> spoken = await Spoken(page, start);
        Assert.Equal("Test card. First leg in ten seconds. Look out.", spoken[0].Words);
        Assert.InRange(spoken[0].Sec, -10.3, -9.7);
        foreach (CardLeg leg in Plan.Legs)
        {
            string words = leg.Kind switch
            {
                CardLegKind.HandsOff => "Hands off now.",
                CardLegKind.BrakeStep => leg.BrakeRight > 0 ? "Right brake to the mark. Keep it." : "Left brake to the mark. Keep it.",
                CardLegKind.Circle => leg.BrakeRight > 0 ? "Right brake to the mark. Circle." : "Left brake to the mark. Circle.",
                CardLegKind.Turn => leg.TurnRad > 0 ? "Look out. Turn right by 180 degrees. Level power." : "Look out. Turn left by 180 degrees. Level power.",
                _ => leg.Power switch { PowerSetting.Idle => "Set idle. Hold heading.", PowerSetting.Full => "Set full power. Hold heading.", _ => "Set level-flight power. Hold heading." },
            };
            Assert.Contains(spoken, s => s.Words == words && s.Sec >= leg.StartSec && s.Sec < leg.StartSec + 0.5);
            foreach ((int n, string word) in new[] { (3, "three"), (2, "two"), (1, "one") })
                Assert.Contains(spoken, s => s.Words == word && s.Sec >= leg.EndSec - n && s.Sec < leg.EndSec - n + 0.5);
        }
        Assert.Equal("Card done. Hands on. Save the sheet after landing.", spoken[^1].Words);

        IDownload download = await page.RunAndWaitForDownloadAsync(() => page.Locator("#save").ClickAsync());
        Assert.Equal("flight-sheet-2026-05-17-1020.toml", download.SuggestedFilename);
        string path = Path.Combine(_folder, "sheet.toml");
        await download.SaveAsAsync(path);
        FlightSheet sheet = FlightSheetReader.ReadFile(path);
        Assert.Equal(new DateOnly(2026, 5, 17), sheet.Date);
        Assert.Equal(Plan.Legs.Length, sheet.Legs.Length);
        // The page's clock ran on from 10:20:00 while the test got to the button; the first leg begins ten seconds after that.
        double begun = await page.EvaluateAsync<double>("(d => (d.getHours() * 3600) + (d.getMinutes() * 60) + d.getSeconds() + (d.getMilliseconds() / 1000))(new Date(state.startMs))");
        Assert.InRange(begun - TimeSpan.Parse("10:20:00", System.Globalization.CultureInfo.InvariantCulture).TotalSeconds, 9.9, 120);
        for (int i = 0; i < sheet.Legs.Length; i++)
        {
            Assert.InRange(sheet.Legs[i].Start.Value - begun - Plan.Legs[i].StartSec, -0.2, 0.5);
            Assert.Equal(Plan.Legs[i].Power, sheet.Legs[i].Power);
            Assert.Equal(Plan.Legs[i].Seconds, sheet.Legs[i].End.Value - sheet.Legs[i].Start.Value, 0.11);
        }
    }

    [Fact]
    public async Task After_the_screen_slept_the_card_goes_on_by_the_clock_and_leaves_out_what_was_not_called()
    {
        IPage page = await Open(RecordSpeech);
        await page.Locator("#read").CheckAsync();
        await page.Locator("#start").ClickAsync();
        double start = await page.EvaluateAsync<double>("state.startMs");
        CardLeg slept = Plan.Legs[5];
        await Run(page, 10 + Plan.Legs[4].StartSec + 4);
        await page.Clock.FastForwardAsync((long)(1000 * (Plan.Legs[4].Seconds + (slept.Seconds / 2)))); // timers do not run while a telephone sleeps
        await Run(page, 2);
        List<(double Sec, string Words)> spoken = await Spoken(page, start);
        Assert.Contains(spoken, s => s.Words.StartsWith("Card goes on. ", StringComparison.Ordinal) && s.Sec > slept.StartSec + 2);
        double left = double.Parse((await page.Locator("#clock").InnerTextAsync()).Split(' ')[0], System.Globalization.CultureInfo.InvariantCulture);
        double now = (await page.EvaluateAsync<double>("Date.now()") - start) / 1000;
        CardLeg current = Plan.Legs.Single(l => now >= l.StartSec && now < l.EndSec);
        Assert.InRange(left, current.EndSec - now - 0.5, current.EndSec - now + 1.3);

        await page.ReloadAsync(); // a browser may throw a sleeping page away
        Assert.True(await page.Locator("#flying").IsVisibleAsync());
        await Run(page, Plan.Seconds);
        Assert.True(await page.Locator("#finished").IsVisibleAsync());
        string sheet = await page.Locator("#sheet").InnerTextAsync();
        Assert.Contains("this leg was not called in time, so it is left out", sheet);
        File.WriteAllText(Path.Combine(_folder, "slept.toml"), sheet);
        FlightSheet read = FlightSheetReader.ReadFile(Path.Combine(_folder, "slept.toml"));
        Assert.InRange(read.Legs.Length, Plan.Legs.Length - 3, Plan.Legs.Length - 1);
    }

    [Fact]
    public async Task The_stop_button_is_big_ends_the_card_and_keeps_only_whole_legs()
    {
        IPage page = await Open(RecordSpeech);
        await page.SetViewportSizeAsync(360, 740);
        await page.Locator("#read").CheckAsync();
        await page.Locator("#start").ClickAsync();
        await Run(page, 10 + Plan.Legs[3].StartSec + 3);
        LocatorBoundingBoxResult box = (await page.Locator("#stop").BoundingBoxAsync())!;
        Assert.True(box.Width > 300 && box.Height > 100, $"{box.Width} × {box.Height}");
        await page.Locator("#stop").ClickAsync();
        Assert.Equal("Stopped", await page.Locator("#ended").InnerTextAsync());
        double start = await page.EvaluateAsync<double>("state.startMs");
        Assert.Equal("Card stopped. Hands on.", (await Spoken(page, start))[^1].Words);
        File.WriteAllText(Path.Combine(_folder, "stopped.toml"), await page.Locator("#sheet").InnerTextAsync());
        Assert.Equal(3, FlightSheetReader.ReadFile(Path.Combine(_folder, "stopped.toml")).Legs.Length);
    }

    [Fact]
    public async Task Without_a_voice_it_beeps_and_says_so_before_the_start()
    {
        IPage page = await Open(Silent);
        Assert.True(await page.Locator("#soundNote").IsVisibleAsync());
        await page.Locator("#read").CheckAsync();
        await page.Locator("#start").ClickAsync();
        double start = await page.EvaluateAsync<double>("state.startMs");
        await Run(page, 10 + Plan.Legs[1].StartSec + 1);
        double[] beeps = [.. (await page.EvaluateAsync<double[]>("window.beeps")).Select(b => (b - start) / 1000)];
        Assert.Contains(beeps, b => b is >= 0 and < 0.5);
        Assert.True(beeps.Count(b => b >= Plan.Legs[1].StartSec && b < Plan.Legs[1].StartSec + 0.5) >= 2); // two for hands off, three for a brake
        Assert.Contains(beeps, b => b >= Plan.Legs[0].EndSec - 1 && b < Plan.Legs[0].EndSec);
    }

    [Fact]
    public async Task The_page_asks_for_nothing_but_itself()
    {
        IBrowserContext context = await browser.Context();
        IPage page = await context.NewPageAsync();
        var asked = new List<string>();
        var errors = new List<string>();
        page.Request += (_, r) => asked.Add(r.Url);
        page.PageError += (_, e) => errors.Add(e);
        page.Console += (_, m) => { if (m.Type == "error") errors.Add(m.Text); };
        await page.GotoAsync(Write());
        await page.Locator("#read").CheckAsync();
        await page.Locator("#start").ClickAsync();
        await page.WaitForTimeoutAsync(1000);
        await page.Locator("#stop").ClickAsync();
        Assert.Single(asked, a => !a.StartsWith("blob:", StringComparison.Ordinal));
        Assert.Empty(errors);
        await context.CloseAsync();
    }

    private string Write()
    {
        string path = Path.Combine(_folder, "card.html");
        File.WriteAllText(path, SpeakingCard.Page(_report.Value, new()));
        return new Uri(path).AbsoluteUri;
    }

    private async Task<IPage> Open(string script)
    {
        IBrowserContext context = await browser.Context();
        IPage page = await context.NewPageAsync();
        await page.AddInitScriptAsync(script);
        await page.Clock.InstallAsync(new() { Time = Begin });
        await page.GotoAsync(Write());
        return page;
    }

    /// <summary>Lets the page's own clock run; timers fire as they would.</summary>
    private static Task Run(IPage page, double seconds) => page.Clock.RunForAsync((long)(1000 * seconds));

    private static async Task<List<(double Sec, string Words)>> Spoken(IPage page, double startMs)
    {
        var spoken = new List<(double, string)>();
        string json = await page.EvaluateAsync<string>("JSON.stringify(window.spoken)");
        foreach (System.Text.Json.JsonElement entry in System.Text.Json.JsonDocument.Parse(json).RootElement.EnumerateArray())
            spoken.Add(((entry[0].GetDouble() - startMs) / 1000, entry[1].GetString()!));
        return spoken;
    }
}
