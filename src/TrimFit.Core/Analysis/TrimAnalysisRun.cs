using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Core.Analysis;

public sealed partial record TrimAnalysis
{
    /// <summary>Analyses one flight with one rig.</summary>
    /// <remarks>Never throws on thin data: what the flight cannot give is null and the verdict says what is missing.</remarks>
    public static TrimAnalysis Run(FlightLog flight, Rig rig, TrimOptions options)
    {
        ArgumentNullException.ThrowIfNull(flight);
        ArgumentNullException.ThrowIfNull(rig);
        ArgumentNullException.ThrowIfNull(options);
        throw new NotSupportedException();
    }
}
