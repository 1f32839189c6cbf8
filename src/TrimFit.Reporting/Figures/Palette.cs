using ScottPlot;

namespace TrimFit.Reporting.Figures;

/// <summary>Colours that stay apart for colour-blind eyes (Okabe and Ito 2008, "Color Universal Design"); line style and marker
/// tell the same things again for paper in black and white.</summary>
internal static class Palette
{
    public const string Blue = "#0072B2";
    public const string Vermilion = "#D55E00";
    public const string Green = "#009E73";
    public const string Ink = "#1b1f24";
    public const string Grey = "#6b7280";
    public const string Shade = "#d9dce1";

    public static Color Of(string hex) => Color.FromHex(hex);
}
