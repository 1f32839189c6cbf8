using TrimFit.Core.Statistics;

namespace TrimFit.Core.Comparing;

/// <summary>A setting flown again after another one (A-B-A): did anything else move meanwhile?</summary>
/// <param name="Setup">The setting.</param>
/// <param name="First">Place of the earlier flight.</param>
/// <param name="Second">Place of the later flight.</param>
/// <param name="ChangeRadPerSec">Later less earlier pull at the balance thrust.</param>
/// <param name="Interval95">Its 95 % interval, scatter between flights included.</param>
public sealed record SwapBack(string Setup, int First, int Second, double ChangeRadPerSec, ConfidenceInterval Interval95)
{
    /// <summary>Whether the two flights agree within their errors and the scatter.</summary>
    public bool Agrees => !Interval95.ExcludesZero;
}
