using System.Globalization;
using System.Text;

namespace TrimFit.Simulation;

/// <summary>The flight sheet that the pilot of a made-up flight would write.</summary>
public static class SheetText
{
    /// <summary>Writes the sheet (TOML, schema <c>trimfit-flight/1</c>).</summary>
    /// <param name="flight">The flight.</param>
    public static string Write(SimulatedFlight flight)
    {
        ArgumentNullException.ThrowIfNull(flight);
        double sloppinessSec = flight.Scenario.Output.SheetSloppinessSec;
        var random = new RandomStream(flight.Scenario.Seed, 31);
        var text = new StringBuilder();
        Line($"schema = \"trimfit-flight/1\"");
        Line($"date = \"{flight.Scenario.Start.TimeUtc.UtcDateTime:yyyy-MM-dd}\"");
        Line($"ground_altitude_m = {flight.Scenario.Start.AltitudeM:0.#}");
        foreach (FlownLeg leg in flight.Legs)
        {
            double start = Math.Max(0, leg.StartSec + Slip());
            double end = Math.Max(start + 1, leg.EndSec + Slip());
            FlightLeg asked = leg.Leg;
            text.Append("\n[[leg]]\n");
            Line($"start = {start:0.0}");
            Line($"end = {end:0.0}");
            string kind = asked.Control switch
            {
                LegControl.HandsOff => "hands_off",
                LegControl.HoldHeading => "held",
                LegControl.Brakes => "brake_step",
                LegControl.WeightShift => "weight_shift",
                LegControl.Ballast => "ballast",
                _ => "other",
            };
            Line($"kind = \"{kind}\"");
            if (asked.ThrottleFraction is double throttle)
                Line($"throttle_percent = {throttle * 100:0.#}");
            else
                Line($"power = \"{ScenarioKeys.WordFor(asked.Power)}\"");
            if (asked.Control == LegControl.Ballast)
            {
                Line($"ballast_kg = {asked.BallastKg:0.##}");
                Line($"ballast_arm_mm = {asked.BallastArmM * 1000:0.#}");
            }
            if (asked.Control == LegControl.Brakes)
            {
                Line($"brake_left = {asked.BrakeLeftM * 1000:0.#}");
                Line($"brake_right = {asked.BrakeRightM * 1000:0.#}");
            }
        }
        return text.ToString();

        double Slip() => sloppinessSec == 0 ? 0 : sloppinessSec * Math.Clamp(random.Normal(), -2, 2);
        void Line(FormattableString line) => text.Append(line.ToString(CultureInfo.InvariantCulture)).Append('\n');
    }
}
