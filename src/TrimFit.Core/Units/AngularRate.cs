namespace TrimFit.Core.Units;

/// <summary>A rate of rotation about one body axis; positive turns the nose to the pilot's right.</summary>
public readonly record struct AngularRate
{
    private AngularRate(double radPerSec) => RadPerSec = radPerSec;

    /// <summary>The rate in rad/s; <c>default</c> is 0.</summary>
    public double RadPerSec { get; }

    /// <summary>The rate in deg/s.</summary>
    public double DegPerSec => double.RadiansToDegrees(RadPerSec);

    /// <summary>A rate given in rad/s.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not finite.</exception>
    public static AngularRate FromRadPerSec(double value) => new(Guard.Finite(value));

    /// <summary>A rate given in deg/s.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not finite.</exception>
    public static AngularRate FromDegPerSec(double value) => new(double.DegreesToRadians(Guard.Finite(value)));
}
