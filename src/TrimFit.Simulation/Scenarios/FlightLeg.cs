using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>One leg of a flight.</summary>
public sealed record FlightLeg
{
    /// <summary>Length, s; the longest it may take when it is a turn.</summary>
    public double DurationSec { get; init => field = Guard.Positive(value); } = 20;

    /// <summary>Power in words; not used when <see cref="ThrottleFraction"/> is given.</summary>
    public LegPower Power { get; init; } = LegPower.Level;

    /// <summary>Throttle 0 to 1, or null to use <see cref="Power"/>.</summary>
    public double? ThrottleFraction
    {
        get;
        init => field = value is null or (>= 0 and <= 1) ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "must be 0 to 1");
    }

    /// <summary>What the pilot does.</summary>
    public LegControl Control { get; init; }

    /// <summary>Left brake of a <see cref="LegControl.Brakes"/> leg, m.</summary>
    public double BrakeLeftM { get; init => field = Guard.NotNegative(value); }

    /// <summary>Right brake of a <see cref="LegControl.Brakes"/> leg, m.</summary>
    public double BrakeRightM { get; init => field = Guard.NotNegative(value); }

    /// <summary>Heading to hold, rad; null holds the one at the start of the leg.</summary>
    public double? HeadingRad { get; init; }

    /// <summary>Change of heading of a turn, rad, right positive.</summary>
    public double TurnRad { get; init => field = Guard.Finite(value); }

    /// <summary>Turn rate of a circle, rad/s, right positive.</summary>
    public double TurnRateRadPerSec { get; init => field = Guard.Finite(value); }

    /// <summary>Shift of the suspended CG on a weight-shift leg, m, right positive.</summary>
    public double WeightShiftM { get; init => field = Guard.Finite(value); }

    /// <summary>Ballast moved on a ballast leg, kg; it counts in the pilot's mass.</summary>
    public double BallastKg { get; init => field = Guard.NotNegative(value); }

    /// <summary>Lateral arm the ballast is moved out to, m, right positive.</summary>
    public double BallastArmM { get; init => field = Guard.Finite(value); }

    /// <summary>Left trimmer on this leg, m.</summary>
    public double TrimmerLeftM { get; init => field = Guard.NotNegative(value); }

    /// <summary>Right trimmer on this leg, m.</summary>
    public double TrimmerRightM { get; init => field = Guard.NotNegative(value); }
}
