using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>The air: wind, gusts, thermals and the slow disturbance of the turn.</summary>
public sealed record AirSetup
{
    /// <summary>The air's mean velocity to the north at the start altitude, m/s.</summary>
    public double WindNorthMPerSec { get; init => field = Guard.Finite(value); } = 2;

    /// <summary>The air's mean velocity to the east, m/s.</summary>
    public double WindEastMPerSec { get; init => field = Guard.Finite(value); } = -1.5;

    /// <summary>Growth of the wind with height above the start, as a fraction of the mean per 100 m.</summary>
    public double ShearPer100M { get; init => field = Guard.Finite(value); }

    /// <summary>Standard deviation of each slow wind change, m/s.</summary>
    public double SlowWindMPerSec { get; init => field = Guard.NotNegative(value); } = 0.3;

    /// <summary>Correlation time of the slow change, s.</summary>
    public double SlowWindTauSec { get; init => field = Guard.Positive(value); } = 200;

    /// <summary>Standard deviation of each gust component, m/s.</summary>
    public double GustMPerSec { get; init => field = Guard.NotNegative(value); } = 0.3;

    /// <summary>Length scale of the gusts, m; their correlation time is this over the airspeed (Dryden's longitudinal spectrum).</summary>
    public double GustLengthM { get; init => field = Guard.Positive(value); } = 40;

    /// <summary>Standard deviation of the slow disturbance of the turn rate, rad/s.</summary>
    public double DisturbanceRadPerSec { get; init => field = Guard.NotNegative(value); } = double.DegreesToRadians(0.5);

    /// <summary>Correlation time of the slow disturbance, s.</summary>
    public double DisturbanceTauSec { get; init => field = Guard.Positive(value); } = 6;

    /// <summary>Standard deviation of a second disturbance, rad/s.</summary>
    public double SecondDisturbanceRadPerSec { get; init => field = Guard.NotNegative(value); }

    /// <summary>Correlation time of the second disturbance, s.</summary>
    public double SecondDisturbanceTauSec { get; init => field = Guard.Positive(value); } = 60;

    /// <summary>Thermals met per hour.</summary>
    public double ThermalsPerHour { get; init => field = Guard.NotNegative(value); }

    /// <summary>Standard deviation of a thermal's core lift, m/s.</summary>
    public double ThermalLiftMPerSec { get; init => field = Guard.NotNegative(value); } = 2;

    /// <summary>Standard deviation of the turn a thermal's edge gives, rad/s.</summary>
    public double ThermalTurnRadPerSec { get; init => field = Guard.NotNegative(value); } = double.DegreesToRadians(4);

    /// <summary>Time a thermal takes to cross (two standard deviations of its bell), s.</summary>
    public double ThermalCrossingSec { get; init => field = Guard.Positive(value); } = 8;

    /// <summary>Whether thrust falls with the air's density as the altitude grows.</summary>
    public bool DensityFollowsAltitude { get; init; } = true;
}
