using BenchmarkDotNet.Running;
using TrimFit.Benchmarks;

// Three own verbs; every other command line is BenchmarkDotNet's.
switch (args)
{
    case ["data", string folder, .. string[] rest]:
        MadeUpLogs.Write(folder, rest is [string flights] ? int.Parse(flights, System.Globalization.CultureInfo.InvariantCulture) : 0);
        return 0;
    case ["once", string contender, string path]:
        return Once.Run(contender, path);
    case ["compare", string folder, string program, string results, .. string[] rest]:
        return SideBySide.Run(folder, program, results, rest is [string rounds] ? int.Parse(rounds, System.Globalization.CultureInfo.InvariantCulture) : 7);
    default:
        BenchmarkSwitcher.FromAssembly(typeof(Stages).Assembly).Run(args);
        return 0;
}
