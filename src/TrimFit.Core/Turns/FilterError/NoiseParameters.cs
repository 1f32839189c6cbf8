namespace TrimFit.Core.Turns.FilterError;

/// <summary>How the wing's turn follows its cause.</summary>
public enum ResponseOrder
{
    /// <summary>dr/dt = (u + w − r)/τ.</summary>
    First,
    /// <summary>dr/dt = p, dp/dt = ωₙ²(u + w − r) − 2ζωₙp.</summary>
    Second,
}

/// <summary>Time constants and noise levels of the turn model: what the search moves, while everything linear is solved exactly.</summary>
public sealed record NoiseParameters
{
    /// <summary>First or second order.</summary>
    public required ResponseOrder Order { get; init; }

    /// <summary>First order: time constant τ, s. Not used by second order.</summary>
    public double LagSec { get; init; } = 1.5;

    /// <summary>Second order: undamped frequency ωₙ, rad/s.</summary>
    public double NaturalFrequency { get; init; } = 1.1;

    /// <summary>Second order: damping ratio ζ.</summary>
    public double Damping { get; init; } = 0.6;

    /// <summary>Standing deviation of the slow disturbance w, rad/s.</summary>
    public required double DisturbanceRms { get; init; }

    /// <summary>Correlation time of w, s.</summary>
    public required double DisturbanceTauSec { get; init; }

    /// <summary>Quick part of the disturbance, white, acting through the wing's response beside w, rad/s·√s: small gusts and the frame's
    /// swing. Without it w itself turns white on a machine whose frame swings, and slow air then goes uncounted.</summary>
    public double QuickDisturbance { get; init; }

    /// <summary>White noise of one gyro measurement, rad/s.</summary>
    public double GyroNoise { get; init; } = 0.01;

    /// <summary>White noise of one air heading, rad.</summary>
    public double HeadingNoise { get; init; } = 0.03;

    /// <summary>Standing deviation of the coloured error of the air heading, rad.</summary>
    public double GustRms { get; init; } = 0.03;

    /// <summary>Correlation time of that error, s.</summary>
    public double GustTauSec { get; init; } = 8;

    /// <summary>White noise of one compass heading, rad.</summary>
    public double CompassNoise { get; init; } = 0.03;

    /// <summary>Lag of the turn behind a slow change of its cause, s: τ, or 2ζ/ωₙ.</summary>
    public double SteadyLagSec => Order == ResponseOrder.First ? LagSec : 2 * Damping / NaturalFrequency;
}
