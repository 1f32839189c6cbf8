using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Comparing;

/// <summary>What one flight brings to a comparison: coefficients over x = thrust/common full thrust with their covariance, and nothing else.</summary>
/// <remarks>Flights share no noise, wind, bias or time constant. Their joint likelihood is a product, and given each flight's own nuisance
/// parameters it is normal in the coefficients, so (coefficients, covariance) of each flight's fit is all it holds about them (DEVELOPERS.md,
/// "Before and after").</remarks>
internal sealed class FlightEstimate
{
    /// <summary>Standard deviation that stands for a coefficient that was not estimated at all, rad/s: keeps the covariance regular.</summary>
    private const double TinySd = 1e-6;

    private FlightEstimate(PowerLevels levels, double scale) => (Levels, Scale) = (levels, scale);

    public double[] Coefficients { get; } = new double[3];
    /// <summary>3 × 3, row by row, widened so that a normal has the t interval's width.</summary>
    public double[] Covariance { get; } = new double[9];
    public Estimate? Brake { get; private set; }
    public PowerLevels Levels { get; }
    /// <summary>Common full thrust over this flight's.</summary>
    public double Scale { get; }
    /// <summary>A share of this flight's full thrust as a share of the common one.</summary>
    public double Common(double own) => own / Scale;

    /// <summary>The flight's part; null when it could not tell the pull over power.</summary>
    /// <param name="flight">The flight.</param>
    /// <param name="commonFull">Common full thrust, N; null when shares of each flight's own full thrust are compared.</param>
    /// <param name="balance">Balance thrust.</param>
    public static FlightEstimate? Of(ComparedFlight flight, double? commonFull, BalanceThrust balance)
    {
        TurnFit fit = flight.Analysis.Fit;
        TurnSignals signals = flight.Analysis.Signals;
        if (!signals.HasThrust || fit[TurnCoefficient.Constant] is null || fit[TurnCoefficient.Thrust] is null || !(fit.DegreesOfFreedom > 0))
            return null;
        double full = commonFull ?? signals.FullThrust;
        var result = new FlightEstimate(PowerLevels.Of(signals, fit, balance), full / signals.FullThrust);
        double widen = Widening(fit);
        int n = fit.Coefficients.Length;
        double[] unit = [1, full, full * full];
        string[] names = [TurnCoefficient.Constant, TurnCoefficient.Thrust, TurnCoefficient.ThrustSquared];
        for (int i = 0; i < 3; i++)
        {
            result.Coefficients[i] = (fit[names[i]]?.Value ?? 0) * unit[i];
            for (int j = 0; j < 3; j++)
                result.Covariance[(i * 3) + j] = fit.Covariance[(i * n) + j] * unit[i] * unit[j] * widen * widen;
            result.Covariance[(i * 3) + i] += TinySd * TinySd;
        }
        if (fit[TurnCoefficient.BrakeDifference] is Estimate brake)
            result.Brake = brake with { StandardError = brake.StandardError * widen };
        return result;
    }

    /// <summary>Factor on a standard error that gives a normal the t interval's width.</summary>
    public static double Widening(TurnFit fit) => StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom) / StandardNormal.Quantile(0.975);
}
