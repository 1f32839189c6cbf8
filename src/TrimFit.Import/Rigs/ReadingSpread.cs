namespace TrimFit.Import.Rigs;

/// <summary>How far off a reading may be when the file gives a number without <c>plus_minus</c>: half of its 95 % range.</summary>
/// <param name="Absolute">In the unit of the key.</param>
/// <param name="Relative">As a fraction of the value.</param>
/// <remarks>All figures are common practice with no source. A file that knows better says so with <c>plus_minus</c> or with repeats.</remarks>
internal readonly record struct ReadingSpread(double Absolute, double Relative)
{
    /// <summary>Normal quantile that turns a 95 % half-width into a standard deviation.</summary>
    public const double HalfWidthsPerSd = 1.96;

    /// <summary>A rule held against a tube: 2 mm.</summary>
    public static readonly ReadingSpread LateralMm = new(2, 0);

    /// <summary>The thrust line: 10 mm, since no ruler shows the sideways shift of the thrust's centre in oblique flow (P-factor).</summary>
    public static readonly ReadingSpread ThrustLineMm = new(10, 0);

    /// <summary>A depth under a hanging, swinging machine: 20 mm.</summary>
    public static readonly ReadingSpread DepthMm = new(20, 0);

    /// <summary>A distance between two carabiners or scales: 5 mm.</summary>
    public static readonly ReadingSpread SpacingMm = new(5, 0);

    /// <summary>A bathroom scale, clothing, fuel by the mark on the tank: 0.5 kg.</summary>
    public static readonly ReadingSpread MassKg = new(0.5, 0);

    /// <summary>A hanging scale read to 0.1 kg: 0.2 kg.</summary>
    public static readonly ReadingSpread ScaleKg = new(0.2, 0);

    /// <summary>A phone or spirit level on a frame: 1 degree.</summary>
    public static readonly ReadingSpread AngleDeg = new(1, 0);

    /// <summary>A thrust test on a post: 5 %.</summary>
    public static readonly ReadingSpread Thrust = new(0, 0.05);

    /// <summary>A share read off one hang test: 0.05.</summary>
    public static readonly ReadingSpread Share = new(0.05, 0);

    /// <summary>A figure of merit taken from a like propeller: 0.05.</summary>
    public static readonly ReadingSpread FigureOfMerit = new(0.05, 0);

    /// <summary>Lengths off a line plan: 3 %.</summary>
    public static readonly ReadingSpread LineLength = new(0, 0.03);

    /// <summary>A mass off a wing's label: 5 %.</summary>
    public static readonly ReadingSpread WingMass = new(0, 0.05);

    /// <summary>A twist stiffness from timing a few swings: 20 %.</summary>
    public static readonly ReadingSpread YawStiffness = new(0, 0.20);

    /// <summary>A sensitivity handed on without its spread: 50 %.</summary>
    public static readonly ReadingSpread Sensitivity = new(0, 0.50);

    /// <summary>Kept exactly as given; for keys whose spread the statics do not carry.</summary>
    public static readonly ReadingSpread None = new(0, 0);

    /// <summary>Standard deviation of one reading, in the unit of the key.</summary>
    public double StandardDeviation(double value) => (Absolute + (Relative * Math.Abs(value))) / HalfWidthsPerSd;

    /// <summary>Least standard deviation of a mean of repeats: half of one reading's, since repeats share the scale, the rule and the eye.</summary>
    public double FloorOfRepeats(double value) => StandardDeviation(value) / 2;
}
