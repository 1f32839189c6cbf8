using BenchmarkDotNet.Attributes;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Import;
using TrimFit.Import.Csv;
using TrimFit.Import.Rigs;
using TrimFit.Import.Tracks;
using TrimFit.Pages;
using TrimFit.Reporting;
using TrimFit.Simulation;

namespace TrimFit.Benchmarks;

/// <summary>What a fit is made of, on a made-up flight of 12 minutes at 10 Hz.</summary>
[MemoryDiagnoser]
[ShortRunJob]
public class Stages
{
    private readonly SimulatedFlight _flight = MadeUpLogs.Fly(4);
    private LogSource _csv = null!, _igc = null!;
    private Rig _rig = null!;
    private TurnSignals _signals = null!;
    private AugmentedFilter _filter = null!;
    private NoiseParameters _noise = null!;
    private FitReport _report = null!;

    [GlobalSetup]
    public void Prepare()
    {
        _csv = LogSource.FromBytes("flight.csv", LogWriters.Csv(_flight.Log));
        _igc = LogSource.FromBytes("flight.igc", LogWriters.Igc(_flight.Log));
        _rig = RigFileReader.Read("machine.toml", RigText.Write(_flight.Scenario));
        FlightImport import = FlightReader.Read([_csv]);
        _signals = TurnSignals.From(import.Flight, _rig);
        _filter = new AugmentedFilter(FlightPreparation.Prepare(_signals, new FilterErrorOptions(), withThrust: true, out _)!);
        _noise = new NoiseParameters { Order = ResponseOrder.Second, NaturalFrequency = 1.2, Damping = 0.7, DisturbanceRms = 0.02, DisturbanceTauSec = 8, QuickDisturbance = 0.01, GyroNoise = 0.01 };
        _report = new FitReport
        {
            Analysis = TrimAnalysis.Run(import.Flight, _rig, new TrimOptions()),
            Import = import,
            RigFile = new SourceFile("machine.toml", new string('0', 64)),
            Provenance = new Provenance("benchmark"),
        };
    }

    [Benchmark]
    public object CsvToColumns() => new CsvLogFormat().Read(_csv, new ImportOptions());

    [Benchmark]
    public object IgcToColumns() => new IgcLogFormat().Read(_igc, new ImportOptions());

    [Benchmark]
    public object SignalsAndWind() => TurnSignals.From(_report.Import.Flight, _rig);

    [Benchmark(Baseline = true)]
    public double OneLikelihood() => _filter.Run(_noise);

    [Benchmark]
    public object TurnModel() => new FilterErrorEstimator().Estimate(_signals);

    [Benchmark]
    public object WholeFit() => TrimAnalysis.Run(_report.Import.Flight, _rig, new TrimOptions());

    [Benchmark]
    public object Page() => ReportPage.Fit(_report, new ReportStyle());
}
