namespace TrimFit.Core.Ground;

/// <summary>An entry that cannot be right, or that another reading contradicts; Reporting has its words.</summary>
/// <param name="Code">What.</param>
/// <param name="Key">Key of the rig file it is about, such as <c>hang_check.left_kg</c>; empty for none.</param>
/// <param name="Values">The numbers of the sentence, SI, in the order the code's comment gives.</param>
public sealed record GroundFault(GroundFaultCode Code, string Key, params double[] Values);

/// <summary>What a <see cref="GroundFault"/> says. The comment gives the numbers it carries.</summary>
public enum GroundFaultCode
{
    /// <summary>One of the repeats is off by ten: its number (1 first), reading, what it would be (unit of the key).</summary>
    FactorTenInRepeats,
    /// <summary>A reading is off by ten against what others of the file say: reading, what it would be (unit of the key).</summary>
    FactorTen,
    /// <summary>Leaning right made the right scale lighter: change of the right scale's share, fraction. Scales or entries are exchanged.</summary>
    ScalesSwappedByLean,
    /// <summary>The hang check is the mirror image of tape and weighing: e of the scales, e of the tape (m). Scales or sides are exchanged.</summary>
    ScalesSwappedByGeometry,
    /// <summary>Left and right are exchanged against the file's earlier readings: the two readings, m.</summary>
    SidesSwapped,
    /// <summary>The scales do not carry what should hang: both scales, suspended mass (kg).</summary>
    WeightMissing,
    /// <summary>Scales and tape disagree: e of the scales, e of the tape, largest difference that scatter explains (m).</summary>
    HangAgainstGeometry,
    /// <summary>The riser carabiners' places and their measured distance disagree: distance by places, distance measured (m).</summary>
    SpacingAgainstPlaces,
    /// <summary>The two scales under the power unit do not carry its mass: both, mass (kg).</summary>
    PowerUnitWeight,
    /// <summary>The propeller is entered against its drive: how the crank turns (1 clockwise), the drive's number, 1 when it reverses.</summary>
    RotationAgainstDrive,
    /// <summary>The counted turns give another reduction than the file: counted, file.</summary>
    ReductionAgainstCount,
}
