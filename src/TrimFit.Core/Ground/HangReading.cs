namespace TrimFit.Core.Ground;

/// <summary>One hang on two scales, kg: the pilot gets in, hangs still, both scales are read, the pilot gets out.</summary>
/// <param name="LeftKg">What the seated pilot's left riser carabiner carries.</param>
/// <param name="RightKg">What the right one carries.</param>
/// <param name="Exchanged">Whether the two scales had changed places against the other hangs; readings stay by side.</param>
public readonly record struct HangReading(double LeftKg, double RightKg, bool Exchanged = false)
{
    /// <summary>Both scales together, kg.</summary>
    public double SumKg => LeftKg + RightKg;

    /// <summary>The CG offset this hang shows: e = s (F_R - F_L)/(2 W), moments about the middle between the riser carabiners, W what the scales carry.</summary>
    /// <param name="spacingM">s, m.</param>
    /// <returns>m, right positive.</returns>
    public double OffsetM(double spacingM) => spacingM * (RightKg - LeftKg) / (2 * SumKg);
}
