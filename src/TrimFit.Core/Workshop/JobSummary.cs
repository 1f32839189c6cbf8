using TrimFit.Core.Statistics;

namespace TrimFit.Core.Workshop;

/// <summary>One line of a book's list.</summary>
public sealed record JobSummary
{
    /// <summary>Number in the book.</summary>
    public required long Number { get; init; }

    /// <summary>When it was opened, UTC.</summary>
    public required DateTimeOffset Opened { get; init; }

    /// <summary>The machine.</summary>
    public required string Machine { get; init; }

    /// <summary>Whose it is; empty when not given.</summary>
    public required string Customer { get; init; }

    /// <summary>The complaint.</summary>
    public required string Complaint { get; init; }

    /// <summary>Wing and what tells it from others; empty when not given.</summary>
    public required string Wing { get; init; }

    /// <summary>Number of setups.</summary>
    public required int Setups { get; init; }

    /// <summary>Number of flights.</summary>
    public required int Flights { get; init; }

    /// <summary>Verdict of the latest result; null before the first.</summary>
    public string? Verdict { get; init; }

    /// <summary>Turn rate at the balance thrust of the latest result, rad/s; null when there is none.</summary>
    public double? RateRadPerSec { get; init; }

    /// <summary>Its 95 % interval; null with the rate.</summary>
    public ConfidenceInterval? RateInterval95 { get; init; }

    /// <summary>Whether the machine as it is now is signed for.</summary>
    public required bool IsSigned { get; init; }
}
