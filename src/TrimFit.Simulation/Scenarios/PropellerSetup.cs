using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>Engine, propeller and thrust line.</summary>
public sealed record PropellerSetup
{
    internal const double ClutchOverIdle = 1.15; // a clutch takes hold this much above idle

    /// <summary>+1 clockwise seen from behind, −1 counter-clockwise, 0 contra-rotating.</summary>
    public int Rotation
    {
        get;
        init => field = value is -1 or 0 or 1 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "must be -1, 0 or 1");
    } = 1;

    /// <summary>Thrust at full power and sea-level density, N.</summary>
    public double FullThrustN { get; init => field = Guard.Positive(value); } = 600;

    /// <summary>Torque of the propeller at full power and sea-level density, N·m.</summary>
    public double FullTorqueNm { get; init => field = Guard.NotNegative(value); } = 56;

    /// <summary>Torque over thrust grows as thrust to this power; 0 is the plain square law for both.</summary>
    public double TorqueExponent { get; init => field = Guard.Finite(value); }

    /// <summary>Diameter, m.</summary>
    public double DiameterM { get; init => field = Guard.Positive(value); } = 1.25;

    /// <summary>Speed of rotation of the propeller at full power, rev/s.</summary>
    public double FullRevPerSec { get; init => field = Guard.Positive(value); } = 39.8;

    /// <summary>Speed of rotation at idle over that at full power.</summary>
    public double IdleRatio { get; init => field = Guard.NotNegative(value); } = 0.30;

    /// <summary>Whether a clutch lets the propeller stand at idle: then idle has no thrust.</summary>
    public bool Clutch { get; init; }

    /// <summary>Lag of the engine's speed behind the throttle, s.</summary>
    public double EngineLagSec { get; init => field = Guard.Positive(value); } = 0.5;

    /// <summary>Exponent of throttle in the engine's speed: 1 is a straight line from idle to full.</summary>
    public double ThrottleExponent { get; init => field = Guard.Positive(value); } = 1;

    /// <summary>Hang-back of the thrust axis in the hang test, rad.</summary>
    public double HangBackRad { get; init => field = Guard.Finite(value); } = double.DegreesToRadians(4.5);

    /// <summary>Thrust axis turned in plan, rad; positive pushes to the right.</summary>
    public double CantRad { get; init => field = Guard.Finite(value); }

    /// <summary>Lateral place of the thrust line, m.</summary>
    public double ThrustLineM { get; init => field = Guard.Finite(value); }

    /// <summary>Depth of the thrust line below the riser carabiners, m.</summary>
    public double ThrustLineDepthM { get; init => field = Guard.Finite(value); } = 0.36;

    /// <summary>Torque of the propeller at a thrust, N·m, without its sign.</summary>
    public double TorqueAt(double thrustN)
    {
        if (!(thrustN > 0))
            return 0;
        double ratio = thrustN / FullThrustN;
        return TorqueExponent == 0 ? FullTorqueNm * ratio : FullTorqueNm * Math.Pow(ratio, 1 + TorqueExponent); // 0: the exact straight line
    }
}
