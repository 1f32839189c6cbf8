namespace TrimFit.Simulation;

/// <summary>Power of a leg in words.</summary>
public enum LegPower
{
    /// <summary>Engine off.</summary>
    Off,
    /// <summary>Idle.</summary>
    Idle,
    /// <summary>The thrust of level flight.</summary>
    Level,
    /// <summary>Full.</summary>
    Full,
}
