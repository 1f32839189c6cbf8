namespace TrimFit.Core.Turns;

/// <summary>Angles that wrap.</summary>
public static class Angles
{
    /// <summary>The same direction in (-π, π].</summary>
    public static double Wrap(double rad)
    {
        double wrapped = Math.IEEERemainder(rad, 2 * Math.PI);
        return wrapped <= -Math.PI ? wrapped + (2 * Math.PI) : wrapped;
    }

    /// <summary>Removes the jumps of 2π between successive finite values; NaN stays NaN.</summary>
    public static double[] Unwrap(ReadOnlySpan<double> wrappedRad)
    {
        var result = new double[wrappedRad.Length];
        double last = double.NaN;
        for (int i = 0; i < result.Length; i++)
        {
            if (!double.IsFinite(wrappedRad[i]))
            {
                result[i] = double.NaN;
                continue;
            }
            result[i] = double.IsNaN(last) ? wrappedRad[i] : last + Wrap(wrappedRad[i] - last);
            last = result[i];
        }
        return result;
    }
}
