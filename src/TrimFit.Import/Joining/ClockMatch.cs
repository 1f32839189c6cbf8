namespace TrimFit.Import.Joining;

/// <summary>Where the clock of one logger lies on that of another, found from what both felt.</summary>
/// <param name="OffsetSec">Added to the second clock to give the first, s.</param>
/// <param name="StdErrorSec">Standard error, s.</param>
/// <param name="Correlation">Correlation at that offset.</param>
/// <param name="NextOffsetSec">The next best offset away from it, s; null when there is none.</param>
/// <param name="NextCorrelation">Correlation at the next best offset.</param>
/// <param name="IsFirm">Whether the offset stands out clearly enough to be used.</param>
/// <param name="Signals">The two signals in words.</param>
internal sealed record ClockMatch(double OffsetSec, double StdErrorSec, double Correlation, double? NextOffsetSec, double NextCorrelation, bool IsFirm, string Signals)
{
    /// <summary>Least correlation that is taken for the same flight.</summary>
    private const double LeastCorrelation = 0.35;

    /// <summary>Least log-likelihood ratio to the next best offset: 1000 to 1.</summary>
    private const double LeastLogRatio = 6.9;

    /// <summary>Climb answers the engine, but late: what the offset from them may be wrong by, s (one standard deviation; judged from the response times of paragliders, no source).</summary>
    private const double ClimbLagSd = 1.0;

    /// <summary>Delays of sensors and of the climb account for less than this between two kinds of signal, s.</summary>
    private const double LeastContradictionSec = 3;

    private const int MostGridPoints = 12_000;
    private const double FineStep = 0.5, FineReach = 3, FineTrial = 0.1;

    /// <summary>The best match of any pair of signals; null when no pair compares.</summary>
    /// <param name="first">Signals on the clock that stays.</param>
    /// <param name="second">Signals on the clock to be placed.</param>
    /// <param name="lowest">Least offset considered, s.</param>
    /// <param name="highest">Largest offset considered, s.</param>
    public static ClockMatch? Best(IReadOnlyList<TrackSignal> first, IReadOnlyList<TrackSignal> second, double lowest = double.NegativeInfinity, double highest = double.PositiveInfinity)
    {
        var ofPair = new Dictionary<(SignalKind, SignalKind), ClockMatch>();
        foreach (TrackSignal a in first)
        {
            foreach (TrackSignal b in second)
            {
                if (Comparison(a.Kind, b.Kind) is (double half, bool eitherSign, double lagSd, string words)
                    && Find(a, b, half, eitherSign, lagSd, words, lowest, highest) is ClockMatch match
                    && (!ofPair.TryGetValue((a.Kind, b.Kind), out ClockMatch? other) || Worth(match).CompareTo(Worth(other)) > 0))
                    ofPair[(a.Kind, b.Kind)] = match;
            }
        }
        ClockMatch? best = ofPair.Values.MaxBy(Worth);
        return best is not null && ofPair.Values.Any(match => match.IsFirm && match.Contradicts(best)) ? best with { IsFirm = false } : best;
    }

    /// <summary>Whether two kinds of signal ask for different offsets: then one of them has found a repetition, and none is believed.</summary>
    private bool Contradicts(ClockMatch other) => Math.Abs(OffsetSec - other.OffsetSec) > LeastContradictionSec
        + (3 * Math.Sqrt((StdErrorSec * StdErrorSec) + (other.StdErrorSec * other.StdErrorSec)));

    /// <summary>Firm before not, the same quantity before engine against climb, then by correlation.</summary>
    private static (bool, bool, double) Worth(ClockMatch match) => (match.IsFirm, match.StdErrorSec < ClimbLagSd, match.Correlation);

    /// <summary>Which signals compare, over which half window, and whether their signs may differ (a gyro may hang upside down).</summary>
    private static (double Half, bool EitherSign, double LagSd, string Words)? Comparison(SignalKind a, SignalKind b) => (a, b) switch
    {
        (SignalKind.Turn, SignalKind.Turn) => (2, true, 0, "turn rate"),
        (SignalKind.Climb, SignalKind.Climb) => (3, false, 0, "climb"),
        (SignalKind.Engine, SignalKind.Engine) => (3, false, 0, "engine"),
        (SignalKind.Speed, SignalKind.Speed) => (3, false, 0, "speed"),
        (SignalKind.Engine, SignalKind.Climb) or (SignalKind.Climb, SignalKind.Engine) => (5, false, ClimbLagSd, "engine and climb"),
        _ => null,
    };

    private static ClockMatch? Find(TrackSignal a, TrackSignal b, double half, bool eitherSign, double lagSd, string words, double lowest, double highest)
    {
        double step = Math.Max(1, Math.Max(a.End - a.Start, b.End - b.Start) / MostGridPoints);
        double[] x = Grid(a, step, half), y = Grid(b, step, half);
        double shortest = Math.Min(a.End - a.Start, b.End - b.Start);
        int leastOverlap = (int)Math.Ceiling(Math.Max(Math.Min(60, 0.5 * shortest), 0.3 * shortest) / step);
        double zero = a.Start - b.Start;
        int from = (int)Math.Ceiling(Math.Max(-(y.Length - 1), (lowest - zero) / step)), to = (int)Math.Floor(Math.Min(x.Length - 1, (highest - zero) / step));
        if (from > to)
            return null;
        double inflation = Inflation(x, y);
        (double Rho, int Pairs)[] rho = new (double, int)[to - from + 1];
        int peak = -1;
        double peakScore = double.NegativeInfinity;
        for (int k = 0; k < rho.Length; k++)
        {
            rho[k] = Correlate(x, y, from + k, leastOverlap);
            double score = Score(rho[k].Rho, rho[k].Pairs / inflation, eitherSign);
            if (score > peakScore)
                (peak, peakScore) = (k, score);
        }
        if (peak < 0 || !(peakScore > 0))
            return null;
        int reach = (int)Math.Ceiling(5 / step), left = peak, right = peak;
        double limit = 0.7 * Math.Abs(rho[peak].Rho);
        while (left > 0 && (peak - left < reach || Math.Abs(rho[left].Rho) > limit))
            left--;
        while (right < rho.Length - 1 && (right - peak < reach || Math.Abs(rho[right].Rho) > limit))
            right++;
        int next = -1;
        double nextScore = 0;
        for (int k = 0; k < rho.Length; k++)
        {
            double score = k < left || k > right ? Score(rho[k].Rho, rho[k].Pairs / inflation, eitherSign) : double.NegativeInfinity;
            if (score > nextScore)
                (next, nextScore) = (k, score);
        }
        double coarse = zero + ((from + peak) * step);
        int sign = rho[peak].Rho < 0 ? -1 : 1;
        (double offset, double error)? fine = Refine(a, b, coarse, step, half, sign);
        bool firm = fine is not null && Math.Abs(rho[peak].Rho) >= LeastCorrelation && peakScore - nextScore >= LeastLogRatio;
        double stdError = fine is { } f ? Math.Sqrt((f.error * f.error) + (lagSd * lagSd)) : step;
        return new(fine?.offset ?? coarse, stdError, Math.Abs(rho[peak].Rho), next < 0 ? null : zero + ((from + next) * step), next < 0 ? 0 : Math.Abs(rho[next].Rho), firm, words);
    }

    private static double[] Grid(TrackSignal signal, double step, double half) =>
        signal.Means(signal.Start, step, (int)((signal.End - signal.Start) / step) + 1, half);

    /// <summary>Log-likelihood of an offset over no relation at all, for two normal series: -n/2 ln(1 - rho²).</summary>
    private static double Score(double rho, double pairs, bool eitherSign) =>
        double.IsNaN(rho) || (rho < 0 && !eitherSign) ? double.NegativeInfinity : -pairs / 2 * Math.Log(1 - Math.Min(rho * rho, 1 - 1e-12));

    /// <summary>How many neighbouring pairs count as one: 1 + 2 sum of rho_x(k) rho_y(k) (Bartlett 1946).</summary>
    private static double Inflation(double[] x, double[] y)
    {
        double sum = 1;
        for (int k = 1; k <= 60; k++)
        {
            double rx = Correlate(x, x, k, 10).Rho, ry = Correlate(y, y, k, 10).Rho;
            if (double.IsFinite(rx * ry))
                sum += 2 * rx * ry;
        }
        return Math.Max(1, sum);
    }

    /// <summary>Correlation of x[i] with y[i - lag] where both have values; NaN with too few.</summary>
    private static (double Rho, int Pairs) Correlate(double[] x, double[] y, int lag, int leastPairs)
    {
        int from = Math.Max(0, lag), to = Math.Min(x.Length, y.Length + lag), n = 0;
        double sx = 0, sy = 0, sxx = 0, syy = 0, sxy = 0;
        for (int i = from; i < to; i++)
        {
            double u = x[i], v = y[i - lag];
            if (double.IsNaN(u + v))
                continue;
            n++;
            sx += u;
            sy += v;
            sxx += u * u;
            syy += v * v;
            sxy += u * v;
        }
        if (n < leastPairs || n < 3)
            return (double.NaN, n);
        double cxx = sxx - (sx * sx / n), cyy = syy - (sy * sy / n), cxy = sxy - (sx * sy / n);
        // A series that hardly varies here has no correlation; the bound keeps rounding from making one up.
        return cxx > 1e-12 * sxx && cyy > 1e-12 * syy ? (Math.Clamp(cxy / Math.Sqrt(cxx * cyy), -1, 1), n) : (double.NaN, n);
    }

    /// <summary>The offset to a fraction of the grid, with the scatter of the offsets of parts of the flight as its error.</summary>
    private static (double Offset, double Error)? Refine(TrackSignal a, TrackSignal b, double coarse, double coarseStep, double half, int sign)
    {
        double start = Math.Max(a.Start, b.Start + coarse), end = Math.Min(a.End, b.End + coarse);
        int count = (int)((end - start) / FineStep);
        if (count < 40)
            return null;
        double reach = Math.Max(FineReach, 2 * coarseStep);
        int trials = (int)Math.Round(reach / FineTrial);
        double[] x = a.Means(start, FineStep, count, half);
        double[][] y = [.. Enumerable.Range(-trials, (2 * trials) + 1).Select(k => b.Means(start - (coarse + (k * FineTrial)), FineStep, count, half))];
        if (Peak(x, y, 0, count, sign) is not double whole)
            return null;
        const int Parts = 8;
        var offsets = new List<double>();
        for (int p = 0; p < Parts; p++)
        {
            if (Peak(x, y, count * p / Parts, count * (p + 1) / Parts, sign) is double part)
                offsets.Add(part);
        }
        if (offsets.Count < 3)
            return null;
        double mean = offsets.Average();
        double scatter = Math.Sqrt(offsets.Sum(o => (o - mean) * (o - mean)) / (offsets.Count - 1) / offsets.Count) * FineTrial;
        // Parts that hit the end of the search are worse than they look, so missing parts widen the error.
        double error = Math.Max(scatter * Math.Sqrt((double)Parts / offsets.Count), FineTrial / Math.Sqrt(12));
        return (coarse + ((whole - trials) * FineTrial), error);
    }

    /// <summary>Place of the largest correlation among the trials, by the parabola through it and its neighbours; null at either end.</summary>
    private static double? Peak(double[] x, double[][] y, int from, int to, int sign)
    {
        double[] rho = new double[y.Length];
        int best = -1;
        for (int k = 0; k < y.Length; k++)
        {
            rho[k] = sign * Correlate(x[from..to], y[k][from..to], 0, 10).Rho;
            if (double.IsFinite(rho[k]) && (best < 0 || rho[k] > rho[best]))
                best = k;
        }
        if (best <= 0 || best >= y.Length - 1 || !(rho[best] > 0.2) || !double.IsFinite(rho[best - 1] + rho[best + 1]))
            return null;
        double curvature = rho[best - 1] - (2 * rho[best]) + rho[best + 1];
        return best + (curvature < 0 ? 0.5 * (rho[best - 1] - rho[best + 1]) / curvature : 0);
    }
}
