using System.Collections.Immutable;

namespace TrimFit.Core.Planning;

/// <summary>Precision that a card is expected to give: medians over flights drawn from the turn model and put through the whole fit.</summary>
/// <remarks>Half-width of the pull = t × inflation × standard error with known noise. The inflation holds what the estimator pays for finding the
/// noise levels and for its sandwich covariance; t has the fit's own degrees of freedom.</remarks>
public sealed record CardPrediction
{
    /// <summary>Standard error of the pull at the balance thrust from the information of the planned inputs alone, noise known, rad/s.</summary>
    public required double KnownNoiseStdErrorRadPerSec { get; init; }

    /// <summary>Median standard error that the fit reports, rad/s.</summary>
    public required double PullStdErrorRadPerSec { get; init; }

    /// <summary>Median half-width of the pull's 95 % interval, rad/s.</summary>
    public required double PullHalfWidthRadPerSec { get; init; }

    /// <summary>Median half-width of the shift's 95 % interval, m; null when the fit gives no shift.</summary>
    public double? ShiftHalfWidthM { get; init; }

    /// <summary>Half-width that the sensitivity's spread alone leaves, with the turn known exactly, m.</summary>
    public double? SensitivityFloorM { get; init; }

    /// <summary>Words of the sensitivity's sources that took part.</summary>
    public ImmutableArray<string> Sources { get; init; } = [];

    /// <summary>Names of the coefficients.</summary>
    public required ImmutableArray<string> Coefficients { get; init; }

    /// <summary>Their covariance, row by row, SI, in the unit of thrust of the machine and brakes as fractions; that of the median flight.</summary>
    public required ImmutableArray<double> Covariance { get; init; }

    /// <summary>Flights drawn.</summary>
    public required int Draws { get; init; }

    /// <summary>Reported over known-noise standard error.</summary>
    public double Inflation => PullStdErrorRadPerSec / KnownNoiseStdErrorRadPerSec;

    /// <summary>Half-width over reported standard error.</summary>
    public double TFactor => PullHalfWidthRadPerSec / PullStdErrorRadPerSec;
}
