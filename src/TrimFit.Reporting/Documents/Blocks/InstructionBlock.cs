namespace TrimFit.Reporting.Documents;

/// <summary>What to do: stands out where the form allows.</summary>
/// <param name="Text">Whole sentences.</param>
public sealed record InstructionBlock(string Text) : Block;
