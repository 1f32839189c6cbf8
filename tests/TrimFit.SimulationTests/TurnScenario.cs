namespace TrimFit.SimulationTests;

/// <summary>Which sensors a made-up flight has.</summary>
internal enum Sensors
{
    /// <summary>Gyro at 10 Hz, ground velocity at 5 Hz, brakes.</summary>
    GyroAndGps,
    /// <summary>Ground velocity at 5 Hz, brakes.</summary>
    Gps5Hz,
    /// <summary>Ground velocity at 1 Hz, brakes.</summary>
    Gps1Hz,
    /// <summary>Ground velocity at 5 Hz and a sheet that says when hands were off; brakes are not logged.</summary>
    Gps5HzAndSheet,
    /// <summary>A telephone: noisy gyro with a wandering bias at 10 Hz, ground velocity at 1 Hz, brakes.</summary>
    PhoneGyro,
}

/// <summary>What a made-up flight has that the estimator does not know of.</summary>
internal enum Hardship
{
    None,
    /// <summary>The disturbance is the sum of a quick and a slow one.</summary>
    TwoTimeScales,
    /// <summary>Thermals: turning gusts of 3 to 8 deg/s for 5 to 15 s, once or twice a minute.</summary>
    Thermals,
    /// <summary>The first 8 % of brake do nothing.</summary>
    BrakeDeadBand,
    /// <summary>Gyro offset of 0.8 deg/s at full speed of rotation, either sign.</summary>
    RotationOffset,
    /// <summary>Each throttle step twists the frame by up to 12 degrees, with its own swing.</summary>
    FrameTwist,
    /// <summary>The pilot holds course with the brakes through every leg.</summary>
    HeldLegs,
    /// <summary>Another simulator altogether: a frame that swings on its risers, curved pull, soft brakes, wind with shear, fixes with delay; the
    /// signals are made from its log with a rig file that is a little wrong (see TrimFit.Simulation).</summary>
    WholeMachine,
}

/// <summary>The numbers behind a made-up flight: the truth an interval should hold.</summary>
internal sealed record TurnScenario
{
    public required bool SecondOrder { get; init; }
    public double LagSec { get; init; }
    public double NaturalFrequency { get; init; }
    public double Damping { get; init; }
    public required double FullThrust { get; init; }
    public required double LevelShare { get; init; }

    /// <summary>rad/s.</summary>
    public required double Constant { get; init; }

    /// <summary>rad/s at full thrust from the linear part.</summary>
    public required double SlopePerFull { get; init; }

    /// <summary>rad/s at full thrust from the square.</summary>
    public required double CurvaturePerFull { get; init; }

    /// <summary>rad/s per unit of brake difference.</summary>
    public required double Brake { get; init; }
    public required double DisturbanceRms { get; init; }
    public required double DisturbanceTau { get; init; }
    public required double GyroNoise { get; init; }
    public required double GyroBias { get; init; }
    public required double RotationOffset { get; init; }
    public required double Twist { get; init; }
    public required double Airspeed { get; init; }
    public required double WindNorth { get; init; }
    public required double WindEast { get; init; }
    public required double VelocityNoise { get; init; }
    public required double GustRms { get; init; }
    public required double GustTau { get; init; }
    public required double WindError { get; init; }
    public double DurationSec { get; init; } = 600;
    public Sensors Sensors { get; init; }
    public Hardship Hardship { get; init; }

    /// <summary>Level-flight thrust, N.</summary>
    public double LevelThrust => LevelShare * FullThrust;

    /// <summary>Turn rate at a share of full thrust, brakes even, rad/s.</summary>
    public double PullAt(double share) => Constant + (SlopePerFull * share) + (CurvaturePerFull * share * share);

    /// <summary>A random machine, pilot, air and logger.</summary>
    public static TurnScenario Random(Gauss random, bool secondOrder, Sensors sensors, Hardship hardship)
    {
        double slope = random.Normal() * Deg(4);
        bool phone = sensors == Sensors.PhoneGyro;
        return new()
        {
            SecondOrder = secondOrder,
            LagSec = random.Between(0.8, 2.5),
            NaturalFrequency = random.Between(0.8, 1.6),
            Damping = random.Between(0.35, 0.9),
            FullThrust = random.Between(450, 800),
            LevelShare = random.Between(0.45, 0.65),
            Constant = random.Normal() * Deg(1.5),
            SlopePerFull = slope,
            CurvaturePerFull = random.Normal() * double.Hypot(0.55 * slope, Deg(1.2)), // as riser twist bends the pull of the rich simulator's machines: root mean square of 3,000 draws
            Brake = Deg(random.Between(25, 60)),
            DisturbanceRms = Deg(1.4 * Math.Exp(0.4 * random.Normal())),
            DisturbanceTau = 7 * Math.Exp(0.5 * random.Normal()),
            GyroNoise = Deg(phone ? random.Between(1, 2.5) : random.Between(0.3, 1.2)),
            GyroBias = random.Normal() * Deg(1.5),
            RotationOffset = hardship == Hardship.RotationOffset ? (random.Uniform() < 0.5 ? -1 : 1) * Deg(0.8) : random.Normal() * Deg(0.4),
            Twist = hardship == Hardship.FrameTwist ? (random.Uniform() < 0.5 ? -1 : 1) * Deg(random.Between(6, 12)) : random.Normal() * Deg(5),
            Airspeed = random.Between(9.5, 13),
            WindNorth = random.Normal() * 3,
            WindEast = random.Normal() * 3,
            VelocityNoise = random.Between(0.05, 0.3),
            GustRms = Deg(2 * Math.Exp(0.4 * random.Normal())),
            GustTau = 8 * Math.Exp(0.4 * random.Normal()),
            WindError = 0.3,
            Sensors = sensors,
            Hardship = hardship,
        };
    }

    private static double Deg(double degrees) => double.DegreesToRadians(degrees);
}

/// <summary>Random numbers with a seed.</summary>
internal sealed class Gauss(int seed)
{
    private readonly Random _random = new(seed);

    public double Uniform() => _random.NextDouble();

    public double Between(double low, double high) => low + ((high - low) * _random.NextDouble());

    /// <summary>Standard normal, Box and Muller 1958.</summary>
    public double Normal() => Math.Sqrt(-2 * Math.Log(1 - _random.NextDouble())) * Math.Cos(Math.Tau * _random.NextDouble());
}
