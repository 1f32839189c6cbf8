using System.Text;
using System.Text.Json;

namespace TrimFit.Simulation;

/// <summary>The truth of a made-up flight as JSON, in the units people read, schema <c>trimfit-truth/1</c>.</summary>
public static class TruthJson
{
    /// <summary>Writes the truth.</summary>
    /// <returns>UTF-8 text with a final newline; numbers have nine significant digits, so that it is the same on every machine.</returns>
    public static string Write(SimulatedFlight flight)
    {
        ArgumentNullException.ThrowIfNull(flight);
        FlightTruth t = flight.Truth;
        using var stream = new MemoryStream();
        using (var json = new Utf8JsonWriter(stream, new JsonWriterOptions { Indented = true, NewLine = "\n" }))
        {
            json.WriteStartObject();
            json.WriteString("schema", "trimfit-truth/1");
            json.WriteString("name", flight.Scenario.Name);
            json.WriteNumber("seed", flight.Scenario.Seed);
            Number("constant_deg_s", Deg(t.ConstantRadPerSec));
            Number("thrust_deg_s_per_n", Deg(t.ThrustRadPerSecPerN));
            Number("thrust_squared_deg_s_per_n2", Deg(t.ThrustSquaredRadPerSecPerN2));
            Number("slope_at_zero_deg_s_per_n", Deg(t.SlopeAtZeroRadPerSecPerN));
            Number("brake_deg_s_per_mm", Deg(t.BrakeRadPerSecPerM) / 1000);
            json.WriteStartArray("pull");
            foreach (PullTruth pull in t.Pull)
            {
                json.WriteStartObject();
                json.WriteString("setting", pull.Setting);
                Number("thrust_n", pull.ThrustN);
                Number("rate_deg_s", Deg(pull.RateRadPerSec));
                json.WriteEndObject();
            }
            json.WriteEndArray();
            Number("level_thrust_n", t.LevelThrustN);
            Number("full_thrust_n", t.FullThrustN);
            Number("sensitivity_deg_s_per_mm", Deg(t.SensitivityRadPerSecPerM) / 1000);
            Number("yaw_ratio", t.YawRatio);
            Maybe("null_shift_mm", t.NullShiftM * 1000);
            Number("equivalent_shift_mm", t.EquivalentShiftM * 1000);
            json.WriteStartObject("travel_mm");
            foreach (TravelTruth travel in t.Travels)
                Maybe(travel.Kind, travel.TravelM * 1000);
            json.WriteEndObject();
            Maybe("gyro_bias_deg_s", t.GyroBiasRadPerSec is double bias ? Deg(bias) : null);
            Number("wind_north_m_s", t.WindNorthMPerSec);
            Number("wind_east_m_s", t.WindEastMPerSec);
            Number("airspeed_m_s", t.AirspeedMPerSec);
            json.WriteStartArray("legs");
            foreach (FlownLeg leg in flight.Legs)
            {
                json.WriteStartObject();
                Number("start_s", leg.StartSec);
                Number("end_s", leg.EndSec);
                json.WriteString("control", ScenarioKeys.WordFor(leg.Leg.Control));
                Number("throttle_percent", leg.ThrottleFraction * 100);
                json.WriteEndObject();
            }
            json.WriteEndArray();
            json.WriteEndObject();

            void Number(string name, double value) => json.WriteNumber(name, Rounded(value));
            void Maybe(string name, double? value)
            {
                if (value is double number)
                    Number(name, number);
                else
                    json.WriteNull(name);
            }
        }
        return Encoding.UTF8.GetString(stream.ToArray()) + "\n";
    }

    private static double Deg(double rad) => double.RadiansToDegrees(rad);

    /// <summary>Nine significant digits; what is below 1e-12 is zero left over from the solution.</summary>
    private static decimal Rounded(double value)
    {
        if (Math.Abs(value) < 1e-12)
            return 0;
        int digits = Math.Clamp(8 - (int)Math.Floor(Math.Log10(Math.Abs(value))), 0, 20);
        return Math.Round((decimal)value, digits) / 1.0000000000000000000000000000m; // the division drops trailing zeros
    }
}
