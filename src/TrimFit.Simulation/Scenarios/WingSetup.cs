using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>The wing: how it carries, sinks and turns.</summary>
public sealed record WingSetup
{
    /// <summary>Turn rate per metre of CG offset, rad/s per m. Default 0.09 deg/s per mm.</summary>
    public double SensitivityRadPerSecPerM { get; init => field = Guard.Positive(value); } = double.DegreesToRadians(90);

    /// <summary>Turn per yaw moment over turn per roll moment.</summary>
    public double YawRatio { get; init => field = Guard.NotNegative(value); } = 1.5;

    /// <summary>Constant pull of wing and lines, rad/s.</summary>
    public double ConstantPullRadPerSec { get; init => field = Guard.Finite(value); }

    /// <summary>Turn rate per metre of right-minus-left trimmer, rad/s per m; a trimmer let out flies that side faster, away from it.
    /// Default −0.05 deg/s per mm.</summary>
    public double TrimmerTurnPerMeter { get; init => field = Guard.Finite(value); } = double.DegreesToRadians(-50);

    /// <summary>Length of the lines with their risers, m.</summary>
    public double LineLengthM { get; init => field = Guard.Positive(value); } = 7;

    /// <summary>Half the separation of the lines' upper ends, m: with the length it makes the stiffness against riser twist.</summary>
    public double LineSpreadM { get; init => field = Guard.Positive(value); } = 1.4;

    /// <summary>Airspeed at trim, m/s.</summary>
    public double TrimSpeedMPerSec { get; init => field = Guard.Positive(value); } = 11;

    /// <summary>Sink rate engine off, m/s, down positive.</summary>
    public double GlideSinkMPerSec { get; init => field = Guard.Positive(value); } = 2.2;

    /// <summary>Order of the turn's response: first or second.</summary>
    public TurnResponse Response { get; init; } = TurnResponse.FirstOrder;

    /// <summary>Time constant of the first-order response, s.</summary>
    public double TurnLagSec { get; init => field = Guard.Positive(value); } = 1.3;

    /// <summary>Period of the second-order response, s; default from a published paraglider model.</summary>
    public double TurnPeriodSec { get; init => field = Guard.Positive(value); } = 5.8;

    /// <summary>Damping ratio of the second-order response; default from the same model.</summary>
    public double TurnDamping { get; init => field = Guard.Positive(value); } = 0.48;
}
