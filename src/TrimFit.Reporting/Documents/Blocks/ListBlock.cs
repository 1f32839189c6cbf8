namespace TrimFit.Reporting.Documents;

/// <summary>Short points.</summary>
/// <param name="Items">One point each.</param>
public sealed record ListBlock(IReadOnlyList<string> Items) : Block;
