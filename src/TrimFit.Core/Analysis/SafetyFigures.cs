using TrimFit.Core.Units;

namespace TrimFit.Core.Analysis;

/// <summary>The figures behind the cautions, in one place: what is computed and what people read use the same ones.</summary>
/// <remarks>Common practice of the trade, with no published source. A user may only tighten them.</remarks>
public static class SafetyFigures
{
    /// <summary>Largest first step before a second flight or the hang check has confirmed sign and size, m.</summary>
    public const double FirstStepMaxM = 0.015;

    /// <summary>Largest share of the predicted travel in the first step.</summary>
    public const double FirstStepShare = 0.5;

    /// <summary>Turn rate above which no further test card is flown.</summary>
    public static AngularRate StrongPull { get; } = AngularRate.FromDegPerSec(6);

    /// <summary>Held brake, fraction of its travel, above which no further test card is flown.</summary>
    public const double StrongHeldBrake = 0.15;

    /// <summary>Upper 95 % of the twist ratio above which caution is asked for.</summary>
    public const double TwistCautionRatio = 0.35;

    /// <summary>Upper 95 % of the twist ratio above which a sudden throttle change can twist the risers.</summary>
    public const double TwistWarningRatio = 0.70;

    /// <summary>Upper 95 % of the twist ratio above which an adjustment is refused: no equilibrium.</summary>
    public const double TwistRefusedRatio = 1.0;

    /// <summary>Constant part of the shift above which trimmers, lines and brakes are checked before anything is moved, m.</summary>
    public const double ConstantPartFirstM = 0.015;
}
