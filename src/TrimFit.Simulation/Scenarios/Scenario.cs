using System.Collections.Immutable;

namespace TrimFit.Simulation;

/// <summary>Everything that decides a made-up flight: machine, wing, air, pilot, sensors, legs and seed.</summary>
/// <remarks>SI inside; positive is to the seated pilot's right. The same scenario gives the same flight to the last digit.</remarks>
public sealed record Scenario
{
    /// <summary>Word for the schema of a scenario file.</summary>
    public const string Schema = "trimfit-scenario/1";

    /// <summary>Name of the machine and flight.</summary>
    public string Name { get; init; } = "made-up flight";

    /// <summary>Seed of every random number of the flight.</summary>
    public ulong Seed { get; init; } = 1;

    /// <summary>Masses.</summary>
    public MassSetup Mass { get; init; } = new();

    /// <summary>Engine and propeller.</summary>
    public PropellerSetup Propeller { get; init; } = new();

    /// <summary>Carabiners and hang points.</summary>
    public GeometrySetup Geometry { get; init; } = new();

    /// <summary>Wing.</summary>
    public WingSetup Wing { get; init; } = new();

    /// <summary>Brakes.</summary>
    public BrakeSetup Brakes { get; init; } = new();

    /// <summary>Air.</summary>
    public AirSetup Air { get; init; } = new();

    /// <summary>Pilot.</summary>
    public PilotSetup Pilot { get; init; } = new();

    /// <summary>Start.</summary>
    public StartSetup Start { get; init; } = new();

    /// <summary>Sensors.</summary>
    public SensorSuite Sensors { get; init; } = new();

    /// <summary>What the pilot knows of the machine: decides the rig file, not the flight.</summary>
    public RigKnowledge Knowledge { get; init; } = new();

    /// <summary>How the flight is written to files.</summary>
    public OutputSetup Output { get; init; } = new();

    /// <summary>Legs in the order flown.</summary>
    public ImmutableArray<FlightLeg> Legs { get; init; } = [];

    /// <summary>Thrust that just carries the machine level in still air, N.</summary>
    public double LevelThrustN =>
        (Mass.PilotKg + Mass.PowerUnitKg + Mass.WingKg) * Core.Units.PhysicalConstants.StandardGravity * Wing.GlideSinkMPerSec / Wing.TrimSpeedMPerSec;

    /// <summary>Reads a scenario file (TOML, schema <c>trimfit-scenario/1</c>).</summary>
    /// <param name="fileName">Name for messages.</param>
    /// <param name="toml">Text of the file.</param>
    /// <exception cref="ScenarioFormatException">The text is no such file; each line of the message names file, line, what was found and expected.</exception>
    public static Scenario Read(string fileName, string toml) => ScenarioReader.Read(fileName, toml, null);

    /// <summary>The same for a scenario that may name a test card to fly, <c>[flight] card = "card.json"</c>.</summary>
    /// <param name="fileName">Name for messages.</param>
    /// <param name="toml">Text of the file.</param>
    /// <param name="fileText">Text of a file named in the scenario; null when it cannot be read.</param>
    /// <exception cref="ScenarioFormatException">The text is no such file; each line of the message names file, line, what was found and expected.</exception>
    public static Scenario Read(string fileName, string toml, Func<string, string?> fileText)
    {
        ArgumentNullException.ThrowIfNull(fileText);
        return ScenarioReader.Read(fileName, toml, fileText);
    }

    /// <summary>The scenario with both riser carabiners moved by a travel, m, right positive.</summary>
    public Scenario WithCarabinerPair(double travelM) => this with
    {
        Geometry = Geometry with
        {
            LeftCarabinerM = Geometry.LeftCarabinerM + travelM,
            RightCarabinerM = Geometry.RightCarabinerM + travelM,
        },
    };

    /// <summary>The scenario with a spacer under one riser carabiner: a travel to the right moves the right one out, one to the left the left one.</summary>
    public Scenario WithCarabinerOneSide(double travelM) => this with
    {
        Geometry = travelM >= 0
            ? Geometry with { RightCarabinerM = Geometry.RightCarabinerM + travelM }
            : Geometry with { LeftCarabinerM = Geometry.LeftCarabinerM + travelM },
    };

    /// <summary>The scenario with whole suspension bars moved: riser carabiners and front harness hang points.</summary>
    public Scenario WithBarSpacer(double travelM) => WithCarabinerPair(travelM).WithHarnessFront(travelM);

    /// <summary>The scenario with the front harness hang points moved.</summary>
    public Scenario WithHarnessFront(double travelM) => this with
    {
        Geometry = Geometry with { FrontHangPointsM = Geometry.FrontHangPointsM + travelM },
    };

    /// <summary>The scenario with front and rear harness hang points moved.</summary>
    public Scenario WithHarnessFrontRear(double travelM) => this with
    {
        Geometry = Geometry with
        {
            FrontHangPointsM = Geometry.FrontHangPointsM + travelM,
            RearHangPointsM = Geometry.RearHangPointsM + travelM,
        },
    };

    /// <summary>The scenario with the power unit, its CG and its thrust line moved sideways in the frame.</summary>
    public Scenario WithPowerUnit(double travelM) => this with
    {
        Mass = Mass with { PowerUnitLateralM = Mass.PowerUnitLateralM + travelM },
        Propeller = Propeller with { ThrustLineM = Propeller.ThrustLineM + travelM },
    };

    /// <summary>The scenario with the engine turned in plan by an angle, rad.</summary>
    public Scenario WithEngineCant(double angleRad) => this with { Propeller = Propeller with { CantRad = Propeller.CantRad + angleRad } };

    /// <summary>The scenario with the pilot's mass moved so that the CG of everything suspended moves by a shift, m.</summary>
    public Scenario WithCgShift(double shiftM) => this with
    {
        Mass = Mass with { PostureM = Mass.PostureM + (shiftM * (Mass.PilotKg + Mass.PowerUnitKg) / Mass.PilotKg) },
    };

    /// <summary>The mirror image: left and right exchanged in machine, air, sensors and legs. Random deviates are not mirrored.</summary>
    public Scenario Mirrored() => this with
    {
        Mass = Mass with { PowerUnitLateralM = -Mass.PowerUnitLateralM, PostureM = -Mass.PostureM },
        Propeller = Propeller with { Rotation = -Propeller.Rotation, CantRad = -Propeller.CantRad, ThrustLineM = -Propeller.ThrustLineM },
        Geometry = Geometry with
        {
            LeftCarabinerM = -Geometry.RightCarabinerM,
            RightCarabinerM = -Geometry.LeftCarabinerM,
            FrontHangPointsM = -Geometry.FrontHangPointsM,
            RearHangPointsM = -Geometry.RearHangPointsM,
        },
        Wing = Wing with { ConstantPullRadPerSec = -Wing.ConstantPullRadPerSec },
        Air = Air with { WindEastMPerSec = -Air.WindEastMPerSec },
        Start = Start with { HeadingRad = -Start.HeadingRad, LongitudeRad = -Start.LongitudeRad },
        Sensors = Sensors with
        {
            GyroBiasRadPerSec = -Sensors.GyroBiasRadPerSec,
            GyroVibrationRadPerSec = -Sensors.GyroVibrationRadPerSec,
            CompassOffsetRad = -Sensors.CompassOffsetRad,
            BrakeZeroErrorM = -Sensors.BrakeZeroErrorM,
        },
        Legs = [.. Legs.Select(leg => leg with
        {
            BrakeLeftM = leg.BrakeRightM,
            BrakeRightM = leg.BrakeLeftM,
            HeadingRad = -leg.HeadingRad,
            TurnRad = -leg.TurnRad,
            TurnRateRadPerSec = -leg.TurnRateRadPerSec,
            WeightShiftM = -leg.WeightShiftM,
            BallastArmM = -leg.BallastArmM,
            TrimmerLeftM = leg.TrimmerRightM,
            TrimmerRightM = leg.TrimmerLeftM,
        })],
    };
}
