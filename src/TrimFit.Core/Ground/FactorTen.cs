namespace TrimFit.Core.Ground;

/// <summary>A reading typed with a digit too many or too few, or the decimal point in the wrong place.</summary>
public static class FactorTen
{
    /// <summary>A reading between 7 and 14 times (or that part of) what it should be is a slip by ten and some scatter, in logarithm.</summary>
    private static readonly double _nearest = Math.Log10(7), _farthest = Math.Log10(14);

    /// <summary>Finds the reading that is off by ten against the median of the others.</summary>
    /// <param name="readings">Repeats of one reading.</param>
    /// <param name="smallest">Readings whose size stays below this are not judged: the scatter around 0 has no ratio.</param>
    /// <returns>Its place and what it would be without the slip; null when none is, or when two readings alone do not say which.</returns>
    public static (int Index, double Corrected)? Find(ReadOnlySpan<double> readings, double smallest = 0)
    {
        if (readings.Length < 3)
            return null;
        var others = new double[readings.Length - 1];
        for (int i = 0; i < readings.Length; i++)
        {
            readings[..i].CopyTo(others);
            readings[(i + 1)..].CopyTo(others.AsSpan(i));
            double usual = Statistics.Median.Of(others);
            if (Against(readings[i], usual, smallest) is double corrected)
                return (i, corrected);
        }
        return null;
    }

    /// <summary>What a reading would be without a slip by ten against what it should be; null when there is none.</summary>
    /// <param name="reading">The reading.</param>
    /// <param name="usual">What it should be, of the same sign.</param>
    /// <param name="smallest">Sizes below this are not judged.</param>
    public static double? Against(double reading, double usual, double smallest = 0)
    {
        if (!(Math.Max(Math.Abs(reading), Math.Abs(usual)) > smallest) || !(reading * usual > 0))
            return null;
        double log = Math.Log10(reading / usual);
        return Math.Abs(log) >= _nearest && Math.Abs(log) <= _farthest ? (log > 0 ? reading / 10 : reading * 10) : null;
    }
}
