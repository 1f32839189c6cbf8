using ScottPlot;
using ScottPlot.Plottables;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Figures;
using TrimFit.Reporting.Wording;

namespace TrimFit.Tests.Reporting;

/// <summary>Plots are asserted by their series, limits and labels: their bytes change with the library's version.</summary>
public class FigureModelTests
{
    [Fact]
    public void A_residual_is_the_window_less_the_fitted_line()
    {
        IReadOnlyList<(TurnPoint Point, double RadPerSec)> residuals = ResidualPlot.Residuals(ReportFixture.Fit());
        // By hand: 0.4 + 0.005 T against 0.5, 2.0, 3.4 deg/s at 0, 360, 600 N.
        double[] expected = [0.1, -0.2, 0.0];
        Assert.All(expected.Zip(residuals), r => Assert.Equal(r.First, double.RadiansToDegrees(r.Second.RadPerSec), 9));
    }

    [Fact]
    public void The_residual_panel_has_a_series_for_hands_off_and_one_for_hands_on()
    {
        Plot plot = ResidualPlot.Panel(ResidualPlot.Residuals(ReportFixture.Fit()), p => p.Thrust, "thrust [N]", legend: true, Words.English, Numbers.Invariant);
        Scatter[] series = [.. plot.GetPlottables<Scatter>()];
        Assert.Equal(["hands off", "hands on, brake part taken out"], series.Select(s => s.LegendText));
        Assert.Equal([2, 1], series.Select(s => s.Data.GetScatterPoints().Count));
        Assert.NotEqual(series[0].MarkerShape, series[1].MarkerShape); // not by colour alone
        Assert.Equal("thrust [N]", plot.Axes.Bottom.Label.Text);
    }

    [Fact]
    public void The_turn_left_over_has_a_row_for_now_and_for_each_way_and_a_sign_for_each_power()
    {
        TrimAnalysis analysis = ReportFixture.Result();
        Plot plot = TurnLeftPlot.Build(analysis, Words.English, Numbers.Invariant);
        Scatter[] series = [.. plot.GetPlottables<Scatter>()];
        Assert.Equal(["off", "idle", "level flight", "full"], series.Select(s => s.LegendText));
        Assert.Equal(4, series.Select(s => s.MarkerShape).Distinct().Count());
        Coordinates[] off = [.. series[0].Data.GetScatterPoints()];
        Assert.Equal([(0.4, 0.0), (-1.1, -1.0)], off.Select(p => (Math.Round(p.X, 9), p.Y))); // as it is, and after the one way
        HorizontalSpan band = Assert.Single(plot.GetPlottables<HorizontalSpan>());
        Assert.Equal((-1.0, 1.0), (Math.Round(band.X1, 9), Math.Round(band.X2, 9)));
        Assert.Equal("turn left over [°/s], right +", plot.Axes.Bottom.Label.Text);
    }

    [Fact]
    public void The_wind_circle_has_the_airspeed_as_its_radius_and_the_wind_as_its_middle()
    {
        TurnSignals signals = ReportFixture.Signals();
        Assert.Null(GroundPlots.WindPlot(signals, Words.English, Numbers.Invariant)); // no velocities
        double[] north = new double[signals.Count], east = new double[signals.Count];
        for (int i = 0; i < signals.Count; i++)
            (north[i], east[i]) = (-3 + (11 * Math.Cos(i * 0.1)), 11 * Math.Sin(i * 0.1));
        TurnSignals flown = new()
        {
            TimeSec = signals.TimeSec,
            Thrust = signals.Thrust,
            ThrustBasis = signals.ThrustBasis,
            FullThrust = signals.FullThrust,
            HasThrust = true,
            BrakeDifference = signals.BrakeDifference,
            HasBrakes = true,
            RotationRatioSquared = signals.RotationRatioSquared,
            Use = signals.Use,
            HandsOff = signals.HandsOff,
            Wind = signals.Wind,
            VelocityNorth = north,
            VelocityEast = east,
        };
        Plot plot = GroundPlots.WindPlot(flown, Words.English, Numbers.Invariant)!;
        Scatter[] series = [.. plot.GetPlottables<Scatter>()];
        Assert.Equal(["over ground", "airspeed", "wind"], series.Select(s => s.LegendText));
        Assert.All(series[1].Data.GetScatterPoints(), p => Assert.Equal(11, Math.Sqrt((p.X * p.X) + ((p.Y + 3) * (p.Y + 3))), 9));
        Assert.All(series[0].Data.GetScatterPoints(), p => Assert.Equal(11, Math.Sqrt((p.X * p.X) + ((p.Y + 3) * (p.Y + 3))), 9));
        Assert.Equal([(0.0, 0.0), (0.0, -3.0)], series[2].Data.GetScatterPoints().Select(p => (p.X, p.Y)));
    }

    [Fact]
    public void The_drawing_points_to_the_side_the_words_name()
    {
        foreach ((double step, string side) in new[] { (-0.007, "left"), (0.007, "right") })
        {
            AdjustmentReport way = ReportFixture.Adjustment(AdjustmentKind.CarabinerPair, 2 * step, Math.Min(step, 3 * step), Math.Max(step, 3 * step));
            string svg = BehindDrawing.Action(ReportFixture.Rig(), ReportFixture.RigReport(), way, false, "", Words.English, Numbers.Invariant);
            Assert.Contains($">7 mm to your {side}<", svg, StringComparison.Ordinal);
            // The tip of each arrow lies 32 units from its carabiner (x -215 and 215), to that side.
            double[] tips = [.. System.Text.RegularExpressions.Regex.Matches(svg, "M(-?[0-9.]+) -106l").Select(m => double.Parse(m.Groups[1].Value, System.Globalization.CultureInfo.InvariantCulture))];
            double sign = Math.Sign(step);
            Assert.Equal([-215 + (32 * sign), 215 + (32 * sign)], tips);
        }
    }

    [Fact]
    public void Loads_are_told_now_and_after()
    {
        (string svg, string description) = BehindDrawing.Forces(ReportFixture.Rig(), ReportFixture.RigReport(), ReportFixture.Adjustment(), Words.English, Numbers.Invariant)!.Value;
        Assert.Contains("617 → 571 N", svg, StringComparison.Ordinal);
        Assert.Contains("362 → 408 N", svg, StringComparison.Ordinal);
        Assert.Contains("the left risers carry 617 → 571 N and the right ones 362 → 408 N; torque on the frame 56.0 N m, tipping it left", description, StringComparison.Ordinal); // clockwise: the frame is turned to the left
    }
}
