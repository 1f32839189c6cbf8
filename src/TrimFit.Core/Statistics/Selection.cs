namespace TrimFit.Core.Statistics;

/// <summary>Order statistics without sorting the whole column.</summary>
internal static class Selection
{
    /// <summary>Puts the k-th smallest value at index k, smaller or equal ones before it, larger or equal ones after it; returns it.</summary>
    /// <remarks>C. A. R. Hoare, "Algorithm 65: Find", Commun. ACM 4 (1961) 321, with the middle of three as pivot.</remarks>
    public static double Nth(Span<double> values, int k)
    {
        int left = 0, right = values.Length - 1;
        while (right > left)
        {
            int middle = left + ((right - left) / 2);
            if (values[middle] < values[left])
                (values[middle], values[left]) = (values[left], values[middle]);
            if (values[right] < values[left])
                (values[right], values[left]) = (values[left], values[right]);
            if (values[right] < values[middle])
                (values[right], values[middle]) = (values[middle], values[right]);
            double pivot = values[middle];
            int i = left, j = right;
            while (i <= j)
            {
                while (values[i] < pivot)
                    i++;
                while (values[j] > pivot)
                    j--;
                if (i <= j)
                {
                    (values[i], values[j]) = (values[j], values[i]);
                    i++;
                    j--;
                }
            }
            if (k <= j)
                right = j;
            else if (k >= i)
                left = i;
            else
                break;
        }
        return values[k];
    }

    public static void CheckColumn(ReadOnlySpan<double> values, string name)
    {
        if (values.IsEmpty)
            throw new ArgumentException("is empty: an empty column has no quantile", name);
        for (int i = 0; i < values.Length; i++)
        {
            if (!double.IsFinite(values[i]))
                throw new ArgumentException(FormattableString.Invariant($"value {i} is {values[i]}: must be finite"), name);
        }
    }
}
