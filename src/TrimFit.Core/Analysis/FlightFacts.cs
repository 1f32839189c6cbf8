using TrimFit.Core.Statistics;

namespace TrimFit.Core.Analysis;

/// <summary>What was found about the gyro.</summary>
public sealed record GyroReport
{
    /// <summary>Bias, rad/s; null when it cannot be told.</summary>
    public Estimate? BiasRadPerSec { get; init; }
    /// <summary>Slope of gyro against GPS turn rate; near 1 when unit, mounting and sign are right; null without GPS.</summary>
    public double? Scale { get; init; }
    /// <summary>+1 when the gyro agrees with the GPS, -1 when it is reversed, null when it cannot be told.</summary>
    public int? Sign { get; init; }
    /// <summary>Delay of the gyro behind the GPS, s; null when it cannot be told.</summary>
    public double? DelaySec { get; init; }
    /// <summary>Standard error of <see cref="DelaySec"/>, s.</summary>
    public double? DelayStdErrorSec { get; init; }
    /// <summary>Standard error of <see cref="Scale"/>.</summary>
    public double? ScaleStdError { get; init; }
}
