namespace TrimFit.Simulation;

/// <summary>Machines, air and sensors drawn at random, for studies of how often an interval holds the truth.</summary>
public static class RandomScenarios
{
    private const double LargestTwistRad = 0.45; // a machine that twists further at full power would not have been flown twice
    private const double AirDensity = 1.225;     // kg/m³, sea level
    private const int MaxDraws = 200;

    /// <summary>Draws a scenario that flies; its legs are the good card. The pilot's knowledge is blurred as stated beside each draw.</summary>
    /// <param name="seed">Seed of the draw and of the flight.</param>
    /// <param name="response">Order of the wing's turn response; its constants are drawn.</param>
    /// <exception cref="SimulationException">No machine that flies was met, which the ranges rule out.</exception>
    public static Scenario Draw(ulong seed, TurnResponse response = TurnResponse.FirstOrder)
    {
        var random = new RandomStream(seed, 101);
        for (int i = 0; i < MaxDraws; i++)
        {
            Scenario s = One(random, seed, response);
            if (new FrameStatics(s).Solve(s.Propeller.FullThrustN * 1.1) is FrameEquilibrium full && Math.Abs(full.TwistRad) < LargestTwistRad)
                return s;
        }
        throw new SimulationException("No machine that flies was met in 200 draws.");
    }

    private static Scenario One(RandomStream r, ulong seed, TurnResponse response)
    {
        double pilot = Between(r, 65, 105);
        double unit = Between(r, 24, 36);
        double weight = (pilot + unit) * Core.Units.PhysicalConstants.StandardGravity;
        double diameter = Between(r, 1.15, 1.35);
        double thrust = Math.Min(Between(r, 450, 750), 0.6 * weight);
        double area = Math.PI / 4 * diameter * diameter;
        double figureOfMerit = Between(r, 0.5, 0.7);
        double power = Math.Pow(thrust, 1.5) / (figureOfMerit * Math.Sqrt(2 * AirDensity * area)); // static actuator disc
        double rev = Between(r, 140, 175) / (Math.PI * diameter); // tip speed, m/s
        double speed = Between(r, 9.5, 13);
        double half = Between(r, 0.19, 0.25);
        double stiffness = Between(r, 35, 110); // N·m/rad
        int rotation = r.Uniform() < 0.5 ? 1 : -1;
        double length = Between(r, 6, 8);
        return new()
        {
            Name = "Machine drawn at random",
            Seed = seed,
            Mass = new()
            {
                PilotKg = pilot,
                PowerUnitKg = unit,
                WingKg = Between(r, 4.5, 7.5),
                PowerUnitLateralM = 0.005 * r.Normal(),
                PostureM = 0.008 * r.Normal(), // nobody measures it
                CgDepthM = Between(r, 0.38, 0.48),
                YawInertiaKgM2 = Between(r, 5, 9),
                SwingDamping = Between(r, 0.15, 0.4),
            },
            Propeller = new()
            {
                Rotation = rotation,
                FullThrustN = thrust,
                FullTorqueNm = power / (Math.Tau * rev),
                FullRevPerSec = rev,
                DiameterM = diameter,
                IdleRatio = Between(r, 0.22, 0.35),
                EngineLagSec = Between(r, 0.3, 0.8),
                HangBackRad = double.DegreesToRadians(Between(r, 0, 9)),
                ThrustLineM = 0.006 * r.Normal(),
                ThrustLineDepthM = Between(r, 0.05, 0.38),
            },
            Geometry = new()
            {
                LeftCarabinerM = -half,
                RightCarabinerM = half,
                FrontShare = Between(r, 0.65, 0.95),
                FrontHangPointsM = 0.006 * r.Normal(),
                RearHangPointsM = 0.006 * r.Normal(),
            },
            Wing = new()
            {
                SensitivityRadPerSecPerM = double.DegreesToRadians(90 * Math.Exp(0.35 * r.Normal())),
                YawRatio = Math.Clamp(1.5 * Math.Exp(0.55 * r.Normal()), 0.5, 4),
                ConstantPullRadPerSec = double.DegreesToRadians(0.8 * r.Normal()),
                LineLengthM = length,
                LineSpreadM = stiffness * length / (weight * half), // bifilar
                TrimSpeedMPerSec = speed,
                GlideSinkMPerSec = speed / Between(r, 4.3, 6),
                Response = response,
                TurnLagSec = Between(r, 0.7, 2.2),
                TurnPeriodSec = Between(r, 4.5, 7),
                TurnDamping = Between(r, 0.4, 0.8),
            },
            Brakes = new() { TurnPerMeter = double.DegreesToRadians(Between(r, 55, 110)) },
            Air = new()
            {
                WindNorthMPerSec = 3 * r.Normal(),
                WindEastMPerSec = 3 * r.Normal(),
                GustMPerSec = Between(r, 0.1, 0.6),
                DisturbanceRadPerSec = double.DegreesToRadians(Between(r, 0.3, 1.2)),
                DisturbanceTauSec = Between(r, 3, 15),
            },
            Start = new() { AltitudeM = Between(r, 250, 900), HeadingRad = Between(r, 0, Math.Tau) },
            Sensors = new()
            {
                GyroBiasRadPerSec = double.DegreesToRadians(0.8 * r.Normal()),
                GyroNoiseRadPerSec = double.DegreesToRadians(Between(r, 0.3, 1.2)),
                GyroVibrationRadPerSec = double.DegreesToRadians(0.2 * r.Normal()),
                GpsVelocityNoiseMPerSec = Between(r, 0.06, 0.25),
            },
            Knowledge = new()
            {
                PowerError = 0.05 * r.Normal(),      // 10 % at 95 %
                CarabinerErrorM = 0.002 * r.Normal(),
                HangPointErrorM = 0.003 * r.Normal(),
                ThrustLineErrorM = 0.003 * r.Normal(),
                HangBackErrorRad = double.DegreesToRadians(0.5 * r.Normal()),
            },
            Legs = TestCards.Alternating(),
        };
    }

    private static double Between(RandomStream r, double low, double high) => low + ((high - low) * r.Uniform());
}
