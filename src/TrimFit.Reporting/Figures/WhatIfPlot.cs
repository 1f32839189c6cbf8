using System.Text;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>Turn left over the travel of one part, a line a power: where a line crosses zero, the turn is gone at that power.</summary>
internal static class WhatIfPlot
{
    private const double Width = 640, Height = 300, Left = 58, Right = 130, Top = 14, Bottom = 46;

    /// <summary>Draws the plot; empty with fewer than two travels.</summary>
    public static string Draw(AdjustmentReport way, IReadOnlyList<WhatIfRow> rows, Words words, Numbers numbers)
    {
        if (rows.Count < 2)
            return "";
        (string Colour, double Width)[] styles = [(Palette.Grey, 1.6), (Palette.Blue, 1.6), (Palette.Vermilion, 3), (Palette.Ink, 1.6)];
        double x0 = rows[0].Travel, x1 = rows[^1].Travel;
        double[] rates = [.. rows.SelectMany(r => r.State.TurnLeftAt.Select(t => double.RadiansToDegrees(t.RateRadPerSec!.Value))).Append(0)];
        double y0 = rates.Min(), y1 = rates.Max(), pad = 0.06 * Math.Max(y1 - y0, 0.5);
        (y0, y1) = (y0 - pad, y1 + pad);
        double X(double travel) => Left + ((travel - x0) / (x1 - x0) * (Width - Left - Right));
        double Y(double deg) => Top + ((y1 - deg) / (y1 - y0) * (Height - Top - Bottom));
        var svg = new StringBuilder();
        SvgFigure.Open(svg, "whatif", Invariant($"0 0 {Width} {Height}"), words.Web.WhatIfPlotTitle, words.Web.WhatIfPlotCaption);
        svg.Append(Invariant($"<g font-family=\"{PlotFont.CssFamilies}\" font-size=\"12\" fill=\"{Palette.Ink}\">\n"));
        svg.Append(Line(Left, Y(0), Width - Right, Y(0), Palette.Ink, 1)).Append(Line(Left, Top, Left, Height - Bottom, Palette.Grey, 1));
        foreach (double tick in Ticks(y0, y1))
        {
            svg.Append(Line(Left - 4, Y(tick), Left, Y(tick), Palette.Grey, 1));
            svg.Append(Html.Of($"<text x=\"{Invariant($"{Left - 8}")}\" y=\"{Invariant($"{Y(tick) + 4:0.#}")}\" text-anchor=\"end\">{numbers.Tick(tick)}</text>\n"));
        }
        double scale = way.Unit switch { TravelUnit.Meter => numbers.Imperial ? 0.0254 : 0.001, TravelUnit.Radian => Math.PI / 180, _ => numbers.Imperial ? 0.45359237 : 1 };
        foreach (double tick in Ticks(x0 / scale, x1 / scale))
        {
            svg.Append(Line(X(tick * scale), Height - Bottom, X(tick * scale), Height - Bottom + 4, Palette.Grey, 1));
            svg.Append(Html.Of($"<text x=\"{Invariant($"{X(tick * scale):0.#}")}\" y=\"{Invariant($"{Height - Bottom + 18}")}\" text-anchor=\"middle\">{numbers.Tick(tick)}</text>\n"));
        }
        svg.Append(Line(Left, Height - Bottom, Width - Right, Height - Bottom, Palette.Grey, 1));
        svg.Append(Html.Of($"<text x=\"{Invariant($"{(Left + Width - Right) / 2:0.#}")}\" y=\"{Invariant($"{Height - 8}")}\" text-anchor=\"middle\">{words.Web.TravelAxis(numbers.TravelUnitName(way.Unit))}</text>\n"));
        svg.Append(Html.Of($"<text transform=\"translate(14 {Invariant($"{(Top + Height - Bottom) / 2:0.#}")}) rotate(-90)\" text-anchor=\"middle\">{words.Labels.AxisTurnRateShort}</text>\n"));
        var labels = new List<double>();
        for (int i = 0; i < rows[0].State.TurnLeftAt.Length; i++)
        {
            int at = i;
            string points = string.Join(' ', rows.Select(r => Invariant($"{X(r.Travel):0.##},{Y(double.RadiansToDegrees(r.State.TurnLeftAt[at].RateRadPerSec!.Value)):0.##}")));
            svg.Append(Invariant($"<polyline points=\"{points}\" fill=\"none\" stroke=\"{styles[i].Colour}\" stroke-width=\"{styles[i].Width}\"/>\n"));
            double end = Y(double.RadiansToDegrees(rows[^1].State.TurnLeftAt[i].RateRadPerSec!.Value));
            while (labels.Exists(other => Math.Abs(other - end) < 14))
                end += 7;
            labels.Add(end);
            svg.Append(Html.Of($"<text x=\"{Invariant($"{Width - Right + 8}")}\" y=\"{Invariant($"{end + 4:0.#}")}\" fill=\"{styles[i].Colour}\">{words.Setting(rows[0].State.TurnLeftAt[i].Setting)}</text>\n"));
        }
        return svg.Append("</g>\n</svg>").ToString();
    }

    /// <summary>About six round numbers between two ends.</summary>
    private static IEnumerable<double> Ticks(double low, double high)
    {
        double raw = (high - low) / 6, power = Math.Pow(10, Math.Floor(Math.Log10(raw)));
        double step = power * (raw / power) switch { < 1.5 => 1, < 3.5 => 2, < 7.5 => 5, _ => 10 };
        for (double tick = Math.Ceiling(low / step) * step; tick <= high + (1e-9 * step); tick += step)
            yield return tick;
    }

    private static string Line(double x1, double y1, double x2, double y2, string colour, double width) =>
        Invariant($"<path d=\"M{x1:0.##} {y1:0.##}L{x2:0.##} {y2:0.##}\" stroke=\"{colour}\" stroke-width=\"{width}\" fill=\"none\"/>\n");

    private static string Invariant(FormattableString text) => FormattableString.Invariant(text);
}
