using System.Collections.Immutable;

namespace TrimFit.Simulation;

/// <summary>What is true of a made-up flight, from the simulator's own statics: still air, brakes even, right positive, SI.</summary>
public sealed record FlightTruth
{
    /// <summary>Turn rate without thrust, rad/s.</summary>
    public required double ConstantRadPerSec { get; init; }

    /// <summary>Linear coefficient of the parabola through the pull at no, half and full thrust, rad/s per N.</summary>
    public required double ThrustRadPerSecPerN { get; init; }

    /// <summary>Quadratic coefficient of the same parabola, rad/s per N².</summary>
    public required double ThrustSquaredRadPerSecPerN2 { get; init; }

    /// <summary>Slope of the pull at vanishing thrust, rad/s per N.</summary>
    public required double SlopeAtZeroRadPerSecPerN { get; init; }

    /// <summary>Turn rate per metre of right-minus-left brake, rad/s per m, beyond any soft start.</summary>
    public required double BrakeRadPerSecPerM { get; init; }

    /// <summary>Pull at off, idle, level flight and full.</summary>
    public required ImmutableArray<PullTruth> Pull { get; init; }

    /// <summary>Thrust of level flight, N.</summary>
    public required double LevelThrustN { get; init; }

    /// <summary>Thrust at full power and sea-level density, N.</summary>
    public required double FullThrustN { get; init; }

    /// <summary>Sensitivity, rad/s per m of CG offset.</summary>
    public required double SensitivityRadPerSecPerM { get; init; }

    /// <summary>Yaw ratio of the wing.</summary>
    public required double YawRatio { get; init; }

    /// <summary>Shift of the suspended CG that stops the turn in level flight, the pilot's mass being moved and all moments solved again, m;
    /// null when none within 0.25 m does.</summary>
    public required double? NullShiftM { get; init; }

    /// <summary>−pull / sensitivity in level flight, m: the shift if the yaw moment stayed as it was.</summary>
    public required double EquivalentShiftM { get; init; }

    /// <summary>Travel of each part that stops the turn in level flight.</summary>
    public required ImmutableArray<TravelTruth> Travels { get; init; }

    /// <summary>Bias of the gyro, rad/s; null without a gyro.</summary>
    public required double? GyroBiasRadPerSec { get; init; }

    /// <summary>The air's mean velocity to the north at the start, m/s.</summary>
    public required double WindNorthMPerSec { get; init; }

    /// <summary>The air's mean velocity to the east at the start, m/s.</summary>
    public required double WindEastMPerSec { get; init; }

    /// <summary>Airspeed at trim, m/s.</summary>
    public required double AirspeedMPerSec { get; init; }

    /// <summary>Works the truth out from a scenario.</summary>
    /// <exception cref="SimulationException">The machine does not fly.</exception>
    public static FlightTruth Of(Scenario s)
    {
        ArgumentNullException.ThrowIfNull(s);
        var statics = new FrameStatics(s);
        double full = s.Propeller.FullThrustN;
        double level = s.LevelThrustN;
        double idle = s.Propeller.Clutch ? 0 : full * s.Propeller.IdleRatio * s.Propeller.IdleRatio;
        double p0 = SteadyTurn.Rate(s, statics, 0);
        double pHalf = SteadyTurn.Rate(s, statics, full / 2);
        double pFull = SteadyTurn.Rate(s, statics, full);
        double small = 1e-3 * full;
        double p1 = SteadyTurn.Rate(s, statics, small);
        double p2 = SteadyTurn.Rate(s, statics, 2 * small);
        double pLevel = SteadyTurn.Rate(s, statics, level);
        return new()
        {
            ConstantRadPerSec = p0,
            ThrustRadPerSecPerN = ((4 * pHalf) - (3 * p0) - pFull) / full,
            ThrustSquaredRadPerSecPerN2 = 2 * (pFull + p0 - (2 * pHalf)) / (full * full),
            SlopeAtZeroRadPerSecPerN = ((4 * p1) - (3 * p0) - p2) / (2 * small),
            BrakeRadPerSecPerM = s.Brakes.TurnPerMeter,
            Pull =
            [
                new("off", 0, p0),
                new("idle", idle, SteadyTurn.Rate(s, statics, idle)),
                new("cruise", level, pLevel),
                new("full", full, pFull),
            ],
            LevelThrustN = level,
            FullThrustN = full,
            SensitivityRadPerSecPerM = s.Wing.SensitivityRadPerSecPerM,
            YawRatio = s.Wing.YawRatio,
            NullShiftM = SteadyTurn.NullTravel(s, level, static (x, d) => x.WithCgShift(d)),
            EquivalentShiftM = -pLevel / s.Wing.SensitivityRadPerSecPerM,
            Travels =
            [
                new("carabiner_pair", SteadyTurn.NullTravel(s, level, static (x, d) => x.WithCarabinerPair(d))),
                new("carabiner_one_side", SteadyTurn.NullTravel(s, level, static (x, d) => x.WithCarabinerOneSide(d))),
                new("bar_spacer", SteadyTurn.NullTravel(s, level, static (x, d) => x.WithBarSpacer(d))),
                new("harness_front", SteadyTurn.NullTravel(s, level, static (x, d) => x.WithHarnessFront(d))),
                new("harness_front_rear", SteadyTurn.NullTravel(s, level, static (x, d) => x.WithHarnessFrontRear(d))),
            ],
            GyroBiasRadPerSec = s.Sensors.GyroHz > 0 ? s.Sensors.GyroBiasRadPerSec : null,
            WindNorthMPerSec = s.Air.WindNorthMPerSec,
            WindEastMPerSec = s.Air.WindEastMPerSec,
            AirspeedMPerSec = s.Wing.TrimSpeedMPerSec,
        };
    }
}
