using ScottPlot;
using ScottPlot.Plottables;
using TrimFit.Core.Analysis;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>What the model leaves over, against time and against thrust: a slope or a bend would be a fault of the model.</summary>
internal static class ResidualPlot
{
    private const int Width = 760, Upper = 200, Lower = 260;

    /// <summary>Windows with what the fit leaves over, rad/s; empty without a fit.</summary>
    public static IReadOnlyList<(TurnPoint Point, double RadPerSec)> Residuals(TurnFit fit)
    {
        var list = new List<(TurnPoint, double)>();
        foreach (TurnPoint p in fit.Points)
        {
            if (double.IsFinite(p.TurnRateRadPerSec) && fit.PullAt(p.Thrust) is Estimate e && double.IsFinite(e.Value))
                list.Add((p, p.TurnRateRadPerSec - e.Value));
        }
        return list;
    }

    /// <summary>The two panels; null below three windows.</summary>
    public static string? Draw(TrimAnalysis analysis, string description, Words words, Numbers numbers)
    {
        IReadOnlyList<(TurnPoint Point, double RadPerSec)> residuals = Residuals(analysis.Fit);
        if (residuals.Count < 3)
            return null;
        ReportWords w = words.Report;
        bool newtons = analysis.Fit.ThrustBasis == ThrustBasis.Newton;
        return SvgFigure.Stack("residual", Width,
            [
                (Panel(residuals, p => (p.StartSec + p.EndSec) / 120, words.Labels.AxisTime, legend: false, words, numbers), Upper),
                (Panel(residuals, p => newtons ? numbers.ForceValue(p.Thrust) : p.Thrust, newtons ? $"{words.Labels.AxisThrust} [{numbers.ForceUnit}]" : words.Labels.AxisThrustRelative,
                    legend: true, words, numbers), Lower),
            ], w.ResidualsTitle, description);
    }

    /// <summary>One panel as a plot.</summary>
    internal static Plot Panel(IReadOnlyList<(TurnPoint Point, double RadPerSec)> residuals, Func<TurnPoint, double> x, string axis, bool legend, Words words, Numbers numbers)
    {
        var plot = new Plot();
        PlotFont.Use(plot);
        SvgFigure.Ticks(plot, numbers);
        plot.Add.HorizontalLine(0, 1, Palette.Of(Palette.Grey));
        foreach (bool handsOff in new[] { true, false })
        {
            (double X, double Y)[] points = [.. residuals.Where(r => r.Point.HandsOff == handsOff).Select(r => (x(r.Point), double.RadiansToDegrees(r.RadPerSec)))];
            if (points.Length == 0)
                continue;
            Scatter s = plot.Add.ScatterPoints(points.Select(p => p.X).ToArray(), points.Select(p => p.Y).ToArray());
            s.Color = Palette.Of(handsOff ? Palette.Vermilion : Palette.Blue);
            s.MarkerShape = handsOff ? MarkerShape.FilledCircle : MarkerShape.OpenTriangleUp;
            s.MarkerSize = handsOff ? 7 : 9;
            s.MarkerLineWidth = 1.5f;
            if (legend) // one for both panels
                s.LegendText = handsOff ? words.Labels.HandsOff : words.Labels.HandsOn;
        }
        double most = residuals.Max(r => Math.Abs(double.RadiansToDegrees(r.RadPerSec))) * 1.15;
        plot.Axes.SetLimitsY(-Math.Max(most, 0.2), Math.Max(most, 0.2));
        double low = residuals.Min(r => x(r.Point)), high = residuals.Max(r => x(r.Point)), margin = 0.04 * Math.Max(high - low, 1e-6);
        plot.Axes.SetLimitsX(low - margin, high + margin);
        plot.XLabel(axis);
        plot.YLabel(words.Report.AxisResidual);
        TurnPlot.Axes(plot);
        plot.Axes.Left.Label.FontSize = 13; // the two panels are low
        plot.Layout.Fixed(new PixelPadding(78, 18, legend ? 96 : 52, 14));
        if (legend)
            plot.ShowLegend(Edge.Bottom);
        return plot;
    }
}
