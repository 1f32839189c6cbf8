namespace TrimFit.Reporting;

internal static class AssemblyMarker;
