using System.Diagnostics;
using System.Globalization;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.SimulationTests;

/// <summary>How long a fit takes as flights grow longer and logs finer.</summary>
internal static class FitTiming
{
    private const int Repeats = 3;

    /// <summary>Prints processor time of one fit, the least of three: wall-clock time says more about what else the machine does.</summary>
    public static int Run(double mostHours)
    {
        Fit(Flight(600, 7)); // compiled before it is timed
        Console.WriteLine("| flight | samples | fit, s | growth exponent |\n|---|--:|--:|--:|");
        double before = double.NaN, lengthBefore = double.NaN, first = double.NaN;
        foreach ((string name, double seconds) in ((string, double)[])[("10 min, 10 Hz", 600), ("1 h, 10 Hz", 3600), ("10 h, 10 Hz", 36000)])
        {
            if (seconds > 3600 * mostHours)
                continue;
            TurnSignals flight = Flight(seconds, 7);
            double took = Best(flight, seconds > 3600 ? 1 : Repeats);
            if (double.IsNaN(first))
                first = took;
            string exponent = double.IsNaN(before) ? "–" : (Math.Log(took / before) / Math.Log(seconds / lengthBefore)).ToString("F2", CultureInfo.InvariantCulture);
            Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"| {name} | {flight.Count} | {took:F3} | {exponent} |"));
            (before, lengthBefore) = (took, seconds);
        }
        TurnSignals fine = FiveTimesFiner(Flight(600, 7), 8);
        double fineTook = Best(fine, Repeats);
        Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"| 10 min, 50 Hz | {fine.Count} | {fineTook:F3} | {fineTook / first:F2} times that of 10 Hz |"));
        return 0;
    }

    private static TurnSignals Flight(double seconds, int seed)
    {
        var random = new Gauss(seed);
        return MadeUpFlight.Fly(TurnScenario.Random(random, false, Sensors.GyroAndGps, Hardship.None) with { DurationSec = seconds }, random);
    }

    private static void Fit(TurnSignals flight) => new FilterErrorEstimator().Estimate(flight);

    private static double Best(TurnSignals flight, int repeats)
    {
        using var process = Process.GetCurrentProcess();
        double best = double.PositiveInfinity;
        for (int i = 0; i < repeats; i++)
        {
            process.Refresh();
            TimeSpan start = process.TotalProcessorTime;
            Fit(flight);
            process.Refresh();
            best = Math.Min(best, (process.TotalProcessorTime - start).TotalSeconds);
        }
        return best;
    }

    /// <summary>The same flight logged five times as often: inputs held, the gyro with the noise that gives the same mean, fixes as they were.</summary>
    private static TurnSignals FiveTimesFiner(TurnSignals s, int seed)
    {
        const int Times = 5;
        var random = new Gauss(seed);
        double[] Held(double[] column) => [.. column.SelectMany(v => Enumerable.Repeat(v, Times))];
        double[] Once(double[] column) => [.. column.SelectMany(v => Enumerable.Range(0, Times).Select(j => j == 0 ? v : double.NaN))];
        bool[] HeldFlags(bool[] column) => [.. column.SelectMany(v => Enumerable.Repeat(v, Times))];
        return new TurnSignals
        {
            TimeSec = [.. s.TimeSec.SelectMany(t => Enumerable.Range(0, Times).Select(j => t + (0.02 * j)))],
            Thrust = Held(s.Thrust),
            ThrustBasis = s.ThrustBasis,
            FullThrust = s.FullThrust,
            HasThrust = true,
            BrakeDifference = Held(s.BrakeDifference),
            HasBrakes = true,
            GyroRadPerSec = [.. s.GyroRadPerSec.SelectMany(v => Enumerable.Range(0, Times).Select(_ => v + (0.02 * random.Normal())))],
            RotationRatioSquared = Held(s.RotationRatioSquared),
            VelocityNorth = Once(s.VelocityNorth),
            VelocityEast = Once(s.VelocityEast),
            Wind = s.Wind,
            Use = HeldFlags(s.Use),
            HandsOff = HeldFlags(s.HandsOff),
        };
    }
}
