using ScottPlot;
using ScottPlot.Plottables;
using TrimFit.Core.Logs;
using TrimFit.Core.Turns;
using TrimFit.Core.Units;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>The wind circle and the ground track: both square, both thinned so that the page stays small.</summary>
internal static class GroundPlots
{
    private const int Size = 520, Below = 124, MostDots = 400, MostTrackPoints = 1200;

    /// <summary>Velocities over ground around the wind; null without a wind.</summary>
    public static string? Wind(TurnSignals signals, string description, Words words, Numbers numbers) => WindPlot(signals, words, numbers) is Plot plot
        ? Finish(plot, "wind", numbers.SpeedUnit, words.Report.WindTitle, description, words)
        : null;

    /// <summary>The wind circle as a plot.</summary>
    internal static Plot? WindPlot(TurnSignals signals, Words words, Numbers numbers)
    {
        if (signals.Wind is not Wind wind || !signals.HasVelocity)
            return null;
        ReportWords w = words.Report;
        int[] fixes = [.. Enumerable.Range(0, signals.Count).Where(i => double.IsFinite(signals.VelocityNorth[i]) && double.IsFinite(signals.VelocityEast[i]))];
        int every = (fixes.Length / MostDots) + 1;
        int[] drawn = [.. fixes.Where((_, i) => i % every == 0)];
        if (drawn.Length == 0)
            return null;
        Plot plot = Square(numbers);
        double scale = numbers.SpeedValue(1);
        Scatter dots = plot.Add.ScatterPoints(drawn.Select(i => signals.VelocityEast[i] * scale).ToArray(), drawn.Select(i => signals.VelocityNorth[i] * scale).ToArray());
        dots.Color = Palette.Of(Palette.Grey);
        dots.MarkerShape = MarkerShape.OpenCircle;
        dots.MarkerSize = 5;
        dots.LegendText = w.GroundVelocity;
        (double X, double Y)[] circle = [.. Enumerable.Range(0, 91).Select(k => (
            (wind.EastMPerSec + (wind.AirspeedMPerSec * Math.Sin(k * Math.Tau / 90))) * scale,
            (wind.NorthMPerSec + (wind.AirspeedMPerSec * Math.Cos(k * Math.Tau / 90))) * scale))];
        Scatter line = plot.Add.ScatterLine(circle.Select(p => p.X).ToArray(), circle.Select(p => p.Y).ToArray());
        line.Color = Palette.Of(Palette.Blue);
        line.LineWidth = 2.5f;
        line.LegendText = w.AirspeedCircle;
        Scatter arrow = plot.Add.Scatter(new[] { 0, wind.EastMPerSec * scale }, new[] { 0, wind.NorthMPerSec * scale });
        arrow.Color = Palette.Of(Palette.Vermilion);
        arrow.LineWidth = 3;
        arrow.MarkerSize = 9;
        arrow.LegendText = w.WindArrow;
        double reach = 1.1 * Math.Max(circle.Max(p => Math.Max(Math.Abs(p.X), Math.Abs(p.Y))), drawn.Max(i => Math.Max(Math.Abs(signals.VelocityEast[i]), Math.Abs(signals.VelocityNorth[i])) * scale));
        plot.Axes.SetLimits(-reach, reach, -reach, reach);
        return plot;
    }

    /// <summary>Positions over ground from the first one, and the way flown, m; null when the log has none.</summary>
    public static (string Svg, double LengthM)? Track(FlightLog flight, Func<double, string> description, Words words, Numbers numbers)
    {
        if (!flight.Has(ChannelRole.Latitude) || !flight.Has(ChannelRole.Longitude))
            return null;
        double[] latitude = flight[ChannelRole.Latitude].ToArray(), longitude = flight[ChannelRole.Longitude].ToArray();
        int[] fixes = [.. Enumerable.Range(0, flight.Count).Where(i => double.IsFinite(latitude[i]) && double.IsFinite(longitude[i]))];
        int every = (fixes.Length / MostTrackPoints) + 1;
        int[] drawn = [.. fixes.Where((_, i) => i % every == 0)];
        if (drawn.Length < 2)
            return null;
        double scale = numbers.Imperial ? 1 / 1609.344 : 0.001; // miles, kilometres
        double lat0 = latitude[drawn[0]], lon0 = longitude[drawn[0]];
        (double East, double North)[] places = [.. drawn.Select(i => (
            Math.IEEERemainder(longitude[i] - lon0, Math.Tau) * Math.Cos(lat0) * PhysicalConstants.MeanEarthRadius,
            (latitude[i] - lat0) * PhysicalConstants.MeanEarthRadius))];
        double length = places.Zip(places.Skip(1)).Sum(p => Math.Sqrt(Math.Pow(p.Second.East - p.First.East, 2) + Math.Pow(p.Second.North - p.First.North, 2)));
        Plot plot = Square(numbers);
        Scatter line = plot.Add.ScatterLine(places.Select(p => p.East * scale).ToArray(), places.Select(p => p.North * scale).ToArray());
        line.Color = Palette.Of(Palette.Ink);
        line.LineWidth = 1.5f;
        double[] origin = [0];
        Scatter start = plot.Add.ScatterPoints(origin, origin);
        start.Color = Palette.Of(Palette.Vermilion);
        start.MarkerShape = MarkerShape.FilledCircle;
        start.MarkerSize = 12;
        start.LegendText = words.Report.Start;
        double midX = (places.Max(p => p.East) + places.Min(p => p.East)) / 2 * scale, midY = (places.Max(p => p.North) + places.Min(p => p.North)) / 2 * scale;
        double reach = Math.Max(0.05, 0.55 * scale * Math.Max(places.Max(p => p.East) - places.Min(p => p.East), places.Max(p => p.North) - places.Min(p => p.North)));
        plot.Axes.SetLimits(midX - reach, midX + reach, midY - reach, midY + reach);
        return (Finish(plot, "track", numbers.Imperial ? "mi" : "km", words.Report.TrackTitle, description(length), words), length);
    }

    private static Plot Square(Numbers numbers)
    {
        var plot = new Plot();
        PlotFont.Use(plot);
        SvgFigure.Ticks(plot, numbers);
        return plot;
    }

    private static string Finish(Plot plot, string id, string unit, string title, string description, Words words)
    {
        plot.XLabel(words.Report.AxisEast(unit));
        plot.YLabel(words.Report.AxisNorth(unit));
        TurnPlot.Axes(plot);
        plot.Layout.Fixed(new PixelPadding(74, 24, Below, 14)); // as wide as high
        plot.ShowLegend(Edge.Bottom);
        return SvgFigure.Stack(id, Size, [(plot, Size - 74 - 24 + Below + 14)], title, description);
    }
}
