using System.Collections.Immutable;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Ground;

/// <summary>CG offset from two hanging scales.</summary>
public sealed record HangCheckResult
{
    /// <summary>e, m, right positive: for this pilot's usual seat.</summary>
    public required double OffsetM { get; init; }

    /// <summary>Its standard error, m: seating, scales and tape.</summary>
    public required double StandardError { get; init; }

    /// <summary>Degrees of freedom of the standard error.</summary>
    public required double DegreesOfFreedom { get; init; }

    /// <summary>Standard deviation of e from one seating to the next, m: a flight is one more seating.</summary>
    public required double SeatingSdM { get; init; }

    /// <summary>Degrees of freedom of <see cref="SeatingSdM"/>.</summary>
    public required double SeatingDegreesOfFreedom { get; init; }

    /// <summary>Whether the hangs scatter more than pilots usually do, so that they alone give the spread: few of them then say little.</summary>
    public required bool ScattersMore { get; init; }

    /// <summary>Degrees of freedom of these hangs alone, without what pilots usually scatter by.</summary>
    public required double OwnDegreesOfFreedom { get; init; }

    /// <summary>Sum of squares of these hangs around their mean, m².</summary>
    public required double OwnSquares { get; init; }

    /// <summary>Part of the variance of e that does not come from seating, m².</summary>
    public required double OtherVariance { get; init; }

    /// <summary>Distance between the riser carabiners, m.</summary>
    public required double SpacingM { get; init; }

    /// <summary>Mean of both scales together, kg.</summary>
    public required double SumKg { get; init; }

    /// <summary>The hangs.</summary>
    public required ImmutableArray<HangReading> Hangs { get; init; }

    /// <summary>95 % interval of e, m.</summary>
    public ConfidenceInterval Interval95 => new(OffsetM - HalfWidth95, OffsetM + HalfWidth95, 0.95);

    /// <summary>Standard deviation of e in the next flight, m, widened so that a normal has the t interval's width.</summary>
    public double NextFlightSdM
    {
        get
        {
            double variance = (StandardError * StandardError) + (SeatingSdM * SeatingSdM);
            double degrees = SeatingDegreesOfFreedom * Math.Pow(variance / (variance - OtherVariance), 2);
            return Math.Sqrt(variance) * StudentT.TwoSidedFactor(0.95, degrees) / StudentT.TwoSidedFactor(0.95, double.PositiveInfinity);
        }
    }

    private double HalfWidth95 => StudentT.TwoSidedFactor(0.95, DegreesOfFreedom) * StandardError;
}
