using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>Riser carabiners and harness hang points, lateral places in m from the frame's centre line, right positive.</summary>
public sealed record GeometrySetup
{
    /// <summary>Left riser carabiner, m; negative.</summary>
    public double LeftCarabinerM { get; init => field = Guard.Finite(value); } = -0.22;

    /// <summary>Right riser carabiner, m.</summary>
    public double RightCarabinerM { get; init => field = Guard.Finite(value); } = 0.22;

    /// <summary>Share of the pilot's weight on the front harness hang points.</summary>
    public double FrontShare
    {
        get;
        init => field = value is >= 0 and <= 1 ? value : throw new ArgumentOutOfRangeException(nameof(value), value, "must be 0 to 1");
    } = 0.8;

    /// <summary>Mean lateral place of the front harness hang points, m.</summary>
    public double FrontHangPointsM { get; init => field = Guard.Finite(value); }

    /// <summary>Mean lateral place of the rear harness hang points, m.</summary>
    public double RearHangPointsM { get; init => field = Guard.Finite(value); }
}
