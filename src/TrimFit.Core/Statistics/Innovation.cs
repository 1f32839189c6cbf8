namespace TrimFit.Core.Statistics;

/// <summary>What a measurement brought that was not foreseen.</summary>
/// <param name="Value">Measurement less its prediction.</param>
/// <param name="Variance">Variance of that difference; 0 for a measurement that served to start a diffuse state.</param>
/// <param name="Diffuse">Whether the measurement went into a state of which nothing was known.</param>
public readonly record struct Innovation(double Value, double Variance, bool Diffuse);
