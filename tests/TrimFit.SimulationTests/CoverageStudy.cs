using System.Globalization;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Import.Rigs;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>Estimates over many flights against their truth.</summary>
internal sealed record CoverageRow
{
    public required string Name { get; init; }
    public required int Flights { get; init; }
    public required int Missing { get; init; }
    public required int NotConverged { get; init; }
    public required QuantityCoverage Level { get; init; }
    public required QuantityCoverage Slope { get; init; }
    public required QuantityCoverage Brake { get; init; }
    public required double SecondOrderRight { get; init; }
}

/// <summary>How one quantity came out.</summary>
/// <param name="Covered">Share of flights whose 95 % interval held the truth.</param>
/// <param name="BiasInErrors">Mean of (estimate − truth)/standard error.</param>
/// <param name="Rmse">Root mean square error, in the unit of the table.</param>
/// <param name="RmseKnown">The same with true noise parameters; NaN when not run.</param>
/// <param name="MedianHalfWidth">Median half-width of the 95 % interval.</param>
internal sealed record QuantityCoverage(double Covered, double BiasInErrors, double Rmse, double RmseKnown, double MedianHalfWidth);

internal static class CoverageStudy
{

    /// <summary>Flies and fits; half the flights have a first-order wing, half a second-order one.</summary>
    public static CoverageRow Run(string name, Sensors sensors, Hardship hardship, int flights, int seed, bool withKnown, int threads, Func<int, bool>? goOn = null, TextWriter? flightsTo = null)
    {
        var all = new FlightResult?[flights];
        int done = 0;
        Parallel.For(0, flights, new ParallelOptions { MaxDegreeOfParallelism = threads }, (i, loop) =>
        {
            all[i] = One(sensors, hardship, unchecked((seed * 1_000_003) + i), i % 2 == 1, withKnown);
            int now = Interlocked.Increment(ref done);
            if (goOn is not null && !goOn(now))
                loop.Stop();
        });
        FlightResult[] results = [.. all.OfType<FlightResult>()];
        for (int i = 0; i < flights && flightsTo is not null; i++)
        {
            if (all[i] is FlightResult f)
                flightsTo.WriteLine(Details(name, i, f));
        }
        return new CoverageRow
        {
            Name = name,
            Flights = results.Length,
            Missing = results.Count(f => f.Level is null || f.Slope is null),
            NotConverged = results.Count(f => !f.Converged),
            Level = Summarise(results, f => f.Level, double.RadiansToDegrees(1)),
            Slope = Summarise(results, f => f.Slope, double.RadiansToDegrees(1)),
            Brake = Summarise(results, f => f.Brake, double.RadiansToDegrees(1)),
            SecondOrderRight = results.Average(f => f.OrderRight ? 1.0 : 0.0),
        };
    }

    internal sealed record Outcome(double Truth, double Value, double StdError, double HalfWidth, double Known, double KnownStdError);

    internal sealed record FlightResult(Outcome? Level, Outcome? Slope, Outcome? Brake, bool Converged, bool OrderRight)
    {
        public TurnFit? Fit { get; init; }
        public TurnScenario? Scenario { get; init; }
    }

    /// <summary>Heads of <see cref="Details"/>.</summary>
    public const string DetailsHeader = "row\tflight\tlevel_truth\tlevel\tlevel_se\tlevel_half\tlevel_known\tlevel_known_se\tslope_truth\tslope\tslope_se\tslope_half\tslope_known\tslope_known_se\tbrake_truth\tbrake\tbrake_se\tbrake_half\tbrake_known\tbrake_known_se\tconverged\torder_right\tdead_band\tfreedom\teffective\tfeedback\tlag\tdisturbance_rms\tdisturbance_tau\ttrue_rms\ttrue_tau\ttrue_lag\tgyro_noise\tvelocity_noise\tgust_rms\tgust_tau\toutliers";

    /// <summary>One flight of a study on one line, degrees and seconds, to look at the flights that make a number what it is.</summary>
    private static string Details(string name, int flight, FlightResult f)
    {
        string Text(double value) => value.ToString("G6", CultureInfo.InvariantCulture);
        double degrees = double.RadiansToDegrees(1);
        string Of(Outcome? o) => o is null ? "\t\t\t\t\t" : string.Join('\t', Text(o.Truth * degrees), Text(o.Value * degrees), Text(o.StdError * degrees), Text(o.HalfWidth * degrees), Text(o.Known * degrees), Text(o.KnownStdError * degrees));
        TurnScenario? c = f.Scenario;
        string truth = c is null ? "\t\t\t\t\t\t" : string.Join('\t', Text(c.DisturbanceRms * degrees), Text(c.DisturbanceTau), Text(TrueNoise(c).SteadyLagSec), Text(c.GyroNoise * degrees), Text(c.VelocityNoise), Text(c.GustRms * degrees), Text(c.GustTau));
        return string.Join('\t', name, flight.ToString(CultureInfo.InvariantCulture), Of(f.Level), Of(f.Slope), Of(f.Brake), f.Converged ? "1" : "0", f.OrderRight ? "1" : "0",
            Text(f.Fit?.BrakeDeadBand ?? 0), Text(f.Fit?.DegreesOfFreedom ?? double.NaN), Text(f.Fit?.EffectiveSamples ?? double.NaN), Text(f.Fit?.BrakeFeedbackShare ?? double.NaN), Text(f.Fit?.LagSec ?? double.NaN),
            Text((f.Fit?.DisturbanceRmsRadPerSec ?? double.NaN) * degrees), Text(f.Fit?.DisturbanceTauSec ?? double.NaN), truth,
            f.Fit?.Notices.FirstOrDefault(n => n.Code == Core.Analysis.FindingCode.TurnOutliers) is { } found ? Text(found.Values[0]) : "0");
    }

    internal static FlightResult One(Sensors sensors, Hardship hardship, int seed, bool secondOrder, bool withKnown)
    {
        if (hardship == Hardship.WholeMachine)
            return WholeMachine(seed, secondOrder);
        var random = new Gauss(seed);
        TurnScenario scenario = TurnScenario.Random(random, secondOrder, sensors, hardship);
        TurnSignals signals = MadeUpFlight.Fly(scenario, random);
        var estimator = new FilterErrorEstimator();
        TurnFit fit = estimator.Estimate(signals);
        TurnFit? known = withKnown ? estimator.EstimateWith(signals, TrueNoise(scenario)) : null;
        double t = StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom);
        return new FlightResult(
            Of(scenario.PullAt(scenario.LevelShare), fit.PullAt(scenario.LevelThrust), known?.PullAt(scenario.LevelThrust), 1),
            Of(scenario.SlopePerFull, fit[TurnCoefficient.Thrust], known?[TurnCoefficient.Thrust], scenario.FullThrust),
            Of(scenario.Brake, fit[TurnCoefficient.BrakeDifference], known?[TurnCoefficient.BrakeDifference], 1),
            fit.Convergence?.Converged ?? false,
            fit.ResponseIsSecondOrder == secondOrder)
        { Fit = fit, Scenario = scenario };

        Outcome? Of(double truth, Estimate? estimate, Estimate? yardstick, double scale) => estimate is Estimate e
            ? new(truth, e.Value * scale, e.StandardError * scale, t * e.StandardError * scale, yardstick is Estimate y ? y.Value * scale : double.NaN, yardstick is Estimate { StandardError: double se } ? se * scale : double.NaN)
            : null;
    }

    private static FlightResult WholeMachine(int seed, bool secondOrder)
    {
        Scenario scenario = RandomScenarios.Draw((ulong)(uint)seed, secondOrder ? TurnResponse.SecondOrder : TurnResponse.FirstOrder);
        SimulatedFlight flight = FlightSimulator.Fly(scenario);
        Rig rig = RigFileReader.Read("rig.toml", RigText.Write(scenario));
        TurnFit fit = new FilterErrorEstimator().Estimate(TurnSignals.From(flight.Log, rig));
        double t = StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom);
        PullTruth level = flight.Truth.Pull.Single(p => p.Setting == "cruise");
        return new FlightResult(
            Of(level.RateRadPerSec, fit.PullAt(level.ThrustN), 1),
            Of(flight.Truth.ThrustRadPerSecPerN, fit[TurnCoefficient.Thrust], flight.Truth.FullThrustN),
            Of(flight.Truth.BrakeRadPerSecPerM, fit[TurnCoefficient.BrakeDifference], 0.1), // per 100 mm
            fit.Convergence?.Converged ?? false,
            fit.ResponseIsSecondOrder == secondOrder)
        { Fit = fit };

        Outcome? Of(double truth, Estimate? estimate, double scale) => estimate is Estimate e
            ? new(truth * scale, e.Value * scale, e.StandardError * scale, t * e.StandardError * scale, double.NaN, double.NaN)
            : null;
    }

    internal static NoiseParameters TrueNoise(TurnScenario c) => new()
    {
        Order = c.SecondOrder ? ResponseOrder.Second : ResponseOrder.First,
        LagSec = c.LagSec,
        NaturalFrequency = c.NaturalFrequency,
        Damping = c.Damping,
        DisturbanceRms = c.DisturbanceRms,
        DisturbanceTauSec = c.DisturbanceTau,
        GyroNoise = c.GyroNoise,
        HeadingNoise = c.VelocityNoise / c.Airspeed,
        GustRms = c.GustRms,
        GustTauSec = c.GustTau,
    };

    private static QuantityCoverage Summarise(FlightResult[] results, Func<FlightResult, Outcome?> pick, double unit)
    {
        Outcome[] all = [.. results.Select(pick).OfType<Outcome>()];
        if (all.Length == 0)
            return new(double.NaN, double.NaN, double.NaN, double.NaN, double.NaN);
        double[] widths = [.. all.Select(o => o.HalfWidth).Order()];
        return new(
            all.Average(o => Math.Abs(o.Value - o.Truth) <= o.HalfWidth ? 1.0 : 0.0),
            all.Average(o => (o.Value - o.Truth) / o.StdError),
            Math.Sqrt(all.Average(o => (o.Value - o.Truth) * (o.Value - o.Truth))) * unit,
            Math.Sqrt(all.Average(o => (o.Known - o.Truth) * (o.Known - o.Truth))) * unit,
            widths[widths.Length / 2] * unit);
    }

    public const string Header =
        "| flights | n | level: cover | bias/se | RMSE °/s | vs known | ± °/s | slope: cover | bias/se | RMSE °/s | vs known | ± °/s | brake: cover | bias/se | RMSE °/s | vs known | order right | not settled |\n" +
        "|---|--:|--:|--:|--:|--:|--:|--:|--:|--:|--:|--:|--:|--:|--:|--:|--:|--:|";

    public static string Line(CoverageRow row) => string.Create(CultureInfo.InvariantCulture,
        $"| {row.Name} | {row.Flights - row.Missing} | {Cells(row.Level, true)} | {Cells(row.Slope, true)} | {Cells(row.Brake, false)} | {100 * row.SecondOrderRight:F0} % | {row.NotConverged} |");

    private static string Cells(QuantityCoverage q, bool width)
    {
        if (double.IsNaN(q.Covered))
            return width ? "– | – | – | – | –" : "– | – | – | –";
        string known = double.IsNaN(q.RmseKnown) ? "–" : (q.Rmse / q.RmseKnown).ToString("F3", CultureInfo.InvariantCulture);
        string cells = string.Create(CultureInfo.InvariantCulture, $"{100 * q.Covered:F1} % | {q.BiasInErrors:F3} | {q.Rmse:F3} | {known}");
        return width ? string.Create(CultureInfo.InvariantCulture, $"{cells} | {q.MedianHalfWidth:F2}") : cells;
    }
}
