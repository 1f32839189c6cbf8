namespace TrimFit.Simulation;

/// <summary>Order of a wing's turn response.</summary>
public enum TurnResponse
{
    /// <summary>dr/dt = (u − r)/τ.</summary>
    FirstOrder,
    /// <summary>d²r/dt² = ωn² (u − r) − 2 ζ ωn dr/dt.</summary>
    SecondOrder,
}
