namespace TrimFit.Simulation;

/// <summary>Encodings loggers and spreadsheets write.</summary>
public enum CsvEncoding
{
    /// <summary>UTF-8.</summary>
    Utf8,
    /// <summary>UTF-8 with byte-order mark.</summary>
    Utf8WithMark,
    /// <summary>UTF-16 little endian.</summary>
    Utf16,
    /// <summary>UTF-16 little endian with byte-order mark.</summary>
    Utf16WithMark,
    /// <summary>Windows-1252.</summary>
    Windows1252,
}
