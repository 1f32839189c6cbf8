using System.Collections.Immutable;
using TrimFit.Core;

namespace TrimFit.Simulation;

/// <summary>Legs of flights that are flown often: in a study, as a sample, in a test.</summary>
public static class TestCards
{
    private static readonly LegPower[] _rising = [LegPower.Off, LegPower.Idle, LegPower.Level, LegPower.Full];
    private static readonly LegPower[] _mixed = [LegPower.Level, LegPower.Off, LegPower.Full, LegPower.Idle];

    /// <summary>A good card: on each heading four powers, each flown hands off, then with a brake step, then back to the heading; the order of
    /// powers reversed on the way back (A-B-B-A), so that slow changes of the air do not look like power.</summary>
    /// <param name="headings">Number of headings, each half a turn from the one before and then a quarter on; four last eleven minutes.</param>
    /// <param name="handsOffSec">Length of a hands-off leg, s.</param>
    /// <param name="brakeStepM">Brake of the step, m.</param>
    public static ImmutableArray<FlightLeg> Alternating(int headings = 4, double handsOffSec = 16, double brakeStepM = 0.07)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(headings);
        var legs = ImmutableArray.CreateBuilder<FlightLeg>();
        for (int i = 0; i < headings; i++)
        {
            double heading = Heading(i);
            legs.Add(i == 0
                ? new() { DurationSec = 6, Control = LegControl.HoldHeading, HeadingRad = heading }
                : new() { DurationSec = 25, Control = LegControl.Turn, TurnRad = Math.IEEERemainder(heading - Heading(i - 1), Math.Tau) });
            IEnumerable<LegPower> powers = i % 2 == 0 ? _mixed : _mixed.Reverse();
            foreach (LegPower power in powers)
            {
                bool left = i % 4 is 0 or 3;
                legs.Add(new() { DurationSec = handsOffSec, Power = power });
                legs.Add(new() { DurationSec = 9, Power = power, Control = LegControl.Brakes, BrakeLeftM = left ? brakeStepM : 0, BrakeRightM = left ? 0 : brakeStepM });
                legs.Add(new() { DurationSec = 12, Power = power == LegPower.Off ? LegPower.Idle : power, Control = LegControl.HoldHeading, HeadingRad = heading });
            }
        }
        return legs.ToImmutable();

        static double Heading(int i) => ((i % 2) + (i / 2 * 0.5)) * Math.PI;
    }

    /// <summary>A pilot who holds course all the time, at powers that change, on four headings; with two brake steps against each other when wanted.</summary>
    /// <param name="brakeSteps">Whether two opposite brake steps are flown, without which brake and thrust cannot be told apart.</param>
    public static ImmutableArray<FlightLeg> HeldThroughout(bool brakeSteps)
    {
        var legs = ImmutableArray.CreateBuilder<FlightLeg>();
        for (int i = 0; i < 4; i++)
        {
            double heading = i * Math.PI / 2;
            foreach (LegPower power in i % 2 == 0 ? _rising : _mixed)
                legs.Add(new() { DurationSec = 34, Power = power, Control = LegControl.HoldHeading, HeadingRad = heading });
            if (brakeSteps && i is 1 or 2)
                legs.Add(new() { DurationSec = 9, Control = LegControl.Brakes, BrakeLeftM = i == 1 ? 0.07 : 0, BrakeRightM = i == 1 ? 0 : 0.07 });
        }
        return legs.ToImmutable();
    }

    /// <summary>Left-hand circuits only: climb, crosswind, downwind, base and glide, each with a short hands-off part.</summary>
    /// <param name="circuits">Number of circuits, each about three minutes.</param>
    public static ImmutableArray<FlightLeg> LeftHandCircuits(int circuits = 4)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(circuits);
        var legs = ImmutableArray.CreateBuilder<FlightLeg>();
        LegPower[] sides = [LegPower.Full, LegPower.Level, LegPower.Level, LegPower.Idle];
        for (int i = 0; i < circuits; i++)
        {
            for (int side = 0; side < 4; side++)
            {
                legs.Add(new() { DurationSec = 18, Power = sides[side], Control = LegControl.HoldHeading, HeadingRad = -side * Math.PI / 2 });
                legs.Add(new() { DurationSec = 10, Power = sides[side] });
                legs.Add(new() { DurationSec = 20, Power = sides[(side + 1) % 4], Control = LegControl.Turn, TurnRad = -Math.PI / 2 });
            }
        }
        return legs.ToImmutable();
    }

    /// <summary>The good card with the throttle left where it is.</summary>
    /// <param name="throttleFraction">Throttle, 0 to 1.</param>
    public static ImmutableArray<FlightLeg> ThrottleNeverMoved(double throttleFraction)
    {
        Guard.NotNegative(throttleFraction);
        return [.. Alternating().Select(leg => leg with { ThrottleFraction = throttleFraction })];
    }
}
