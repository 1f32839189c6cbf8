using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Import.Rigs;
using TrimFit.Core.Turns;
using TrimFit.Core.Analysis;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

internal static class CardDebug
{
    public static void Run(ulong seed, double minutes, CardLogger? logger)
    {
        Scenario machine = RandomScenarios.Draw(seed, seed % 2 == 0 ? TurnResponse.FirstOrder : TurnResponse.SecondOrder);
        Rig rig = RigFileReader.Read("machine.toml", RigText.Write(machine));
        SimulatedFlight flight = FlightSimulator.Fly(machine with { Legs = TestCards.Alternating(headings: 2) });
        TurnSignals signals = TurnSignals.From(flight.Log, rig);
        TrimAnalysis first = TrimAnalysis.Run(signals, new FilterErrorEstimator().Estimate(signals), rig, new TrimOptions { Draws = 1000 });
        var options = new CardOptions { Minutes = minutes, Logger = logger };
        PriorFlight prior = PriorFlight.Of(first);
        Console.WriteLine(prior);
        CardMachine m = CardMachine.Of(rig, new RigSpread(rig), options, prior);
        var design = new CardDesign(m, options);
        var clock = System.Diagnostics.Stopwatch.StartNew();
        CardLayout best = design.Best(minutes);
        Console.WriteLine($"{clock.ElapsedMilliseconds} ms, {design.Evaluations} evaluations");
        CardLayout even = design.Even(minutes);
        foreach (CardLayout l in new[] { best, even })
        {
            CardInformation i = design.Information(l)!;
            Console.WriteLine($"runs {l.Runs} test {l.TestSec} s, {l.Seconds} s: {string.Join(", ", l.Stations.Select(s => $"{s.Kind}/{s.Power}/{s.Side}"))}");
            Console.WriteLine($"   se level {Deg(i.PullVariance(m.Balance)):F3} idle {Deg(i.PullVariance(m.Idle)):F3} full {Deg(i.PullVariance(1)):F3} brake {Deg(i.BrakeVariance):F2} criterion {design.Criterion(l):E3}");
        }
        static double Deg(double v) => double.RadiansToDegrees(Math.Sqrt(v));
    }
}
