namespace TrimFit.Core.Statistics;

/// <summary>Outcome of two one-sided tests.</summary>
/// <param name="LowerT">t against the lower margin; large when the difference lies well above it.</param>
/// <param name="UpperT">t against the upper margin; very negative when the difference lies well below it.</param>
/// <param name="PValue">The larger of the two one-sided p-values.</param>
/// <param name="Interval">The interval of level 1 − 2·significance; inside the margins exactly when equivalence is shown.</param>
/// <param name="Equivalent">Whether the difference was shown to lie between the margins.</param>
public readonly record struct EquivalenceResult(double LowerT, double UpperT, double PValue, ConfidenceInterval Interval, bool Equivalent);
