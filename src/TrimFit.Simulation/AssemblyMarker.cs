namespace TrimFit.Simulation;

internal static class AssemblyMarker;
