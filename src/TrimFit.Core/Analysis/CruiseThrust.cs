using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>Finds the thrust of level flight: where this flight's own climb is zero.</summary>
internal static class CruiseThrust
{
    /// <summary>Level thrust is believed between these shares of full thrust.</summary>
    private const double Smallest = 0.1, Largest = 1.0;
    private const int FewestWindows = 6;

    /// <summary>Level thrust as a fraction of full and its standard error; null when the altitude does not tell.</summary>
    /// <remarks>Least squares of climb on thrust over windows of steady power, robust by dropping windows further than three MADs off
    /// (thermals), then the thrust at zero climb with its delta-method error.</remarks>
    public static Estimate? Find(TurnSignals signals)
    {
        if (!signals.HasThrust || signals.AltitudeM.Length == 0)
            return null;
        (double[] x, double[] y) = ClimbWindows.Cut(signals, settleSec: 0);
        if (x.Length < FewestWindows || x.Max() - x.Min() < SteadyWindowEstimator.SmallestThrustRange)
            return null;
        if (ClimbWindows.RobustLine(x, y, FewestWindows) is not LeastSquaresFit fit)
            return null;
        double a = fit.Coefficients[0], b = fit.Coefficients[1];
        if (!(b > 3 * fit[1].StandardError)) // climb must grow with thrust, and clearly
            return null;
        double level = -a / b;
        double variance = (fit.Covariance(0, 0) + (2 * level * fit.Covariance(0, 1)) + (level * level * fit.Covariance(1, 1))) / (b * b);
        return level is > Smallest and < Largest ? new Estimate(level, Math.Sqrt(Math.Max(0, variance))) : null;
    }
}
