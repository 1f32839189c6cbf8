namespace TrimFit.Simulation;

/// <summary>The pull at one power setting.</summary>
/// <param name="Setting">off, idle, cruise or full.</param>
/// <param name="ThrustN">Thrust, N.</param>
/// <param name="RateRadPerSec">Steady turn rate, rad/s, right positive.</param>
public sealed record PullTruth(string Setting, double ThrustN, double RateRadPerSec);
