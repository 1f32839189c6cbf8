namespace TrimFit.Core.Ground;

/// <summary>A simple cause of a pull that is looked for before any geometry is touched.</summary>
public enum SimpleCause
{
    /// <summary>Brake lines of different length, or a toggle that binds.</summary>
    BrakeLines,
    /// <summary>Trimmers set or slipped unevenly.</summary>
    Trimmers,
    /// <summary>Accelerator lines of different length.</summary>
    AcceleratorLines,
    /// <summary>Risers or lines of different length.</summary>
    Risers,
    /// <summary>Harness straps and seat board.</summary>
    Harness,
    /// <summary>Reserve, bag or fuel on one side.</summary>
    LoadOnOneSide,
    /// <summary>How the pilot sits.</summary>
    Seat,
    /// <summary>Pivots of the suspension bars.</summary>
    SuspensionBarPivots,
    /// <summary>Engine mounts.</summary>
    EngineMounts,
    /// <summary>The frame.</summary>
    Frame,
    /// <summary>Track of the propeller.</summary>
    PropellerTrack,
}
