using System.Collections.Immutable;
using TrimFit.Core.Ground;

namespace TrimFit.Core.Rigging;

/// <summary>One machine as it hangs under its wing: what the rig file says, with a stated assumption wherever it is silent.</summary>
/// <remarks>Lateral distances are from the frame's centre line, positive to the seated pilot's right; depths are below the riser carabiners.</remarks>
public sealed record Rig
{
    /// <summary>Name of the machine.</summary>
    public string Name { get; init; } = "unnamed machine";

    /// <summary>Foot launch or wheels.</summary>
    public MachineKind Kind { get; init; }

    /// <summary>Seats, 1 or 2.</summary>
    public int Seats { get; init; } = 1;

    /// <summary>Masses and where they sit.</summary>
    public required RigMasses Mass { get; init; }

    /// <summary>Propeller, engine and thrust line.</summary>
    public required RigPropeller Propeller { get; init; }

    /// <summary>Riser carabiners.</summary>
    public required RigCarabiners Carabiners { get; init; }

    /// <summary>Harness hang points.</summary>
    public RigHangPoints HangPoints { get; init; } = new();

    /// <summary>Hang check on two scales; null when it was not done.</summary>
    public RigHangCheck? HangCheck { get; init; }

    /// <summary>Full brake travel, m; null when not given.</summary>
    public double? BrakeFullTravelM { get; init; }

    /// <summary>The wing.</summary>
    public RigWing Wing { get; init; } = new();

    /// <summary>Limits of adjustments by kind; a kind that is missing has no limit given.</summary>
    public ImmutableDictionary<AdjustmentKind, AdjustmentLimit> Limits { get; init; } = ImmutableDictionary<AdjustmentKind, AdjustmentLimit>.Empty;

    /// <summary>What is known about this machine's logger.</summary>
    public LogSettings Log { get; init; } = new();

    /// <summary>Every value that stands in for a missing measurement, in a fixed order.</summary>
    public ImmutableArray<Assumption> Assumptions() => RigAssumptions.Of(this);
}

/// <summary>How the machine starts and rolls.</summary>
public enum MachineKind
{
    /// <summary>Carried on the back.</summary>
    FootLaunch,
    /// <summary>On wheels.</summary>
    Wheels,
}

/// <summary>Masses, kg, and lateral places, m.</summary>
public sealed record RigMasses
{
    /// <summary>Pilot with all that hangs from the harness, kg.</summary>
    public required Reading PilotKg { get; init; }

    /// <summary>Passenger, kg; hangs from the harness like the pilot.</summary>
    public Reading PassengerKg { get; init; } = Reading.Measured(0);

    /// <summary>Power unit without fuel and wheels, kg.</summary>
    public required Reading PowerUnitKg { get; init; }

    /// <summary>Fuel, kg.</summary>
    public Reading FuelKg { get; init; } = Reading.Measured(0);

    /// <summary>Wheels, kg; they belong to the power unit.</summary>
    public Reading WheelsKg { get; init; } = Reading.Measured(0);

    /// <summary>Lateral place of the power unit's CG, m.</summary>
    public Reading PowerUnitLateralM { get; init; } = Reading.Assumed(0, 0.005);

    /// <summary>Lateral place of the fuel, m.</summary>
    public Reading FuelLateralM { get; init; } = Reading.Assumed(0, 0.005);

    /// <summary>Pilot's sideways seat against the harness hang points (y_p0), m. Nobody measures it: 0 with 10 mm.</summary>
    public Reading PostureM { get; init; } = Reading.Assumed(0, 0.010);

    /// <summary>Depth h of the suspended CG below the carabiners, m; default 0.40 (0.30 to 0.50).</summary>
    public Reading CgDepthM { get; init; } = Reading.Assumed(0.40, 0.05);
}

/// <summary>Propeller, engine and thrust line.</summary>
public sealed record RigPropeller
{
    /// <summary>Which way the propeller turns, seen from behind.</summary>
    public required PropellerRotation Rotation { get; init; }

    /// <summary>Diameter, m; null when not given.</summary>
    public double? DiameterM { get; init; }

    /// <summary>Shaft power at full throttle, W; null when not given.</summary>
    public double? ShaftPowerW { get; init; }

    /// <summary>Relative standard deviation of the torque that follows from the power; default 0.05 (10 % at 95 %).</summary>
    public double PowerRelativeSd { get; init; } = 0.05;

    /// <summary>Static thrust at full power, N; null when not given.</summary>
    public Reading? StaticThrustN { get; init; }

    /// <summary>Air density at which the static thrust was read, kg/m³; null is sea level.</summary>
    public double? StaticThrustAirDensity { get; init; }

    /// <summary>Speed of rotation at full power, rev/s, in the sense of <see cref="RpmIs"/>; null when not given.</summary>
    public double? FullPowerRevPerSec { get; init; }

    /// <summary>Hang-back of the thrust axis in the hang test, th0, rad; default 4.5 deg (0 to 9).</summary>
    public Reading HangBackRad { get; init; } = Reading.Assumed(double.DegreesToRadians(4.5), double.DegreesToRadians(2.25));

    /// <summary>Thrust axis turned in plan, rad; positive pushes to the right.</summary>
    public Reading CantRad { get; init; } = Reading.Assumed(0);

    /// <summary>Lateral place of the thrust line, y_T, m; default 0 with 8 mm, P-factor included.</summary>
    public Reading ThrustLineM { get; init; } = Reading.Assumed(0, 0.008);

    /// <summary>Depth h_T of the thrust line below the carabiners, m; default 0.25 (0 to 0.40).</summary>
    public Reading ThrustLineDepthM { get; init; } = Reading.Assumed(0.25, 0.10);

    /// <summary>Static figure of merit, used when the power is not given; default 0.6 (0.45 to 0.75).</summary>
    public Reading FigureOfMerit { get; init; } = Reading.Assumed(0.60, 0.075);

    /// <summary>Pairs of throttle and thrust, both as fractions, throttle increasing; empty when not given.</summary>
    public ImmutableArray<(double Throttle, double Thrust)> ThrottleThrust { get; init; } = [];

    /// <summary>How the engine drives the propeller.</summary>
    public PropellerDrive Drive { get; init; } = PropellerDrive.Unknown;

    /// <summary>Speed of rotation at which the clutch engages, rev/s, in the sense of <see cref="RpmIs"/>.</summary>
    public double? ClutchEngageRevPerSec { get; init; }

    /// <summary>Engine revolutions per propeller revolution; default 1.</summary>
    public double ReductionRatio { get; init; } = 1;

    /// <summary>Which way the crank turns, seen from behind; null when not given.</summary>
    public PropellerRotation? CrankRotation { get; init; }

    /// <summary>Whether gears between crank and propeller reverse the rotation; default yes: one pair of outside gears.</summary>
    public bool GearReverses { get; init; } = true;

    /// <summary>Engine revolutions per propeller revolution, counted by hand; null when not counted.</summary>
    public double? CountedReduction { get; init; }

    /// <summary>Engine revolutions per propeller revolution as written in the file; null when not given.</summary>
    public double? GivenReduction { get; init; }

    /// <summary>What the rpm of this rig and its logs counts.</summary>
    public RpmMeaning RpmIs { get; init; } = RpmMeaning.Propeller;

    /// <summary>Pole pairs of an electric motor, for electrical rpm.</summary>
    public int? PolePairs { get; init; }

    /// <summary>Motor speed constant, rev/s per volt.</summary>
    public double? MotorRevPerSecPerVolt { get; init; }

    /// <summary>+1 clockwise, -1 counter-clockwise, 0 contra-rotating, seen from behind.</summary>
    public int RotationSign => Rotation switch
    {
        PropellerRotation.Clockwise => 1,
        PropellerRotation.CounterClockwise => -1,
        _ => 0,
    };

    /// <summary>Propeller revolutions per revolution as <see cref="RpmIs"/> counts them.</summary>
    public double PropellerTurnsPerLoggedTurn => RpmIs switch
    {
        RpmMeaning.Propeller => 1,
        RpmMeaning.Engine => 1 / ReductionRatio,
        _ => 1.0 / ((PolePairs ?? 1) * ReductionRatio),
    };
}

/// <summary>Sense of rotation seen from behind, looking the way the machine flies.</summary>
public enum PropellerRotation
{
    /// <summary>Clockwise seen from behind.</summary>
    Clockwise,
    /// <summary>Counter-clockwise seen from behind.</summary>
    CounterClockwise,
    /// <summary>Two propellers whose torques cancel.</summary>
    ContraRotating,
}

/// <summary>How the engine drives the propeller.</summary>
public enum PropellerDrive
{
    /// <summary>Not given.</summary>
    Unknown,
    /// <summary>On the crankshaft.</summary>
    Direct,
    /// <summary>By a belt.</summary>
    Belt,
    /// <summary>By gears.</summary>
    Gear,
    /// <summary>Through a centrifugal clutch: no thrust at idle.</summary>
    Clutch,
    /// <summary>Electric motor.</summary>
    Electric,
}

/// <summary>What a logged rpm counts.</summary>
public enum RpmMeaning
{
    /// <summary>The propeller.</summary>
    Propeller,
    /// <summary>The engine's crankshaft.</summary>
    Engine,
    /// <summary>Electrical revolutions of a motor controller.</summary>
    Electrical,
}

/// <summary>Riser carabiners, lateral, m.</summary>
public sealed record RigCarabiners
{
    /// <summary>Left riser carabiner, negative, m.</summary>
    public required Reading LeftM { get; init; }

    /// <summary>Right riser carabiner, positive, m.</summary>
    public required Reading RightM { get; init; }
}

/// <summary>Harness hang points.</summary>
public sealed record RigHangPoints
{
    /// <summary>Share f of the pilot's weight carried by the front pair; default 0.8 (0.65 to 0.95).</summary>
    public Reading FrontShare { get; init; } = Reading.Assumed(0.8, 0.075);

    /// <summary>Mean lateral place of the front pair, m.</summary>
    public Reading FrontOffsetM { get; init; } = Reading.Assumed(0, 0.003);

    /// <summary>Mean lateral place of the rear pair, m.</summary>
    public Reading RearOffsetM { get; init; } = Reading.Assumed(0, 0.003);
}

/// <summary>Readings of two hanging scales, kg.</summary>
public sealed record RigHangCheck
{
    /// <summary>Left scale, kg.</summary>
    public required Reading LeftKg { get; init; }

    /// <summary>Right scale, kg.</summary>
    public required Reading RightKg { get; init; }

    /// <summary>Distance between the carabiners during the check, m; null is the rig's own.</summary>
    public Reading? CarabinerSpacingM { get; init; }

    /// <summary>The single hangs; empty when the file gives one number a side.</summary>
    public ImmutableArray<HangReading> Hangs { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>Readings while the pilot leans to the right, which shows that the scales are not exchanged; null when not done.</summary>
    public HangReading? LeanRight { get; init; }

    /// <summary>The single hangs, or the two numbers as one.</summary>
    public ImmutableArray<HangReading> AllHangs => Hangs.IsEmpty ? [new HangReading(LeftKg.Value, RightKg.Value)] : Hangs;
}

/// <summary>The wing.</summary>
public sealed record RigWing
{
    /// <summary>Name of the wing; empty when not given.</summary>
    public string Name { get; init; } = "";

    /// <summary>Flat area, m²; null when not given.</summary>
    public double? AreaM2 { get; init; }

    /// <summary>Mass m_w without the air inside, kg; default 6 (4.5 to 7.5).</summary>
    public Reading MassKg { get; init; } = Reading.Assumed(6, 0.75);

    /// <summary>Airspeed at trim, m/s; null when not given.</summary>
    public double? TrimSpeedMPerSec { get; init; }

    /// <summary>Sink rate engine off, m/s, positive down; null when not given.</summary>
    public double? GlideSinkMPerSec { get; init; }

    /// <summary>Line length H, m; default 7 (6 to 8).</summary>
    public Reading LineLengthM { get; init; } = Reading.Assumed(7, 0.5);

    /// <summary>b, half of the upper separation of the lines, m; null: b/H = 0.2 (0.12 to 0.26) is assumed.</summary>
    public Reading? LineSpreadM { get; init; }

    /// <summary>Measured yaw stiffness k_chi, N·m/rad; null: bifilar formula.</summary>
    public Reading? YawStiffnessNmPerRad { get; init; }

    /// <summary>Sensitivity the user states, (rad/s) per m of CG offset; null when not given.</summary>
    public Reading? SensitivityRadPerSecPerM { get; init; }
}

/// <summary>Limit of one adjustment.</summary>
/// <param name="Min">Smallest setting, SI, right positive.</param>
/// <param name="Max">Largest setting, SI.</param>
/// <param name="Step">Step in which the part can be set, SI; null when continuous or not given.</param>
public sealed record AdjustmentLimit(double? Min, double? Max, double? Step);

/// <summary>What is known about a machine's logger.</summary>
public sealed record LogSettings
{
    /// <summary>Role to column name and unit, as in <c>--column ROLE=NAME[:UNIT]</c>.</summary>
    public ImmutableArray<ColumnRule> Columns { get; init; } = [];

    /// <summary>Which way the gyro's axes point, such as <c>x forward, y right, z down</c>; null when not given.</summary>
    public string? GyroOrientation { get; init; }
}

/// <summary>The person's word on one column.</summary>
/// <param name="Role">Role the column gets.</param>
/// <param name="Name">Column name in the header.</param>
/// <param name="Unit">Unit, or null when the name or the data decide.</param>
public sealed record ColumnRule(Logs.ChannelRole Role, string Name, string? Unit);

/// <summary>A value the result leans on that nobody measured on this machine.</summary>
/// <param name="Name">Snake-case name, as in the rig file where it has one.</param>
/// <param name="Value">The value in <paramref name="Unit"/>.</param>
/// <param name="Unit">Unit of the edges: mm, deg, kg.</param>
/// <param name="Low95">Lower end of its 95 % range.</param>
/// <param name="High95">Upper end of its 95 % range.</param>
public sealed record Assumption(string Name, double Value, string Unit, double Low95, double High95);
