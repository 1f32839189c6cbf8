using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;

namespace TrimFit.Core.Planning;

/// <summary>Plans test cards: which legs to fly, how long, and how narrow the interval will be.</summary>
public static class CardPlanner
{
    /// <summary>Length when nothing is asked for, min.</summary>
    public const double UsualMinutes = 6;

    /// <summary>Rounds in which the length is fitted to the wanted precision.</summary>
    private const int MostRounds = 4;

    /// <summary>Plans a card.</summary>
    /// <param name="rig">The machine.</param>
    /// <param name="options">What is asked for.</param>
    /// <param name="prior">The last flight, for its noise, pull and powers; null plans with the middle of the estimator's priors.</param>
    /// <param name="progress">Told of each step, as a share from 0 to 1.</param>
    public static CardPlan Plan(Rig rig, CardOptions options, PriorFlight? prior = null, IProgress<double>? progress = null)
    {
        ArgumentNullException.ThrowIfNull(rig);
        ArgumentNullException.ThrowIfNull(options);
        var spread = new RigSpread(rig);
        CardMachine machine = CardMachine.Of(rig, spread, options, prior);
        var refused = new CardPlan { Options = options, Machine = machine };
        if (prior?.PullRadPerSec is double pull && Math.Abs(pull) > SafetyFigures.StrongPull.RadPerSec)
            return refused with { Refusal = CardRefusal.StrongPull, RefusedFor = pull };
        if (prior?.HeldBrake is double held && Math.Abs(held) > SafetyFigures.StrongHeldBrake)
            return refused with { Refusal = CardRefusal.HeldBrake, RefusedFor = held };

        var planning = new Planning(rig, spread, options, machine, progress);
        double? wanted = options.ShiftHalfWidthM ?? options.PullStdErrorRadPerSec;
        CardPlan first = planning.Of(options.Minutes ?? UsualMinutes);
        CardPlan plan = wanted is null ? first : Fitted(planning, first, wanted.Value, refused);
        progress?.Report(1);
        return plan;
    }

    /// <summary>The card whose length gives the wanted precision, or a refusal.</summary>
    private static CardPlan Fitted(Planning planning, CardPlan plan, double wanted, CardPlan refused)
    {
        CardOptions options = plan.Options;
        if (options.Minutes is not null)
            return plan.Reaches == true ? plan : WithNeed(planning, plan, wanted);

        for (int round = 0; round < MostRounds && MinutesFor(plan, wanted) is double minutes; round++)
        {
            double now = plan.Seconds / 60;
            if (plan.Reaches == true && now - minutes < 1)
                break; // reached, and hardly to be had in less
            double next = Math.Clamp(plan.Reaches == true ? minutes : Math.Max(minutes, now + 0.7), CardOptions.FewestMinutes, CardOptions.MostMinutes);
            if (Math.Abs(next - now) < 0.4)
                break;
            CardPlan other = planning.Of(next);
            if (other.Reaches == true || plan.Reaches != true)
                plan = other;
            else
                break; // shorter does not reach it
        }
        if (plan.Reaches == true)
            return plan;
        CardPlan longest = planning.Of(CardOptions.MostMinutes);
        return longest.Reaches == true ? longest : refused with
        {
            Refusal = options.ShiftHalfWidthM is null ? CardRefusal.StdErrorUnreachable : CardRefusal.WidthUnreachable,
            LeastReachable = Reached(longest),
            Prediction = longest.Prediction,
        };
    }

    private static CardPlan WithNeed(Planning planning, CardPlan plan, double wanted)
    {
        double? minutes = MinutesFor(plan, wanted);
        if (minutes is > CardOptions.MostMinutes or null)
            return plan with { LeastReachable = Reached(planning.Of(CardOptions.MostMinutes)) };
        return plan with { MinutesNeeded = minutes };
    }

    private static double Reached(CardPlan plan) => plan.Options.ShiftHalfWidthM is null
        ? plan.Prediction!.PullStdErrorRadPerSec
        : plan.Prediction!.ShiftHalfWidthM ?? double.PositiveInfinity;

    /// <summary>Minutes for a wanted precision: variance goes as one over time, over a floor that no time betters; null when the floor is above it.</summary>
    private static double? MinutesFor(CardPlan plan, double wanted)
    {
        double now = plan.Seconds / 60;
        if (plan.Options.ShiftHalfWidthM is null)
        {
            double ratio = plan.Prediction!.PullStdErrorRadPerSec / wanted;
            return now * ratio * ratio;
        }
        if (plan.Prediction!.ShiftHalfWidthM is not double width)
            return now * 2;
        double floor = Math.Min(plan.Prediction.SensitivityFloorM ?? 0, 0.999 * width);
        return wanted > floor ? now * ((width * width) - (floor * floor)) / ((wanted * wanted) - (floor * floor)) : null;
    }

    /// <summary>What one call of <see cref="Plan"/> keeps.</summary>
    private sealed class Planning(Rig rig, RigSpread spread, CardOptions options, CardMachine machine, IProgress<double>? progress)
    {
        private readonly CardDesign _design = new(machine, options);
        private double _done;

        public CardPlan Of(double minutes)
        {
            CardLayout layout = _design.Best(minutes);
            Step(0.3);
            return Of(layout);
        }

        private CardPlan Of(CardLayout layout) => new()
        {
            Options = options,
            Machine = machine,
            Legs = layout.Legs(),
            Runs = layout.Runs,
            Prediction = CardPredictor.Predict(rig, spread, machine, options, layout.Legs(), () => Step(0.7 / options.Draws)),
        };

        private void Step(double share)
        {
            _done += share * (1 - _done) * 0.5; // how many rounds there will be is not known
            progress?.Report(_done);
        }
    }
}
