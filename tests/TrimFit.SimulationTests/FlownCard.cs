using TrimFit.Core.Analysis;
using TrimFit.Core.Planning;
using TrimFit.Simulation;

namespace TrimFit.SimulationTests;

/// <summary>Test cards as legs of the simulator.</summary>
internal static class FlownCard
{
    /// <summary>The legs of a card, flown from a scenario's own start heading.</summary>
    public static Scenario With(Scenario scenario, IEnumerable<CardLeg> legs) =>
        scenario with { Legs = [.. legs.Select(l => Of(l, scenario.Start.HeadingRad, scenario.Brakes.FullTravelM))] };

    /// <summary>One leg.</summary>
    public static FlightLeg Of(CardLeg leg, double headingRad, double fullTravelM) => new()
    {
        DurationSec = leg.Seconds,
        Power = leg.Power switch
        {
            PowerSetting.Off => LegPower.Off,
            PowerSetting.Idle => LegPower.Idle,
            PowerSetting.Cruise => LegPower.Level,
            _ => LegPower.Full,
        },
        Control = leg.Kind switch
        {
            CardLegKind.Hold => LegControl.HoldHeading,
            CardLegKind.HandsOff => LegControl.HandsOff,
            CardLegKind.BrakeStep or CardLegKind.Circle => LegControl.Brakes,
            CardLegKind.Ballast => LegControl.Ballast,
            _ => LegControl.Turn,
        },
        HeadingRad = leg.Kind == CardLegKind.Hold ? headingRad + leg.HeadingRad : null,
        TurnRad = leg.TurnRad,
        BrakeLeftM = leg.BrakeLeft * fullTravelM,
        BrakeRightM = leg.BrakeRight * fullTravelM,
        BallastKg = leg.BallastKg,
        BallastArmM = leg.BallastArmM,
    };
}
