using TrimFit.Core.Units;

namespace TrimFit.Simulation;

/// <summary>A rigid frame on two straight risers of fixed length, in steady flight, solved by vectors.</summary>
/// <remarks>
/// Axes of the wing: origin midway between the risers' upper ends, z along the line from there to the carabiners' midpoint, x forward, y right.
/// The lines fan out over the span and hold the carabiners' midpoint under the wing's middle, x = y = 0; gravity has the free direction, since a
/// wing banks and leans in flight until it is square to the pull of its risers: a symmetric wing that does not slip makes no side force, so what
/// two straight diverging risers pull sideways the fans take up. Axes of the frame: as it hangs with the engine off, origin between the
/// carabiners on the frame's centre line.
/// Eight unknowns (depth of the carabiners, roll, pitch and yaw of the frame, two tensions, two components of gravity's direction) from
/// eight equations (three forces, three moments, two lengths), by Newton's method with a differenced Jacobian.
/// Left out: stretch of the risers, their own stiffness against twist, the pilot swinging in the harness.
/// </remarks>
internal sealed class FrameStatics
{
    private const int N = 8;
    private const int MaxIterations = 40;
    private const double DifferenceStep = 1e-6; // of each unknown's scale: truncation and rounding errors are then both near 1e-10
    private const double StepTolerance = 1e-12; // of each unknown's scale

    private readonly Vector _left, _right, _middle, _cg, _thrustPoint, _thrustAxis;
    private readonly double _weight, _wingWeight, _length, _spread, _rotation, _massKg, _wingKg;
    private readonly PropellerSetup _propeller;
    private readonly double[] _scale;

    public FrameStatics(Scenario s)
    {
        GeometrySetup g = s.Geometry;
        _massKg = s.Mass.PilotKg + s.Mass.PowerUnitKg;
        _wingKg = s.Mass.WingKg;
        _weight = _massKg * PhysicalConstants.StandardGravity;
        _wingWeight = _wingKg * PhysicalConstants.StandardGravity;
        double pilot = s.Mass.PostureM + (g.FrontShare * g.FrontHangPointsM) + ((1 - g.FrontShare) * g.RearHangPointsM);
        double cg = ((s.Mass.PilotKg * pilot) + (s.Mass.PowerUnitKg * s.Mass.PowerUnitLateralM)) / _massKg;
        _left = new(0, g.LeftCarabinerM, 0);
        _right = new(0, g.RightCarabinerM, 0);
        _middle = new(0, (g.LeftCarabinerM + g.RightCarabinerM) / 2, 0);
        _cg = new(0, cg, s.Mass.CgDepthM);
        _thrustPoint = new(0, s.Propeller.ThrustLineM, s.Propeller.ThrustLineDepthM);
        (double sinBack, double cosBack) = Math.SinCos(s.Propeller.HangBackRad);
        (double sinCant, double cosCant) = Math.SinCos(s.Propeller.CantRad);
        _thrustAxis = new(cosBack * cosCant, sinCant, -sinBack * cosCant); // hung back: the axis points above the horizontal
        _length = s.Wing.LineLengthM;
        _spread = s.Wing.LineSpreadM;
        _rotation = s.Propeller.Rotation;
        _propeller = s.Propeller;
        _scale = [_length, 1, 1, 1, _weight, _weight, 1, 1];
    }

    /// <summary>Weight of everything suspended, N.</summary>
    public double WeightN => _weight;

    /// <summary>The equilibrium at a thrust, or null when the risers would twist right round.</summary>
    /// <param name="thrustN">Thrust, N.</param>
    /// <param name="yawCouple">A further couple on the frame about the riser axis, N·m: a probe for the stiffness.</param>
    public FrameEquilibrium? Solve(double thrustN, double yawCouple = 0)
    {
        double[] x = HangingStill();
        if (Settle(x, thrustN, yawCouple))
            return Describe(x, thrustN, yawCouple);
        x = HangingStill(); // a strong thrust is approached in steps, since Newton's method may leap past the fold
        const int steps = 24;
        for (int i = 0; i <= steps; i++)
        {
            if (!Settle(x, thrustN * i / steps, yawCouple * i / steps))
                return null;
        }
        return Describe(x, thrustN, yawCouple);
    }

    /// <summary>The equilibria at growing thrusts, each started from the one before; null when the machine does not fly at one of them.</summary>
    public FrameEquilibrium[]? Sweep(ReadOnlySpan<double> thrustsN)
    {
        var found = new FrameEquilibrium[thrustsN.Length];
        double[] x = HangingStill();
        for (int i = 0; i < found.Length; i++)
        {
            if (!Settle(x, thrustsN[i], 0))
                return null;
            found[i] = Describe(x, thrustsN[i], 0);
        }
        return found;
    }

    private double[] HangingStill() => [_length, 0, 0, 0, _weight / 2, _weight / 2, 0, 0];

    private bool Settle(double[] x, double thrustN, double yawCouple)
    {
        Span<double> f = stackalloc double[N];
        Span<double> above = stackalloc double[N];
        Span<double> below = stackalloc double[N];
        double[] jacobian = new double[N * N];
        for (int iteration = 0; iteration < MaxIterations; iteration++)
        {
            Residuals(x, thrustN, yawCouple, f);
            for (int j = 0; j < N; j++)
            {
                double kept = x[j];
                double h = DifferenceStep * _scale[j];
                x[j] = kept + h;
                Residuals(x, thrustN, yawCouple, above);
                x[j] = kept - h;
                Residuals(x, thrustN, yawCouple, below);
                x[j] = kept;
                for (int i = 0; i < N; i++)
                    jacobian[(i * N) + j] = (above[i] - below[i]) / (2 * h);
            }
            if (!SolveLinear(jacobian, f))
                return false;
            double largest = 0;
            for (int j = 0; j < N; j++)
            {
                x[j] -= f[j];
                largest = Math.Max(largest, Math.Abs(f[j]) / _scale[j]);
            }
            // a quarter turn of the frame, a slack riser or gravity level with the wing is no flight
            if (!(Math.Abs(x[3]) < Math.PI / 2) || !(x[4] > 0) || !(x[5] > 0) || !((x[6] * x[6]) + (x[7] * x[7]) < 1))
                return false;
            if (largest < StepTolerance)
                return true;
        }
        return false;
    }

    private void Residuals(ReadOnlySpan<double> x, double thrustN, double yawCouple, Span<double> f)
    {
        var middle = new Vector(0, 0, x[0]);
        Rotation frame = Rotation.FromAngles(x[1], x[2], x[3]);
        var down = new Vector(x[6], x[7], Math.Sqrt(Math.Max(0, 1 - (x[6] * x[6]) - (x[7] * x[7]))));
        Vector armLeft = frame.Outward(_left - _middle);
        Vector armRight = frame.Outward(_right - _middle);
        Vector riserLeft = new Vector(0, -_spread, 0) - (middle + armLeft);
        Vector riserRight = new Vector(0, _spread, 0) - (middle + armRight);
        Vector pullLeft = (x[4] / riserLeft.Length) * riserLeft;
        Vector pullRight = (x[5] / riserRight.Length) * riserRight;
        Vector axis = frame.Outward(_thrustAxis);
        Vector thrust = thrustN * axis;
        Vector weight = _weight * down;
        Vector force = weight + thrust + pullLeft + pullRight;
        Vector moment = Vector.Cross(frame.Outward(_cg - _middle), weight)
            + Vector.Cross(frame.Outward(_thrustPoint - _middle), thrust)
            + Vector.Cross(armLeft, pullLeft) + Vector.Cross(armRight, pullRight)
            + ((-_rotation * _propeller.TorqueAt(thrustN)) * axis)
            + new Vector(0, 0, yawCouple);
        f[0] = force.X;
        f[1] = weight.Y + thrust.Y; // no side force of the wing: the fans of lines cancel the risers' own
        f[2] = force.Z;
        f[3] = moment.X;
        f[4] = moment.Y;
        f[5] = moment.Z;
        f[6] = _weight * (riserLeft.Length - _length); // weighted to the size of the forces
        f[7] = _weight * (riserRight.Length - _length);
    }

    /// <summary>What the solved frame gives to the wing.</summary>
    private FrameEquilibrium Describe(double[] x, double thrustN, double yawCouple)
    {
        var middle = new Vector(0, 0, x[0]);
        Rotation frame = Rotation.FromAngles(x[1], x[2], x[3]);
        var down = new Vector(x[6], x[7], Math.Sqrt(1 - (x[6] * x[6]) - (x[7] * x[7])));
        Vector axis = frame.Outward(_thrustAxis);
        Vector thrust = thrustN * axis;
        Vector couple = (-_rotation * _propeller.TorqueAt(thrustN)) * axis;
        Vector cgArm = frame.Outward(_cg - _middle);
        Vector thrustArm = frame.Outward(_thrustPoint - _middle);

        // about the riser axis: everything on the frame but the risers
        double yaw = (Vector.Cross(cgArm, _weight * down) + Vector.Cross(thrustArm, thrust) + couple).Z + yawCouple;

        // about the CG of the whole, wing at the upper ends: thrust, torque, and the force of the air on the wing, which a symmetric wing
        // can only make in its own plane of symmetry
        Vector whole = (_massKg / (_massKg + _wingKg)) * (middle + cgArm);
        Vector carried = ((_weight + _wingWeight) * down) + thrust;
        var air = new Vector(-carried.X, 0, -carried.Z);
        double roll = (Vector.Cross(new Vector(0, 0, 0) - whole, air) + Vector.Cross(middle + thrustArm - whole, thrust) + couple).X;
        return new FrameEquilibrium(roll, yaw, x[3], x[4], x[5], Math.Asin(-axis.Z), Math.Asin(-down.X), middle.Z + thrustArm.Z - whole.Z);
    }

    /// <summary>Solves a·x = b by elimination with row pivoting; the solution replaces b. False when singular.</summary>
    private static bool SolveLinear(double[] a, Span<double> b)
    {
        for (int k = 0; k < N; k++)
        {
            int pivot = k;
            for (int i = k + 1; i < N; i++)
            {
                if (Math.Abs(a[(i * N) + k]) > Math.Abs(a[(pivot * N) + k]))
                    pivot = i;
            }
            if (!(Math.Abs(a[(pivot * N) + k]) > 1e-9)) // residuals are of the size of newtons: smaller is zero
                return false;
            if (pivot != k)
            {
                for (int j = 0; j < N; j++)
                    (a[(k * N) + j], a[(pivot * N) + j]) = (a[(pivot * N) + j], a[(k * N) + j]);
                (b[k], b[pivot]) = (b[pivot], b[k]);
            }
            for (int i = k + 1; i < N; i++)
            {
                double factor = a[(i * N) + k] / a[(k * N) + k];
                for (int j = k; j < N; j++)
                    a[(i * N) + j] -= factor * a[(k * N) + j];
                b[i] -= factor * b[k];
            }
        }
        for (int i = N - 1; i >= 0; i--)
        {
            for (int j = i + 1; j < N; j++)
                b[i] -= a[(i * N) + j] * b[j];
            b[i] /= a[(i * N) + i];
        }
        return true;
    }
}
