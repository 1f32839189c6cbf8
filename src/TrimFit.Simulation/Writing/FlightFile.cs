namespace TrimFit.Simulation;

/// <summary>One file of a made-up flight.</summary>
/// <param name="Name">File name; a folder is joined with a slash.</param>
/// <param name="Content">Bytes.</param>
public sealed record FlightFile(string Name, ReadOnlyMemory<byte> Content);
