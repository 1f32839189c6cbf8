using System.Globalization;

namespace TrimFit.Reporting;

/// <summary>How results are shown to people. JSON never depends on it.</summary>
public sealed record ReportStyle
{
    /// <summary>Metric or imperial.</summary>
    public UnitSystem Units { get; init; } = UnitSystem.Metric;

    /// <summary>Culture of the numbers; the invariant one (decimal point) unless asked for.</summary>
    public CultureInfo Culture { get; init; } = CultureInfo.InvariantCulture;
}

/// <summary>Units shown to people.</summary>
public enum UnitSystem
{
    /// <summary>mm, kg, N, m/s.</summary>
    Metric,
    /// <summary>in, lb, lbf, mph.</summary>
    Imperial,
}
