namespace TrimFit.Reporting.Documents;

/// <summary>Things to tick off: a box before each.</summary>
/// <param name="Items">One thing each.</param>
public sealed record ChecksBlock(IReadOnlyList<CheckItem> Items) : Block;
