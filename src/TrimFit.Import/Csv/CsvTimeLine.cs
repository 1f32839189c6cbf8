using TrimFit.Core.Logs;

namespace TrimFit.Import.Csv;

/// <summary>Stamps that repeat: coarse ones are spread, the odd repeated one is left out.</summary>
internal static class CsvTimeLine
{
    /// <summary>Share of rows that repeat their stamp above which stamps are coarser than the sampling.</summary>
    private const double CoarseShare = 0.3;

    /// <summary>Deals with repeats; times are strictly increasing afterwards.</summary>
    public static void Repeats(string file, ref double[] timeSec, int count, int repeats, int firstLine, CsvColumn[] columns, CsvLeftOut leftOut, List<Notice> notices, out int kept)
    {
        kept = count;
        if (repeats == 0)
            return;
        if (repeats > CoarseShare * count)
        {
            double rate = Spread(timeSec.AsSpan(0, count));
            notices.Add(new("coarse_time", FormattableString.Invariant(
                $"{file}({firstLine}): the time stamps are coarser than the sampling (about {rate:G3} rows share each); rows with the same stamp are spread evenly over its step.")));
            return;
        }
        kept = 0;
        for (int i = 0; i < count; i++)
        {
            if (kept > 0 && !(timeSec[i] > timeSec[kept - 1]))
            {
                leftOut.Add("repeat", firstLine, null, () => new("time repeats", "the row has the time of the row before.", "the time of the row before", "a later time", "Delete one of the rows."));
                continue;
            }
            timeSec[kept] = timeSec[i];
            foreach (CsvColumn column in columns)
            {
                column.Values[kept] = column.Values[i];
                if (column.SecondValues.Length > 0)
                    column.SecondValues[kept] = column.SecondValues[i];
            }
            kept++;
        }
    }

    /// <summary>Spreads rows of one stamp over its step; returns rows per stamp. Stamps are taken as cut down to the step, as clocks show them.</summary>
    private static double Spread(Span<double> time)
    {
        var starts = new List<int> { 0 };
        for (int i = 1; i < time.Length; i++)
        {
            if (time[i] > time[i - 1])
                starts.Add(i);
        }
        int groups = starts.Count;
        starts.Add(time.Length);
        double[] steps = new double[Math.Max(1, groups - 1)];
        double[] sizes = new double[groups];
        for (int g = 0; g < groups; g++)
        {
            sizes[g] = starts[g + 1] - starts[g];
            if (g + 1 < groups)
                steps[g] = time[starts[g + 1]] - time[starts[g]];
        }
        double usual = groups > 1 ? Order.LowerMedian(steps) : 1;
        double perStep = Order.LowerMedian([.. sizes]);
        for (int g = 0; g < groups; g++)
        {
            double stamp = time[starts[g]];
            double size = sizes[g];
            double step = g + 1 < groups ? Math.Min(usual, time[starts[g + 1]] - stamp) : usual;
            // The record begins and ends within a step: fewer rows there keep the usual distance instead of filling the step.
            double each = size < perStep && (g == 0 || g == groups - 1) ? step / perStep : step / size;
            double first = g == 0 && size < perStep ? stamp + step - size * each : stamp;
            for (int i = starts[g]; i < starts[g + 1]; i++)
                time[i] = first + (i - starts[g]) * each;
        }
        return perStep;
    }
}
