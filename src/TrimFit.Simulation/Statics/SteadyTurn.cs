namespace TrimFit.Simulation;

/// <summary>The turn a scenario settles in: still air, brakes even.</summary>
public static class SteadyTurn
{
    private const double LargestTravelM = 0.25; // beyond a quarter of a metre no machine is built

    /// <summary>Steady turn rate at a thrust, rad/s, right positive.</summary>
    /// <exception cref="SimulationException">The risers twist right round at this thrust.</exception>
    public static double Rate(Scenario s, double thrustN)
    {
        ArgumentNullException.ThrowIfNull(s);
        return Rate(s, new FrameStatics(s), thrustN);
    }

    internal static double Rate(Scenario s, FrameStatics statics, double thrustN)
    {
        FrameEquilibrium frame = At(statics, thrustN);
        return (s.Wing.SensitivityRadPerSecPerM * (frame.RollMomentNm + (s.Wing.YawRatio * frame.YawMomentNm)) / statics.WeightN)
            + s.Wing.ConstantPullRadPerSec + s.Brakes.Turn(0, 0);
    }

    /// <summary>Riser twist at a thrust, rad, right positive.</summary>
    /// <exception cref="SimulationException">The risers twist right round at this thrust.</exception>
    public static double RiserTwist(Scenario s, double thrustN)
    {
        ArgumentNullException.ThrowIfNull(s);
        return At(new FrameStatics(s), thrustN).TwistRad;
    }

    /// <summary>The travel that stops the turn at a thrust when a part is moved, m, right positive; null when none within 0.25 m does.</summary>
    /// <param name="s">The machine.</param>
    /// <param name="thrustN">Thrust, N.</param>
    /// <param name="move">The machine with a travel applied, such as <c>(s, d) => s.WithHarnessFront(d)</c>.</param>
    public static double? NullTravel(Scenario s, double thrustN, Func<Scenario, double, Scenario> move)
    {
        ArgumentNullException.ThrowIfNull(s);
        ArgumentNullException.ThrowIfNull(move);
        double rate0 = Rate(s, thrustN);
        if (rate0 == 0)
            return 0;
        const double probe = 1e-3;
        double slope = (TryRate(move(s, probe), thrustN) - TryRate(move(s, -probe), thrustN)) / (2 * probe);
        double travel = -rate0 / slope;
        double previous = 0;
        double ratePrevious = rate0;
        for (int i = 0; i < 60; i++) // secant; the rate is nearly a straight line in the travel
        {
            if (!(Math.Abs(travel) <= LargestTravelM))
                return null;
            double rate = TryRate(move(s, travel), thrustN);
            if (Math.Abs(travel - previous) < 1e-10)
                return travel;
            double next = travel - (rate * (travel - previous) / (rate - ratePrevious));
            (previous, ratePrevious, travel) = (travel, rate, next);
            if (double.IsNaN(travel))
                return rate == ratePrevious && Math.Abs(rate) < 1e-12 ? previous : null; // both ends of the secant are on zero
        }
        return null;
    }

    internal static FrameEquilibrium At(FrameStatics statics, double thrustN) => statics.Solve(thrustN) ?? throw TwistsRound(thrustN);

    internal static SimulationException TwistsRound(double thrustN) => new(FormattableString.Invariant(
        $"The risers twist right round at a thrust of {thrustN:F0} N: such a machine does not fly. Lower the thrust or its line's offset, or widen line_spread_m."));

    private static double TryRate(Scenario s, double thrustN) =>
        new FrameStatics(s).Solve(thrustN) is null ? double.NaN : Rate(s, thrustN);
}
