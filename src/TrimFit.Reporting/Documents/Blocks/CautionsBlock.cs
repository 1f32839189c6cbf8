namespace TrimFit.Reporting.Documents;

/// <summary>The cautions; last in every report.</summary>
/// <param name="Items">Code, such as <c>hang-check</c>, and text of each.</param>
public sealed record CautionsBlock(IReadOnlyList<(string Code, string Text)> Items) : Block;
