namespace TrimFit.Simulation;

/// <summary>A frame in steady flight: what it gives to the wing and how it hangs. Right positive.</summary>
/// <param name="RollMomentNm">Roll moment about the CG of the whole, N·m.</param>
/// <param name="YawMomentNm">Moment about the riser axis, N·m.</param>
/// <param name="TwistRad">Riser twist, rad.</param>
/// <param name="LeftRiserN">Tension of the left riser, N.</param>
/// <param name="RightRiserN">Tension of the right riser, N.</param>
/// <param name="ThrustAngleRad">Thrust axis above square to the risers, rad.</param>
/// <param name="LeanRad">How far the risers lean ahead of the vertical, rad.</param>
/// <param name="ThrustArmM">Depth of the thrust line below the CG of the whole, along the risers, m.</param>
internal sealed record FrameEquilibrium(
    double RollMomentNm, double YawMomentNm, double TwistRad, double LeftRiserN, double RightRiserN, double ThrustAngleRad, double LeanRad, double ThrustArmM);
