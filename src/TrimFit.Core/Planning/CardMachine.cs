using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Core.Units;

namespace TrimFit.Core.Planning;

/// <summary>The machine, air and logger a card is planned for: from the last flight where there is one, from the rig, else assumed.</summary>
public sealed record CardMachine
{
    /// <summary>Turn per difference of one full brake travel where no flight has shown it, rad/s (common practice, no source).</summary>
    private static readonly double _usualBrake = double.DegreesToRadians(45);

    /// <summary>Airspeed and sink where neither flight nor rig give them, m/s (common practice, no source).</summary>
    private const double UsualAirspeed = 10.5, UsualSink = 2.0;

    /// <summary>Rows a second where no flight has shown them: a gyro of 5 Hz or more is averaged to that, a GPS fixes once a second.</summary>
    private const double UsualGyroRows = 5, UsualHeadingRows = 1;

    private const double UsualYawRatio = 1.5; // median of its prior (model page section 1)

    /// <summary>What the flight is logged with.</summary>
    public required CardLogger Logger { get; init; }

    /// <summary>Time constants and noise levels.</summary>
    public required NoiseParameters Noise { get; init; }

    /// <summary>Whether the noise is a flight's own; else it is the middle of the estimator's priors.</summary>
    public required bool NoiseFromFlight { get; init; }

    /// <summary>Gyro rows a second; 0 without a gyro.</summary>
    public required double GyroRowsPerSec { get; init; }

    /// <summary>Rows with a heading from GPS a second.</summary>
    public required double HeadingRowsPerSec { get; init; }

    /// <summary>Full thrust, N, and whether it is known; 1 when only fractions count.</summary>
    public required double FullThrust { get; init; }

    /// <summary>Unit of <see cref="FullThrust"/>.</summary>
    public required ThrustBasis ThrustBasis { get; init; }

    /// <summary>Thrust of idle, fraction of full.</summary>
    public required double Idle { get; init; }

    /// <summary>Thrust of level flight, fraction of full.</summary>
    public required double Level { get; init; }

    /// <summary>Thrust where the turn is to be nulled, fraction of full.</summary>
    public required double Balance { get; init; }

    /// <summary>Expected turn without thrust, its growth per full thrust and curvature, rad/s.</summary>
    public required double Constant { get; init; }
    /// <summary>Growth per full thrust, rad/s.</summary>
    public required double Slope { get; init; }
    /// <summary>Curvature per full thrust squared, rad/s.</summary>
    public required double Curvature { get; init; }

    /// <summary>Whether the expected turn is a flight's own; else the rig's statics give it with the sensitivity's prior.</summary>
    public required bool PullFromFlight { get; init; }

    /// <summary>Turn per difference of one full brake travel, rad/s.</summary>
    public required double BrakePerTravel { get; init; }

    /// <summary>Airspeed at trim, m/s.</summary>
    public required double AirspeedMPerSec { get; init; }

    /// <summary>Sink with no thrust, m/s, down positive.</summary>
    public required double SinkMPerSec { get; init; }

    /// <summary>Wind of the last flight, m/s; null when there was none.</summary>
    public double? WindMPerSec { get; init; }

    /// <summary>Everything suspended, kg.</summary>
    public required double SuspendedKg { get; init; }

    /// <summary>Shaft power at full thrust, W.</summary>
    public required double ShaftPowerW { get; init; }

    /// <summary>Whether brakes are logged.</summary>
    public bool HasBrakes => Logger == CardLogger.Full;

    /// <summary>Thrust of a power, fraction of full.</summary>
    public double ThrustOf(PowerSetting power) => power switch
    {
        PowerSetting.Off => 0,
        PowerSetting.Idle => Idle,
        PowerSetting.Cruise => Level,
        _ => 1,
    };

    /// <summary>Expected turn at a fraction of full thrust, brakes even, rad/s.</summary>
    public double PullAt(double x) => Constant + (Slope * x) + (Curvature * x * x);

    /// <summary>Climb at a fraction of full thrust, m/s: zero at level flight, minus the sink without thrust (climb goes with excess thrust).</summary>
    public double ClimbAt(double x) => SinkMPerSec * ((x / Level) - 1);

    /// <summary>Collects what is known.</summary>
    internal static CardMachine Of(Rig rig, RigSpread spread, CardOptions options, PriorFlight? prior)
    {
        Propulsion propulsion = spread.Propulsion;
        CardLogger logger = options.Logger
            ?? (prior is null ? CardLogger.Full : prior.BrakesLogged ? CardLogger.Full : prior.GyroRowsPerSec > 0 ? CardLogger.Phone : CardLogger.Gps);
        double airspeed = prior?.AirspeedMPerSec ?? rig.Wing.TrimSpeedMPerSec ?? UsualAirspeed;
        double sink = rig.Wing.GlideSinkMPerSec ?? UsualSink;
        double suspended = RigSpread.SuspendedKg(rig);
        double weight = (suspended + rig.Wing.MassKg.Value) * PhysicalConstants.StandardGravity;
        double byGlide = weight * sink / airspeed / propulsion.FullThrustN;
        double level = prior?.Level
            ?? (propulsion.ThrustKnown && rig.Wing.GlideSinkMPerSec is not null ? Math.Clamp(byGlide, 0.2, 0.95) : RigReporter.AssumedCruiseFraction);
        double idle = rig.Propeller.Drive == PropellerDrive.Clutch ? 0 : Math.Min(prior?.Idle ?? RigReporter.AssumedIdleFraction, 0.5 * level);
        (double Constant, double Slope, double Curvature) pull = prior is { Constant: double c, Slope: double s }
            ? (c, s, prior.Curvature ?? 0)
            : Predicted(rig, spread.Nominal);
        bool gyro = logger != CardLogger.Gps;
        NoiseParameters noise = prior?.Noise ?? UsualNoise;
        if (prior?.Noise is not null && gyro && !(prior.GyroRowsPerSec > 0))
            noise = noise with { GyroNoise = UsualNoise.GyroNoise };
        double balance = options.BalanceThrust.Kind switch
        {
            BalanceThrustKind.Full => 1,
            BalanceThrustKind.Newtons => Math.Min(1, options.BalanceThrust.Newtons / propulsion.FullThrustN),
            BalanceThrustKind.Even => (idle + 1) / 2,
            _ => level,
        };
        return new()
        {
            Logger = logger,
            Noise = noise,
            NoiseFromFlight = prior?.Noise is not null,
            GyroRowsPerSec = gyro ? prior is { GyroRowsPerSec: > 0 } ? prior.GyroRowsPerSec : UsualGyroRows : 0,
            HeadingRowsPerSec = prior is { HeadingRowsPerSec: > 0 } ? prior.HeadingRowsPerSec : UsualHeadingRows,
            FullThrust = propulsion.ThrustKnown ? propulsion.FullThrustN : 1,
            ThrustBasis = propulsion.ThrustKnown ? ThrustBasis.Newton : ThrustBasis.Relative,
            Idle = idle,
            Level = level,
            Balance = balance,
            Constant = pull.Constant,
            Slope = pull.Slope,
            Curvature = pull.Curvature,
            PullFromFlight = prior is { Constant: not null, Slope: not null },
            BrakePerTravel = prior?.BrakePerTravel is double b && b > 0.2 * _usualBrake ? b : _usualBrake,
            AirspeedMPerSec = airspeed,
            SinkMPerSec = sink,
            WindMPerSec = prior?.WindMPerSec,
            SuspendedKg = suspended,
            ShaftPowerW = rig.Propeller.ShaftPowerW ?? MomentumTheoryPower(propulsion, rig),
        };
    }

    /// <summary>The middle of the estimator's own priors (<see cref="ParameterLayout"/>).</summary>
    internal static NoiseParameters UsualNoise { get; } = ParameterLayout.Centre;

    private static double MomentumTheoryPower(Propulsion propulsion, Rig rig)
    {
        double diameter = rig.Propeller.DiameterM ?? 1.25, area = Math.PI * diameter * diameter / 4;
        return Math.Pow(propulsion.FullThrustN, 1.5) / Math.Sqrt(2 * propulsion.AirDensity * area) / rig.Propeller.FigureOfMerit.Value;
    }

    /// <summary>Turn that the rig's statics give with the sensitivity's median, as a parabola through no, half and full thrust.</summary>
    private static (double Constant, double Slope, double Curvature) Predicted(Rig rig, in RigValues nominal)
    {
        double sensitivity = rig.Wing.SensitivityRadPerSecPerM?.Value ?? TrimPosterior.PriorMedian;
        double full = nominal.FullThrustN;
        double off = sensitivity * RigStatics.TurningOffset(nominal, 0, UsualYawRatio);
        double half = sensitivity * RigStatics.TurningOffset(nominal, full / 2, UsualYawRatio);
        double most = sensitivity * RigStatics.TurningOffset(nominal, full, UsualYawRatio);
        return (off, (4 * half) - (3 * off) - most, 2 * (most + off - (2 * half)));
    }
}
