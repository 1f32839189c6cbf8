namespace TrimFit.Core.Statistics;

/// <summary>A value and its standard error, both in the same unit.</summary>
/// <param name="Value">The estimate.</param>
/// <param name="StandardError">Its standard error; not negative.</param>
public readonly record struct Estimate(double Value, double StandardError);
