using System.Collections.Immutable;
using System.Text;

namespace TrimFit.Simulation;

/// <summary>The files that <c>trimfit synth</c> writes for a scenario.</summary>
public static class FlightFiles
{
    /// <summary>Log, rig, sheet and truth of a flight.</summary>
    /// <param name="flight">The flight.</param>
    /// <param name="stem">Start of each file's name, such as <c>uncorrected</c>.</param>
    public static ImmutableArray<FlightFile> Of(SimulatedFlight flight, string stem)
    {
        ArgumentNullException.ThrowIfNull(flight);
        ArgumentException.ThrowIfNullOrEmpty(stem);
        return
        [
            new(stem + ".csv", LogWriters.Csv(flight.Log)),
            new(stem + "-rig.toml", Encoding.UTF8.GetBytes(RigText.Write(flight.Scenario))),
            new(stem + "-sheet.toml", Encoding.UTF8.GetBytes(SheetText.Write(flight))),
            new(stem + "-truth.json", Encoding.UTF8.GetBytes(TruthJson.Write(flight))),
        ];
    }
}
