namespace TrimFit.Core.Workshop;

/// <summary>A note.</summary>
/// <param name="Made">When, UTC.</param>
/// <param name="Text">What.</param>
public sealed record NoteRecord(DateTimeOffset Made, string Text);
