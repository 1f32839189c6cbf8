using System.Diagnostics;
using System.Text;

namespace TrimFit.EndToEndTests;

/// <summary>The built `trimfit`, started as people start it.</summary>
internal static class BuiltProgram
{
    /// <summary>Folder of TrimFit.sln.</summary>
    public static string Root { get; } = FindRoot();

    public static string Executable { get; } = FindExecutable();

    /// <summary>A bundled flight's file.</summary>
    public static string Sample(string name) => Path.Combine(Root, "sample-logs", name);

    /// <summary>Runs the program to its end, in a shell with the locale; null leaves the machine's.</summary>
    public static Outcome Run(string? locale, params ReadOnlySpan<string> args)
    {
        var start = new ProcessStartInfo(Executable)
        {
            RedirectStandardOutput = true,
            RedirectStandardError = true,
            StandardOutputEncoding = Encoding.UTF8,
            StandardErrorEncoding = Encoding.UTF8,
        };
        foreach (string arg in args)
            start.ArgumentList.Add(arg);
        if (locale is not null)
            start.Environment["LC_ALL"] = locale;
        using Process process = Process.Start(start)!;
        Task<string> output = process.StandardOutput.ReadToEndAsync(), error = process.StandardError.ReadToEndAsync();
        if (!process.WaitForExit(TimeSpan.FromMinutes(5)))
        {
            process.Kill(entireProcessTree: true);
            throw new TimeoutException("trimfit did not end within five minutes");
        }
        return new(process.ExitCode, output.GetAwaiter().GetResult(), error.GetAwaiter().GetResult());
    }

    /// <summary>Starts the program and does not wait for it.</summary>
    public static Process Start(params ReadOnlySpan<string> args) => Process.Start(new ProcessStartInfo(Executable, args.ToArray()))!;

    /// <summary>What a run left behind.</summary>
    public sealed record Outcome(int ExitCode, string Output, string Error);

    private static string FindRoot()
    {
        for (DirectoryInfo? folder = new(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
        {
            if (File.Exists(Path.Combine(folder.FullName, "TrimFit.sln")))
                return folder.FullName;
        }
        throw new InvalidOperationException("The tests run from a folder that is not below TrimFit.sln.");
    }

    private static string FindExecutable()
    {
        // The tests' own folder ends in their configuration; the program was built beside them in the same one.
        string configuration = new DirectoryInfo(AppContext.BaseDirectory).Name;
        string path = Path.Combine(Root, "artifacts", "bin", "TrimFit.Cli", configuration, OperatingSystem.IsWindows() ? "trimfit.exe" : "trimfit");
        return File.Exists(path) ? path : throw new FileNotFoundException("The program has not been built.", path);
    }
}
