namespace TrimFit.Reporting.Documents;

/// <summary>A paragraph.</summary>
/// <param name="Text">Whole sentences.</param>
public sealed record ParagraphBlock(string Text) : Block;
