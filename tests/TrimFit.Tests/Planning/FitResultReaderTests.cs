using TrimFit.Core.Planning;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Import;
using TrimFit.Import.Results;

namespace TrimFit.Tests.Planning;

public class FitResultReaderTests
{
    private const string Result = """
        {
          "schema": "trimfit-fit/1",
          "inputs": { "files": [ { "columns": [ { "name": "bl", "role": "brake_left" } ] } ] },
          "wind": { "north_m_s": 3, "east_m_s": -4, "airspeed_m_s": 10.5 },
          "turn_model": {
            "thrust_basis": "newton",
            "coefficients": [
              { "name": "constant", "unit": "deg/s", "value": 0.5 },
              { "name": "thrust", "unit": "deg/s per N", "value": 0.01 },
              { "name": "thrust_squared", "unit": "deg/s per N^2", "value": -0.000002 },
              { "name": "brake_difference", "unit": "deg/s per mm", "value": 0.08 }
            ],
            "noise": { "response": "second", "lag_s": null, "frequency_rad_s": 1.2, "damping": 0.7, "disturbance_deg_s": 0.9, "disturbance_tau_s": 7,
              "quick_deg_s_root_s": 0.3, "gyro_deg_s": 0.4, "heading_deg": 1.1, "gust_deg": 2.2, "gust_tau_s": 6, "gyro_rows_per_s": 5, "heading_rows_per_s": 1 }
          },
          "pull": {
            "at": [ { "setting": "idle", "thrust_fraction": 0.08 }, { "setting": "cruise", "thrust_fraction": 0.42 }, { "setting": "full", "thrust_n": 600, "thrust_fraction": 1 } ],
            "at_balance": { "rate_deg_s": 2.9, "held_brake": -36 },
            "cruise_basis": "zero_climb"
          }
        }
        """;

    [Fact]
    public void A_result_tells_noise_pull_powers_and_logger()
    {
        PriorFlight prior = FitResultReader.Read("x/fit.json", Result, brakeFullTravelM: 0.6);
        Accuracy.AgreesTo(12, CardFixture.Rad(0.5), prior.Constant!.Value);
        Accuracy.AgreesTo(12, CardFixture.Rad(6), prior.Slope!.Value);      // 0.01 × 600
        Accuracy.AgreesTo(12, CardFixture.Rad(-0.72), prior.Curvature!.Value); // −2e-6 × 600²
        Accuracy.AgreesTo(12, CardFixture.Rad(48), prior.BrakePerTravel!.Value); // 0.08 × 600 mm
        Accuracy.AgreesTo(12, -0.06, prior.HeldBrake!.Value);               // 36 of 600 mm
        Accuracy.AgreesTo(12, CardFixture.Rad(2.9), prior.PullRadPerSec!.Value);
        Assert.Equal((0.08, 0.42, 10.5, 5.0, true, 5.0, 1.0),
            (prior.Idle, prior.Level, prior.AirspeedMPerSec, prior.WindMPerSec, prior.BrakesLogged, prior.GyroRowsPerSec, prior.HeadingRowsPerSec));
        Assert.Equal(ResponseOrder.Second, prior.Noise!.Order);
        Assert.Equal((1.2, 0.7, 7.0, 6.0), (prior.Noise.NaturalFrequency, prior.Noise.Damping, prior.Noise.DisturbanceTauSec, prior.Noise.GustTauSec));
        Accuracy.AgreesTo(12, CardFixture.Rad(0.9), prior.Noise.DisturbanceRms);
    }

    [Fact]
    public void An_assumed_level_flight_and_an_unknown_travel_stay_unknown()
    {
        PriorFlight prior = FitResultReader.Read("fit.json", Result.Replace("zero_climb", "assumed", StringComparison.Ordinal));
        Assert.Null(prior.Level);
        Assert.Null(prior.BrakePerTravel);
        Assert.Null(prior.HeldBrake);
        Assert.Null(FitResultReader.Read("fit.json", """{ "schema": "trimfit-fit/1" }""").Noise);
    }

    [Theory]
    [InlineData("nothing", "fit.json(1, 2): found text that is no JSON, expected a result with schema \"trimfit-fit/1\". Write it with: trimfit fit LOG --rig RIG --json FILE.")]
    [InlineData("{}", "fit.json(1): found no schema, expected schema \"trimfit-fit/1\". Write it with: trimfit fit LOG --rig RIG --json FILE.")]
    [InlineData("{ \"schema\": \"trimfit-card/1\" }", "fit.json(1): found schema \"trimfit-card/1\", expected schema \"trimfit-fit/1\". Write it with: trimfit fit LOG --rig RIG --json FILE.")]
    [InlineData("{ \"schema\": \"trimfit-fit/1\", \"pull\": { \"at_balance\": { \"rate_deg_s\": \"2\" } } }", "fit.json(pull.at_balance.rate_deg_s): found \"2\", expected a number. Use the file as the program wrote it.")]
    [InlineData("{ \"schema\": \"trimfit-fit/1\", \"turn_model\": { \"noise\": { \"disturbance_tau_s\": -1 } } }", "fit.json(turn_model.noise.disturbance_tau_s): found -1, expected a number above 0. Write it with: trimfit fit LOG --rig RIG --json FILE.")]
    public void Another_file_is_refused_with_the_place(string json, string message) =>
        Assert.Equal(message, Assert.Throws<LogFormatException>(() => FitResultReader.Read("a/fit.json", json)).Message);
}
