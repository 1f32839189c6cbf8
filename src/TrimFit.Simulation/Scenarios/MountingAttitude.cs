namespace TrimFit.Simulation;

/// <summary>How a sensor lies in the frame: its axes turned from x forward, y right, z down by yaw, then pitch, then roll.</summary>
/// <param name="RollRad">Roll, rad.</param>
/// <param name="PitchRad">Pitch, rad.</param>
/// <param name="YawRad">Yaw, rad.</param>
public sealed record MountingAttitude(double RollRad, double PitchRad, double YawRad);
