using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>How the integrals of some rate columns explain the change of a heading.</summary>
/// <param name="Coefficients">One for each column: heading rate per unit of it.</param>
/// <param name="Covariance">Their covariance, row by row, robust against errors that follow each other in time.</param>
/// <param name="Intercept">Heading rate where the columns are 0, rad/s; 0 with no error when it was not fitted.</param>
/// <param name="DelaySec">Delay of the columns behind the heading, s; null when it was not asked for or cannot be told.</param>
/// <param name="ResidualRad">Robust scale of a span's residual, rad.</param>
/// <param name="Spans">Spans compared; neighbours overlap.</param>
internal sealed record HeadingMatch(double[] Coefficients, double[] Covariance, Estimate Intercept, Estimate? DelaySec, double ResidualRad, int Spans)
{
    /// <summary>A coefficient with its standard error.</summary>
    public Estimate this[int column] => new(Coefficients[column], Math.Sqrt(Math.Max(0, Covariance[(column * Coefficients.Length) + column])));
}

/// <summary>Compares integrated rates with a heading over spans of some seconds, at any delay between the two.</summary>
/// <remarks>The heading of the GPS is the noisier side (gusts), so heading change is regressed on the integrals. Spans start a second apart and
/// overlap; errors are Newey-West. The delay is searched on a grid and refined by Gauss-Newton, the third column being the derivative of the
/// integrals by the delay: the sub-sample form of a cross-correlation, with its error.</remarks>
internal sealed class HeadingRegression
{
    private const double SpanSec = 4, LongestSpanSec = 6, BinSec = 1, LongestGapSec = 2.5, LongestRateGapSec = 1;
    private const int FewestSpans = 20, OverlappingSpans = 4, HacLag = 8;
    private const double LargestDelaySec = 3, GridSec = 0.2, WildMads = 4.5;

    private readonly double[] _rateTime, _fixTime, _heading;
    private readonly double[][] _integral;
    private readonly int[] _rateStretch, _fixStretch;
    private readonly List<(int First, int Count)> _bins = [];
    private readonly List<(int From, int To)> _spans = [];

    /// <param name="time">Clock of all columns, s.</param>
    /// <param name="columns">Rates, rad/s; a row counts where all are finite.</param>
    /// <param name="unwrappedHeading">Heading, rad, unwrapped; NaN where there is none.</param>
    /// <param name="use">Where the heading may be compared.</param>
    public HeadingRegression(double[] time, double[][] columns, double[] unwrappedHeading, bool[] use)
    {
        int m = columns.Length;
        var rateTime = new List<double>();
        var stretch = new List<int>();
        var integral = new List<double>[m];
        for (int c = 0; c < m; c++)
            integral[c] = [];
        int last = -1, part = 0;
        for (int i = 0; i < time.Length; i++)
        {
            if (!Array.TrueForAll(columns, column => double.IsFinite(column[i])))
                continue;
            bool joined = last >= 0 && time[i] - time[last] <= LongestRateGapSec;
            if (last >= 0 && !joined)
                part++;
            for (int c = 0; c < m; c++)
            {
                double before = integral[c].Count > 0 ? integral[c][^1] : 0;
                integral[c].Add(joined ? before + (0.5 * (columns[c][i] + columns[c][last]) * (time[i] - time[last])) : before);
            }
            rateTime.Add(time[i]);
            stretch.Add(part);
            last = i;
        }
        _rateTime = [.. rateTime];
        _rateStretch = [.. stretch];
        _integral = [.. integral.Select(x => x.ToArray())];

        var fixTime = new List<double>();
        var heading = new List<double>();
        var fixStretch = new List<int>();
        part = 0;
        for (int i = 0; i < unwrappedHeading.Length; i++)
        {
            if (!use[i])
                part++;
            if (!use[i] || !double.IsFinite(unwrappedHeading[i]))
                continue;
            if (fixTime.Count > 0 && time[i] - fixTime[^1] > LongestGapSec)
                part++;
            fixTime.Add(time[i]);
            heading.Add(unwrappedHeading[i]);
            fixStretch.Add(part);
        }
        _fixTime = [.. fixTime];
        _heading = [.. heading];
        _fixStretch = [.. fixStretch];
        for (int i = 0; i < _fixTime.Length;)
        {
            int end = i + 1;
            while (end < _fixTime.Length && _fixStretch[end] == _fixStretch[i] && _fixTime[end] - _fixTime[i] < BinSec - 1e-6)
                end++;
            _bins.Add((i, end - i));
            i = end;
        }
        for (int a = 0, b = 0; a < _bins.Count; a++)
        {
            b = Math.Max(b, a + 1);
            while (b < _bins.Count && _fixTime[_bins[b].First] - _fixTime[_bins[a].First] < SpanSec)
                b++;
            if (b < _bins.Count && _fixStretch[_bins[b].First] == _fixStretch[_bins[a].First]
                && _fixTime[_bins[b].First] - _fixTime[_bins[a].First] <= LongestSpanSec)
                _spans.Add((a, b));
        }
    }

    /// <summary>Fits; null when too little can be compared.</summary>
    /// <param name="intercept">Whether a constant heading rate is fitted too.</param>
    /// <param name="findDelay">Whether the delay is searched; else it is <paramref name="delaySec"/>.</param>
    /// <param name="delaySec">Delay of the columns behind the heading, s.</param>
    /// <param name="priorSd">For each column the sd of a normal prior about 0, or infinity; null for none.</param>
    public HeadingMatch? Fit(bool intercept, bool findDelay, double delaySec = 0, double[]? priorSd = null)
    {
        if (_spans.Count < FewestSpans || _rateTime.Length < FewestSpans)
            return null;
        double best = delaySec;
        if (findDelay)
        {
            double lowest = double.PositiveInfinity;
            for (int k = -(int)(LargestDelaySec / GridSec); k <= (int)(LargestDelaySec / GridSec); k++)
            {
                if (Solve(k * GridSec, intercept, false, null, null) is Solution s && s.MeanAbsolute < lowest)
                    (lowest, best) = (s.MeanAbsolute, k * GridSec);
            }
        }
        Solution? fit = Solve(best, intercept, findDelay, priorSd, null);
        if (fit is null)
            return null;
        bool[] keep = Tame(fit);
        Estimate? delay = null;
        for (int round = 0; round < 8; round++)
        {
            fit = Solve(best, intercept, findDelay, priorSd, keep);
            if (fit is null)
                return null;
            if (!findDelay)
                break;
            if (fit.DelayStep is not Estimate step || !(Math.Abs(best + step.Value) < LargestDelaySec))
            {
                delay = null;
                break;
            }
            best += Math.Clamp(step.Value, -GridSec, GridSec);
            delay = new(best, step.StandardError);
            if (Math.Abs(step.Value) < 1e-4)
                break;
        }
        return new(fit.Columns, fit.Covariance, fit.Intercept, delay, NormalConsistentMad.About(fit.Residuals, 0), fit.Residuals.Length);
    }

    private static bool[] Tame(Solution fit)
    {
        double limit = WildMads * Math.Max(NormalConsistentMad.About(fit.Residuals, 0), 1e-6);
        var keep = new bool[fit.Rows.Length];
        int row = 0;
        for (int k = 0; k < keep.Length; k++)
            keep[k] = fit.Rows[k] && Math.Abs(fit.Residuals[row++]) <= limit;
        return keep;
    }

    private sealed record Solution(
        double[] Columns, double[] Covariance, Estimate Intercept, Estimate? DelayStep, double[] Residuals, bool[] Rows, double MeanAbsolute);

    /// <summary>Least squares at one delay; with <paramref name="refine"/> one more column gives the step to a better one.</summary>
    private Solution? Solve(double delay, bool intercept, bool refine, double[]? priorSd, bool[]? keep)
    {
        int m = _integral.Length, bins = _bins.Count;
        var angle = new double[bins * m];
        var rate = new double[bins * m];
        var heading = new double[bins];
        var part = new int[bins];
        int cursor = 0;
        for (int b = 0; b < bins; b++)
        {
            (int first, int count) = _bins[b];
            part[b] = -1;
            bool whole = true;
            for (int i = first; i < first + count; i++)
            {
                heading[b] += _heading[i] / count;
                double t = _fixTime[i] + delay;
                while (cursor + 1 < _rateTime.Length && _rateTime[cursor + 1] <= t)
                    cursor++;
                while (cursor > 0 && _rateTime[cursor] > t)
                    cursor--;
                if (cursor + 1 >= _rateTime.Length || t < _rateTime[cursor] || _rateStretch[cursor] != _rateStretch[cursor + 1]
                    || (part[b] >= 0 && part[b] != _rateStretch[cursor]))
                {
                    whole = false;
                    break;
                }
                part[b] = _rateStretch[cursor];
                double step = _rateTime[cursor + 1] - _rateTime[cursor], share = (t - _rateTime[cursor]) / step;
                for (int c = 0; c < m; c++)
                {
                    double low = _integral[c][cursor], high = _integral[c][cursor + 1];
                    angle[(b * m) + c] += (low + (share * (high - low))) / count;
                    rate[(b * m) + c] += (high - low) / step / count;
                }
            }
            if (!whole)
                part[b] = -1;
        }
        var rows = new bool[_spans.Count];
        int n = 0;
        for (int k = 0; k < rows.Length; k++)
        {
            (int a, int b) = _spans[k];
            rows[k] = (keep is null || keep[k]) && part[a] >= 0 && part[a] == part[b];
            n += rows[k] ? 1 : 0;
        }
        int p = m + (intercept ? 1 : 0);
        if (n < FewestSpans + (3 * p))
            return null;
        var design = new double[n * p];
        var derivative = new double[n * m];
        var y = new double[n];
        var segments = new int[n];
        int row = 0;
        for (int k = 0; k < rows.Length; k++)
        {
            if (!rows[k])
                continue;
            (int a, int b) = _spans[k];
            for (int c = 0; c < m; c++)
            {
                design[(c * n) + row] = angle[(b * m) + c] - angle[(a * m) + c];
                derivative[(c * n) + row] = rate[(b * m) + c] - rate[(a * m) + c];
            }
            if (intercept)
                design[(m * n) + row] = _fixTime[_bins[b].First] - _fixTime[_bins[a].First];
            y[row] = heading[b] - heading[a];
            segments[row] = _fixStretch[_bins[a].First];
            row++;
        }
        LeastSquaresFit fit = LeastSquares.Fit(design, y, p);
        if (priorSd is not null)
        {
            double scale = Math.Sqrt(OverlappingSpans) * fit.ResidualScale; // overlapping spans say the same thing several times
            (design, y, segments) = WithPriors(design, y, segments, p, priorSd, scale);
            fit = LeastSquares.Fit(design, y, p);
        }
        if (fit.Rank < p)
            return null;
        Estimate? delayStep = null;
        double[] use = design;
        LeastSquaresFit final = fit;
        int columns = p;
        if (refine)
        {
            columns = p + 1;
            int total = y.Length;
            use = new double[total * columns];
            design.CopyTo(use, 0);
            for (int i = 0; i < n; i++)
            {
                for (int c = 0; c < m; c++)
                    use[(p * total) + i] += fit.Coefficients[c] * derivative[(c * n) + i];
            }
            final = LeastSquares.Fit(use, y, columns);
            if (final.Rank < columns)
                return null;
        }
        double[] covariance = NeweyWest.Covariance(use, final.Residuals.AsSpan(), columns, HacLag, SmallSample.DegreesOfFreedom, segments);
        // Never below the plain covariance with the overlap counted: the sandwich is unsteady when a few turns carry everything.
        for (int i = 0; i < columns; i++)
        {
            double plain = final.Covariance(i, i), robust = covariance[(i * columns) + i];
            double grow = robust > 0 ? Math.Sqrt(Math.Max(1, plain / robust)) : 0;
            for (int j = 0; j < columns; j++)
            {
                covariance[(i * columns) + j] *= grow;
                covariance[(j * columns) + i] *= grow;
            }
            if (!(robust > 0))
                covariance[(i * columns) + i] = plain;
        }
        double Error(int column) => Math.Sqrt(Math.Max(0, covariance[(column * columns) + column]));
        if (refine)
            delayStep = new(final.Coefficients[p], Error(p));
        var small = new double[m * m];
        for (int i = 0; i < m; i++)
        {
            for (int j = 0; j < m; j++)
                small[(i * m) + j] = covariance[(i * columns) + j];
        }
        double[] residuals = fit.Residuals.AsSpan()[..n].ToArray();
        return new(
            fit.Coefficients.AsSpan()[..m].ToArray(), small, intercept ? new(fit.Coefficients[m], Error(m)) : new(0, 0),
            delayStep, residuals, rows, residuals.Sum(Math.Abs) / n);
    }

    private static (double[] Design, double[] Y, int[] Segments) WithPriors(double[] design, double[] y, int[] segments, int p, double[] priorSd, double scale)
    {
        int n = y.Length, extra = priorSd.Count(double.IsFinite), total = n + extra;
        var wider = new double[total * p];
        for (int c = 0; c < p; c++)
            Array.Copy(design, c * n, wider, c * total, n);
        var rhs = new double[total];
        y.CopyTo(rhs, 0);
        var parts = new int[total];
        segments.CopyTo(parts, 0);
        int row = n;
        for (int c = 0; c < priorSd.Length; c++)
        {
            if (!double.IsFinite(priorSd[c]))
                continue;
            wider[(c * total) + row] = scale / priorSd[c];
            parts[row] = -1 - row;
            row++;
        }
        return (wider, rhs, parts);
    }
}
