using TrimFit.Core.Statistics;

namespace TrimFit.Core.Comparing;

/// <summary>Pull at the balance thrust over the CG offsets of three or more settings: a straight line, and where it meets zero.</summary>
/// <remarks>Weighted least squares; weights are the inverse squared standard errors, scatter between flights included. The errors are widened by
/// the root of χ²/(k − 2) where that is above 1 (R. T. Birge, Phys. Rev. 40 (1932) 207).</remarks>
/// <param name="SlopeRadPerSecPerM">Turn rate per metre of CG offset: the sensitivity that the settings show by themselves.</param>
/// <param name="SlopeInterval95">Its 95 % interval.</param>
/// <param name="BestOffset">CG offset at which the line meets zero, m, by Fieller at 95 %; unbounded where the line's slope is not sure.</param>
/// <param name="BestSeen">Place of the setting with the smallest pull seen, among those of the comparison.</param>
/// <param name="Scale">Factor by which the errors were widened; 1 when the settings lie on a line within them.</param>
public sealed record SetupTrend(double SlopeRadPerSecPerM, ConfidenceInterval SlopeInterval95, FiellerSet BestOffset, int BestSeen, double Scale);
