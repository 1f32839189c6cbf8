namespace TrimFit.Reporting.Documents;

/// <summary>Lines for signatures, side by side where there is room.</summary>
/// <param name="Names">What stands under each line.</param>
public sealed record SignaturesBlock(IReadOnlyList<string> Names) : Block;
