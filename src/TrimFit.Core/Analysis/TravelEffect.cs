using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Analysis;

/// <summary>What a travel of one adjustment does to the turn, draw by draw.</summary>
internal abstract class TravelEffect
{
    /// <summary>The effect, or null when this flight or rig cannot say what the adjustment does.</summary>
    public static TravelEffect? Of(Adjustment adjustment, Rig rig, TrimPosterior posterior, TurnSignals signals, TurnFit fit)
    {
        if (adjustment.Move is not null)
            return new OfRig(adjustment, posterior);
        if (adjustment.Coefficient is not string name || fit[name] is not Estimate coefficient)
            return null;
        // The wing's controls are moved in metres of line; a log in per cent needs the full travel to say how many.
        double? metersPerUnit = name == TurnCoefficient.TrimmerDifference ? 1
            : signals.BrakeUnit switch
            {
                ControlUnit.Meter => 1,
                ControlUnit.Fraction => rig.BrakeFullTravelM,
                _ => null,
            };
        bool certain = coefficient.Value > StudentT.TwoSidedFactor(0.95, fit.DegreesOfFreedom) * coefficient.StandardError;
        return metersPerUnit is double scale && certain
            ? new OfControls(new Estimate(coefficient.Value / scale, coefficient.StandardError / scale), posterior)
            : null;
    }

    /// <summary>The rig after a travel.</summary>
    public abstract RigValues Moved(in RigValues rig, double travel);

    /// <summary>The travel that takes a turn rate away in one draw, and the turn per travel at rest (its sign is what matters).</summary>
    public abstract (double Travel, double Gain) Null(int draw, double fraction, double rateRadPerSec);

    /// <summary>Change of turn rate by a travel in one draw at a fraction of full thrust, rad/s.</summary>
    public abstract double TurnChange(int draw, double fraction, double travel);

    /// <summary>Sine of the riser twist at full thrust after a travel in one draw; beyond ±1 there is no equilibrium.</summary>
    public abstract double TwistSineAtFull(int draw, double travel);

    /// <summary>Moves parts of the rig: the whole statics are solved again.</summary>
    private sealed class OfRig(Adjustment adjustment, TrimPosterior posterior) : TravelEffect
    {
        /// <summary>Secant steps: the statics are almost linear in the travel, three leave less than a micrometre.</summary>
        private const int TravelSteps = 6;

        private double Probe => adjustment.Unit == TravelUnit.Kilogram ? 0.1 : 0.001;

        /// <summary>Beyond this the linear idea of a travel is gone; an interval that ends here is as good as open.</summary>
        private double Largest => adjustment.Unit == TravelUnit.Kilogram ? 30 : 0.5;

        public override RigValues Moved(in RigValues rig, double travel) => adjustment.Move!(rig, travel);

        public override (double Travel, double Gain) Null(int draw, double fraction, double rateRadPerSec)
        {
            double before = Offset(draw, fraction, 0);
            double wanted = -rateRadPerSec / posterior.Sensitivity[draw]; // change of the turning offset, m
            double gain = (Offset(draw, fraction, Probe) - before) / Probe;
            if (gain == 0)
                return (0, 0);
            double d = wanted / gain, previous = 0, previousMiss = -wanted;
            for (int i = 0; i < TravelSteps && d != previous; i++)
            {
                d = Math.Clamp(d, -Largest, Largest);
                double miss = Offset(draw, fraction, d) - before - wanted;
                double slope = (miss - previousMiss) / (d - previous);
                (previous, previousMiss) = (d, miss);
                if (!double.IsFinite(slope) || Math.Abs(slope) < 0.1 * Math.Abs(gain) || Math.Abs(miss) < 1e-7)
                    break;
                d -= miss / slope;
            }
            return (Math.Clamp(d, -Largest, Largest), gain);
        }

        public override double TurnChange(int draw, double fraction, double travel) =>
            posterior.Sensitivity[draw] * (Offset(draw, fraction, travel) - Offset(draw, fraction, 0));

        public override double TwistSineAtFull(int draw, double travel)
        {
            ref readonly RigValues rig = ref posterior.Rigs[draw];
            RigValues moved = adjustment.Move!(rig, travel);
            return (RigStatics.HangAlike(moved, rig)
                ? RigStatics.Solve(moved, rig.FullThrustN, posterior.Leans.At(draw, 1).Lean)
                : RigStatics.Solve(moved, rig.FullThrustN)).TwistSine;
        }

        private double Offset(int draw, double fraction, double travel)
        {
            ref readonly KnownLeans.Entry known = ref posterior.Leans.At(draw, fraction);
            if (travel == 0)
                return known.TurningOffsetM;
            ref readonly RigValues rig = ref posterior.Rigs[draw];
            double thrust = fraction * rig.FullThrustN, yawRatio = posterior.YawRatio[draw];
            RigValues moved = adjustment.Move!(rig, travel);
            return RigStatics.HangAlike(moved, rig)
                ? RigStatics.TurningOffset(moved, thrust, yawRatio, known.Lean)
                : RigStatics.TurningOffset(moved, thrust, yawRatio);
        }
    }

    /// <summary>Moves the wing's own controls: the flight measured what they do, at any power alike.</summary>
    private sealed class OfControls : TravelEffect
    {
        private readonly double[] _perMeter;
        private readonly TrimPosterior _posterior;

        public OfControls(Estimate perMeter, TrimPosterior posterior)
        {
            _posterior = posterior;
            int draws = posterior.Count;
            var random = new SeededRandom(5); // its own stream: the posterior's draws stay what they are
            _perMeter = new double[draws];
            for (int k = 0; k < draws; k++)
                _perMeter[k] = perMeter.Value + (perMeter.StandardError * random.NextNormal());
        }

        public override RigValues Moved(in RigValues rig, double travel) => rig;

        public override (double Travel, double Gain) Null(int draw, double fraction, double rateRadPerSec) =>
            (Math.Clamp(-rateRadPerSec / _perMeter[draw], -1, 1), _perMeter[draw]);

        public override double TurnChange(int draw, double fraction, double travel) => _perMeter[draw] * travel;

        public override double TwistSineAtFull(int draw, double travel) =>
            RigStatics.Solve(_posterior.Rigs[draw], _posterior.Rigs[draw].FullThrustN, _posterior.Leans.At(draw, 1).Lean).TwistSine;
    }
}
