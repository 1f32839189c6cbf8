namespace TrimFit.Core.Statistics;

/// <summary>Shape of a confidence set for a ratio.</summary>
public enum FiellerKind
{
    /// <summary>An ordinary interval: the denominator is told apart from 0.</summary>
    Interval,

    /// <summary>Everything outside an interval: the ratio may be far to either side, infinity included, but not in between.</summary>
    Outside,

    /// <summary>Every number: the data say nothing about the ratio.</summary>
    Everything,
}
