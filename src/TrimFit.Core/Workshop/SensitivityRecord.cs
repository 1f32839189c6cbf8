namespace TrimFit.Core.Workshop;

/// <summary>Turn rate per CG offset as one job measured it with a known shift.</summary>
public sealed record SensitivityRecord
{
    /// <summary>Word of the source: <c>ballast</c> or <c>pair</c>.</summary>
    public required string Source { get; init; }

    /// <summary>Natural logarithm of its median in (rad/s)/m.</summary>
    public required double LogMedian { get; init; }

    /// <summary>Standard deviation of the logarithm, model error included; above 0.</summary>
    public required double LogSd { get; init; }

    /// <summary>Wing area, m²; null when the rig file has none.</summary>
    public double? WingAreaM2 { get; init; }

    /// <summary>Everything suspended under the wing, kg; above 0.</summary>
    public required double SuspendedKg { get; init; }
}
