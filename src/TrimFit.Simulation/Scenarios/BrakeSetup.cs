using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>What the brakes do and how far they go.</summary>
public sealed record BrakeSetup
{
    /// <summary>Turn rate per metre of right-minus-left brake beyond the soft start, rad/s per m. Default 0.08 deg/s per mm.</summary>
    public double TurnPerMeter { get; init => field = Guard.Positive(value); } = double.DegreesToRadians(80);

    /// <summary>Full travel, m.</summary>
    public double FullTravelM { get; init => field = Guard.Positive(value); } = 0.60;

    /// <summary>Travel over which a brake hardly bites, m: the effect is x − d·tanh(x/d). 0 is linear.</summary>
    public double SoftStartM { get; init => field = Guard.NotNegative(value); }

    /// <summary>How much shorter the right brake line is than the left one, m: travel that it has ahead of the handle.</summary>
    public double RightLineShorterM { get; init => field = Guard.NotNegative(value); }

    /// <summary>What a difference of the handles does, rad/s, right positive.</summary>
    public double Turn(double leftM, double rightM) => TurnPerMeter * (Effective(rightM + RightLineShorterM) - Effective(leftM));

    /// <summary>What a brake travel is worth as linear travel, m.</summary>
    public double Effective(double travelM) => SoftStartM > 0 ? travelM - (SoftStartM * Math.Tanh(travelM / SoftStartM)) : travelM;
}
