namespace TrimFit.Core.Workshop;

/// <summary>One reading as it was measured.</summary>
/// <param name="Key">What was read, as the rig file names it, such as <c>carabiners.left_mm</c>.</param>
/// <param name="Value">The number read, in the unit that the key names.</param>
public sealed record ReadingRecord(string Key, double Value);
