namespace TrimFit.Reporting.Documents;

/// <summary>What follows begins on a new sheet of paper.</summary>
public sealed record PageBreakBlock : Block;
