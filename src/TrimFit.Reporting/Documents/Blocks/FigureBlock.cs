namespace TrimFit.Reporting.Documents;

/// <summary>A figure as SVG, with the text for those who cannot see it. The terminal leaves it out.</summary>
/// <param name="Svg">Markup made by this program: a page takes it as it is, so names from files must be encoded in it.</param>
/// <param name="Caption">What it shows.</param>
/// <param name="Kind">Plot or drawing.</param>
public sealed record FigureBlock(string Svg, string Caption, FigureKind Kind = FigureKind.Plot) : Block;
