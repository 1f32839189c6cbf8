namespace TrimFit.Reporting.Documents;

/// <summary>Head of a column.</summary>
/// <param name="Head">A word or two, with the unit.</param>
/// <param name="Numeric">Flush right.</param>
public sealed record TableColumn(string Head, bool Numeric = true);
