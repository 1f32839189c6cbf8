using System.Collections.Immutable;

namespace TrimFit.Simulation;

/// <summary>Flies a scenario.</summary>
/// <remarks>
/// Fixed steps of 20 ms. The wing turns towards S (M + ρ N)/W + constant pull + brakes + disturbance, with M and N the roll and yaw moments
/// the frame hands on through its own swing on the risers. Left out: the wing's pitch motion, line stretch, launch and landing dynamics.
/// </remarks>
public static class FlightSimulator
{
    /// <summary>Flies the scenario.</summary>
    /// <exception cref="SimulationException">There are no legs, they are too long, or the machine does not fly.</exception>
    public static SimulatedFlight Fly(Scenario s)
    {
        ArgumentNullException.ThrowIfNull(s);
        if (s.Legs.IsDefaultOrEmpty)
            throw new SimulationException("The scenario has no legs: add at least one [[leg]] with duration_s and power.");
        double longest = s.Legs.Sum(leg => leg.DurationSec);
        if (longest > LongestSec)
            throw new SimulationException(FormattableString.Invariant($"The legs last up to {longest:F0} s; a flight may last {LongestSec:F0} s."));
        FlightTruth truth = FlightTruth.Of(s);
        var motion = new FlightMotion(s);
        var recorder = new FlightRecorder(s, longest);
        ImmutableArray<FlownLeg>.Builder flown = ImmutableArray.CreateBuilder<FlownLeg>(s.Legs.Length);
        foreach (FlightLeg leg in s.Legs)
        {
            double start = motion.TimeSec;
            motion.Begin(leg);
            do
            {
                recorder.Record(motion);
                motion.Step();
            }
            while (!motion.LegDone);
            flown.Add(new(leg, start, motion.TimeSec, motion.ThrottleSet));
        }
        recorder.Record(motion);
        return new(s, recorder.ToLog(), truth, flown.DrainToImmutable());
    }

    private const double LongestSec = 12 * 3600; // memory: twelve hours at 50 Hz are two million rows
}
