using System.Diagnostics;
using System.Globalization;
using System.Text;
using TrimFit.Core.Statistics;

namespace TrimFit.Benchmarks;

/// <summary>Races contenders side by side: every contender once a round, in turn, so that what slows the machine slows all; ratios within a round.</summary>
internal static class SideBySide
{
    private static readonly string _scripts = Path.Join(AppContext.BaseDirectory, "Scripts");
    private static readonly string _self = Environment.ProcessPath!;

    private sealed record Contender(string Name, string File, string[] Arguments, bool OwnClock);

    private sealed record Race(string Title, string Wanted, double? AtLeast, double? AtMost, Contender First, Contender Second);

    public static int Run(string folder, string program, string results, int rounds)
    {
        string In(string name) => Path.Join(folder, name);
        Contender Fit(string name) => new($"`trimfit fit --report`, {name}", program,
            ["fit", In(name + ".csv"), "--rig", In(name + "-rig.toml"), "--report", In("report.html"), "--quiet"], false);
        Contender Script(string name) => new($"pandas + statsmodels + matplotlib, {name}", "/usr/bin/python3", [Path.Join(_scripts, "plain_fit.py"), In(name + ".csv"), In("plain.html")], false);
        Contender Own(string what, string text) => new(text, _self, ["once", what, In("table.csv")], true);
        Contender ours = Own("csv-trimfit", "TrimFit, CSV to columns");
        Race[] races =
        [
            new("whole program, ten minutes at 10 Hz", "at least 10", 10, null, Script("ten-minutes"), Fit("ten-minutes")),
            new("whole program, one hour at 10 Hz", "at least 5", 5, null, Script("hour"), Fit("hour")),
            new("CSV to columns against DuckDB, one thread each", "at least 2", 2, null, Own("csv-duckdb", "DuckDB, one thread, into its own table"), ours),
            new("CSV to columns against pandas with dates", "at least 10", 10, null, new("pandas, dates parsed", "/usr/bin/python3", [Path.Join(_scripts, "pandas_csv.py"), In("table.csv")], true), ours),
            new("CSV to columns against a bare loop", "at most 2 (TrimFit over loop)", null, 2, ours, Own("csv-bare", "bare loop over bytes")),
            new("least squares, 1e6 by 5, against NumPy", "told only", null, null,
                new("NumPy lstsq", "/usr/bin/python3", [Path.Join(_scripts, "numpy_least_squares.py")], true), Own("ls-trimfit", "TrimFit, QR with refinement and standard errors")),
            new("50 Hz against 10 Hz, same flight", "at most 2", null, 2, Fit("ten-minutes-50hz"), Fit("ten-minutes")),
            new("one hour against ten minutes", "told only", null, null, Fit("hour"), Fit("ten-minutes")),
            new("ten hours against one hour", "told only", null, null, Fit("ten-hours"), Fit("hour")),
        ];
        Contender[] all = [.. races.SelectMany(r => new[] { r.First, r.Second }).DistinctBy(c => string.Join(' ', c.Arguments))];
        Dictionary<string, double[]> seconds = all.ToDictionary(Key, _ => new double[rounds]);
        foreach (Contender contender in all)
            Seconds(contender); // files into the page cache, code checked once
        for (int round = 0; round < rounds; round++)
        {
            foreach (Contender contender in all)
                seconds[Key(contender)][round] = Seconds(contender);
            Console.Error.WriteLine(FormattableString.Invariant($"round {round + 1} of {rounds}"));
        }
        string text = Page(races, all, seconds, rounds, out bool holds);
        File.WriteAllText(results, text);
        Console.Write(text);
        return holds ? 0 : 1;
    }

    private static string Key(Contender contender) => string.Join(' ', contender.Arguments);

    private static double Seconds(Contender contender)
    {
        var start = new ProcessStartInfo(contender.File, contender.Arguments) { RedirectStandardOutput = true };
        var time = Stopwatch.StartNew();
        using Process process = Process.Start(start)!;
        string output = process.StandardOutput.ReadToEnd();
        process.WaitForExit();
        double wall = time.Elapsed.TotalSeconds;
        if (process.ExitCode is not (0 or 4)) // 4: the flight was read and fitted, whatever it could answer
            throw new InvalidOperationException($"{contender.Name} ended with {process.ExitCode}");
        return contender.OwnClock ? double.Parse(output.Split(' ')[0], CultureInfo.InvariantCulture) : wall;
    }

    private static string Page(Race[] races, Contender[] all, Dictionary<string, double[]> seconds, int rounds, out bool holds)
    {
        var text = new StringBuilder();
        text.Append(CultureInfo.InvariantCulture, $"""
            # Speed, side by side

            `tests/TrimFit.Benchmarks/compare` made this page: {rounds} rounds, every contender once a round in turn; ratios are taken within a round, then their median (least to most).
            Whole programs are timed from start to exit; CSV readers and least squares by their own clock, second run in one process.
            Machine: {Machine()}.

            | race | ratio | wanted | |
            |---|--:|---|---|

            """);
        holds = true;
        foreach (Race race in races)
        {
            double[] ratios = [.. seconds[Key(race.First)].Zip(seconds[Key(race.Second)], (a, b) => a / b)];
            double median = Median.Of(ratios);
            bool? good = race.AtLeast is double least ? median >= least : race.AtMost is double most ? median <= most : null;
            holds &= good != false;
            text.Append(CultureInfo.InvariantCulture, $"| {race.Title} | {median:F2} ({ratios.Min():F2} to {ratios.Max():F2}) | {race.Wanted} | {(good is null ? "" : good.Value ? "holds" : "does not hold")} |\n");
        }
        double Growth(int a, int b, double size) => Math.Log(Median.Of(seconds[Key(races[a].First)]) / Median.Of(seconds[Key(races[b].Second)])) / Math.Log(size);
        text.Append(CultureInfo.InvariantCulture, $"""

            Growth of the whole program's time from ten minutes to ten hours: exponent {Growth(8, 0, MadeUpLogs.TenHours / (double)MadeUpLogs.TenMinutes):F2}, wanted at most 1.05.

            | contender | median s | least to most |
            |---|--:|---|

            """);
        foreach (Contender contender in all)
        {
            double[] own = seconds[Key(contender)];
            text.Append(CultureInfo.InvariantCulture, $"| {contender.Name} | {Median.Of(own):F3} | {own.Min():F3} to {own.Max():F3} |\n");
        }
        return text.ToString();
    }

    private static string Machine()
    {
        string cpu = File.Exists("/proc/cpuinfo")
            ? File.ReadLines("/proc/cpuinfo").FirstOrDefault(l => l.StartsWith("model name", StringComparison.Ordinal))?.Split(':')[1].Trim() ?? "processor not named"
            : "processor not named";
        return $"{cpu}, {Environment.ProcessorCount} cores, {System.Runtime.InteropServices.RuntimeInformation.OSDescription.Split('#')[0].Trim()}, .NET {Environment.Version}";
    }
}
