using System.Globalization;
using System.IO.Compression;
using System.Net;
using System.Net.Sockets;
using System.Text;
using TrimFit.EndToEndTests;

namespace TrimFit.BrowserTests.Web;

#pragma warning disable xUnit1051 // every request here ends by the client's own time limit

/// <summary>Hostile uploads and other people's sessions: a clear refusal or the right answer, little memory, everybody else untouched.</summary>
public sealed class SafetyTests(WebProgram program) : IClassFixture<WebProgram>
{
    private const long MostMemory = 400_000_000;

    [Fact]
    public async Task Script_in_names_and_columns_is_shown_as_text()
    {
        const string evil = "<script>alert(1)</script><img src=x onerror=alert(2)>";
        string log = File.ReadAllText(BuiltProgram.Sample("uncorrected.csv")).Replace("vario_m_s", $"\"{evil}\"", StringComparison.Ordinal);
        using WebSession session = program.Session();
        using HttpResponseMessage answer = await session.Upload("/flight/files", ($"{evil}.csv", Encoding.UTF8.GetBytes(log)), ("rig.toml", Rig($"{evil}")));
        string page = await answer.Content.ReadAsStringAsync();
        Assert.Contains("&lt;script&gt;alert(1)", page, StringComparison.Ordinal);
        Assert.DoesNotContain("<script>alert", page, StringComparison.Ordinal);
        Assert.DoesNotContain("<img src=x", page, StringComparison.Ordinal);
        (await session.Post("/flight/run")).Dispose();
        foreach (string path in new[] { "/flight", "/answer", "/answer/move", "/change", "/readings", "/proof", "/answer/print" })
        {
            page = await session.Page(path);
            Assert.DoesNotContain("<script>alert", page, StringComparison.Ordinal);
            Assert.DoesNotContain("<img src=x", page, StringComparison.Ordinal);
        }
    }

    [Fact]
    public async Task Every_page_forbids_what_it_does_not_need()
    {
        using WebSession session = program.Session();
        foreach (string path in new[] { "/", "/flight", "/readings", "/complaint", "/checks", "/answer", "/change", "/proof", "/book", "/health", "/nothing" })
        {
            using HttpResponseMessage answer = await session.Client.GetAsync(new Uri(path, UriKind.Relative));
            string policy = answer.Headers.GetValues("Content-Security-Policy").Single();
            Assert.StartsWith("default-src 'none'", policy, StringComparison.Ordinal);
            Assert.DoesNotContain("unsafe-eval", policy, StringComparison.Ordinal);
            Assert.DoesNotContain("script-src 'unsafe", policy, StringComparison.Ordinal);
            Assert.Equal("nosniff", answer.Headers.GetValues("X-Content-Type-Options").Single());
        }
    }

    [Fact]
    public async Task Cookies_are_out_of_reach_of_scripts_and_other_sites()
    {
        using var client = new HttpClient();
        using HttpResponseMessage answer = await client.GetAsync(program.Address);
        string[] cookies = [.. answer.Headers.GetValues("Set-Cookie")];
        Assert.Equal(2, cookies.Length);
        Assert.All(cookies, c => Assert.Contains("httponly", c, StringComparison.OrdinalIgnoreCase));
        Assert.All(cookies, c => Assert.Contains("samesite=strict", c, StringComparison.OrdinalIgnoreCase));
    }

    [Fact]
    public async Task A_form_from_elsewhere_is_refused()
    {
        using WebSession session = program.Session();
        using var form = new FormUrlEncodedContent([new("units", "imperial")]);
        using HttpResponseMessage without = await session.Client.PostAsync(new Uri("/units", UriKind.Relative), form);
        Assert.Equal(HttpStatusCode.Forbidden, without.StatusCode);
        using var told = new FormUrlEncodedContent([new("form-token", await session.Token()), new("units", "imperial")]);
        using var request = new HttpRequestMessage(HttpMethod.Post, new Uri("/units", UriKind.Relative)) { Content = told };
        request.Headers.Add("Sec-Fetch-Site", "cross-site");
        using HttpResponseMessage crossing = await session.Client.SendAsync(request);
        Assert.Equal(HttpStatusCode.Forbidden, crossing.StatusCode);
    }

    [Fact]
    public async Task Another_name_than_this_machines_is_not_answered()
    {
        using var client = new HttpClient();
        using var request = new HttpRequestMessage(HttpMethod.Get, program.Address) { Headers = { Host = "evil.example" } };
        using HttpResponseMessage answer = await client.SendAsync(request);
        Assert.Equal(HttpStatusCode.MisdirectedRequest, answer.StatusCode);
    }

    [Theory]
    [InlineData("../../../etc/passwd.csv")]
    [InlineData("..\\..\\boot.csv")]
    [InlineData("/etc/cron.d/job.csv")]
    [InlineData("con.csv")]
    [InlineData("a\u202egnp.csv")]
    public async Task A_name_never_reaches_the_file_system(string name)
    {
        using WebSession session = program.Session();
        using HttpResponseMessage answer = await session.Upload("/flight/files", (name, File.ReadAllBytes(BuiltProgram.Sample("uncorrected.csv"))));
        string page = WebUtility.HtmlDecode(await answer.Content.ReadAsStringAsync());
        Assert.Equal(HttpStatusCode.OK, answer.StatusCode);
        Assert.DoesNotContain("..", page, StringComparison.Ordinal);
        Assert.DoesNotContain("\u202e", page, StringComparison.Ordinal);
        Assert.All(Directory.EnumerateFiles(program.UploadFolder, "*", SearchOption.AllDirectories), f => Assert.True(Path.GetFileName(f).All(char.IsAsciiDigit) || f.Contains("ASPNETCORE", StringComparison.Ordinal), f));
    }

    [Fact]
    public async Task A_zip_bomb_named_csv_is_refused()
    {
        using var zip = new MemoryStream();
        using (var archive = new ZipArchive(zip, ZipArchiveMode.Create, leaveOpen: true))
        {
            using Stream entry = archive.CreateEntry("flight.csv", CompressionLevel.Optimal).Open();
            byte[] nothing = new byte[1 << 20];
            for (int i = 0; i < 500; i++)
                entry.Write(nothing);
        }
        using WebSession session = program.Session();
        using HttpResponseMessage answer = await session.Upload("/flight/files", ("flight.csv", zip.ToArray()));
        Assert.Contains("unpacks to far more than a flight", await answer.Content.ReadAsStringAsync(), StringComparison.Ordinal);
        await Alive();
    }

    [Fact]
    public async Task One_line_of_2_GB_is_refused()
    {
        using WebSession session = program.Session();
        using var endless = new LineContent(2L << 30);
        try
        {
            using HttpResponseMessage answer = await session.Upload("/flight/files", [("flight.csv", endless)], []);
            Assert.Equal(HttpStatusCode.RequestEntityTooLarge, answer.StatusCode);
            Assert.Contains("200 MB", await answer.Content.ReadAsStringAsync(), StringComparison.Ordinal);
        }
        catch (HttpRequestException)
        {
            // The program closed the connection while the line still came: as good a refusal.
        }
        Assert.True(endless.Sent < 500L << 20, $"took {endless.Sent.ToString(CultureInfo.InvariantCulture)} bytes");
        await Alive();
    }

    [Fact]
    public async Task One_line_of_150_MB_that_is_taken_is_no_log()
    {
        using WebSession session = program.Session();
        using HttpResponseMessage answer = await session.Upload("/flight/files", [("flight.csv", new LineContent(150L << 20))], []);
        string page = await answer.Content.ReadAsStringAsync();
        Assert.Contains("flight.csv", page, StringComparison.Ordinal);
        Assert.DoesNotContain("Find the pull", page, StringComparison.Ordinal);
        await Alive();
    }

    [Fact]
    public async Task Half_an_upload_leaves_nothing()
    {
        using WebSession session = program.Session();
        _ = await session.Token();
        using (var raw = new TcpClient())
        {
            await raw.ConnectAsync(program.Address.Host, program.Address.Port);
            await using NetworkStream stream = raw.GetStream();
            await stream.WriteAsync(Encoding.ASCII.GetBytes($"POST /flight/files HTTP/1.1\r\nHost: {program.Address.Authority}\r\nContent-Type: multipart/form-data; boundary=x\r\nContent-Length: 1000000\r\n\r\n--x\r\nContent-Disposition: form-data; name=\"files\"; filename=\"f.csv\"\r\n\r\ntime_s,rpm\r\n"));
        }
        await Alive();
        Assert.DoesNotContain("f.csv", await session.Page("/flight"), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("text/csv")]
    [InlineData("application/json")]
    public async Task What_is_no_form_is_refused(string type)
    {
        using WebSession session = program.Session();
        using var content = new StringContent("time,rpm\n1,2\n", Encoding.UTF8, type);
        using HttpResponseMessage answer = await session.Client.PostAsync(new Uri("/flight/files", UriKind.Relative), content);
        Assert.Equal(HttpStatusCode.UnsupportedMediaType, answer.StatusCode);
    }

    [Fact]
    public async Task A_picture_named_as_a_log_is_refused_by_what_it_is()
    {
        using WebSession session = program.Session();
        byte[] png = [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13, .. new byte[2000]];
        using HttpResponseMessage answer = await session.Upload("/flight/files", ("flight.csv", png));
        Assert.Contains("flight.csv", await answer.Content.ReadAsStringAsync(), StringComparison.Ordinal);
        Assert.DoesNotContain("Find the pull", await session.Page("/flight"), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Two_sessions_never_see_each_others_flights()
    {
        using WebSession one = program.Session(), other = program.Session();
        (await one.Fit("uncorrected.csv", "uncorrected-rig.toml")).Dispose();
        string first = await one.Page("/answer/result.json");
        Assert.Contains("uncorrected.csv", first, StringComparison.Ordinal);
        foreach (string path in new[] { "/", "/flight", "/answer", "/answer/result.json", "/answer/print", "/readings", "/readings/rig.toml", "/change", "/proof", "/answer/move" })
            Assert.DoesNotContain("uncorrected", await other.Page(path), StringComparison.Ordinal);
        (await other.Fit("ordinary.csv", "ordinary-rig.toml")).Dispose();
        Assert.Equal(first, await one.Page("/answer/result.json"));
        Assert.DoesNotContain("ordinary.csv", await one.Page("/answer"), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Fifty_at_once_are_all_answered_rightly()
    {
        byte[] log = File.ReadAllBytes(BuiltProgram.Sample("uncorrected.csv"));
        await Task.WhenAll(Enumerable.Range(0, 50).Select(async i =>
        {
            using WebSession session = program.Session();
            string name = string.Create(CultureInfo.InvariantCulture, $"flight-{i}.csv");
            using HttpResponseMessage answer = await session.Upload("/flight/files", (name, log));
            Assert.Equal(HttpStatusCode.OK, answer.StatusCode);
            string page = await answer.Content.ReadAsStringAsync();
            Assert.Contains(name, page, StringComparison.Ordinal);
            Assert.DoesNotContain($"flight-{((i + 1) % 50).ToString(CultureInfo.InvariantCulture)}.csv", page, StringComparison.Ordinal);
        }));
        await Alive();
    }

    [Fact]
    public async Task Files_are_gone_once_the_flight_is_worked_out()
    {
        await using var own = new WebProgram();
        await own.InitializeAsync();
        using WebSession session = own.Session();
        (await session.Upload("/flight/files", ("flight.csv", File.ReadAllBytes(BuiltProgram.Sample("uncorrected.csv"))), ("rig.toml", Rig("m")))).Dispose();
        Assert.NotEmpty(Directory.EnumerateFiles(own.UploadFolder, "*", SearchOption.AllDirectories));
        using HttpResponseMessage answer = await session.Post("/flight/run");
        Assert.Equal("/answer", answer.RequestMessage!.RequestUri!.AbsolutePath);
        Assert.Empty(Directory.EnumerateFiles(own.UploadFolder, "*", SearchOption.AllDirectories));
    }

    [Fact]
    public async Task Asked_to_stop_it_finishes_what_runs_and_leaves_nothing_behind()
    {
        await using var own = new WebProgram();
        await own.InitializeAsync();
        using WebSession session = own.Session();
        Task<HttpResponseMessage> running = session.Fit("uncorrected.csv", "uncorrected-rig.toml");
        using (WebSession watcher = own.Session())
        {
            for (int i = 0; i < 600 && !running.IsCompleted && !(await session.Page("/progress")).Contains("measuring", StringComparison.Ordinal); i++)
                await Task.Delay(20);
        }
        own.AskToStop();
        using HttpResponseMessage answer = await running;
        Assert.Equal(HttpStatusCode.OK, answer.StatusCode);
        Assert.Contains("it turns left at 1.4 deg/s", await answer.Content.ReadAsStringAsync(), StringComparison.Ordinal);
        await own.Process.WaitForExitAsync(new CancellationTokenSource(TimeSpan.FromSeconds(30)).Token);
        Assert.Equal(0, own.Process.ExitCode);
        Assert.Empty(Directory.EnumerateFileSystemEntries(own.UploadFolder));
    }

    [Fact]
    public async Task Another_address_says_what_it_exposes_and_wants_the_token()
    {
        await using var own = new WebProgram { More = ["--listen", "0.0.0.0"] };
        await own.InitializeAsync();
        string token = own.FirstLine[(own.FirstLine.IndexOf("?token=", StringComparison.Ordinal) + 7)..];
        Assert.True(token.Length >= 32);
        using WebSession stranger = own.Session();
        foreach (string path in new[] { "/", "/flight", "/book", "/?token=wrong", "/?token=" })
        {
            using HttpResponseMessage refused = await stranger.Client.GetAsync(new Uri(path, UriKind.Relative));
            Assert.Equal(HttpStatusCode.Forbidden, refused.StatusCode);
        }
        Assert.Contains("\"status\":\"ok\"", await stranger.Page("/health"), StringComparison.Ordinal);
        using WebSession guest = own.Session();
        using HttpResponseMessage let = await guest.Client.GetAsync(new Uri("/?token=" + token, UriKind.Relative));
        Assert.Equal(HttpStatusCode.OK, let.StatusCode);
        Assert.DoesNotContain(token, let.RequestMessage!.RequestUri!.ToString(), StringComparison.Ordinal);
        Assert.Contains("Drop the flight here", await guest.Page("/flight"), StringComparison.Ordinal);
        lock (own.Said)
            Assert.Contains("can be reached by other machines", own.Said.ToString(), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("--listen", "nowhere", "expected an address of this machine")]
    [InlineData("--port", "99999", "expected a whole number from 0")]
    [InlineData("--token", "short", "expected 12 or more")]
    public void A_wrong_word_is_said(string option, string value, string expected)
    {
        BuiltProgram.Outcome run = BuiltProgram.Run(null, "serve", "--no-browser", option, value);
        Assert.Equal(2, run.ExitCode);
        Assert.Contains(expected, run.Error, StringComparison.Ordinal);
    }

    private static byte[] Rig(string name) => Encoding.UTF8.GetBytes(File.ReadAllText(BuiltProgram.Sample("uncorrected-rig.toml"))
        .Replace(File.ReadLines(BuiltProgram.Sample("uncorrected-rig.toml")).First(l => l.StartsWith("name", StringComparison.Ordinal)), $"name = '{name}'", StringComparison.Ordinal));

    /// <summary>It answers, said nothing on standard error, and never took more memory than allowed.</summary>
    private async Task Alive()
    {
        using WebSession fresh = program.Session();
        Assert.Contains("\"status\":\"ok\"", await fresh.Page("/health"), StringComparison.Ordinal);
        lock (program.Said)
            Assert.Equal("", program.Said.ToString());
        if (OperatingSystem.IsLinux())
            Assert.InRange(program.PeakMemory(), 1, MostMemory);
    }

    /// <summary>One line without an end, made as it is sent.</summary>
    private sealed class LineContent(long bytes) : HttpContent
    {
        public long Sent { get; private set; }

        protected override async Task SerializeToStreamAsync(Stream stream, TransportContext? context)
        {
            byte[] part = new byte[1 << 20];
            part.AsSpan().Fill((byte)'7');
            await stream.WriteAsync("time_s,rpm\n"u8.ToArray());
            for (Sent = 0; Sent < bytes; Sent += part.Length)
                await stream.WriteAsync(part);
        }

        protected override bool TryComputeLength(out long length)
        {
            length = 0;
            return false;
        }
    }
}
