namespace TrimFit.Import.Toml;

/// <summary>The known word a person most likely meant.</summary>
internal static class NearestWord
{
    /// <summary>The nearest of <paramref name="known"/>, or null when none is near.</summary>
    /// <remarks>Near is: at most a third of the letters wrong (Levenshtein 1966, with swapped neighbours counted as one error), or all parts
    /// of one word, split at underscores, found in the other (<c>carabiner_left_mm</c> for <c>left_mm</c>).</remarks>
    public static string? Find(string word, IEnumerable<string> known)
    {
        string lower = word.ToLowerInvariant().Replace('-', '_').Replace(' ', '_');
        string? best = null;
        double bestDistance = double.PositiveInfinity;
        foreach (string candidate in known)
        {
            string plain = candidate.ToLowerInvariant().Replace('-', '_');
            double distance = (double)Distance(lower, plain) / Math.Max(lower.Length, plain.Length);
            if (distance > 1.0 / 3)
                distance = Shares(lower, plain) ? 0.5 : double.PositiveInfinity;
            if (distance < bestDistance)
                (best, bestDistance) = (candidate, distance);
        }
        return best;
    }

    private static bool Shares(string a, string b)
    {
        string[] first = a.Split('_'), second = b.Split('_');
        return first.All(second.Contains) || second.All(first.Contains);
    }

    private static int Distance(string a, string b)
    {
        int[,] d = new int[a.Length + 1, b.Length + 1];
        for (int i = 0; i <= a.Length; i++)
            d[i, 0] = i;
        for (int j = 0; j <= b.Length; j++)
            d[0, j] = j;
        for (int i = 1; i <= a.Length; i++)
        {
            for (int j = 1; j <= b.Length; j++)
            {
                int cost = a[i - 1] == b[j - 1] ? 0 : 1;
                d[i, j] = Math.Min(Math.Min(d[i - 1, j] + 1, d[i, j - 1] + 1), d[i - 1, j - 1] + cost);
                if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
                    d[i, j] = Math.Min(d[i, j], d[i - 2, j - 2] + 1);
            }
        }
        return d[a.Length, b.Length];
    }
}
