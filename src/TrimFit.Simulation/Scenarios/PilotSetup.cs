using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>How the pilot steers.</summary>
public sealed record PilotSetup
{
    /// <summary>Time between seeing and acting, s.</summary>
    public double ReactionSec { get; init => field = Guard.NotNegative(value); } = 0.4;

    /// <summary>Lag of the hands, s.</summary>
    public double HandLagSec { get; init => field = Guard.Positive(value); } = 0.3;

    /// <summary>Turn rate asked for per heading error, 1/s.</summary>
    public double HeadingGain { get; init => field = Guard.NotNegative(value); } = 0.25;

    /// <summary>Share of the seen turn rate taken back.</summary>
    public double RateGain { get; init => field = Guard.NotNegative(value); } = 0.6;

    /// <summary>How fast a lasting heading error is trimmed out, 1/s².</summary>
    public double IntegralGain { get; init => field = Guard.NotNegative(value); } = 0.04;

    /// <summary>Heading error the pilot does not bother about, rad.</summary>
    public double HeadingDeadBandRad { get; init => field = Guard.NotNegative(value); }

    /// <summary>Unsteadiness of the steering hand, m.</summary>
    public double HandNoiseM { get; init => field = Guard.NotNegative(value); } = 0.004;

    /// <summary>Both brakes held while steering, m.</summary>
    public double RestingBrakeM { get; init => field = Guard.NotNegative(value); } = 0.03;

    /// <summary>Brake pulled in an intended turn, m.</summary>
    public double TurnBrakeM { get; init => field = Guard.Positive(value); } = 0.14;
}
