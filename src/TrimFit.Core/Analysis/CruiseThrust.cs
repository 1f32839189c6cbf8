using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>Finds the thrust of level flight: where this flight's own climb is zero.</summary>
internal static class CruiseThrust
{
    /// <summary>Level thrust is believed between these shares of full thrust.</summary>
    private const double Smallest = 0.1, Largest = 1.0;
    private const double WindowSec = 8, SettleShare = 0.1, ShortestWindowSec = 6;
    private const int FewestWindows = 6;

    /// <summary>Level thrust as a fraction of full and its standard error; null when the altitude does not tell.</summary>
    /// <remarks>Least squares of climb on thrust over windows of steady power, robust by dropping windows further than three MADs off
    /// (thermals), then the thrust at zero climb with its delta-method error.</remarks>
    public static Estimate? Find(TurnSignals signals)
    {
        if (!signals.HasThrust || signals.AltitudeM.Length == 0)
            return null;
        var thrust = new List<double>();
        var climb = new List<double>();
        double[] time = signals.TimeSec;
        int start = -1, firstAltitude = -1, lastAltitude = -1;
        double low = 0, high = 0, sum = 0;
        int samples = 0;
        for (int i = 0; i <= time.Length; i++)
        {
            bool usable = i < time.Length && signals.Use[i];
            bool broken = start >= 0 && (!usable || time[i] - time[start] >= WindowSec
                || Math.Max(high, signals.Thrust[i]) - Math.Min(low, signals.Thrust[i]) > SettleShare * signals.FullThrust);
            if (broken)
            {
                if (firstAltitude >= 0 && lastAltitude > firstAltitude && time[lastAltitude] - time[firstAltitude] >= ShortestWindowSec)
                {
                    thrust.Add(sum / samples / signals.FullThrust);
                    climb.Add((signals.AltitudeM[lastAltitude] - signals.AltitudeM[firstAltitude]) / (time[lastAltitude] - time[firstAltitude]));
                }
                start = -1;
            }
            if (!usable)
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
        if (thrust.Count < FewestWindows || thrust.Max() - thrust.Min() < SteadyWindowEstimator.SmallestThrustRange)
            return null;
        double[] x = [.. thrust], y = [.. climb];
        LeastSquaresFit fit = Line(x, y);
        double cut = 3 * NormalConsistentMad.Of(fit.Residuals.AsSpan());
        bool[] keep = [.. fit.Residuals.Select(r => !(Math.Abs(r) > cut))];
        if (cut > 0 && keep.Count(k => k) >= FewestWindows)
        {
            x = [.. x.Where((_, i) => keep[i])];
            y = [.. y.Where((_, i) => keep[i])];
            if (x.Max() - x.Min() < SteadyWindowEstimator.SmallestThrustRange)
                return null;
            fit = Line(x, y);
        }
        double a = fit.Coefficients[0], b = fit.Coefficients[1];
        if (!(b > 3 * fit[1].StandardError)) // climb must grow with thrust, and clearly
            return null;
        double level = -a / b;
        double variance = (fit.Covariance(0, 0) + (2 * level * fit.Covariance(0, 1)) + (level * level * fit.Covariance(1, 1))) / (b * b);
        return level is > Smallest and < Largest ? new Estimate(level, Math.Sqrt(Math.Max(0, variance))) : null;
    }

    private static LeastSquaresFit Line(double[] x, double[] y)
    {
        var design = new double[2 * x.Length];
        Array.Fill(design, 1, 0, x.Length);
        x.CopyTo(design, x.Length);
        return LeastSquares.Fit(design, y, 2);
    }
}
