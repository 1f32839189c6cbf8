using ScottPlot;
using ScottPlot.Plottables;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>Turn rate against thrust: windows, fitted line, 95 % band, the balance point.</summary>
internal static class TurnPlot
{
    private const int Width = 760, Height = 430;
    private const int MostPoints = 400; // one SVG element a point: more would only blacken the picture
    private const int Steps = 60;

    /// <summary>The figure; null when there is neither a line nor a point to draw.</summary>
    public static string? Draw(TrimAnalysis analysis, string description, Words words, Numbers numbers)
    {
        TurnFit fit = analysis.Fit;
        Labels l = words.Labels;
        bool newtons = fit.ThrustBasis == ThrustBasis.Newton;
        double x(double thrust) => newtons ? numbers.ForceValue(thrust) : thrust;
        double full = analysis.Signals.FullThrust;
        var line = new List<(double X, double Low, double Mid, double High)>();
        for (int i = 0; i <= Steps; i++)
        {
            double thrust = full * i / Steps;
            if (fit.PullAt(thrust) is Estimate e && double.IsFinite(e.Value))
            {
                ConfidenceInterval band = fit.Interval95(e) ?? new(e.Value, e.Value, 0.95);
                line.Add((x(thrust), double.RadiansToDegrees(band.Lower), double.RadiansToDegrees(e.Value), double.RadiansToDegrees(band.Upper)));
            }
        }
        if (line.Count == 0 && fit.Points.Length == 0)
            return null;

        var plot = new Plot();
        PlotFont.Use(plot);
        SvgFigure.Ticks(plot, numbers);
        plot.Add.HorizontalLine(0, 1, Palette.Of(Palette.Grey)); // solid: of a dashed line the SVG backend complains on standard error
        if (line.Count > 0)
        {
            FillY fill = plot.Add.FillY([.. line.Select(p => p.X)], [.. line.Select(p => p.Low)], [.. line.Select(p => p.High)]);
            fill.FillColor = Palette.Of(Palette.Blue).WithAlpha(0.18);
            fill.LineColor = Palette.Of(Palette.Blue).WithAlpha(0.6);
            fill.LineWidth = 1;
            fill.LegendText = l.Band;
            Scatter mid = plot.Add.ScatterLine(line.Select(p => p.X).ToArray(), line.Select(p => p.Mid).ToArray());
            mid.Color = Palette.Of(Palette.Blue);
            mid.LineWidth = 2.5f;
            mid.LegendText = l.FittedLine;
        }
        Points(plot, fit, true, x, l.HandsOff);
        Points(plot, fit, false, x, l.HandsOn);
        PullAtSetting at = analysis.Pull.AtBalance;
        if (at.RateRadPerSec is double rate && (newtons ? at.ThrustN : at.ThrustFraction) is double balance)
        {
            Scatter mark = plot.Add.ScatterPoints(new[] { x(balance) }, new[] { double.RadiansToDegrees(rate) });
            mark.MarkerShape = MarkerShape.Cross;
            mark.MarkerSize = 18;
            mark.MarkerLineWidth = 3;
            mark.Color = Palette.Of(Palette.Ink);
            mark.LegendText = l.BalancePoint;
        }
        plot.XLabel(newtons ? $"{l.AxisThrust} [{numbers.ForceUnit}]" : l.AxisThrustRelative);
        plot.YLabel(l.AxisTurnRate);
        Limits(plot, line, fit, x(full));
        Axes(plot);
        plot.ShowLegend(Edge.Bottom);
        return SvgFigure.Stack("turn", Width, [(plot, Height)], l.TurnPlot, description);
    }

    /// <summary>Letters large enough to be read when the page is on a phone.</summary>
    internal static void Axes(Plot plot)
    {
        foreach (IAxis axis in new IAxis[] { plot.Axes.Bottom, plot.Axes.Left })
        {
            axis.TickLabelStyle.FontSize = 15;
            axis.Label.FontSize = 16;
            axis.Label.Bold = false;
        }
        plot.Legend.FontSize = 14;
        plot.Legend.ShadowColor = Colors.Transparent;
        plot.Legend.OutlineColor = Colors.Transparent;
        plot.Grid.MajorLineColor = Palette.Of(Palette.Shade);
    }

    private static void Points(Plot plot, TurnFit fit, bool handsOff, Func<double, double> x, string legend)
    {
        TurnPoint[] points = [.. fit.Points.Where(p => p.HandsOff == handsOff && double.IsFinite(p.TurnRateRadPerSec))];
        if (points.Length == 0)
            return;
        int every = (points.Length + MostPoints - 1) / MostPoints;
        TurnPoint[] drawn = [.. points.Where((_, i) => i % every == 0)];
        Scatter s = plot.Add.ScatterPoints(drawn.Select(p => x(p.Thrust)).ToArray(), drawn.Select(p => double.RadiansToDegrees(p.TurnRateRadPerSec)).ToArray());
        s.Color = Palette.Of(Palette.Vermilion);
        s.MarkerShape = handsOff ? MarkerShape.FilledCircle : MarkerShape.OpenTriangleUp;
        s.MarkerSize = handsOff ? 7 : 9;
        s.MarkerLineWidth = 1.5f;
        s.LegendText = legend;
    }

    private static void Limits(Plot plot, List<(double X, double Low, double Mid, double High)> line, TurnFit fit, double full)
    {
        // The band may run away where nothing was flown; the picture is made for the points and the line.
        double[] y = [.. line.Select(p => p.Mid), .. fit.Points.Select(p => double.RadiansToDegrees(p.TurnRateRadPerSec)).Where(double.IsFinite), 0];
        double low = y.Min(), high = y.Max(), span = Math.Max(high - low, 1);
        if (line.Count > 0)
        {
            low = Math.Min(low, Math.Max(line.Min(p => p.Low), low - span));
            high = Math.Max(high, Math.Min(line.Max(p => p.High), high + span));
        }
        double margin = 0.06 * (high - low + 1);
        plot.Axes.SetLimits(-0.02 * full, 1.04 * full, low - margin, high + margin);
    }
}
