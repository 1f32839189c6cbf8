using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Tests.Analysis;

/// <summary>A flight straight from the turn equation, for tests that need one property and nothing else (the simulator is for the rest).</summary>
internal sealed record MadeUpFlight
{
    public double ConstantDegPerSec { get; init; }
    /// <summary>Turn at full thrust less turn without thrust, deg/s.</summary>
    public double PowerDegPerSec { get; init; }
    /// <summary>deg/s per full brake on one side.</summary>
    public double BrakeDegPerSec { get; init; } = 40;
    public double[] Powers { get; init; } = [0, 0.6, 1, 0.6, 0, 1, 0.6, 0.05, 1, 0.6, 0, 0.6];
    public double LegSec { get; init; } = 40;
    public bool Gps { get; init; } = true;
    public bool Gyro { get; init; } = true;
    public bool Brakes { get; init; } = true;
    public bool Altitude { get; init; } = true;
    public double GyroSign { get; init; } = 1;
    public double GyroUnit { get; init; } = 1;
    public double GyroBiasDegPerSec { get; init; } = 0.4;
    public double BrakeSign { get; init; } = 1;
    public double NoiseDegPerSec { get; init; } = 0.5;
    public double WindNorth { get; init; } = 3;
    public double LevelFraction { get; init; } = 0.6;
    public ulong Seed { get; init; } = 7;
    /// <summary>Turn while the ballast is out to the right, deg/s; leg 4 has it right, leg 10 left, both with the engine off.</summary>
    public double BallastDegPerSec { get; init; }

    /// <summary>Ballast of 5 kg at 0.472 m: 5 × 0.472/118 = 20 mm of CG shift.</summary>
    public const double BallastKg = 5, BallastArmM = 0.472;
    private static readonly (int Leg, int Side)[] _ballast = [(4, 1), (10, -1)];

    /// <summary>The sheet's legs with the ballast out; without a size they are weight shifts of unknown size.</summary>
    public FoundLeg[] Legs(bool sized = true, double armSign = 1) =>
    [
        .. _ballast.Select(b => new FoundLeg
        {
            Leg = new()
            {
                Start = SheetTime.FromSeconds(b.Leg * LegSec), End = SheetTime.FromSeconds((b.Leg + 1) * LegSec),
                Kind = sized ? SheetLegKind.Ballast : SheetLegKind.WeightShift,
                BallastKg = sized ? BallastKg : null, BallastArmM = sized ? armSign * b.Side * BallastArmM : null,
            },
            StatedStartSec = b.Leg * LegSec, StatedEndSec = (b.Leg + 1) * LegSec, StartSec = b.Leg * LegSec, EndSec = (b.Leg + 1) * LegSec,
            StartFoundIn = ChannelRole.Rpm, EndFoundIn = ChannelRole.Rpm,
        }),
    ];

    public FlightLog Fly()
    {
        var random = new SeededRandom(Seed);
        const double Step = 0.2, Airspeed = 10, LagSec = 1.2, NoiseTauSec = 3;
        int count = (int)(Powers.Length * LegSec / Step);
        double[] time = new double[count], rpm = new double[count], gyro = new double[count], left = new double[count], right = new double[count];
        double[] north = new double[count], east = new double[count], altitude = new double[count];
        double heading = 0.3, turn = 0, noise = 0, height = 400;
        double toRad = Math.PI / 180;
        for (int i = 0; i < count; i++)
        {
            time[i] = i * Step;
            int leg = (int)(time[i] / LegSec);
            double intoLeg = time[i] - (leg * LegSec);
            double power = Powers[leg];
            // The last quarter of every leg is a turn by brake, twice right for once left, so that the flight goes round and wind and brake effect can be found.
            double brake = intoLeg > 0.75 * LegSec ? (leg % 3 == 1 ? -0.2 : 0.2) : 0;
            double wanted = (ConstantDegPerSec + (PowerDegPerSec * power) + (BrakeDegPerSec * brake) + (BallastDegPerSec * _ballast.FirstOrDefault(b => b.Leg == leg).Side)) * toRad;
            rpm[i] = 40 * Math.Sqrt(power);
            gyro[i] = ((turn * GyroSign) + (GyroBiasDegPerSec * toRad) + (0.2 * toRad * random.NextNormal())) * GyroUnit;
            (left[i], right[i]) = BrakeSign > 0 ? (Math.Max(0, -brake), Math.Max(0, brake)) : (Math.Max(0, brake), Math.Max(0, -brake));
            north[i] = (Airspeed * Math.Cos(heading)) + WindNorth + (0.1 * random.NextNormal());
            east[i] = (Airspeed * Math.Sin(heading)) + (0.1 * random.NextNormal());
            altitude[i] = height + (0.3 * random.NextNormal());
            const int Substeps = 10; // what is logged at a sample acts until the next one; the turn follows it finely enough to be continuous
            const double Fine = Step / Substeps;
            for (int k = 0; k < Substeps; k++)
            {
                noise += (-noise / NoiseTauSec * Fine) + (NoiseDegPerSec * toRad * Math.Sqrt(2 * Fine / NoiseTauSec) * random.NextNormal());
                double before = turn;
                turn += (wanted + noise - turn) / LagSec * Fine;
                heading += (turn + before) / 2 * Fine;
            }
            height += 3 * (power - LevelFraction) * Step;
        }
        var columns = new Dictionary<ChannelRole, double[]> { [ChannelRole.Rpm] = rpm };
        if (Gyro)
            columns[ChannelRole.YawRate] = gyro;
        if (Brakes)
            (columns[ChannelRole.BrakeLeft], columns[ChannelRole.BrakeRight]) = (left, right);
        if (Gps)
            (columns[ChannelRole.VelocityNorth], columns[ChannelRole.VelocityEast]) = (north, east);
        if (Altitude)
            columns[ChannelRole.Altitude] = altitude;
        return FlightLog.Create(time, columns);
    }

    /// <summary>The rig of the hand-worked machine with everything measured well; clockwise unless told otherwise.</summary>
    public static Rig Rig(PropellerRotation rotation = PropellerRotation.Clockwise) => new()
    {
        Name = "hand-worked machine",
        Mass = new() { PilotKg = Reading.Measured(88), PowerUnitKg = Reading.Measured(30), PostureM = Reading.Measured(0, 0.005) },
        Carabiners = new() { LeftM = Reading.Measured(-0.22, 0.001), RightM = Reading.Measured(0.22, 0.001) },
        Propeller = new()
        {
            Rotation = rotation,
            DiameterM = 1.25,
            ShaftPowerW = 14_000,
            StaticThrustN = Reading.Measured(600, 15),
            FullPowerRevPerSec = 40,
            ThrustLineM = Reading.Measured(0, 0.003),
        },
    };
}
