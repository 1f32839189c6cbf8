using System.Diagnostics;
using System.Globalization;
using Xunit.Runner.InProc.SystemConsole;

namespace TrimFit.SimulationTests;

/// <summary>`coverage` runs the study and prints its table (options: --flights, --hard, --seed, --threads, --only part of a row's name,
/// --minutes for each row, --flights-to a file with a line for each flight); `alarms` flies what may raise a false alarm (--flights, --only,
/// --machine, --seed, --threads, --minutes); `timing` times fits (--hours at most); `shift` runs the study from pull to millimetres (--flights, --wrong, --seed, --threads, --minutes); `compare`
/// the one of before and after (--pairs, --repeats, --swaps, --seed, --threads, --minutes, --fits); `card` that of test cards, `sheet` that of their
/// sheets (--flights, --minutes of a card, --seed, --threads); `ground N` runs the hang checks; `memory` that of the
/// shop's memory (--shops, --flights, --seed, --minutes); `book` makes a job book of ten years (--out, --jobs, --flights); anything else goes to the test runner.</summary>
internal static class Program
{
    public static int Main(string[] args)
    {
        if (args.Length > 0 && args[0] == "coverage")
            return Coverage(args);
        if (args.Length > 0 && args[0] == "alarms")
            return Alarms(args);
        if (args.Length > 0 && args[0] == "timing")
            return FitTiming.Run(Number(args, "--hours", 10));
        if (args.Length > 0 && args[0] == "shift")
            return ShiftStudy.Run(args);
        if (args.Length > 0 && args[0] == "compare")
            return CompareStudy.Run(args);
        if (args.Length > 0 && args[0] == "memory")
            return MemoryStudy.Run(args);
        if (args.Length > 0 && args[0] == "book")
            return BookStudy.Run(args);
        if (args.Length > 0 && args[0] == "ground")
            return GroundStudy.Run(args.Length > 1 && int.TryParse(args[1], NumberStyles.None, CultureInfo.InvariantCulture, out int cases) && cases > 0 ? cases : 2000);
        if (args.Length > 0 && args[0] == "sheet")
            return SheetStudy.Run((option, otherwise) => Number(args, option, otherwise));
        if (args.Length > 0 && args[0] == "card")
            return CardStudy.Run((option, otherwise) => Number(args, option, otherwise));
        return args.Any(a => a is "--server" or "--internal-msbuild-node")
            ? Xunit.MicrosoftTestingPlatform.TestPlatformTestFramework.RunAsync(args, SelfRegisteredExtensions.AddSelfRegisteredExtensions).GetAwaiter().GetResult()
            : ConsoleRunner.Run(args).GetAwaiter().GetResult();
    }

    private static int Alarms(string[] args)
    {
        int flights = (int)Number(args, "--flights", 200), threads = (int)Number(args, "--threads", 1), seed = (int)Number(args, "--seed", 1);
        double minutes = Number(args, "--minutes", 24 * 60);
        if (flights >= 1 && threads >= 1 && seed >= 0 && minutes > 0)
            return AlarmStudy.Run(flights, (ulong)seed, threads, Text(args, "--only"), Text(args, "--machine"), minutes);
        Console.Error.WriteLine("alarms [--flights N] [--minutes M] [--threads N] [--seed N] [--only part of a condition's name] [--machine drawn|balanced]: numbers above 0");
        return 2;
    }

    private static int Coverage(string[] args)
    {
        int flights = (int)Number(args, "--flights", 2000), threads = (int)Number(args, "--threads", 1), seed = (int)Number(args, "--seed", 1);
        int hard = (int)Number(args, "--hard", Math.Max(1, flights / 4));
        double minutes = Number(args, "--minutes", 24 * 60);
        if (flights < 1 || threads < 1 || hard < 1 || !(minutes > 0))
        {
            Console.Error.WriteLine("coverage [--flights N] [--hard N] [--minutes M] [--threads N] [--seed N] [--only part of a row's name]: numbers above 0");
            return 2;
        }
        string only = Text(args, "--only");
        var rows = new List<(string Name, Sensors Sensors, Hardship Hardship, int Flights)>
        {
            ("gyro + GPS", Sensors.GyroAndGps, Hardship.None, flights),
            ("GPS only, 5 Hz", Sensors.Gps5Hz, Hardship.None, flights),
            ("GPS only, 1 Hz", Sensors.Gps1Hz, Hardship.None, flights),
            ("GPS and sheet, no brakes logged", Sensors.Gps5HzAndSheet, Hardship.None, flights),
            ("telephone: noisy gyro, GPS 1 Hz", Sensors.PhoneGyro, Hardship.None, flights),
            ("*disturbance on two time scales*", Sensors.GyroAndGps, Hardship.TwoTimeScales, hard),
            ("*thermals*", Sensors.GyroAndGps, Hardship.Thermals, hard),
            ("*8 % brake dead band*", Sensors.GyroAndGps, Hardship.BrakeDeadBand, hard),
            ("*gyro offset 0.8 deg/s with rpm squared*", Sensors.GyroAndGps, Hardship.RotationOffset, hard),
            ("*frame twist on throttle steps*", Sensors.GyroAndGps, Hardship.FrameTwist, hard),
            ("*the whole machine, from its log*", Sensors.GyroAndGps, Hardship.WholeMachine, hard),
            ("*legs held by the pilot*", Sensors.GyroAndGps, Hardship.HeldLegs, hard),
        };
        using StreamWriter? flightsTo = Text(args, "--flights-to") is { Length: > 0 } path ? new StreamWriter(path) : null;
        flightsTo?.WriteLine(CoverageStudy.DetailsHeader);
        Console.WriteLine(CoverageStudy.Header);
        foreach ((string name, Sensors sensors, Hardship hardship, int count) in rows)
        {
            if (!name.Contains(only, StringComparison.OrdinalIgnoreCase))
                continue;
            var clock = Stopwatch.StartNew();
            bool known = hardship == Hardship.None && sensors != Sensors.PhoneGyro;
            CoverageRow row = CoverageStudy.Run(name, sensors, hardship, count, seed, known, threads, done =>
            {
                if (done % 50 == 0 || done == count)
                    Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\r{name}: {done}/{count}, {clock.Elapsed.TotalSeconds:F0} s "));
                return clock.Elapsed.TotalMinutes < minutes;
            }, flightsTo);
            Console.Error.WriteLine();
            Console.WriteLine(CoverageStudy.Line(row));
        }
        return 0;
    }

    private static double Number(string[] args, string option, double otherwise)
    {
        string text = Text(args, option);
        return text.Length == 0 ? otherwise
            : double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out double number) ? number : double.NaN;
    }

    private static string Text(string[] args, string option)
    {
        int at = Array.IndexOf(args, option);
        return at >= 0 && at + 1 < args.Length ? args[at + 1] : "";
    }
}
