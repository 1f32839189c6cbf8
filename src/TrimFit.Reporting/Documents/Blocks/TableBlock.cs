namespace TrimFit.Reporting.Documents;

/// <summary>A table; cells of a column that is numeric are flush right. An empty cell of a page is a place to write.</summary>
/// <param name="Columns">The heads.</param>
/// <param name="Rows">As many cells in each row as there are heads.</param>
public sealed record TableBlock(IReadOnlyList<TableColumn> Columns, IReadOnlyList<IReadOnlyList<string>> Rows) : Block;
