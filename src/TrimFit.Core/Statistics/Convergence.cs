namespace TrimFit.Core.Statistics;

/// <summary>How an iteration ended.</summary>
/// <param name="Converged">Whether it settled within its tolerance.</param>
/// <param name="Iterations">Iterations done.</param>
/// <param name="LastStep">Size of the last step, relative to the value.</param>
public readonly record struct Convergence(bool Converged, int Iterations, double LastStep);
