namespace TrimFit.Core.Analysis;

/// <summary>Turn rate per CG offset as a job of the workshop measured it with a known shift.</summary>
public sealed record MeasuredSensitivity
{
    /// <summary>Number of the job.</summary>
    public required long Job { get; init; }

    /// <summary>What tells the wing from others; empty when not given, which makes it a wing of its own.</summary>
    public string WingId { get; init; } = "";

    /// <summary>Word of the source: <c>ballast</c> or <c>pair</c>.</summary>
    public required string Source { get; init; }

    /// <summary>Natural logarithm of its median in (rad/s)/m; finite.</summary>
    public required double LogMedian { get; init => field = Guard.Finite(value); }

    /// <summary>Standard deviation of the logarithm, the source's own model error included; above 0.</summary>
    public required double LogSd { get; init => field = Guard.Positive(value); }

    /// <summary>Wing area, m²; null when not known.</summary>
    public double? WingAreaM2 { get; init => field = value is double area ? Guard.Positive(area) : null; }

    /// <summary>Everything suspended under the wing, kg; above 0.</summary>
    public required double SuspendedKg { get; init => field = Guard.Positive(value); }

    /// <summary>What an analysis tells the memory: its sources that flew a known shift, where they are certain of their sign.</summary>
    /// <param name="analysis">A flight, or the later flight of a pair.</param>
    /// <param name="job">Number of the job.</param>
    /// <param name="wingId">What tells the wing from others; empty when not given.</param>
    public static IEnumerable<MeasuredSensitivity> From(TrimAnalysis analysis, long job, string wingId)
    {
        ArgumentNullException.ThrowIfNull(analysis);
        return From(analysis.Sensitivity, analysis.Rig, job, wingId);
    }

    /// <inheritdoc cref="From(TrimAnalysis, long, string)"/>
    /// <param name="sensitivity">The sensitivity that was found.</param>
    /// <param name="rig">The machine.</param>
    /// <param name="job">Number of the job.</param>
    /// <param name="wingId">What tells the wing from others; empty when not given.</param>
    public static IEnumerable<MeasuredSensitivity> From(SensitivityReport sensitivity, Rigging.Rig rig, long job, string wingId)
    {
        ArgumentNullException.ThrowIfNull(sensitivity);
        ArgumentNullException.ThrowIfNull(rig);
        // A logarithm needs a positive interval. What is uncertain of its sign would weigh next to nothing.
        return sensitivity.Sources.Where(s => s.Kind is "ballast" or "pair" && s.Interval95.Lower > 0).Select(s => new MeasuredSensitivity
        {
            Job = job,
            WingId = wingId,
            Source = s.Kind,
            LogMedian = Math.Log(s.RadPerSecPerM),
            LogSd = Math.Log(s.Interval95.Upper / s.Interval95.Lower) / (2 * 1.96),
            WingAreaM2 = rig.Wing.AreaM2,
            SuspendedKg = Rigging.RigSpread.SuspendedKg(rig),
        });
    }
}
