namespace TrimFit.Core.Analysis;

/// <summary>A wing of the workshop that behaves otherwise than the rest, so that it tells nothing about the next one.</summary>
/// <param name="Job">Number of the job that measured it first.</param>
/// <param name="WingId">What tells it from others; empty when not given.</param>
/// <param name="RadPerSecPerM">What was measured, brought to the new wing's area and load, (rad/s)/m.</param>
/// <param name="P">How often a wing like the others would lie at least as far off, for the wings looked at.</param>
public sealed record SetAsideWing(long Job, string WingId, double RadPerSecPerM, double P);
