namespace TrimFit.Reporting.Documents;

/// <summary>Things to do one after the other; numbered.</summary>
/// <param name="Items">One step each.</param>
public sealed record StepsBlock(IReadOnlyList<string> Items) : Block;
