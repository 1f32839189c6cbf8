namespace TrimFit.Simulation;

/// <summary>The travel of one part that stops the turn in level flight.</summary>
/// <param name="Kind">Word for the adjustment, such as <c>carabiner_pair</c>.</param>
/// <param name="TravelM">Travel, m, right positive; null when no travel within 0.25 m does it.</param>
public sealed record TravelTruth(string Kind, double? TravelM);
