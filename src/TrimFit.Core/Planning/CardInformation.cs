using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Core.Planning;

/// <summary>What the likelihood's information on a planned flight says of the turn's coefficients, noise known.</summary>
/// <remarks>The same rows (<see cref="FlightPreparation"/>), the same filter (<see cref="AugmentedFilter"/>) and the same priors as the fit of a real
/// flight: the information of the linear part does not depend on what the sensors will read, only on inputs, headings and noise.</remarks>
internal sealed class CardInformation
{
    private readonly FlightColumns _flight;
    private readonly double[] _covariance;

    private CardInformation(FlightColumns flight, double[] covariance) => (_flight, _covariance) = (flight, covariance);

    /// <summary>The information of a flight at given noise; null when it has too little to fit.</summary>
    /// <param name="signals">Inputs and when what is measured.</param>
    /// <param name="noise">Noise of the estimator's rows.</param>
    /// <param name="slope">Expected growth per full thrust, rad/s, for the curvature's prior.</param>
    public static CardInformation? Of(TurnSignals signals, NoiseParameters noise, double slope)
    {
        var options = new FilterErrorOptions();
        if (FlightPreparation.Prepare(signals, options, withThrust: true, out _) is not FlightColumns flight)
            return null;
        var filter = new AugmentedFilter(flight);
        if (!double.IsFinite(filter.Run(noise)))
            return null;
        int thrust = flight.IndexOf(ColumnKind.Thrust), curvature = flight.IndexOf(ColumnKind.ThrustSquared), k = flight.Coefficients;
        double[] loose = filter.ConditionalCovariance();
        filter.SetPriorSd(curvature, options.CurvaturePriorSd(slope, loose[(thrust * k) + thrust]));
        return double.IsFinite(filter.Run(noise)) ? new(flight, filter.ConditionalCovariance()) : null;
    }

    /// <summary>Variance of the turn at a fraction of full thrust, brakes even, (rad/s)².</summary>
    public double PullVariance(double x)
    {
        ReadOnlySpan<ColumnKind> kinds = [ColumnKind.Constant, ColumnKind.Thrust, ColumnKind.ThrustSquared];
        double sum = 0;
        for (int a = 0; a < 3; a++)
        {
            for (int b = 0; b < 3; b++)
                sum += Math.Pow(x, a + b) * Covariance(kinds[a], kinds[b]);
        }
        return sum;
    }

    /// <summary>Variance of the turn per metre of known CG shift; infinite without such a leg.</summary>
    public double CgShiftVariance => _flight.IndexOf(ColumnKind.CgShift) is >= 0 ? Covariance(ColumnKind.CgShift, ColumnKind.CgShift) : double.PositiveInfinity;

    /// <summary>Variance of the turn per full brake difference; infinite without brakes.</summary>
    public double BrakeVariance => _flight.IndexOf(ColumnKind.Brake) is >= 0 ? Covariance(ColumnKind.Brake, ColumnKind.Brake) : double.PositiveInfinity;

    /// <summary>Covariance per unit of x = T/T_full, brake and shift.</summary>
    private double Covariance(ColumnKind a, ColumnKind b)
    {
        int i = _flight.IndexOf(a), j = _flight.IndexOf(b);
        return _covariance[(i * _flight.Coefficients) + j] / (ScaleOf(a, i) * ScaleOf(b, j));
    }

    private double ScaleOf(ColumnKind kind, int index) => kind is ColumnKind.Brake or ColumnKind.CgShift ? _flight.Scale[index] : 1;
}
