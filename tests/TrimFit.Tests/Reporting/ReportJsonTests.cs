using System.Globalization;
using System.Text.Json;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Reporting;

namespace TrimFit.Tests.Reporting;

public class ReportJsonTests
{
    [Fact]
    public void The_keys_of_fit_are_the_fixed_ones_in_their_order() => Assert.Equal(
        ["schema", "inputs", "sampling", "wind", "gyro", "turn_model", "cross_check", "pull", "sensitivity", "shift", "adjustments", "verdict", "assumptions",
            "spans_left_out", "warnings", "cautions"],
        Keys(Fit()));

    [Fact]
    public void Inner_keys_are_the_fixed_ones()
    {
        JsonElement fit = Fit();
        Assert.Equal(["files", "rig", "sheet", "program_version"], Keys(fit.GetProperty("inputs")));
        Assert.Equal(["name", "sha256", "format", "rows_read", "rows_left_out", "columns"], Keys(fit.GetProperty("inputs").GetProperty("files")[0]));
        Assert.Equal(["start", "duration_s", "rate_hz", "gaps", "clocks"], Keys(fit.GetProperty("sampling")));
        Assert.Equal(["north_m_s", "east_m_s", "airspeed_m_s", "arc_deg", "north_std_error_m_s", "east_std_error_m_s", "airspeed_std_error_m_s"], Keys(fit.GetProperty("wind")));
        Assert.Equal(["bias_deg_s", "bias_std_error_deg_s", "scale", "sign", "delay_s", "scale_std_error", "delay_std_error_s"], Keys(fit.GetProperty("gyro")));
        Assert.Equal(["method", "thrust_basis", "coefficients", "covariance", "lag_s", "disturbance", "n_eff", "condition"], Keys(fit.GetProperty("turn_model")));
        Assert.Equal(["name", "unit", "value", "std_error", "low95", "high95", "reason"], Keys(fit.GetProperty("turn_model").GetProperty("coefficients")[0]));
        Assert.Equal(["rms_deg_s", "tau_s"], Keys(fit.GetProperty("turn_model").GetProperty("disturbance")));
        Assert.Equal(["at", "at_balance", "cruise_basis", "smallest_detectable_deg_s"], Keys(fit.GetProperty("pull")));
        Assert.Equal(["setting", "thrust_n", "thrust_fraction", "rate_deg_s", "low95", "high95", "held_brake"], Keys(fit.GetProperty("pull").GetProperty("at")[0]));
        Assert.Equal(["deg_s_per_mm", "low95", "high95", "sources", "conflict", "effective_samples", "prior_predictive_p", "yaw_ratio"], Keys(fit.GetProperty("sensitivity")));
        Assert.Equal(["balance_thrust_n", "balance_thrust_fraction", "cg_mm", "constant_part_mm", "power_part_mm", "turn_left_at"], Keys(fit.GetProperty("shift")));
        Assert.Equal(["kind", "part", "toward", "travel", "unit", "low95", "high95", "rounded", "first_step", "efficiency", "thrust_line_offset_mm", "twist_ratio",
            "twist_ratio_high95", "twist_direction", "riser_load_left_n", "riser_load_right_n", "hang_check", "turn_left_at", "within_limits",
            "probability_wrong_side", "notes"], Keys(fit.GetProperty("adjustments")[0]));
        Assert.Equal(["left_kg", "right_kg"], Keys(fit.GetProperty("adjustments")[0].GetProperty("hang_check")));
        Assert.Equal(["code", "strength", "sentence", "reasons"], Keys(fit.GetProperty("verdict")));
        Assert.Equal(["name", "value", "unit", "low95", "high95"], Keys(fit.GetProperty("assumptions")[0]));
        Assert.Equal(["start_s", "end_s", "reason"], Keys(fit.GetProperty("spans_left_out")[0]));
        Assert.Equal(["code", "message"], Keys(fit.GetProperty("cautions")[0]));
        JsonElement rig = JsonDocument.Parse(ReportJson.Rig(ReportFixture.Sheet())).RootElement;
        Assert.Equal("trimfit-rig-result/1", rig.GetProperty("schema").GetString());
        Assert.Equal(["schema", "rig", "program_version", "masses", "e_mm", "t_mm", "carabiner_spacing_mm", "full_thrust_n", "full_torque_nm", "figure_of_merit",
            "twist_stiffness_nm_per_rad", "torque_balancing_mm", "hang_check", "hang_check_measured", "at", "adjustments", "assumptions", "warnings", "cautions"], Keys(rig));
        Assert.Equal(["setting", "thrust_n", "torque_nm", "hang_back_deg", "yaw_moment_nm", "roll_moment_nm", "riser_load_left_n", "riser_load_right_n", "twist_deg",
            "twist_ratio", "twist_ratio_high95"], Keys(rig.GetProperty("at")[0]));
        JsonElement inspect = JsonDocument.Parse(ReportJson.Inspect(ReportFixture.Inspection())).RootElement;
        Assert.Equal(["schema", "inputs", "sampling", "wind", "gyro", "warnings", "cautions"], Keys(inspect));
        Assert.Equal("trimfit-inspect/1", inspect.GetProperty("schema").GetString());
    }

    [Fact]
    public void Degrees_and_millimetres_are_made_at_this_edge()
    {
        JsonElement fit = Fit();
        JsonElement way = fit.GetProperty("adjustments")[0];
        Accuracy.AgreesTo(8, -14, way.GetProperty("travel").GetDouble());
        Assert.Equal("left", way.GetProperty("toward").GetString());
        Assert.Equal("mm", way.GetProperty("unit").GetString());
        Accuracy.AgreesTo(8, 2.1, fit.GetProperty("pull").GetProperty("at")[2].GetProperty("rate_deg_s").GetDouble());
        Accuracy.AgreesTo(8, -4, fit.GetProperty("pull").GetProperty("at")[2].GetProperty("held_brake").GetDouble()); // -0.04 of the travel, in %
        Accuracy.AgreesTo(8, 0.077, fit.GetProperty("sensitivity").GetProperty("deg_s_per_mm").GetDouble());
        JsonElement brake = fit.GetProperty("turn_model").GetProperty("coefficients")[3];
        Assert.Equal("deg/s per %", brake.GetProperty("unit").GetString());
        Accuracy.AgreesTo(8, 0.7, brake.GetProperty("value").GetDouble()); // 70 deg/s for the whole travel
        Accuracy.AgreesTo(8, 0.05 * 0.05, fit.GetProperty("turn_model").GetProperty("covariance")[3][3].GetDouble());
        // Student's t, 10 degrees of freedom, two-sided 95 %: 2.22814 (tables of the t distribution)
        Accuracy.AgreesTo(4.5, 0.4 - (2.22814 * 0.2), fit.GetProperty("turn_model").GetProperty("coefficients")[0].GetProperty("low95").GetDouble());
    }

    [Fact]
    public void Brakes_in_metres_come_out_per_millimetre()
    {
        FlightImport import = ReportFixture.Import() with { Flight = FlightLog.Create([0, 1], [], new() { BrakeUnit = ControlUnit.Meter }) };
        JsonElement brake = Parse(ReportFixture.Report(import: import)).GetProperty("turn_model").GetProperty("coefficients")[3];
        Assert.Equal("deg/s per mm", brake.GetProperty("unit").GetString());
        Accuracy.AgreesTo(8, 0.07, brake.GetProperty("value").GetDouble()); // 70 deg/s per metre
    }

    [Fact]
    public void Ballast_and_cant_have_their_own_units()
    {
        JsonElement ways = Parse(ReportFixture.Report(ReportFixture.Result(adjustments:
        [
            ReportFixture.Adjustment(AdjustmentKind.Ballast, 2.5, 1, 4, TravelUnit.Kilogram),
            ReportFixture.Adjustment(AdjustmentKind.EngineCant, double.DegreesToRadians(2), 0.01, 0.05, TravelUnit.Radian),
        ]))).GetProperty("adjustments");
        Assert.Equal("kg", ways[0].GetProperty("unit").GetString());
        Accuracy.AgreesTo(9, 2.5, ways[0].GetProperty("travel").GetDouble());
        Assert.Equal("deg", ways[1].GetProperty("unit").GetString());
        Accuracy.AgreesTo(8, 2, ways[1].GetProperty("travel").GetDouble());
    }

    [Fact]
    public void What_is_unknown_is_null_with_its_reason()
    {
        JsonElement fit = Fit();
        JsonElement curve = fit.GetProperty("turn_model").GetProperty("coefficients")[2];
        Assert.Equal(JsonValueKind.Null, curve.GetProperty("value").ValueKind);
        Assert.Equal("thrust had too few levels", curve.GetProperty("reason").GetString());
        Assert.Equal(JsonValueKind.Null, fit.GetProperty("turn_model").GetProperty("covariance")[2][0].ValueKind);
        Assert.Equal(JsonValueKind.Null, fit.GetProperty("turn_model").GetProperty("condition").ValueKind); // infinite
        Assert.Equal(JsonValueKind.Null, fit.GetProperty("pull").GetProperty("at")[3].GetProperty("rate_deg_s").ValueKind);
        Assert.Equal(JsonValueKind.Null, fit.GetProperty("cross_check").ValueKind);
    }

    [Fact]
    public void No_number_is_ever_NaN()
    {
        TrimAnalysis analysis = ReportFixture.Result() with
        {
            Sensitivity = new()
            {
                RadPerSecPerM = double.NaN,
                Interval95 = new ConfidenceInterval(double.NegativeInfinity, double.PositiveInfinity, 0.95),
                Conflict = false,
                EffectiveSamples = double.NaN,
                YawRatio = double.NaN,
                YawRatioInterval95 = new(double.NaN, double.NaN, 0.95),
                Sources = [],
            },
        };
        string json = ReportJson.Fit(ReportFixture.Report(analysis));
        Assert.DoesNotContain("NaN", json, StringComparison.OrdinalIgnoreCase);
        Assert.DoesNotContain("Infinity", json, StringComparison.OrdinalIgnoreCase);
        Assert.Equal(JsonValueKind.Null, JsonDocument.Parse(json).RootElement.GetProperty("sensitivity").GetProperty("deg_s_per_mm").ValueKind);
    }

    [Fact]
    public void A_cross_check_has_the_form_of_the_turn_model_and_its_agreement()
    {
        TrimAnalysis same = ReportFixture.Result() with { CrossCheck = ReportFixture.Fit() };
        JsonElement check = Parse(ReportFixture.Report(same)).GetProperty("cross_check");
        Assert.Equal([.. Keys(Fit().GetProperty("turn_model")), "agreement"], Keys(check));
        Assert.Equal("agrees", check.GetProperty("agreement").GetString());
        // Pull at 360 N: 0.4 + 1.8 deg/s with 2.228 · sqrt(0.2² + 0.36²) = 0.92; a constant 3 deg/s higher is outside both.
        TrimAnalysis other = same with
        {
            CrossCheck = ReportFixture.Fit() with { Coefficients = ReportFixture.Fit().Coefficients.SetItem(0, new("constant", new(ReportFixture.Deg(3.4), ReportFixture.Deg(0.2)), "")) },
        };
        Assert.Equal("differs", Parse(ReportFixture.Report(other)).GetProperty("cross_check").GetProperty("agreement").GetString());
    }

    [Fact]
    public void Words_in_JSON_do_not_follow_culture_or_units_of_the_reader()
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        try
        {
            string english = ReportJson.Fit(ReportFixture.Report());
            CultureInfo.CurrentCulture = CultureInfo.GetCultureInfo("de-DE");
            Assert.Equal(english, ReportJson.Fit(ReportFixture.Report()));
        }
        finally
        {
            CultureInfo.CurrentCulture = before;
        }
    }

    private static JsonElement Fit() => Parse(ReportFixture.Report());

    private static JsonElement Parse(FitReport report) => JsonDocument.Parse(ReportJson.Fit(report)).RootElement;

    private static string[] Keys(JsonElement element) => [.. element.EnumerateObject().Select(p => p.Name)];
}
