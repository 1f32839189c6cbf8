using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Analysis;

/// <summary>The pull at one power: turn rate with brakes even.</summary>
public sealed record PullAtSetting
{
    /// <summary>Which power.</summary>
    public required PowerSetting Setting { get; init; }
    /// <summary>Thrust, N; null when thrust is only relative.</summary>
    public double? ThrustN { get; init; }
    /// <summary>Thrust as a fraction of full.</summary>
    public required double ThrustFraction { get; init; }
    /// <summary>Turn rate, rad/s, right positive; null when the flight cannot give it.</summary>
    public double? RateRadPerSec { get; init; }
    /// <summary>Its 95 % interval; null with the rate.</summary>
    public ConfidenceInterval? Interval95 { get; init; }
    /// <summary>Brake difference (as logged) that would hold the course; null when unknown.</summary>
    public double? HeldBrake { get; init; }
}

/// <summary>The pull over power.</summary>
public sealed record PullReport
{
    /// <summary>Off, idle, cruise, full, in this order.</summary>
    public required ImmutableArray<PullAtSetting> At { get; init; }
    /// <summary>The pull at the balance thrust.</summary>
    public required PullAtSetting AtBalance { get; init; }
    /// <summary>90 % interval of the pull at the balance thrust, for the test of balance; null with the rate.</summary>
    public ConfidenceInterval? Balance90 { get; init; }
    /// <summary>Smallest pull at the balance thrust that this flight would show in 80 % of cases at the 5 % level, rad/s; null when it can show none.</summary>
    public double? SmallestDetectableRadPerSec { get; init; }
    /// <summary>Where the level-flight thrust comes from.</summary>
    public required CruiseBasis CruiseBasis { get; init; }
}

/// <summary>Where the level-flight thrust comes from.</summary>
public enum CruiseBasis
{
    /// <summary>The thrust at which this flight neither climbed nor sank.</summary>
    ZeroClimb,
    /// <summary>60 % of full thrust, assumed.</summary>
    Assumed,
}

/// <summary>Turn rate per CG offset, with where it comes from.</summary>
public sealed record SensitivityReport
{
    /// <summary>Median of the posterior, (rad/s)/m; null when there is none.</summary>
    public double? RadPerSecPerM { get; init; }
    /// <summary>95 % interval.</summary>
    public ConfidenceInterval? Interval95 { get; init; }
    /// <summary>What each source says by itself.</summary>
    public required ImmutableArray<SensitivitySource> Sources { get; init; }
    /// <summary>Whether the sources contradict each other or the slope contradicts the rig.</summary>
    public required bool Conflict { get; init; }
    /// <summary>Kish's effective number of draws.</summary>
    public required double EffectiveSamples { get; init; }
    /// <summary>Prior-predictive p of the thrust coefficients; null when torque is not used.</summary>
    public double? PriorPredictiveP { get; init; }
    /// <summary>Yaw ratio rho_y: median.</summary>
    public required double YawRatio { get; init; }
    /// <summary>Yaw ratio: 95 % interval.</summary>
    public required ConfidenceInterval YawRatioInterval95 { get; init; }
}

/// <summary>One source of the sensitivity.</summary>
/// <param name="Kind">prior, torque, pair, ballast, user, shop_memory.</param>
/// <param name="RadPerSecPerM">Its median, (rad/s)/m.</param>
/// <param name="Interval95">Its 95 % interval by itself.</param>
/// <param name="Used">Whether it entered the posterior.</param>
public sealed record SensitivitySource(string Kind, double RadPerSecPerM, ConfidenceInterval Interval95, bool Used);

/// <summary>The shift of the CG that nulls the turn at the balance thrust.</summary>
public sealed record ShiftReport
{
    /// <summary>Balance thrust, N; null when thrust is relative.</summary>
    public double? BalanceThrustN { get; init; }
    /// <summary>Balance thrust as a fraction of full.</summary>
    public required double BalanceThrustFraction { get; init; }
    /// <summary>Equivalent change of the CG offset e with the yaw moment unchanged, m, right positive: median.</summary>
    public required double CgShiftM { get; init; }
    /// <summary>95 % interval of the shift.</summary>
    public required ConfidenceInterval Interval95 { get; init; }
    /// <summary>The part of the shift that answers the constant pull, m (median).</summary>
    public required double ConstantPartM { get; init; }
    /// <summary>The part of the shift that answers the pull of power, m (median).</summary>
    public required double PowerPartM { get; init; }
    /// <summary>Fieller's sets where the shift is a plain ratio of two estimates, one for each ballast or pair source: a check beside the posterior,
    /// in m of the ballast's CG shift or in travels of the pair.</summary>
    public ImmutableArray<FiellerSet> Ratios { get; init; } = [];
    /// <summary>Turn left at each power once the shift is made.</summary>
    public required ImmutableArray<PullAtSetting> TurnLeftAt { get; init; }
}

/// <summary>One way to make the shift.</summary>
public sealed record AdjustmentReport
{
    /// <summary>Which part.</summary>
    public required AdjustmentKind Kind { get; init; }
    /// <summary>What the travel is measured in.</summary>
    public TravelUnit Unit { get; init; }
    /// <summary>Mechanical travel in <see cref="Unit"/>, right positive: median.</summary>
    public required double Travel { get; init; }
    /// <summary>95 % interval of the travel.</summary>
    public required ConfidenceInterval Interval95 { get; init; }
    /// <summary>Travel rounded to the part's step, or to 1 mm, 0.1 deg or 0.1 kg.</summary>
    public required double Rounded { get; init; }
    /// <summary>First step: at most half the median travel and 15 mm until sign and size are confirmed.</summary>
    public required double FirstStep { get; init; }
    /// <summary>Change of CG offset per travel at rest (the table of the model).</summary>
    public required double Efficiency { get; init; }
    /// <summary>Thrust-line offset t after the whole travel, m.</summary>
    public required double ThrustLineOffsetM { get; init; }
    /// <summary>|N|/k_chi at full thrust after the whole travel: median; null when thrust is relative.</summary>
    public double? TwistRatio { get; init; }
    /// <summary>Upper 95 % of the same.</summary>
    public double? TwistRatioHigh95 { get; init; }
    /// <summary>Which way the frame twists at full thrust.</summary>
    public required TwistDirection TwistDirection { get; init; }
    /// <summary>Load of the left risers at full thrust after the travel, N; null when thrust is relative.</summary>
    public double? RiserLoadLeftN { get; init; }
    /// <summary>Load of the right risers at full thrust after the travel, N.</summary>
    public double? RiserLoadRightN { get; init; }
    /// <summary>Hang-check reading of the left scale to expect after the first step, kg.</summary>
    public required double HangCheckLeftKg { get; init; }
    /// <summary>Hang-check reading of the right scale to expect after the first step, kg.</summary>
    public required double HangCheckRightKg { get; init; }
    /// <summary>Half of the 95 % range of each of the two readings, kg: seat, tape and, where it was done, the hang check before; null when not worked out.</summary>
    public double? HangCheckPlusMinusKg { get; init; }
    /// <summary>What the first step adds to right less left, kg, against a hang check before it; null when not worked out.</summary>
    public double? HangCheckDifferenceKg { get; init; }
    /// <summary>Turn left at each power after the rounded travel.</summary>
    public required ImmutableArray<PullAtSetting> TurnLeftAt { get; init; }
    /// <summary>Inside the rig's limits; null when the rig gives none.</summary>
    public bool? WithinLimits { get; init; }
    /// <summary>Probability that the first step already ends past the null.</summary>
    public required double ProbabilityWrongSide { get; init; }
    /// <summary>Things to say about this adjustment.</summary>
    public ImmutableArray<Finding> Notes { get; init; } = [];
}

/// <summary>Which way the frame twists on its risers.</summary>
public enum TwistDirection
{
    /// <summary>Nose to the left in 97.5 % of draws.</summary>
    Left,
    /// <summary>Nose to the right in 97.5 % of draws.</summary>
    Right,
    /// <summary>The sign changes inside the spread.</summary>
    Unknown,
}

/// <summary>The answer in one word.</summary>
public enum VerdictCode
{
    /// <summary>The flight or its data cannot tell.</summary>
    Insufficient,
    /// <summary>No pull worth moving anything for.</summary>
    Balanced,
    /// <summary>The declared offset against the torque is too large.</summary>
    OverCompensated,
    /// <summary>A constant pull and one that grows with power, same side.</summary>
    Both,
    /// <summary>The pull grows with power.</summary>
    PowerPull,
    /// <summary>The pull is there at any power.</summary>
    ConstantPull,
}

/// <summary>How much the answer can carry.</summary>
public enum VerdictStrength
{
    /// <summary>A direction at most, never millimetres.</summary>
    None,
    /// <summary>One flight with torque or prior; direction certain at 97.5 %.</summary>
    Weak,
    /// <summary>Torque passing its gates, or a pair; interval within 50 %.</summary>
    Fair,
    /// <summary>A pair or ballast leg, brakes stepped, signs verified, interval within one step.</summary>
    Firm,
}

/// <summary>The verdict.</summary>
public sealed record Verdict
{
    /// <summary>The word.</summary>
    public required VerdictCode Code { get; init; }
    /// <summary>How much it can carry.</summary>
    public required VerdictStrength Strength { get; init; }
    /// <summary>Whether travel may be stated.</summary>
    public required bool TravelGiven { get; init; }
    /// <summary>What is missing or in conflict, first things first; empty when nothing is.</summary>
    public ImmutableArray<Finding> Reasons { get; init; } = [];
}

/// <summary>Something to be said in words; Reporting holds the words.</summary>
/// <param name="Code">What.</param>
/// <param name="Values">The numbers that belong into the sentence, SI, in the order the code's comment gives.</param>
public sealed record Finding(FindingCode Code, ImmutableArray<double> Values)
{
    /// <summary>A finding with its numbers.</summary>
    public static Finding Of(FindingCode code, params ReadOnlySpan<double> values) => new(code, [.. values]);
}

/// <summary>What a <see cref="Finding"/> says. The comment gives the numbers it carries.</summary>
public enum FindingCode
{
    /// <summary>The log says nothing about thrust.</summary>
    NoThrust,
    /// <summary>Thrust hardly changed: smallest, largest (fractions of full).</summary>
    ThrustRangeTooSmall,
    /// <summary>Neither yaw rate nor a GPS or compass from which to take it.</summary>
    NoTurnRate,
    /// <summary>Too little steady flight: seconds found, seconds needed.</summary>
    TooLittleSteadyFlight,
    /// <summary>The interval of the pull is too wide: half-width, allowed (rad/s).</summary>
    PullTooUncertain,
    /// <summary>The balance thrust lies outside flown thrust plus 10 %: balance, lowest, highest (fractions).</summary>
    BalanceThrustNotFlown,
    /// <summary>Slope against the rig's prediction: slope sign, share of draws predicting the other sign.</summary>
    RotationConflict,
    /// <summary>The torque source does not fit the slope: prior-predictive p, slope over what the torque explains.</summary>
    SensitivityConflict,
    /// <summary>Two sources of the sensitivity contradict each other: their numbers (0 prior, 1 torque, 2 ballast, 3 pair, 4 user), second over first, p.</summary>
    SourcesConflict,
    /// <summary>No steering logged and no hands-off spans declared.</summary>
    NoSteeringNoHandsOff,
    /// <summary>Brakes seem swapped or the wing reverses: brake coefficient, rad/s per unit.</summary>
    BrakeSignReversed,
    /// <summary>Brakes and thrust moved together: correlation.</summary>
    BrakesCollinear,
    /// <summary>Gyro bias cannot be told from a constant pull.</summary>
    GyroBiasUnknown,
    /// <summary>Gyro disagrees with the GPS turn: regression slope.</summary>
    GyroSignReversed,
    /// <summary>Wind could not be found: arc, rad.</summary>
    WindUnknown,
    /// <summary>Level-flight thrust is assumed: fraction.</summary>
    CruiseAssumed,
    /// <summary>Full thrust is not given; thrust is relative.</summary>
    ThrustRelative,
    /// <summary>The torque's figure of merit leaves 0.35 to 0.8: figure of merit.</summary>
    FigureOfMeritImplausible,
    /// <summary>Tip speed passes 260 m/s: tip speed.</summary>
    TipSpeedImplausible,
    /// <summary>The torque source is not used: its gate (1 sign of numerator or denominator, 2 positive share, 3 spread).</summary>
    TorqueNotUsed,
    /// <summary>The pull is strong: rate, rad/s.</summary>
    StrongPull,
    /// <summary>Pull at zero thrust answers to more than 15 mm: check trimmers, lines, brakes first: m.</summary>
    ConstantPartFirst,
    /// <summary>No limit in the rig for this adjustment.</summary>
    LimitNotGiven,
    /// <summary>Travel beyond the limit: limit, m.</summary>
    BeyondLimit,
    /// <summary>Riser twist may be reached: upper 95 % of |N|/k.</summary>
    TwistCaution,
    /// <summary>A sudden throttle change can twist the risers: upper 95 % of |N|/k.</summary>
    TwistWarning,
    /// <summary>Refused for riser twist: upper 95 % of |N|/k.</summary>
    TwistRefused,
    /// <summary>Changes the distance between the carabiners: new spacing, m.</summary>
    SpacingChanges,
    /// <summary>The effect per millimetre changes sign inside the spread; not offered: number of the <see cref="AdjustmentKind"/>.</summary>
    EffectSignUnknown,
    /// <summary>Rotation cancels: no power pull from torque can be claimed.</summary>
    ContraRotating,
    /// <summary>Curvature shrinks only; thrust had few levels.</summary>
    FewThrustLevels,
    /// <summary>The wing turns by itself or the brakes rest unevenly: no more can be said from one flight.</summary>
    ConstantPullSource,
    /// <summary>Speed of rotation at full power is not given; the largest in the log stands in: rev/s.</summary>
    FullPowerSpeedAssumed,
    /// <summary>No throttle table: thrust is taken as proportional to throttle.</summary>
    ThrottleTakenAsThrust,
    /// <summary>The gyro's unit was wrong by this factor against the GPS turn and was corrected: factor.</summary>
    GyroUnitCorrected,
    /// <summary>Gyro scale against the GPS turn is off by no known unit: slope, 1 when it was calibrated by the GPS and 0 when the gyro was set aside.</summary>
    GyroScaleOff,
    /// <summary>No GPS and no compass: which way the yaw rate turns is taken on trust.</summary>
    YawSignUnconfirmed,
    /// <summary>The first step would be smaller than the step this part moves in: that step, m.</summary>
    FirstStepTooSmall,
    /// <summary>A step ending on the wrong side is likelier than 10 %: probability.</summary>
    WrongSideLikely,
    /// <summary>The gyro reads this share of the GPS turn and was divided by it: share, its standard error, tilt of the mounting that would explain it (rad, 0 when none can).</summary>
    GyroScaleCorrected,
    /// <summary>The gyro is behind the GPS and was moved: delay and its standard error, s.</summary>
    GyroDelayed,
    /// <summary>The GPS is behind the gyro and was moved: delay and its standard error, s.</summary>
    GpsDelayed,
    /// <summary>Three gyro axes were turned into a heading rate by the accelerometer's gravity: mean tilt of the sensor's z axis from the vertical, rad.</summary>
    GyroLevelled,
    /// <summary>Three gyro axes were turned into a heading rate by the GPS turn: standard error of the axis, rad.</summary>
    GyroAxisFromGps,
    /// <summary>Three gyro axes without gravity, GPS or compass: one axis is taken on trust: 0 x, 1 y, 2 z; +1 when it points down, -1 up.</summary>
    GyroAxisAssumed,
    /// <summary>The sensor moved in flight: time s, angle rad, 1 when it was levelled anew and 0 when what came before or after was left out.</summary>
    GyroSlipped,
    /// <summary>The sensor was loose and its gyro is set aside: number of moves, typical angle between its attitude and the mean around it, rad.</summary>
    GyroLoose,
    /// <summary>Bias of the gyro from standing still: bias and standard error (rad/s), seconds.</summary>
    GyroBiasFromStandstill,
    /// <summary>Clear turns go against the brakes, so left and right are swapped or the wing reverses: seconds of such turns, share of them.</summary>
    BrakesAgainstTurn,
    /// <summary>Fixes that no flight could have flown were left out: fixes, of how many.</summary>
    GpsOutliers,
    /// <summary>The GPS repeated its last fix in flight; the repeats were left out: spans, seconds together.</summary>
    GpsFrozen,
    /// <summary>Throttle and speed of rotation do not rise together: rank correlation.</summary>
    ThrottleAgainstRpm,
    /// <summary>Time stamps are uneven: median step s, share of steps off by more than half of it.</summary>
    TimeJitter,
    /// <summary>Thrust follows from power to the two-thirds: power taken as full (W), 1 when the log's largest and 0 when the rig's.</summary>
    ThrustFromPower,
    /// <summary>Current without voltage: taken as power at a constant voltage: current taken as full, A.</summary>
    CurrentTakenAsPower,
    /// <summary>Thrust is taken as proportional to motor current: current taken as full, A.</summary>
    ThrustFromMotorCurrent,
    /// <summary>The speed at which the clutch engages is not given; it was taken from the log's idle: rev/s as logged.</summary>
    ClutchEngageAssumed,
    /// <summary>Thrust was taken from climb, W (climb + glide sink)/airspeed: standard error of a reading, N.</summary>
    ThrustFromClimb,
    /// <summary>Thrust from the powers of the flight sheet: share of level flight, and 1 when climb gave it.</summary>
    ThrustFromSheet,
    /// <summary>Thrust in flight by climb over thrust by the rig: ratio, its standard error, ratio by momentum theory (0 when unknown), 1 when they agree.</summary>
    ThrustScaleByClimb,
    /// <summary>No full thrust in the rig; this flight's climb gives one in flight: N, its standard error.</summary>
    FullThrustByClimb,
    /// <summary>The search over the turn's time constants and noise levels did not settle: steps taken.</summary>
    TurnSearchNotSettled,
    /// <summary>The one cheapest check that could overturn the answer: number of the <see cref="Analysis.NextCheck"/>, share of the answer's variance it would take away.</summary>
    NextCheck,
    /// <summary>Moving the riser carabiners twists the risers far more than moving the harness hang points: twist ratios of the two.</summary>
    TwistByCarabiners,
    /// <summary>Moving the harness hang points twists the risers far more than moving the riser carabiners: twist ratios of the two.</summary>
    TwistByHarness,
    /// <summary>The shift by the ratio of pull and known shift has no bound: number of the source (2 ballast, 3 pair).</summary>
    RatioUnbounded,
    /// <summary>Measurements of the turn that were out of line with the rest and count less: how many, of how many.</summary>
    TurnOutliers,
    /// <summary>This wing behaves otherwise than the workshop's others, so their memory is not used: number of the source that says so (1 torque, 2 ballast, 3 pair, 4 user), it over the memory, p.</summary>
    ShopMemoryConflict,
}
