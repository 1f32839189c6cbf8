namespace TrimFit.Reporting.Documents;

/// <summary>A thing to tick off.</summary>
/// <param name="Text">What to check or do.</param>
/// <param name="Done">Whether the box is ticked already; null where nobody has looked yet.</param>
public sealed record CheckItem(string Text, bool? Done = null);
