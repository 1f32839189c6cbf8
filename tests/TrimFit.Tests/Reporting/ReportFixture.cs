using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Units;
using TrimFit.Reporting;

namespace TrimFit.Tests.Reporting;

/// <summary>Results with invented numbers: the forms are tested on them without any estimator.</summary>
internal static class ReportFixture
{
    public static Rig Rig(PropellerRotation rotation = PropellerRotation.Clockwise, string name = "Demo machine") => new()
    {
        Name = name,
        Mass = new() { PilotKg = Reading.Measured(88), PowerUnitKg = Reading.Measured(30), PostureM = Reading.Assumed(0, 0.010) },
        Propeller = new() { Rotation = rotation, StaticThrustN = Reading.Measured(600), ShaftPowerW = 14000, ThrustLineM = Reading.Measured(0.002) },
        Carabiners = new() { LeftM = Reading.Measured(-0.215), RightM = Reading.Measured(0.215) },
        HangPoints = new() { FrontOffsetM = Reading.Measured(0.003), RearOffsetM = Reading.Measured(0) },
    };

    public static RigReport RigReport() => new()
    {
        SuspendedKg = 118,
        SuspendedWeightN = 1157.1847,
        PilotKg = 88,
        PowerUnitKg = 30,
        CgLateralM = 0.0018,
        CarabinerMidM = 0,
        CarabinerSpacingM = 0.430,
        CgOffsetM = 0.0018,
        ThrustLineOffsetM = 0.002,
        FullThrustN = 600,
        FullTorqueNm = 56,
        FigureOfMerit = 0.61,
        TwistStiffnessNmPerRad = 50,
        At =
        [
            new() { Setting = PowerSetting.Off, ThrustN = 0, TorqueNm = 0, HangBackRad = 0.08, YawMomentNm = 0, RollMomentNm = 2.1,
                RiserLoadLeftN = 579, RiserLoadRightN = 578, TwistRad = 0, TwistRatio = 0, TwistRatioHigh95 = 0 },
            new() { Setting = PowerSetting.Cruise, ThrustN = 360, TorqueNm = 33.6, HangBackRad = 0.05, YawMomentNm = 1.2, RollMomentNm = -31.4,
                RiserLoadLeftN = 618, RiserLoadRightN = 466, TwistRad = 0.024, TwistRatio = 0.02, TwistRatioHigh95 = 0.17 },
            new() { Setting = PowerSetting.Full, ThrustN = 600, TorqueNm = 56, HangBackRad = 0.02, YawMomentNm = 60, RollMomentNm = -55,
                RiserLoadLeftN = 617, RiserLoadRightN = 362, TwistRad = null, TwistRatio = 1.2, TwistRatioHigh95 = 1.9 },
        ],
        Adjustments =
        [
            new(AdjustmentKind.CarabinerPair, 1, -1, -1, null),
            new(AdjustmentKind.HarnessFrontRear, 0.7458, 0.7458, 0, new(-0.03, 0.03, 0.001)),
        ],
        HangCheckLeftKg = 58.8,
        HangCheckRightKg = 59.2,
        TorqueBalancingOffsetM = 0.029,
        Findings = [Finding.Of(FindingCode.LimitNotGiven)],
    };

    public static double Deg(double degPerSec) => double.DegreesToRadians(degPerSec);

    public static ConfidenceInterval Range(double low, double high, double scale = 1) => new(low * scale, high * scale, 0.95);

    public static PullAtSetting Pull(PowerSetting setting, double fraction, double? degPerSec, double half = 0.4, double? heldBrake = null) => new()
    {
        Setting = setting,
        ThrustFraction = fraction,
        ThrustN = fraction * 600,
        RateRadPerSec = degPerSec is double r ? Deg(r) : null,
        Interval95 = degPerSec is double m ? new(Deg(m - half), Deg(m + half), 0.95) : null,
        HeldBrake = heldBrake,
    };

    public static AdjustmentReport Adjustment(AdjustmentKind kind = AdjustmentKind.HarnessFrontRear, double travel = -0.014, double low = -0.020, double high = -0.009,
        TravelUnit unit = TravelUnit.Meter, double? firstStep = null) => new()
        {
            Kind = kind,
            Unit = unit,
            Travel = travel,
            Interval95 = new(low, high, 0.95),
            Rounded = travel,
            FirstStep = firstStep ?? travel / 2,
            Efficiency = 0.75,
            ThrustLineOffsetM = 0.002,
            TwistRatio = 0.12,
            TwistRatioHigh95 = 0.30,
            TwistDirection = TwistDirection.Right,
            RiserLoadLeftN = 571,
            RiserLoadRightN = 408,
            HangCheckLeftKg = 60.2,
            HangCheckRightKg = 57.8,
            TurnLeftAt = [Pull(PowerSetting.Off, 0, -1.1), Pull(PowerSetting.Full, 1, 0.9)],
            WithinLimits = true,
            ProbabilityWrongSide = 0.01,
            Notes = [Finding.Of(FindingCode.TwistCaution, 0.37)],
        };

    public static TurnFit Fit() => new()
    {
        Method = "steady_windows",
        ThrustBasis = ThrustBasis.Newton,
        Coefficients =
        [
            new(TurnCoefficient.Constant, new(Deg(0.4), Deg(0.2)), ""),
            new(TurnCoefficient.Thrust, new(Deg(0.005), Deg(0.001)), ""),
            new(TurnCoefficient.ThrustSquared, null, "thrust had too few levels"),
            new(TurnCoefficient.BrakeDifference, new(Deg(70), Deg(5)), ""),
        ],
        Covariance =
        [
            Deg(0.2) * Deg(0.2), 0, 0, 0,
            0, Deg(0.001) * Deg(0.001), 0, 0,
            0, 0, 0, 0,
            0, 0, 0, Deg(5) * Deg(5),
        ],
        DegreesOfFreedom = 10,
        EffectiveSamples = 12,
        Condition = double.PositiveInfinity,
        Points = [new(0, 30, 0, Deg(0.5), true), new(30, 60, 360, Deg(2.0), false), new(60, 90, 600, Deg(3.4), true)],
        SpansLeftOut = [new(90, 100, "strong turn")],
    };

    public static TurnSignals Signals()
    {
        double[] time = [.. Enumerable.Range(0, 1001).Select(i => i * 0.1)];
        return new()
        {
            TimeSec = time,
            Thrust = [.. time.Select(t => t < 30 ? 0.0 : t < 60 ? 360 : 600)],
            ThrustBasis = ThrustBasis.Newton,
            FullThrust = 600,
            HasThrust = true,
            BrakeDifference = [.. time.Select(t => t > 90 ? 0.1 : 0)],
            HasBrakes = true,
            GyroRadPerSec = [.. time.Select(t => Deg(t < 30 ? 0.5 : t < 60 ? 2.0 : 3.4))],
            RotationRatioSquared = new double[time.Length],
            Use = [.. time.Select(t => t < 90)],
            HandsOff = [.. time.Select(t => t < 30)],
            Wind = new() { NorthMPerSec = -3, EastMPerSec = 0, AirspeedMPerSec = 11, NorthStdError = 0.1, EastStdError = 0.1, AirspeedStdError = 0.1, ArcRad = Math.Tau },
        };
    }

    public static TrimAnalysis Result(VerdictCode code = VerdictCode.PowerPull, VerdictStrength strength = VerdictStrength.Weak, double? degPerSec = 2.1, double half = 0.4,
        ImmutableArray<AdjustmentReport>? adjustments = null, ImmutableArray<Finding>? reasons = null, BalanceThrust? balance = null, Rig? rig = null)
    {
        ImmutableArray<AdjustmentReport> ways = adjustments ?? [Adjustment()];
        PullAtSetting at = Pull(PowerSetting.Cruise, 0.6, degPerSec, half, -0.04);
        return new()
        {
            Rig = rig ?? Rig(),
            Options = new() { BalanceThrust = balance ?? BalanceThrust.Cruise, Tolerance = AngularRate.FromDegPerSec(1) },
            Signals = Signals(),
            Gyro = new() { BiasRadPerSec = new(Deg(0.70), Deg(0.01)), Scale = 1.01, Sign = 1, DelaySec = null },
            Fit = Fit(),
            Pull = new()
            {
                At = [Pull(PowerSetting.Off, 0, 0.4), Pull(PowerSetting.Idle, 0.08, 0.6), at, Pull(PowerSetting.Full, 1, null)],
                AtBalance = at,
                SmallestDetectableRadPerSec = Deg(0.7),
                CruiseBasis = CruiseBasis.ZeroClimb,
            },
            Sensitivity = new()
            {
                RadPerSecPerM = Deg(77),
                Interval95 = Range(46, 127, Deg(1)),
                Conflict = false,
                EffectiveSamples = 2980,
                PriorPredictiveP = 0.8,
                YawRatio = 1.5,
                YawRatioInterval95 = new(0.5, 4.5, 0.95),
                Sources = [new("prior", Deg(90), Range(30, 270, Deg(1)), true), new("torque", Deg(73), Range(31, 174, Deg(1)), true)],
            },
            Shift = ways.IsEmpty ? null : new()
            {
                BalanceThrustN = 360,
                BalanceThrustFraction = 0.6,
                CgShiftM = -0.0105,
                Interval95 = new(-0.015, -0.007, 0.95),
                ConstantPartM = -0.002,
                PowerPartM = -0.0085,
                TurnLeftAt = [Pull(PowerSetting.Off, 0, -1.1)],
            },
            Adjustments = ways,
            RigReport = RigReport(),
            Verdict = new() { Code = code, Strength = strength, TravelGiven = !ways.IsEmpty, Reasons = reasons ?? [] },
            Assumptions = [new("posture_mm", 0, "mm", -19.6, 19.6)],
            Warnings = [Finding.Of(FindingCode.CruiseAssumed, 0.6)],
        };
    }

    public static FlightImport Import(string fileName = "demo.csv", string columnName = "gyro z", string warning = "Demo warning.") => new(
        FlightLog.Create([0, 1, 2], [new(ChannelRole.YawRate, [0.0, 0.1, 0.2])], new() { BrakeUnit = ControlUnit.Fraction }),
        new()
        {
            Files =
            [
                new()
                {
                    Name = fileName, Sha256 = new string('a', 64), Format = "CSV, comma, UTF-8", RowsRead = 1003,
                    LeftOut = [new("the row is torn", 2, 17)],
                    Columns = [new("t", ChannelRole.Time, "s", "name", 0), new(columnName, ChannelRole.YawRate, "deg/s", "header", 1), new("note", null, "", "", 0)],
                },
            ],
            Sampling = new() { Start = new DateTimeOffset(2025, 5, 17, 8, 0, 0, TimeSpan.Zero), StartIsUtc = true, DurationSec = 100, RateHz = 10, Gaps = [new(40, 3)] },
            Warnings = [new("demo", warning)],
        });

    public static FitReport Report(TrimAnalysis? analysis = null, FlightImport? import = null, string rigFile = "demo-rig.toml") => new()
    {
        Analysis = analysis ?? Result(),
        Import = import ?? Import(),
        RigFile = new(rigFile, new string('b', 64)),
        Provenance = new("1.2.3"),
    };

    public static InspectReport Inspection(FlightImport? import = null) => new()
    {
        Import = import ?? Import(),
        Wind = Signals().Wind,
        Gyro = new() { Sign = -1, Scale = -1.02 },
        Provenance = new("1.2.3"),
    };

    public static RigSheetReport Sheet() => new() { Rig = Rig(), Statics = RigReport(), RigFile = new("demo-rig.toml", new string('b', 64)), Provenance = new("1.2.3") };
}
