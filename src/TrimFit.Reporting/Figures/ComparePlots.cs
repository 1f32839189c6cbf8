using ScottPlot;
using ScottPlot.Plottables;
using TrimFit.Core.Comparing;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;
using TrimFit.Reporting.Wording;
using TrimFit.Reporting.Wording.Comparing;

namespace TrimFit.Reporting.Figures;

/// <summary>Pull over power before and after, and the flights in their order.</summary>
internal static class ComparePlots
{
    private const int Width = 760, Height = 430, Steps = 40;
    private const float Marker = 11;

    private static readonly string[] _colours = [Palette.Vermilion, Palette.Blue, Palette.Green, Palette.Grey];
    private static readonly MarkerShape[] _shapes = [MarkerShape.OpenTriangleUp, MarkerShape.FilledCircle, MarkerShape.OpenSquare, MarkerShape.Cross];

    /// <summary>First and last setting over thrust, each with its 95 % band; null with fewer than two settings.</summary>
    public static string? OverPower(FlightComparison c, Words words, Numbers numbers)
    {
        if (c.Setups.Length < 2)
            return null;
        Plot plot = Start(c, words, numbers);
        bool newtons = c.ThrustBasis == ThrustBasis.Newton;
        double X(SetupPull p) => newtons && p.ThrustN is double n ? numbers.ForceValue(n) : p.ThrustFraction;
        // Between the four powers the bands are drawn through their ends: both are parabolas to within the width of a line.
        foreach ((ComparedSetup setup, int i) in new[] { (c.Setups[0], 0), (c.Setups[^1], 1) })
        {
            double[] x = [.. setup.At.Select(X)], mid = [.. setup.At.Select(p => Deg(p.Rate.Mean))];
            double[] low = [.. setup.At.Select(p => Deg(p.Interval95.Lower))], high = [.. setup.At.Select(p => Deg(p.Interval95.Upper))];
            (double[] fine, double[] fineLow) = Smooth(x, low);
            (_, double[] fineHigh) = Smooth(x, high);
            (_, double[] fineMid) = Smooth(x, mid);
            FillY band = plot.Add.FillY(fine, fineLow, fineHigh);
            band.FillColor = Palette.Of(_colours[i]).WithAlpha(0.18);
            band.LineColor = Palette.Of(_colours[i]).WithAlpha(0.6);
            band.LineWidth = 1;
            Scatter line = plot.Add.ScatterLine(fine, fineMid);
            line.Color = Palette.Of(_colours[i]);
            line.LineWidth = i == 0 ? 1.5f : 3f;
            Scatter marks = plot.Add.ScatterPoints(x, mid);
            marks.Color = Palette.Of(_colours[i]);
            marks.MarkerShape = _shapes[i];
            marks.MarkerSize = Marker;
            marks.MarkerLineWidth = 2;
            marks.LegendText = setup.Name;
        }
        plot.XLabel(newtons ? $"{words.Labels.AxisThrust} [{numbers.ForceUnit}]" : words.Labels.AxisThrustRelative);
        plot.YLabel(words.Labels.AxisTurnRate);
        double full = c.Setups[0].At.Max(X);
        (double bottom, double top) = Limits([.. c.Setups.SelectMany(s => s.At)], c);
        plot.Axes.SetLimits(-0.02 * full, 1.04 * full, bottom, top);
        TurnPlot.Axes(plot);
        plot.ShowLegend(Edge.Bottom);
        return SvgFigure.Stack("compare", Width, [(plot, Height)], words.Comparing.Heads.PowerPlot, words.Comparing.PowerPlotDescription(c));
    }

    /// <summary>Pull where it is to be nulled, flight by flight; null with fewer than two flights.</summary>
    public static string? History(FlightComparison c, Words words, Numbers numbers)
    {
        CompareHeads heads = words.Comparing.Heads;
        double[] at = [.. Enumerable.Range(0, c.Flights.Length).Select(i => (double)(i + 1))];
        (double Value, double Half)?[] pulls = [.. c.Flights.Select((f, i) => Of(f, i, c))];
        if (pulls.Count(p => p is not null) < 2)
            return null;
        Plot plot = Start(c, words, numbers);
        string[] setups = [.. c.Setups.Select(s => s.Name)];
        for (int s = 0; s < setups.Length; s++)
        {
            int style = s % _colours.Length;
            int[] own = [.. Enumerable.Range(0, c.Flights.Length).Where(i => c.Flights[i].Setup == setups[s] && pulls[i] is not null)];
            if (own.Length == 0)
                continue;
            double[] x = [.. own.Select(i => at[i])], y = [.. own.Select(i => Deg(pulls[i]!.Value.Value))];
            foreach (int i in own)
            {
                (double value, double half) = pulls[i]!.Value;
                LinePlot bar = plot.Add.Line(at[i], Deg(value - half), at[i], Deg(value + half));
                bar.Color = Palette.Of(_colours[style]);
                bar.LineWidth = 2;
            }
            Scatter marks = plot.Add.ScatterPoints(x, y);
            marks.Color = Palette.Of(_colours[style]);
            marks.MarkerShape = _shapes[style];
            marks.MarkerSize = Marker + 2;
            marks.MarkerLineWidth = 2;
            marks.LegendText = setups[s];
        }
        plot.XLabel(heads.FlightNumber);
        plot.YLabel(words.Labels.AxisTurnRate);
        plot.Axes.Bottom.TickGenerator = new ScottPlot.TickGenerators.NumericManual(at, [.. at.Select(numbers.Tick)]);
        double tolerance = Deg(c.Options.Trim.Tolerance.RadPerSec);
        double low = Math.Min(-tolerance, pulls.Min(p => p is { } v ? Deg(v.Value - v.Half) : 0)), high = Math.Max(tolerance, pulls.Max(p => p is { } v ? Deg(v.Value + v.Half) : 0));
        double margin = 0.08 * (high - low);
        plot.Axes.SetLimits(0.5, at.Length + 0.5, low - margin, high + margin);
        TurnPlot.Axes(plot);
        plot.ShowLegend(Edge.Bottom);
        return SvgFigure.Stack("history", Width, [(plot, Height)], heads.History, words.Comparing.HistoryDescription(c));
    }

    /// <summary>A flight's pull where it is to be nulled and the half-width of its own 95 % interval, rad/s; null when it cannot tell.</summary>
    public static (double Value, double Half)? Of(ComparedFlight flight, int place, FlightComparison c)
    {
        ComparedSetup? setup = c.Setups.FirstOrDefault(s => s.Flights.Contains(place));
        if (setup is null)
            return null;
        TurnFit fit = flight.Analysis.Fit;
        double full = c.ThrustBasis == ThrustBasis.Newton ? c.CommonFullThrust : flight.Analysis.Signals.FullThrust;
        return fit.PullAt(setup.AtBalance.ThrustFraction * full) is Estimate e && fit.Interval95(e) is ConfidenceInterval i ? (e.Value, i.HalfWidth) : null;
    }

    private static Plot Start(FlightComparison c, Words words, Numbers numbers)
    {
        var plot = new Plot();
        PlotFont.Use(plot);
        SvgFigure.Ticks(plot, numbers);
        double tolerance = Deg(c.Options.Trim.Tolerance.RadPerSec);
        VerticalSpan span = plot.Add.VerticalSpan(-tolerance, tolerance);
        span.FillColor = Palette.Of(Palette.Shade).WithAlpha(0.45);
        span.LineWidth = 0;
        span.LegendText = words.Comparing.Heads.Tolerance;
        plot.Add.HorizontalLine(0, 1, Palette.Of(Palette.Grey)); // solid: of a dashed line the SVG backend complains on standard error
        return plot;
    }

    private static (double Bottom, double Top) Limits(SetupPull[] pulls, FlightComparison c)
    {
        double tolerance = Deg(c.Options.Trim.Tolerance.RadPerSec);
        double low = Math.Min(-tolerance, pulls.Min(p => Deg(p.Interval95.Lower))), high = Math.Max(tolerance, pulls.Max(p => Deg(p.Interval95.Upper)));
        double margin = 0.06 * (high - low);
        return (low - margin, high + margin);
    }

    /// <summary>The polynomial through four places: the pull is a parabola, the ends of its band nearly one.</summary>
    private static (double[] X, double[] Y) Smooth(double[] x, double[] y)
    {
        int[] order = [.. Enumerable.Range(0, x.Length).OrderBy(i => x[i]).DistinctBy(i => Math.Round(x[i], 9))];
        double[] xs = [.. order.Select(i => x[i])], ys = [.. order.Select(i => y[i])];
        if (xs.Length < 2)
            return (xs, ys);
        var curve = new double[Steps + 1];
        var places = new double[Steps + 1];
        for (int k = 0; k <= Steps; k++)
        {
            places[k] = xs[0] + ((xs[^1] - xs[0]) * k / Steps);
            double sum = 0;
            for (int i = 0; i < xs.Length; i++)
            {
                double term = ys[i];
                for (int j = 0; j < xs.Length; j++)
                    term *= j == i ? 1 : (places[k] - xs[j]) / (xs[i] - xs[j]);
                sum += term;
            }
            curve[k] = sum;
        }
        return (places, curve);
    }

    private static double Deg(double radPerSec) => double.RadiansToDegrees(radPerSec);
}
