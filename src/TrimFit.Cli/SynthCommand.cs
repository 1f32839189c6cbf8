using TrimFit.Simulation;

namespace TrimFit.Cli;

internal static class SynthCommand
{
    public static int Run(string path, string folder, CommonChoices choices, TextWriter error)
    {
        string beside = Path.GetDirectoryName(path) ?? "";
        Scenario scenario = Scenario.Read(Path.GetFileName(path), InputFiles.Text(path), name => InputFiles.TextOrNull(Path.Combine(beside, name)));
        if (choices.Seed is ulong seed)
            scenario = scenario with { Seed = seed };
        SimulatedFlight flight = FlightSimulator.Fly(scenario);
        OutputFiles.MakeFolder("--out", folder);
        foreach (FlightFile file in FlightFiles.Of(flight, Path.GetFileNameWithoutExtension(path)))
        {
            OutputFiles.Write("--out", Path.Combine(folder, file.Name), stream => stream.Write(file.Content.Span));
            if (!choices.Quiet)
                error.WriteLine($"trimfit: wrote {file.Name}");
        }
        return ExitCode.Done;
    }
}
