namespace TrimFit.Reporting.Documents;

/// <summary>One reading of a sheet.</summary>
/// <param name="Name">What is read, with its unit.</param>
/// <param name="Key">Where it goes in the rig file.</param>
/// <param name="Now">What the rig file says now; empty when it says nothing.</param>
/// <param name="Cells">Places to write.</param>
public sealed record ReadingRow(string Name, string Key, string Now, int Cells);
