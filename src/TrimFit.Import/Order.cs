namespace TrimFit.Import;

/// <summary>Order statistics by selection; a long column is not sorted.</summary>
internal static class Order
{
    /// <summary>The lower median; reorders <paramref name="values"/>. NaN must not be among them.</summary>
    public static double LowerMedian(Span<double> values) => Select(values, (values.Length - 1) / 2);

    /// <summary>The value that share <paramref name="p"/> of the values do not exceed; reorders them. No interpolation.</summary>
    public static double Share(Span<double> values, double p) => Select(values, (int)Math.Ceiling(p * values.Length) - 1);

    /// <summary>The finite values of a column, copied.</summary>
    public static double[] Finite(ReadOnlySpan<double> column)
    {
        var kept = new List<double>(column.Length);
        foreach (double value in column)
        {
            if (double.IsFinite(value))
                kept.Add(value);
        }
        return [.. kept];
    }

    // Hoare's selection with the middle as pivot: sorted and constant columns stay linear.
    private static double Select(Span<double> values, int rank)
    {
        int low = 0, high = values.Length - 1;
        rank = Math.Clamp(rank, low, high);
        while (low < high)
        {
            double pivot = values[low + (high - low) / 2];
            int i = low, j = high;
            while (i <= j)
            {
                while (values[i] < pivot)
                    i++;
                while (values[j] > pivot)
                    j--;
                if (i > j)
                    break;
                (values[i], values[j]) = (values[j], values[i]);
                i++;
                j--;
            }
            if (rank <= j)
                high = j;
            else if (rank >= i)
                low = i;
            else
                break;
        }
        return values[rank];
    }
}
