namespace TrimFit.Core.Turns.FilterError;

/// <summary>What a column of the linear part stands for.</summary>
internal enum ColumnKind
{
    Constant,
    Thrust,
    ThrustSquared,
    Brake,
    Trimmer,
    CgShift,
    GyroBias,
    GyroRotation,
    GyroTwist,
    WindNorth,
    WindEast,
    CompassOffset,
    CompassSine,
    CompassCosine,
    RateSurprise,
    DisturbanceSurprise,
    HeadingSurprise,
}

/// <summary>One flight as the filter reads it: steps, held inputs, and one row of numbers for each measurement.</summary>
/// <remarks>A row has the measurement first and then, for each coefficient, minus what the coefficient adds to the measurement; inputs act
/// through <see cref="InputRows"/>. Rows are padded with zeros to <see cref="Stride"/>, a multiple of four, so that a kernel can take them
/// four at a time.</remarks>
internal sealed class FlightColumns
{
    public const byte Gyro = 1, Heading = 2, Compass = 4, Reset = 8;

    public required int Count { get; init; }
    public required int Stride { get; init; }
    public required double[] TimeSec { get; init; }

    /// <summary>Index into <see cref="Steps"/> of the step from a row to the next.</summary>
    public required int[] StepIndex { get; init; }

    /// <summary>The distinct lengths of steps, s.</summary>
    public required double[] Steps { get; init; }

    public required byte[] Flags { get; init; }
    public required double[] InputRows { get; init; }
    public required double[] GyroRows { get; init; }
    public required double[] HeadingRows { get; init; }
    public required double[] CompassRows { get; init; }

    /// <summary>Heading given to the state at a reset, rad.</summary>
    public required double[] StartHeading { get; init; }

    /// <summary>Block of the sandwich a row belongs to.</summary>
    public required int[] Block { get; init; }
    public required int Blocks { get; init; }

    public required ColumnKind[] Kinds { get; init; }

    /// <summary>What one unit of the column is in the unit of the result: coefficient = β / scale.</summary>
    public required double[] Scale { get; init; }

    /// <summary>Standard deviation of the normal prior on each β, mean 0.</summary>
    public required double[] PriorSd { get; init; }

    public required bool HasGyro { get; init; }
    public required bool HasHeading { get; init; }
    public required bool HasCompass { get; init; }

    /// <summary>Bias already taken off the gyro because it was measured standing still, rad/s.</summary>
    public required double GyroBiasTaken { get; init; }

    /// <summary>Mean number of gyro samples behind one gyro row.</summary>
    public required double GyroSamplesPerRow { get; init; }

    /// <summary>Mean number of fixes behind one heading row.</summary>
    public required double HeadingSamplesPerRow { get; init; }

    /// <summary>Measurements in all.</summary>
    public required int Measurements { get; init; }

    /// <summary>Seconds of flight the rows cover.</summary>
    public required double UsedSec { get; init; }

    /// <summary>The brake's surprise at each row, which corrects the states through columns of its own from that row on; empty where there is none.</summary>
    public double[] Surprise { get; set; } = [];

    public required bool[] HandsOff { get; init; }

    /// <summary>The scaled brake difference of each row, as an input column has it; empty without brakes.</summary>
    public double[] BrakeColumn()
    {
        int brake = IndexOf(ColumnKind.Brake);
        if (brake < 0)
            return [];
        double[] column = new double[Count];
        for (int i = 0; i < Count; i++)
            column[i] = InputRows[(i * Stride) + brake + 1];
        return column;
    }

    /// <summary>Replaces the brake input by what is left of it beyond a dead band.</summary>
    /// <param name="brakes">The brakes as they were, from <see cref="BrakeColumn"/>.</param>
    /// <param name="width">Half-width of the dead band, in the unit of the column; 0 for none.</param>
    public void SetBrakes(double[] brakes, double width)
    {
        int brake = IndexOf(ColumnKind.Brake);
        for (int i = 0; i < brakes.Length; i++)
            InputRows[(i * Stride) + brake + 1] = Math.CopySign(Math.Max(0, Math.Abs(brakes[i]) - width), brakes[i]);
    }

    /// <summary>Number of coefficients.</summary>
    public int Coefficients => Kinds.Length;

    /// <summary>Position of a column, or -1.</summary>
    public int IndexOf(ColumnKind kind) => Array.IndexOf(Kinds, kind);
}
