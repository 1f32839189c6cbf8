using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>Finds wind and airspeed: ground velocities of a machine that flies at one airspeed lie on a circle around the wind.</summary>
/// <remarks>Taubin's circle (IEEE Trans. PAMI 13 (1991) 1115) on fixes about a second apart, refitted without fixes further than three
/// normal-consistent MADs from it. Standard errors by Gauss-Newton at the fit, widened for the residuals' autocorrelation at lag 1.</remarks>
public static class WindFit
{
    /// <summary>Directions that must be covered, rad: below 150 deg of arc centre and radius of a noisy circle trade against each other.</summary>
    public const double SmallestArcRad = 150 * Math.PI / 180;

    private const double SampleStepSec = 1;
    private const int FewestFixes = 30, TrimRounds = 3, ArcBins = 36;
    private const int FewestTurningFixes = 120;
    private const double RounderShare = 0.7, FullArcRad = 1.8 * Math.PI, TurningRadPerSec = 6 * Math.PI / 180;
    private const double SlowestAirspeed = 3; // m/s: nothing that flies under a wing is slower

    /// <summary>Fits the circle.</summary>
    /// <param name="timeSec">Times, s, increasing.</param>
    /// <param name="north">Ground velocity north, m/s, NaN where there is no fix.</param>
    /// <param name="east">Ground velocity east, m/s.</param>
    /// <param name="use">Which samples are in flight.</param>
    /// <param name="arcRad">Arc covered by the headings, rad, also when the fit is refused; 0 without a circle.</param>
    /// <returns>The wind, or null when there are too few fixes, too little arc or no circle.</returns>
    public static Wind? Fit(ReadOnlySpan<double> timeSec, ReadOnlySpan<double> north, ReadOnlySpan<double> east, ReadOnlySpan<bool> use, out double arcRad)
    {
        arcRad = 0;
        var t = new List<double>();
        var y = new List<double>();
        var x = new List<double>();
        double last = double.NegativeInfinity;
        for (int i = 0; i < timeSec.Length; i++)
        {
            if (use[i] && double.IsFinite(north[i]) && double.IsFinite(east[i]) && timeSec[i] - last >= SampleStepSec - 1e-6)
            {
                y.Add(north[i]);
                x.Add(east[i]);
                t.Add(timeSec[i]);
                last = timeSec[i];
            }
        }
        if (x.Count < FewestFixes)
            return null;

        double[] xs = [.. x], ys = [.. y];
        if (Trimmed(ref xs, ref ys) is not Circle best)
            return null;
        // Glides flown faster than the turns pull the circle out of shape: where the turns alone are clearly rounder, they are the circle.
        bool[] turning = Turning([.. t], [.. x], [.. y], best);
        double[] turnX = [.. x.Where((_, i) => turning[i])], turnY = [.. y.Where((_, i) => turning[i])];
        if (turnX.Length >= FewestTurningFixes && Trimmed(ref turnX, ref turnY) is Circle turns && Arc(turnX, turnY, turns) > FullArcRad
            && NormalConsistentMad.Of(Residuals(turnX, turnY, turns)) < RounderShare * NormalConsistentMad.Of(Residuals(xs, ys, best)))
        {
            (best, xs, ys) = (turns, turnX, turnY);
        }
        arcRad = Arc(xs, ys, best);
        if (arcRad < SmallestArcRad)
            return null;
        (double sdX, double sdY, double sdR) = StandardErrors(xs, ys, best);
        return new Wind
        {
            NorthMPerSec = best.CenterY,
            EastMPerSec = best.CenterX,
            AirspeedMPerSec = best.Radius,
            NorthStdError = sdY,
            EastStdError = sdX,
            AirspeedStdError = sdR,
            ArcRad = arcRad,
        };
    }

    /// <summary>Taubin's circle, refitted without the fixes far from it; null without a circle of a wing's airspeed.</summary>
    private static Circle? Trimmed(ref double[] x, ref double[] y)
    {
        for (int round = 0; ; round++)
        {
            if (CircleFit.Taubin(x, y) is not Circle circle || !(circle.Radius > SlowestAirspeed))
                return null;
            double[] residuals = Residuals(x, y, circle);
            double cut = 3 * NormalConsistentMad.Of(residuals);
            bool[] keep = [.. residuals.Select(r => Math.Abs(r) <= cut)];
            if (round == TrimRounds || !(cut > 0) || keep.Count(k => k) < FewestFixes)
                return circle;
            x = [.. x.Where((_, i) => keep[i])];
            y = [.. y.Where((_, i) => keep[i])];
        }
    }

    /// <summary>Fixes in a turn: the air heading changes by more than <see cref="TurningRadPerSec"/> over the fixes around them.</summary>
    private static bool[] Turning(double[] time, double[] x, double[] y, Circle c)
    {
        double[] heading = Angles.Unwrap([.. x.Select((east, i) => Math.Atan2(east - c.CenterX, y[i] - c.CenterY))]);
        var turning = new bool[time.Length];
        for (int i = 3; i + 3 < time.Length; i++)
            turning[i] = Math.Abs(heading[i + 3] - heading[i - 3]) > TurningRadPerSec * (time[i + 3] - time[i - 3]);
        return turning;
    }

    private static double[] Residuals(double[] x, double[] y, Circle c)
    {
        var r = new double[x.Length];
        for (int i = 0; i < r.Length; i++)
            r[i] = Math.Sqrt(((x[i] - c.CenterX) * (x[i] - c.CenterX)) + ((y[i] - c.CenterY) * (y[i] - c.CenterY))) - c.Radius;
        return r;
    }

    /// <summary>2π less the largest gap between occupied 10-degree bins of air heading.</summary>
    private static double Arc(double[] x, double[] y, Circle c)
    {
        Span<int> bins = stackalloc int[ArcBins];
        for (int i = 0; i < x.Length; i++)
        {
            double angle = Math.Atan2(x[i] - c.CenterX, y[i] - c.CenterY);
            int bin = (int)((angle + Math.PI) / (2 * Math.PI) * ArcBins);
            bins[Math.Clamp(bin, 0, ArcBins - 1)]++;
        }
        int longestGap = 0, gap = 0;
        for (int i = 0; i < 2 * ArcBins; i++)
        {
            gap = bins[i % ArcBins] == 0 ? gap + 1 : 0;
            longestGap = Math.Max(longestGap, Math.Min(gap, ArcBins));
        }
        return 2 * Math.PI * (ArcBins - longestGap) / ArcBins;
    }

    private static (double X, double Y, double R) StandardErrors(double[] x, double[] y, Circle c)
    {
        int n = x.Length;
        var design = new double[n * 3];
        double[] residuals = Residuals(x, y, c);
        for (int i = 0; i < n; i++)
        {
            double dx = x[i] - c.CenterX, dy = y[i] - c.CenterY, d = Math.Max(1e-9, Math.Sqrt((dx * dx) + (dy * dy)));
            design[i] = dx / d;
            design[n + i] = dy / d;
            design[(2 * n) + i] = 1;
        }
        LeastSquaresFit fit = LeastSquares.Fit(design, residuals, 3);
        double lag = 0, sum = 0;
        for (int i = 0; i < n; i++)
        {
            sum += residuals[i] * residuals[i];
            if (i > 0)
                lag += residuals[i] * residuals[i - 1];
        }
        double rho = sum > 0 ? Math.Clamp(lag / sum, 0, 0.95) : 0;
        double widen = Math.Sqrt((1 + rho) / (1 - rho));
        return (fit[0].StandardError * widen, fit[1].StandardError * widen, fit[2].StandardError * widen);
    }
}
