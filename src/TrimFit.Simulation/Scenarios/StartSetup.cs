using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>Where and when the flight starts.</summary>
public sealed record StartSetup
{
    /// <summary>Latitude, rad. Default in open ocean.</summary>
    public double LatitudeRad { get; init => field = Guard.Finite(value); } = double.DegreesToRadians(-40);

    /// <summary>Longitude, rad.</summary>
    public double LongitudeRad { get; init => field = Guard.Finite(value); } = double.DegreesToRadians(-120);

    /// <summary>Altitude, m.</summary>
    public double AltitudeM { get; init => field = Guard.Finite(value); } = 250;

    /// <summary>Heading, rad clockwise from north.</summary>
    public double HeadingRad { get; init => field = Guard.Finite(value); }

    /// <summary>Time of the first sample.</summary>
    public DateTimeOffset TimeUtc { get; init; } = new(2025, 5, 17, 8, 0, 0, TimeSpan.Zero);
}
