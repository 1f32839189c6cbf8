using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>Masses, kg, and their places in the frame, m; lateral places are to the pilot's right of the frame's centre line.</summary>
public sealed record MassSetup
{
    /// <summary>Pilot with all that hangs from the harness, kg.</summary>
    public double PilotKg { get; init => field = Guard.Positive(value); } = 88;

    /// <summary>Power unit with fuel and wheels, kg.</summary>
    public double PowerUnitKg { get; init => field = Guard.Positive(value); } = 30;

    /// <summary>Wing without the air inside, kg.</summary>
    public double WingKg { get; init => field = Guard.NotNegative(value); } = 6;

    /// <summary>Lateral place of the power unit's CG, m.</summary>
    public double PowerUnitLateralM { get; init => field = Guard.Finite(value); }

    /// <summary>Pilot's own sideways seat against the harness hang points, m.</summary>
    public double PostureM { get; init => field = Guard.Finite(value); }

    /// <summary>Depth of the suspended CG below the riser carabiners as it hangs, m.</summary>
    public double CgDepthM { get; init => field = Guard.Positive(value); } = 0.40;

    /// <summary>Moment of inertia of the frame with pilot about the riser axis, kg·m².</summary>
    public double YawInertiaKgM2 { get; init => field = Guard.Positive(value); } = 7;

    /// <summary>Damping ratio of the frame's yaw and roll on its risers.</summary>
    public double SwingDamping { get; init => field = Guard.Positive(value); } = 0.25;

    /// <summary>Frequency of the frame's roll on its risers, Hz.</summary>
    public double RollFrequencyHz { get; init => field = Guard.Positive(value); } = 1.2;
}
