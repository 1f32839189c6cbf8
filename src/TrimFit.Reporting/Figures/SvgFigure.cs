using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;
using ScottPlot;
using TrimFit.Reporting.Wording;

namespace TrimFit.Reporting.Figures;

/// <summary>Makes a plot's SVG fit to stand inside a page: scalable, named for screen readers, and the same bytes each time.</summary>
internal static partial class SvgFigure
{
    /// <summary>Renders plots under each other as one figure.</summary>
    /// <param name="id">Letters; begins every identifier inside, so that figures on one page do not share clip paths.</param>
    /// <param name="width">Width of all plots, in pixels of the drawing.</param>
    /// <param name="plots">The plots with their heights.</param>
    /// <param name="title">Name of the figure.</param>
    /// <param name="description">What it shows, for those who cannot see it.</param>
    public static string Stack(string id, int width, IReadOnlyList<(Plot Plot, int Height)> plots, string title, string description)
    {
        var svg = new StringBuilder();
        Open(svg, id, string.Create(CultureInfo.InvariantCulture, $"0 0 {width} {plots.Sum(p => p.Height)}"), title, description);
        int y = 0;
        for (int i = 0; i < plots.Count; i++)
        {
            string inner = Inner(plots[i].Plot.GetSvgXml(width, plots[i].Height), string.Create(CultureInfo.InvariantCulture, $"{id}-{i}-"));
            svg.Append(CultureInfo.InvariantCulture, $"<svg x=\"0\" y=\"{y}\" width=\"{width}\" height=\"{plots[i].Height}\">{inner}</svg>\n");
            y += plots[i].Height;
        }
        return svg.Append("</svg>").ToString();
    }

    /// <summary>Opening tag with role, title and description.</summary>
    public static void Open(StringBuilder svg, string id, string viewBox, string title, string description) =>
        svg.Append(Html.Of($"<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"{viewBox}\" role=\"img\" aria-labelledby=\"{id}-t {id}-d\">"))
            .Append(Html.Of($"<title id=\"{id}-t\">{title}</title><desc id=\"{id}-d\">{description}</desc>\n"));

    /// <summary>An axis whose numbers follow the asked-for culture, not the machine's.</summary>
    public static void Ticks(Plot plot, Numbers numbers)
    {
        plot.Axes.Bottom.TickGenerator = new ScottPlot.TickGenerators.NumericAutomatic { LabelFormatter = numbers.Tick };
        plot.Axes.Left.TickGenerator = new ScottPlot.TickGenerators.NumericAutomatic { LabelFormatter = numbers.Tick };
    }

    private static string Inner(string svg, string prefix)
    {
        int start = svg.IndexOf('>', svg.IndexOf("<svg", StringComparison.Ordinal)) + 1;
        int end = svg.LastIndexOf("</svg>", StringComparison.Ordinal);
        string inner = svg[start..end];
        // The library counts its identifiers over the life of the process: numbered anew here, or the same plot would differ each time.
        var names = new Dictionary<string, string>();
        inner = Identifier().Replace(inner, m =>
        {
            string old = m.Groups["id"].Value;
            if (!names.TryGetValue(old, out string? name))
                names[old] = name = prefix + names.Count.ToString(CultureInfo.InvariantCulture);
            return m.Groups["before"].Value + name + m.Groups["after"].Value;
        });
        return FontFamily().Replace(inner, $"font-family=\"{PlotFont.CssFamilies}\"");
    }

    [GeneratedRegex("(?<before>\\bid=\"|url\\(#|href=\"#)(?<id>[A-Za-z_][A-Za-z0-9_-]*)(?<after>\"|\\))")]
    private static partial Regex Identifier();

    [GeneratedRegex("font-family=\"[^\"]*\"")]
    private static partial Regex FontFamily();
}
