using TrimFit.Core.Turns;
using TrimFit.Simulation;

namespace TrimFit.Tests.Turns;

/// <summary>Which turns are left out of the fit: those the pilot made, not those the air made.</summary>
public class StrongTurnTests
{
    private static readonly SimulatedFlight _thermic = FlightSimulator.Fly(SensorFlights.Ordinary(new SensorSuite(), 12, s => s with
    {
        Air = s.Air with { ThermalsPerHour = 120, ThermalTurnRadPerSec = double.DegreesToRadians(14), ThermalLiftMPerSec = 0 },
    }));

    private static readonly SimulatedFlight _steered = FlightSimulator.Fly(SensorFlights.Ordinary(new SensorSuite(), 12, s => s with
    {
        Pilot = s.Pilot with { TurnBrakeM = 0.35 },
    }));

    private static bool LeftOut(TurnSignals signals, double sec) =>
        signals.SpansLeftOut.Any(s => s.Reason == TurnSignals.StrongTurnReason && sec >= s.StartSec && sec <= s.EndSec);

    [Fact]
    public void Turns_of_the_air_on_hands_off_legs_stay_in_however_strong()
    {
        var signals = TurnSignals.From(_thermic.Log, SensorFlights.RigOf(_thermic.Scenario));
        double fastest = 0;
        foreach (FlownLeg leg in _thermic.Legs.Where(l => l.Leg.Control == LegControl.HandsOff))
        {
            for (int i = 0; i < signals.Count; i++)
            {
                double t = signals.TimeSec[i];
                if (t < leg.StartSec + 8 || t > leg.EndSec - 4) // the edges belong to the steering before and after
                    continue;
                fastest = Math.Max(fastest, Math.Abs(signals.GyroRadPerSec[i]));
                Assert.False(LeftOut(signals, t), $"{t} s");
            }
        }
        Assert.True(fastest > double.DegreesToRadians(15), $"the air turned it by {double.RadiansToDegrees(fastest)} deg/s only");
    }

    [Fact]
    public void Turns_steered_hard_are_left_out()
    {
        var signals = TurnSignals.From(_steered.Log, SensorFlights.RigOf(_steered.Scenario));
        FlownLeg[] turns = [.. _steered.Legs.Where(l => l.Leg.Control == LegControl.Turn)];
        Assert.NotEmpty(turns);
        Assert.All(turns, leg => Assert.True(LeftOut(signals, (leg.StartSec + leg.EndSec) / 2), $"turn at {leg.StartSec} s"));
    }
}
