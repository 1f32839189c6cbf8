using TrimFit.Core.Analysis;

namespace TrimFit.Core.Planning;

/// <summary>One leg of a test card.</summary>
public sealed record CardLeg
{
    /// <summary>Number on the card, from 1.</summary>
    public required int Number { get; init; }

    /// <summary>What the pilot does.</summary>
    public required CardLegKind Kind { get; init; }

    /// <summary>Power to set.</summary>
    public required PowerSetting Power { get; init; }

    /// <summary>Start after the card's start, s.</summary>
    public required double StartSec { get; init; }

    /// <summary>Length, s.</summary>
    public required double Seconds { get; init; }

    /// <summary>Heading held or turned to, rad, right of the heading of the first run.</summary>
    public required double HeadingRad { get; init; }

    /// <summary>Change of heading of a turn, rad, right positive; 0 on other legs.</summary>
    public double TurnRad { get; init; }

    /// <summary>Left brake of a brake step or circle, fraction of full travel.</summary>
    public double BrakeLeft { get; init; }

    /// <summary>Right brake of a brake step or circle, fraction of full travel.</summary>
    public double BrakeRight { get; init; }

    /// <summary>Ballast of a ballast leg, kg.</summary>
    public double BallastKg { get; init; }

    /// <summary>Where it is held out to, m, right positive.</summary>
    public double BallastArmM { get; init; }

    /// <summary>End after the card's start, s.</summary>
    public double EndSec => StartSec + Seconds;
}

/// <summary>What the pilot does on a leg of a test card.</summary>
public enum CardLegKind
{
    /// <summary>Set the power and hold the heading with the brakes.</summary>
    Hold,
    /// <summary>Hands in the toggles, no load.</summary>
    HandsOff,
    /// <summary>One brake to a marked travel, held.</summary>
    BrakeStep,
    /// <summary>Hands off with the ballast out on one side.</summary>
    Ballast,
    /// <summary>A gentle circle with one brake.</summary>
    Circle,
    /// <summary>A turn to the next heading.</summary>
    Turn,
}
