namespace TrimFit.Core.Rigging;

/// <summary>Which way a propeller's torque and spin push the frame.</summary>
/// <remarks>Rotation is seen from behind, looking the way it flies; its sign is +1 clockwise, −1 counter-clockwise, 0 contra-rotating (the two halves
/// cancel). The shaft points forward and, tilted up by ε, along (cos ε, 0, −sin ε). Handbook rule: a propeller clockwise from behind rolls the airframe left
/// (FAA Pilot's Handbook of Aeronautical Knowledge, chapter 5, "Torque and P-Factor").</remarks>
public static class PropellerSigns
{
    /// <summary>Moment of the propeller's steady torque on the frame: −rotation · torque along the shaft.</summary>
    /// <param name="rotation">Which way the propeller turns.</param>
    /// <param name="torqueNm">Shaft torque at the propeller, N·m; not negative.</param>
    /// <param name="shaftTiltRad">Shaft tilted up from forward, rad: the hang-back.</param>
    /// <returns>Moment, N·m.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The torque negative, or a value not finite.</exception>
    public static BodyVector ReactionMoment(PropellerRotation rotation, double torqueNm, double shaftTiltRad = 0) =>
        Shaft(shaftTiltRad).Times(-Sign(rotation) * Guard.NotNegative(torqueNm));

    /// <summary>Gyroscopic moment of the spinning propeller on the frame: −ω × H, H = rotation · I · spin along the shaft.</summary>
    /// <param name="rotation">Which way the propeller turns.</param>
    /// <param name="polarInertiaKgM2">Inertia about the shaft, kg·m²; not negative.</param>
    /// <param name="spinRadPerSec">Speed of rotation, rad/s; not negative.</param>
    /// <param name="bodyRate">Roll, pitch and yaw rate of the frame, rad/s.</param>
    /// <param name="shaftTiltRad">Shaft tilted up from forward, rad.</param>
    /// <returns>Moment, N·m. Clockwise from behind: nose going down turns the nose left.</returns>
    /// <exception cref="ArgumentOutOfRangeException">Inertia or spin is negative, or a value is not finite.</exception>
    public static BodyVector GyroscopicMoment(PropellerRotation rotation, double polarInertiaKgM2, double spinRadPerSec, BodyVector bodyRate, double shaftTiltRad = 0)
    {
        double momentum = Sign(rotation) * Guard.NotNegative(polarInertiaKgM2) * Guard.NotNegative(spinRadPerSec);
        return bodyRate.Cross(Shaft(shaftTiltRad).Times(momentum)).Times(-1);
    }

    /// <summary>+1 clockwise from behind, −1 counter-clockwise, 0 contra-rotating.</summary>
    public static int Sign(PropellerRotation rotation) => rotation switch
    {
        PropellerRotation.Clockwise => 1,
        PropellerRotation.CounterClockwise => -1,
        _ => 0,
    };

    private static BodyVector Shaft(double tilt) => new(Math.Cos(Guard.Finite(tilt)), 0, -Math.Sin(tilt));
}
