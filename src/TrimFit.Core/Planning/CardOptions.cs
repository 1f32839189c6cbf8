using TrimFit.Core.Analysis;
using TrimFit.Core.Units;

namespace TrimFit.Core.Planning;

/// <summary>What a test card is asked for.</summary>
public sealed record CardOptions
{
    /// <summary>Shortest card, min.</summary>
    public const double FewestMinutes = 3;

    /// <summary>Longest card, min: beyond it fuel, wind and the pilot's attention change more than the legs teach (common practice, no source).</summary>
    public const double MostMinutes = 24;

    /// <summary>Half-width of the shift's 95 % interval that is wanted, m; null when none is asked for.</summary>
    public double? ShiftHalfWidthM { get; init => field = value is double v ? Guard.Positive(v) : null; }

    /// <summary>Standard error of the pull at the balance thrust that is wanted, rad/s; null when none is asked for.</summary>
    public double? PullStdErrorRadPerSec { get; init => field = value is double v ? Guard.Positive(v) : null; }

    /// <summary>Length of the card, min; null: as long as the wanted precision needs, or six.</summary>
    public double? Minutes
    {
        get;
        init => field = value is null or (>= FewestMinutes and <= MostMinutes) ? value
            : throw new ArgumentOutOfRangeException(nameof(value), value, "must be 3 to 24 minutes");
    }

    /// <summary>What the flight will be logged with; null: as the last flight was, else <see cref="CardLogger.Full"/>.</summary>
    public CardLogger? Logger { get; init; }

    /// <summary>Ballast the pilot has, kg; 0: no ballast legs.</summary>
    public double BallastKg { get; init => field = Guard.NotNegative(value); }

    /// <summary>How far out to a side it can be held, m.</summary>
    public double BallastArmM { get; init => field = Guard.NotNegative(value); } = 0.45;

    /// <summary>Whether legs with the engine off are offered to the design.</summary>
    public bool EngineOffLegs { get; init; }

    /// <summary>Lowest floor, m (common practice, no source); it may be raised, not lowered.</summary>
    public const double LeastFloorM = 300;

    /// <summary>Height above ground below which no leg is flown, m.</summary>
    public double FloorM
    {
        get;
        init => field = value >= LeastFloorM ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "must be at least 300 m");
    } = LeastFloorM;

    /// <summary>Where the turn is to be nulled.</summary>
    public BalanceThrust BalanceThrust { get; init; } = BalanceThrust.Cruise;

    /// <summary>Turn rate that counts as no pull.</summary>
    public AngularRate Tolerance { get; init; } = AngularRate.FromDegPerSec(1);

    /// <summary>Seed of the flights the prediction draws.</summary>
    public ulong Seed { get; init; } = 1;

    /// <summary>Flights the prediction draws. Default 9: the median of their half-widths is then good to about 5 %.</summary>
    public int Draws { get; init => field = value >= 3 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "at least 3"); } = 9;
}
