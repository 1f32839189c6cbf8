using System.Collections.Immutable;
using TrimFit.Core.Analysis;

namespace TrimFit.Core.Planning;

/// <summary>One thing to do on a run: set the power, hold the heading, then a leg that measures.</summary>
/// <param name="Kind">What the measuring leg is.</param>
/// <param name="Power">Power of both.</param>
/// <param name="Side">Side of a brake, circle or ballast, −1 left or +1 right; 0 for hands off.</param>
internal readonly record struct CardStation(CardLegKind Kind, PowerSetting Power, int Side);

/// <summary>How a card is laid out: runs to and fro, the stations of one run, and how long things take.</summary>
/// <remarks>The second run of a pair flies the stations backwards on the reciprocal heading with sides exchanged (A-B-B-A), so that neither a slow
/// change of the air nor the wind looks like power. The third and fourth do the same a quarter turn on, and so forth.</remarks>
internal sealed record CardLayout
{
    /// <summary>Brake of a step and of a circle, fraction of travel: felt clearly, far from the stall (common practice, no source).</summary>
    public const double StepBrake = 0.15, CircleBrake = 0.15;

    /// <summary>Turn rate of turns between runs, rad/s, and time to settle after one, s.</summary>
    private static readonly double _turnRate = double.DegreesToRadians(9);
    private const double SettleSec = 5;

    /// <summary>Time to set the power and hold the heading before a leg, s; with ballast to bring out more.</summary>
    public const double HoldSec = 10, BallastHoldSec = 14;

    /// <summary>Length of a brake step and of a circle, s.</summary>
    public const double BrakeStepSec = 8, CircleSec = 30;

    public required int Runs { get; init; }
    public required double TestSec { get; init; }
    public required ImmutableArray<CardStation> Stations { get; init; }
    public double BallastKg { get; init; }
    public double BallastArmM { get; init; }

    public double Seconds => Legs()[^1].EndSec;

    public static double SecondsOf(CardStation station, double testSec) => station.Kind switch
    {
        CardLegKind.BrakeStep => HoldSec + BrakeStepSec,
        CardLegKind.Circle => HoldSec + CircleSec,
        CardLegKind.Ballast => BallastHoldSec + testSec,
        _ => HoldSec + testSec,
    };

    public static double TurnSeconds(double turnRad) => Math.Round((Math.Abs(turnRad) / _turnRate) + SettleSec);

    /// <summary>Turns before each run after the first: round to the reciprocal, a quarter on, round again; right and left alike in number.</summary>
    public static double TurnBefore(int run) => (run % 4) switch { 1 => Math.PI, 2 => -Math.PI / 2, 3 => -Math.PI, _ => Math.PI / 2 };

    public ImmutableArray<CardLeg> Legs()
    {
        var legs = ImmutableArray.CreateBuilder<CardLeg>();
        double t = 0, heading = 0;
        for (int run = 0; run < Runs; run++)
        {
            if (run > 0)
            {
                double turn = TurnBefore(run);
                heading += turn;
                Add(new() { Number = 0, Kind = CardLegKind.Turn, Power = PowerSetting.Cruise, StartSec = t, Seconds = TurnSeconds(turn), HeadingRad = heading, TurnRad = turn });
            }
            bool back = run % 2 == 1;
            for (int i = 0; i < Stations.Length; i++)
            {
                CardStation station = Stations[back ? Stations.Length - 1 - i : i];
                int side = (back ? -1 : 1) * (run / 2 % 2 == 1 ? -1 : 1) * station.Side;
                // With the engine off there is no power to set: the heading is held at idle, which can be left at once.
                PowerSetting hold = station.Power == PowerSetting.Off ? PowerSetting.Idle : station.Power;
                double holdSec = station.Kind == CardLegKind.Ballast ? BallastHoldSec : HoldSec;
                Add(new() { Number = 0, Kind = CardLegKind.Hold, Power = hold, StartSec = t, Seconds = holdSec, HeadingRad = heading });
                bool braked = station.Kind is CardLegKind.BrakeStep or CardLegKind.Circle;
                Add(new()
                {
                    Number = 0,
                    Kind = station.Kind,
                    Power = station.Power,
                    StartSec = t,
                    Seconds = SecondsOf(station, TestSec) - holdSec,
                    HeadingRad = heading,
                    BrakeLeft = braked && side < 0 ? StepBrake : 0,
                    BrakeRight = braked && side > 0 ? StepBrake : 0,
                    BallastKg = station.Kind == CardLegKind.Ballast ? BallastKg : 0,
                    BallastArmM = station.Kind == CardLegKind.Ballast ? side * BallastArmM : 0,
                });
            }
        }
        return legs.ToImmutable();

        void Add(CardLeg leg)
        {
            legs.Add(leg with { Number = legs.Count + 1 });
            t += leg.Seconds;
        }
    }
}
