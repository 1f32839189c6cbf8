namespace TrimFit.Core.Rigging;

/// <summary>A number of the rig with its spread and where it comes from; the unit is in the name of the property that holds it.</summary>
public readonly record struct Reading
{
    private Reading(double value, double standardDeviation, ReadingSource source) =>
        (Value, StandardDeviation, Source) = (value, standardDeviation, source);

    /// <summary>The value, SI.</summary>
    public double Value { get; }

    /// <summary>Standard deviation of the value; 0 when taken as exact.</summary>
    public double StandardDeviation { get; }

    /// <summary>Measured, or assumed because the rig file is silent.</summary>
    public ReadingSource Source { get; }

    /// <summary>Lower end of the value's 95 % range.</summary>
    public double Low95 => Value - (1.96 * StandardDeviation);

    /// <summary>Upper end of the value's 95 % range.</summary>
    public double High95 => Value + (1.96 * StandardDeviation);

    /// <summary>A value the rig file gives.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not finite, or a negative spread.</exception>
    public static Reading Measured(double value, double standardDeviation = 0) =>
        new(Guard.Finite(value), Guard.NotNegative(standardDeviation), ReadingSource.Measured);

    /// <summary>A value that stands in for a missing measurement.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not finite, or a negative spread.</exception>
    public static Reading Assumed(double value, double standardDeviation = 0) =>
        new(Guard.Finite(value), Guard.NotNegative(standardDeviation), ReadingSource.Assumed);

    /// <summary>The same value and source with another spread.</summary>
    public Reading WithStandardDeviation(double standardDeviation) => new(Value, Guard.NotNegative(standardDeviation), Source);
}

/// <summary>Where a <see cref="Reading"/> comes from.</summary>
public enum ReadingSource
{
    /// <summary>Given in the rig file.</summary>
    Measured,
    /// <summary>A default; listed among the assumptions.</summary>
    Assumed,
}
