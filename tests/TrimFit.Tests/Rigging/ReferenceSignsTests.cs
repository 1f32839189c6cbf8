using CsCheck;
using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Rigging;

/// <summary>FAA Pilot's Handbook of Aeronautical Knowledge, chapter 5, "Torque and P-Factor": propeller clockwise as seen from behind.</summary>
public class ReferenceSignsTests
{
    [Fact]
    public void A_propeller_clockwise_from_behind_rolls_the_frame_left() =>
        Assert.Equal(new BodyVector(-56, 0, 0), Flat(PropellerSigns.ReactionMoment(PropellerRotation.Clockwise, 56)));

    [Fact]
    public void Raising_the_tail_yaws_a_clockwise_machine_left()
    {
        BodyVector moment = PropellerSigns.GyroscopicMoment(PropellerRotation.Clockwise, 0.1, 250, new BodyVector(0, -0.4, 0)); // nose going down
        Accuracy.AgreesTo(12, -0.4 * 0.1 * 250, moment.Z); // M_z = + q H: precession acts 90 degrees ahead in the direction of rotation
        Assert.Equal(0, moment.X);
    }

    [Fact]
    public void Yawing_right_pitches_a_clockwise_machine_down()
    {
        BodyVector moment = PropellerSigns.GyroscopicMoment(PropellerRotation.Clockwise, 0.1, 250, new BodyVector(0, 0, 0.3));
        Accuracy.AgreesTo(12, -0.3 * 0.1 * 250, moment.Y); // M_y = − r H, nose down
    }

    [Fact]
    public void A_shaft_tilted_up_puts_part_of_the_reaction_into_a_turn_to_the_right()
    {
        // Axis (cos ε, 0, −sin ε): −Q cos ε about x and +Q sin ε about z.
        double tilt = double.DegreesToRadians(10);
        BodyVector moment = PropellerSigns.ReactionMoment(PropellerRotation.Clockwise, 50, tilt);
        Accuracy.AgreesTo(6, -49.240388, moment.X); // by hand: 50 cos 10°
        Accuracy.AgreesTo(6, 8.6824089, moment.Z); // by hand: 50 sin 10°
        Assert.Equal(0, moment.Y);
    }

    [Fact]
    public void The_other_rotation_turns_every_sign_and_two_rotations_cancel() =>
        Gen.Select(Gen.Double[0, 100], Gen.Double[-0.3, 0.3], Gen.Double[-1, 1], Gen.Double[-1, 1], Gen.Double[-1, 1]).Sample((torque, tilt, p, q, r) =>
        {
            BodyVector rate = new(p, q, r);
            Assert.Equal(
                Flat(PropellerSigns.ReactionMoment(PropellerRotation.Clockwise, torque, tilt)),
                Flat(PropellerSigns.ReactionMoment(PropellerRotation.CounterClockwise, torque, tilt).Times(-1)));
            Assert.Equal(
                Flat(PropellerSigns.GyroscopicMoment(PropellerRotation.Clockwise, 0.1, 200, rate, tilt)),
                Flat(PropellerSigns.GyroscopicMoment(PropellerRotation.CounterClockwise, 0.1, 200, rate, tilt).Times(-1)));
            Assert.Equal(default, Flat(PropellerSigns.ReactionMoment(PropellerRotation.ContraRotating, torque, tilt)));
            Assert.Equal(default, Flat(PropellerSigns.GyroscopicMoment(PropellerRotation.ContraRotating, 0.1, 200, rate, tilt)));
        });

    [Fact]
    public void A_gyroscopic_moment_does_no_work() => Gen.Select(Gen.Double[-1, 1], Gen.Double[-1, 1], Gen.Double[-1, 1], Gen.Double[-0.3, 0.3]).Sample((p, q, r, tilt) =>
    {
        BodyVector m = PropellerSigns.GyroscopicMoment(PropellerRotation.Clockwise, 0.1, 200, new BodyVector(p, q, r), tilt);
        Assert.InRange(Math.Abs((p * m.X) + (q * m.Y) + (r * m.Z)), 0, 1e-12 * 20);
    });

    private static BodyVector Flat(BodyVector v) => new(v.X + 0.0, v.Y + 0.0, v.Z + 0.0); // −0 becomes 0
}
