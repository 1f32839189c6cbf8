using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Core.Turns.FilterError;

namespace TrimFit.Core.Analysis;

/// <summary>Sources of the sensitivity that may enter a posterior; fewer than all only to compare them.</summary>
[Flags]
internal enum SensitivitySources
{
    Prior = 0,
    Torque = 1,
    Ballast = 2,
    Pair = 4,
    Memory = 8,
    All = Torque | Ballast | Pair | Memory,
}

/// <summary>A measured answer of the turn to a known shift: rate differences = a × (differences of turning offset), a = S times model error.</summary>
internal abstract class SensitivityEvidence
{
    /// <summary>Word of the source in results.</summary>
    public abstract string Kind { get; }

    /// <summary>Best factor a in one draw, its standard deviation, and the log-likelihood there.</summary>
    /// <param name="rig">The draw's rig.</param>
    /// <param name="yawRatio">The draw's yaw ratio.</param>
    /// <param name="constant">The draw's turn without thrust, rad/s.</param>
    /// <param name="slope">The draw's growth per full thrust.</param>
    /// <param name="curvature">The draw's curvature.</param>
    /// <param name="draw">The draw's number: evidence with an unknown of its own draws through that unknown's values in turn.</param>
    public abstract (double Best, double Sd, double LogPeak) Best(in RigValues rig, double yawRatio, double constant, double slope, double curvature, int draw);

    /// <summary>Legs of this flight with a known CG shift.</summary>
    public sealed class OfBallast(FitDraws fit, double thrustFraction) : SensitivityEvidence
    {
        private const double ProbeM = 0.01; // the turn is nearly a straight line in the shift: any size of a real ballast gives the same

        public override string Kind => "ballast";

        public override (double Best, double Sd, double LogPeak) Best(in RigValues rig, double yawRatio, double constant, double slope, double curvature, int draw)
        {
            RigValues shifted = rig with { PostureM = rig.PostureM + (ProbeM * rig.SuspendedKg / rig.PilotKg) };
            double thrust = thrustFraction * rig.FullThrustN;
            double gain = (RigStatics.TurningOffset(shifted, thrust, yawRatio) - RigStatics.TurningOffset(rig, thrust, yawRatio)) / ProbeM;
            double measured = fit.CgShiftGiven(constant, slope, curvature);
            return gain != 0 ? (measured / gain, Math.Sqrt(fit.CgShiftVarianceGiven) / Math.Abs(gain), 0) : (0, double.PositiveInfinity, 0);
        }
    }

    /// <summary>Another flight with a part moved.</summary>
    public sealed class OfPair : SensitivityEvidence
    {
        private readonly KnownChange _change;
        private readonly double[][] _information; // one for each value of the flight scatter
        private readonly double[] _logRoot;       // half the logarithm of its determinant

        public OfPair(KnownChange change)
        {
            _change = change;
            int m = change.ThrustFractions.Length, nodes = change.ScatterVariances.Length;
            _information = new double[nodes][];
            _logRoot = new double[nodes];
            for (int g = 0; g < nodes; g++)
            {
                double[] covariance = [.. change.OwnCovariance.Select(v => v + change.ScatterVariances[g])];
                double mean = 0;
                for (int i = 0; i < m; i++)
                    mean += change.OwnCovariance[(i * m) + i] / m;
                for (int i = 0; i < m; i++)
                    covariance[(i * m) + i] += 1e-4 * mean; // three powers of two coefficients and a shrunk curve are nearly dependent
                _information[g] = SmallCovariance.TryInvert(covariance, m) ?? throw new ArgumentException("has no usable covariance", nameof(change));
                if (!SmallCholesky.Factor(covariance, m))
                    throw new ArgumentException("has no usable covariance", nameof(change));
                for (int i = 0; i < m; i++)
                    _logRoot[g] -= Math.Log(covariance[(i * m) + i]);
            }
        }

        public override string Kind => "pair";

        public override (double Best, double Sd, double LogPeak) Best(in RigValues rig, double yawRatio, double constant, double slope, double curvature, int draw)
        {
            int m = _change.ThrustFractions.Length, node = draw % _information.Length;
            double[] weight = _information[node];
            Span<double> gain = stackalloc double[m];
            Span<double> difference = stackalloc double[m];
            RigValues moved = _change.Move(rig);
            for (int i = 0; i < m; i++)
            {
                double x = _change.ThrustFractions[i], thrust = x * rig.FullThrustN;
                gain[i] = RigStatics.TurningOffset(moved, thrust, yawRatio) - RigStatics.TurningOffset(rig, thrust, yawRatio);
                difference[i] = _change.TurnRateRadPerSec[i] - (constant + (slope * x) + (curvature * x * x));
            }
            double information = 0, score = 0, quadratic = 0;
            for (int i = 0; i < m; i++)
            {
                for (int j = 0; j < m; j++)
                {
                    double p = weight[(i * m) + j];
                    information += gain[i] * p * gain[j];
                    score += gain[i] * p * difference[j];
                    quadratic += difference[i] * p * difference[j];
                }
            }
            if (!(information > 0))
                return (0, double.PositiveInfinity, _logRoot[node] - (0.5 * quadratic));
            return (score / information, 1 / Math.Sqrt(information), _logRoot[node] - (0.5 * (quadratic - (score * score / information))));
        }
    }

    /// <summary>The evidence that a flight and its options hold.</summary>
    public static List<SensitivityEvidence> Of(FitDraws fit, TurnSignals signals, TrimOptions options, SensitivitySources allowed)
    {
        var list = new List<SensitivityEvidence>();
        if (!fit.SlopeKnown)
            return list;
        if (allowed.HasFlag(SensitivitySources.Ballast) && fit.CgShift is not null)
        {
            double thrust = 0;
            int count = 0;
            for (int i = 0; i < signals.Count; i++)
            {
                if (signals.Use[i] && signals.CgShiftM[i] != 0)
                {
                    thrust += signals.Thrust[i];
                    count++;
                }
            }
            if (count > 0)
                list.Add(new OfBallast(fit, thrust / count / signals.FullThrust));
        }
        if (allowed.HasFlag(SensitivitySources.Pair))
            list.AddRange(options.KnownChanges.Select(c => new OfPair(c)));
        return list;
    }
}
