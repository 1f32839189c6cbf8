using System.Collections.Immutable;
using TrimFit.Core.Ground;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Import.Toml;

namespace TrimFit.Import.Rigs;

/// <summary>Reads a rig file (TOML, schema <c>trimfit-rig/1</c>).</summary>
/// <remarks>A reading is a number, a list of repeats or <c>{ value = 10, plus_minus = 2 }</c>, in which <c>plus_minus</c> is half of the 95 % range
/// (standard deviation = plus_minus/1.96). Repeats give their mean with s/√n, never less than half of what one reading is taken for; a bare
/// number has the customary spread of its kind. Diameter, rotation speeds, wing area, speeds, brake travel and air density keep the value
/// only: the statics carry no spread for them.</remarks>
public static class RigFileReader
{
    /// <summary>The schema this program reads.</summary>
    public const string Schema = "trimfit-rig/1";

    /// <summary>Reads the text of a rig file.</summary>
    /// <param name="fileName">Name for messages; a folder in it is left out.</param>
    /// <param name="tomlText">The whole file.</param>
    /// <exception cref="LogFormatException">The text has faults; the message has a line for each.</exception>
    public static Rig Read(string fileName, string tomlText)
    {
        ArgumentNullException.ThrowIfNull(fileName);
        ArgumentNullException.ThrowIfNull(tomlText);
        var faults = new FaultList(Path.GetFileName(fileName));
        TomlTable root = TomlDocument.Read(tomlText, faults);
        faults.ThrowIfAny();
        SchemaLine.Check(root, Schema, faults);
        faults.ThrowIfAny(); // the keys of another schema mean other things
        Rig? rig = new RigTables(root, faults).Read();
        faults.ThrowIfAny();
        return rig!; // null only beside a fault
    }

    /// <summary>Reads a rig file from disk, UTF-8.</summary>
    /// <exception cref="LogFormatException">The file cannot be opened or has faults.</exception>
    public static Rig ReadFile(string path) => Read(path, SettingsFile.ReadText(path));
}

/// <summary>The tables of one rig file on their way to a <see cref="Rig"/>.</summary>
internal sealed class RigTables
{
    private const double MmPerM = 1000, SecondsPerMinute = 60;

    private static readonly Dictionary<AdjustmentKind, (string Name, string Unit, double ToSi)> _adjustments = new()
    {
        [AdjustmentKind.CarabinerPair] = ("carabiner_pair", "mm", 1 / MmPerM),
        [AdjustmentKind.CarabinerOneSide] = ("carabiner_one_side", "mm", 1 / MmPerM),
        [AdjustmentKind.BarSpacer] = ("bar_spacer", "mm", 1 / MmPerM),
        [AdjustmentKind.HarnessFront] = ("harness_front", "mm", 1 / MmPerM),
        [AdjustmentKind.HarnessFrontRear] = ("harness_front_rear", "mm", 1 / MmPerM),
        [AdjustmentKind.PowerUnit] = ("power_unit", "mm", 1 / MmPerM),
        [AdjustmentKind.EngineCant] = ("engine_cant", "deg", Math.PI / 180),
        [AdjustmentKind.Ballast] = ("ballast", "kg", 1),
        [AdjustmentKind.Trimmer] = ("trimmer", "mm", 1 / MmPerM),
        [AdjustmentKind.BrakeLine] = ("brake_line", "mm", 1 / MmPerM),
    };

    private static readonly string[] _thrustTestKeys = ["pull_kg", "temperature_c", "height_m"];

    private readonly FaultList _faults;
    private readonly TableReader _root, _machine, _mass, _propeller, _carabiners, _hangPoints, _hangCheck, _brakes, _weighing, _thrustTest, _wing, _limits, _log;

    public RigTables(TomlTable root, FaultList faults)
    {
        _faults = faults;
        _root = new(root, "", faults);
        _machine = Table("machine");
        _mass = Table("mass");
        _propeller = Table("propeller");
        _carabiners = Table("carabiners");
        _hangPoints = Table("hang_points");
        _hangCheck = Table("hang_check");
        _brakes = Table("brakes");
        _weighing = Table("weighing");
        _thrustTest = Table("thrust_test");
        _wing = Table("wing");
        _limits = Table("limits");
        _log = Table("log");
    }

    public Rig? Read()
    {
        _root.Item("schema");
        string? name = _root.Text("name", "my machine");
        MachineKind kind = _machine.Word("kind", ("foot_launch", MachineKind.FootLaunch), ("wheels", MachineKind.Wheels)) ?? MachineKind.FootLaunch;
        double seats = _machine.Number("seats", new(1, 2, "", "A machine has seats = 1 or seats = 2.")) ?? 1;
        if (seats is not (1 or 2))
            _faults.Add(_machine.LineOf("seats"), $"{_machine.Item("seats")!.Found} for seats", "1 or 2", "Write seats = 1 or seats = 2.");

        RigMasses? mass = Masses(kind, (int)seats);
        RigPropeller? propeller = Propeller();
        RigCarabiners? carabiners = Carabiners();
        RigHangPoints hangPoints = HangPoints(mass);
        RigHangCheck? hangCheck = HangCheck();
        Reading? brakeTravel = Scaled(_brakes, "full_travel_mm", Ranges.BrakeTravelMm, ReadingSpread.None, 1 / MmPerM);
        RigWing wing = Wing();
        ImmutableDictionary<AdjustmentKind, AdjustmentLimit> limits = Limits();
        LogSettings log = Log();

        TableReader[] tables = [_machine, _mass, _propeller, _carabiners, _hangPoints, _hangCheck, _brakes, _weighing, _thrustTest, _wing];
        foreach (TableReader table in tables)
            table.ReportUnknown(key => tables.FirstOrDefault(other => other != table && other.Known.Contains(key))?.Label.Trim('[', ']'));
        _root.ReportUnknown(key => tables.FirstOrDefault(other => other.Known.Contains(key))?.Label.Trim('[', ']'));

        if (mass is null || propeller is null || carabiners is null)
            return null;
        return new()
        {
            Name = name ?? "unnamed machine",
            Kind = kind,
            Seats = (int)seats,
            Mass = mass,
            Propeller = propeller,
            Carabiners = carabiners,
            HangPoints = hangPoints,
            HangCheck = hangCheck,
            BrakeFullTravelM = brakeTravel?.Value,
            Wing = wing,
            Limits = limits,
            Log = log,
        };
    }

    private RigMasses? Masses(MachineKind kind, int seats)
    {
        Reading? pilot = Needed(_mass, "pilot_kg", Ranges.PilotKg, ReadingSpread.MassKg, 1, "the pilot with all that hangs from the harness", "90");
        Reading? powerUnit = Needed(_mass, "power_unit_kg", Ranges.PowerUnitKg, ReadingSpread.MassKg, 1, "the power unit without fuel and wheels", "28");
        Reading? passenger = Scaled(_mass, "passenger_kg", Ranges.PassengerKg, ReadingSpread.MassKg, 1);
        Reading? fuel = Scaled(_mass, "fuel_kg", Ranges.FuelKg, ReadingSpread.MassKg, 1);
        Reading? wheels = Scaled(_mass, "wheels_kg", Ranges.WheelsKg, ReadingSpread.MassKg, 1);
        Reading? lateral = Scaled(_mass, "power_unit_lateral_mm", Ranges.LateralMm, ReadingSpread.LateralMm, 1 / MmPerM);
        Reading? fuelLateral = Scaled(_mass, "fuel_lateral_mm", Ranges.LateralMm, ReadingSpread.LateralMm, 1 / MmPerM);
        Reading? depth = Scaled(_mass, "cg_depth_mm", Ranges.DepthMm, ReadingSpread.DepthMm, 1 / MmPerM);
        if (passenger is { Value: > 0 } && seats == 1)
            _faults.Add(_mass.LineOf("passenger_kg"), "a passenger on a machine with one seat", "seats = 2 in [machine]", "Add seats = 2 or leave passenger_kg out.");
        if (wheels is { Value: > 0 } && kind == MachineKind.FootLaunch)
            _faults.Add(_mass.LineOf("wheels_kg"), "wheels on a foot-launched machine", "kind = \"wheels\" in [machine]", "Add kind = \"wheels\" or leave wheels_kg out.");
        Reading? weighed = WeighedLateral();
        if (weighed is not null && lateral is not null)
            _faults.Add(_mass.LineOf("power_unit_lateral_mm"), "power_unit_lateral_mm beside [weighing]", "one of the two", "Leave power_unit_lateral_mm out; the two scales give it.");
        if (pilot is null || powerUnit is null)
            return null;
        var assumed = new RigMasses { PilotKg = pilot.Value, PowerUnitKg = powerUnit.Value };
        return assumed with
        {
            PassengerKg = passenger ?? assumed.PassengerKg,
            FuelKg = fuel ?? assumed.FuelKg,
            WheelsKg = wheels ?? assumed.WheelsKg,
            PowerUnitLateralM = weighed ?? lateral ?? assumed.PowerUnitLateralM,
            FuelLateralM = fuelLateral ?? assumed.FuelLateralM,
            CgDepthM = depth ?? assumed.CgDepthM,
        };
    }

    /// <summary>The power unit's CG off two scales under the frame: spacing (R - L)/(2 (R + L)), with first-order propagation of the three spreads.</summary>
    private Reading? WeighedLateral()
    {
        string[] keys = ["power_unit_left_kg", "power_unit_right_kg", "scale_spacing_mm"];
        Reading? left = Scaled(_weighing, keys[0], Ranges.ScaleKg, ReadingSpread.ScaleKg, 1);
        Reading? right = Scaled(_weighing, keys[1], Ranges.ScaleKg, ReadingSpread.ScaleKg, 1);
        Reading? spacing = Scaled(_weighing, keys[2], Ranges.ScaleSpacingMm, ReadingSpread.SpacingMm, 1 / MmPerM);
        string[] missing = [.. keys.Where(key => _weighing.Item(key) is null)];
        if (missing.Length is 1 or 2)
            _faults.Add(_weighing.Line, $"[weighing] without {string.Join(" and ", missing)}", "both scales and their spacing", "Add the missing reading.");
        if (left is not { } l || right is not { } r || spacing is not { } s)
            return null;
        double sum = l.Value + r.Value;
        if (!(sum > 0))
        {
            _faults.Add(_weighing.LineOf(keys[0]), "two empty scales", "the weight of the power unit on them", "Weigh again.");
            return null;
        }
        double lateral = s.Value * (r.Value - l.Value) / (2 * sum);
        double byLeft = s.Value * r.Value / (sum * sum) * l.StandardDeviation;
        double byRight = s.Value * l.Value / (sum * sum) * r.StandardDeviation;
        double bySpacing = lateral / s.Value * s.StandardDeviation;
        return Reading.Measured(lateral, Math.Sqrt((byLeft * byLeft) + (byRight * byRight) + (bySpacing * bySpacing)));
    }

    private RigPropeller? Propeller()
    {
        PropellerRotation? rotation = _propeller.Word("rotation", ("clockwise", PropellerRotation.Clockwise),
            ("counter-clockwise", PropellerRotation.CounterClockwise), ("contra-rotating", PropellerRotation.ContraRotating));
        if (_propeller.Item("rotation") is null)
            _faults.Add(_propeller.Line, Without(_propeller, "rotation"), "which way the propeller turns", "Stand behind the machine, look the way it flies, and write rotation = \"clockwise\" or \"counter-clockwise\".");
        Reading? diameter = Scaled(_propeller, "diameter_m", Ranges.DiameterM, ReadingSpread.None, 1);
        Reading? power = Scaled(_propeller, "shaft_power_kw", Ranges.ShaftPowerKw, ReadingSpread.None, 1000);
        double? powerPercent = _propeller.Number("power_uncertainty_percent", Ranges.Percent);
        if (powerPercent is not null && power is null && _propeller.Item("shaft_power_kw") is null)
            _faults.Add(_propeller.LineOf("power_uncertainty_percent"), "power_uncertainty_percent without shaft_power_kw", "the power it belongs to", "Add shaft_power_kw or leave power_uncertainty_percent out.");
        if (powerPercent is not null && power is { StandardDeviation: > 0 })
            _faults.Add(_propeller.LineOf("power_uncertainty_percent"), "power_uncertainty_percent beside a shaft_power_kw with its own spread", "one of the two", "Leave power_uncertainty_percent out.");
        Reading? thrust = Scaled(_propeller, "static_thrust_n", Ranges.ThrustN, ReadingSpread.Thrust, 1);
        Reading? density = Scaled(_propeller, "static_thrust_air_density", Ranges.AirDensity, ReadingSpread.None, 1);
        if (PulledThrust() is (Reading pulled, double testDensity))
        {
            if (_propeller.Item("static_thrust_n") is not null)
                _faults.Add(_propeller.LineOf("static_thrust_n"), "static_thrust_n beside [thrust_test]", "one of the two", "Leave static_thrust_n out; the pull gives it.");
            if (_propeller.Item("static_thrust_air_density") is not null)
                _faults.Add(_propeller.LineOf("static_thrust_air_density"), "static_thrust_air_density beside [thrust_test]", "one of the two", "Leave it out; temperature and height of the test give it.");
            (thrust, density) = (pulled, Reading.Measured(testDensity));
        }
        Reading? fullPower = Scaled(_propeller, "full_power_rpm", Ranges.Rpm, ReadingSpread.None, 1 / SecondsPerMinute);
        Reading? hangBack = Scaled(_propeller, "hang_back_deg", Ranges.HangBackDeg, ReadingSpread.AngleDeg, Math.PI / 180);
        Reading? cant = Scaled(_propeller, "cant_deg", Ranges.CantDeg, ReadingSpread.AngleDeg, Math.PI / 180);
        Reading? line = Scaled(_propeller, "thrust_line_mm", Ranges.LateralMm, ReadingSpread.ThrustLineMm, 1 / MmPerM);
        Reading? lineDepth = Scaled(_propeller, "thrust_line_depth_mm", Ranges.ThrustDepthMm, ReadingSpread.DepthMm, 1 / MmPerM);
        Reading? merit = Scaled(_propeller, "figure_of_merit", Ranges.FigureOfMerit, ReadingSpread.FigureOfMerit, 1);
        PropellerDrive drive = _propeller.Word("drive", ("direct", PropellerDrive.Direct), ("belt", PropellerDrive.Belt), ("gear", PropellerDrive.Gear),
            ("clutch", PropellerDrive.Clutch), ("electric", PropellerDrive.Electric)) ?? PropellerDrive.Unknown;
        Reading? clutch = Scaled(_propeller, "clutch_engage_rpm", Ranges.Rpm, ReadingSpread.None, 1 / SecondsPerMinute);
        Reading? ratio = Scaled(_propeller, "reduction_ratio", Ranges.ReductionRatio, ReadingSpread.None, 1);
        PropellerRotation? crank = _propeller.Word("crank_rotation", ("clockwise", PropellerRotation.Clockwise), ("counter-clockwise", PropellerRotation.CounterClockwise));
        bool gearReverses = Flag(_propeller, "gear_reverses") ?? true;
        double? counted = CountedReduction();
        RpmMeaning rpmIs = _propeller.Word("rpm_is", ("propeller", RpmMeaning.Propeller), ("engine", RpmMeaning.Engine),
            ("electrical", RpmMeaning.Electrical)) ?? RpmMeaning.Propeller;
        double? polePairs = _propeller.Number("pole_pairs", Ranges.PolePairs);
        if (polePairs is double pairs && pairs != Math.Floor(pairs))
            _faults.Add(_propeller.LineOf("pole_pairs"), $"{_propeller.Item("pole_pairs")!.Found} for pole_pairs", "a whole number", "Count the magnets and divide by two.");
        if (rpmIs == RpmMeaning.Electrical && _propeller.Item("pole_pairs") is null)
            _faults.Add(_propeller.LineOf("rpm_is"), "rpm_is = \"electrical\" without pole_pairs", "the motor's pole pairs", "Add pole_pairs: the number of magnets divided by two.");
        if (rpmIs == RpmMeaning.Engine && _propeller.Item("reduction_ratio") is null && _propeller.Item("crank_turns") is null && drive != PropellerDrive.Direct)
            _faults.Add(_propeller.LineOf("rpm_is"), "rpm_is = \"engine\" without reduction_ratio", "engine turns per propeller turn", "Add reduction_ratio, or drive = \"direct\" when the propeller sits on the crankshaft.");
        Reading? kv = Scaled(_propeller, "motor_kv", Ranges.MotorKv, ReadingSpread.None, 1 / SecondsPerMinute);
        ImmutableArray<(double Throttle, double Thrust)> table = ThrottleThrust();
        if (rotation is null)
            return null;
        var assumed = new RigPropeller { Rotation = rotation.Value };
        double powerRelativeSd = power is { StandardDeviation: > 0 } spread ? spread.StandardDeviation / spread.Value
            : powerPercent is double percent ? percent / 100 / ReadingSpread.HalfWidthsPerSd
            : assumed.PowerRelativeSd;
        return assumed with
        {
            DiameterM = diameter?.Value,
            ShaftPowerW = power?.Value,
            PowerRelativeSd = powerRelativeSd,
            StaticThrustN = thrust,
            StaticThrustAirDensity = density?.Value,
            FullPowerRevPerSec = fullPower?.Value,
            HangBackRad = hangBack ?? assumed.HangBackRad,
            CantRad = cant ?? assumed.CantRad,
            ThrustLineM = line ?? assumed.ThrustLineM,
            ThrustLineDepthM = lineDepth ?? assumed.ThrustLineDepthM,
            FigureOfMerit = merit ?? assumed.FigureOfMerit,
            ThrottleThrust = table,
            Drive = drive,
            ClutchEngageRevPerSec = clutch?.Value,
            ReductionRatio = ratio?.Value ?? counted ?? assumed.ReductionRatio,
            GivenReduction = ratio?.Value,
            CountedReduction = counted,
            CrankRotation = crank,
            GearReverses = gearReverses,
            RpmIs = rpmIs,
            PolePairs = (int?)polePairs,
            MotorRevPerSecPerVolt = kv?.Value,
        };
    }

    /// <summary>Crank turns over propeller turns, counted with the plug out.</summary>
    private double? CountedReduction()
    {
        double? crank = _propeller.Number("crank_turns", Ranges.Turns), propeller = _propeller.Number("propeller_turns", Ranges.Turns);
        if ((_propeller.Item("crank_turns") is null) != (_propeller.Item("propeller_turns") is null))
        {
            string missing = crank is null ? "propeller_turns without crank_turns" : "crank_turns without propeller_turns";
            _faults.Add(_propeller.LineOf(crank is null ? "propeller_turns" : "crank_turns"), missing, "both counts", "Add the missing count.");
        }
        return crank / propeller;
    }

    /// <summary>Thrust off a scale in the tether, and the density of the air it was pulled in.</summary>
    private (Reading Thrust, double Density)? PulledThrust()
    {
        Reading? pull = Scaled(_thrustTest, "pull_kg", Ranges.PullKg, ReadingSpread.Thrust, 1);
        double? temperature = _thrustTest.Number("temperature_c", Ranges.TemperatureC), height = _thrustTest.Number("height_m", Ranges.HeightM);
        double rope = _thrustTest.Number("rope_angle_deg", Ranges.RopeAngleDeg) ?? 0;
        string[] missing = [.. _thrustTestKeys.Where(key => _thrustTest.Item(key) is null)];
        if (_thrustTest.Exists && missing.Length > 0)
            _faults.Add(_thrustTest.Line, $"[thrust_test] without {string.Join(" and ", missing)}", "pull, air temperature and height above the sea", "Add the missing reading or leave the table out.");
        if (pull is not { } p || temperature is not double t || height is not double h)
            return null;
        double newtonsPerKg = StaticThrust.FromPull(1, double.DegreesToRadians(rope));
        return (Reading.Measured(p.Value * newtonsPerKg, p.StandardDeviation * newtonsPerKg), StaticThrust.AirDensity(t, h));
    }

    private bool? Flag(TableReader table, string key)
    {
        if (table.Item(key) is not TomlItem item)
            return null;
        if (item.Value is bool flag)
            return flag;
        _faults.Add(item.Line, $"{item.Found} for {key}", "true or false", $"Write {key} = false, without quotes.");
        return null;
    }

    private ImmutableArray<(double Throttle, double Thrust)> ThrottleThrust()
    {
        const string Key = "throttle_thrust_percent", Example = "Write throttle_thrust_percent = [[0, 0], [50, 30], [100, 100]].";
        TomlItem? item = _propeller.Item(Key);
        if (item is null)
            return [];
        var pairs = ImmutableArray.CreateBuilder<(double Throttle, double Thrust)>();
        foreach (object row in item.Value is TomlList rows ? rows.Items : [])
        {
            if (row is not TomlList { Items: [double throttle, double thrust] } || !(throttle is >= 0 and <= 100) || !(thrust is >= 0 and <= 120))
            {
                _faults.Add(item.Line, $"{TomlItem.Describe(row)} in {Key}", "pairs of throttle % (0 to 100) and thrust % (0 to 120)", Example);
                return [];
            }
            if (pairs.Count > 0 && !(throttle / 100 > pairs[^1].Throttle && thrust / 100 >= pairs[^1].Thrust))
            {
                _faults.Add(item.Line, FormattableString.Invariant($"the pair [{throttle}, {thrust}] after [{pairs[^1].Throttle * 100:0.###}, {pairs[^1].Thrust * 100:0.###}] in {Key}"), "throttle that increases and thrust that does not fall", "Put the pairs in order.");
                return [];
            }
            pairs.Add((throttle / 100, thrust / 100));
        }
        if (pairs.Count < 2)
            _faults.Add(item.Line, $"{item.Found} for {Key}", "at least two pairs of throttle % and thrust %", Example);
        return pairs.ToImmutable();
    }

    private RigCarabiners? Carabiners()
    {
        Reading? left = Side("left_mm", -1, "negative", "-210");
        Reading? right = Side("right_mm", +1, "positive", "210");
        return left is null || right is null ? null : new() { LeftM = left.Value, RightM = right.Value };
    }

    private Reading? Side(string key, int sign, string word, string example)
    {
        TomlItem? item = _carabiners.Item(key);
        if (item is null)
        {
            string side = sign < 0 ? "left" : "right";
            _faults.Add(_carabiners.Line, Without(_carabiners, key), $"the {side} riser carabiner from the frame's centre line, mm, {word}", $"Measure it and write {key} = {example}.");
            return null;
        }
        int before = _faults.Count;
        Reading? reading = Scaled(_carabiners, key, Ranges.CarabinerMm, ReadingSpread.LateralMm, 1 / MmPerM);
        if (reading is { } r && Math.Sign(r.Value) != sign && _faults.Count == before)
        {
            _faults.Add(item.Line, $"{Millimeters(r)} for {key}", $"a {word} number", "Positive is to the seated pilot's right; swap the two carabiners or the sign.");
            return null;
        }
        if (reading is { } small && Math.Abs(small.Value) < 0.05)
        {
            _faults.Add(item.Line, $"{Millimeters(small)} for {key}", "at least 50 mm from the centre line", "Give millimetres.");
            return null;
        }
        return reading;
    }

    private static string Millimeters(Reading reading) => FormattableString.Invariant($"{reading.Value * MmPerM:0.###}");

    private RigHangPoints HangPoints(RigMasses? mass)
    {
        var assumed = new RigHangPoints();
        Reading? share = Scaled(_hangPoints, "front_share", Ranges.Share, ReadingSpread.Share, 1);
        Reading? front = Scaled(_hangPoints, "front_offset_mm", Ranges.LateralMm, ReadingSpread.LateralMm, 1 / MmPerM);
        Reading? rear = Scaled(_hangPoints, "rear_offset_mm", Ranges.LateralMm, ReadingSpread.LateralMm, 1 / MmPerM);
        front = Pair("front", front);
        rear = Pair("rear", rear);
        Reading? strap = Scaled(_weighing, "rear_strap_kg", Ranges.RearStrapKg, ReadingSpread.ScaleKg, 1);
        if (strap is { } r)
        {
            if (share is not null)
                _faults.Add(_hangPoints.LineOf("front_share"), "front_share beside rear_strap_kg in [weighing]", "one of the two", "Leave front_share out; the rear strap's scale gives it.");
            if (mass is not null)
            {
                // What hangs from the harness is carried by the front hang points less what the rear straps carry.
                double hanging = mass.PilotKg.Value + mass.PassengerKg.Value;
                double rearShare = r.Value / hanging;
                if (rearShare >= 1)
                {
                    _faults.Add(_weighing.LineOf("rear_strap_kg"), FormattableString.Invariant($"{r.Value:0.###} kg in the rear straps"), FormattableString.Invariant($"less than the {hanging:0.###} kg that hang from the harness"), "Weigh again, both rear straps together.");
                    return assumed;
                }
                double massSd = Math.Sqrt(Math.Pow(mass.PilotKg.StandardDeviation, 2) + Math.Pow(mass.PassengerKg.StandardDeviation, 2));
                share = Reading.Measured(1 - rearShare, Math.Sqrt(Math.Pow(r.StandardDeviation, 2) + Math.Pow(rearShare * massSd, 2)) / hanging);
            }
        }
        return new()
        {
            FrontShare = share ?? assumed.FrontShare,
            FrontOffsetM = front ?? assumed.FrontOffsetM,
            RearOffsetM = rear ?? assumed.RearOffsetM,
        };
    }

    /// <summary>Mean place of a left and a right harness hang point; null without them.</summary>
    private Reading? Pair(string which, Reading? offset)
    {
        string leftKey = $"{which}_left_mm", rightKey = $"{which}_right_mm", offsetKey = $"{which}_offset_mm";
        Reading? left = Scaled(_hangPoints, leftKey, Ranges.CarabinerMm, ReadingSpread.LateralMm, 1 / MmPerM);
        Reading? right = Scaled(_hangPoints, rightKey, Ranges.CarabinerMm, ReadingSpread.LateralMm, 1 / MmPerM);
        if (_hangPoints.Item(leftKey) is null && _hangPoints.Item(rightKey) is null)
            return offset;
        if (_hangPoints.Item(leftKey) is null || _hangPoints.Item(rightKey) is null)
            _faults.Add(_hangPoints.Line, $"[hang_points] with only one of {leftKey} and {rightKey}", "both harness hang points of the pair", "Add the missing reading.");
        if (offset is not null)
            _faults.Add(_hangPoints.LineOf(offsetKey), $"{offsetKey} beside {leftKey} and {rightKey}", "one of the two", $"Leave {offsetKey} out; the two places give it.");
        if (left is not { } l || right is not { } r)
            return null;
        if (l.Value >= r.Value)
        {
            _faults.Add(_hangPoints.LineOf(leftKey), $"{Millimeters(l)} for {leftKey} and {Millimeters(r)} for {rightKey}", "the left one left of the right one", "Positive is to the seated pilot's right, so the left one is usually negative; swap the two or the sign.");
            return null;
        }
        return Reading.Measured((l.Value + r.Value) / 2, Math.Sqrt((l.StandardDeviation * l.StandardDeviation) + (r.StandardDeviation * r.StandardDeviation)) / 2);
    }

    private RigHangCheck? HangCheck()
    {
        Reading? left = Scaled(_hangCheck, "left_kg", Ranges.HangKg, ReadingSpread.ScaleKg, 1);
        Reading? right = Scaled(_hangCheck, "right_kg", Ranges.HangKg, ReadingSpread.ScaleKg, 1);
        Reading? spacing = Scaled(_hangCheck, "carabiner_spacing_mm", Ranges.SpacingMm, ReadingSpread.SpacingMm, 1 / MmPerM);
        if (_hangCheck.HasItems && (_hangCheck.Item("left_kg") is null || _hangCheck.Item("right_kg") is null))
            _faults.Add(_hangCheck.Line, $"[hang_check] without {(_hangCheck.Item("left_kg") is null ? "left_kg" : "right_kg")}", "the readings of both scales, kg", "Add the missing reading or leave the table out.");
        var hangs = ImmutableArray.CreateBuilder<HangReading>();
        AddHangs(hangs, "left_kg", "right_kg", exchanged: false);
        AddHangs(hangs, "exchanged_left_kg", "exchanged_right_kg", exchanged: true);
        Reading? leanLeft = Scaled(_hangCheck, "lean_right_left_kg", Ranges.HangKg, ReadingSpread.ScaleKg, 1);
        Reading? leanRight = Scaled(_hangCheck, "lean_right_right_kg", Ranges.HangKg, ReadingSpread.ScaleKg, 1);
        if ((_hangCheck.Item("lean_right_left_kg") is null) != (_hangCheck.Item("lean_right_right_kg") is null))
            _faults.Add(_hangCheck.Line, "one reading of the lean to the right", "lean_right_left_kg and lean_right_right_kg", "Add the missing reading.");
        return left is null || right is null ? null : new()
        {
            LeftKg = left.Value,
            RightKg = right.Value,
            CarabinerSpacingM = spacing,
            Hangs = hangs.ToImmutable(),
            LeanRight = leanLeft is { } l && leanRight is { } r ? new HangReading(l.Value, r.Value) : null,
        };
    }

    /// <summary>Hangs whose left and right readings belong together: two lists of one length, or two plain numbers with the scales exchanged.</summary>
    private void AddHangs(ImmutableArray<HangReading>.Builder hangs, string leftKey, string rightKey, bool exchanged)
    {
        double[] left = Numbers(leftKey), right = Numbers(rightKey);
        if (exchanged && left.Length != right.Length)
        {
            _faults.Add(_hangCheck.LineOf(left.Length > 0 ? leftKey : rightKey), $"{left.Length} readings for {leftKey} and {right.Length} for {rightKey}", "one of each for every hang", "Add the missing reading.");
            return;
        }
        // Lists of different length, or a number with its spread, stay as the one mean that they are.
        if (left.Length != right.Length || (!exchanged && left.Length < 2))
            return;
        for (int i = 0; i < left.Length; i++)
            hangs.Add(new(left[i], right[i], exchanged));
    }

    private double[] Numbers(string key)
    {
        if (_hangCheck.Item(key) is not TomlItem item || Scaled(_hangCheck, key, Ranges.HangKg, ReadingSpread.ScaleKg, 1) is not Reading whole)
            return [];
        return item.Value switch
        {
            TomlList list => [.. list.Items.OfType<double>()],
            double => [whole.Value],
            _ => [],
        };
    }

    private RigWing Wing()
    {
        var assumed = new RigWing();
        string? name = _wing.Text("name", "my wing");
        Reading? area = Scaled(_wing, "area_m2", Ranges.WingAreaM2, ReadingSpread.None, 1);
        Reading? mass = Scaled(_wing, "mass_kg", Ranges.WingKg, ReadingSpread.WingMass, 1);
        Reading? speed = Scaled(_wing, "trim_speed_m_s", Ranges.SpeedMPerSec, ReadingSpread.None, 1);
        Reading? sink = Scaled(_wing, "glide_sink_m_s", Ranges.SinkMPerSec, ReadingSpread.None, 1);
        Reading? length = Scaled(_wing, "line_length_m", Ranges.LineLengthM, ReadingSpread.LineLength, 1);
        Reading? spread = Scaled(_wing, "line_spread_m", Ranges.LineSpreadM, ReadingSpread.LineLength, 1);
        Reading? stiffness = Scaled(_wing, "yaw_stiffness_nm_per_rad", Ranges.YawStiffness, ReadingSpread.YawStiffness, 1);
        Reading? sensitivity = Scaled(_wing, "sensitivity_deg_s_per_mm", Ranges.Sensitivity, ReadingSpread.Sensitivity, Math.PI / 180 * MmPerM);
        return new()
        {
            Name = name ?? assumed.Name,
            AreaM2 = area?.Value,
            MassKg = mass ?? assumed.MassKg,
            TrimSpeedMPerSec = speed?.Value,
            GlideSinkMPerSec = sink?.Value,
            LineLengthM = length ?? assumed.LineLengthM,
            LineSpreadM = spread,
            YawStiffnessNmPerRad = stiffness,
            SensitivityRadPerSecPerM = sensitivity,
        };
    }

    private ImmutableDictionary<AdjustmentKind, AdjustmentLimit> Limits()
    {
        var limits = ImmutableDictionary.CreateBuilder<AdjustmentKind, AdjustmentLimit>();
        foreach ((AdjustmentKind kind, (string name, string unit, double toSi)) in _adjustments)
        {
            if (_limits.Item(name) is not TomlItem item)
                continue;
            if (item.Value is not TomlTable table)
            {
                _faults.Add(item.Line, $"{item.Found} for {name}", "a table with min, max and step", $"Write {name} = {{ min = -20, max = 20, step = 5 }}, in {unit}.");
                continue;
            }
            var reader = new TableReader(table with { Path = $"limits.{name}" }, name, _faults);
            var range = new NumberRange(-1000, 1000, unit, "Correct the limit.");
            double? min = reader.Number("min", range), max = reader.Number("max", range);
            double? step = reader.Number("step", range with { Min = 0.01, Remedy = "Leave step out when the part moves freely." });
            if (min > max)
                _faults.Add(item.Line, FormattableString.Invariant($"min = {min} above max = {max} for {name}"), "min below max", "Swap the two; right is positive.");
            reader.ReportUnknown();
            limits[kind] = new(min * toSi, max * toSi, step * toSi);
        }
        _limits.ReportUnknown();
        return limits.ToImmutable();
    }

    private LogSettings Log()
    {
        string? orientation = _log.Text("gyro_orientation", "x forward, y right, z down");
        if (orientation is not null && !GyroOrientation.IsValid(orientation))
        {
            _faults.Add(_log.LineOf("gyro_orientation"), $"\"{orientation}\" for gyro_orientation", "a direction for each of x, y and z, square to each other", "Write gyro_orientation = \"x forward, y right, z down\" with forward, back, right, left, up or down.");
        }
        var rules = ImmutableArray.CreateBuilder<ColumnRule>();
        foreach (ChannelRole role in Enum.GetValues<ChannelRole>())
        {
            string key = ChannelRoles.NameOf(role);
            if (_log.Text(key, "column name:unit") is string value)
                rules.Add(ColumnWords.Parse(role, value));
        }
        _log.ReportUnknown();
        return new() { Columns = rules.ToImmutable(), GyroOrientation = orientation };
    }

    private TableReader Table(string name)
    {
        TomlItem? item = _root.Item(name);
        if (item is not null && item.Value is not TomlTable)
            _faults.Add(item.Line, $"{item.Found} for {name}", "a table", $"Write a line [{name}] and its keys below it.");
        return new(item?.Value as TomlTable, name, _faults);
    }

    private static string Without(TableReader table, string key) => table.Exists ? $"{table.Label} without {key}" : $"no {table.Label} and so no {key}";

    private Reading? Needed(TableReader table, string key, NumberRange range, ReadingSpread spread, double toSi, string what, string example)
    {
        if (table.Item(key) is not null)
            return Scaled(table, key, range, spread, toSi);
        _faults.Add(table.Line, Without(table, key), $"{what}, kg", $"Weigh it and write {key} = {example}.");
        return null;
    }

    private Reading? Scaled(TableReader table, string key, NumberRange range, ReadingSpread spread, double toSi)
    {
        if (table.Item(key) is not TomlItem item)
            return null;
        switch (item.Value)
        {
            case TomlList list:
                return Repeats(table, item, list, range, spread, toSi);
            case TomlTable pair:
                var reader = new TableReader(pair with { Path = $"{table.Label.Trim('[', ']')}.{key}" }, key, _faults);
                double? value = reader.Item("value") is TomlItem v ? reader.Checked(v, v.Value, key, range) : null;
                double? plusMinus = reader.Number("plus_minus", new(0, range.Max - Math.Min(range.Min, 0), range.Unit, "plus_minus is half of the 95 % range, never negative."));
                reader.ReportUnknown();
                if (reader.Item("value") is null || reader.Item("plus_minus") is null)
                    _faults.Add(item.Line, $"a table without {(reader.Item("value") is null ? "value" : "plus_minus")} for {key}", "both value and plus_minus", $"Write {key} = {{ value = 10, plus_minus = 2 }}.");
                return value is null || plusMinus is null ? null : Reading.Measured(value.Value * toSi, plusMinus.Value / ReadingSpread.HalfWidthsPerSd * toSi);
            default:
                return table.Checked(item, item.Value, key, range) is double number
                    ? Reading.Measured(number * toSi, spread.StandardDeviation(number) * toSi)
                    : null;
        }
    }

    private Reading? Repeats(TableReader table, TomlItem item, TomlList list, NumberRange range, ReadingSpread spread, double toSi)
    {
        if (list.Items.Count == 0)
        {
            _faults.Add(item.Line, $"an empty list for {item.Key}", "one reading or more", $"Leave {item.Key} out when nothing was measured.");
            return null;
        }
        var values = new List<double>();
        foreach (object entry in list.Items)
        {
            if (table.Checked(item, entry, item.Key, range) is not double value)
                return null;
            values.Add(value);
        }
        double mean = values.Average();
        if (values.Count == 1)
            return Reading.Measured(mean * toSi, spread.StandardDeviation(mean) * toSi);
        double squares = values.Sum(v => (v - mean) * (v - mean));
        double ofMean = Math.Sqrt(squares / (values.Count - 1) / values.Count);
        return Reading.Measured(mean * toSi, Math.Max(ofMean, spread.FloorOfRepeats(mean)) * toSi);
    }

    /// <summary>What each number may be. Wide enough for any paramotor or trike; a number outside is a slip of unit, sign or digit.</summary>
    internal static class Ranges
    {
        private const string Millimetres = "Lengths of this key are in millimetres.", Kilograms = "Masses are in kilograms and never negative.";

        public static readonly NumberRange PilotKg = new(30, 250, "kg", Kilograms);
        public static readonly NumberRange PassengerKg = new(0, 250, "kg", Kilograms);
        public static readonly NumberRange PowerUnitKg = new(5, 300, "kg", Kilograms);
        public static readonly NumberRange FuelKg = new(0, 100, "kg", Kilograms);
        public static readonly NumberRange WheelsKg = new(0, 200, "kg", Kilograms);
        public static readonly NumberRange WingKg = new(1, 30, "kg", Kilograms);
        public static readonly NumberRange ScaleKg = new(0, 300, "kg", Kilograms);
        public static readonly NumberRange RearStrapKg = new(0, 300, "kg", Kilograms);
        public static readonly NumberRange HangKg = new(1, 500, "kg", Kilograms);
        public static readonly NumberRange LateralMm = new(-500, 500, "mm", Millimetres);
        public static readonly NumberRange CarabinerMm = new(-600, 600, "mm", Millimetres);
        public static readonly NumberRange DepthMm = new(0, 1500, "mm", Millimetres + " Depths count down from the riser carabiners.");
        public static readonly NumberRange ThrustDepthMm = new(-500, 1500, "mm", Millimetres + " Depths count down from the riser carabiners.");
        public static readonly NumberRange SpacingMm = new(100, 1200, "mm", Millimetres);
        public static readonly NumberRange ScaleSpacingMm = new(100, 3000, "mm", Millimetres);
        public static readonly NumberRange BrakeTravelMm = new(100, 1500, "mm", Millimetres);
        public static readonly NumberRange DiameterM = new(0.5, 3, "m", "The diameter is in metres.");
        public static readonly NumberRange ShaftPowerKw = new(0.5, 150, "kW", "The power is in kilowatts; 1 hp is 0.746 kW.");
        public static readonly NumberRange Percent = new(0.1, 100, "%", "Give half of the 95 % range in percent.");
        public static readonly NumberRange ThrustN = new(50, 5000, "N", "The thrust is in newtons; 1 kg pulled on a scale is 9.81 N.");
        public static readonly NumberRange AirDensity = new(0.5, 1.5, "kg/m³", "Sea level has 1.225 kg/m³.");
        public static readonly NumberRange Rpm = new(200, 300_000, "rpm", "Give revolutions per minute.");
        public static readonly NumberRange HangBackDeg = new(-10, 30, "deg", "Give degrees; positive when the thrust axis points up.");
        public static readonly NumberRange CantDeg = new(-15, 15, "deg", "Give degrees; positive pushes to the right.");
        public static readonly NumberRange FigureOfMerit = new(0.2, 1, "", "A figure of merit lies below 1; good propellers reach 0.75.");
        public static readonly NumberRange Share = new(0, 1, "", "A share is a fraction; 80 % is 0.8.");
        public static readonly NumberRange ReductionRatio = new(0.5, 10, "", "Give engine turns per propeller turn.");
        public static readonly NumberRange Turns = new(0.5, 200, "turns", "Count whole turns, ten of the crank or more.");
        public static readonly NumberRange PullKg = new(5, 500, "kg", "Give what the scale in the rope shows, kg.");
        public static readonly NumberRange TemperatureC = new(-60, 60, "°C", "Give the air's temperature in degrees Celsius.");
        public static readonly NumberRange HeightM = new(-500, 6000, "m", "Give the height above the sea in metres.");
        public static readonly NumberRange RopeAngleDeg = new(-20, 20, "deg", "The rope should pull along the thrust axis, within 20 degrees.");
        public static readonly NumberRange PolePairs = new(1, 60, "", "Count the magnets and divide by two.");
        public static readonly NumberRange MotorKv = new(1, 5000, "rpm/V", "Give revolutions per minute and volt.");
        public static readonly NumberRange WingAreaM2 = new(5, 80, "m²", "Give the flat area in square metres.");
        public static readonly NumberRange SpeedMPerSec = new(4, 30, "m/s", "Give metres per second; 36 km/h is 10 m/s.");
        public static readonly NumberRange SinkMPerSec = new(0.3, 5, "m/s", "Give metres per second, positive down.");
        public static readonly NumberRange LineLengthM = new(3, 15, "m", "Give metres.");
        public static readonly NumberRange LineSpreadM = new(0.2, 6, "m", "Give metres: half of the distance between the lines' upper ends.");
        public static readonly NumberRange YawStiffness = new(1, 1000, "N·m/rad", "Give newton metres per radian.");
        public static readonly NumberRange Sensitivity = new(0.001, 2, "deg/s per mm", "A sensitivity is positive: a CG moved right turns the wing right.");
    }
}
