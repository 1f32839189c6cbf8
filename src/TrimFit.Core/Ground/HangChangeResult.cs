using TrimFit.Core.Statistics;

namespace TrimFit.Core.Ground;

/// <summary>Verdict on a change by two hang checks.</summary>
public sealed record HangChangeResult
{
    /// <summary>The verdict.</summary>
    public required HangChangeVerdict Verdict { get; init; }
    /// <summary>Change of e that was to come, m, right positive.</summary>
    public required double ExpectedChangeM { get; init; }
    /// <summary>Change of e that the scales show, m.</summary>
    public required double MeasuredChangeM { get; init; }
    /// <summary>95 % interval of the change, m.</summary>
    public required ConfidenceInterval Interval95 { get; init; }
    /// <summary>Logarithm of the likelihood ratio: expected change over its mirror image.</summary>
    public required double LogLikelihoodRatio { get; init; }
    /// <summary>Hangs in the new setting, those done included, that would confirm a right change in 90 %; null when no reasonable number would.</summary>
    public required int? HangsAfter { get; init; }
    /// <summary>Hangs in each of both settings, with the part moved back in between, that would; null when no reasonable number would.</summary>
    public required int? HangsEach { get; init; }
}
