using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Comparing;

/// <summary>What was taken for the scatter from flight to flight.</summary>
/// <param name="Prior">The prior, or the known value.</param>
/// <param name="MedianRadPerSec">Median of the standard deviation once the flights of this comparison have spoken.</param>
/// <param name="Interval95">Its 95 % interval; a point when it is known.</param>
/// <param name="Learned">Whether two flights or more of one setting told something about it.</param>
public sealed record ScatterReport(FlightScatter Prior, double MedianRadPerSec, ConfidenceInterval Interval95, bool Learned);
