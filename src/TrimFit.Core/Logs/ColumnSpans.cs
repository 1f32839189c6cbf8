namespace TrimFit.Core.Logs;

/// <summary>Small questions asked of whole columns.</summary>
internal static class ColumnSpans
{
    public static bool ContainsAnyFinite(this Span<double> values)
    {
        foreach (double v in values)
        {
            if (double.IsFinite(v))
                return true;
        }
        return false;
    }

    public static bool ContainsAnyInfinite(this Span<double> values)
    {
        foreach (double v in values)
        {
            if (double.IsInfinity(v))
                return true;
        }
        return false;
    }
}
