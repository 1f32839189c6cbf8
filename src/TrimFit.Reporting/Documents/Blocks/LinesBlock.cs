namespace TrimFit.Reporting.Documents;

/// <summary>Empty lines to write on.</summary>
/// <param name="Count">How many; 1 or more.</param>
public sealed record LinesBlock(int Count) : Block;
