namespace TrimFit.Reporting.Documents;

/// <summary>Named values. A value that is missing becomes a line to write on.</summary>
/// <param name="Items">Name and value of each.</param>
public sealed record FieldsBlock(IReadOnlyList<FieldItem> Items) : Block;
