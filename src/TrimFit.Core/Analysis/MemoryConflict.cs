namespace TrimFit.Core.Analysis;

/// <summary>This flight's own evidence against the workshop's memory.</summary>
/// <param name="Kind">Word of the source that speaks against it.</param>
/// <param name="Ratio">That source's median over the memory's.</param>
/// <param name="P">Prior-predictive p, for the looks that were taken (Bonferroni).</param>
internal sealed record MemoryConflict(string Kind, double Ratio, double P)
{
    /// <summary>The source that lies farthest off; null when none lies too far.</summary>
    /// <param name="memory">The memory.</param>
    /// <param name="userMedian">What the user states, (rad/s)/m; 0 for nothing.</param>
    /// <param name="userLogSd">Its log-sd.</param>
    /// <param name="torque">The torque source; null when it may not be used.</param>
    /// <param name="direct">Sources that flew a known shift.</param>
    /// <param name="level">p below which the memory is not used.</param>
    public static MemoryConflict? Of(ShopMemory memory, double userMedian, double userLogSd, SourceAlone? torque, IEnumerable<SourceAlone> direct, double level)
    {
        SourceAlone[] own =
        [
            .. userMedian > 0 ? [new SourceAlone("user", userMedian, userLogSd, 1, default)] : Array.Empty<SourceAlone>(),
            .. torque is null ? [] : new[] { torque },
            .. direct,
        ];
        MemoryConflict? worst = null;
        foreach (SourceAlone source in own)
        {
            // Turning against the known shift is no wing's sensitivity; the conflict of sources names it.
            if (!(source.Median > 0) || !double.IsFinite(source.LogSd))
                continue;
            double p = Math.Min(1, own.Length * memory.PriorPredictiveP(Math.Log(source.Median), source.LogSd));
            if (p < level && !(worst?.P <= p))
                worst = new(source.Kind, source.Median / memory.RadPerSecPerM, p);
        }
        return worst;
    }
}
