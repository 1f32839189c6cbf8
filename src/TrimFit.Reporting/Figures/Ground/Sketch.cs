using System.Globalization;
using System.Text;

namespace TrimFit.Reporting.Figures;

/// <summary>A line drawing as SVG. Lengths are the drawing's own units; numbers are written the same way on every machine.</summary>
internal sealed class Sketch(double width, double height)
{
    public const string Ink = "#1b1f24", Soft = "#8a94a3", Mark = "#0072b2";

    private readonly StringBuilder _parts = new();

    public Sketch Line(double x1, double y1, double x2, double y2, string colour = Ink, double stroke = 1.6, string dash = "") =>
        Add($"<line x1=\"{N(x1)}\" y1=\"{N(y1)}\" x2=\"{N(x2)}\" y2=\"{N(y2)}\" stroke=\"{colour}\" stroke-width=\"{N(stroke)}\" stroke-linecap=\"round\"{(dash.Length == 0 ? "" : $" stroke-dasharray=\"{dash}\"")}/>");

    public Sketch Circle(double x, double y, double r, string colour = Ink, double stroke = 1.6, string fill = "none") =>
        Add($"<circle cx=\"{N(x)}\" cy=\"{N(y)}\" r=\"{N(r)}\" stroke=\"{colour}\" stroke-width=\"{N(stroke)}\" fill=\"{fill}\"/>");

    public Sketch Box(double x, double y, double w, double h, string colour = Ink, double stroke = 1.6, string fill = "none", double round = 2) =>
        Add($"<rect x=\"{N(x)}\" y=\"{N(y)}\" width=\"{N(w)}\" height=\"{N(h)}\" rx=\"{N(round)}\" stroke=\"{colour}\" stroke-width=\"{N(stroke)}\" fill=\"{fill}\"/>");

    public Sketch Path(string d, string colour = Ink, double stroke = 1.6, string fill = "none") =>
        Add($"<path d=\"{d}\" stroke=\"{colour}\" stroke-width=\"{N(stroke)}\" fill=\"{fill}\" stroke-linecap=\"round\"/>");

    public Sketch Text(double x, double y, string text, string anchor = "middle", double size = 9, string colour = Ink) =>
        Add($"<text x=\"{N(x)}\" y=\"{N(y)}\" text-anchor=\"{anchor}\" font-size=\"{N(size)}\" font-family=\"DejaVu Sans, Verdana, sans-serif\" fill=\"{colour}\">{Html.Encode(text)}</text>");

    /// <summary>A line with a head at its end.</summary>
    public Sketch Arrow(double x1, double y1, double x2, double y2, string colour = Mark, double stroke = 1.6)
    {
        double angle = Math.Atan2(y2 - y1, x2 - x1);
        const double Head = 6, Half = 0.42;
        return Line(x1, y1, x2, y2, colour, stroke)
            .Path($"M{N(x2 - (Head * Math.Cos(angle - Half)))} {N(y2 - (Head * Math.Sin(angle - Half)))} L{N(x2)} {N(y2)} L{N(x2 - (Head * Math.Cos(angle + Half)))} {N(y2 - (Head * Math.Sin(angle + Half)))}", colour, stroke);
    }

    /// <summary>A measured distance: heads at both ends, a word beside it.</summary>
    public Sketch Dimension(double x1, double y1, double x2, double y2, string text, double dx = 0, double dy = -4) =>
        Arrow(x1, y1, x2, y2).Arrow(x2, y2, x1, y1).Text(((x1 + x2) / 2) + dx, ((y1 + y2) / 2) + dy, text, colour: Mark);

    /// <summary>The drawing, as wide as its place.</summary>
    public string Svg(string description) =>
        $"<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 {N(width)} {N(height)}\" role=\"img\" aria-label=\"{Html.Encode(description)}\">{_parts}</svg>";

    /// <summary>The drawing in millimetres of paper.</summary>
    public string SvgMillimetres(string description) =>
        $"<svg xmlns=\"http://www.w3.org/2000/svg\" width=\"{N(width)}mm\" height=\"{N(height)}mm\" viewBox=\"0 0 {N(width)} {N(height)}\" role=\"img\" aria-label=\"{Html.Encode(description)}\">{_parts}</svg>";

    internal static string N(double value) => Math.Round(value, 3).ToString("0.###", CultureInfo.InvariantCulture);

    private Sketch Add(string part)
    {
        _parts.Append(part);
        return this;
    }
}
