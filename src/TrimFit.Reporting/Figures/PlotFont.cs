using ScottPlot;
using SkiaSharp;

namespace TrimFit.Reporting.Figures;

/// <summary>The font of the plots, carried along: on a machine without fonts a plot would have no text, and no warning either.</summary>
internal sealed class PlotFont : IFontResolver
{
    /// <summary>Name under which ScottPlot asks for it.</summary>
    public const string Name = "DejaVu Sans";

    /// <summary>Families for readers without that font; the second has nearly the same widths.</summary>
    public const string CssFamilies = "DejaVu Sans, Verdana, Geneva, sans-serif";

    private static readonly Lock _lock = new();
    private static SKTypeface? _typeface;

    private PlotFont()
    {
    }

    /// <summary>Makes the font known to ScottPlot and sets it on a plot.</summary>
    public static void Use(Plot plot)
    {
        lock (_lock)
        {
            if (_typeface is null)
            {
                using Stream stream = typeof(PlotFont).Assembly.GetManifestResourceStream("TrimFit.Reporting.Fonts.DejaVuSans.ttf")
                    ?? throw new InvalidOperationException("The plots' font is missing from the program.");
                _typeface = SKTypeface.FromStream(stream);
                Fonts.FontResolvers.Insert(0, new PlotFont());
            }
        }
        plot.Font.Set(Name);
    }

    /// <inheritdoc/>
    public SKTypeface? CreateTypeface(string fontName, bool bold, bool italic) => fontName == Name ? _typeface : null;

    /// <inheritdoc/>
    public SKTypeface? CreateTypeface(string fontName, FontWeight weight, FontSlant slant, FontSpacing spacing) => fontName == Name ? _typeface : null;
}
