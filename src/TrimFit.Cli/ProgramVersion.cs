using TrimFit.Reporting;

namespace TrimFit.Cli;

internal static class ProgramVersion
{
    /// <summary>The version without the source revision: two builds of one version write the same results.</summary>
    public static Provenance Provenance { get; } = new(typeof(ProgramVersion).Assembly.GetName().Version?.ToString(3) ?? "0");
}
