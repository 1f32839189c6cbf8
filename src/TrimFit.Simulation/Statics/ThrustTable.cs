namespace TrimFit.Simulation;

/// <summary>Equilibria of a frame over thrust, straight between its points.</summary>
internal sealed class ThrustTable
{
    private const int Points = 65; // curvature of the moments over thrust is small: straight pieces are good to 1e-5 of the pull
    private const double Reach = 1.15; // of full thrust: dense air

    private readonly FrameEquilibrium[] _at;
    private readonly double _perNewton;

    public ThrustTable(Scenario s)
    {
        double[] thrust = new double[Points];
        double step = Reach * s.Propeller.FullThrustN / (Points - 1);
        for (int i = 0; i < Points; i++)
            thrust[i] = i * step;
        var statics = new FrameStatics(s);
        _at = statics.Sweep(thrust) ?? throw TwistsRound(statics, thrust);
        _perNewton = 1 / step;
        WeightN = statics.WeightN;
        FrameEquilibrium probed = statics.Solve(0, 1) ?? throw TwistsRound(statics, thrust);
        StiffnessNmPerRad = 1 / (probed.TwistRad - _at[0].TwistRad);
    }

    /// <summary>Weight of everything suspended, N.</summary>
    public double WeightN { get; }

    /// <summary>Stiffness of the risers against twist without thrust, N·m/rad.</summary>
    public double StiffnessNmPerRad { get; }

    public void At(double thrustN, out Row row)
    {
        double place = Math.Clamp(thrustN * _perNewton, 0, Points - 1);
        int i = Math.Min((int)place, Points - 2);
        double w = place - i;
        FrameEquilibrium a = _at[i];
        FrameEquilibrium b = _at[i + 1];
        row.Roll = a.RollMomentNm + (w * (b.RollMomentNm - a.RollMomentNm));
        row.Yaw = a.YawMomentNm + (w * (b.YawMomentNm - a.YawMomentNm));
        row.Twist = a.TwistRad + (w * (b.TwistRad - a.TwistRad));
        row.Pitch = a.ThrustAngleRad + a.LeanRad + (w * (b.ThrustAngleRad + b.LeanRad - a.ThrustAngleRad - a.LeanRad));
        row.Riser = a.LeftRiserN + a.RightRiserN + (w * (b.LeftRiserN + b.RightRiserN - a.LeftRiserN - a.RightRiserN));
        row.ThrustArm = a.ThrustArmM + (w * (b.ThrustArmM - a.ThrustArmM));
    }

    private static SimulationException TwistsRound(FrameStatics statics, double[] thrust)
    {
        foreach (double t in thrust)
        {
            if (statics.Solve(t) is null)
                return SteadyTurn.TwistsRound(t);
        }
        return SteadyTurn.TwistsRound(thrust[^1]);
    }

    /// <summary>Equilibrium at one thrust: moments N·m, angles rad, tension N, arm m. Pitch is the thrust axis above the horizontal.</summary>
    public struct Row
    {
        public double Roll, Yaw, Twist, Pitch, Riser, ThrustArm;
    }
}
