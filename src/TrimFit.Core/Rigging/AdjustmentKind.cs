namespace TrimFit.Core.Rigging;

/// <summary>The ways the trade offsets a machine.</summary>
public enum AdjustmentKind
{
    /// <summary>Both riser carabiners the same way (bent suspension bars, or an add-on to one side on both).</summary>
    CarabinerPair,
    /// <summary>One riser carabiner (a spacer on one side); changes the spacing too.</summary>
    CarabinerOneSide,
    /// <summary>Whole suspension bars with their front harness hang points.</summary>
    BarSpacer,
    /// <summary>Front harness hang points.</summary>
    HarnessFront,
    /// <summary>Front and rear harness hang points.</summary>
    HarnessFrontRear,
    /// <summary>Power unit sideways in the frame.</summary>
    PowerUnit,
    /// <summary>Engine turned in plan.</summary>
    EngineCant,
    /// <summary>Ballast on one side.</summary>
    Ballast,
    /// <summary>Trimmers set differently left and right.</summary>
    Trimmer,
    /// <summary>Brake line lengths set differently left and right.</summary>
    BrakeLine,
}
