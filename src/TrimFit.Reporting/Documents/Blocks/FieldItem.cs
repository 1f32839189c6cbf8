namespace TrimFit.Reporting.Documents;

/// <summary>A named value.</summary>
/// <param name="Name">What it is.</param>
/// <param name="Value">The value; null for a line to write on.</param>
/// <param name="Lines">Lines to write on when there is no value; 1 or more.</param>
public sealed record FieldItem(string Name, string? Value = null, int Lines = 1);
