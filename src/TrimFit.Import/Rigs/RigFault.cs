namespace TrimFit.Import.Rigs;

/// <summary>A fault of a rig file.</summary>
/// <param name="Field">Name of the field it belongs to; null when it belongs to none.</param>
/// <param name="Message">Found, expected, what to do.</param>
public sealed record RigFault(string? Field, string Message);
