namespace TrimFit.Simulation;

/// <summary>What the pilot does with the brakes on a leg.</summary>
public enum LegControl
{
    /// <summary>Brakes let go.</summary>
    HandsOff,
    /// <summary>Brakes set to the leg's two travels.</summary>
    Brakes,
    /// <summary>Heading held with the brakes.</summary>
    HoldHeading,
    /// <summary>One brake until the heading has changed by the leg's turn; the leg ends then.</summary>
    Turn,
    /// <summary>Brakes worked so that the leg's turn rate results.</summary>
    Circle,
    /// <summary>Hands off, and the pilot leans by the leg's weight shift.</summary>
    WeightShift,
    /// <summary>Hands off, with a ballast carried amidships so far moved out to the leg's arm.</summary>
    Ballast,
    /// <summary>Standing on the ground.</summary>
    Ground,
    /// <summary>Running up: the airspeed grows to trim speed over the leg.</summary>
    TakeOff,
    /// <summary>Heading held down to the start altitude, then standing.</summary>
    Land,
}
