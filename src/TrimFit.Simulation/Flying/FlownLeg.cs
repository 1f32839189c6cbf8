namespace TrimFit.Simulation;

/// <summary>A leg as it was flown.</summary>
/// <param name="Leg">The leg asked for.</param>
/// <param name="StartSec">Start, s.</param>
/// <param name="EndSec">End, s.</param>
/// <param name="ThrottleFraction">Throttle set, 0 to 1.</param>
public sealed record FlownLeg(FlightLeg Leg, double StartSec, double EndSec, double ThrottleFraction);
