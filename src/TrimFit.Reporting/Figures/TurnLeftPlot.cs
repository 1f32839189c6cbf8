using ScottPlot;
using ScottPlot.Plottables;
using ScottPlot.TickGenerators;
using TrimFit.Core.Analysis;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>Turn left over at each power: a row for the machine as it is and one for each way of making the shift, a sign for each power.</summary>
internal static class TurnLeftPlot
{
    private const int Width = 760, RowHeight = 34, Left = 330, Below = 150; // below: the axis and three rows of signs

    /// <summary>The figure; null without an adjustment.</summary>
    public static string? Draw(TrimAnalysis analysis, string description, Words words, Numbers numbers) => analysis.Adjustments.IsEmpty
        ? null
        : SvgFigure.Stack("left", Width, [(Build(analysis, words, numbers), 8 + Below + ((analysis.Adjustments.Length + 1) * RowHeight))], words.Report.TurnLeftTitle, description);

    /// <summary>The figure as a plot.</summary>
    internal static Plot Build(TrimAnalysis analysis, Words words, Numbers numbers)
    {
        ReportWords w = words.Report;
        List<(string Name, IReadOnlyList<PullAtSetting> At)> rows = [(w.AsItIs, analysis.Pull.At)];
        rows.AddRange(analysis.Adjustments.Select(a => (words.PartShort(a.Kind), (IReadOnlyList<PullAtSetting>)a.TurnLeftAt)));
        var plot = new Plot();
        PlotFont.Use(plot);
        SvgFigure.Ticks(plot, numbers);
        double tolerance = analysis.Options.Tolerance.DegPerSec;
        HorizontalSpan band = plot.Add.HorizontalSpan(-tolerance, tolerance, Palette.Of(Palette.Shade).WithAlpha(0.75));
        band.LineWidth = 0;
        band.LegendText = w.ToleranceBand;
        plot.Add.VerticalLine(0, 1, Palette.Of(Palette.Grey));
        (PowerSetting Setting, MarkerShape Shape, string Color)[] signs =
        [
            (PowerSetting.Off, MarkerShape.OpenCircle, Palette.Ink), (PowerSetting.Idle, MarkerShape.OpenTriangleUp, Palette.Green),
            (PowerSetting.Cruise, MarkerShape.FilledSquare, Palette.Blue), (PowerSetting.Full, MarkerShape.FilledCircle, Palette.Vermilion),
        ];
        double most = tolerance;
        foreach ((PowerSetting setting, MarkerShape shape, string color) in signs)
        {
            (double X, double Y)[] points = [.. rows.SelectMany((r, i) => r.At.Where(p => p.Setting == setting && p.RateRadPerSec is not null)
                .Select(p => (double.RadiansToDegrees(p.RateRadPerSec!.Value), (double)-i)))];
            if (points.Length == 0)
                continue;
            most = Math.Max(most, points.Max(p => Math.Abs(p.X)));
            Scatter s = plot.Add.ScatterPoints(points.Select(p => p.X).ToArray(), points.Select(p => p.Y).ToArray());
            s.Color = Palette.Of(color);
            s.MarkerShape = shape;
            s.MarkerSize = 11;
            s.MarkerLineWidth = 2;
            s.LegendText = words.Setting(setting);
        }
        plot.Axes.Left.TickGenerator = new NumericManual([.. rows.Select((_, i) => (double)-i)], [.. rows.Select(r => r.Name)]);
        plot.XLabel(w.AxisTurnLeft);
        TurnPlot.Axes(plot);
        plot.Axes.Left.TickLabelStyle.FontSize = 13;
        plot.Axes.SetLimits(-1.15 * most, 1.15 * most, -(rows.Count - 1) - 0.6, 0.6);
        plot.Layout.Fixed(new PixelPadding(Left, 18, Below, 8));
        plot.ShowLegend(Edge.Bottom);
        return plot;
    }
}
