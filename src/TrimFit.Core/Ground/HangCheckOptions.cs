namespace TrimFit.Core.Ground;

/// <summary>What a hang check is taken to be good for.</summary>
public sealed record HangCheckOptions
{
    /// <summary>Standard deviation of one hanging scale's calibration, kg; it stays the same over a check. Default 0.2 (common practice, no source).</summary>
    public double ScaleSdKg { get; init => field = Guard.Positive(value); } = 0.2;

    /// <summary>Standard deviation of how differently the pilot sits from one hang to the next, sideways, m.</summary>
    /// <remarks>Default 4.5 mm, worth 8 degrees of freedom: a 95 % range of 3 to 8 mm around the 3 to 5 mm that pilots are said to scatter
    /// by (common practice, no source). The hangs' own scatter is pooled with it. Chosen so that three hangs of a pilot who reseats by 5 mm
    /// cover 95 % (DEVELOPERS.md, "Ground checks"); a steadier pilot gets more, one of 8 mm less.</remarks>
    public double SeatingSdM { get; init => field = Guard.Positive(value); } = 0.0045;

    /// <summary>Degrees of freedom that <see cref="SeatingSdM"/> is worth; default 8.</summary>
    public double SeatingDegreesOfFreedom { get; init => field = Guard.Positive(value); } = 8;
}
