using System.Diagnostics;
using System.Globalization;
using DuckDB.NET.Data;
using TrimFit.Core.Statistics;
using TrimFit.Import;
using TrimFit.Import.Csv;

namespace TrimFit.Benchmarks;

/// <summary>One contender, once, in a process of its own: prints the seconds of the work's second run and a sum that shows it was done.</summary>
internal static class Once
{
    public static int Run(string contender, string path)
    {
        Func<double> work = contender switch
        {
            "csv-trimfit" => () => Sum(TrimFitColumns(path)),
            "csv-bare" => () => Sum(BareLoop.Read(path, 14)),
            "csv-duckdb" => () => DuckDbTable(path),
            "turn-model" => TurnModelWork(path),
            "ls-trimfit" => LeastSquaresWork(),
            _ => throw new ArgumentException($"no contender \"{contender}\"", nameof(contender)),
        };
        work(); // compiled and settled
        GC.Collect();
        TimeSpan before = Process.GetCurrentProcess().TotalProcessorTime;
        var time = Stopwatch.StartNew();
        double sum = work();
        time.Stop();
        Console.Error.WriteLine(FormattableString.Invariant($"processor {(Process.GetCurrentProcess().TotalProcessorTime - before).TotalSeconds:F3} s"));
        Console.WriteLine(FormattableString.Invariant($"{time.Elapsed.TotalSeconds:F6} {sum:R}"));
        return 0;
    }

    public static IEnumerable<double[]> TrimFitColumns(string path)
    {
        LogTable table = new CsvLogFormat().Read(LogSource.FromFile(path), new ImportOptions());
        return [table.TimeSec, .. table.Columns.Values];
    }

    private static double Sum(IEnumerable<double[]> columns)
    {
        double sum = 0;
        foreach (double[] column in columns)
            sum += column[0] + column[^1] + column.Length;
        return sum;
    }

    private static double DuckDbTable(string path)
    {
        using var connection = new DuckDBConnection("DataSource=:memory:");
        connection.Open();
        using DuckDBCommand command = connection.CreateCommand();
        command.CommandText = $"set threads = 1; create table log as select * from read_csv('{path}'); select cast(count(*) + sum(rpm) as double) from log";
        return Convert.ToDouble(command.ExecuteScalar(), CultureInfo.InvariantCulture);
    }

    /// <summary>The turn model of a log, ten times; its rig file stands beside it.</summary>
    private static Func<double> TurnModelWork(string path)
    {
        Core.Rigging.Rig rig = Import.Rigs.RigFileReader.ReadFile(Path.ChangeExtension(path, null) + "-rig.toml");
        Core.Turns.TurnSignals signals = Core.Turns.TurnSignals.From(FlightReader.Read([LogSource.FromFile(path)]).Flight, rig);
        return () =>
        {
            double sum = 0;
            for (int i = 0; i < 10; i++)
                sum += new Core.Turns.FilterError.FilterErrorEstimator().Estimate(signals).PullAt(0.4 * signals.FullThrust)!.Value.Value;
            return sum;
        };
    }

    /// <summary>A million rows, five columns.</summary>
    private static Func<double> LeastSquaresWork()
    {
        const int rows = 1_000_000, columns = 5;
        var random = new Random(3);
        double[] design = new double[rows * columns], y = new double[rows];
        for (int i = 0; i < design.Length; i++)
            design[i] = i < rows ? 1 : random.NextDouble() - 0.5;
        for (int i = 0; i < rows; i++)
            y[i] = 1 + (2 * design[rows + i]) + (0.1 * (random.NextDouble() - 0.5));
        return () => LeastSquares.Fit(design, y, columns).Coefficients[1];
    }
}
