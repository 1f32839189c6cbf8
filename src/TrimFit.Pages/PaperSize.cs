namespace TrimFit.Pages;

/// <summary>Paper sizes.</summary>
public enum PaperSize
{
    /// <summary>210 by 297 mm, ISO 216.</summary>
    A4,
    /// <summary>148 by 210 mm, ISO 216.</summary>
    A5,
    /// <summary>105 by 148 mm, ISO 216.</summary>
    A6,
    /// <summary>8.5 by 11 in.</summary>
    Letter,
}
