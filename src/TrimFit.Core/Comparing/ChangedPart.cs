namespace TrimFit.Core.Comparing;

/// <summary>What a person says was changed between two settings.</summary>
public enum ChangedPart
{
    /// <summary>Riser carabiners, suspension bars, harness hang points, power unit, thrust line.</summary>
    Geometry,
    /// <summary>Another wing on the same machine.</summary>
    Wing,
    /// <summary>Brake lines made longer or shorter.</summary>
    BrakeLines,
    /// <summary>Trimmers set otherwise.</summary>
    Trimmers,
    /// <summary>The harness, its straps or its hang points.</summary>
    Harness,
    /// <summary>Another propeller, or its pitch.</summary>
    Propeller,
    /// <summary>Ballast added, taken off or moved.</summary>
    Ballast,
}
