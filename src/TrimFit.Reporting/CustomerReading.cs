namespace TrimFit.Reporting;

/// <summary>A reading before and after a change.</summary>
/// <param name="Name">What was read, such as <c>left riser carabiner from the centre line</c>.</param>
/// <param name="Before">With its unit; null for a line to write on.</param>
/// <param name="After">With its unit; null for a line to write on.</param>
public sealed record CustomerReading(string Name, string? Before, string? After);
