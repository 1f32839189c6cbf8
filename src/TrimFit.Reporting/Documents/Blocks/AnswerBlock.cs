namespace TrimFit.Reporting.Documents;

/// <summary>The answer: the first sentence of every result.</summary>
/// <param name="Text">One or two sentences.</param>
public sealed record AnswerBlock(string Text) : Block;
