using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>What the pilot of a made-up flight knows of the machine, and how wrong it is: decides the rig file.</summary>
public sealed record RigKnowledge
{
    /// <summary>Whether shaft power, thrust and speed at full power are given.</summary>
    public bool Power { get; init; } = true;

    /// <summary>Whether thrust line, its depth, the depth of the CG and the hang-back were measured.</summary>
    public bool ThrustLine { get; init; }

    /// <summary>Whether the wing's lines were measured, so that its stiffness against riser twist follows.</summary>
    public bool Lines { get; init; }

    /// <summary>Whether trim speed and sink are given.</summary>
    public bool WingSpeeds { get; init; } = true;

    /// <summary>Whether the offsets of harness hang points and power unit are given.</summary>
    public bool Offsets { get; init; } = true;

    /// <summary>Relative error of the stated power.</summary>
    public double PowerError { get; init => field = Guard.Finite(value); }

    /// <summary>Relative error of the stated thrust.</summary>
    public double ThrustError { get; init => field = Guard.Finite(value); }

    /// <summary>Error of the stated thrust line, m.</summary>
    public double ThrustLineErrorM { get; init => field = Guard.Finite(value); }

    /// <summary>Error of the stated hang-back, rad.</summary>
    public double HangBackErrorRad { get; init => field = Guard.Finite(value); }

    /// <summary>Error of the stated carabiners' midpoint, m.</summary>
    public double CarabinerErrorM { get; init => field = Guard.Finite(value); }

    /// <summary>Error of the stated harness hang points, m.</summary>
    public double HangPointErrorM { get; init => field = Guard.Finite(value); }

    /// <summary>Whether the pilot has the propeller's rotation the wrong way round.</summary>
    public bool RotationWrong { get; init; }

    /// <summary>Sensitivity the pilot states, rad/s per m; null when not stated.</summary>
    public double? SensitivityRadPerSecPerM { get; init; }
}
