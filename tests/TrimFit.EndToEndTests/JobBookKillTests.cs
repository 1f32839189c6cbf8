using System.Diagnostics;
using System.Globalization;
using System.Text;
using System.Text.Json;

namespace TrimFit.EndToEndTests;

/// <summary>What a book is after its program was killed, its disk filled up, or its folder may not be written.</summary>
public class JobBookKillTests(ITestOutputHelper output)
{
    /// <summary>A log that is read and fitted fast: the first 40 s of a bundled one.</summary>
    private static string ShortLog(TemporaryFolder folder, int number)
    {
        string[] lines = File.ReadAllLines(BuiltProgram.Sample("uncorrected.csv"));
        string[] kept = [.. lines.Take(400)];
        kept[^1] = kept[^1][..^1] + (number % 10).ToString(CultureInfo.InvariantCulture); // no two logs alike
        kept[^2] = kept[^2][..^1] + (number / 10 % 10).ToString(CultureInfo.InvariantCulture);
        kept[^3] = kept[^3][..^1] + (number / 100 % 10).ToString(CultureInfo.InvariantCulture);
        return folder.Write($"log-{number}.csv", string.Join('\n', kept) + "\n");
    }

    /// <summary>Kill -9 at a random moment of <c>job add</c>; TRIMFIT_KILLS says how often (15), TRIMFIT_PROGRAM which program (the built one).</summary>
    /// <remarks>A third of the kills falls anywhere in the run, two thirds just after the write-ahead log began to grow, which is when the book is written.</remarks>
    [Fact]
    public async Task Killed_while_adding_a_flight_the_book_opens_and_holds_what_was_acknowledged_and_nothing_half()
    {
        Assert.SkipWhen(OperatingSystem.IsWindows(), "kill -9 is Unix's");
        int kills = int.Parse(Environment.GetEnvironmentVariable("TRIMFIT_KILLS") ?? "15", CultureInfo.InvariantCulture);
        using var folder = new TemporaryFolder();
        string book = folder["jobs.trimfit-book"];
        Assert.Equal(0, BuiltProgram.Run(null, "job", "open", "--complaint", "pulls", "--machine", "Demo", "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--book", book).ExitCode);
        double usualSec = await Usual();
        var random = new Random(20260517); // moments of kills; any seed will do
        int acknowledged = 0, present = 1, unasked = 0, early = 0, inWriting = 0;
        for (int k = 1; k <= kills; k++)
        {
            string log = ShortLog(folder, k);
            using Process add = Start("job", "add", "1", log, "--quiet", "--book", book);
            Task<string> said = add.StandardOutput.ReadToEndAsync(TestContext.Current.CancellationToken);
            bool atWriting = k % 3 != 0;
            if (atWriting)
            {
                var limit = Stopwatch.StartNew();
                while (!add.HasExited && !(new FileInfo(book + "-wal") is { Exists: true, Length: > 0 }) && limit.Elapsed.TotalSeconds < 60)
                    Thread.Sleep(0);
                Thread.SpinWait(random.Next(400_000));
            }
            else
            {
                await Task.Delay(TimeSpan.FromSeconds(1.1 * usualSec * random.NextDouble()), TestContext.Current.CancellationToken);
            }
            bool alive = !add.HasExited;
            add.Kill(); // SIGKILL
            await add.WaitForExitAsync(TestContext.Current.CancellationToken);
            bool told = (await said).Contains($"flight {present + 1} is kept", StringComparison.Ordinal);
            using JsonDocument job = Show(book);
            int now = job.RootElement.GetProperty("flights").GetArrayLength();
            Assert.True(now == present || now == present + 1, $"kill {k}: {present} flights became {now}");
            Assert.True(!told || now == present + 1, $"kill {k}: flight {present + 1} was acknowledged and is not there");
            AssertWhole(job.RootElement, folder, book, present + 1 == now ? log : null);
            acknowledged += told ? 1 : 0;
            unasked += now > present && !told ? 1 : 0;
            early += now == present ? 1 : 0;
            inWriting += alive && atWriting ? 1 : 0;
            present = now;
        }
        output.WriteLine($"{kills} kills: {early} before the flight was kept, {unasked} after it was kept and before it was said, {acknowledged} after it was said; {inWriting} while the book was being written or just after");
        Assert.True(early > 0, "no kill came before the flight was kept");

        async Task<double> Usual()
        {
            var clock = Stopwatch.StartNew();
            using Process add = Start("job", "add", "1", ShortLog(folder, 0), "--quiet", "--book", book);
            await add.StandardOutput.ReadToEndAsync(TestContext.Current.CancellationToken);
            await add.WaitForExitAsync(TestContext.Current.CancellationToken);
            return clock.Elapsed.TotalSeconds;
        }
    }

    [Fact]
    public void On_a_full_disk_it_says_so_and_the_book_is_as_it_was()
    {
        Assert.SkipWhen(OperatingSystem.IsWindows(), "ulimit is Unix's");
        using var folder = new TemporaryFolder();
        string book = folder["jobs.trimfit-book"];
        BuiltProgram.Run(null, "job", "open", "--complaint", "pulls", "--machine", "Demo", "--rig", BuiltProgram.Sample("uncorrected-rig.toml"), "--book", book);
        string before = BuiltProgram.Run(null, "job", "show", "1", "--json", "-", "--book", book).Output;
        // No file may grow beyond 100 kB: writing fails as on a full disk (with EFBIG, where a disk has ENOSPC). The signal for it is switched off,
        // and so are the runtime's own files for code that it makes.
        BuiltProgram.Outcome full = Shell($"export DOTNET_EnableWriteXorExecute=0; trap '' XFSZ; ulimit -f 100; exec '{BuiltProgram.Executable}' job add 1 '{BuiltProgram.Sample("uncorrected.csv")}' --quiet --book '{book}'");
        Assert.Equal(3, full.ExitCode);
        Assert.Matches("(the disk is full|the disk refused to read or write).* Nothing of this action was kept; the book is as it was\\.", full.Error);
        Assert.DoesNotContain("   at ", full.Error, StringComparison.Ordinal);
        Assert.Equal("", full.Output);
        Assert.Equal(before, BuiltProgram.Run(null, "job", "show", "1", "--json", "-", "--book", book).Output);
        Assert.Equal(0, BuiltProgram.Run(null, "job", "add", "1", BuiltProgram.Sample("uncorrected.csv"), "--quiet", "--book", book).ExitCode);
    }

    [Fact]
    [System.Runtime.Versioning.UnsupportedOSPlatform("windows")]
    public void In_a_folder_that_may_not_be_written_it_reads_and_says_why_it_does_not_write()
    {
        Assert.SkipWhen(OperatingSystem.IsWindows(), "file modes are Unix's");
        using var folder = new TemporaryFolder();
        string book = folder["jobs.trimfit-book"];
        BuiltProgram.Run(null, "job", "open", "--complaint", "pulls", "--machine", "Demo", "--book", book);
        byte[] bytes = File.ReadAllBytes(book);
        string directory = Path.GetDirectoryName(book)!;
        const UnixFileMode ReadOnly = UnixFileMode.UserRead | UnixFileMode.UserExecute | UnixFileMode.GroupRead | UnixFileMode.GroupExecute | UnixFileMode.OtherRead | UnixFileMode.OtherExecute;
        File.SetUnixFileMode(book, ReadOnly);
        File.SetUnixFileMode(directory, ReadOnly);
        try
        {
            // The superuser may write anywhere, so he becomes nobody where he can.
            string become = Environment.UserName == "root" ? "setpriv --reuid=65534 --regid=65534 --clear-groups " : "";
            BuiltProgram.Outcome probe = Shell($"{become}'{BuiltProgram.Executable}' --version");
            Assert.SkipWhen(probe.ExitCode != 0, "this account cannot become one without rights that can start the program");
            BuiltProgram.Outcome list = Shell($"{become}'{BuiltProgram.Executable}' job list --book '{book}'");
            Assert.Equal((0, ""), (list.ExitCode, list.Error));
            Assert.StartsWith("1 job with 0 flights", list.Output, StringComparison.Ordinal);
            BuiltProgram.Outcome write = Shell($"{become}'{BuiltProgram.Executable}' job sign 1 --name T --book '{book}'");
            Assert.Equal(3, write.ExitCode);
            Assert.Contains("cannot be written. Nothing of this action was kept; the book is as it was. Check their rights", write.Error, StringComparison.Ordinal);
            BuiltProgram.Outcome fresh = Shell($"{become}'{BuiltProgram.Executable}' job open --complaint x --machine y --book '{folder["other.trimfit-book"]}'");
            Assert.Equal(3, fresh.ExitCode);
            Assert.Contains("a job book cannot be made there", fresh.Error, StringComparison.Ordinal);
        }
        finally
        {
            File.SetUnixFileMode(directory, ReadOnly | UnixFileMode.UserWrite);
            File.SetUnixFileMode(book, ReadOnly | UnixFileMode.UserWrite);
        }
        Assert.Equal(bytes, File.ReadAllBytes(book));
    }

    /// <summary>Every flight has its log, its result and its rig, and the newest log is the one that was added.</summary>
    private static void AssertWhole(JsonElement job, TemporaryFolder folder, string book, string? newest)
    {
        JsonElement[] flights = [.. job.GetProperty("flights").EnumerateArray()], results = [.. job.GetProperty("results").EnumerateArray()];
        Assert.Equal(flights.Select(f => f.GetProperty("number").GetInt32()), results.Select(r => r.GetProperty("flight").GetInt32()));
        Assert.All(flights, f => Assert.Single(f.GetProperty("inputs").EnumerateArray()));
        Assert.All(results, r => Assert.Equal(["log", "rig"], r.GetProperty("inputs").EnumerateArray().Select(i => i.GetProperty("role").GetString()!)));
        if (newest is not null)
        {
            string sha256 = Convert.ToHexStringLower(System.Security.Cryptography.SHA256.HashData(File.ReadAllBytes(newest)));
            Assert.Equal(sha256, flights[^1].GetProperty("inputs")[0].GetProperty("sha256").GetString());
        }
        // An export reads every byte of the job and compares it with its SHA-256.
        BuiltProgram.Outcome export = Run("job", "export", "1", "--out", folder["check.zip"], "--book", book);
        Assert.Equal((0, ""), (export.ExitCode, export.Error));
    }

    private static JsonDocument Show(string book)
    {
        BuiltProgram.Outcome show = Run("job", "show", "1", "--json", "-", "--book", book);
        Assert.Equal((0, ""), (show.ExitCode, show.Error));
        return JsonDocument.Parse(show.Output);
    }

    private static string Program => Environment.GetEnvironmentVariable("TRIMFIT_PROGRAM") ?? BuiltProgram.Executable;

    private static BuiltProgram.Outcome Run(params string[] args)
    {
        using Process process = Start(args);
        Task<string> said = process.StandardOutput.ReadToEndAsync(), error = process.StandardError.ReadToEndAsync();
        process.WaitForExit();
        return new(process.ExitCode, said.GetAwaiter().GetResult(), error.GetAwaiter().GetResult());
    }

    private static Process Start(params string[] args) =>
        Process.Start(new ProcessStartInfo(Program, args) { RedirectStandardOutput = true, RedirectStandardError = true, StandardOutputEncoding = Encoding.UTF8 })!;

    private static BuiltProgram.Outcome Shell(string command)
    {
        using Process process = Process.Start(new ProcessStartInfo("/bin/bash", ["-c", command]) { RedirectStandardOutput = true, RedirectStandardError = true })!;
        Task<string> said = process.StandardOutput.ReadToEndAsync(), error = process.StandardError.ReadToEndAsync();
        process.WaitForExit();
        return new(process.ExitCode, said.GetAwaiter().GetResult(), error.GetAwaiter().GetResult());
    }
}
