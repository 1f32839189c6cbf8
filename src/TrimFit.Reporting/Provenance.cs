namespace TrimFit.Reporting;

/// <summary>Which program made a result; passed in, so that the same input gives the same bytes.</summary>
/// <param name="ProgramVersion">Version of the program, such as <c>0.1.0</c>.</param>
public sealed record Provenance(string ProgramVersion);

/// <summary>A file a result rests on.</summary>
/// <param name="Name">File name without its folder.</param>
/// <param name="Sha256">SHA-256 of its bytes, lower-case hex.</param>
public sealed record SourceFile(string Name, string Sha256);
