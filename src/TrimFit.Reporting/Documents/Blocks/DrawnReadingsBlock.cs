namespace TrimFit.Reporting.Documents;

/// <summary>Readings to take and write down, with the drawing that shows where.</summary>
/// <param name="Svg">Markup made by this program.</param>
/// <param name="Title">What is read.</param>
/// <param name="Text">How, and what the drawing shows for those who cannot see it.</param>
/// <param name="Heads">Heads of the table: name, then what stands beside it and the cells to write in.</param>
/// <param name="Rows">The readings.</param>
public sealed record DrawnReadingsBlock(string Svg, string Title, string Text, IReadOnlyList<string> Heads, IReadOnlyList<ReadingRow> Rows) : Block;
