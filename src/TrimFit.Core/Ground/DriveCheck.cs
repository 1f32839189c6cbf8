using TrimFit.Core.Rigging;

namespace TrimFit.Core.Ground;

/// <summary>Does the propeller turn the way its drive says? Plug out, crank turned by hand.</summary>
/// <remarks>Belts and chains keep the sense of rotation, a pair of outside gears reverses it (any textbook of machine elements, from memory). Gears with an
/// idler or a planetary set keep it: the rig says so with <c>gear_reverses = false</c>.</remarks>
public static class DriveCheck
{
    /// <summary>How the propeller must turn.</summary>
    /// <param name="crank">How the crank turns, seen from behind like the propeller.</param>
    /// <param name="drive">What lies between them.</param>
    /// <param name="gearReverses">Whether gears reverse.</param>
    /// <returns>Null when the drive does not say: unknown, or a clutch that may have either behind it.</returns>
    public static PropellerRotation? Propeller(PropellerRotation crank, PropellerDrive drive, bool gearReverses = true)
    {
        bool? reverses = drive switch
        {
            PropellerDrive.Direct or PropellerDrive.Belt or PropellerDrive.Electric => false,
            PropellerDrive.Gear => gearReverses,
            _ => null,
        };
        return (crank, reverses) switch
        {
            (PropellerRotation.ContraRotating, _) or (_, null) => null,
            (_, false) => crank,
            (PropellerRotation.Clockwise, _) => PropellerRotation.CounterClockwise,
            _ => PropellerRotation.Clockwise,
        };
    }
}
