using System.Collections.Immutable;
using ScottPlot;
using ScottPlot.Plottables;
using TrimFit.Core.Analysis;
using TrimFit.Core.Logs;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>The flight over time in three panels: thrust, brakes, turn rate; spans left out are shaded, windows used are bars.</summary>
internal static class FlightPlot
{
    private const int Width = 760, PanelHeight = 170, LastPanelHeight = 260;
    private const int Bins = 500; // about two pixels on paper; means, so that the picture stays small

    /// <summary>The figure; null without samples.</summary>
    public static string? Draw(TrimAnalysis analysis, ControlUnit brake, Words words, Numbers numbers)
    {
        TurnSignals signals = analysis.Signals;
        if (signals.Count < 2)
            return null;
        Labels l = words.Labels;
        var panels = new List<(Plot, int)>();
        if (signals.HasThrust)
        {
            Plot plot = Panel(analysis, l, numbers, $"{l.Thrust} [%]", last: false);
            Lines(plot, Binned(signals, i => signals.Thrust[i] / signals.FullThrust * 100), Palette.Ink, 1.8f);
            plot.Axes.SetLimitsY(-5, 108);
            panels.Add((plot, PanelHeight));
        }
        if (signals.HasBrakes)
        {
            Plot plot = Panel(analysis, l, numbers, $"{l.AxisBrake} [{words.UnitName(ControlUnits.Name(brake))}]", last: false);
            double scale = ControlUnits.ShownPerSi(brake);
            List<(double Min, double V)> values = Binned(signals, i => signals.BrakeDifference[i] * scale);
            Lines(plot, values, Palette.Green, 1.8f);
            SetY(plot, values);
            panels.Add((plot, PanelHeight));
        }
        Plot turn = Panel(analysis, l, numbers, l.AxisTurnRateShort, last: true);
        List<(double Min, double V)> rates = TurnRates(analysis);
        Lines(turn, rates, Palette.Blue, 1.3f);
        bool first = true;
        foreach (TurnPoint p in Windows(analysis.Fit))
        {
            double[] inside = [.. rates.Where(r => r.Min * 60 >= p.StartSec && r.Min * 60 <= p.EndSec && double.IsFinite(r.V)).Select(r => r.V)];
            double level = inside.Length > 0 ? inside.Average() : double.RadiansToDegrees(p.TurnRateRadPerSec);
            Scatter bar = turn.Add.ScatterLine(new[] { p.StartSec / 60, p.EndSec / 60 }, new[] { level, level });
            bar.Color = Palette.Of(Palette.Vermilion);
            bar.LineWidth = 4;
            if (first)
                bar.LegendText = l.WindowsUsed;
            first = false;
        }
        SetY(turn, rates);
        turn.XLabel(l.AxisTime);
        TurnPlot.Axes(turn);
        turn.ShowLegend(Edge.Bottom);
        panels.Add((turn, LastPanelHeight));
        return SvgFigure.Stack("flight", Width, panels, l.FlightPlot, words.FlightPlotDescription(signals.TimeSec[^1] - signals.TimeSec[0], numbers));
    }

    private static Plot Panel(TrimAnalysis analysis, Labels l, Numbers numbers, string label, bool last)
    {
        var plot = new Plot();
        PlotFont.Use(plot);
        SvgFigure.Ticks(plot, numbers);
        double[] time = analysis.Signals.TimeSec;
        bool first = true;
        foreach ((double start, double end) in LeftOut(analysis))
        {
            HorizontalSpan shade = plot.Add.HorizontalSpan(start / 60, end / 60, Palette.Of(Palette.Shade).WithAlpha(0.75));
            shade.LineWidth = 0;
            if (first && last)
                shade.LegendText = l.WindowsLeftOut;
            first = false;
        }
        plot.YLabel(label);
        TurnPlot.Axes(plot);
        plot.Axes.SetLimitsX(time[0] / 60, time[^1] / 60);
        plot.Layout.Fixed(new PixelPadding(78, 18, last ? 104 : 30, 14));
        return plot;
    }

    /// <summary>Spans left out, joined where they touch: a flight may have hundreds.</summary>
    private static List<(double Start, double End)> LeftOut(TrimAnalysis analysis)
    {
        ImmutableArray<SpanLeftOut> spans = analysis.Fit.SpansLeftOut.IsDefaultOrEmpty ? analysis.Signals.SpansLeftOut : analysis.Fit.SpansLeftOut;
        double touch = (analysis.Signals.TimeSec[^1] - analysis.Signals.TimeSec[0]) / Bins;
        var joined = new List<(double Start, double End)>();
        foreach (SpanLeftOut span in spans.OrderBy(s => s.StartSec))
        {
            if (joined.Count > 0 && span.StartSec <= joined[^1].End + touch)
                joined[^1] = (joined[^1].Start, Math.Max(joined[^1].End, span.EndSec));
            else
                joined.Add((span.StartSec, span.EndSec));
        }
        return joined;
    }

    private static IEnumerable<TurnPoint> Windows(TurnFit fit)
    {
        int every = (fit.Points.Length / Bins) + 1;
        return fit.Points.Where((_, i) => i % every == 0);
    }

    /// <summary>Means over equal pieces of time; NaN where a piece has no value.</summary>
    private static List<(double Min, double V)> Binned(TurnSignals signals, Func<int, double> value)
    {
        double start = signals.TimeSec[0], step = (signals.TimeSec[^1] - start) / Bins;
        double[] sum = new double[Bins];
        int[] count = new int[Bins];
        for (int i = 0; i < signals.Count; i++)
        {
            double v = value(i);
            if (!double.IsFinite(v))
                continue;
            int bin = Math.Min(Bins - 1, (int)((signals.TimeSec[i] - start) / step));
            sum[bin] += v;
            count[bin]++;
        }
        var binned = new List<(double, double)>();
        for (int bin = 0; bin < Bins; bin++)
            binned.Add(((start + ((bin + 0.5) * step)) / 60, count[bin] == 0 ? double.NaN : sum[bin] / count[bin]));
        return binned;
    }

    /// <summary>Turn rate to look at, deg/s: the gyro less its bias, else the change of the compass heading, else of the track over ground.</summary>
    private static List<(double Min, double V)> TurnRates(TrimAnalysis analysis)
    {
        TurnSignals s = analysis.Signals;
        if (s.HasGyro)
        {
            double bias = analysis.Fit.GyroBiasRadPerSec?.Value ?? analysis.Gyro?.BiasRadPerSec?.Value ?? 0;
            return Binned(s, i => double.RadiansToDegrees(s.GyroRadPerSec[i] - bias));
        }
        double[] rate = new double[s.Count];
        Array.Fill(rate, double.NaN);
        double lastTime = double.NaN, lastAngle = double.NaN;
        for (int i = 0; i < s.Count; i++)
        {
            double angle = s.HeadingRad.Length > 0 ? s.HeadingRad[i]
                : s.HasVelocity ? Math.Atan2(s.VelocityEast[i], s.VelocityNorth[i]) : double.NaN;
            if (!double.IsFinite(angle))
                continue;
            if (double.IsFinite(lastAngle))
                rate[i] = Math.IEEERemainder(angle - lastAngle, Math.Tau) / (s.TimeSec[i] - lastTime);
            (lastTime, lastAngle) = (s.TimeSec[i], angle);
        }
        return Binned(s, i => double.RadiansToDegrees(rate[i]));
    }

    private static void Lines(Plot plot, List<(double Min, double V)> values, string color, float width)
    {
        var run = new List<(double Min, double V)>();
        int gap = 0;
        foreach ((double Min, double V) point in values.Append((0, double.NaN)))
        {
            if (double.IsFinite(point.V))
            {
                run.Add(point);
                gap = 0;
            }
            else if (++gap > 3 || point.Min == 0) // slow channels leave single pieces empty; only a real pause breaks the line
            {
                Line(plot, run, color, width);
                run.Clear();
            }
        }
    }

    private static void Line(Plot plot, List<(double Min, double V)> run, string color, float width)
    {
        if (run.Count < 2)
            return;
        Scatter line = plot.Add.ScatterLine(run.Select(p => p.Min).ToArray(), run.Select(p => p.V).ToArray());
        line.Color = Palette.Of(color);
        line.LineWidth = width;
    }

    /// <summary>Limits from the 1st to the 99th percentile, with zero: one wild sample must not flatten the rest.</summary>
    private static void SetY(Plot plot, List<(double Min, double V)> values)
    {
        double[] sorted = [.. values.Select(p => p.V).Where(double.IsFinite).Order()];
        if (sorted.Length == 0)
        {
            plot.Axes.SetLimitsY(-1, 1);
            return;
        }
        double low = Math.Min(0, sorted[(int)(0.01 * (sorted.Length - 1))]), high = Math.Max(0, sorted[(int)(0.99 * (sorted.Length - 1))]);
        double margin = 0.12 * Math.Max(high - low, 0.5);
        plot.Axes.SetLimitsY(low - margin, high + margin);
    }
}
