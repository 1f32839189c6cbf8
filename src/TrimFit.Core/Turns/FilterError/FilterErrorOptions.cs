namespace TrimFit.Core.Turns.FilterError;

/// <summary>Choices of the filter-error estimator; the defaults are those behind the coverage table in DEVELOPERS.md.</summary>
public sealed record FilterErrorOptions
{
    /// <summary>Samples are averaged in blocks of at most this length before filtering, s. Default 0.2: short against any wing's response
    /// (1 s and more), and a fifth of the work of a 25 Hz log. At 0.3 a precise gyro already showed what averaging does to the answer to a
    /// brake step. 0 switches averaging off.</summary>
    public double BlockSec { get; init => field = Guard.NotNegative(value); } = 0.2;

    /// <summary>Standard deviation of the curvature's prior, as a share of the slope per full thrust. Default 0.6: riser twist bends the pull of
    /// machines drawn at random by 0.55 times the slope and 1.2 deg/s in squares (root mean square of 3,000; DEVELOPERS.md, "Turn model"). A
    /// quarter of the slope rules such bends out, and the interval then does not hold the pull; the whole slope makes intervals of flights
    /// with little data wider than they need be.</summary>
    public double CurvatureShare { get; init => field = Guard.Positive(value); } = 0.6;

    /// <summary>Curvature that is possible whatever the slope, rad/s at full thrust, added in squares to the share. Default 1.5 deg/s: riser twist
    /// bends the pull of a machine whose slope is small.</summary>
    public double CurvatureFloorRadPerSec { get; init => field = Guard.Positive(value); } = double.DegreesToRadians(1.5);

    /// <summary>Standard deviation of the curvature's prior, per full thrust squared, for a slope per full thrust with its variance: the slope's
    /// own error is counted in, or a slope that happens to come out near zero would forbid all curvature.</summary>
    internal double CurvaturePriorSd(double slope, double slopeVariance) =>
        double.Hypot(CurvatureShare * Math.Sqrt((slope * slope) + slopeVariance), CurvatureFloorRadPerSec);

    /// <summary>Standardised innovation beyond which a measurement's noise is raised (Chang 2014). Default 3.5: one in 2,000 of clean normal ones.</summary>
    public double OutlierLimit { get; init => field = Guard.Positive(value); } = 3.5;

    /// <summary>Length of the blocks of the sandwich covariance, s; a throttle leg that lasts longer is one block. Default 33.</summary>
    public double SandwichBlockSec { get; init => field = Guard.Positive(value); } = 33;

    /// <summary>Most steps of one search over the time constants and noise levels. Default 40; about 8 suffice.</summary>
    public int MostIterations { get; init => field = (int)Guard.Positive(value); } = 40;

    /// <summary>Time constant of the lag through which a throttle step twists the frame, s. Default 0.7.</summary>
    public double FrameTwistLagSec { get; init => field = Guard.Positive(value); } = 0.7;
}
