using System.Diagnostics;
using System.Globalization;
using System.Net;
using System.Net.Http.Headers;
using System.Text.RegularExpressions;
using TrimFit.EndToEndTests;

namespace TrimFit.BrowserTests.Web;

/// <summary><c>trimfit serve</c> as people start it, on a port the system picks, with a job book and a memory of loggers of its own.</summary>
public sealed partial class WebProgram : IAsyncLifetime
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("trimfit-web-tests-");
    private Process? _process;

    public Uri Address { get; private set; } = null!;

    /// <summary>The line with the address.</summary>
    public string FirstLine { get; private set; } = "";

    /// <summary>More words for the command line.</summary>
    public string[] More { get; init; } = [];

    /// <summary>Where uploads lie while they are worked on.</summary>
    public string UploadFolder => Path.Combine(_folder.FullName, "tmp");

    public Process Process => _process ?? throw new InvalidOperationException("not started");

    /// <summary>Everything the program wrote beside its address.</summary>
    public StringWriter Said { get; } = new();

    /// <summary>The program to test: the one built beside the tests, or another (such as the one compiled ahead of time) by TRIMFIT_PROGRAM.</summary>
    public static string Executable => Environment.GetEnvironmentVariable("TRIMFIT_PROGRAM") is { Length: > 0 } told ? told
        : Path.Combine(BuiltProgram.Root, "artifacts", "bin", "TrimFit.Cli", new DirectoryInfo(AppContext.BaseDirectory).Name, "trimfit");

    public async ValueTask InitializeAsync()
    {
        Directory.CreateDirectory(UploadFolder);
        var start = new ProcessStartInfo(Executable, ["serve", "--no-browser", "--port", "0", "--book", Path.Combine(_folder.FullName, "book.trimfit-book"), .. More])
        {
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        start.Environment["TMPDIR"] = UploadFolder;
        start.Environment["DOTNET_EnableDiagnostics"] = "0"; // else the runtime puts its own pipes among the uploads
        start.Environment["XDG_DATA_HOME"] = _folder.FullName;
        _process = Process.Start(start)!;
        _process.ErrorDataReceived += (_, line) =>
        {
            lock (Said)
                Said.WriteLine(line.Data);
        };
        _process.BeginErrorReadLine();
        string first = await _process.StandardOutput.ReadLineAsync() ?? throw new InvalidOperationException("the program ended: " + Said);
        FirstLine = first;
        Address = new Uri(AddressOf().Match(first).Value.Replace("0.0.0.0", "127.0.0.1", StringComparison.Ordinal));
    }

    /// <summary>A client that keeps its cookies: one browser.</summary>
    public WebSession Session() => new(Address);

    /// <summary>Largest resident memory of the program so far, bytes.</summary>
    public long PeakMemory()
    {
        string line = File.ReadLines($"/proc/{Process.Id.ToString(CultureInfo.InvariantCulture)}/status").First(l => l.StartsWith("VmHWM:", StringComparison.Ordinal));
        return long.Parse(new string([.. line.Where(char.IsAsciiDigit)]), CultureInfo.InvariantCulture) * 1024;
    }

    /// <summary>Asks it to stop as a terminal or the system does.</summary>
    public void AskToStop() => Process.Start("kill", ["-TERM", Process.Id.ToString(CultureInfo.InvariantCulture)])!.WaitForExit();

    public async ValueTask DisposeAsync()
    {
        if (_process is { HasExited: false })
        {
            AskToStop();
            using var wait = new CancellationTokenSource(TimeSpan.FromSeconds(30));
            try
            {
                await _process.WaitForExitAsync(wait.Token);
            }
            catch (OperationCanceledException)
            {
                _process.Kill(entireProcessTree: true);
            }
        }
        _process?.Dispose();
        _folder.Delete(recursive: true);
    }

    [GeneratedRegex(@"http://[0-9.:]+/")]
    private static partial Regex AddressOf();
}

/// <summary>One browser without a screen: cookies, the token of the forms, uploads.</summary>
public sealed partial class WebSession : IDisposable
{
    private readonly HttpClient _client;

    public WebSession(Uri address)
    {
        var handler = new SocketsHttpHandler { CookieContainer = new CookieContainer(), AllowAutoRedirect = true };
        _client = new(handler) { BaseAddress = address, Timeout = TimeSpan.FromMinutes(5) };
    }

    public HttpClient Client => _client;

    public async Task<string> Page(string path)
    {
        using HttpResponseMessage answer = await _client.GetAsync(new Uri(path, UriKind.Relative));
        return await answer.Content.ReadAsStringAsync();
    }

    public async Task<string> Token() => Field().Match(await Page("/")).Groups[1].Value;

    public async Task<HttpResponseMessage> Upload(string path, params (string Name, byte[] Bytes)[] files) =>
        await Upload(path, [.. files.Select(f => (f.Name, (HttpContent)new ByteArrayContent(f.Bytes)))], []);

    public async Task<HttpResponseMessage> Upload(string path, (string Name, HttpContent Content)[] files, (string Name, string Value)[] fields)
    {
        using var form = new MultipartFormDataContent { { new StringContent(await Token()), "form-token" } };
        foreach ((string name, string value) in fields)
            form.Add(new StringContent(value), name);
        foreach ((string name, HttpContent content) in files)
        {
            content.Headers.ContentDisposition = new ContentDispositionHeaderValue("form-data") { Name = "files", FileName = Quoted(name) };
            form.Add(content);
        }
        return await _client.PostAsync(new Uri(path, UriKind.Relative), form);
    }

    public async Task<HttpResponseMessage> Post(string path, params (string Name, string Value)[] fields)
    {
        using var form = new FormUrlEncodedContent([new("form-token", await Token()), .. fields.Select(f => new KeyValuePair<string, string>(f.Name, f.Value))]);
        return await _client.PostAsync(new Uri(path, UriKind.Relative), form);
    }

    /// <summary>A bundled flight with its rig file, all the way to the answer.</summary>
    public async Task<HttpResponseMessage> Fit(string log, string rig) => await Upload("/flight/files",
        [(log, File.ReadAllBytes(BuiltProgram.Sample(log)).Content()), (rig, File.ReadAllBytes(BuiltProgram.Sample(rig)).Content())], [("straight", "1")]);

    public void Dispose() => _client.Dispose();

    private static string Quoted(string name) => "\"" + name.Replace("\\", "\\\\", StringComparison.Ordinal).Replace("\"", "\\\"", StringComparison.Ordinal) + "\"";

    [GeneratedRegex("name=\"form-token\" value=\"([^\"]+)\"")]
    private static partial Regex Field();
}

internal static class Contents
{
    public static HttpContent Content(this byte[] bytes) => new ByteArrayContent(bytes);
}
