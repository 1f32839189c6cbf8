namespace TrimFit.Reporting.Jobs;

/// <summary>What the sentence about the shop's memory speaks of.</summary>
public static class ShopMemoryFacts
{
    /// <summary>A usual load, kg: pilot, kit and machine (common practice, no source). Results use their own machine's.</summary>
    public const double UsualKg = 115;
}
