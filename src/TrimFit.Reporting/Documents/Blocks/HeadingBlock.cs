namespace TrimFit.Reporting.Documents;

/// <summary>Title of a section.</summary>
/// <param name="Text">A few words.</param>
public sealed record HeadingBlock(string Text) : Block;
