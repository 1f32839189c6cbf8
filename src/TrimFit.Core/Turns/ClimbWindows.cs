using TrimFit.Core.Statistics;

namespace TrimFit.Core.Turns;

/// <summary>Climb and thrust over windows of steady power.</summary>
internal static class ClimbWindows
{
    private const double WindowSec = 8, SettleShare = 0.1, ShortestWindowSec = 6;

    /// <summary>Mean thrust (fraction of full) and climb (m/s) of each window.</summary>
    /// <param name="signals">The flight; with thrust and altitude.</param>
    /// <param name="settleSec">Left out after a change of power while the climb follows, s.</param>
    public static (double[] Fraction, double[] Climb) Cut(TurnSignals signals, double settleSec)
    {
        var thrust = new List<double>();
        var climb = new List<double>();
        double[] time = signals.TimeSec;
        int start = -1, firstAltitude = -1, lastAltitude = -1;
        double low = 0, high = 0, sum = 0, settled = double.NegativeInfinity;
        int samples = 0;
        for (int i = 0; i <= time.Length; i++)
        {
            bool usable = i < time.Length && signals.Use[i];
            bool moved = usable && start >= 0 && Math.Max(high, signals.Thrust[i]) - Math.Min(low, signals.Thrust[i]) > SettleShare * signals.FullThrust;
            if (start >= 0 && (!usable || moved || time[i] - time[start] >= WindowSec))
            {
                if (firstAltitude >= 0 && lastAltitude > firstAltitude && time[lastAltitude] - time[firstAltitude] >= ShortestWindowSec)
                {
                    thrust.Add(sum / samples / signals.FullThrust);
                    climb.Add((signals.AltitudeM[lastAltitude] - signals.AltitudeM[firstAltitude]) / (time[lastAltitude] - time[firstAltitude]));
                }
                start = -1;
            }
            if (moved)
                settled = time[i] + settleSec;
            if (!usable || time[i] < settled)
                continue;
            if (start < 0)
            {
                start = i;
                firstAltitude = lastAltitude = -1;
                low = high = signals.Thrust[i];
                sum = 0;
                samples = 0;
            }
            low = Math.Min(low, signals.Thrust[i]);
            high = Math.Max(high, signals.Thrust[i]);
            sum += signals.Thrust[i];
            samples++;
            if (double.IsFinite(signals.AltitudeM[i]))
            {
                if (firstAltitude < 0)
                    firstAltitude = i;
                lastAltitude = i;
            }
        }
        return ([.. thrust], [.. climb]);
    }

    /// <summary>Least squares of climb on thrust, again without windows further than three MADs off (thermals); null when those that stay hardly differ in power.</summary>
    public static LeastSquaresFit? RobustLine(double[] x, double[] y, int fewest)
    {
        LeastSquaresFit fit = Line(x, y);
        double cut = 3 * NormalConsistentMad.Of(fit.Residuals.AsSpan());
        bool[] keep = [.. fit.Residuals.Select(r => !(Math.Abs(r) > cut))];
        if (!(cut > 0) || keep.Count(k => k) < fewest)
            return fit;
        x = [.. x.Where((_, i) => keep[i])];
        y = [.. y.Where((_, i) => keep[i])];
        return x.Max() - x.Min() < SteadyWindowEstimator.SmallestThrustRange ? null : Line(x, y);
    }

    private static LeastSquaresFit Line(double[] x, double[] y)
    {
        var design = new double[2 * x.Length];
        Array.Fill(design, 1, 0, x.Length);
        x.CopyTo(design, x.Length);
        return LeastSquares.Fit(design, y, 2);
    }
}
