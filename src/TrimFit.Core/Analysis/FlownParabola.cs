using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>The parabola a fit would see in a rig's turning offset: least squares over the thrusts of this flight.</summary>
/// <remarks>Riser twist bends the curve more than a parabola can follow, so it matters where the flight looked. x = T/T_full comes from rpm or
/// throttle, so a draw's own full thrust belongs to x = 1 whatever the scale of the fit's newtons.</remarks>
internal sealed class FlownParabola
{
    private const int Nodes = 6;

    /// <summary>Quantiles of the flown thrust this far apart are different powers, fractions of full; with fewer than three the whole range stands in.</summary>
    private const double LeastStep = 0.05;

    private readonly double[] _x = new double[Nodes];
    private readonly double[] _linear = new double[Nodes], _quadratic = new double[Nodes];

    public FlownParabola(TurnSignals signals)
    {
        double[] flown = [.. signals.Thrust.Where((_, i) => signals.Use[i]).Select(t => t / signals.FullThrust)];
        double[] even = [.. Enumerable.Range(0, Nodes).Select(i => (i + 0.5) / Nodes)];
        double[] seen = signals.HasThrust && flown.Length > Nodes ? [.. even.Select(p => QuantileType7.Of(flown, p))] : [];
        int levels = 1;
        for (int i = 1; i < seen.Length; i++)
            levels += seen[i] - seen[i - 1] > LeastStep ? 1 : 0;
        (levels >= 3 ? seen : even).CopyTo(_x, 0);
        // Weights of the least-squares slope and curvature: rows of (XᵀX)⁻¹Xᵀ. The matrix is positive definite; x lies within 0 to 1.
        double[] normal = new double[9];
        foreach (double x in _x)
        {
            double[] row = [1, x, x * x];
            for (int a = 0; a < 3; a++)
            {
                for (int b = 0; b < 3; b++)
                    normal[(a * 3) + b] += row[a] * row[b];
            }
        }
        double[]? inverse = SmallCovariance.TryInvert(normal, 3);
        for (int i = 0; i < Nodes; i++)
        {
            double[] row = [1, _x[i], _x[i] * _x[i]];
            for (int b = 0; b < 3; b++)
            {
                _linear[i] += inverse is null ? 0 : inverse[3 + b] * row[b];
                _quadratic[i] += inverse is null ? 0 : inverse[6 + b] * row[b];
            }
        }
    }

    /// <summary>Linear and quadratic coefficient over x, m of turning offset per full thrust.</summary>
    public (double Linear, double Quadratic) Of(in RigValues rig, double yawRatio)
    {
        double linear = 0, quadratic = 0, at0 = RigStatics.TurningOffset(rig, 0, yawRatio);
        for (int i = 0; i < Nodes; i++)
        {
            double growth = RigStatics.TurningOffset(rig, _x[i] * rig.FullThrustN, yawRatio) - at0;
            linear += _linear[i] * growth;
            quadratic += _quadratic[i] * growth;
        }
        return (linear, quadratic);
    }
}
