namespace TrimFit.Import;

internal static class AssemblyMarker;
