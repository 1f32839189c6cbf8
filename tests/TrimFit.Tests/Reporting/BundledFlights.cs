using System.Collections.Concurrent;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Import.Sheets;
using TrimFit.Reporting;

namespace TrimFit.Tests.Reporting;

/// <summary>Results of two flights of sample-logs, one that answers and one that cannot, each computed once for all tests that show it.</summary>
internal static class BundledFlights
{
    private static readonly ConcurrentDictionary<string, Lazy<FitReport>> _fits = new();

    public static TheoryData<string> Names => ["ordinary", "flat-throttle"];

    /// <summary>Names that reports take over from the files.</summary>
    public static IEnumerable<string> NamesInFiles => Names.SelectMany(row => Fit(row.Data).Import.Diagnostics.Files.Select(f => f.Name)
        .Append(Fit(row.Data).Analysis.Rig.Name).Append(Fit(row.Data).RigFile.Name).Append(Fit(row.Data).SheetFile!.Name)).Distinct();

    public static FitReport Fit(string flight) => _fits.GetOrAdd(flight, name => new(() => Compute(name))).Value;

    public static RigSheetReport RigSheet(string flight)
    {
        Rig rig = RigOf(flight);
        return new() { Rig = rig, Statics = RigReporter.Of(rig, 1), RigFile = new($"{flight}-rig.toml", new string('b', 64)), Provenance = new("1.2.3") };
    }

    public static InspectReport Inspection(string flight)
    {
        FitReport fit = Fit(flight);
        return new() { Import = fit.Import, Wind = fit.Analysis.Signals.Wind, Gyro = fit.Analysis.Gyro, Findings = [.. fit.Analysis.Warnings], Provenance = fit.Provenance };
    }

    private static Rig RigOf(string flight) => RigFileReader.ReadFile(Sample($"{flight}-rig.toml"));

    private static FitReport Compute(string flight)
    {
        Rig rig = RigOf(flight);
        FlightImport import = FlightReader.Read([LogSource.FromFile(Sample($"{flight}.csv"))]);
        SheetedFlight sheeted = SheetLegs.Apply(import.Flight, FlightSheetReader.ReadFile(Sample($"{flight}-sheet.toml")));
        import = import with
        {
            Flight = sheeted.Flight,
            Legs = sheeted.Legs,
            Diagnostics = import.Diagnostics with { Warnings = [.. import.Diagnostics.Warnings, .. sheeted.Warnings] },
        };
        return new()
        {
            Analysis = TrimAnalysis.Run(import.Flight, rig, new TrimOptions(), import.Legs.AsSpan()),
            Import = import,
            RigFile = new($"{flight}-rig.toml", new string('b', 64)),
            SheetFile = new($"{flight}-sheet.toml", new string('c', 64)),
            Provenance = new("1.2.3"),
        };
    }

    private static string Sample(string name) => Path.Combine(RepositoryRoot.Path, "sample-logs", name);
}
