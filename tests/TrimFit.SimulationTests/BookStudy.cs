using System.Collections.Immutable;
using System.Diagnostics;
using System.Globalization;
using System.Text;
using TrimFit.Core.Statistics;
using TrimFit.Core.Workshop;
using TrimFit.Jobs;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>A job book of ten years: how large it becomes, and how long its list takes.</summary>
internal static class BookStudy
{
    /// <summary>About the size of a result as JSON.</summary>
    private const int UsualResultBytes = 24_000;

    /// <summary>Makes the book.</summary>
    /// <param name="path">Where; must not be there yet.</param>
    /// <param name="jobs">Jobs.</param>
    /// <param name="flights">Flights over all jobs.</param>
    /// <param name="logs">Texts of flight logs; each flight gets one with its last digits drawn anew, so that no two are alike.</param>
    /// <param name="resultBytes">Size of a result.</param>
    /// <param name="progress">Called with the jobs done.</param>
    public static void Make(string path, int jobs, int flights, IReadOnlyList<byte[]> logs, int resultBytes = UsualResultBytes, Action<int>? progress = null)
    {
        using JobBook book = JobBook.Open(path, BookAccess.Create, At(0));
        book.DoNotWaitForTheDisk(); // it is made up: made again when the power goes
        var random = new SeededRandom(1);
        KeptFile rig = Text(InputRecord.Rig, "machine.toml", RigText.Write(RandomScenarios.Draw(1)));
        byte[] result = new byte[resultBytes];
        Encoding.UTF8.GetBytes("{\"schema\":\"trimfit-fit/1\"").CopyTo(result, 0);
        for (int j = 0; j < jobs; j++)
        {
            long job = book.AddJob(new()
            {
                Number = 0,
                Uid = "",
                Opened = default,
                Complaint = "pulls to one side at full power",
                Machine = $"Demo machine {j % 40}",
                Customer = $"Customer {j}",
                Wing = "Demo wing 26",
                WingId = $"W{j}",
            }, rig, At(j)).Number;
            int own = (flights / jobs) + (j < flights % jobs ? 1 : 0);
            for (int f = 0; f < own; f++)
            {
                KeptFile log = new(InputRecord.Log, "flight.csv", Redrawn(logs[random.NextInt32(logs.Count)], random));
                for (int i = 30; i < result.Length; i++)
                    result[i] = (byte)(i % 12 == 0 ? ',' : '0' + random.NextInt32(10));
                book.AddFlight(job, new()
                {
                    Setup = 1,
                    Flown = At(j),
                    Inputs = [log],
                    Result = new()
                    {
                        Json = result.ToArray(),
                        Inputs = [log, rig],
                        Record = new()
                        {
                            Number = 0,
                            Made = default,
                            Kind = ResultRecord.FitKind,
                            Flight = 0,
                            ProgramVersion = "0.1.0",
                            Options = "--seed 1",
                            Sha256 = "",
                            Verdict = "power_pull",
                            Strength = "weak",
                            RateRadPerSec = 0.02 * random.NextNormal(),
                            RateInterval95 = new ConfidenceInterval(-0.04, 0.04, 0.95),
                            Sensitivities = [new() { Source = "ballast", LogMedian = 1.6 + (0.3 * random.NextNormal()), LogSd = 0.4, WingAreaM2 = 26, SuspendedKg = 118 }],
                        },
                    },
                }, At(j));
            }
            if (j % 2 == 0)
                book.AddSignature(job, new() { Made = default, Name = "T. Echnician", Date = new(2026, 5, 17), Setup = 1, Readings = [new("carabiners.left_mm", -220)] }, At(j));
            progress?.Invoke(j + 1);
        }
    }

    /// <summary>Seconds that opening the book and reading its list take.</summary>
    public static (double Sec, ImmutableArray<JobSummary> Jobs) List(string path)
    {
        var clock = Stopwatch.StartNew();
        using JobBook book = JobBook.Open(path, BookAccess.Read, At(0));
        ImmutableArray<JobSummary> jobs = book.List();
        return (clock.Elapsed.TotalSeconds, jobs);
    }

    /// <summary><c>book --out FILE [--jobs 500] [--flights 5000] [--minutes-flown 14]</c></summary>
    public static int Run(string[] args)
    {
        string path = Word("--out", "");
        if (path.Length == 0 || File.Exists(path))
        {
            Console.Error.WriteLine("book --out FILE [--jobs N] [--flights N]: FILE must not be there yet");
            return 2;
        }
        int jobs = int.Parse(Word("--jobs", "500"), CultureInfo.InvariantCulture), flights = int.Parse(Word("--flights", "5000"), CultureInfo.InvariantCulture);
        byte[][] logs = [.. Enumerable.Range(1, 4).Select(seed => LogWriters.Csv(FlightSimulator.Fly(RandomScenarios.Draw((ulong)seed)).Log))];
        var clock = Stopwatch.StartNew();
        Make(path, jobs, flights, logs, progress: done =>
        {
            if (done % 20 == 0)
                Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\r{done}/{jobs} jobs, {clock.Elapsed.TotalSeconds:F0} s "));
        });
        Console.Error.WriteLine();
        double[] seconds = [.. Enumerable.Range(0, 7).Select(_ => List(path).Sec).Order()];
        Console.WriteLine(string.Create(CultureInfo.InvariantCulture,
            $"{jobs} jobs, {flights} flights of {logs.Average(l => l.Length) / 1e3:F0} kB: {new FileInfo(path).Length / 1e6:F0} MB, made in {clock.Elapsed.TotalSeconds:F0} s; list: first {seconds[^1]:F3} s, median {seconds[3]:F3} s"));
        return 0;

        string Word(string option, string otherwise)
        {
            int at = Array.IndexOf(args, option);
            return at >= 0 && at + 1 < args.Length ? args[at + 1] : otherwise;
        }
    }

    private static DateTimeOffset At(int job) => new DateTimeOffset(2016, 5, 17, 7, 40, 0, TimeSpan.Zero).AddDays(7 * job);

    private static KeptFile Text(string role, string name, string text) => new(role, name, Encoding.UTF8.GetBytes(text));

    /// <summary>The log with the last digit of every number drawn anew: it packs as a real one does.</summary>
    private static byte[] Redrawn(byte[] log, SeededRandom random)
    {
        byte[] copy = [.. log];
        for (int i = 1; i < copy.Length; i++)
        {
            if (copy[i] is (byte)',' or (byte)'\n' && copy[i - 1] is >= (byte)'0' and <= (byte)'9')
                copy[i - 1] = (byte)('0' + random.NextInt32(10));
        }
        return copy;
    }
}
