using System.Collections.Immutable;
using TrimFit.Core.Logs;

namespace TrimFit.Simulation;

/// <summary>A made-up flight: what one logger of all sensors recorded, what is true, and what was flown.</summary>
public sealed class SimulatedFlight
{
    internal SimulatedFlight(Scenario scenario, FlightLog log, FlightTruth truth, ImmutableArray<FlownLeg> legs)
    {
        Scenario = scenario;
        Log = log;
        Truth = truth;
        Legs = legs;
    }

    /// <summary>The scenario flown.</summary>
    public Scenario Scenario { get; }

    /// <summary>What one ideal logger of all sensors recorded, SI, each channel NaN between its own samples.</summary>
    public FlightLog Log { get; }

    /// <summary>What is true.</summary>
    public FlightTruth Truth { get; }

    /// <summary>The legs with the times they were flown at.</summary>
    public ImmutableArray<FlownLeg> Legs { get; }
}
