using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Core.Units;

namespace TrimFit.Core.Analysis;

/// <summary>The same machine flown with a part moved by a known amount: the other flight's turn rates, a source of the sensitivity.</summary>
/// <remarks>Each draw of the posterior predicts them as its own turn rate plus S times the change of the turning offset by the whole
/// statics, with a model error of log-sd 0.25 (DEVELOPERS.md, "Sensitivity").</remarks>
public sealed record KnownChange
{
    /// <summary>Scatter of the pull from flight to flight that is assumed when nothing else tells: straps, posture, fuel, air (common
    /// practice, no source).</summary>
    public static AngularRate UsualFlightScatter { get; } = AngularRate.FromRadPerSec(FlightScatter.Usual.RadPerSec);

    /// <summary>Standard deviations of the scatter that stand for its prior: the posterior draws through them in turn.</summary>
    private const int ScatterNodes = 16;

    private KnownChange(Func<RigValues, RigValues> move, double[] thrustFractions, double[] rates, double[] own, FlightScatter scatter, int flights)
    {
        Move = move;
        ThrustFractions = [.. thrustFractions];
        TurnRateRadPerSec = [.. rates];
        OwnCovariance = [.. own];
        ScatterVariances = [.. scatter.Nodes(ScatterNodes).Select(sd => sd * sd / flights)];
        Covariance = [.. own.Select(v => v + (scatter.MeanSquare / flights))];
    }

    /// <summary>This flight's rig as it was on the other flight.</summary>
    public Func<RigValues, RigValues> Move { get; }

    /// <summary>Thrusts at which the other flight's turn is compared, fractions of full.</summary>
    public ImmutableArray<double> ThrustFractions { get; }

    /// <summary>The other flight's turn rates there, brakes even, rad/s.</summary>
    public ImmutableArray<double> TurnRateRadPerSec { get; }

    /// <summary>Their covariance, row by row, with the mean square of the flight scatter, (rad/s)².</summary>
    public ImmutableArray<double> Covariance { get; }

    /// <summary>The same without flight scatter.</summary>
    internal ImmutableArray<double> OwnCovariance { get; }

    /// <summary>Variances of the flight scatter under its prior, alike in weight, (rad/s)².</summary>
    internal ImmutableArray<double> ScatterVariances { get; }

    /// <summary>Takes the other flight's fit; null when it lacks what is needed.</summary>
    /// <param name="other">Fit of the other flight.</param>
    /// <param name="fullThrust">Full thrust in that fit's unit.</param>
    /// <param name="move">This flight's rig as it was on the other flight.</param>
    /// <param name="scatter">Standard deviation of the pull between flights; null for a prior with the usual scale, integrated out.</param>
    /// <param name="thrustFractions">Where to compare, fractions of full; at least one.</param>
    /// <exception cref="ArgumentException">No thrust to compare at.</exception>
    public static KnownChange? Of(TurnFit other, double fullThrust, Func<RigValues, RigValues> move, AngularRate? scatter, params double[] thrustFractions) =>
        Of(other, fullThrust, move, scatter is AngularRate known ? FlightScatter.Known(known) : FlightScatter.Usual, 1, thrustFractions);

    /// <summary>The same for the mean of several flights with the other setting.</summary>
    /// <param name="other">Fit of the other flight or flights.</param>
    /// <param name="fullThrust">Full thrust in that fit's unit.</param>
    /// <param name="move">This flight's rig as it was on the other flight.</param>
    /// <param name="scatter">Scatter from flight to flight.</param>
    /// <param name="flights">Flights behind <paramref name="other"/>; at least 1.</param>
    /// <param name="thrustFractions">Where to compare, fractions of full; at least one.</param>
    /// <exception cref="ArgumentException">No thrust to compare at, or no flight.</exception>
    public static KnownChange? Of(
        TurnFit other, double fullThrust, Func<RigValues, RigValues> move, FlightScatter scatter, int flights, params double[] thrustFractions)
    {
        ArgumentNullException.ThrowIfNull(other);
        ArgumentNullException.ThrowIfNull(move);
        ArgumentNullException.ThrowIfNull(scatter);
        ArgumentNullException.ThrowIfNull(thrustFractions);
        ArgumentOutOfRangeException.ThrowIfLessThan(flights, 1);
        if (thrustFractions.Length == 0)
            throw new ArgumentException("needs at least one thrust to compare at", nameof(thrustFractions));
        if (other[TurnCoefficient.Constant] is null || other[TurnCoefficient.Thrust] is null)
            return null;
        int m = thrustFractions.Length, n = other.Coefficients.Length;
        double widen = StudentT.Quantile(0.975, other.DegreesOfFreedom) / StandardNormal.Quantile(0.975);
        double[] rates = new double[m], covariance = new double[m * m];
        double[][] rows = [.. thrustFractions.Select(x => Row(x * fullThrust))];
        for (int i = 0; i < m; i++)
        {
            rates[i] = other.PullAt(thrustFractions[i] * fullThrust)!.Value.Value;
            for (int j = 0; j < m; j++)
            {
                double sum = 0;
                for (int a = 0; a < 3; a++)
                {
                    for (int b = 0; b < 3; b++)
                        sum += rows[i][a] * rows[j][b] * other.Covariance[(a * n) + b];
                }
                covariance[(i * m) + j] = sum * widen * widen;
            }
        }
        return new(move, thrustFractions, rates, covariance, scatter, flights);

        static double[] Row(double thrust) => [1, thrust, thrust * thrust];
    }
}
