namespace TrimFit.Reporting.Rows;

/// <summary>What all cells of a column are.</summary>
public enum CellType
{
    /// <summary>Floating-point numbers.</summary>
    Number,
    /// <summary>Text.</summary>
    Text,
    /// <summary>True or false.</summary>
    Boolean,
}
